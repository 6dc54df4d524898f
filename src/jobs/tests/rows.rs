//! Rows that go forward, and what is said about them.

use super::*;

#[test]
fn each_row_is_judged_by_itself() {
    let history = with_radiation();
    let values = [
        0.5,
        f64::NAN,
        f64::INFINITY,
        -0.5,
        -1.0,
        -7.0,
        1e9,
        1.1e9,
        0.0,
        -0.0,
    ];
    let request = conversion(
        &history,
        source("redshift", &values),
        &["age", "luminosity_distance", "distance_modulus"],
    );
    let converted = convert(&request).unwrap();
    let expected: [&[&str]; 10] = [
        &[],
        &["missing"],
        &["not_finite"],
        &["blueshift"],
        &["outside_domain"],
        &["outside_domain"],
        &["beyond_physics"],
        &["beyond_model_range"],
        &["divergent"],
        &["divergent"],
    ];
    for (row, expected) in expected.into_iter().enumerate() {
        assert_eq!(codes(&converted, row), expected, "row {row}");
        let age = converted.columns[0].values[row];
        let kept = expected.is_empty() || ["beyond_physics", "divergent"].contains(&expected[0]);
        assert_eq!(age.is_finite(), kept, "row {row}");
    }
    assert_eq!(converted.columns[1].values[8], 0.0);
    assert!(converted.columns[2].values[8].is_nan());
    let of_modulus = converted
        .remarks
        .first
        .iter()
        .find(|remark| remark.row == 8)
        .unwrap();
    assert_eq!(
        (of_modulus.column, of_modulus.code),
        (Some(2), Code::Divergent)
    );
    assert!(converted.branches.is_empty());
}

#[test]
fn the_future_gives_times_and_leaves_out_distances() {
    let history = with_radiation();
    let values = [-0.5, -0.995, 1.0];
    let request = Conversion {
        future: true,
        ..conversion(
            &history,
            source("redshift", &values),
            &["redshift", "age", "comoving_distance"],
        )
    };
    let converted = convert(&request).unwrap();
    assert_eq!(converted.columns[0].values[0], -0.5);
    assert!(converted.columns[1].values[0] > 20.0);
    assert!(converted.columns[2].values[0].is_nan());
    assert_eq!(codes(&converted, 0), ["blueshift"]);
    assert_eq!(converted.remarks.first[0].column, Some(2));
    assert_eq!(
        converted.remarks.first[0].detail.to_string(),
        "comoving_distance is not defined for z < 0"
    );
    assert_eq!(codes(&converted, 1), ["beyond_model_range"]);
    assert!(converted.columns[2].values[2].is_finite());
}

#[test]
fn values_have_the_same_bits_in_any_company() {
    for history in [with_radiation(), plain(0.3, 0.1), plain(0.3, -0.8)] {
        let values: Vec<f64> = (0..1500)
            .map(|i| libm::pow(10.0, f64::from(i) / 250.0 - 3.0))
            .collect();
        let names: Vec<&str> = QUANTITIES
            .iter()
            .filter(|one| (one.undefined)(history.spec()).is_none())
            .map(|one| one.name)
            .collect();
        let all = convert(&conversion(&history, source("redshift", &values), &names)).unwrap();
        for (row, value) in values.iter().enumerate().step_by(97) {
            for (number, name) in names.iter().enumerate() {
                let alone = convert(&conversion(
                    &history,
                    source("redshift", &[*value]),
                    &[name],
                ))
                .unwrap();
                let (alone, company) =
                    (alone.columns[0].values[0], all.columns[number].values[row]);
                assert_eq!(alone.to_bits(), company.to_bits(), "{name} at {value}");
            }
        }
        for name in ["age", "luminosity_distance", "hubble_parameter"] {
            let number = names.iter().position(|one| *one == name).unwrap();
            let given = &all.columns[number].values;
            let back = convert(&conversion(&history, source(name, given), &["redshift"])).unwrap();
            for row in (0..values.len()).step_by(97) {
                let alone = convert(&conversion(
                    &history,
                    source(name, &given[row..=row]),
                    &["redshift"],
                ))
                .unwrap();
                let (alone, company) = (alone.columns[0].values[0], back.columns[0].values[row]);
                assert_eq!(
                    alone.to_bits(),
                    company.to_bits(),
                    "{name} at {}",
                    given[row]
                );
            }
        }
    }
}

