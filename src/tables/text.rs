//! Aligned lines for a terminal: one a quantity, with unit and meaning; a block a row.

use super::Table;
use super::digits::rounded;
use crate::jobs::{Code, Remarks};
use std::fmt::Write;

/// The text in chunks, `footer` being its last line.
pub fn chunks(table: Table, footer: String) -> impl Iterator<Item = Vec<u8>> + Send + 'static {
    let widths = Widths::of(&table);
    let mut row = 0;
    let mut footer = Some(footer);
    std::iter::from_fn(move || {
        let mut out = String::new();
        while out.len() < CHUNK_BYTES && row < table.rows {
            block(&table, &widths, row, &mut out);
            row += 1;
        }
        if row == table.rows
            && let Some(footer) = footer.take()
        {
            // Writing to a String cannot fail.
            let _ = writeln!(out, "# {footer}");
        }
        (!out.is_empty()).then_some(out.into_bytes())
    })
}

const CHUNK_BYTES: usize = 64 * 1024;
/// Enough for any plot and any plan; the other formats have all digits.
pub const DIGITS: usize = 7;
/// The widest number of that many digits, as in `-1.234567e-101`.
const NUMBER_WIDTH: usize = 14;

struct Widths {
    name: usize,
    unit: usize,
}

impl Widths {
    fn of(table: &Table) -> Widths {
        let longest = |lengths: &mut dyn Iterator<Item = usize>| lengths.max().unwrap_or(0);
        Widths {
            name: longest(&mut table.columns.iter().map(|column| column.label.len())),
            unit: longest(&mut table.columns.iter().map(|column| column.unit.len())),
        }
    }
}

fn block(table: &Table, widths: &Widths, row: usize, out: &mut String) {
    for column in &table.columns {
        let value = column.values.get(row).copied().unwrap_or(f64::NAN);
        let value = if value.is_finite() {
            rounded(value, DIGITS)
        } else {
            "null".to_owned()
        };
        let unit = if column.unit == "1" { "" } else { &column.unit };
        let line = format!(
            "{:<name$}  {value:>NUMBER_WIDTH$}  {unit:<unit_width$}  {}",
            column.label,
            gist(column.meaning),
            name = widths.name,
            unit_width = widths.unit,
        );
        let _ = writeln!(out, "{}", line.trim_end());
    }
    for code in table.remarks.row_codes(row) {
        let details = details(&table.remarks, row, code);
        let _ = writeln!(out, "# {}: {}{details}", code.name(), code.meaning());
    }
    if row + 1 < table.rows {
        out.push('\n');
    }
}

/// What makes a row's remarks of one code exact, each once; empty where nothing does.
fn details(remarks: &Remarks, row: usize, code: Code) -> String {
    let start = remarks.first.partition_point(|remark| remark.row < row);
    let of_row = remarks.first.iter().skip(start);
    let of_code = of_row
        .take_while(|remark| remark.row == row)
        .filter(|remark| remark.code == code && !remark.detail.is_none());
    let mut details: Vec<String> = Vec::new();
    for detail in of_code.map(|remark| remark.detail.to_string()) {
        if !details.contains(&detail) {
            details.push(detail);
        }
    }
    match details.is_empty() {
        true => String::new(),
        false => format!(" ({})", details.join("; ")),
    }
}

/// The first clause of a sentence: a terminal is narrow.
fn gist(sentence: &str) -> &str {
    sentence.split([':', ';', '.']).next().unwrap_or(sentence)
}
