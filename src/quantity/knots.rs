//! The monotone parts of a curve that may turn, and the knots that bracket its inverse.

use super::{Frame, Solved};
use crate::expansion::Epochs;

/// Knots laid into each panel of the history.
const PARTS: u32 = 4;
/// Knots halve their distance towards a turning point this often.
const HALVINGS: i32 = 14;
/// A curve that varies by less than this share of itself is constant.
const CONSTANT: f64 = 1e-13;

/// A stretch of redshift on which a curve is monotone.
#[derive(Clone, Debug)]
pub(super) struct Monotone {
    /// Its ends in redshift.
    pub low: f64,
    pub high: f64,
    /// In the order of rising value.
    knots: Vec<Knot>,
    /// Whether the curve turns at the lowest and at the highest value.
    turns: (bool, bool),
}

/// A point of a curve.
#[derive(Clone, Copy, Debug)]
pub(super) struct Knot {
    pub redshift: f64,
    pub value: f64,
    /// dy/dz.
    pub slope: f64,
}

/// The monotone parts of a curve, ascending in redshift.
pub(super) fn monotone_parts(frame: &Frame, curve: &Solved, from: f64) -> Vec<Monotone> {
    let to = frame.history.range().1;
    let inside = |z: &f64| *z > from && *z < to;
    let turning = (curve.turning)(frame.history.turning());
    let mut ends: Vec<f64> = turning.iter().copied().filter(inside).collect();
    ends.dedup_by(|next, one| *next - *one <= 1e-13 * *next);
    let mut redshifts = spread(frame, from, to);
    for turn in &ends {
        grade(&mut redshifts, *turn);
    }
    redshifts.retain(|z| (from..=to).contains(z));
    redshifts.sort_by(f64::total_cmp);
    redshifts.dedup();
    let knots = knots(frame, curve, &redshifts);
    ends.push(to);
    let mut low = from;
    let mut parts = Vec::with_capacity(ends.len());
    for high in ends {
        parts.push(Monotone::of(&knots, low, high, (low != from, high != to)));
        low = high;
    }
    parts
}

/// Equal parts of the panels of a history between two redshifts, ends included.
fn spread(frame: &Frame, from: f64, to: f64) -> Vec<f64> {
    let mut redshifts = vec![from, to];
    for pair in frame.history.edges().windows(2) {
        if let &[low, high] = pair {
            let part = (high - low) / f64::from(PARTS);
            redshifts.extend((0..PARTS).map(|number| low + f64::from(number) * part));
        }
    }
    redshifts
}

/// Adds redshifts that close in on a turning point from both sides.
fn grade(redshifts: &mut Vec<f64>, turn: f64) {
    let width = 0.0625 * (1.0 + turn);
    redshifts.push(turn);
    for halving in 0..HALVINGS {
        let distance = libm::ldexp(width, -halving);
        redshifts.push(turn - distance);
        redshifts.push(turn + distance);
    }
}

fn knots(frame: &Frame, curve: &Solved, redshifts: &[f64]) -> Vec<Knot> {
    let mut epochs = Epochs::default();
    frame
        .history
        .epochs(redshifts, frame.wanted(curve.wanted), &mut epochs);
    let knot = |(row, redshift): (usize, &f64)| {
        let epoch = epochs.row(*redshift, row);
        let (value, slope) = ((curve.value)(&epoch, frame), (curve.slope)(&epoch, frame));
        Knot {
            redshift: *redshift,
            value,
            slope,
        }
    };
    redshifts.iter().enumerate().map(knot).collect()
}

impl Monotone {
    fn of(ascending: &[Knot], low: f64, high: f64, turns: (bool, bool)) -> Monotone {
        let inside = |knot: &&Knot| (low..=high).contains(&knot.redshift);
        let mut knots: Vec<Knot> = ascending.iter().filter(inside).copied().collect();
        let rising = knots.last().map(|end| end.value) > knots.first().map(|end| end.value);
        if !rising {
            knots.reverse();
        }
        let turns = if rising { turns } else { (turns.1, turns.0) };
        Monotone {
            low,
            high,
            knots,
            turns,
        }
    }

    /// The knot of the lowest value, and whether the curve turns there.
    pub(super) fn bottom(&self) -> (Knot, bool) {
        (
            self.knots.first().copied().unwrap_or(Knot::NOWHERE),
            self.turns.0,
        )
    }

    /// The knot of the highest value, and whether the curve turns there.
    pub(super) fn top(&self) -> (Knot, bool) {
        (
            self.knots.last().copied().unwrap_or(Knot::NOWHERE),
            self.turns.1,
        )
    }

    /// Whether the curve is constant but for rounding, so that no value tells a redshift.
    pub(super) fn is_constant(&self) -> bool {
        let (bottom, top) = (self.bottom().0.value, self.top().0.value);
        top - bottom <= CONSTANT * top
    }

    /// The two knots whose values enclose one that is between bottom and top.
    pub(super) fn around(&self, value: f64) -> (Knot, Knot) {
        let above = self.knots.partition_point(|knot| knot.value <= value);
        let pair = |above: usize| {
            Some((
                *self.knots.get(above.checked_sub(1)?)?,
                *self.knots.get(above)?,
            ))
        };
        pair(above).unwrap_or((self.top().0, self.top().0))
    }
}

impl Knot {
    const NOWHERE: Knot = Knot {
        redshift: f64::NAN,
        value: f64::NAN,
        slope: f64::NAN,
    };
}
