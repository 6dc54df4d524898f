//! Monotone integrals, what they add up to, and their limits.

use proptest::prelude::*;
use redfathom::expansion::History;

use super::models::{config, histories, inside, near, on_references, redshifts, value};

/// Each term may lose this of itself, and so may their sum.
const TERM: f64 = 2e-15;

fn additivity(history: &History, redshifts: &[f64]) {
    let (age, horizon) = (
        value(history, "age", 0.0),
        value(history, "conformal_time", 0.0),
    );
    let per_distance = history.hubble_time_gyr() / history.hubble_distance_mpc();
    for z in inside(history, redshifts) {
        let at = |name| value(history, name, z);
        if age.is_finite() {
            let sum = at("age") + at("lookback_time");
            near(sum, age, TERM, age.max(at("age")), "age + lookback");
        }
        if horizon.is_finite() {
            let sum = at("conformal_time") + history.epoch(z).comoving * history.hubble_time_gyr();
            near(
                sum,
                horizon,
                TERM,
                horizon.max(at("conformal_time")),
                "conformal time + distance",
            );
        }
        if z >= 0.0 {
            let travel = at("lookback_time") / per_distance;
            near(at("light_travel_distance"), travel, TERM, travel, "c t");
        }
    }
}

/// Times and distances in order of redshift; where doubles cannot tell, they may be equal.
fn monotone(history: &History, redshifts: &[f64]) {
    let redshifts = inside(history, redshifts);
    for pair in redshifts.windows(2) {
        let (near_z, far_z) = (pair[0], pair[1]);
        for (name, sign) in [
            ("lookback_time", 1.0),
            ("age", -1.0),
            ("conformal_time", -1.0),
        ] {
            let (low, high) = (value(history, name, near_z), value(history, name, far_z));
            if low.is_finite() && high.is_finite() {
                let slack = 4.0 * f64::EPSILON * low.abs();
                assert!(
                    sign * (high - low) >= -slack,
                    "{name} at {near_z:e}, {far_z:e}: {low}, {high}"
                );
            }
        }
        if near_z < 0.0 {
            continue;
        }
        let mut growing = vec![
            "comoving_distance",
            "light_travel_distance",
            "comoving_volume",
            "recession_velocity",
        ];
        if history.densities().curvature() >= 0.0 {
            growing.extend([
                "transverse_comoving_distance",
                "luminosity_distance",
                "distance_modulus",
            ]);
        }
        for name in growing {
            let (low, high) = (value(history, name, near_z), value(history, name, far_z));
            let slack = 4e-14 * low.abs();
            assert!(
                low.is_infinite() || high >= low - slack,
                "{name} at {near_z:e}, {far_z:e}: {low}, {high}"
            );
        }
    }
}

/// Hubble's law and its kin as z → 0; today's values at z = 0.
fn limits(history: &History) {
    let spec = history.spec();
    let (distance, time) = (history.hubble_distance_mpc(), history.hubble_time_gyr());
    for z in [1e-12, 1e-10, 1e-9] {
        // The next term is z (1 + q)/2 or so of the first.
        let bend = 8.0 * z * (2.0 + value(history, "deceleration_parameter", 0.0).abs());
        for name in [
            "comoving_distance",
            "transverse_comoving_distance",
            "angular_diameter_distance",
            "luminosity_distance",
            "light_travel_distance",
            "volume_averaged_distance",
        ] {
            near(
                value(history, name, z),
                distance * z,
                bend + TERM,
                distance * z,
                name,
            );
        }
        near(
            value(history, "lookback_time", z),
            time * z,
            bend + TERM,
            time * z,
            "lookback",
        );
        let sphere = 4.0 / 3.0 * std::f64::consts::PI * libm::pow(distance * z, 3.0);
        near(
            value(history, "comoving_volume", z),
            sphere,
            3.0 * bend + 3.0 * TERM,
            sphere,
            "volume",
        );
        let drift = -value(history, "deceleration_parameter", 0.0) * z / (time * 1e9);
        let term = z / (time * 1e9);
        near(
            value(history, "redshift_drift", z),
            drift,
            2.0 * bend + 1e-13,
            term,
            "drift",
        );
    }
    for name in [
        "comoving_distance",
        "luminosity_distance",
        "lookback_time",
        "comoving_volume",
        "redshift_drift",
        "optical_velocity",
        "recession_velocity",
        "angular_scale",
        "alcock_paczynski",
        "volume_averaged_distance",
    ] {
        assert_eq!(value(history, name, 0.0), 0.0, "{name} today");
    }
    assert_eq!(
        value(history, "hubble_parameter", 0.0),
        spec.hubble_constant
    );
    assert_eq!(value(history, "scale_factor", 0.0), 1.0);
}

proptest! {
    #![proptest_config(config())]

    #[test]
    fn times_add_up_and_are_in_order(history in histories(), redshifts in redshifts()) {
        additivity(&history, &redshifts);
        monotone(&history, &redshifts);
        limits(&history);
    }
}

#[test]
fn times_add_up_and_are_in_order_under_the_references() {
    on_references(additivity);
    on_references(monotone);
    on_references(|history, _| limits(history));
}
