//! Curves that may turn, solved branch by branch.
//!
//! Each value starts from the cubic through its two knots (value and slope of
//! the inverse) and takes a fixed number of Newton steps, so that its bits do not
//! depend on its neighbours. Where that has not settled, next to a turning point,
//! its bracket is closed by itself.

use super::inverse::ILL_CONDITIONED;
use super::knots::{Knot, Monotone};
use super::{Frame, Solved};
use crate::expansion::Epochs;
use crate::numerics::bracketed_root;

/// From a start within some 1e-2 of its interval: 1e-4, 1e-8, rounding.
const STEPS: usize = 3;
/// A last step below this share of its interval leaves its square as error.
const SETTLED: f64 = 1e-7;
/// Rows solved together.
const BLOCK: usize = 256;

impl Monotone {
    /// The redshifts of values of the curve, NaN where it does not reach them;
    /// `slack` tells by how much of itself rounding may have moved a value.
    ///
    /// `suspect` gains the rows whose redshift the value may not fix to 1e-9.
    pub(super) fn solve(
        &self,
        frame: &Frame,
        curve: &Solved,
        (values, slack): (&[f64], impl Fn(usize) -> f64),
        redshifts: &mut [f64],
        suspect: &mut Vec<usize>,
    ) {
        let mut epochs = Epochs::default();
        let mut state = [Step::default(); BLOCK];
        let blocks = values.chunks(BLOCK).zip(redshifts.chunks_mut(BLOCK));
        for (number, (values, redshifts)) in blocks.enumerate() {
            let first_row = number * BLOCK;
            for (row, (value, redshift)) in values.iter().zip(&mut *redshifts).enumerate() {
                state[row] = self.start(*value, || slack(first_row + row));
                *redshift = state[row].redshift;
            }
            for _ in 0..STEPS {
                frame.history.epochs(redshifts, curve.wanted, &mut epochs);
                for (row, redshift) in redshifts.iter_mut().enumerate() {
                    let epoch = epochs.row(*redshift, row);
                    let step = &mut state[row];
                    step.slope = (curve.slope)(&epoch, frame);
                    let next =
                        *redshift - ((curve.value)(&epoch, frame) - values[row]) / step.slope;
                    let next = next.max(step.low).min(step.high);
                    step.last = (next - *redshift).abs();
                    *redshift = next;
                }
            }
            for (row, redshift) in redshifts.iter_mut().enumerate() {
                let (redshift_of_row, well_fixed) =
                    state[row].finish(*redshift, values[row], frame, curve);
                *redshift = redshift_of_row;
                if !well_fixed {
                    suspect.push(first_row + row);
                }
            }
        }
    }

    /// Where Newton starts for a value, and the bracket it must stay in.
    fn start(&self, value: f64, slack: impl Fn() -> f64) -> Step {
        let ((bottom, _), (top, _)) = (self.bottom(), self.top());
        if value > bottom.value && value < top.value && !self.is_constant() {
            return Step::between(self.around(value), value);
        }
        let near = |end: Knot| (value - end.value).abs() <= slack() * end.value;
        let end = if value >= top.value { top } else { bottom };
        if self.is_constant() && near(end) {
            // Every redshift has this value: the nearest one is given, and the rest is said.
            return Step::at(0.0_f64.clamp(self.low, self.high));
        }
        if near(end) {
            Step::at(end.redshift)
        } else {
            Step::default()
        }
    }
}

/// One value on its way.
#[derive(Clone, Copy, Debug, Default)]
struct Step {
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
    fn at(redshift: f64) -> Step {
        Step {
            redshift,
            low: redshift,
            high: redshift,
            taken: true,
            ..Step::default()
        }
    }

    /// A value between two knots, from the cubic of Hermite for z over the value.
    fn between((one, other): (Knot, Knot), value: f64) -> Step {
        let rise = other.value - one.value;
        let run = other.redshift - one.redshift;
        let t = (value - one.value) / rise;
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
            ..Step::default()
        }
    }

    /// The final redshift, and whether the value fixes it well.
    fn finish(&self, redshift: f64, value: f64, frame: &Frame, curve: &Solved) -> (f64, bool) {
        if !self.taken {
            return (f64::NAN, true);
        }
        let fixed = |z: f64| 8.0 * f64::EPSILON * value < ILL_CONDITIONED * (z * self.slope).abs();
        if self.low == self.high {
            return (self.low, fixed(self.low));
        }
        if self.last <= SETTLED * (self.high - self.low) {
            return (redshift, fixed(redshift));
        }
        (self.close(value, frame, curve), false)
    }

    /// Closes the bracket where Newton has not settled.
    fn close(&self, value: f64, frame: &Frame, curve: &Solved) -> f64 {
        let miss = |z: f64| (curve.value)(&frame.history.epoch(z), frame) - value;
        bracketed_root(self.low, self.high, miss).unwrap_or_else(|| {
            // Both ends round to the same side: the value is that of the nearer one.
            if miss(self.low).abs() <= miss(self.high).abs() {
                self.low
            } else {
                self.high
            }
        })
    }
}
