//! Units, h, and requests that make no sense.

use super::*;

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
