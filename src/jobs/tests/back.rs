//! From values back to redshift: reach, branches, rounding.

use super::*;

#[test]
fn values_out_of_reach_are_told_apart() {
    let history = with_radiation();
    let age = history.age_today().unwrap() * history.hubble_time_gyr();
    for (name, value, code) in [
        ("age", 0.0, "before_beginning"),
        ("age", -1.0, "before_beginning"),
        ("age", 20.0, "blueshift"),
        ("lookback_time", age, "before_beginning"),
        ("lookback_time", -1.0, "blueshift"),
        ("light_travel_distance", -1.0, "outside_domain"),
        ("comoving_distance", -1.0, "outside_domain"),
        ("comoving_distance", 1e9, "beyond_maximum"),
        ("transverse_comoving_distance", 1e9, "beyond_maximum"),
        ("comoving_volume", 1e30, "beyond_maximum"),
        ("angular_diameter_distance", 1e4, "beyond_maximum"),
        ("luminosity_distance", -1.0, "outside_domain"),
        ("luminosity_distance", 1e20, "beyond_model_range"),
        ("distance_modulus", 200.0, "beyond_model_range"),
        ("hubble_parameter", 60.0, "blueshift"),
        ("hubble_parameter", 1e30, "beyond_model_range"),
        ("luminosity_distance", 1e308, "beyond_model_range"),
        ("distance_modulus", 1e308, "beyond_model_range"),
        ("scale_factor", 0.0, "outside_domain"),
        ("scale_factor", 2.0, "blueshift"),
        ("radio_velocity", 3e5, "beyond_maximum"),
        ("cmb_temperature", 2.0, "blueshift"),
        ("cmb_temperature", -2.0, "outside_domain"),
    ] {
        let values = [value];
        let converted =
            convert(&conversion(&history, source(name, &values), &["redshift"])).unwrap();
        assert_eq!(codes(&converted, 0), [code], "{name} {value}");
        assert!(converted.columns[0].values[0].is_nan());
    }
}

#[test]
fn every_branch_is_found() {
    let history = plain(0.3, 0.0);
    let values = [1000.0, 1749.0, 1e-3];
    let from = Source {
        branch: Branch::All,
        ..source("angular_diameter_distance", &values)
    };
    let converted = convert(&conversion(
        &history,
        from,
        &["redshift", "angular_diameter_distance"],
    ))
    .unwrap();
    assert_eq!(converted.branches.len(), 2);
    let peak = converted.branches[0].redshift.1;
    // Ryden 2003, Introduction to Cosmology, chapter 7 (from memory): 1.6 for Ω_m = 0.3.
    assert!((peak - 1.6).abs() < 0.01, "{peak}");
    assert_eq!(converted.branches[1].redshift, (peak, 1e9));
    for (column, branches) in converted
        .columns
        .iter()
        .map(|column| (column, &column.branches))
    {
        assert_eq!(branches.len(), 2);
        assert_eq!(branches[0].values.len(), 3);
        assert_eq!(column.values[0], branches[0].values[0]);
    }
    for branch in &converted.columns[1].branches {
        assert!((branch.values[0] / 1000.0 - 1.0).abs() < 1e-15);
    }
    let far = Source {
        branch: Branch::Far,
        ..source("angular_diameter_distance", &values)
    };
    let converted = convert(&conversion(&history, far, &["redshift"])).unwrap();
    assert!(converted.columns[0].values[0] > peak);
    let missing = Source {
        branch: Branch::Number(3),
        ..source("angular_diameter_distance", &values)
    };
    let refused = convert(&conversion(&history, missing, &["redshift"]));
    assert!(matches!(
        refused,
        Err(ConvertFault::NoSuchBranch {
            number: 3,
            branches: 2,
            ..
        })
    ));
}

