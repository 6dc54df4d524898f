//! The four integrals of a history by direct quadrature: slow, and trusted as
//! the measure of the tables.
//!
//! Each octave of v = 1 + z is cut into equal parts, each integrated by the
//! 16-point rule; the part nearest to today starts at z = 0 exactly, so that
//! relative accuracy holds as z → 0.

use super::{Densities, tail};
use crate::numerics::gauss_legendre_16;

/// Parts an octave of v is cut into; a half-octave already reaches rounding for
/// smooth histories, so this leaves a wide margin for loitering ones.
const PARTS: u32 = 32;

/// Comoving distance in units of c/H0, ∫₀ᶻ dz/E; negative for z < 0.
#[must_use]
pub fn comoving(densities: &Densities, redshift: f64) -> f64 {
    from_today(redshift, |z| 1.0 / densities.rate(1.0 + z))
}

/// Lookback time in units of 1/H0, ∫₀ᶻ dz/((1+z) E); negative for z < 0.
#[must_use]
pub fn lookback(densities: &Densities, redshift: f64) -> f64 {
    from_today(redshift, |z| 1.0 / ((1.0 + z) * densities.rate(1.0 + z)))
}

/// Age in units of 1/H0, ∫_z^∞ dz/((1+z) E); infinite without a beginning.
#[must_use]
pub fn age(densities: &Densities, redshift: f64) -> f64 {
    let top = TOP.max(2.0 * (1.0 + redshift));
    let body = between(1.0 + redshift, top, |v| 1.0 / (v * densities.rate(v)));
    body + tail::lookback(densities, top)
}

/// Conformal time in units of 1/H0, ∫_z^∞ dz/E; infinite where it diverges.
#[must_use]
pub fn conformal(densities: &Densities, redshift: f64) -> f64 {
    let top = TOP.max(2.0 * (1.0 + redshift));
    let body = between(1.0 + redshift, top, |v| 1.0 / densities.rate(v));
    body + tail::comoving(densities, top)
}

/// Where the closed tail takes over: 2³¹, beyond the largest redshift served.
const TOP: f64 = 2_147_483_648.0;

/// ∫₀ᶻ in the variable z, octave by octave of 1 + z.
fn from_today(redshift: f64, integrand: impl Fn(f64) -> f64) -> f64 {
    let mut sum = 0.0;
    let mut from = 0.0;
    while from != redshift {
        let to = if redshift > 0.0 {
            redshift.min(2.0 * from + 1.0)
        } else {
            redshift.max(0.5 * from - 0.5)
        };
        sum += parts(from, to, &integrand);
        from = to;
    }
    sum
}

fn between(low: f64, high: f64, integrand: impl Fn(f64) -> f64) -> f64 {
    let mut sum = 0.0;
    let mut to = high;
    while to > low {
        // From the top down: the small terms first.
        let from = low.max(0.5 * to);
        sum += parts(from, to, &integrand);
        to = from;
    }
    sum
}

fn parts(from: f64, to: f64, integrand: impl Fn(f64) -> f64) -> f64 {
    let step = (to - from) / f64::from(PARTS);
    (0..PARTS)
        .map(|part| {
            let low = from + f64::from(part) * step;
            let high = if part + 1 == PARTS {
                to
            } else {
                from + f64::from(part + 1) * step
            };
            gauss_legendre_16(low, high, &integrand)
        })
        .sum()
}
