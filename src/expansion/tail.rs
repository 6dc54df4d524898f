//! The integrals of a history beyond the tables, up to v → ∞.
//!
//! Octave after octave by the 16-point rule, until the integrand has become a
//! pure power of v; what remains is then a geometric series.

use super::Densities;
use crate::numerics::gauss_legendre_16;

/// Octaves after which the search for a power law ends: v = 2²³¹ is far beyond
/// any transition that parameters in their ranges can produce.
const MOST_OCTAVES: u32 = 200;

/// ∫_v^∞ dv/(v E); infinite where the age diverges.
#[must_use]
pub(super) fn lookback(densities: &Densities, stretch: f64) -> f64 {
    if densities.early_exponent() <= 0.0 {
        return f64::INFINITY;
    }
    to_infinity(stretch, |v| 1.0 / (v * densities.rate(v)))
}

/// ∫_v^∞ dv/E; infinite where the conformal time diverges.
#[must_use]
pub(super) fn comoving(densities: &Densities, stretch: f64) -> f64 {
    if densities.early_exponent() <= 2.0 {
        return f64::INFINITY;
    }
    to_infinity(stretch, |v| 1.0 / densities.rate(v))
}

/// ∫_v^∞ of an integrand that has become a power of v, falling faster than 1/v,
/// before v grows by 2²⁰⁰.
#[must_use]
pub fn to_infinity(stretch: f64, integrand: impl Fn(f64) -> f64) -> f64 {
    let mut sum = 0.0;
    let mut from = stretch;
    let mut previous = [f64::NAN; 2];
    for _ in 0..MOST_OCTAVES {
        let octave = gauss_legendre_16(from, 2.0 * from, &integrand);
        sum += octave;
        from *= 2.0;
        let ratio = octave / previous[0];
        let settled = (ratio - previous[0] / previous[1]).abs() <= 2.0 * f64::EPSILON * ratio;
        if settled && ratio < 1.0 {
            return sum + octave * ratio / (1.0 - ratio);
        }
        if octave <= 1e-20 * sum {
            return sum;
        }
        previous = [octave, previous[0]];
    }
    sum
}
