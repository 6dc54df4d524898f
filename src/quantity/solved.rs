//! Curves that may turn, solved branch by branch: knots once, then Newton.
//!
//! Each value starts from the cubic through its two knots (value and slope of
//! the inverse) and takes a fixed number of Newton steps, so that its bits do not
//! depend on its neighbours. Where that has not settled, next to a turning point,
//! its bracket is closed by itself.

use super::{Frame, Solved};
use crate::expansion::Epochs;
use crate::numerics::bracketed_root;

/// Knots laid into each panel of the history.
const PARTS: u32 = 4;
/// Knots halve their distance towards a turning point this often.
const HALVINGS: i32 = 14;
/// From a start within some 1e-2 of its interval: 1e-4, 1e-8, rounding.
const STEPS: usize = 3;
/// A last step below this share of its interval leaves its square as error.
const SETTLED: f64 = 1e-7;
/// A value that exceeds a turning point by this belongs to it: both are rounded.
const AT_TURNING: f64 = 4.0 * f64::EPSILON;
/// Rows solved together.
const BLOCK: usize = 256;

/// A stretch of redshift on which a curve is monotone.
#[derive(Clone, Debug)]
pub(super) struct Monotone {
    /// Its ends in redshift.
    pub low: f64,
    pub high: f64,
    /// Knots in the order of rising value.
    redshifts: Vec<f64>,
    values: Vec<f64>,
    slopes: Vec<f64>,
    /// Whether the curve turns at the lowest and at the highest value.
    turns: (bool, bool),
}

/// The monotone parts of a curve, ascending in redshift.
pub(super) fn monotone_parts(frame: &Frame, curve: &Solved, from: f64) -> Vec<Monotone> {
    let to = frame.history.range().1;
    let inside = |z: &f64| *z > from && *z < to;
    let turning: Vec<f64> = (curve.turning)(frame.history.turning())
        .iter()
        .copied()
        .filter(inside)
        .collect();
    let mut knots = spread(frame, from, to);
    for turn in &turning {
        grade(&mut knots, *turn);
    }
    knots.retain(|z| (from..=to).contains(z));
    knots.sort_by(f64::total_cmp);
    knots.dedup();
    let mut epochs = Epochs::default();
    frame.history.epochs(&knots, curve.wanted, &mut epochs);
    let rows: Vec<(f64, f64, f64)> = knots
        .iter()
        .enumerate()
        .map(|(row, z)| {
            let epoch = epochs.row(*z, row);
            (
                *z,
                (curve.value)(&epoch, frame),
                (curve.slope)(&epoch, frame),
            )
        })
        .collect();
    let mut ends = turning.clone();
    ends.push(to);
    let mut low = from;
    let mut parts = Vec::with_capacity(ends.len());
    for high in ends {
        parts.push(Monotone::of(&rows, low, high, (low != from, high != to)));
        low = high;
    }
    parts
}

/// Equal parts of the panels of a history between two redshifts, ends included.
fn spread(frame: &Frame, from: f64, to: f64) -> Vec<f64> {
    let mut knots = vec![from, to];
    for pair in frame.history.edges().windows(2) {
        if let &[low, high] = pair {
            let part = (high - low) / f64::from(PARTS);
            knots.extend((0..PARTS).map(|number| low + f64::from(number) * part));
        }
    }
    knots
}

/// Adds knots that close in on a turning point from both sides.
fn grade(knots: &mut Vec<f64>, turn: f64) {
    let width = 0.0625 * (1.0 + turn);
    knots.push(turn);
    for halving in 0..HALVINGS {
        let distance = libm::ldexp(width, -halving);
        knots.push(turn - distance);
        knots.push(turn + distance);
    }
}

impl Monotone {
    fn of(rows: &[(f64, f64, f64)], low: f64, high: f64, turns: (bool, bool)) -> Monotone {
        let mut inside: Vec<_> = rows
            .iter()
            .filter(|(z, ..)| (low..=high).contains(z))
            .collect();
        let rising = inside.last().map(|end| end.1) > inside.first().map(|end| end.1);
        if !rising {
            inside.reverse();
        }
        Monotone {
            low,
            high,
            redshifts: inside.iter().map(|row| row.0).collect(),
            values: inside.iter().map(|row| row.1).collect(),
            slopes: inside.iter().map(|row| row.2).collect(),
            turns: if rising { turns } else { (turns.1, turns.0) },
        }
    }

    /// The lowest value, its redshift and whether the curve turns there.
    pub(super) fn bottom(&self) -> (f64, f64, bool) {
        let first = |column: &[f64]| column.first().copied().unwrap_or(f64::NAN);
        (first(&self.values), first(&self.redshifts), self.turns.0)
    }

