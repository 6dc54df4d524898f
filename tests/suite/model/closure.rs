//! Each branch of the closure rule, with its numbers.

use super::{dark_energy, plain, radiation};
use redfathom::model::{Declaration, Spec};

fn closed(declaration: &Declaration) -> Spec {
    declaration.close().unwrap()
}

/// Form, density and curvature after closure.
fn balance(declaration: &Declaration) -> (&'static str, f64, f64) {
    let spec = closed(declaration);
    let dark_energy = &spec.dark_energy;
    (dark_energy.form.name, dark_energy.density, spec.curvature)
}

const LAMBDA: &str = "cosmological_constant";

#[test]
fn without_dark_energy_a_cosmological_constant_closes() {
    assert_eq!(balance(&plain(70.0, 0.3)), (LAMBDA, 0.7, 0.0));
    let curved = Declaration {
        curvature: Some(0.25),
        ..plain(70.0, 0.25)
    };
    assert_eq!(balance(&curved), (LAMBDA, 0.5, 0.25));
}

#[test]
fn dark_energy_without_density_closes() {
    let mut model = Declaration {
        dark_energy: dark_energy("constant", None, &[("w", -0.9)]),
        ..plain(70.0, 0.25)
    };
    assert_eq!(balance(&model), ("constant", 0.75, 0.0));
    model.curvature = Some(-0.5);
    assert_eq!(balance(&model), ("constant", 1.25, -0.5));
    assert_eq!(closed(&model).dark_energy.parameters, [-0.9]);
}

#[test]
fn a_density_without_curvature_lets_curvature_close() {
    let mut model = Declaration {
        dark_energy: dark_energy(LAMBDA, Some(0.5), &[]),
        ..plain(70.0, 0.25)
    };
    assert_eq!(balance(&model), (LAMBDA, 0.5, 0.25));
    // 0.3 and 0.7 as doubles miss 1 by 5.55e-17: flat all the same.
    model = Declaration {
        dark_energy: dark_energy(LAMBDA, Some(0.7), &[]),
        ..plain(70.0, 0.3)
    };
    assert_eq!(balance(&model), (LAMBDA, 0.7, 0.0));
}

#[test]
fn without_any_dark_energy_curvature_closes() {
    let mut model = Declaration {
        dark_energy: dark_energy("none", None, &[]),
        ..plain(70.0, 0.25)
    };
    assert_eq!(balance(&model), ("none", 0.0, 0.75));
    model.dark_energy = dark_energy("none", Some(-0.0), &[]);
    assert_eq!(balance(&model), ("none", 0.0, 0.75));
    // Given as well, within the tolerance: the residue goes into the curvature.
    model.curvature = Some(0.75 + 5e-10);
    assert_eq!(balance(&model), ("none", 0.0, 0.75));
}

#[test]
fn a_small_residue_of_a_full_declaration_goes_into_the_density() {
    let given = 0.5 - 7e-10;
    let model = Declaration {
        curvature: Some(0.25),
        dark_energy: dark_energy("constant", Some(given), &[("w", -1.1)]),
        ..plain(70.0, 0.25)
    };
    assert_eq!(balance(&model), ("constant", 0.5, 0.25));
}

#[test]
fn rounding_creates_no_dark_energy() {
    // 1 - 0.3 - 0.7 is 5.55e-17 in the exact values of the doubles.
    let open = Declaration {
        curvature: Some(0.7),
        ..plain(70.0, 0.3)
    };
    assert_eq!(balance(&open), ("none", 0.0, 0.7));
    let full = Declaration {
        dark_energy: dark_energy(LAMBDA, Some(0.0), &[]),
        ..open
    };
    assert_eq!(balance(&full), ("none", 0.0, 0.7));
}

#[test]
fn what_is_small_but_no_rounding_stays() {
    // One ulp of a sum just below 1 is 2^-53, and the limit is 8 of them.
    let limit = 4.0 * f64::EPSILON;
    assert_eq!(balance(&plain(70.0, 1.0 - limit)), (LAMBDA, limit, 0.0));
    assert_eq!(balance(&plain(70.0, 1.0 - limit / 2.0)), ("none", 0.0, 0.0));
    assert_eq!(balance(&plain(70.0, 1.0)), ("none", 0.0, 0.0));
}

#[test]
fn radiation_takes_its_share() {
    let model = Declaration {
        radiation: radiation(8.0, 0.5, &[]),
        ..plain(50.0, 1.0)
    };
    let (form, density, curvature) = balance(&model);
    assert_eq!((form, curvature), (LAMBDA, 0.0));
    // tests/references/model_vectors.py
    assert!((density / -0.008_176_475_255_477_903 - 1.0).abs() < 1e-15);
    let open = Declaration {
        dark_energy: dark_energy("none", None, &[]),
        ..model
    };
    assert_eq!(balance(&open), ("none", 0.0, density));
}

#[test]
fn equal_universes_have_equal_specs() {
    let flat = closed(&plain(70.0, 0.3));
    let same = [
        dark_energy("constant", None, &[("w", -1.0)]),
        dark_energy(LAMBDA, Some(0.7), &[]),
    ];
    for form in same {
        let model = Declaration {
            dark_energy: form,
            ..plain(70.0, 0.3)
        };
        assert_eq!(closed(&model), flat);
    }
    let cold = Declaration {
        radiation: radiation(-0.0, 3.046, &[0.0]),
        ..plain(70.0, 0.3)
    };
    assert_eq!(closed(&cold), flat);
    let empty_of_it = Declaration {
        dark_energy: dark_energy("constant", Some(0.0), &[("w", -0.9)]),
        ..plain(70.0, 0.3)
    };
    assert_eq!(balance(&empty_of_it), ("none", 0.0, 0.7));
    assert!(closed(&empty_of_it).dark_energy.parameters.is_empty());
}

#[test]
fn baryons_are_part_of_matter() {
    let model = Declaration {
        baryons: Some(0.3),
        ..plain(70.0, 0.3)
    };
    let spec = closed(&model);
    assert_eq!(spec.baryons, Some(0.3));
    assert_eq!(spec.dark_energy.density, 0.7);
}

#[test]
fn an_echo_declares_the_same_model_where_rounding_closes() {
    for (matter, curvature) in [
        (1.0, 1e-17),
        (1.0, -1e-17),
        (0.3, 0.7),
        (0.3, 0.700_000_000_000_000_1),
    ] {
        let declaration = Declaration {
            curvature: Some(curvature),
            ..plain(70.0, matter)
        };
        let spec = declaration.close().unwrap();
        let echo = Declaration {
            curvature: Some(spec.curvature),
            dark_energy: dark_energy(
                spec.dark_energy.form.name,
                Some(spec.dark_energy.density),
                &[],
            ),
            ..plain(70.0, matter)
        };
        assert_eq!(
            echo.close().unwrap().canonical_bytes(),
            spec.canonical_bytes(),
            "{matter} {curvature}"
        );
    }
}
