//! Printed properties of whole models.

use redfathom::jobs::{Description, PrintedEpochs, describe};

use crate::accuracy::references::{history_of, matter_model};

/// Source, statement, model (Hubble constant, matter, Λ), which figure, printed, half unit.
type Property = (
    &'static str,
    &'static str,
    (f64, f64, bool),
    fn(&Description) -> Option<f64>,
    f64,
    f64,
);

const PROPERTIES: &[Property] = &[
    (
        "Hogg 1999, arXiv:astro-ph/9905116, sect. 2 (from memory)",
        "Hubble time 9.78 h^-1 Gyr",
        (100.0, 0.3, true),
        |of| of.today.hubble_time.value,
        9.78,
        0.005,
    ),
    (
        "Peebles 1993, Principles of Physical Cosmology, sect. 13",
        "Einstein–de Sitter: D_A peaks at z = 1.25",
        (50.0, 1.0, false),
        |of| of.milestones.angular_diameter_peaks[0].value,
        1.25,
        1e-12,
    ),
    (
        "Ryden 2003, Introduction to Cosmology, chapter 7 (from memory)",
        "D_A peaks at z = 1.6",
        (70.0, 0.3, true),
        |of| of.milestones.angular_diameter_peaks[0].value,
        1.6,
        0.05,
    ),
    (
        "Davis & Lineweaver 2004, PASA 21, 97, fig. 1 (from memory)",
        "event horizon 16 Gly today",
        // One Mpc is 3.2616e-3 Gly.
        (70.0, 0.3, true),
        |of| of.horizons.event.value.map(|mpc| mpc * 3.261_563_777e-3),
        16.0,
        0.5,
    ),
];

#[test]
fn printed_properties_of_models_are_reproduced() {
    for (source, statement, (hubble_constant, matter, lambda), figure, printed, half_unit) in
        PROPERTIES
    {
        let history = history_of(&matter_model(*hubble_constant, *matter, *lambda));
        let value = figure(&describe(&history, PrintedEpochs::default())).unwrap();
        println!("{value:12.6} {statement} ({source})");
        assert!(
            (value - printed).abs() <= *half_unit,
            "{statement}: {value}"
        );
    }
}
