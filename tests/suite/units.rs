//! Tests of units: what is accepted, what is refused, exact factors, column names.

use redfathom::quantity::{QUANTITIES, Unit, UnitFault, column_name, named};

#[test]
fn accepted() {
    for (text, same_as, factor) in [
        ("Myr", "Gyr", 1e-3),
        ("yr", "Gyr", 1e-9),
        ("Ga", "Gyr", 1.0),
        ("s", "yr", 1.0 / 31_557_600.0),
        ("d", "h", 24.0),
        ("yr", "d", 365.25),
        ("kpc", "Mpc", 1e-3),
        ("Gpc", "Mpc", 1e3),
        ("lyr", "m", 9_460_730_472_580_800.0),
        ("Glyr", "lyr", 1e9),
        ("AU", "m", 149_597_870_700.0),
        // IAU 2015 resolution B2: 648000/π au.
        ("pc", "m", 3.085_677_581_491_367e16),
        ("kpc/arcsec", "kpc/arcmin", 60.0),
        ("Mpc/deg", "kpc/arcsec", 1.0 / 3.6),
        ("Mpc**3", "kpc**3", 1e9),
        ("Gpc**3/sr", "Mpc**3/sr", 1e9),
        ("km.s**-1.Mpc**-1", "km/(s.Mpc)", 1.0),
        ("m/s", "km/s", 1e-3),
        ("cm/(s.yr)", "m/(s.yr)", 1e-2),
        ("g/cm**3", "kg.m**-3", 1e3),
        ("g.cm**(-3)", "kg.m**-3", 1e3),
        ("mK", "K", 1e-3),
        ("mmag", "mag", 1e-3),
        ("%", "1", 0.01),
        ("1", "1", 1.0),
        ("", "1", 1.0),
        ("((kpc)/(arcsec))", "kpc/arcsec", 1.0),
        ("Hz", "s**-1", 1.0),
    ] {
        let scale = Unit::parse(text)
            .unwrap()
            .to(&Unit::parse(same_as).unwrap());
        let scale = scale.unwrap_or_else(|fault| panic!("{text}: {fault}"));
        assert_eq!(scale.apply(1.0), factor, "{text} in {same_as}");
    }
}

#[test]
fn refused() {
    for text in [
        "km/s/Mpc",
        "km s",
        "km*s",
        "Mpc^3",
        "Mpc**",
        "Mpc**x",
        "Mpc**0",
        "Mpc**1.5",
        "Mpc**(1/2)",
        "Mpc**99",
        "(Mpc",
        "Mpc)",
        ".Mpc",
        "Mpc.",
        "/s",
        "1/s",
        "2Mpc",
        "Mpc ",
        " Mpc",
        "((((((((((m))))))))))",
        "(m)**2",
    ] {
        let refused = Unit::parse(text);
        assert!(
            matches!(refused, Err(UnitFault::Malformed { .. })),
            "{text}: {refused:?}"
        );
    }
    let long = "m.".repeat(40) + "m";
    assert!(matches!(
        Unit::parse(&long),
        Err(UnitFault::Malformed { .. })
    ));
    for text in [
        "parsec", "kmin", "Mdeg", "MsolMass", "mpc2", "Mpcs", "kAU", "furlong", "kkm", "h70",
    ] {
        let refused = Unit::parse(text);
        assert!(refused.is_err(), "{text}: {refused:?}");
    }
    assert_eq!(
        Unit::parse("furlong"),
        Err(UnitFault::Unknown {
            symbol: "furlong".to_owned()
        })
    );
}

#[test]
fn what_measures_something_else_does_not_convert() {
    for (unit, other) in [
        ("Mpc", "Gyr"),
        ("Mpc/h", "Mpc"),
        ("mag", "1"),
        ("kpc", "kpc/arcsec"),
        ("Jy", "K"),
        ("sr", "rad"),
    ] {
        let unit = Unit::parse(unit).unwrap();
        let refused = unit.to(&Unit::parse(other).unwrap());
        assert!(
            matches!(refused, Err(UnitFault::Mismatch { .. })),
            "{unit} {other}"
        );
    }
}

#[test]
fn a_division_by_a_whole_number_rounds_once() {
    let scale = Unit::parse("Myr")
        .unwrap()
        .to(&Unit::parse("Gyr").unwrap())
        .unwrap();
    for value in [0.1, 1.0 / 3.0, 13_797.0, 5e-324] {
        assert_eq!(scale.apply(value), value / 1000.0);
    }
}

#[test]
fn every_unit_of_the_catalogue_reads() {
    for quantity in QUANTITIES {
        let unit = Unit::parse(quantity.unit).unwrap();
        assert_eq!(unit.text(), quantity.unit);
        assert_eq!(unit, quantity.default_unit());
    }
}

#[test]
fn columns_are_named_by_quantity_and_unit() {
    let name = |quantity: &str, unit: &str, per_h, per_horizon| {
        column_name(
            named(quantity).unwrap(),
            &Unit::parse(unit).unwrap(),
            per_h,
            per_horizon,
        )
    };
    for (quantity, unit, column) in [
        ("redshift", "1", "redshift"),
        ("age", "Gyr", "age_gyr"),
        ("luminosity_distance", "Mpc", "luminosity_distance_mpc"),
        (
            "angular_scale",
            "kpc/arcsec",
            "angular_scale_kpc_per_arcsec",
        ),
        (
            "hubble_parameter",
            "km/(s.Mpc)",
            "hubble_parameter_km_per_s_mpc",
        ),
        (
            "hubble_parameter",
            "km.s**-1.Mpc**-1",
            "hubble_parameter_km_per_s_mpc",
        ),
        ("volume_element", "Mpc**3/sr", "volume_element_mpc3_per_sr"),
        ("critical_density", "kg.m**-3", "critical_density_kg_per_m3"),
        ("redshift_drift", "yr**-1", "redshift_drift_per_yr"),
        ("velocity_drift", "cm/(s.yr)", "velocity_drift_cm_per_s_yr"),
        ("optical_velocity", "km/s", "optical_velocity_km_per_s"),
        ("comoving_volume", "Mpc**3", "comoving_volume_mpc3"),
    ] {
        assert_eq!(name(quantity, unit, false, false), column);
    }
    assert_eq!(name("age", "Myr", true, false), "age_myr_per_h");
    assert_eq!(
        name("comoving_distance", "1", false, true),
        "comoving_distance_per_sound_horizon"
    );
}
