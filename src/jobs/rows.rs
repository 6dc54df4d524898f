//! A block of rows through all outputs.

use super::code::Code;
use super::conversion::Conversion;
use super::remarks::{Detail, Remark};
use super::verdict::{Standing, Verdict};
use crate::expansion::{Beginning, Epochs, Wanted};
use crate::quantity::{
    Block, Condition, Frame, ILL_CONDITIONED, Inverter, Quantity, Scale, Solution, Tolerance,
};

/// Where a block stands.
#[derive(Clone, Copy, Debug)]
pub(super) struct Place {
    /// The number of its first row.
    pub first_row: usize,
    /// The branch, from 0.
    pub branch: usize,
    /// Its place among the branches asked for.
    pub slot: usize,
}

/// Evaluates blocks of rows; keeps its buffers from one to the next.
pub(super) struct Rows<'a, 'b> {
    frame: Frame<'a>,
    inverter: &'b Inverter<'a>,
    verdict: Verdict<'a, 'b>,
    outputs: Vec<Target>,
    source: Scale,
    wanted: Wanted,
    /// Whether the values are redshifts already.
    given_as_redshift: bool,
    given: Vec<f64>,
    solution: Solution,
    epochs: Epochs,
    /// How each row of the block stands; empty where all are usual.
    standings: Vec<Standing>,
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
            frame,
            inverter,
            verdict: Verdict::new(frame, inverter, conversion.future),
            wanted: frame.wanted(outputs.iter().fold(Wanted::default(), wanted)),
            outputs,
            source,
            given_as_redshift: inverter.is_redshift() && source == Scale::IDENTITY,
            given: Vec::new(),
            solution: Solution::default(),
            epochs: Epochs::default(),
            standings: Vec::new(),
            remarks: Vec::new(),
        }
    }

    /// Fills the rows of a block in every column, for one branch.
    pub(super) fn evaluate(&mut self, values: &[f64], place: Place, tables: &mut [Vec<Vec<f64>>]) {
        self.standings.clear();
        if self.given_as_redshift && self.verdict.all_usual(values) {
            self.solution.take(values);
        } else {
            self.given.clear();
            self.given.extend_from_slice(values);
            self.source.apply_all(&mut self.given);
            self.inverter
                .solve(&self.given, place.branch, &mut self.solution);
            if !self.verdict.all_usual(&self.solution.redshifts) {
                self.sort_out(values, place);
            }
        }
        self.frame
            .history
            .epochs(&self.solution.redshifts, self.wanted, &mut self.epochs);
        let rows = place.first_row..place.first_row + values.len();
        for (number, branches) in tables.iter_mut().enumerate() {
            if let Some(cells) = branches
                .get_mut(place.slot)
                .and_then(|column| column.get_mut(rows.clone()))
            {
                self.fill(number, cells, place);
            }
        }
        self.judge_suspects(place);
    }

    /// Finds the rows without a value and those that need a remark.
    fn sort_out(&mut self, values: &[f64], place: Place) {
        for ((value, given), redshift) in values
            .iter()
            .zip(&self.given)
            .zip(&mut self.solution.redshifts)
        {
            let row = self.standings.len();
            let (standing, said) = self.verdict.on(*value, *given, *redshift, place.branch);
            if standing == Standing::Null {
                *redshift = 0.0;
            }
            self.standings.push(standing);
            let Some((code, detail)) = said else { continue };
            // What the value itself is amiss with was said on the first branch.
            if place.slot == 0 {
                self.remarks.push(remark(place, row, None, code, detail));
            } else if !matches!(code, Code::Missing | Code::NotFinite) {
                let detail = Detail::Branch(place.branch as u32 + 1);
                self.remarks.push(remark(place, row, None, code, detail));
            }
        }
    }

    fn fill(&mut self, number: usize, cells: &mut [f64], place: Place) {
        let Some(target) = self.outputs.get(number).copied() else {
            return;
        };
        let block = Block {
            redshifts: &self.solution.redshifts,
            epochs: &self.epochs,
        };
        (target.quantity.forward.fill)(&block, &self.frame, cells);
        if !self.standings.is_empty() || !all_finite(cells) {
            self.leave_out(number, target.quantity, cells, place);
        }
        if let Some(condition) = target.condition {
            for (row, (cell, redshift)) in cells.iter().zip(&self.solution.redshifts).enumerate() {
                let epoch = self.epochs.row(*redshift, row);
                let number_of_row = (condition.number)(*cell, &epoch, &self.frame);
                if cell.is_finite() && number_of_row * f64::EPSILON > ILL_CONDITIONED {
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
        if target.scale != Scale::IDENTITY {
            target.scale.apply_all(cells);
            self.leave_out_overflow(number, cells, place);
        }
    }

    /// Empties the cells whose value is too large for a number in the unit asked for.
    fn leave_out_overflow(&mut self, number: usize, cells: &mut [f64], place: Place) {
        for (row, cell) in cells.iter_mut().enumerate() {
            if cell.is_infinite() {
                *cell = f64::NAN;
                let code = Code::NotFinite;
                self.remarks
                    .push(remark(place, row, Some(number), code, Detail::None));
            }
        }
    }

    /// Empties the cells that have no value, and says why where the row does not.
    fn leave_out(&mut self, number: usize, quantity: &Quantity, cells: &mut [f64], place: Place) {
        for (row, cell) in cells.iter_mut().enumerate() {
            let said = match self.standings.get(row).copied().unwrap_or_default() {
                Standing::Null => None,
                Standing::Ahead if !quantity.future => {
                    Some((Code::Blueshift, Detail::NotBelowZero(quantity.name)))
                }
                _ if cell.is_finite() => continue,
                _ => Some((self.code_of_infinity(quantity), Detail::None)),
            };
            *cell = f64::NAN;
            if let Some((code, detail)) = said {
                self.remarks
                    .push(remark(place, row, Some(number), code, detail));
            }
        }
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

    /// Finds the outputs that the rounding of the given value alone moves too far.
    fn judge_suspects(&mut self, place: Place) {
        let (lowest, highest) = self.frame.history.range();
        for row in &self.solution.suspect {
            let standing = self.standings.get(*row).copied().unwrap_or_default();
            let (Some(z), Some(given)) = (self.solution.redshifts.get(*row), self.given.get(*row))
            else {
                continue;
            };
            if standing == Standing::Null {
                continue;
            }
            let spread = self.inverter.uncertainty(*given, *z);
            let below = self.frame.history.epoch((z - spread).max(lowest));
            let above = self.frame.history.epoch((z + spread).min(highest));
            for (number, target) in self.outputs.iter().enumerate() {
                if standing == Standing::Ahead && !target.quantity.future {
                    continue;
                }
                let at = target.quantity.forward.at;
                let (one, other) = (at(&below, &self.frame), at(&above, &self.frame));
                let size = match target.quantity.tolerance {
                    Tolerance::Absolute(_) => MAGNITUDES,
                    _ => 0.5 * (one + other).abs(),
                };
                // Of a value that is exactly zero nothing is a small share: its
                // redshift counts instead.
                let moved = if one * other <= 0.0
                    && at(&self.frame.history.epoch(*z), &self.frame) == 0.0
                {
                    spread > ILL_CONDITIONED * (1.0 + z)
                } else {
                    0.5 * (other - one).abs() > ILL_CONDITIONED * size
                };
                if moved {
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

/// Whether every cell is finite; without an early end, so that it is done in lanes.
fn all_finite(cells: &[f64]) -> bool {
    cells
        .iter()
        .fold(true, |finite, cell| finite & cell.is_finite())
}

fn remark(place: Place, row: usize, column: Option<usize>, code: Code, detail: Detail) -> Remark {
    Remark {
        row: place.first_row + row,
        column,
        code,
        detail,
    }
}
