//! Curves that may turn, solved branch by branch.
//!
//! Each value starts from the cubic through its two knots (value and slope of
//! the inverse) and takes a fixed number of Newton steps, so that its bits do not
//! depend on its neighbours. Where that has not settled, next to a turning point,
//! its bracket is closed by itself.

use super::knots::{Knot, Monotone};
use super::{Frame, ILL_CONDITIONED, Quantity, Solved};
use crate::expansion::{Epoch, Epochs};
use crate::numerics::bracketed_root;

/// From a start within some 1e-2 of its interval: 1e-4, 1e-8, rounding.
const STEPS: usize = 3;
/// A last step below this share of its interval leaves its square as error.
const SETTLED: f64 = 1e-7;
/// A quantity that comes this near to the value needs no better redshift.
const CLOSE: f64 = 1.5 * f64::EPSILON;
/// Redshifts tried on each side for a better one.
const NEIGHBOURS: u32 = 3;
/// Rows solved together.
const BLOCK: usize = 256;

/// What is solved for, in which model.
pub(super) struct Target<'a> {
    pub frame: &'a Frame<'a>,
    pub quantity: &'static Quantity,
    pub curve: &'static Solved,
    /// The curve's value for a value of the quantity, and its derivative.
    pub given: fn(f64, &Frame) -> f64,
    pub given_slope: fn(f64, f64) -> f64,
}

impl Target<'_> {
    /// By how much of itself rounding may have moved what is given for a value:
    /// four times that of the value and of the way from it.
    pub(super) fn slack(&self, value: f64, given: f64) -> f64 {
        let condition = (value * (self.given_slope)(value, given) / given).abs();
        4.0 * f64::EPSILON
            * if condition.is_finite() {
                condition.max(1.0)
            } else {
                1.0
            }
    }
}

impl Monotone {
    /// The redshifts of values of a quantity, NaN where its curve does not reach
    /// them; `suspect` gains the rows whose redshift the value may not fix to 1e-9.
    pub(super) fn solve(
        &self,
        target: &Target,
        values: &[f64],
        redshifts: &mut [f64],
        suspect: &mut Vec<usize>,
    ) {
        let mut epochs = Epochs::default();
        let mut state = [Step::default(); BLOCK];
        let blocks = values.chunks(BLOCK).zip(redshifts.chunks_mut(BLOCK));
        for (number, (values, redshifts)) in blocks.enumerate() {
            for ((step, value), redshift) in state.iter_mut().zip(values).zip(&mut *redshifts) {
                *step = self.start(*value, target);
                *redshift = step.redshift;
            }
            let wanted = target.frame.wanted(target.curve.wanted);
            for pass in 1..=STEPS {
                target.frame.history.epochs(redshifts, wanted, &mut epochs);
                for (row, (redshift, step)) in redshifts.iter_mut().zip(&mut state).enumerate() {
                    *redshift = step.improve(&epochs.row(*redshift, row), target, pass == STEPS);
                }
            }
            for (row, (redshift, step)) in redshifts.iter_mut().zip(&state).enumerate() {
                let well_fixed;
                (*redshift, well_fixed) = step.finish(*redshift, target);
                if !well_fixed {
                    suspect.push(number * BLOCK + row);
                }
            }
            polish(target, values, redshifts, &mut epochs);
        }
    }

    /// Where Newton starts for a value, and the bracket it must stay in.
    fn start(&self, value: f64, target: &Target) -> Step {
        let given = (target.given)(value, target.frame);
        let step = Step {
            value,
            given,
            ..Step::default()
        };
        let ((bottom, _), (top, _)) = (self.bottom(), self.top());
        if given > bottom.value && given < top.value && !self.is_constant() {
            return step.between(self.around(given));
        }
        let near = |end: Knot| (given - end.value).abs() <= target.slack(value, given) * end.value;
        let end = if given >= top.value { top } else { bottom };
        if self.is_constant() && near(end) {
            // Every redshift has this value: the nearest one is given, and the rest is said.
            return step.at(0.0_f64.clamp(self.low, self.high));
        }
        if near(end) {
            step.at(end.redshift)
        } else {
            step
        }
    }
}

