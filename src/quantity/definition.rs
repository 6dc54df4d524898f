//! What the catalogue says about one quantity.

use super::Frame;
use super::unit::Unit;
use crate::expansion::{Accuracy, Curve, Epoch, Epochs, Turning, Wanted};
use crate::model::{Citation, Spec};

/// A quantity that belongs to a redshift in a model.
///
/// Parsing, the answers, the documents and the tests follow from this literal:
/// adding a quantity is adding one to the catalogue.
#[derive(Debug)]
pub struct Quantity {
    /// As requests and answers write it.
    pub name: &'static str,
    /// As papers write it.
    pub symbol: &'static str,
    /// The unit it is given in unless another is asked for (VOUnits).
    pub unit: &'static str,
    /// UCD1+ words.
    pub ucd: &'static str,
    /// One sentence.
    pub meaning: &'static str,
    /// The values it takes, in words; z ≥ 0 unless they mention the future.
    pub domain: &'static str,
    /// The promise that is tested and served.
    pub tolerance: Tolerance,
    /// What the checked errors of a model's tables make in it: relative, or in
    /// its unit where the tolerance is absolute, for a condition of 1; `None` where
    /// no table enters.
    pub table_error: Option<fn(&Accuracy) -> f64>,
    /// What "per h" does to it.
    pub scaling: HubbleScaling,
    /// Whether it is given for −1 < z < 0 on request.
    pub future: bool,
    /// From redshift to the quantity.
    pub forward: Forward,
    /// The condition number, where it can grow without bound.
    pub condition: Option<Condition>,
    /// From the quantity to redshift.
    pub inverse: Option<Inverse>,
    /// Why a model does not define it.
    pub undefined: fn(&Spec) -> Option<&'static str>,
    /// The formula.
    pub formula: &'static str,
    /// Where the formula stands.
    pub source: Citation,
}

/// The promised error against exact arithmetic with the declared numbers, times
/// max(1, κ), κ the condition of the quantity in those numbers.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Tolerance {
    /// Relative.
    Relative(f64),
    /// In the unit of the quantity, plus one unit in the last place; κ is that
    /// of the distance inside.
    Absolute(f64),
    /// For differences: units in the last place of the larger term, and relative
    /// as z → 0.
    LargerTerm {
        /// Of the larger term.
        ulps: f64,
        /// As z → 0.
        relative: f64,
    },
}

/// What `per_h` (h = H0 / 100 km/s/Mpc) does to a quantity.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum HubbleScaling {
    /// It has no such form.
    None,
    /// × h to this power.
    Power(u8),
    /// + 5 log10 h.
    Modulus,
}

/// From redshift to the quantity, by row and by block.
#[derive(Clone, Copy, Debug)]
pub struct Forward {
    /// The columns of the history it is made of.
    pub wanted: Wanted,
    /// One row, in the quantity's own unit.
    pub at: fn(&Epoch, &Frame) -> f64,
    /// The same over a block of rows: the same bits.
    pub fill: fn(&Block, &Frame, &mut [f64]),
}

/// The condition number of a quantity in its redshift and the model's numbers.
#[derive(Clone, Copy, Debug)]
pub struct Condition {
    /// Whether it can grow without bound in a model.
    pub possible: fn(&Frame) -> bool,
    /// The number, where the quantity has a value.
    pub number: fn(f64, &Epoch, &Frame) -> f64,
}

/// The relative change by rounding of the input that makes a value ill conditioned.
pub const ILL_CONDITIONED: f64 = 1e-9;

/// Rows of a history that lie ready to be read.
#[derive(Clone, Copy, Debug)]
pub struct Block<'a> {
    /// Their redshifts.
    pub redshifts: &'a [f64],
    /// Their wanted columns.
    pub epochs: &'a Epochs,
}

/// From the quantity to redshift.
#[derive(Debug)]
pub enum Inverse {
    /// In closed form.
    Direct {
        /// The redshift of a value inside the domain.
        redshift: fn(f64, &Frame) -> f64,
        /// |y dz/dy| at a redshift: what a relative change of the value makes.
        sensitivity: fn(f64) -> f64,
        /// The open interval of values that belong to z > −1.
        domain: fn(&Frame) -> (f64, f64),
    },
    /// An integral that the tables invert by themselves.
    Table {
        /// Which.
        curve: Curve,
        /// The quantity per unit of the integral.
        scale: fn(&Frame) -> f64,
    },
    /// A curve that may turn, solved for branch by branch.
    Solved {
        /// The curve's value for a value of the quantity.
        given: fn(f64, &Frame) -> f64,
        /// Its derivative, from the value and what is given.
        given_slope: fn(f64, f64) -> f64,
        /// The curve.
        curve: &'static Solved,
    },
}

/// A curve that may turn: positive, with its slope.
#[derive(Debug)]
pub struct Solved {
    /// The columns of the history it is made of.
    pub wanted: Wanted,
    /// The curve.
    pub value: fn(&Epoch, &Frame) -> f64,
    /// Its derivative with respect to redshift, to some 1e-9.
    pub slope: fn(&Epoch, &Frame) -> f64,
    /// Where it turns.
    pub turning: fn(&Turning) -> &[f64],
    /// What it tends to as z → ∞; infinite where it grows for ever.
    pub horizon: fn(&Frame) -> f64,
    /// What it tends to as z → −1; NaN where it ends before, or where that is no matter.
    pub late_limit: fn(&Frame) -> f64,
    /// Whether values of z < 0 are solved for.
    pub future: bool,
}

impl Quantity {
    /// The unit it is given in unless another is asked for.
    #[must_use]
    pub fn default_unit(&self) -> Unit {
        Unit::of_catalogue(self.unit)
    }

    /// Its value at one redshift, which must be inside the range of the history.
    #[must_use]
    pub fn at(&self, redshift: f64, frame: &Frame) -> f64 {
        (self.forward.at)(&frame.history.epoch(redshift), frame)
    }

    /// Whether it is a length, so that it may be given per sound horizon.
    #[must_use]
    pub fn is_length(&self) -> bool {
        self.unit == "Mpc"
    }
}

impl PartialEq for Quantity {
    fn eq(&self, other: &Quantity) -> bool {
        self.name == other.name
    }
}

impl Block<'_> {
    /// Applies a row function to all rows.
    #[inline(always)]
    pub fn each(&self, frame: &Frame, out: &mut [f64], at: impl Fn(&Epoch, &Frame) -> f64) {
        for (row, (cell, redshift)) in out.iter_mut().zip(self.redshifts).enumerate() {
            *cell = at(&self.epochs.row(*redshift, row), frame);
        }
    }
}
