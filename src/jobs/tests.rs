//! Conversions row by row, and what is said about them.
#![allow(clippy::unwrap_used, clippy::panic)]

use super::*;
use crate::expansion::History;
use crate::model::{DarkEnergyDeclaration, Declaration, RadiationDeclaration};
use crate::quantity::{QUANTITIES, Quantity, Unit, named};

fn build(declaration: &Declaration) -> History {
    History::build(&declaration.close().unwrap()).unwrap()
}

fn plain(matter: f64, curvature: f64) -> History {
    build(&Declaration {
        hubble_constant: 70.0,
        matter,
        curvature: Some(curvature),
        ..Declaration::default()
    })
}

fn with_radiation() -> History {
    let radiation = RadiationDeclaration {
        cmb_temperature: Some(2.7255),
        effective_neutrino_number: Some(3.046),
        neutrino_masses: vec![0.06],
    };
    build(&Declaration {
        hubble_constant: 67.36,
        matter: 0.3153,
        baryons: Some(0.049_302),
        radiation: Some(radiation),
        ..Declaration::default()
    })
}

fn quantity(name: &str) -> &'static Quantity {
    named(name).unwrap()
}

fn source<'a>(name: &str, values: &'a [f64]) -> Source<'a> {
    let quantity = quantity(name);
    Source {
        quantity,
        values,
        unit: quantity.default_unit(),
        per_h: false,
        branch: Branch::Number(1),
    }
}

fn conversion<'a>(history: &'a History, from: Source<'a>, to: &[&str]) -> Conversion<'a> {
    let to = to
        .iter()
        .map(|name| Output::plain(quantity(name)))
        .collect();
    Conversion {
        history,
        from,
        to,
        future: false,
    }
}

fn codes(converted: &Converted, row: usize) -> Vec<&'static str> {
    converted.remarks.row_codes(row).map(Code::name).collect()
}

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
    let refused = convert(&conversion(
        &milne,
        source("redshift", &values),
        &["equation_of_state"],
    ));
    assert!(matches!(refused, Err(ConvertFault::Undefined { .. })));
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
fn units_and_h_go_both_ways() {
    let history = plain(0.3, 0.0);
    let values = [1.0];
    let of = |output: Output| {
        let to = vec![output];
        let from = source("redshift", &values);
        convert(&Conversion {
            history: &history,
            from,
            to,
            future: false,
        })
        .unwrap()
        .columns
        .remove(0)
    };
    let value = |name: &str, unit: &str, per_h| {
        let unit = Unit::parse(unit).unwrap();
        of(Output {
            quantity: quantity(name),
            unit,
            per_h,
            per_sound_horizon: None,
        })
        .values[0]
    };
    let close = |one: f64, other: f64| assert!((one / other - 1.0).abs() < 1e-15, "{one} {other}");
    close(value("age", "Myr", false), 1e3 * value("age", "Gyr", false));
    close(
        value("comoving_distance", "Mpc", true),
        0.7 * value("comoving_distance", "Mpc", false),
    );
    close(
        value("comoving_volume", "Gpc**3", true),
        0.343e-9 * value("comoving_volume", "Mpc**3", false),
    );
    let shift = value("distance_modulus", "mag", true) - value("distance_modulus", "mag", false);
    close(shift, 5.0 * libm::log10(0.7));
    let horizon = Output {
        per_sound_horizon: Some(150.0),
        ..Output::plain(quantity("comoving_distance"))
    };
    let column = of(horizon);
    assert_eq!(column.unit.text(), "1");
    close(
        column.values[0],
        value("comoving_distance", "Mpc", false) / 150.0,
    );
    for (name, unit) in [
        ("age", "Myr"),
        ("comoving_volume", "Gpc**3"),
        ("distance_modulus", "mag"),
    ] {
        let given = [value(name, unit, true)];
        let from = Source {
            unit: Unit::parse(unit).unwrap(),
            per_h: true,
            ..source(name, &given)
        };
        let back = convert(&conversion(&history, from, &["redshift"])).unwrap();
        assert!((back.columns[0].values[0] - 1.0).abs() < 1e-14, "{name}");
    }
}

#[test]
fn senseless_requests_are_refused() {
    let history = plain(0.3, 0.0);
    let values = [1.0];
    let base = || {
        conversion(
            &history,
            source("redshift", &values),
            &["age", "comoving_distance"],
        )
    };
    let mut request = base();
    request.to[1].unit = Unit::parse("Gyr").unwrap();
    assert!(matches!(
        convert(&request),
        Err(ConvertFault::Unit {
            at: At::Output(1),
            ..
        })
    ));
    let mut request = base();
    request.to[0].per_sound_horizon = Some(147.0);
    assert!(matches!(
        convert(&request),
        Err(ConvertFault::NoSuchForm {
            at: At::Output(0),
            ..
        })
    ));
    let mut request = base();
    request.from.per_h = true;
    assert!(matches!(
        convert(&request),
        Err(ConvertFault::NoSuchForm { at: At::Source, .. })
    ));
    let mut request = base();
    request.from.unit = Unit::parse("Mpc").unwrap();
    assert!(matches!(
        convert(&request),
        Err(ConvertFault::Unit { at: At::Source, .. })
    ));
    let request = conversion(&history, source("redshift", &values), &["age", "age"]);
    assert!(matches!(
        convert(&request),
        Err(ConvertFault::Duplicate { output: 1, .. })
    ));
    let request = conversion(&history, source("volume_element", &values), &["age"]);
    assert!(matches!(
        convert(&request),
        Err(ConvertFault::NotInvertible { .. })
    ));
}

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
