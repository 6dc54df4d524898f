//! Both ends of every range, for every number a model has.

use super::{dark_energy, plain, radiation};
use redfathom::model::parameter as range;
use redfathom::model::{DARK_ENERGY_FORMS, Declaration, ModelFaultKind, Parameter};

type Setter = fn(f64) -> Declaration;

const NUMBERS: &[(&str, &Parameter, Setter)] = &[
    ("/hubble_constant", &range::HUBBLE_CONSTANT, |x| {
        plain(x, 0.3)
    }),
    ("/matter", &range::MATTER, |x| plain(70.0, x)),
    ("/curvature", &range::CURVATURE, |x| Declaration {
        curvature: Some(x),
        ..plain(70.0, 0.3)
    }),
    ("/baryons", &range::BARYONS, |x| Declaration {
        baryons: Some(x),
        ..plain(70.0, 0.3)
    }),
    ("/radiation/cmb_temperature", &range::CMB_TEMPERATURE, |x| {
        Declaration {
            radiation: radiation(x, 3.0, &[]),
            ..plain(70.0, 0.3)
        }
    }),
    (
        "/radiation/effective_neutrino_number",
        &range::EFFECTIVE_NEUTRINO_NUMBER,
        |x| Declaration {
            radiation: radiation(2.7, x, &[]),
            ..plain(70.0, 0.3)
        },
    ),
    ("/radiation/neutrino_masses/0", &range::NEUTRINO_MASS, |x| {
        Declaration {
            radiation: radiation(2.7, 3.0, &[x]),
            ..plain(70.0, 0.3)
        }
    }),
    ("/dark_energy/density", &range::DARK_ENERGY_DENSITY, |x| {
        Declaration {
            dark_energy: dark_energy("cosmological_constant", Some(x), &[]),
            ..plain(70.0, 0.3)
        }
    }),
];

/// Whether closing the model complains that this number is out of its range.
fn out_of_range(declaration: &Declaration, pointer: &str) -> bool {
    let faults = declaration.close().err().unwrap_or_default();
    faults
        .iter()
        .any(|fault| fault.pointer == pointer && fault.kind == ModelFaultKind::OutOfRange)
}

fn check(pointer: &str, parameter: &Parameter, set: impl Fn(f64) -> Declaration) {
    let outside = |x: f64| out_of_range(&set(x), pointer);
    assert_eq!(outside(parameter.minimum), parameter.minimum_exclusive);
    assert!(!outside(parameter.minimum.next_up()), "{pointer}");
    assert!(!outside(parameter.maximum), "{pointer}");
    for x in [
        parameter.minimum.next_down(),
        parameter.maximum.next_up(),
        f64::NAN,
        f64::INFINITY,
        f64::NEG_INFINITY,
    ] {
        assert!(outside(x), "{pointer} takes {x}");
    }
}

#[test]
fn the_ends_of_every_range_are_where_they_are_said_to_be() {
    for (pointer, parameter, set) in NUMBERS {
        check(pointer, parameter, set);
    }
}

#[test]
fn the_ends_of_every_number_of_a_form_too() {
    for form in DARK_ENERGY_FORMS {
        for parameter in form.parameters {
            let pointer = format!("/dark_energy/{}", parameter.name);
            check(&pointer, parameter, |x| {
                let numbers: Vec<(&str, f64)> = form
                    .parameters
                    .iter()
                    .map(|other| {
                        (
                            other.name,
                            if other == parameter { x } else { other.minimum },
                        )
                    })
                    .collect();
                Declaration {
                    dark_energy: dark_energy(form.name, None, &numbers),
                    ..plain(70.0, 0.3)
                }
            });
        }
    }
}

/// The ranges that the public contract fixes.
#[test]
fn the_published_ranges_hold() {
    let ends = |parameter: &Parameter| (parameter.minimum, parameter.maximum);
    assert_eq!(ends(&range::HUBBLE_CONSTANT), (0.0, 1e4));
    assert_eq!(ends(&range::MATTER), (0.0, 100.0));
    assert_eq!(ends(&range::CMB_TEMPERATURE), (0.0, 100.0));
    assert_eq!(ends(&range::EFFECTIVE_NEUTRINO_NUMBER), (0.0, 20.0));
    assert_eq!(ends(&range::NEUTRINO_MASS), (0.0, 100.0));
    assert_eq!(ends(&range::EQUATION_OF_STATE), (-20.0, 5.0));
    assert_eq!(ends(&range::DARK_ENERGY_DENSITY), (-100.0, 100.0));
}
