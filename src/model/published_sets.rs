//! The published sets that ship: one literal each. A shipped name never changes
//! its numbers.

use super::published::{Origin, Printed, PublishedSet, Status, Uncertainty};
use super::{Citation, DarkEnergyDeclaration, Declaration, RadiationDeclaration};

/// Every set that ships.
pub static PUBLISHED_SETS: &[PublishedSet] = &[
    PublishedSet {
        name: "planck-2018-cmb-lensing",
        title: "Planck 2018, flat: temperature, polarization and lensing",
        status: Status::Confirmed,
        source: PLANCK_2018,
        table: "Table 2",
        column: "TT,TE,EE+lowE+lensing",
        note: PLANCK_2018_NOTE,
        declaration: || Declaration {
            hubble_constant: 67.36,
            matter: 0.3153,
            // Printed as baryons h² = 0.02237.
            baryons: Some(0.02237 / (0.6736 * 0.6736)),
            ..planck_2018_content()
        },
        uncertainty: Some(Uncertainty {
            parameters: &["hubble_constant", "matter"],
            standard_deviations: &[0.54, 0.0073],
            correlations: Some(&[&[1.0, -0.992], &[-0.992, 1.0]]),
            correlations_source: DERIVED_CORRELATIONS,
        }),
        printed: Printed {
            age_gyr: Some(13.797),
            age_standard_deviation_gyr: Some(0.023),
            decoupling_redshift: Some(1089.92),
            decoupling_sound_horizon_mpc: Some(144.43),
            drag_redshift: Some(1059.94),
            drag_sound_horizon_mpc: Some(147.09),
            equality_redshift: Some(3402.0),
        },
    },
    PublishedSet {
        name: "planck-2018-cmb-lensing-bao",
        title: "Planck 2018, flat: with lensing and baryon acoustic oscillations",
        status: Status::Confirmed,
        source: PLANCK_2018,
        table: "Table 2",
        column: "TT,TE,EE+lowE+lensing+BAO",
        note: PLANCK_2018_NOTE,
        declaration: || Declaration {
            hubble_constant: 67.66,
            matter: 0.3111,
            // Printed as baryons h² = 0.02242.
            baryons: Some(0.02242 / (0.6766 * 0.6766)),
            ..planck_2018_content()
        },
        uncertainty: Some(Uncertainty {
            parameters: &["hubble_constant", "matter"],
            standard_deviations: &[0.42, 0.0056],
            correlations: Some(&[&[1.0, -0.986], &[-0.986, 1.0]]),
            correlations_source: DERIVED_CORRELATIONS,
        }),
        printed: Printed {
            age_gyr: Some(13.787),
            age_standard_deviation_gyr: Some(0.020),
            decoupling_redshift: Some(1089.80),
            decoupling_sound_horizon_mpc: Some(144.57),
            drag_redshift: Some(1060.01),
            drag_sound_horizon_mpc: Some(147.21),
            equality_redshift: Some(3387.0),
        },
    },
    PublishedSet {
        name: "planck-2018-cmb",
        title: "Planck 2018, flat: temperature and polarization",
        status: Status::Confirmed,
        source: PLANCK_2018,
        table: "Table 2",
        column: "TT,TE,EE+lowE",
        note: PLANCK_2018_NOTE,
        declaration: || Declaration {
            hubble_constant: 67.27,
            matter: 0.3166,
            // Printed as baryons h² = 0.02236.
            baryons: Some(0.02236 / (0.6727 * 0.6727)),
            ..planck_2018_content()
        },
        uncertainty: Some(Uncertainty {
            parameters: &["hubble_constant", "matter"],
            standard_deviations: &[0.60, 0.0084],
            correlations: Some(&[&[1.0, -0.993], &[-0.993, 1.0]]),
            correlations_source: DERIVED_CORRELATIONS,
        }),
        printed: Printed {
            age_gyr: Some(13.800),
            age_standard_deviation_gyr: Some(0.024),
            decoupling_redshift: Some(1089.95),
            decoupling_sound_horizon_mpc: Some(144.39),
            drag_redshift: Some(1059.93),
            drag_sound_horizon_mpc: Some(147.05),
            equality_redshift: Some(3407.0),
        },
    },
    PublishedSet {
        name: "planck-2018-best-fit",
        title: "Planck 2018, flat: the best-fitting single model",
        status: Status::Confirmed,
        source: PLANCK_2018,
        table: "Table 1",
        column: "Plik best fit",
        note: PLANCK_2018_NOTE,
        declaration: || Declaration {
            hubble_constant: 67.32,
            matter: 0.3158,
            // Printed as baryons h² = 0.022383.
            baryons: Some(0.022383 / (0.6732 * 0.6732)),
            ..planck_2018_content()
        },
        uncertainty: None,
        printed: Printed {
            age_gyr: Some(13.7971),
            drag_sound_horizon_mpc: Some(147.049),
            ..NOTHING_PRINTED
        },
    },
    PublishedSet {
        name: "round-70-30",
        title: "Round numbers: H0 = 70, matter 0.3, cosmological constant 0.7",
        status: Status::Confirmed,
        source: Origin::CommonPractice,
        table: "",
        column: "",
        note: "No radiation; a choice of convenience, not a measurement.",
        declaration: || Declaration {
            hubble_constant: 70.0,
            matter: 0.3,
            ..Declaration::default()
        },
        uncertainty: None,
        printed: NOTHING_PRINTED,
    },
    PublishedSet {
        name: "einstein-de-sitter",
        title: "Einstein–de Sitter: flat, matter only, H0 = 50",
        status: Status::Confirmed,
        source: Origin::Published(Citation {
            authors: "Peebles",
            year: 1993,
            reference: "Principles of Physical Cosmology, Princeton",
            locator: "",
        }),
        table: "",
        column: "",
        note: "Historical; any Hubble constant makes one, 50 was in use with it.",
        declaration: || Declaration {
            hubble_constant: 50.0,
            matter: 1.0,
            dark_energy: Some(DarkEnergyDeclaration {
                form: "none".to_owned(),
                ..DarkEnergyDeclaration::default()
            }),
            ..Declaration::default()
        },
        uncertainty: None,
        printed: NOTHING_PRINTED,
    },
];

const PLANCK_2018: Origin = Origin::Published(Citation {
    authors: "Planck Collaboration VI (Aghanim et al.)",
    year: 2020,
    reference: "A&A 641, A6, arXiv:1807.06209",
    locator: "",
});

const PLANCK_2018_NOTE: &str = "Means or best fit as printed; neutrino masses and N_eff as assumed in its section 2, T0 = 2.7255 K from memory of the same place; baryons are the printed physical density over h².";

const DERIVED_CORRELATIONS: &str = "derived by first-order propagation from the printed errors of H0, Ω_m, Ω_m h² and Ω_m h³; the paper prints no correlation";

const NOTHING_PRINTED: Printed = Printed {
    age_gyr: None,
    age_standard_deviation_gyr: None,
    decoupling_redshift: None,
    decoupling_sound_horizon_mpc: None,
    drag_redshift: None,
    drag_sound_horizon_mpc: None,
    equality_redshift: None,
};

/// What the four sets of that paper assume: flat, two massless neutrinos and
/// one of 0.06 eV.
fn planck_2018_content() -> Declaration {
    Declaration {
        radiation: Some(RadiationDeclaration {
            cmb_temperature: Some(2.7255),
            effective_neutrino_number: Some(3.046),
            neutrino_masses: vec![0.06],
        }),
        ..Declaration::default()
    }
}
