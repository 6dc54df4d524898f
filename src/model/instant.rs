//! A moment of cosmic history, as dark energy sees it.

use crate::numerics::{DoubleDouble, natural_logarithm, two_sum};

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

    /// The moment at a redshift above −1; its logarithm is that of the exact 1 + z
    /// within 10⁻¹⁸ (relative below |z| = 2⁻²⁰, so that it stays exact as z → 0).
    #[must_use]
    pub fn at_redshift(redshift: f64) -> Instant {
        let (stretch, rest) = two_sum(1.0, redshift);
        let ln_stretch = if redshift.abs() < SMALL {
            DoubleDouble::from(libm::log1p(redshift))
        } else {
            natural_logarithm(stretch) + rest / stretch
        };
        Instant {
            redshift,
            stretch,
            ln_stretch,
        }
    }
}

/// Below it one double carries ln(1 + z) to an absolute error under 10⁻²².
const SMALL: f64 = 1.0 / 1_048_576.0;

#[cfg(test)]
mod tests {
    use super::*;

    /// Logarithms of the exact 1 + z, to 32 digits, from mpmath 1.3.
    #[test]
    fn the_logarithm_is_that_of_the_exact_stretch() {
        for (redshift, hi, lo) in LOGARITHMS {
            let difference = Instant::at_redshift(redshift).ln_stretch - DoubleDouble { hi, lo };
            let bound = 3e-18_f64.min(redshift.abs() * 2.3e-16);
            assert!(
                difference.value().abs() <= bound,
                "{redshift}: {difference:?}"
            );
        }
    }

    const LOGARITHMS: [(f64, f64, f64); 9] = [
        (-0.99, -4.605170185988091, 4.341512446764495e-16),
        (-0.3, -0.35667494393873234, -2.6895094047056423e-17),
        (-1e-12, -1.0000000000005e-12, 2.4217939436345712e-29),
        (1e-12, 9.999999999995e-13, 2.4217940103012377e-29),
        (1e-07, 9.999999500000033e-08, -5.871247209360176e-24),
        (0.001, 0.0009995003330835331, 3.8971025988294614e-20),
        (0.1, 0.09531017980432487, -3.808451650416249e-19),
        (1089.92, 6.9947766559217674, -2.315490591053386e-16),
        (1000000000.0, 20.72326583794641, 6.276142870575942e-16),
    ];
}
