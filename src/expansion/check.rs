//! The error of the tables, checked at build.
//!
//! At both ends of each panel and at extrema of the first neglected Chebyshev
//! polynomial between its nodes, where an interpolant is worst, the polynomials
//! are compared with the functions they replace. All integrands are positive, so
//! that a sum of panels is never relatively worse than its worst panel. Up to
//! the rounding of the comparison itself the worst difference is taken as it is;
//! what exceeds it is truncation, is not seen everywhere, and counts four times.
//! It is an estimate and no proof: table and check share E².

use super::fit::Fit;
use super::{Accuracy, Densities};
use crate::numerics::Chebyshev;

/// Rounding of one evaluation: of the polynomial, its argument and the final sum.
const EVALUATION: f64 = 3.0 * f64::EPSILON;
/// Rounding of one comparison: of E, of the polynomial and of their quotient.
const COMPARISON: f64 = 6.0 * f64::EPSILON;
/// What a difference beyond rounding counts.
const UNSEEN: f64 = 4.0;

/// The checked relative error of each table.
pub(super) fn accuracy(densities: &Densities, fits: &[Fit], plan: &Chebyshev) -> Accuracy {
    let points = plan.extrema();
    let (mut rate, mut distance, mut time) = (0.0_f64, 0.0_f64, 0.0_f64);
    let worse = |worst: f64, fitted: f64, exact: f64| {
        let difference = (fitted / exact - 1.0).abs();
        // Not `max`, which would lose a NaN.
        if difference > worst || difference.is_nan() {
            difference
        } else {
            worst
        }
    };
    for fit in fits {
        for point in points {
            let u = fit.coordinate(point);
            let (exact, fitted) = (fit.exact(densities, u), fit.fitted(u));
            rate = worse(rate, fitted.rate, exact.rate);
            distance = worse(distance, fitted.distance_slope, exact.distance_slope);
            time = worse(time, fitted.time_slope, exact.time_slope);
        }
    }
    let stated = |worst: f64| {
        let truncation = (worst - COMPARISON).max(0.0);
        if worst.is_finite() {
            EVALUATION + worst.min(COMPARISON) + UNSEEN * truncation
        } else {
            f64::INFINITY
        }
    };
    Accuracy {
        rate: stated(rate),
        comoving: stated(distance),
        lookback: stated(time),
        conformal: stated(distance),
        age: stated(time),
    }
}
