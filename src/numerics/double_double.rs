//! Unevaluated sums of two doubles, for the few places where one is not enough.

use std::ops::{Add, Div, Mul, Neg, Sub};

/// An unevaluated sum `hi + lo` with |lo| ≤ ½ ulp(hi): about 32 decimal digits.
///
/// Each operation is within a few units of 2⁻¹⁰⁴ of the exact result; overflow
/// of an intermediate above 2⁹⁹⁵ gives NaN. Dekker 1971, Numerische Mathematik
/// 18, 224; Knuth 1998, The Art of Computer Programming 2, 4.2.2.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct DoubleDouble {
    /// The nearest double.
    pub hi: f64,
    /// What `hi` leaves out.
    pub lo: f64,
}

/// The exact sum of two doubles as `(rounded, error)`.
#[inline]
#[must_use]
pub fn two_sum(a: f64, b: f64) -> (f64, f64) {
    let sum = a + b;
    let b_rounded = sum - a;
    (sum, (a - (sum - b_rounded)) + (b - b_rounded))
}

/// The exact product of two doubles as `(rounded, error)`, without a fused operation.
#[inline]
#[must_use]
pub fn two_product(a: f64, b: f64) -> (f64, f64) {
    let product = a * b;
    let (a_high, a_low) = split(a);
    let (b_high, b_low) = split(b);
    let error = ((a_high * b_high - product) + a_high * b_low + a_low * b_high) + a_low * b_low;
    (product, error)
}

/// Two halves of at most 26 significant bits each (Veltkamp's splitting).
#[inline]
fn split(a: f64) -> (f64, f64) {
    let scaled = 134_217_729.0 * a;
    let high = scaled - (scaled - a);
    (high, a - high)
}

#[inline]
fn renormalised(hi: f64, lo: f64) -> DoubleDouble {
    let sum = hi + lo;
    DoubleDouble {
        hi: sum,
        lo: lo - (sum - hi),
    }
}

impl DoubleDouble {
    /// The nearest double.
    #[inline]
    #[must_use]
    pub fn value(self) -> f64 {
        self.hi + self.lo
    }

    /// The square root of a positive number; NaN below zero.
    #[must_use]
    pub fn sqrt(self) -> DoubleDouble {
        if self.hi == 0.0 {
            return DoubleDouble::default();
        }
        let root = self.hi.sqrt();
        let (square, error) = two_product(root, root);
        let rest = ((self.hi - square) - error) + self.lo;
        renormalised(root, rest / (2.0 * root))
    }
}

impl From<f64> for DoubleDouble {
    #[inline]
    fn from(hi: f64) -> Self {
        DoubleDouble { hi, lo: 0.0 }
    }
}

impl Neg for DoubleDouble {
    type Output = DoubleDouble;
    #[inline]
    fn neg(self) -> DoubleDouble {
        DoubleDouble {
            hi: -self.hi,
            lo: -self.lo,
        }
    }
}

impl Add for DoubleDouble {
    type Output = DoubleDouble;
    #[inline]
    fn add(self, other: DoubleDouble) -> DoubleDouble {
        let (sum, error) = two_sum(self.hi, other.hi);
        let (low, low_error) = two_sum(self.lo, other.lo);
        let first = renormalised(sum, error + low);
        renormalised(first.hi, first.lo + low_error)
    }
}

impl Sub for DoubleDouble {
    type Output = DoubleDouble;
    #[inline]
    fn sub(self, other: DoubleDouble) -> DoubleDouble {
        self + -other
    }
}

impl Mul for DoubleDouble {
    type Output = DoubleDouble;
    #[inline]
    fn mul(self, other: DoubleDouble) -> DoubleDouble {
        let (product, error) = two_product(self.hi, other.hi);
        renormalised(product, error + (self.hi * other.lo + self.lo * other.hi))
    }
}

impl Div for DoubleDouble {
    type Output = DoubleDouble;
    fn div(self, other: DoubleDouble) -> DoubleDouble {
        let first = self.hi / other.hi;
        let rest = self - other * DoubleDouble::from(first);
        let second = rest.hi / other.hi;
        let rest = rest - other * DoubleDouble::from(second);
        renormalised(first, second) + DoubleDouble::from(rest.hi / other.hi)
    }
}

impl Add<f64> for DoubleDouble {
    type Output = DoubleDouble;
    #[inline]
    fn add(self, other: f64) -> DoubleDouble {
        let (sum, error) = two_sum(self.hi, other);
        renormalised(sum, error + self.lo)
    }
}

impl Mul<f64> for DoubleDouble {
    type Output = DoubleDouble;
    #[inline]
    fn mul(self, other: f64) -> DoubleDouble {
        let (product, error) = two_product(self.hi, other);
        renormalised(product, error + self.lo * other)
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_sum_keeps_what_rounding_would_lose() {
        let sum = DoubleDouble::from(1.0) + 1e-30;
        assert_eq!((sum - DoubleDouble::from(1.0)).value(), 1e-30);
    }

    #[test]
    fn a_product_is_exact() {
        // (1 + 2⁻⁵²)² = 1 + 2⁻⁵¹ + 2⁻¹⁰⁴
        let x = 1.0 + f64::EPSILON;
        let (product, error) = two_product(x, x);
        assert_eq!(product, 1.0 + 2.0 * f64::EPSILON);
        assert_eq!(error, f64::EPSILON * f64::EPSILON);
    }

    #[test]
    fn a_quotient_and_a_root_multiply_back() {
        let third = DoubleDouble::from(1.0) / DoubleDouble::from(3.0);
        let back = third * 3.0 + -1.0;
        assert!(back.value().abs() < 1e-31, "{back:?}");
        let root = DoubleDouble::from(2.0).sqrt();
        let back = root * root + -2.0;
        assert!(back.value().abs() < 1e-31, "{back:?}");
    }
}
