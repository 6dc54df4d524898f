//! Columns of one quantity into columns of others.

use super::conversion::{Branch, Conversion, ConvertFault, Output};
use super::remarks::Remarks;
use super::rows::{Place, Rows};
use super::{StatedAccuracy, accuracy};
use crate::quantity::{Frame, Quantity, Scale, Unit};

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
    let source = conversion.from.scale(frame.hubble_constant)?;
    let scaled = |(number, output): (usize, &Output)| output.scale(number, frame.hubble_constant);
    let scales = conversion
        .to
        .iter()
        .enumerate()
        .map(scaled)
        .collect::<Result<Vec<_>, _>>()?;
    let ranges = inverter.branches();
    let chosen: Vec<usize> = match conversion.from.branch {
        Branch::Number(number) => vec![number as usize - 1],
        Branch::Far => vec![ranges.len() - 1],
        Branch::All => (0..ranges.len()).collect(),
    };
    let mut rows = Rows::new(frame, &inverter, conversion, source, &scales);
    let (tables, remarks) = evaluate(conversion, &chosen, &mut rows);
    let column = |((output, scale), branches)| column(conversion, output, scale, branches);
    let columns = conversion
        .to
        .iter()
        .zip(&scales)
        .zip(tables)
        .map(column)
        .collect();
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

/// Each column on each chosen branch, block by block.
fn evaluate(
    conversion: &Conversion,
    chosen: &[usize],
    rows: &mut Rows,
) -> (Vec<Vec<Vec<f64>>>, Remarks) {
    let values = conversion.from.values;
    let empty = |_: &Output| chosen.iter().map(|_| vec![0.0; values.len()]).collect();
    let mut tables: Vec<Vec<Vec<f64>>> = conversion.to.iter().map(empty).collect();
    let mut remarks = Remarks::default();
    for (number, block) in values.chunks(BLOCK).enumerate() {
        for (slot, branch) in chosen.iter().enumerate() {
            let place = Place {
                first_row: number * BLOCK,
                branch: *branch,
                slot,
            };
            rows.evaluate(block, place, &mut tables);
        }
        remarks.take_block(&mut rows.remarks, values.len());
    }
    (tables, remarks)
}

/// One column from its values on each chosen branch.
fn column(
    conversion: &Conversion,
    output: &Output,
    scale: &Scale,
    branches: Vec<Vec<f64>>,
) -> Column {
    let per_horizon = output.per_sound_horizon.is_some();
    let numbered = |(values, branch)| BranchValues { branch, values };
    let (values, branches) = if conversion.from.branch == Branch::All {
        (
            branches.first().cloned().unwrap_or_default(),
            branches.into_iter().zip(1..).map(numbered).collect(),
        )
    } else {
        (branches.into_iter().next().unwrap_or_default(), Vec::new())
    };
    Column {
        quantity: output.quantity,
        unit: if per_horizon {
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
        branches,
    }
}