#[test]
fn rounding_that_matters_is_said() {
    let history = with_radiation();
    let peak = history.turning().angular_diameter[0];
    let frame = crate::quantity::Frame::of(&history);
    let at = |name: &str, z: f64| quantity(name).at(z, &frame);
    for (name, value, said) in [
        (
            "angular_diameter_distance",
            at("angular_diameter_distance", peak),
            true,
        ),
        (
            "angular_diameter_distance",
            at("angular_diameter_distance", 0.5),
            false,
        ),
        ("comoving_distance", at("comoving_distance", 0.5), false),
        ("comoving_distance", at("comoving_distance", 5e8), true),
        ("lookback_time", at("lookback_time", 1e5), true),
        ("age", at("age", 9e7), false),
        ("age", at("age", 1e-10), true),
        ("scale_factor", at("scale_factor", 1e-10), true),
        ("redshift", 1e-10, false),
    ] {
        let values = [value];
        let converted = convert(&conversion(
            &history,
            source(name, &values),
            &["redshift", "scale_factor"],
        ))
        .unwrap();
        let ill: Vec<_> = converted
            .remarks
            .first
            .iter()
            .filter(|one| one.code == Code::IllConditioned)
            .collect();
        assert_eq!(
            ill.iter().any(|remark| remark.column == Some(0)),
            said,
            "{name} {value}: {ill:?}"
        );
        assert!(converted.columns[0].values[0].is_finite());
    }
    // 1 ulp at the peak moves z by √(2·2.2e-16·D/|D″|) ≈ 5e-8.
    let values = [at("angular_diameter_distance", peak)];
    let converted = convert(&conversion(
        &history,
        source("angular_diameter_distance", &values),
        &["redshift"],
    ))
    .unwrap();
    let Detail::RedshiftUncertain(spread) = converted.remarks.first[0].detail else {
        panic!("no spread")
    };
    assert!((2e-8..2e-7).contains(&spread), "{spread}");
}

#[test]
fn today_is_not_ill_conditioned() {
    let history = with_radiation();
    let outputs = ["redshift", "lookback_time", "age", "comoving_volume"];
    for (name, value) in [
        ("scale_factor", 1.0),
        ("hubble_parameter", 67.36),
        ("cmb_temperature", 2.7255),
        ("optical_velocity", 0.0),
        ("lookback_time", 0.0),
        ("comoving_distance", 0.0),
    ] {
        let values = [value];
        let converted = convert(&conversion(&history, source(name, &values), &outputs)).unwrap();
        assert_eq!(converted.columns[0].values, [0.0], "{name}");
        assert_eq!(converted.remarks.first, [], "{name}");
    }
    // A little away from today the rounding of a scale factor does matter.
    let values = [1.0 - 1e-9];
    let converted = convert(&conversion(
        &history,
        source("scale_factor", &values),
        &outputs,
    ))
    .unwrap();
    assert_eq!(codes(&converted, 0), ["ill_conditioned"]);
}

#[test]
fn few_rows_are_judged_as_many_are() {
    for history in [with_radiation(), plain(0.3, 0.1), plain(0.3, -0.8)] {
        let frame = crate::quantity::Frame::of(&history);
        let redshifts: Vec<f64> = (0..400)
            .map(|i| libm::pow(10.0, f64::from(i) / 20.0 - 11.0))
            .chain([-0.9, -1e-3, -1e-8, 0.0])
            .collect();
        for name in [
            "scale_factor",
            "age",
            "lookback_time",
            "comoving_distance",
            "conformal_time",
        ] {
            let values: Vec<f64> = redshifts
                .iter()
                .map(|z| quantity(name).at(*z, &frame))
                .collect();
            let outputs = [
                "redshift",
                "age",
                "comoving_volume",
                "deceleration_parameter",
            ];
            let request = |values| Conversion {
                future: true,
                ..conversion(&history, source(name, values), &outputs)
            };
            let many = convert(&request(&values)).unwrap();
            for (row, value) in values.iter().enumerate() {
                let alone = convert(&request(&values[row..=row])).unwrap();
                assert_eq!(codes(&alone, 0), codes(&many, row), "{name} {value}");
                let cells = (alone.columns[1].values[0], many.columns[1].values[row]);
                assert_eq!(cells.0.to_bits(), cells.1.to_bits(), "{name} {value}");
            }
        }
    }
}
