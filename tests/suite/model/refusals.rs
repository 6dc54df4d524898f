//! Models that are refused, each with its pointer and kind.

use super::{dark_energy, plain, radiation};
use redfathom::model::ModelFaultKind::{
    Impossible, InconsistentClosure, MissingField, OutOfRange, UnknownField, UnknownForm,
};
use redfathom::model::{Declaration, ModelFault, ModelFaultKind, RadiationDeclaration};

#[track_caller]
fn refused(declaration: &Declaration, expected: &[(&str, ModelFaultKind)]) -> Vec<ModelFault> {
    let faults = declaration.close().unwrap_err();
    let found: Vec<(&str, ModelFaultKind)> = faults
        .iter()
        .map(|fault| (fault.pointer.as_str(), fault.kind))
        .collect();
    assert_eq!(found, expected, "{faults:#?}");
    faults
}

fn with_radiation(radiation: Option<RadiationDeclaration>) -> Declaration {
    Declaration {
        radiation,
        ..plain(70.0, 0.3)
    }
}

fn with_form(form: &str, density: Option<f64>, numbers: &[(&str, f64)]) -> Declaration {
    Declaration {
        dark_energy: dark_energy(form, density, numbers),
        ..plain(70.0, 0.3)
    }
}

#[test]
fn every_fault_is_told_at_once() {
    let model = Declaration {
        hubble_constant: 0.0,
        matter: -0.1,
        curvature: Some(f64::NAN),
        baryons: Some(101.0),
        radiation: Some(RadiationDeclaration {
            cmb_temperature: Some(-1.0),
            effective_neutrino_number: None,
            neutrino_masses: vec![0.0, 1e3],
        }),
        dark_energy: dark_energy("constant", Some(1e3), &[("w0", -1.0)]),
    };
    let faults = refused(
        &model,
        &[
            ("/hubble_constant", OutOfRange),
            ("/matter", OutOfRange),
            ("/curvature", OutOfRange),
            ("/baryons", OutOfRange),
            ("/radiation/cmb_temperature", OutOfRange),
            ("/radiation/effective_neutrino_number", MissingField),
            ("/radiation/neutrino_masses/1", OutOfRange),
            ("/dark_energy/density", OutOfRange),
            ("/dark_energy/w0", UnknownField),
            ("/dark_energy/w", MissingField),
        ],
    );
    let first = &faults[0];
    assert_eq!(first.value.as_deref(), Some("0"));
    assert_eq!(first.allowed.as_deref(), Some("(0, 10000] km/(s.Mpc)"));
    assert_eq!(
        first.to_string(),
        "/hubble_constant: hubble_constant is 0, outside (0, 10000] km/(s.Mpc)"
    );
}

#[test]
fn radiation_needs_its_temperature_and_number() {
    let faults = refused(
        &with_radiation(Some(RadiationDeclaration {
            neutrino_masses: vec![0.06],
            ..RadiationDeclaration::default()
        })),
        &[
            ("/radiation/cmb_temperature", MissingField),
            ("/radiation/effective_neutrino_number", MissingField),
        ],
    );
    assert!(faults[1].detail.contains("0 is photons only"));
}

#[test]
fn masses_need_neutrinos() {
    let pointer = "/radiation/neutrino_masses";
    for (temperature, number, named) in [
        (0.0, 3.046, "cmb_temperature is 0"),
        (2.7255, 0.0, "effective_neutrino_number is 0"),
    ] {
        let model = with_radiation(radiation(temperature, number, &[0.06]));
        let faults = refused(&model, &[(pointer, Impossible)]);
        assert!(faults[0].detail.contains(named), "{}", faults[0]);
    }
    let model = with_radiation(radiation(2.7255, 3.046, &[0.01, 0.02, 0.03, 0.04]));
    let faults = refused(&model, &[(pointer, OutOfRange)]);
    assert_eq!(faults[0].allowed.as_deref(), Some("at most 3 masses"));
}

#[test]
fn matter_holds_its_parts_or_is_refused() {
    let mut model = Declaration {
        baryons: Some(0.3_f64.next_up()),
        ..plain(70.0, 0.3)
    };
    refused(&model, &[("/matter", Impossible)]);
    // A neutrino of 20 eV alone is 0.44 at this Hubble constant.
    model = with_radiation(radiation(2.7255, 3.046, &[20.0]));
    let faults = refused(&model, &[("/matter", Impossible)]);
    assert!(
        faults[0].detail.contains("massive neutrinos 0.4"),
        "{}",
        faults[0]
    );
    let needed = faults[0].allowed.clone().unwrap();
    let needed: f64 = needed.trim_start_matches("at least ").parse().unwrap();
    model.matter = needed;
    assert!(model.close().is_ok());
    model.matter = needed.next_down();
    refused(&model, &[("/matter", Impossible)]);
}

