//! Models described.

use super::*;

#[test]
fn a_model_is_described() {
    let history = with_radiation();
    let printed = PrintedEpochs {
        drag_redshift: Some(1059.94),
        decoupling_redshift: Some(1089.92),
    };
    let description = describe(&history, printed);
    let near = |scalar: &Scalar, expected: f64, tolerance: f64| {
        let value = scalar.value.unwrap();
        assert!(
            (value - expected).abs() <= tolerance,
            "{value} instead of {expected}"
        );
    };
    // Planck Collaboration VI 2020, A&A 641, A6, table 2, TT,TE,EE+lowE+lensing.
    near(&description.today.age, 13.797, 0.002);
    near(
        &description.milestones.equality.all_neutrinos_massless,
        3402.0,
        26.0,
    );
    near(&description.early.drag.sound_horizon, 147.09, 0.05);
    near(&description.early.decoupling.sound_horizon, 144.43, 0.05);
    near(&description.early.sound_horizon_fit, 147.09, 0.1);
    assert!(
        description
            .early
            .drag
            .redshift
            .source
            .as_deref()
            .unwrap()
            .contains("printed")
    );
    // Without radiation: 1 + z = (2 (1 − Ω_m)/Ω_m)^(1/3), and without the 2.
    near(&description.milestones.acceleration[0], 0.6315, 2e-3);
    near(
        &description.milestones.matter_dark_energy_equality,
        0.295,
        2e-3,
    );
    near(
        &description.milestones.angular_diameter_peaks[0],
        1.587,
        2e-3,
    );
    near(&description.horizons.event, 5112.0, 60.0);
    assert_eq!(description.past.kind, PastKind::HotBeginning);
    assert_eq!(description.fate.kind, FateKind::ExpandsForEver);
    assert_eq!(description.accuracy.len(), 34);

    let without = describe(&plain(0.3, 0.0), PrintedEpochs::default());
    assert!(without.early.drag.redshift.value.is_none());
    assert!(without.early.drag.sound_horizon.reason.is_some());
    // Davis & Lineweaver 2004, PASA 21, 97, text (from memory): 16 Gly.
    near(&without.horizons.event, 16.0 * 306.6, 30.0);
}

#[test]
fn the_end_is_told() {
    let constant = |w: f64| DarkEnergyDeclaration {
        form: "constant".to_owned(),
        density: None,
        parameters: vec![("w".to_owned(), w)],
    };
    let declared = |dark_energy| Declaration {
        hubble_constant: 70.0,
        matter: 0.0,
        dark_energy: Some(dark_energy),
        ..Declaration::default()
    };
    // Phantom energy alone: E = v^(3(1+w)/2), so that the rip comes after −2/(3(1+w)) t_H.
    let history = build(&declared(constant(-1.2)));
    let description = describe(&history, PrintedEpochs::default());
    assert_eq!(description.fate.kind, FateKind::Rip);
    let expected = history.hubble_time_gyr() * 2.0 / 0.6;
    assert!((description.fate.time.value.unwrap() / expected - 1.0).abs() < 1e-13);
    // E = v^−0.3: the event horizon is ∫₀¹ v^0.3 dv.
    let horizon = description.horizons.event.value.unwrap() / history.hubble_distance_mpc();
    assert!((horizon * 1.3 - 1.0).abs() < 1e-13, "{horizon}");

    // Matter 2, closed: the whole life is 2π (Ω/2)/(Ω−1)^{3/2} t_H (Peebles 1993, section 13).
    let none = DarkEnergyDeclaration {
        form: "none".to_owned(),
        ..DarkEnergyDeclaration::default()
    };
    let history = build(&Declaration {
        matter: 2.0,
        ..declared(none)
    });
    let description = describe(&history, PrintedEpochs::default());
    assert_eq!(description.fate.kind, FateKind::Recollapses);
    let life = description.fate.time.value.unwrap() + description.today.age.value.unwrap();
    let expected = 2.0 * std::f64::consts::PI * history.hubble_time_gyr();
    assert!((life / expected - 1.0).abs() < 1e-10, "{life} {expected}");
}

fn of(hubble_constant: f64, matter: f64, dark_energy: Option<f64>) -> History {
    let form = if dark_energy.is_some() {
        "cosmological_constant"
    } else {
        "none"
    };
    build(&Declaration {
        hubble_constant,
        matter,
        dark_energy: Some(DarkEnergyDeclaration {
            form: form.to_owned(),
            density: dark_energy,
            parameters: Vec::new(),
        }),
        ..Declaration::default()
    })
}

#[test]
fn no_acceleration_is_made_of_rounding_or_a_turning_point() {
    // None of them changes between the two: q = ½ Ω_m(z) − Ω_Λ(z) keeps its sign.
    for (hubble_constant, matter, dark_energy) in [
        (70.0, 0.0, None),
        (70.0, 1.0, None),
        (70.0, 3.0, None),
        (70.0, 0.1, Some(2.0)),
        (70.0, 0.2, Some(2.0)),
        (70.0, 0.3, Some(-0.5)),
        (60.0, 0.2, Some(-0.2)),
        (70.0, 1.8, Some(0.01)),
    ] {
        let history = of(hubble_constant, matter, dark_energy);
        let found = describe(&history, PrintedEpochs::default())
            .milestones
            .acceleration;
        assert!(
            found.is_empty(),
            "matter {matter}, dark energy {dark_energy:?}: {found:?}"
        );
    }
    // 1 + z = (2 Ω_Λ/Ω_m)^(1/3), from q = 0.
    let history = of(70.0, 0.3, Some(0.7));
    let found = describe(&history, PrintedEpochs::default())
        .milestones
        .acceleration;
    assert_eq!(found.len(), 1);
    let expected = libm::cbrt(1.4 / 0.3) - 1.0;
    assert!((found[0].value.unwrap() - expected).abs() < 1e-14);
}

#[test]
fn what_is_stated_is_what_the_catalogue_promises() {
    let mut histories = vec![with_radiation(), of(70.0, 1.0, None), plain(0.3, 0.1)];
    for set in crate::model::PUBLISHED_SETS {
        histories.push(History::build(&set.spec().unwrap()).unwrap());
    }
    for history in &histories {
        for (quantity, stated) in describe(history, PrintedEpochs::default()).accuracy {
            let crate::quantity::Tolerance::Relative(promised) = quantity.tolerance else {
                continue;
            };
            // A product of two tables adds up what was checked of both.
            if quantity.name == "alcock_paczynski" {
                assert!(
                    stated
                        .relative
                        .is_some_and(|stated| stated < 2.2 * promised)
                );
                continue;
            }
            assert_eq!(stated.relative, Some(promised), "{}", quantity.name);
        }
        assert!(history.bytes() <= 64 * 1024, "{}", history.bytes());
    }
}
