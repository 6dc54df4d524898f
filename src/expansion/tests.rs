//! The tables against direct quadrature and against closed forms.
#![allow(clippy::unwrap_used)]

use super::*;
use crate::model::{Declaration, Spec};

fn declared(matter: f64, curvature: f64) -> Spec {
    let declaration = Declaration {
        hubble_constant: 70.0,
        matter,
        curvature: Some(curvature),
        ..Declaration::default()
    };
    declaration.close().unwrap()
}

fn history(matter: f64, curvature: f64) -> History {
    History::build(&declared(matter, curvature)).unwrap()
}

/// Redshifts over the whole range, with panel edges and the neighbourhood of today.
fn redshifts(range: (f64, f64)) -> Vec<f64> {
    let mut redshifts = vec![
        -0.99, -0.9, -0.5, -0.25, -1e-3, -1e-12, 1e-12, 1e-8, 0.49999, 0.5, 1.0, 3.0,
    ];
    redshifts.extend((0..200).map(|i| libm::pow(10.0, -3.0 + 0.06 * f64::from(i))));
    redshifts.retain(|z| *z >= range.0 && *z <= range.1);
    redshifts
}

fn assert_close(what: &str, found: f64, expected: f64, tolerance: f64) {
    assert!(
        found == expected || (found / expected - 1.0).abs() <= tolerance,
        "{what}: {found:e} instead of {expected:e}, relative error {:e}",
        found / expected - 1.0
    );
}

#[test]
fn tables_agree_with_quadrature() {
    for (matter, curvature) in [
        (0.3, 0.0),
        (0.3, 0.2),
        (0.5, -0.1),
        (1.0, 0.0),
        (0.3, -1.01),
    ] {
        let history = history(matter, curvature);
        let densities = history.densities();
        for z in redshifts(history.range()) {
            let epoch = history.epoch(z);
            let what = |curve: &str| format!("{curve} of {matter}, {curvature} at {z:e}");
            assert_close(
                &what("comoving"),
                epoch.comoving,
                quadrature::comoving(densities, z),
                2e-15,
            );
            assert_close(
                &what("lookback"),
                epoch.lookback,
                quadrature::lookback(densities, z),
                2e-15,
            );
            assert_close(
                &what("conformal"),
                epoch.conformal,
                quadrature::conformal(densities, z),
                2e-15,
            );
            assert_close(
                &what("age"),
                epoch.age,
                quadrature::age(densities, z),
                2e-15,
            );
            let cancellation = densities.cancellation(1.0 + z).max(1.0);
            assert_close(
                &what("rate"),
                epoch.rate,
                densities.rate(1.0 + z),
                1.5e-15 * cancellation,
            );
        }
    }
}

#[test]
fn tables_with_too_few_nodes_state_at_least_their_error() {
    for nodes in 4..16 {
        let spec = declared(0.3, 0.0);
        let (poor, good) = (
            History::build_with_nodes(&spec, nodes).unwrap(),
            History::build(&spec).unwrap(),
        );
        let mut worst = [0.0_f64; 4];
        for z in redshifts(good.range()) {
            let (poor, good) = (poor.epoch(z), good.epoch(z));
            for (worst, (poor, good)) in worst.iter_mut().zip([
                (poor.rate, good.rate),
                (poor.comoving, good.comoving),
                (poor.lookback, good.lookback),
                (poor.age, good.age),
            ]) {
                *worst = worst.max((poor / good - 1.0).abs());
            }
        }
        let stated = poor.accuracy();
        for (stated, worst) in [stated.rate, stated.comoving, stated.lookback, stated.age]
            .iter()
            .zip(worst)
        {
            assert!(
                *stated >= worst,
                "{nodes} nodes: stated {stated:e}, true {worst:e}"
            );
        }
        if nodes < 8 {
            assert!(worst[1] > 1e-11, "{nodes} nodes are not poor: {worst:?}");
        }
    }
}

#[test]
fn every_curve_is_inverted() {
    for (matter, curvature) in [
        (0.3, 0.0),
        (0.3, 0.2),
        (0.5, -0.1),
        (0.3, -1.01),
        (2.0, -1.0),
        (0.1, -1.5),
    ] {
        let history = history(matter, curvature);
        for z in redshifts(history.range()) {
            for (curve, value) in [
                (
                    Curve::Comoving,
                    (|epoch| epoch.comoving) as fn(Epoch) -> f64,
                ),
                (Curve::Lookback, |epoch| epoch.lookback),
                (Curve::Age, |epoch| epoch.age),
                (Curve::Conformal, |epoch| epoch.conformal),
            ] {
                let goal = value(history.epoch(z));
                if !goal.is_finite() {
                    continue;
                }
                let mut found = Vec::new();
                history.invert(curve, &[goal], &mut found);
                let back = value(history.epoch(found[0]));
                // 4 ulp of the value and what an ulp of the redshift makes.
                let ulp = f64::EPSILON * found[0].abs();
                let slope = (value(history.epoch(found[0] + ulp)) - back).abs();
                let allowed = 4.0 * f64::EPSILON * goal.abs() + 2.0 * slope;
                assert!(
                    (back - goal).abs() <= allowed,
                    "{curve:?} {matter} {curvature} {z:e}: {:e}",
                    back - goal
                );
            }
        }
    }
}

