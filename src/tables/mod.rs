//! Tables of results in the formats of other programs, one a file.

pub mod csv;
pub mod digits;
pub mod text;

use crate::jobs::{Converted, Remarks};
use crate::quantity::{Quantity, Unit, column_name};

/// Columns of equal length with what is said about their rows.
#[derive(Debug)]
pub struct Table {
    columns: Vec<Column>,
    remarks: Remarks,
    rows: usize,
}

#[derive(Debug)]
struct Column {
    /// With its unit, unique in the table.
    name: String,
    /// Without its unit.
    label: String,
    unit: String,
    meaning: &'static str,
    values: Vec<f64>,
}

/// The given column of a conversion.
#[derive(Clone, Debug)]
pub struct Given {
    /// Of which quantity.
    pub quantity: &'static Quantity,
    /// In which unit.
    pub unit: Unit,
    /// Whether per h.
    pub per_h: bool,
    /// Its values; NaN for null.
    pub values: Vec<f64>,
}

impl Table {
    /// The table of a conversion: the given column, then the outputs.
    ///
    /// An output that is the given column again takes its place, so that its cells are those of
    /// the other formats.
    pub fn of(given: Given, converted: Converted) -> Table {
        let rows = given.values.len();
        let name = column_name(given.quantity, &given.unit, given.per_h, false);
        let mut columns = vec![Column {
            name,
            label: label(given.quantity, given.per_h, false),
            unit: given.unit.text().to_owned(),
            meaning: given.quantity.meaning,
            values: given.values,
        }];
        for column in converted.columns {
            let per_sound_horizon = column.per_sound_horizon.is_some();
            let name = column_name(
                column.quantity,
                &column.unit,
                column.per_h,
                per_sound_horizon,
            );
            if let Some(given) = columns.first_mut().filter(|given| given.name == name) {
                given.values = column.values;
                continue;
            }
            let label = label(column.quantity, column.per_h, per_sound_horizon);
            let of = |suffix: &str, values| Column {
                name: format!("{name}{suffix}"),
                label: format!("{label}{suffix}"),
                unit: column.unit.text().to_owned(),
                meaning: column.quantity.meaning,
                values,
            };
            // The first branch has the plain name.
            columns.push(of("", column.values));
            for branch in column
                .branches
                .into_iter()
                .filter(|branch| branch.branch > 1)
            {
                columns.push(of(&format!("_branch_{}", branch.branch), branch.values));
            }
        }
        Table {
            columns,
            remarks: converted.remarks,
            rows,
        }
    }

    /// About how many bytes it makes as text.
    pub fn estimate(&self) -> usize {
        (1 + self.rows) * self.columns.len() * CELL_BYTES
    }
}

/// About what a cell takes as text.
const CELL_BYTES: usize = 24;

fn label(quantity: &Quantity, per_h: bool, per_sound_horizon: bool) -> String {
    column_name(quantity, &Unit::dimensionless(), per_h, per_sound_horizon)
}
