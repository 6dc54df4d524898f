//! Why a value has no redshift.

use super::{Inverse, Inverter, Solved};
use crate::expansion::{Beginning, Curve};

/// Why a quantity does not take a value on a branch.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Miss {
    /// The value belongs to z < 0, which was not asked for.
    Blueshift,
    /// No redshift above −1 can have it.
    OutsideDomain,
    /// It exceeds what the quantity reaches: this, in its unit; NaN if it is not told.
    BeyondMaximum(f64),
    /// The quantity stays above it in the whole past and future: the smallest
    /// value, and whether it is taken.
    BelowMinimum(f64, bool),
    /// It lies before the beginning.
    BeforeBeginning,
    /// The model has no beginning to count from.
    NoBeginning,
    /// The quantity is infinite at every redshift.
    Divergent,
    /// The quantity takes it outside the redshifts that the history is told for.
    BeyondRange,
}

impl Inverter<'_> {
    /// Why [`Inverter::solve`] found no redshift for a value on a branch.
    #[must_use]
    pub fn miss(&self, value: f64, branch: usize) -> Miss {
        match self.inverse {
            Inverse::Direct { domain, .. } => {
                let (low, high) = domain(&self.frame);
                if value <= low {
                    Miss::OutsideDomain
                } else {
                    Miss::BeyondMaximum(high)
                }
            }
            Inverse::Table { curve, scale } => {
                self.miss_of_table(*curve, value, scale(&self.frame))
            }
            Inverse::Solved { given, .. } => self.miss_of_branch(given(value, &self.frame), branch),
        }
    }

    fn miss_of_table(&self, curve: Curve, value: f64, scale: f64) -> Miss {
        let history = self.frame.history;
        let (age, conformal) = (history.age_today(), history.conformal_time_today());
        match curve {
            Curve::Age | Curve::Conformal => {
                let today = if curve == Curve::Age { age } else { conformal };
                match today {
                    None if history.beginning() != Beginning::BigBang => Miss::NoBeginning,
                    None => Miss::Divergent,
                    Some(_) if value <= 0.0 => Miss::BeforeBeginning,
                    Some(today) if value > today * scale => self.beyond_today(),
                    Some(_) => self.beyond_early_end(),
                }
            }
            Curve::Lookback if value < 0.0 => self.beyond_today(),
            Curve::Lookback if age.is_some_and(|age| value >= age * scale) => Miss::BeforeBeginning,
            Curve::Comoving if value < 0.0 => Miss::OutsideDomain,
            Curve::Comoving => match conformal.map(|horizon| horizon * scale) {
                Some(horizon) if value >= horizon => Miss::BeyondMaximum(horizon),
                _ => self.beyond_early_end(),
            },
            Curve::Lookback => self.beyond_early_end(),
        }
    }

    fn beyond_today(&self) -> Miss {
        if !self.quantity.future {
            Miss::OutsideDomain
        } else if self.future {
            match self.frame.history.turnaround() {
                Some(_) => {
                    Miss::BeyondMaximum(self.quantity.at(self.frame.history.range().0, &self.frame))
                }
                None => Miss::BeyondRange,
            }
        } else {
            Miss::Blueshift
        }
    }

    /// Beyond the highest redshift: a bounce is the end, the end of the tables is not.
    fn beyond_early_end(&self) -> Miss {
        let end = self.frame.history.range().1;
        match self.frame.history.beginning() {
            Beginning::Bounce { .. } => Miss::BeyondMaximum(self.quantity.at(end, &self.frame)),
            _ => Miss::BeyondRange,
        }
    }

    fn miss_of_branch(&self, given: f64, branch: usize) -> Miss {
        let (Some(part), Inverse::Solved { curve, .. }) = (self.parts.get(branch), self.inverse)
        else {
            return Miss::OutsideDomain;
        };
        let (top, top_turns) = part.top();
        let (bottom, bottom_turns) = part.bottom();
        if given > top.value {
            if curve.future {
                let (highest, taken) = self.extreme(curve, true);
                if given > highest || given >= highest && !taken {
                    return Miss::BeyondMaximum(highest);
                }
                if !top_turns && top.redshift == 0.0 {
                    return Miss::Blueshift;
                }
            }
            let horizon = (curve.horizon)(&self.frame);
            return if top_turns {
                Miss::BeyondMaximum(self.quantity.at(top.redshift, &self.frame))
            } else if given >= horizon && horizon.is_finite() {
                Miss::BeyondMaximum(f64::NAN)
            } else {
                self.beyond_early_end()
            };
        }
        if curve.future {
            let (lowest, taken) = self.extreme(curve, false);
            if given < lowest || given <= lowest && !taken {
                return Miss::BelowMinimum(lowest, taken);
            }
        }
        if bottom_turns || given.is_nan() || given < 0.0 {
            Miss::OutsideDomain
        } else if bottom.redshift == 0.0 {
            if curve.future {
                Miss::Blueshift
            } else {
                Miss::OutsideDomain
            }
        } else {
            Miss::BeyondRange
        }
    }

    /// The highest or the lowest value of a curve of past and future, and whether
    /// it is taken: where it turns, at an end of the history, or as a limit beyond.
    fn extreme(&self, curve: &Solved, highest: bool) -> (f64, bool) {
        let frame = &self.frame;
        let (low, high) = frame.history.range();
        let at = |z: f64| (curve.value)(&frame.history.epoch(z), frame);
        // Rounding makes no extremum of a constant.
        let beyond = |one: f64, other: f64| {
            let difference = if highest { one - other } else { other - one };
            difference > 8.0 * f64::EPSILON * other
        };
        let turning = (curve.turning)(frame.history.turning()).iter().copied();
        let values = turning.chain([low, high]).map(at);
        let taken = values.fold(at(0.0), |extreme, value| {
            if beyond(value, extreme) {
                value
            } else {
                extreme
            }
        });
        let limits = [(curve.late_limit)(frame), (curve.horizon)(frame)].into_iter();
        let limit = limits.fold(taken, |extreme, value| {
            if beyond(value, extreme) {
                value
            } else {
                extreme
            }
        });
        (limit, limit == taken)
    }
}
