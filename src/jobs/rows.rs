//! A block of rows through all outputs.

use super::conversion::Conversion;
use super::remarks::{Code, Detail, Remark};
use crate::expansion::{Beginning, Epochs, Wanted};
use crate::quantity::{
    Block, Condition, Frame, Inverter, Miss, Quantity, Scale, Solution, Tolerance,
};

/// Where a block stands.
#[derive(Clone, Copy, Debug)]
pub(super) struct Place {
    /// The number of its first row.
    pub first_row: usize,
    /// The branch, from 0.
    pub branch: usize,
    /// Whether the same rows were evaluated on another branch before.
    pub repeated: bool,
}

/// Evaluates blocks of rows; keeps its buffers from one to the next.
pub(super) struct Rows<'a, 'b> {
    frame: Frame<'a>,
    inverter: &'b Inverter<'a>,
    outputs: Vec<Target>,
    source: Scale,
    wanted: Wanted,
    future: bool,
    /// Redshifts above this need a remark.
    quiet: f64,
    given: Vec<f64>,
    solution: Solution,
    epochs: Epochs,
    /// Rows of the block that have no value.
    null: Vec<usize>,
    /// Rows of the block with −1 < z < 0.
    ahead: Vec<usize>,
    /// The remarks on the block.
    pub remarks: Vec<Remark>,
}

/// One output, ready to be evaluated.
#[derive(Clone, Copy)]
struct Target {
    quantity: &'static Quantity,
    scale: Scale,
    /// Its condition number, where this model lets it grow.
    condition: Option<Condition>,
}

/// Electron–positron pairs matter above.
const PAIRS: f64 = 1e8;
/// Radiation matters above.
const RADIATION: f64 = 20.0;
/// The relative change by rounding of the input that makes a value ill conditioned.
const ILL_CONDITIONED: f64 = 1e-9;
/// 5/ln 10: magnitudes for a relative change of a distance.
const MAGNITUDES: f64 = 2.171_472_409_516_259;

impl<'a, 'b> Rows<'a, 'b> {
    pub(super) fn new(
        frame: Frame<'a>,
        inverter: &'b Inverter<'a>,
        conversion: &Conversion,
        source: Scale,
        scales: &[Scale],
    ) -> Self {
        let target = |(output, scale): (&super::Output, &Scale)| Target {
            quantity: output.quantity,
            scale: *scale,
            condition: output
                .quantity
                .condition
                .filter(|condition| (condition.possible)(&frame)),
        };
        let outputs: Vec<Target> = conversion.to.iter().zip(scales).map(target).collect();
        let wanted = |all: Wanted, target: &Target| all.union(target.quantity.forward.wanted);
        Rows {
            wanted: outputs.iter().fold(Wanted::default(), wanted),
            outputs,
            source,
            future: conversion.future,
            quiet: physics_end(&frame).min(frame.history.range().1),
            frame,
            inverter,
            given: Vec::new(),
            solution: Solution::default(),
            epochs: Epochs::default(),
            null: Vec::new(),
            ahead: Vec::new(),
            remarks: Vec::new(),
        }
    }

    /// Fills the rows of a block in every column of `table`.
    pub(super) fn evaluate(&mut self, values: &[f64], place: Place, table: &mut [Vec<f64>]) {
        self.given.clear();
        self.given.extend_from_slice(values);
        self.source.apply_all(&mut self.given);
        self.inverter
            .solve(&self.given, place.branch, &mut self.solution);
        self.null.clear();
        self.ahead.clear();
        let quiet = self.quiet;
        if !self
            .solution
            .redshifts
            .iter()
            .all(|z| *z >= 0.0 && *z <= quiet)
        {
            self.sort_out(values, place);
        }
        self.frame
            .history
            .epochs(&self.solution.redshifts, self.wanted, &mut self.epochs);
        for (number, column) in table.iter_mut().enumerate() {
            let cells = &mut column[place.first_row..place.first_row + values.len()];
            self.fill(number, cells, place);
        }
        self.judge_suspects(place);
    }

    fn fill(&mut self, number: usize, cells: &mut [f64], place: Place) {
        let target = self.outputs[number];
        let block = Block {
            redshifts: &self.solution.redshifts,
            epochs: &self.epochs,
        };
        (target.quantity.forward.fill)(&block, &self.frame, cells);
        for row in &self.null {
            cells[*row] = f64::NAN;
        }
        if !target.quantity.future {
            for row in &self.ahead {
                cells[*row] = f64::NAN;
                self.remarks.push(remark(
                    place,
                    *row,
                    Some(number),
                    Code::Blueshift,
                    Detail::None,
                ));
            }
        }
        if !cells.iter().all(|cell| cell.is_finite()) {
            let code = self.code_of_infinity(target.quantity);
            for (row, cell) in cells.iter_mut().enumerate() {
                if !cell.is_finite()
                    && !self.null.contains(&row)
                    && !self.left_out(target.quantity, row)
                {
                    *cell = f64::NAN;
                    self.remarks
                        .push(remark(place, row, Some(number), code, Detail::None));
                }
            }
        }
        if let Some(condition) = target.condition {
            for (row, cell) in cells.iter().enumerate() {
                let epoch = self.epochs.row(self.solution.redshifts[row], row);
                let number_of = (condition.number)(&epoch, &self.frame);
                if cell.is_finite() && number_of * f64::EPSILON > ILL_CONDITIONED {
                    self.remarks.push(remark(
                        place,
                        row,
                        Some(number),
                        Code::IllConditioned,
                        Detail::None,
                    ));
                }
            }
        }
        target.scale.apply_all(cells);
    }