/// Matter twice the critical density: a cycloid (Peebles 1993, section 13):
/// a = 1 − cos θ, H0 t = θ − sin θ, conformal time θ, today at θ = π/2.
#[test]
fn a_recollapsing_universe_is_a_cycloid() {
    let history = history(2.0, -1.0);
    assert_eq!(history.turnaround(), Some(-0.5));
    for exponent in 0..60 {
        // From just before the turnaround at θ = π back to early times.
        let short_of_turnaround = libm::pow(10.0, -0.1 * f64::from(exponent));
        for angle in [
            std::f64::consts::PI - short_of_turnaround,
            short_of_turnaround,
        ] {
            let redshift = 1.0 / (1.0 - libm::cos(angle)) - 1.0;
            if redshift < history.range().0 || redshift > history.range().1 {
                continue;
            }
            let epoch = history.epoch(redshift);
            // The cosine leaves this much of the angle.
            let lost = 4.0 * f64::EPSILON / (libm::sin(angle).abs() * angle);
            let allowed = 2e-15
                + lost
                + if angle < 0.1 {
                    16.0 * f64::EPSILON / (angle * angle)
                } else {
                    0.0
                };
            assert_close("conformal time", epoch.conformal, angle, allowed);
            assert_close(
                "rate",
                epoch.rate,
                libm::sin(angle) / libm::pow(1.0 - libm::cos(angle), 2.0),
                8.0 * allowed + 8.0 * f64::EPSILON / (short_of_turnaround * short_of_turnaround),
            );
        }
    }
}

/// A closed universe of nothing but a cosmological constant bounces (de Sitter
/// 1917): with E² = 1.5 − 0.5 v², v ≤ √3, H0 D_C/c = √2 (asin(v/√3) − asin(1/√3)).
#[test]
fn an_empty_closed_universe_bounces() {
    let history = history(0.0, -0.5);
    let bounce = 3.0_f64.sqrt();
    assert!(
        matches!(history.beginning(), Beginning::Bounce { redshift } if (redshift + 1.0 - bounce).abs() < 1e-15)
    );
    assert_eq!(history.age_today(), None);
    for step in 0..=1000 {
        let angle = libm::asin(1.0 / bounce)
            + f64::from(step) / 1000.0 * (0.5 * std::f64::consts::PI - libm::asin(1.0 / bounce));
        let redshift = bounce * libm::sin(angle) - 1.0;
        if redshift > history.range().1 {
            continue;
        }
        let expected = std::f64::consts::SQRT_2
            * (libm::asin((1.0 + redshift) / bounce) - libm::asin(1.0 / bounce));
        let epoch = history.epoch(redshift);
        // asin near 1 turns an ulp of its argument into its root.
        let lost = 4.0 * f64::EPSILON / libm::cos(angle).abs().max(1e-8);
        assert!(
            (epoch.comoving - expected).abs() <= 4e-15 * expected + lost,
            "{redshift}: {} {expected}",
            epoch.comoving
        );
    }
}

#[test]
fn blocks_and_single_redshifts_have_the_same_bits() {
    let history = history(0.3, 0.1);
    let redshifts = redshifts(history.range());
    let mut columns = Epochs::default();
    for size in [1, 3, 8, 11, redshifts.len()] {
        for block in redshifts.chunks(size) {
            history.epochs(block, Wanted::ALL, &mut columns);
            for (row, z) in block.iter().enumerate() {
                assert_eq!(columns.row(*z, row), history.epoch(*z));
            }
        }
    }
}

#[test]
fn turning_points_of_known_models() {
    // Einstein–de Sitter: the angular-diameter distance peaks at z = 5/4.
    let einstein_de_sitter = history(1.0, 0.0);
    let peaks = &einstein_de_sitter.turning().angular_diameter;
    assert_eq!(peaks.len(), 1);
    assert!((peaks[0] - 1.25).abs() < 1e-14, "{peaks:?}");
    // Milne: D_A = (1 − v⁻²)/2 grows for ever.
    assert!(history(0.0, 1.0).turning().angular_diameter.is_empty());
}

#[test]
fn a_minimum_within_the_last_digits_is_refused() {
    // For matter 0.3 the loitering limit lies between two neighbouring doubles of the curvature.
    let limit = -1.013_460_402_873_455;
    assert!(matches!(
        History::build(&declared(0.3, limit)),
        Err(HistoryFault::Indeterminate { .. })
    ));
    assert!(History::build(&declared(0.3, limit + 1e-3)).is_ok());
    let beyond = history(0.3, limit - 1e-3);
    assert!(matches!(beyond.beginning(), Beginning::Bounce { .. }));
}
