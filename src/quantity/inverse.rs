//! From a quantity back to redshift, on every branch.

use super::knots::{Monotone, monotone_parts};
use super::solved::Target;
use super::{Frame, Inverse, Miss, Quantity};
use crate::expansion::Curve;

/// The inverse of one quantity in one model, prepared for any number of values.
#[derive(Clone, Debug)]
pub struct Inverter<'a> {
    pub(super) frame: Frame<'a>,
    pub(super) quantity: &'static Quantity,
    pub(super) inverse: &'static Inverse,
    pub(super) future: bool,
    pub(super) parts: Vec<Monotone>,
    /// Redshifts between which a value fixes its redshift well; curves that may
    /// turn see to that by themselves.
    settled: (f64, f64),
}

/// So many values are worth a look at the whole history beforehand.
const FEW: usize = 64;

/// Redshifts found for a block of values.
#[derive(Clone, Debug, Default)]
pub struct Solution {
    /// NaN where the quantity does not take the value on the branch.
    pub redshifts: Vec<f64>,
    /// Rows whose redshift the rounding of the value may move by 1e-9 of itself.
    pub suspect: Vec<usize>,
    scaled: Vec<f64>,
}

impl Solution {
    /// Takes redshifts as they are; none is suspect.
    pub fn take(&mut self, redshifts: &[f64]) {
        self.suspect.clear();
        self.redshifts.clear();
        self.redshifts.extend_from_slice(redshifts);
    }
}

impl<'a> Inverter<'a> {
    /// Prepares the inverse for many values; `None` for quantities that have none.
    ///
    /// `future` admits z < 0 where the quantity does.
    #[must_use]
    pub fn prepare(
        frame: &Frame<'a>,
        quantity: &'static Quantity,
        future: bool,
    ) -> Option<Inverter<'a>> {
        Inverter::prepare_for(frame, quantity, future, usize::MAX)
    }

    /// Likewise for a number of values: few are each looked at by themselves, with
    /// the same outcome.
    #[must_use]
    pub fn prepare_for(
        frame: &Frame<'a>,
        quantity: &'static Quantity,
        future: bool,
        values: usize,
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
        let settled = (f64::INFINITY, f64::NEG_INFINITY);
        let unsettled = Inverter {
            frame: *frame,
            quantity,
            inverse,
            future,
            parts,
            settled,
        };
        Some(if values < FEW {
            unsettled
        } else {
            Inverter {
                settled: unsettled.find_settled(),
                ..unsettled
            }
        })
    }

    /// Whether what is given is the redshift itself.
    #[must_use]
    pub fn is_redshift(&self) -> bool {
        self.quantity.name == "redshift"
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
        let Solution {
            redshifts,
            suspect,
            scaled,
        } = out;
        suspect.clear();
        redshifts.clear();
        redshifts.resize(values.len(), f64::NAN);
        scaled.clear();
        match self.inverse {
            Inverse::Direct {
                redshift, domain, ..
            } => {
                let (low, high) = domain(&self.frame);
                for (found, value) in redshifts.iter_mut().zip(values) {
                    if *value > low && *value < high {
                        *found = redshift(*value, &self.frame);
                    }
                }
            }
            Inverse::Table { curve, scale } => {
                let scale = scale(&self.frame);
                scaled.extend(values.iter().map(|value| value / scale));
                self.frame.history.invert(*curve, scaled, redshifts);
                self.leave_out_beginning(*curve, scaled, redshifts);
            }
            Inverse::Solved { .. } => {
                if let (Some(part), Some(target)) = (self.parts.get(branch), self.target()) {
                    part.solve(&target, values, redshifts, suspect);
                }
                return;
            }
        }
        self.settle_ends(values, redshifts);
        let (low, high) = self.settled;
        for (row, (value, z)) in values.iter().zip(&*redshifts).enumerate() {
            if (*z < low || *z > high) && self.is_doubtful(*value, *z) {
                suspect.push(row);
            }
        }
    }

    /// What is solved for, of a curve that may turn.
    pub(super) fn target(&self) -> Option<Target<'_>> {
        let Inverse::Solved {
            given,
            given_slope,
            curve,
        } = self.inverse
        else {
            return None;
        };
        let (frame, quantity) = (&self.frame, self.quantity);
        Some(Target {
            frame,
            quantity,
            curve,
            given: *given,
            given_slope: *given_slope,
        })
    }

    /// Values that are today's, or those of an end of the history, but for their
    /// rounding belong to it; redshifts themselves are exact. A negative distance
    /// belongs nowhere.
    fn settle_ends(&self, values: &[f64], redshifts: &mut [f64]) {
        if self.is_redshift() {
            return;
        }
        let (lowest, highest) = self.frame.history.range();
        for (redshift, value) in redshifts.iter_mut().zip(values) {
            if *redshift >= 0.0 && *redshift <= highest {
                continue;
            }
            if !self.quantity.future && *value < 0.0 {
                *redshift = f64::NAN;
            }
            for end in [lowest, 0.0, highest] {
                let outside = if end == highest {
                    *redshift > end
                } else {
                    *redshift < end
                };
                let rounding = self.uncertainty(*value, end) + f64::EPSILON * end.abs();
                if outside && (*redshift - end).abs() <= 2.0 * rounding {
                    *redshift = end;
                }
            }
            if redshift.is_nan() && self.is_last(*value, highest) {
                *redshift = highest;
            }
        }
    }

    /// No redshift has a lookback time of the whole age, though the highest ones
    /// round to it.
    fn leave_out_beginning(&self, curve: Curve, scaled: &[f64], redshifts: &mut [f64]) {
        let Some(age) = self
            .frame
            .history
            .age_today()
            .filter(|_| curve == Curve::Lookback)
        else {
            return;
        };
        for (redshift, lookback) in redshifts.iter_mut().zip(scaled) {
            if *lookback >= age {
                *redshift = f64::NAN;
            }
        }
    }

    /// Whether a value that the tables do not find is that of the highest
    /// redshift but for rounding.
    fn is_last(&self, value: f64, highest: f64) -> bool {
        let last = self.quantity.at(highest, &self.frame);
        (value - last).abs() <= 2.0 * f64::EPSILON * last.abs()
            && self.miss(value, 0) == Miss::BeyondRange
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