#[test]
fn forms_and_their_numbers_must_be_known() {
    let faults = refused(
        &with_form("quintessence", Some(200.0), &[("w", -1.0)]),
        &[
            ("/dark_energy/density", OutOfRange),
            ("/dark_energy/form", UnknownForm),
        ],
    );
    assert_eq!(
        faults[1].allowed.as_deref(),
        Some("none, cosmological_constant, constant")
    );
    let lambda = with_form("cosmological_constant", None, &[("w", -1.0)]);
    refused(&lambda, &[("/dark_energy/w", UnknownField)]);
    let twice = with_form("constant", None, &[("w", -1.0), ("w", -0.9)]);
    refused(&twice, &[("/dark_energy/w", Impossible)]);
    for w in [-20.1, 5.1, f64::INFINITY] {
        let model = with_form("constant", None, &[("w", w)]);
        refused(&model, &[("/dark_energy/w", OutOfRange)]);
    }
    let none = with_form("none", Some(0.7), &[]);
    refused(&none, &[("/dark_energy/density", Impossible)]);
}

#[test]
fn an_inconsistent_sum_names_both_values_that_would_close() {
    let model = Declaration {
        curvature: Some(0.0),
        radiation: radiation(2.7255, 3.046, &[]),
        ..with_form("cosmological_constant", Some(0.7), &[])
    };
    let faults = refused(&model, &[("/dark_energy/density", InconsistentClosure)]);
    let detail = &faults[0].detail;
    // Ω_γ = 5.0469e-5 and three massless species of 0.2271/3·3.046 of it.
    assert!(detail.contains("radiation takes 8.538e-5"), "{detail}");
    assert!(detail.contains("leave out dark_energy.density"), "{detail}");
    let closing = |curvature: Option<f64>, density: Option<f64>| {
        let spec = Declaration {
            curvature,
            ..Declaration {
                dark_energy: dark_energy("cosmological_constant", density, &[]),
                ..model.clone()
            }
        }
        .close()
        .unwrap();
        (spec.dark_energy.density, spec.curvature)
    };
    let (density, _) = closing(Some(0.0), None);
    let (_, curvature) = closing(None, Some(0.7));
    let expected = format!("{density}, or curvature {curvature:?}");
    assert_eq!(faults[0].allowed.as_ref(), Some(&expected));
    assert_eq!(faults[0].value.as_deref(), Some("0.7"));
}

#[test]
fn the_tolerance_of_a_full_declaration_is_one_in_a_billion() {
    let full = |density: f64| Declaration {
        curvature: Some(0.25),
        dark_energy: dark_energy("cosmological_constant", Some(density), &[]),
        ..plain(70.0, 0.25)
    };
    assert!(full(0.5 + 0.99e-9).close().is_ok());
    assert!(full(0.5 - 0.99e-9).close().is_ok());
    for density in [0.5 + 1.01e-9, 0.5 - 1.01e-9] {
        refused(
            &full(density),
            &[("/dark_energy/density", InconsistentClosure)],
        );
    }
    let none = Declaration {
        curvature: Some(0.75 + 1.01e-9),
        dark_energy: dark_energy("none", None, &[]),
        ..plain(70.0, 0.25)
    };
    let faults = refused(&none, &[("/curvature", InconsistentClosure)]);
    assert_eq!(faults[0].allowed.as_deref(), Some("0.75"));
}

#[test]
fn consistency_faults_come_together() {
    let model = Declaration {
        baryons: Some(0.4),
        curvature: Some(0.1),
        ..with_form("cosmological_constant", Some(0.7), &[])
    };
    refused(
        &model,
        &[
            ("/matter", Impossible),
            ("/dark_energy/density", InconsistentClosure),
        ],
    );
}

#[test]
fn a_closing_term_out_of_range_is_refused() {
    // With so slow an expansion the photons alone are 10⁵ critical densities.
    let model = Declaration {
        radiation: radiation(2.7255, 0.0, &[]),
        ..plain(0.001, 0.3)
    };
    let faults = refused(&model, &[("/dark_energy/density", Impossible)]);
    assert!(
        faults[0].detail.contains("radiation takes"),
        "{}",
        faults[0]
    );
}

#[test]
fn radiation_beyond_numbers_is_told_of_the_hubble_constant() {
    // A double overflows with the photons, and what is made of that is no number.
    for (hubble_constant, masses, form) in [
        (1e-200, &[][..], "cosmological_constant"),
        (1e-200, &[], "none"),
        (5e-324, &[0.06], "cosmological_constant"),
    ] {
        let model = Declaration {
            radiation: radiation(2.7255, 3.046, masses),
            dark_energy: dark_energy(form, None, &[]),
            ..plain(hubble_constant, 0.3)
        };
        let faults = refused(&model, &[("/hubble_constant", Impossible)]);
        let detail = &faults[0].detail;
        assert!(
            !detail.contains("NaN") && !detail.contains("inf"),
            "{detail}"
        );
    }
}
