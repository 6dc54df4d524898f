//! What formulas need of a model: its scales and its geometry.

use std::f64::consts::PI;

use crate::expansion::History;

/// A history with its scales in the units of the catalogue, and its geometry.
#[derive(Clone, Copy, Debug)]
pub struct Frame<'a> {
    /// The history.
    pub history: &'a History,
    /// H0 in km/s/Mpc.
    pub hubble_constant: f64,
    /// c/H0 in Mpc.
    pub hubble_distance_mpc: f64,
    /// 1/H0 in Gyr.
    pub hubble_time_gyr: f64,
    /// The temperature of the background radiation today in K; NaN without it.
    pub cmb_temperature: f64,
    /// Ω_K: positive = open.
    pub curvature: f64,
    /// √|Ω_K|
    root: f64,
}

impl<'a> Frame<'a> {
    /// The frame of a history.
    #[must_use]
    pub fn of(history: &'a History) -> Frame<'a> {
        let spec = history.spec();
        let curvature = history.densities().curvature();
        Frame {
            history,
            hubble_constant: spec.hubble_constant,
            hubble_distance_mpc: history.hubble_distance_mpc(),
            hubble_time_gyr: history.hubble_time_gyr(),
            cmb_temperature: spec
                .radiation
                .as_ref()
                .map_or(f64::NAN, |radiation| radiation.cmb_temperature),
            curvature,
            root: curvature.abs().sqrt(),
        }
    }

    /// The transverse comoving distance for a line-of-sight one, both in c/H0;
    /// negative between the first and the second antipode of a closed model.
    #[inline]
    #[must_use]
    pub fn transverse(&self, comoving: f64) -> f64 {
        if self.curvature == 0.0 {
            comoving
        } else if self.curvature > 0.0 {
            libm::sinh(self.root * comoving) / self.root
        } else {
            libm::sin(self.root * comoving) / self.root
        }
    }

    /// Its derivative with respect to the line-of-sight distance.
    #[inline]
    #[must_use]
    pub fn transverse_slope(&self, comoving: f64) -> f64 {
        if self.curvature == 0.0 {
            1.0
        } else if self.curvature > 0.0 {
            libm::cosh(self.root * comoving)
        } else {
            libm::cos(self.root * comoving)
        }
    }

    /// Whether light comes from beyond the antipode of a closed model, or nearly so.
    #[must_use]
    pub fn reaches_antipode(&self) -> bool {
        let farthest = self.history.epoch(self.history.range().1).comoving;
        self.curvature < 0.0 && self.root * farthest > 3.0
    }

    /// χ/|tan χ|, the condition of the transverse distance; χ/tanh χ when open.
    #[must_use]
    pub fn transverse_condition(&self, comoving: f64) -> f64 {
        let transverse = self.transverse(comoving);
        if transverse == 0.0 {
            return if comoving == 0.0 { 1.0 } else { f64::INFINITY };
        }
        (comoving * self.transverse_slope(comoving) / transverse).abs()
    }

    /// The comoving volume within a distance, whole sky, in (c/H0)³.
    ///
    /// π (2χ − sin 2χ)/|Ω_K|^{3/2} loses its digits for small χ: below 2χ = 2 its
    /// series in χ² is summed instead.
    #[must_use]
    pub fn volume(&self, comoving: f64) -> f64 {
        let cube = comoving * comoving * comoving;
        let double = 2.0 * self.root * comoving;
        if double.abs() < 2.0 {
            let square = 4.0 * self.curvature * comoving * comoving;
            return 4.0 / 3.0 * PI * cube * sine_deficit(square);
        }
        let rest = if self.curvature > 0.0 {
            libm::sinh(double) - double
        } else {
            double - libm::sin(double)
        };
        PI * rest / (self.root * self.root * self.root)
    }
}

/// 6 (sinh y − y)/y³ as a function of y², |y²| ≤ 4; with sin for y² < 0.
fn sine_deficit(square: f64) -> f64 {
    SINE_DEFICIT
        .iter()
        .rev()
        .fold(0.0, |sum, term| sum * square + term)
}

/// 6/(2k + 3)! for k = 0 … 11: the next term is below 1e-18 at y² = 4.
const SINE_DEFICIT: [f64; 12] = {
    let mut terms = [1.0; 12];
    let mut k = 1;
    while k < terms.len() {
        terms[k] = terms[k - 1] / ((2 * k + 2) * (2 * k + 3)) as f64;
        k += 1;
    }
    terms
};

#[cfg(test)]
mod tests {
    use super::sine_deficit;

    #[test]
    fn the_series_joins_the_closed_form() {
        let y = 2.0_f64;
        let open = 6.0 * (libm::sinh(y) - y) / (y * y * y);
        let closed = 6.0 * (y - libm::sin(y)) / (y * y * y);
        assert!((sine_deficit(4.0) / open - 1.0).abs() < 1e-15);
        assert!((sine_deficit(-4.0) / closed - 1.0).abs() < 1e-15);
        assert_eq!(sine_deficit(0.0), 1.0);
    }
}
