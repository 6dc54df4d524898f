//! What the expansion rate reaches, in the whole past and future.

use super::*;

#[test]
fn below_the_smallest_expansion_rate_it_is_named() {
    let history = with_radiation();
    let limit = 67.36 * history.spec().dark_energy.density.sqrt();
    let values = [10.0, 56.0];
    for future in [false, true] {
        let request = Conversion {
            future,
            ..conversion(&history, source("hubble_parameter", &values), &["redshift"])
        };
        let converted = convert(&request).unwrap();
        assert_eq!(codes(&converted, 0), ["outside_domain"]);
        let Detail::StaysAbove(lowest, "km/(s.Mpc)") = converted.remarks.first[0].detail else {
            panic!("{:?}", converted.remarks.first[0])
        };
        assert!((lowest / limit - 1.0).abs() < 1e-14, "{lowest} {limit}");
        let expected: &[&str] = if future { &[] } else { &["blueshift"] };
        assert_eq!(codes(&converted, 1), expected);
    }
    // Phantom energy: H has a smallest value, and takes it.
    let phantom = build(&Declaration {
        hubble_constant: 70.0,
        matter: 0.3,
        dark_energy: Some(DarkEnergyDeclaration {
            form: "constant".to_owned(),
            density: None,
            parameters: vec![("w".to_owned(), -2.0)],
        }),
        ..Declaration::default()
    });
    let turn = phantom.turning().rate[0];
    let smallest = 70.0 * phantom.epoch(turn).rate;
    let values = [10.0];
    let converted = convert(&conversion(
        &phantom,
        source("hubble_parameter", &values),
        &["age"],
    ))
    .unwrap();
    assert_eq!(codes(&converted, 0), ["outside_domain"]);
    assert_eq!(
        converted.remarks.first[0].detail,
        Detail::Smallest(smallest, "km/(s.Mpc)")
    );
}

#[test]
fn the_reach_of_the_expansion_rate_is_known() {
    let constant = |matter: f64, density: f64| {
        build(&Declaration {
            hubble_constant: 70.0,
            matter,
            dark_energy: Some(DarkEnergyDeclaration {
                form: "cosmological_constant".to_owned(),
                density: Some(density),
                parameters: Vec::new(),
            }),
            ..Declaration::default()
        })
    };
    // With a bounce H rises from zero towards H0 √Ω_Λ; de Sitter's stands still.
    for (history, value, future, code, detail) in [
        (constant(0.1, 2.0), 1000.0, false, "beyond_maximum", "98.99"),
        (constant(0.1, 2.0), 1000.0, true, "beyond_maximum", "98.99"),
        (constant(0.1, 2.0), 71.0, false, "blueshift", ""),
        (
            constant(0.0, 1.0),
            71.0,
            false,
            "beyond_maximum",
            "value is 70 ",
        ),
        (
            constant(0.0, 1.0),
            69.0,
            false,
            "outside_domain",
            "value is 70 ",
        ),
        (
            constant(0.0, 1.0),
            71.0,
            true,
            "beyond_maximum",
            "value is 70 ",
        ),
    ] {
        let values = [value];
        let request = Conversion {
            future,
            ..conversion(&history, source("hubble_parameter", &values), &["redshift"])
        };
        let converted = convert(&request).unwrap();
        assert_eq!(codes(&converted, 0), [code], "{value} {future}");
        let said = converted.remarks.first[0].detail.to_string();
        assert!(said.contains(detail), "{said}");
    }
}
