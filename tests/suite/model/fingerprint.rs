//! Canonical bytes and fingerprints, against a second writing of the layout.

use super::{dark_energy, plain, radiation};
use redfathom::model::{Declaration, PUBLISHED_SETS};

/// `tests/references/model_vectors.py` printed every vector of this file.
#[test]
fn vectors_of_declared_models() {
    assert_eq!(fingerprint(&plain(70.0, 0.3)), "rf1-c4d3e5f0e8fbd081");
    assert_eq!(fingerprint(&plain(50.0, 1.0)), "rf1-41ea0b780ac9aecd");
    assert_eq!(fingerprint(&curved()), "rf1-1b455902b167e0e8");
}

#[test]
fn the_bytes_stand_in_the_documented_order() {
    let hex: String = curved()
        .close()
        .unwrap()
        .canonical_bytes()
        .iter()
        .map(|byte| format!("{byte:02x}"))
        .collect();
    let expected = [
        "7266312d6465636c6172656400", // rf1-declared, zero
        "4051800000000000",           // 70
        "3fd3333333333333",           // 0.3
        "bfb999999999999a",           // -0.1
        "01",                         // baryons follow
        "3fa999999999999a",           // 0.05
        "0000000000000000",           // no radiation
        "0000000000000000",
        "000000000000000000000000000000000000000000000000",
        "08636f6e7374616e74", // 8, constant
        "3fe999999999999a",   // 0.8
        "00000001",
        "bfeccccccccccccd", // -0.9
    ];
    assert_eq!(hex, expected.concat());
}

#[test]
fn the_default_model_keeps_its_fingerprint_for_ever() {
    let default = PUBLISHED_SETS
        .iter()
        .find(|set| set.name == redfathom::model::DEFAULT_MODEL)
        .unwrap();
    assert_eq!(fingerprint(&default.declaration()), "rf1-ff2d2f5a97c9586c");
}

#[test]
fn equal_models_are_equal_however_they_are_written() {
    let hot = |masses: &[f64]| Declaration {
        radiation: radiation(2.7255, 3.046, masses),
        ..plain(70.0, 0.3)
    };
    let sorted = fingerprint(&hot(&[0.0, 0.01, 0.05]));
    assert_eq!(fingerprint(&hot(&[0.05, 0.01])), sorted);
    assert_eq!(fingerprint(&hot(&[0.05, -0.0, 0.01])), sorted);
    let negative_zero = Declaration {
        curvature: Some(-0.0),
        ..plain(70.0, 0.3)
    };
    assert_eq!(fingerprint(&negative_zero), fingerprint(&plain(70.0, 0.3)));
}

#[test]
fn different_models_differ() {
    let base = plain(70.0, 0.3);
    let models = [
        base.clone(),
        plain(70.0_f64.next_up(), 0.3),
        plain(70.0, 0.3_f64.next_up()),
        Declaration {
            curvature: Some(1e-9),
            ..base.clone()
        },
        Declaration {
            baryons: Some(0.0),
            ..base.clone()
        },
        Declaration {
            radiation: radiation(2.7255, 0.0, &[]),
            ..base.clone()
        },
        Declaration {
            radiation: radiation(2.7255, 3.046, &[]),
            ..base.clone()
        },
        Declaration {
            radiation: radiation(2.7255, 3.046, &[0.06]),
            ..base.clone()
        },
        Declaration {
            dark_energy: dark_energy("none", None, &[]),
            ..base.clone()
        },
        Declaration {
            dark_energy: dark_energy("constant", None, &[("w", -1.0_f64.next_up())]),
            ..base
        },
    ];
    let mut labels: Vec<String> = models.iter().map(fingerprint).collect();
    labels.sort();
    labels.dedup();
    assert_eq!(labels.len(), models.len());
}

/// H0 = 70, matter 0.3, baryons 0.05, curvature −0.1, w = −0.9.
fn curved() -> Declaration {
    Declaration {
        curvature: Some(-0.1),
        baryons: Some(0.05),
        dark_energy: dark_energy("constant", None, &[("w", -0.9)]),
        ..plain(70.0, 0.3)
    }
}

fn fingerprint(declaration: &Declaration) -> String {
    declaration.close().unwrap().fingerprint()
}