    /// Whether a row is left out of a quantity as one of the future.
    fn left_out(&self, quantity: &Quantity, row: usize) -> bool {
        !quantity.future && self.ahead.contains(&row)
    }

    /// Why a quantity is infinite.
    fn code_of_infinity(&self, quantity: &Quantity) -> Code {
        let counted = quantity.forward.wanted.age || quantity.forward.wanted.conformal;
        if counted && self.frame.history.beginning() != Beginning::BigBang {
            Code::NoBeginning
        } else {
            Code::Divergent
        }
    }

    /// Finds the rows without a value and those that need a remark.
    fn sort_out(&mut self, values: &[f64], place: Place) {
        for (row, value) in values.iter().enumerate() {
            let z = self.solution.redshifts[row];
            if z >= 0.0 && z <= self.quiet {
                continue;
            }
            let (code, detail) = self.verdict(row, *value, place.branch);
            if !code.is_some_and(Code::keeps_value) && code.is_some() {
                self.null.push(row);
                self.solution.redshifts[row] = 0.0;
            } else if z < 0.0 {
                self.ahead.push(row);
            }
            let said = place.repeated && matches!(code, Some(Code::Missing | Code::NotFinite));
            if let Some(code) = code.filter(|_| !said) {
                let detail = if place.repeated {
                    Detail::Branch(place.branch as u32 + 1)
                } else {
                    detail
                };
                self.remarks.push(remark(place, row, None, code, detail));
            }
        }
    }

    /// What is to be said about a row as a whole.
    fn verdict(&self, row: usize, value: f64, branch: usize) -> (Option<Code>, Detail) {
        let z = self.solution.redshifts[row];
        let (low, high) = self.frame.history.range();
        if value.is_nan() {
            (Some(Code::Missing), Detail::None)
        } else if value.is_infinite() {
            (Some(Code::NotFinite), Detail::None)
        } else if z.is_nan() {
            self.verdict_on_miss(self.given[row], branch)
        } else if z <= -1.0 {
            (Some(Code::OutsideDomain), Detail::None)
        } else if z < 0.0 && !self.future {
            (Some(Code::Blueshift), Detail::None)
        } else if z < low || z > high {
            (Some(Code::BeyondModelRange), Detail::Between(low, high))
        } else if z > self.quiet {
            (Some(Code::BeyondPhysics), Detail::None)
        } else {
            (None, Detail::None)
        }
    }

    fn verdict_on_miss(&self, given: f64, branch: usize) -> (Option<Code>, Detail) {
        let (low, high) = self.frame.history.range();
        let (code, detail) = match self.inverter.miss(given, branch) {
            Miss::Blueshift => (Code::Blueshift, Detail::None),
            Miss::OutsideDomain => (Code::OutsideDomain, Detail::None),
            Miss::BeyondMaximum(largest) if largest.is_finite() => (
                Code::BeyondMaximum,
                Detail::Largest(largest, self.inverter.quantity().unit),
            ),
            Miss::BeyondMaximum(_) => (Code::BeyondMaximum, Detail::None),
            Miss::BeforeBeginning => (Code::BeforeBeginning, Detail::None),
            Miss::NoBeginning => (Code::NoBeginning, Detail::None),
            Miss::Divergent => (Code::Divergent, Detail::None),
            Miss::BeyondRange => (Code::BeyondModelRange, Detail::Between(low, high)),
        };
        (Some(code), detail)
    }

    /// Finds the outputs that the rounding of the given value alone moves too far.
    fn judge_suspects(&mut self, place: Place) {
        let (lowest, highest) = self.frame.history.range();
        for row in &self.solution.suspect {
            let z = self.solution.redshifts[*row];
            if self.null.contains(row) {
                continue;
            }
            let spread = self.inverter.uncertainty(self.given[*row], z);
            let below = self.frame.history.epoch((z - spread).max(lowest));
            let above = self.frame.history.epoch((z + spread).min(highest));
            for (number, target) in self.outputs.iter().enumerate() {
                if z < 0.0 && !target.quantity.future {
                    continue;
                }
                let at = target.quantity.forward.at;
                let (one, other) = (at(&below, &self.frame), at(&above, &self.frame));
                let change = 0.5 * (other - one).abs();
                let size = match target.quantity.tolerance {
                    Tolerance::Absolute(_) => MAGNITUDES,
                    _ => 0.5 * (one + other).abs(),
                };
                if change > ILL_CONDITIONED * size {
                    let detail = Detail::RedshiftUncertain(spread);
                    self.remarks.push(remark(
                        place,
                        *row,
                        Some(number),
                        Code::IllConditioned,
                        detail,
                    ));
                }
            }
        }
    }
}

fn remark(place: Place, row: usize, column: Option<usize>, code: Code, detail: Detail) -> Remark {
    Remark {
        row: place.first_row + row,
        column,
        code,
        detail,
    }
}

/// The redshift above which the model leaves out physics that matters.
fn physics_end(frame: &Frame) -> f64 {
    let radiation = frame.history.spec().radiation.as_ref();
    let hot = radiation.is_some_and(|radiation| radiation.cmb_temperature > 0.0);
    if hot { PAIRS } else { RADIATION }
}
