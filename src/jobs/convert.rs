//! Columns of one quantity into columns of others.

use super::conversion::{Branch, Conversion, ConvertFault};
use super::remarks::Remarks;
use super::rows::{Place, Rows};
use super::{StatedAccuracy, accuracy};
use crate::quantity::{Frame, Quantity, Unit};

/// What a conversion gives.
#[derive(Clone, Debug)]
pub struct Converted {
    /// One column for each output, in order.
    pub columns: Vec<Column>,
    /// What is said about rows.
    pub remarks: Remarks,
    /// The branches of the given quantity; empty where it is monotone.
    pub branches: Vec<BranchRange>,
}

/// A column of a quantity.
#[derive(Clone, Debug)]
pub struct Column {
    /// Of which quantity.
    pub quantity: &'static Quantity,
    /// In which unit.
    pub unit: Unit,
    /// Whether it is per h.
    pub per_h: bool,
    /// The sound horizon in Mpc that it was divided by.
    pub per_sound_horizon: Option<f64>,
    /// One value a row; NaN where there is none.
    pub values: Vec<f64>,
    /// The numerical accuracy for a condition κ ≤ 1.
    pub accuracy: StatedAccuracy,
    /// The values on each branch, where all were asked for; `values` is the first.
    pub branches: Vec<BranchValues>,
}

/// The values of a column on one branch.
#[derive(Clone, Debug)]
pub struct BranchValues {
    /// From 1.
    pub branch: u32,
    /// One value a row; NaN where there is none.
    pub values: Vec<f64>,
}

/// A stretch of redshift on which the given quantity is monotone.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct BranchRange {
    /// From 1.
    pub branch: u32,
    /// Its ends in redshift, ascending.
    pub redshift: (f64, f64),
}

/// Rows that go through all outputs together, so that they stay in the cache.
const BLOCK: usize = 512;

/// Converts a column.
///
/// # Accuracy
/// As each column states; the same bits whatever the other rows and columns are.
///
/// # Errors
/// [`ConvertFault`] where the request cannot be understood in this model; rows
/// that cannot be converted are NaN with a remark instead.
pub fn convert(conversion: &Conversion) -> Result<Converted, ConvertFault> {
    let frame = Frame::of(conversion.history);
    let inverter = conversion.check(&frame)?;
    let hubble_constant = frame.hubble_constant;
    let source = conversion.from.scale(hubble_constant)?;
    let scales = conversion
        .to
        .iter()
        .enumerate()
        .map(|(number, output)| output.scale(number, hubble_constant))
        .collect::<Result<Vec<_>, _>>()?;
    let ranges = inverter.branches();
    let chosen = match conversion.from.branch {
        Branch::Number(number) => vec![number as usize - 1],
        Branch::Far => vec![ranges.len() - 1],
        Branch::All => (0..ranges.len()).collect(),
    };

    let values = conversion.from.values;
    let empty = || {
        conversion
            .to
            .iter()
            .map(|_| vec![0.0; values.len()])
            .collect()
    };
    let mut tables: Vec<Vec<Vec<f64>>> = chosen.iter().map(|_| empty()).collect();
    let mut remarks = Remarks::default();
    let mut rows = Rows::new(frame, &inverter, conversion, source, &scales);
    for (number, block) in values.chunks(BLOCK).enumerate() {
        for (slot, (branch, table)) in chosen.iter().zip(&mut tables).enumerate() {
            let place = Place {
                first_row: number * BLOCK,
                branch: *branch,
                repeated: slot > 0,
            };
            rows.evaluate(block, place, table);
        }
        remarks.take_block(&mut rows.remarks, values.len());
    }

    let all = conversion.from.branch == Branch::All;
    let columns = conversion
        .to
        .iter()
        .zip(&scales)
        .enumerate()
        .map(|(number, (output, scale))| {
            let branch_values = |slot: usize| std::mem::take(&mut tables[slot][number]);
            let mut branches: Vec<Vec<f64>> = (0..chosen.len()).map(branch_values).collect();
            let values = if all {
                branches[0].clone()
            } else {
                branches.swap_remove(0)
            };
            Column {
                quantity: output.quantity,
                unit: if output.per_sound_horizon.is_some() {
                    Unit::dimensionless()
                } else {
                    output.unit.clone()
                },
                per_h: output.per_h,
                per_sound_horizon: output.per_sound_horizon,
                values,
                accuracy: accuracy::stated(
                    conversion.history,
                    Some(conversion.from.quantity),
                    output.quantity,
                )
                .scaled(scale),
                branches: branches
                    .into_iter()
                    .zip(1..)
                    .map(|(values, branch)| BranchValues { branch, values })
                    .collect(),
            }
        });
    let columns = columns.collect();
    let ranges = if ranges.len() > 1 { ranges } else { Vec::new() };
    let branches = ranges
        .into_iter()
        .zip(1..)
        .map(|(redshift, branch)| BranchRange { branch, redshift })
        .collect();
    Ok(Converted {
        columns,
        remarks,
        branches,
    })
}
