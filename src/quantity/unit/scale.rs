//! From numbers in one unit to numbers in another.

use crate::numerics::DoubleDouble;

/// value × multiplier / divisor + shift.
///
/// A factor that is a whole number or the inverse of one is exact.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Scale {
    multiplier: f64,
    divisor: f64,
    shift: f64,
}

impl Scale {
    /// The scale that changes nothing.
    pub const IDENTITY: Scale = Scale {
        multiplier: 1.0,
        divisor: 1.0,
        shift: 0.0,
    };

    /// Multiplies by a quotient of two sizes.
    pub(super) fn ratio(numerator: DoubleDouble, denominator: DoubleDouble) -> Scale {
        let ratio = (numerator / denominator).value();
        let inverse = (denominator / numerator).value();
        // The inverse of a whole number divides: a division rounds once.
        if ratio < 1.0 && inverse == inverse.floor() {
            Scale::division(inverse)
        } else {
            Scale::factor(ratio)
        }
    }

    /// Multiplies.
    #[must_use]
    pub fn factor(multiplier: f64) -> Scale {
        Scale {
            multiplier,
            ..Scale::IDENTITY
        }
    }

    /// Divides.
    #[must_use]
    pub fn division(divisor: f64) -> Scale {
        Scale {
            divisor,
            ..Scale::IDENTITY
        }
    }

    /// Adds.
    #[must_use]
    pub fn shift(shift: f64) -> Scale {
        Scale {
            shift,
            ..Scale::IDENTITY
        }
    }

    /// This scale, then another.
    #[must_use]
    pub fn then(self, next: Scale) -> Scale {
        Scale {
            multiplier: self.multiplier * next.multiplier,
            divisor: self.divisor * next.divisor,
            shift: next.apply(self.shift),
        }
    }

    /// The number in the new unit.
    #[inline]
    #[must_use]
    pub fn apply(&self, value: f64) -> f64 {
        value * self.multiplier / self.divisor + self.shift
    }

    /// All numbers of a column.
    pub fn apply_all(&self, values: &mut [f64]) {
        if *self == Scale::IDENTITY {
            return;
        }
        for value in values {
            *value = self.apply(*value);
        }
    }

    /// What becomes of a difference of two values.
    #[must_use]
    pub fn apply_difference(&self, difference: f64) -> f64 {
        difference * self.multiplier / self.divisor
    }
}
