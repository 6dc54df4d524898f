//! What formulas need of a model: its scales and its geometry.

use std::f64::consts::PI;

use crate::expansion::{Epoch, History, Wanted};
use crate::numerics::two_product;

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

    /// The transverse comoving distance in c/H0; negative between the first and
    /// the second antipode of a closed model.
    ///
    /// What rounding took from the distance along the line of sight is put back
    /// to first order: far beyond the radius of curvature sin and sinh see it.
    #[inline]
    #[must_use]
    pub fn transverse(&self, epoch: &Epoch) -> f64 {
        if self.curvature == 0.0 {
            return epoch.comoving;
        }
        let (angle, rest) = self.angle(epoch);
        if self.curvature > 0.0 {
            (libm::sinh(angle) + rest * libm::cosh(angle)) / self.root
        } else {
            (libm::sin(angle) + rest * libm::cos(angle)) / self.root
        }
    }

    /// The distance along the line of sight in radii of curvature, and what
    /// rounding took from it.
    #[inline]
    fn angle(&self, epoch: &Epoch) -> (f64, f64) {
        let (angle, rest) = two_product(self.root, epoch.comoving);
        (angle, rest + self.root * epoch.comoving_rest)
    }

    /// Its derivative with respect to the distance along the line of sight.
    #[inline]
    #[must_use]
    pub fn transverse_slope(&self, epoch: &Epoch) -> f64 {
        if self.curvature == 0.0 {
            1.0
        } else if self.curvature > 0.0 {
            libm::cosh(self.root * epoch.comoving)
        } else {
            libm::cos(self.root * epoch.comoving)
        }
    }

    /// The columns of the history that formulas need here: in curved space the
    /// rest of the comoving distance too.
    #[must_use]
    pub fn wanted(&self, wanted: Wanted) -> Wanted {
        Wanted {
            comoving_rest: wanted.comoving_rest || (wanted.comoving && self.curvature != 0.0),
            ..wanted
        }
    }

    /// Whether light comes from beyond the antipode of a closed model, or nearly so.
    #[must_use]
    pub fn reaches_antipode(&self) -> bool {
        let farthest = || self.history.epoch(self.history.range().1).comoving;
        self.curvature < 0.0 && self.root * farthest() > 3.0
    }

    /// χ/|tan χ|, the condition of the transverse distance; χ/tanh χ when open.
    #[must_use]
    pub fn transverse_condition(&self, epoch: &Epoch) -> f64 {
        let transverse = self.transverse(epoch);
        if transverse == 0.0 {
            return if epoch.comoving == 0.0 {
                1.0
            } else {
                f64::INFINITY
            };
        }
        (epoch.comoving * self.transverse_slope(epoch) / transverse).abs()
    }

    /// The comoving volume out to an epoch, whole sky, in (c/H0)³.
    ///
    /// π (2χ − sin 2χ)/|Ω_K|^{3/2} loses its digits for small χ: below 2χ = 3 its
    /// series in χ² is summed instead. The rest of the distance adds 4π D_M² to
    /// first order.
    #[must_use]
    pub fn volume(&self, epoch: &Epoch) -> f64 {
        let along = epoch.comoving;
        let (angle, rest) = self.angle(epoch);
        let double = 2.0 * angle;
        if double.abs() < SERIES_END {
            let square = 4.0 * self.curvature * along * along;
            let body = 4.0 / 3.0 * PI * (along * along * along) * sine_deficit(square);
            let transverse = self.transverse(epoch);
            return body + 4.0 * PI * transverse * transverse * epoch.comoving_rest;
        }
        let sine = if self.curvature > 0.0 {
            libm::sinh(angle)
        } else {
            libm::sin(angle)
        };
        let body = if self.curvature > 0.0 {
            libm::sinh(double) - double
        } else {
            double - libm::sin(double)
        };
        PI * (body + 4.0 * sine * sine * rest) / (self.root * self.root * self.root)
    }
}

/// Where the closed form of the volume loses no more than a bit.
const SERIES_END: f64 = 3.0;

/// 6 (sinh y − y)/y³ as a function of y², |y²| ≤ 9; with sin for y² < 0.
fn sine_deficit(square: f64) -> f64 {
    SINE_DEFICIT
        .iter()
        .rev()
        .fold(0.0, |sum, term| sum * square + term)
}

/// 6/(2k + 3)! for k = 0 … 14: the next term is below 1e-20 at y² = 9.
const SINE_DEFICIT: [f64; 15] = {
    let mut terms = [1.0; 15];
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
        let y = 3.0_f64;
        let open = 6.0 * (libm::sinh(y) - y) / (y * y * y);
        let closed = 6.0 * (y - libm::sin(y)) / (y * y * y);
        assert!((sine_deficit(9.0) / open - 1.0).abs() < 1e-15);
        assert!((sine_deficit(-9.0) / closed - 1.0).abs() < 1e-15);
        assert_eq!(sine_deficit(0.0), 1.0);
    }
}