    /// The highest value, its redshift and whether the curve turns there.
    pub(super) fn top(&self) -> (f64, f64, bool) {
        let last = |column: &[f64]| column.last().copied().unwrap_or(f64::NAN);
        (last(&self.values), last(&self.redshifts), self.turns.1)
    }

    /// The redshifts of values of the curve, NaN where it does not reach them;
    /// `suspect` gains the rows (from `first_row`) whose redshift the value may
    /// not fix to 1e-9.
    pub(super) fn solve(
        &self,
        frame: &Frame,
        curve: &Solved,
        values: &[f64],
        redshifts: &mut [f64],
        suspect: &mut Vec<usize>,
    ) {
        let mut epochs = Epochs::default();
        let mut start = 0;
        for (values, redshifts) in values.chunks(BLOCK).zip(redshifts.chunks_mut(BLOCK)) {
            let mut state = [Step::default(); BLOCK];
            for ((value, redshift), step) in values.iter().zip(&mut *redshifts).zip(&mut state) {
                *step = self.start(*value);
                *redshift = step.redshift;
            }
            for _ in 0..STEPS {
                frame.history.epochs(redshifts, curve.wanted, &mut epochs);
                for (row, (redshift, step)) in redshifts.iter_mut().zip(&mut state).enumerate() {
                    let epoch = epochs.row(*redshift, row);
                    step.slope = (curve.slope)(&epoch, frame);
                    let next =
                        *redshift - ((curve.value)(&epoch, frame) - values[row]) / step.slope;
                    let next = next.max(step.low).min(step.high);
                    step.last = (next - *redshift).abs();
                    *redshift = next;
                }
            }
            for (row, (redshift, step)) in redshifts.iter_mut().zip(&state).enumerate() {
                let settled = step.last <= SETTLED * (step.high - step.low);
                if !step.inside {
                    *redshift = f64::NAN;
                } else if step.low == step.high {
                    *redshift = step.low;
                } else if !settled {
                    *redshift = close(frame, curve, values[row], step);
                }
                let spread = f64::EPSILON * values[row];
                if step.inside
                    && (!settled || !(8.0 * spread < 1e-9 * (*redshift * step.slope).abs()))
                {
                    suspect.push(start + row);
                }
            }
            start += values.len();
        }
    }

    /// Where Newton starts for a value, and the bracket it must stay in.
    fn start(&self, value: f64) -> Step {
        let (bottom, bottom_redshift, bottom_turns) = self.bottom();
        let (top, top_redshift, top_turns) = self.top();
        if value >= top || value <= bottom || value.is_nan() {
            let above = value >= top
                && value
                    <= if top_turns {
                        top * (1.0 + AT_TURNING)
                    } else {
                        top
                    };
            let below = value <= bottom
                && value
                    >= if bottom_turns {
                        bottom * (1.0 - AT_TURNING)
                    } else {
                        bottom
                    };
            let redshift = if value >= top {
                top_redshift
            } else {
                bottom_redshift
            };
            return Step {
                redshift,
                low: redshift,
                high: redshift,
                inside: above || below,
                ..Step::default()
            };
        }
        let above = self
            .values
            .partition_point(|knot| *knot <= value)
            .clamp(1, self.values.len() - 1);
        let (i, j) = (above - 1, above);
        let (z_i, z_j) = (self.redshifts[i], self.redshifts[j]);
        let rise = self.values[j] - self.values[i];
        let t = (value - self.values[i]) / rise;
        // The cubic of Hermite for z over the value.
        let (m_i, m_j) = (rise / self.slopes[i], rise / self.slopes[j]);
        let difference = z_j - z_i;
        let square = t * t;
        let cubic = z_i
            + t * m_i
            + square * (3.0 * difference - 2.0 * m_i - m_j)
            + square * t * (m_i + m_j - 2.0 * difference);
        let (low, high) = (z_i.min(z_j), z_i.max(z_j));
        let redshift = if cubic > low && cubic < high {
            cubic
        } else {
            z_i + t * difference
        };
        Step {
            redshift,
            low,
            high,
            inside: true,
            ..Step::default()
        }
    }
}

/// One value on its way.
#[derive(Clone, Copy, Debug, Default)]
struct Step {
    redshift: f64,
    low: f64,
    high: f64,
    inside: bool,
    slope: f64,
    last: f64,
}

/// Closes a bracket where Newton has not settled.
fn close(frame: &Frame, curve: &Solved, value: f64, step: &Step) -> f64 {
    let miss = |z: f64| (curve.value)(&frame.history.epoch(z), frame) - value;
    bracketed_root(step.low, step.high, miss).unwrap_or_else(|| {
        // Both ends round to the same side: the value is that of the nearer one.
        if miss(step.low).abs() <= miss(step.high).abs() {
            step.low
        } else {
            step.high
        }
    })
}