#[test]
fn what_the_model_lacks_is_said() {
    let empty = build(&Declaration {
        hubble_constant: 70.0,
        matter: 0.0,
        ..Declaration::default()
    });
    let values = [1.0];
    let converted = convert(&conversion(
        &empty,
        source("redshift", &values),
        &["age", "lookback_time"],
    ))
    .unwrap();
    assert_eq!(codes(&converted, 0), ["no_beginning"]);
    assert!(converted.columns[1].values[0].is_finite());
    let converted = convert(&conversion(&empty, source("age", &values), &["redshift"])).unwrap();
    assert_eq!(codes(&converted, 0), ["no_beginning"]);
    let refused = convert(&conversion(
        &empty,
        source("redshift", &values),
        &["age", "cmb_temperature"],
    ));
    let Err(ConvertFault::Undefined { at, .. }) = refused else {
        panic!("{refused:?}")
    };
    assert_eq!(at, At::Output(1));

    let none = DarkEnergyDeclaration {
        form: "none".to_owned(),
        ..DarkEnergyDeclaration::default()
    };
    let milne = Declaration {
        hubble_constant: 70.0,
        dark_energy: Some(none),
        ..Declaration::default()
    };
    let milne = build(&milne);
    let converted = convert(&conversion(
        &milne,
        source("redshift", &values),
        &["conformal_time"],
    ))
    .unwrap();
    assert_eq!(codes(&converted, 0), ["divergent"]);
    let still = ["deceleration_parameter", "redshift_drift", "velocity_drift"];
    let converted = convert(&conversion(&milne, source("redshift", &values), &still)).unwrap();
    assert_eq!(converted.remarks.first, []);
    assert!(
        converted
            .columns
            .iter()
            .all(|column| column.values == [0.0])
    );
    let refused = convert(&conversion(
        &milne,
        source("redshift", &values),
        &["equation_of_state"],
    ));
    assert!(matches!(refused, Err(ConvertFault::Undefined { .. })));
}

#[test]
fn a_value_too_large_for_its_unit_is_said() {
    let history = plain(0.3, 0.0);
    let redshifts = [1.0, f64::NAN];
    let mut conversion = conversion(
        &history,
        source("redshift", &redshifts),
        &["age", "comoving_distance"],
    );
    conversion.to[1].per_sound_horizon = Some(1e-310);
    let converted = convert(&conversion).unwrap();
    assert!(converted.columns[1].values[0].is_nan());
    assert!(converted.columns[0].values[0].is_finite());
    assert_eq!(codes(&converted, 0), ["not_finite"]);
    assert_eq!(codes(&converted, 1), ["missing"]);
}

#[test]
fn at_a_turning_point_shares_are_infinite() {
    let none = DarkEnergyDeclaration {
        form: "none".to_owned(),
        ..DarkEnergyDeclaration::default()
    };
    let history = build(&Declaration {
        hubble_constant: 70.0,
        matter: 3.0,
        dark_energy: Some(none),
        ..Declaration::default()
    });
    let values = [history.turnaround().unwrap()];
    let names = [
        "deceleration_parameter",
        "matter_fraction",
        "radiation_fraction",
    ];
    let request = Conversion {
        future: true,
        ..conversion(&history, source("redshift", &values), &names)
    };
    let converted = convert(&request).unwrap();
    for column in &converted.columns {
        let value = column.values[0];
        assert!(value.is_nan() || value == 0.0 || value > 1e13, "{value}");
    }
}
