//! A moment of cosmic history, as dark energy sees it.

use crate::numerics::{DoubleDouble, natural_logarithm};

/// A moment by its stretch v = 1 + z = 1/a.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Instant {
    /// v.
    pub stretch: f64,
    /// v − 1.
    pub redshift: f64,
    /// ln v, to more than a double.
    pub ln_stretch: DoubleDouble,
}

impl Instant {
    /// The moment of a positive stretch.
    #[must_use]
    pub fn at_stretch(stretch: f64) -> Self {
        Instant {
            stretch,
            redshift: stretch - 1.0,
            ln_stretch: natural_logarithm(stretch),
        }
    }
}
