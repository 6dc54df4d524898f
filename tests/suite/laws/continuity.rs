//! Derivatives: what is an integral changes as its integrand says, and panels join.

use proptest::prelude::*;
use redfathom::expansion::History;

use super::models::{config, defined, histories, inside, near, on_references, redshifts, value};

/// Relative error of a central difference over a step of 1e-4 of z.
const DIFFERENCE: f64 = 1e-6;

fn derivatives(history: &History, redshifts: &[f64]) {
    let (low, high) = history.range();
    for z in inside(history, redshifts).into_iter().filter(|z| *z > 1e-3) {
        let step = 1e-4 * z;
        if z - step < low.max(0.0) || z + step > high {
            continue;
        }
        // Cancellation in the difference leaves this of the value.
        let change = |name: &str| {
            let (below, above) = (
                value(history, name, z - step),
                value(history, name, z + step),
            );
            ((above - below) / (2.0 * step), 1e-15 * above.abs() / step)
        };
        let rate = value(history, "hubble_parameter", z);
        let hubble_time = history.hubble_time_gyr() * history.spec().hubble_constant / rate;
        let distance = history.hubble_distance_mpc() * history.spec().hubble_constant / rate;
        let element = 4.0 * std::f64::consts::PI * value(history, "volume_element", z);
        // Near an antipode the sphere hardly grows: its flat area is the scale there.
        let line = value(history, "comoving_distance", z);
        let sphere = element.max(4.0 * std::f64::consts::PI * line * line * distance);
        for (name, slope, scale) in [
            (
                "lookback_time",
                hubble_time / (1.0 + z),
                hubble_time / (1.0 + z),
            ),
            ("comoving_distance", distance, distance),
            ("comoving_volume", element, sphere),
        ] {
            let (found, noise) = change(name);
            assert!(
                (found - slope).abs() <= DIFFERENCE * scale * curving(history, z) + 4.0 * noise,
                "d {name}/dz at {z:e}: {found}, not {slope}"
            );
        }
        let slope = rate * (1.0 + value(history, "deceleration_parameter", z)) / (1.0 + z);
        let (found, noise) = change("hubble_parameter");
        let bound = DIFFERENCE * rate / (1.0 + z) * curving(history, z);
        assert!(
            (found - slope).abs() <= bound + 4.0 * noise,
            "dH/dz at {z:e}: {found}, not {slope}"
        );
    }
}

/// The smaller E² is beside its terms, the faster everything bends.
fn curving(history: &History, z: f64) -> f64 {
    let cancellation = history.densities().cancellation(1.0 + z);
    10.0 * cancellation * cancellation * cancellation
}

/// No quantity jumps where panels meet, nor at z = 0.
fn edges(history: &History) {
    let (low, high) = history.range();
    let edges = history
        .edges()
        .iter()
        .copied()
        .filter(|edge| *edge > low && *edge < high);
    for edge in edges {
        let (before, after) = (edge.next_down(), edge.next_up());
        for quantity in
            defined(history).filter(|quantity| edge > 0.0 || (edge < 0.0 && quantity.future))
        {
            let (left, right) = (
                value(history, quantity.name, before),
                value(history, quantity.name, after),
            );
            if !left.is_finite() {
                continue;
            }
            // Two ulp of redshift, raised where the quantity is the small difference of large ones.
            let scale = left.abs().max(match quantity.name {
                "redshift_drift" => (1.0 + edge) * 1e-12 * history.spec().hubble_constant,
                "velocity_drift" => 3e10 * 1e-12 * history.spec().hubble_constant,
                "deceleration_parameter" | "curvature_fraction" | "dark_energy_fraction" => 1.0,
                _ => 0.0,
            });
            let condition = 20.0
                + 10.0 * history.densities().cancellation(1.0 + edge)
                + antipode(history, edge);
            near(
                left,
                right,
                4e-15 * condition + 8.0 * checked(history),
                scale,
                &format!("{} across {edge:e}", quantity.name),
            );
        }
    }
}

/// The largest error that a history states of its tables.
fn checked(history: &History) -> f64 {
    let accuracy = history.accuracy();
    let integrals = accuracy.comoving.max(accuracy.lookback);
    accuracy
        .rate
        .max(integrals)
        .max(accuracy.conformal)
        .max(accuracy.age)
}

fn antipode(history: &History, z: f64) -> f64 {
    let frame = redfathom::quantity::Frame::of(history);
    frame.transverse_condition(&history.epoch(z)).min(1e12)
}

proptest! {
    #![proptest_config(config())]

    #[test]
    fn slopes_are_the_integrands(history in histories(), redshifts in redshifts()) {
        derivatives(&history, &redshifts);
        edges(&history);
    }
}

#[test]
fn slopes_are_the_integrands_under_the_references() {
    on_references(derivatives);
    on_references(|history, _| edges(history));
}
