//! From a quantity back to redshift, on every branch.

use super::solved::{Monotone, monotone_parts};
use super::{Frame, Inverse, Quantity, Solved};

/// The inverse of one quantity in one model, prepared for any number of values.
#[derive(Clone, Debug)]
pub struct Inverter<'a> {
    pub(super) frame: Frame<'a>,
    pub(super) quantity: &'static Quantity,
    pub(super) inverse: &'static Inverse,
    pub(super) future: bool,
    pub(super) parts: Vec<Monotone>,
    /// Redshifts between which the value fixes the redshift well; empty for
    /// curves that may turn, which see for themselves.
    settled: (f64, f64),
}

/// Redshifts found for a block of values.
#[derive(Clone, Debug, Default)]
pub struct Solution {
    /// NaN where the quantity does not take the value on the branch.
    pub redshifts: Vec<f64>,
    /// Rows whose redshift the rounding of the value may move by 1e-9 of itself.
    pub suspect: Vec<usize>,
}

/// The relative uncertainty from rounding alone above which a value is said to
/// be ill conditioned.
pub(super) const ILL_CONDITIONED: f64 = 1e-9;

impl<'a> Inverter<'a> {
    /// Prepares the inverse; `None` for quantities that have none.
    ///
    /// `future` admits z < 0 where the quantity does.
    #[must_use]
    pub fn prepare(
        frame: &Frame<'a>,
        quantity: &'static Quantity,
        future: bool,
    ) -> Option<Inverter<'a>> {
        let inverse = quantity.inverse.as_ref()?;
        let parts = match inverse {
            Inverse::Solved { curve, .. } => {
                let from = if future && curve.future {
                    frame.history.range().0
                } else {
                    0.0
                };
                nearest_first(monotone_parts(frame, curve, from))
            }
            _ => Vec::new(),
        };
        let mut inverter = Inverter {
            frame: *frame,
            quantity,
            inverse,
            future,
            parts,
            settled: (f64::INFINITY, f64::NEG_INFINITY),
        };
        inverter.settled = inverter.find_settled();
        Some(inverter)
    }

    /// The quantity that is given.
    #[must_use]
    pub fn quantity(&self) -> &'static Quantity {
        self.quantity
    }

    /// The redshifts between which each branch runs; branch 1 begins today,
    /// further ones follow outwards, those of the future come last.
    #[must_use]
    pub fn branches(&self) -> Vec<(f64, f64)> {
        if self.parts.is_empty() {
            let (low, high) = self.frame.history.range();
            let low = if self.future && self.quantity.future {
                low
            } else {
                0.0
            };
            return vec![(low, high)];
        }
        self.parts
            .iter()
            .map(|part| (part.low, part.high))
            .collect()
    }

    /// The redshifts of a block of values on one branch (0 = the first).
    ///
    /// # Accuracy
    /// The quantity at the result is within 4 ulp of the value plus what one ulp
    /// of the redshift makes.
    pub fn solve(&self, values: &[f64], branch: usize, out: &mut Solution) {
        out.suspect.clear();
        out.redshifts.clear();
        out.redshifts.resize(values.len(), f64::NAN);
        match self.inverse {
            Inverse::Direct { redshift, domain } => {
                let (low, high) = domain(&self.frame);
                for (found, value) in out.redshifts.iter_mut().zip(values) {
                    if *value > low && *value < high {
                        *found = redshift(*value, &self.frame);
                    }
                }
            }
            Inverse::Table { curve, scale } => {
                let scale = scale(&self.frame);
                let scaled: Vec<f64> = values.iter().map(|value| value / scale).collect();
                self.frame
                    .history
                    .invert(*curve, &scaled, &mut out.redshifts);
                self.settle_today(values, &mut out.redshifts);
            }
            Inverse::Solved { given, curve } => {
                let given: Vec<f64> = values
                    .iter()
                    .map(|value| given(*value, &self.frame))
                    .collect();
                if let Some(part) = self.parts.get(branch) {
                    part.solve(
                        &self.frame,
                        curve,
                        &given,
                        &mut out.redshifts,
                        &mut out.suspect,
                    );
                }
                return;
            }
        }
        let (low, high) = self.settled;
        let suspect = |(row, z): (usize, &f64)| (*z < low || *z > high).then_some(row);
        out.suspect
            .extend(out.redshifts.iter().enumerate().filter_map(suspect));
    }

    /// By how much the rounding of a value moves its redshift.
    #[must_use]
    pub fn uncertainty(&self, value: f64, redshift: f64) -> f64 {
        let nearby = value * (1.0 + 1e-6);
        match self.inverse {
            Inverse::Direct { redshift, .. } => {
                let change = redshift(nearby, &self.frame) - redshift(value, &self.frame);
                change.abs() * (f64::EPSILON / 1e-6)
            }
            Inverse::Table { scale, curve } => {
                let epoch = self.frame.history.epoch(redshift);
                let time = matches!(
                    curve,
                    crate::expansion::Curve::Age | crate::expansion::Curve::Lookback
                );
                let stretch = if time { 1.0 + redshift } else { 1.0 };
                f64::EPSILON * (value / scale(&self.frame)).abs() * stretch * epoch.rate
            }
            Inverse::Solved { given, curve } => {
                let change = given(nearby, &self.frame) - given(value, &self.frame);
                let spread = change.abs() * (f64::EPSILON / 1e-6);
                self.near_turning(curve, spread, redshift)
            }
        }
    }

    /// The solution of spread = |y′| dz + ½ |y″| dz²: next to a turning point the
    /// slope alone would promise nothing.
    fn near_turning(&self, curve: &Solved, spread: f64, redshift: f64) -> f64 {
        let (lowest, highest) = self.frame.history.range();
        let slope = |z: f64| {
            (curve.slope)(
                &self.frame.history.epoch(z.clamp(lowest, highest)),
                &self.frame,
            )
        };
        let step = 1e-5 * (1.0 + redshift);
        let bend = ((slope(redshift + step) - slope(redshift - step)) / (2.0 * step)).abs();
        let slope = slope(redshift).abs();
        2.0 * spread / (slope + (slope * slope + 2.0 * bend * spread).sqrt())
    }

    /// A value that is today's to the last digit is not one of the future.
    fn settle_today(&self, values: &[f64], redshifts: &mut [f64]) {
        let today = self.quantity.at(0.0, &self.frame);
        for (redshift, value) in redshifts.iter_mut().zip(values) {
            if *redshift < 0.0 && (value - today).abs() <= 2.0 * f64::EPSILON * today {
                *redshift = 0.0;
            }
            if !self.quantity.future && *value < 0.0 {
                *redshift = f64::NAN;
            }
        }
    }

    /// The widest range of redshifts, about z = 1, where rounding cannot move a
    /// redshift by a share of 1e-9; a margin of 8 stands for what lies between edges.
    fn find_settled(&self) -> (f64, f64) {
        let calm = |z: f64| {
            let value = self.quantity.at(z, &self.frame);
            8.0 * self.uncertainty(value, z) < ILL_CONDITIONED * z.abs()
        };
        if matches!(self.inverse, Inverse::Solved { .. }) {
            return (0.0, f64::INFINITY);
        }
        let edges = self.frame.history.edges();
        let above = edges.partition_point(|edge| *edge < 1.0);
        let high = edges[above..].iter().take_while(|edge| calm(**edge)).last();
        let at_zero = self.quantity.at(0.0, &self.frame);
        let low = if at_zero == 0.0 {
            0.0
        } else {
            16.0 * self.uncertainty(at_zero, 0.0) / ILL_CONDITIONED
        };
        (low, high.copied().unwrap_or(f64::NEG_INFINITY))
    }
}

/// Orders monotone parts: today's first, then outwards, then those of the future.
fn nearest_first(mut ascending: Vec<Monotone>) -> Vec<Monotone> {
    let today = ascending
        .iter()
        .position(|part| part.high > 0.0)
        .unwrap_or(0);
    let mut future: Vec<Monotone> = ascending.drain(..today).collect();
    future.reverse();
    ascending.append(&mut future);
    ascending
}