/// Where rounding left the quantity further off than it need be, takes the best
/// of the neighbouring redshifts.
fn polish(target: &Target, values: &[f64], redshifts: &mut [f64], epochs: &mut Epochs) {
    let frame = target.frame;
    let evaluated: Vec<f64> = redshifts
        .iter()
        .map(|z| if z.is_nan() { 0.0 } else { *z })
        .collect();
    frame
        .history
        .epochs(&evaluated, frame.wanted(target.curve.wanted), epochs);
    for (row, (redshift, value)) in redshifts.iter_mut().zip(values).enumerate() {
        let at = |epoch: &Epoch| (target.quantity.forward.at)(epoch, frame);
        let miss = (at(&epochs.row(*redshift, row)) - value).abs();
        if miss <= CLOSE * value.abs() || redshift.is_nan() || *redshift == 0.0 {
            continue;
        }
        let mut best = (miss, *redshift);
        let (mut below, mut above) = (*redshift, *redshift);
        for _ in 0..NEIGHBOURS {
            (below, above) = (below.next_down(), above.next_up());
            for z in [below, above] {
                let miss = (at(&frame.history.epoch(z)) - value).abs();
                if miss < best.0 {
                    best = (miss, z);
                }
            }
        }
        *redshift = best.1;
    }
}

/// One value on its way.
#[derive(Clone, Copy, Debug, Default)]
struct Step {
    value: f64,
    given: f64,
    redshift: f64,
    low: f64,
    high: f64,
    /// Whether the curve takes the value.
    taken: bool,
    slope: f64,
    last: f64,
}

impl Step {
    /// A value that belongs to a known redshift.
    fn at(self, redshift: f64) -> Step {
        Step {
            redshift,
            low: redshift,
            high: redshift,
            taken: true,
            ..self
        }
    }

    /// A value between two knots, from the cubic of Hermite for z over the value.
    fn between(self, (one, other): (Knot, Knot)) -> Step {
        let rise = other.value - one.value;
        let run = other.redshift - one.redshift;
        let t = (self.given - one.value) / rise;
        let (m, n) = (rise / one.slope, rise / other.slope);
        let bend = t * (3.0 * run - 2.0 * m - n + t * (m + n - 2.0 * run));
        let cubic = one.redshift + t * (m + bend);
        let (low, high) = (
            one.redshift.min(other.redshift),
            one.redshift.max(other.redshift),
        );
        let inside = cubic > low && cubic < high;
        let redshift = if inside {
            cubic
        } else {
            one.redshift + t * run
        };
        Step {
            redshift,
            low,
            high,
            taken: true,
            ..self
        }
    }

    /// One step of Newton; the final one compares the quantity itself.
    #[inline]
    fn improve(&mut self, epoch: &Epoch, target: &Target, is_final: bool) -> f64 {
        self.slope = (target.curve.slope)(epoch, target.frame);
        let miss = if is_final {
            let quantity = (target.quantity.forward.at)(epoch, target.frame);
            (quantity - self.value) * (target.given_slope)(self.value, self.given)
        } else {
            (target.curve.value)(epoch, target.frame) - self.given
        };
        let next = (epoch.redshift - miss / self.slope)
            .max(self.low)
            .min(self.high);
        self.last = (next - epoch.redshift).abs();
        next
    }

    /// The final redshift, and whether the value fixes it well.
    fn finish(&self, redshift: f64, target: &Target) -> (f64, bool) {
        if !self.taken {
            return (f64::NAN, true);
        }
        let rounding = 2.0 * target.slack(self.value, self.given) * self.given;
        let fixed = |z: f64| rounding < ILL_CONDITIONED * (z * self.slope).abs();
        if self.low == self.high {
            return (self.low, fixed(self.low));
        }
        if self.last <= SETTLED * (self.high - self.low) {
            return (redshift, fixed(redshift));
        }
        (self.close(target), false)
    }

    /// Closes the bracket where Newton has not settled.
    fn close(&self, target: &Target) -> f64 {
        let miss = |z: f64| target.quantity.at(z, target.frame) - self.value;
        bracketed_root(self.low, self.high, miss).unwrap_or_else(|| {
            // Both ends round to the same side: the value is that of the nearer one.
            let nearer_low = miss(self.low).abs() <= miss(self.high).abs();
            if nearer_low { self.low } else { self.high }
        })
    }
}
