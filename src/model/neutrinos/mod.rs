//! Energy density and pressure of a relic neutrino species with a mass.
//!
//! With y = m c²/(k T), relative to a massless species of the same temperature:
//! F(y) = 120/(7π⁴) ∫ p² √(p² + y²)/(eᵖ + 1) dp for the energy density and
//! G(y) = 120/(7π⁴) ∫ p⁴/√(p² + y²)/(eᵖ + 1) dp = F − y F′ for three times the
//! pressure. Two polynomials an octave between 2⁻¹⁰ and 2⁹, series outside.

mod coefficients;
#[cfg(test)]
mod tests;

use std::f64::consts::PI;

use coefficients::{ENERGY, LARGE, PRESSURE, Panel, SMALL};

/// F(y) for y ≥ 0, within 2.5·10⁻¹⁶ of the exact integral.
#[inline]
#[must_use]
pub fn energy(y: f64) -> f64 {
    if y < SMALLEST {
        return small_energy(y);
    }
    if y >= LARGEST {
        return large_energy(y);
    }
    let (index, u, _) = place(y);
    ENERGY.get(index).map_or(f64::NAN, |panel| value(panel, u))
}

/// F(y) and F′(y) for y ≥ 0 in one pass, F as [`energy`], F′ within 10⁻¹⁵.
#[inline]
#[must_use]
pub fn energy_and_slope(y: f64) -> (f64, f64) {
    if y < SMALLEST {
        return (small_energy(y), small_slope(y));
    }
    if y >= LARGEST {
        return (large_energy(y), large_slope(y));
    }
    let (index, u, scale) = place(y);
    ENERGY.get(index).map_or((f64::NAN, f64::NAN), |panel| {
        (value(panel, u), slope(panel, u) * scale)
    })
}

/// G(y), three times the pressure over the energy density of a massless species,
/// for y ≥ 0, within 5·10⁻¹⁶.
#[inline]
#[must_use]
pub fn pressure(y: f64) -> f64 {
    if y < SMALLEST {
        return small_pressure(y);
    }
    if y >= LARGEST {
        return large_pressure(y);
    }
    let (index, u, _) = place(y);
    PRESSURE
        .get(index)
        .map_or(f64::NAN, |panel| value(panel, u))
}

const SMALLEST: f64 = 1.0 / 1024.0;
const LARGEST: f64 = 512.0;
/// Top 13 bits of [`SMALLEST`]: sign, exponent and half of the octave.
const FIRST_PANEL: u64 = (1023 - 10) << 1;

/// Panel, place u ∈ [−1, 1] in it, and du/dy; every step is exact.
#[inline]
fn place(y: f64) -> (usize, f64, f64) {
    let bits = y.to_bits();
    let index = (bits >> 51).wrapping_sub(FIRST_PANEL) as usize;
    let middle = f64::from_bits((bits >> 51 << 51) | (1 << 50));
    let scale = f64::from_bits((2048 - (bits >> 52)) << 52);
    (index, (y - middle) * scale, scale)
}

/// The polynomial at u, even and odd powers apart so that the two chains overlap.
#[inline]
fn value(a: &Panel, u: f64) -> f64 {
    let s = u * u;
    let odd = a[2]
        + s * (a[4]
            + s * (a[6] + s * (a[8] + s * (a[10] + s * (a[12] + s * (a[14] + s * a[16]))))));
    let even = a[3] + s * (a[5] + s * (a[7] + s * (a[9] + s * (a[11] + s * (a[13] + s * a[15])))));
    a[0] + (a[1] + (u * odd + s * even))
}

/// The derivative of the polynomial with respect to u.
#[inline]
fn slope(a: &Panel, u: f64) -> f64 {
    let s = u * u;
    let high = 9.0 * a[10] + s * (11.0 * a[12] + s * (13.0 * a[14] + s * (15.0 * a[16])));
    let even = a[2] + s * (3.0 * a[4] + s * (5.0 * a[6] + s * (7.0 * a[8] + s * high)));
    let high = 8.0 * a[9] + s * (10.0 * a[11] + s * (12.0 * a[13] + s * (14.0 * a[15])));
    let odd = 2.0 * a[3] + s * (4.0 * a[5] + s * (6.0 * a[7] + s * high));
    even + u * odd
}

/// Coefficients of y² and of y⁴ ln y for small y.
const SMALL_SQUARE: f64 = 5.0 / (7.0 * PI * PI);
const SMALL_LOGARITHM: f64 = 15.0 / (14.0 * PI * PI * PI * PI);

/// y⁴ and the factor of the logarithmic term, a ln y + b.
fn small_logarithm(y: f64) -> (f64, f64) {
    if y < 1e-30 {
        return (0.0, 0.0);
    }
    let square = y * y;
    (square * square, SMALL_LOGARITHM * libm::log(y) + SMALL[0])
}

fn small_energy(y: f64) -> f64 {
    let (fourth, bracket) = small_logarithm(y);
    let bracket = bracket + y * (SMALL[1] + y * SMALL[2]);
    1.0 + (SMALL_SQUARE * (y * y) + fourth * bracket)
}

fn small_slope(y: f64) -> f64 {
    let (fourth, bracket) = small_logarithm(y);
    let third = if fourth > 0.0 { fourth / y } else { 0.0 };
    let bracket = 4.0 * bracket + SMALL_LOGARITHM + y * (5.0 * SMALL[1] + 6.0 * y * SMALL[2]);
    2.0 * SMALL_SQUARE * y + third * bracket
}

fn small_pressure(y: f64) -> f64 {
    let (fourth, bracket) = small_logarithm(y);
    let bracket = 3.0 * bracket + SMALL_LOGARITHM + y * (4.0 * SMALL[1] + 5.0 * y * SMALL[2]);
    1.0 - (SMALL_SQUARE * (y * y) + fourth * bracket)
}

fn large_energy(y: f64) -> f64 {
    y * (LARGE[0] + large_sum(y, |_| 1.0))
}

fn large_slope(y: f64) -> f64 {
    LARGE[0] + large_sum(y, |k| 1.0 - 2.0 * k)
}

fn large_pressure(y: f64) -> f64 {
    y * large_sum(y, |k| 2.0 * k)
}

/// Σ factor(k) c_k y^(−2k) from k = 1 on.
fn large_sum(y: f64, factor: impl Fn(f64) -> f64) -> f64 {
    let inverse = 1.0 / (y * y);
    let mut sum = 0.0;
    for (k, coefficient) in LARGE.iter().enumerate().skip(1).rev() {
        sum = (sum + factor(k as f64) * coefficient) * inverse;
    }
    sum
}
