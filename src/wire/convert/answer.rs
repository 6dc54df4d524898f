//! The answer of a conversion as JSON.

use super::super::service::SERVICE;
use super::super::written::Written;
use crate::jobs::{Basis, BranchRange, Column, Converted, Remark, Remarks, StatedAccuracy};
use crate::tables::Given;
use serde::Serialize;

/// Writes the answer under a model that is written already; the numbers follow when it is sent.
pub fn written(model: &str, from: &Given, converted: Converted) -> Written {
    let names: Vec<&'static str> = converted
        .columns
        .iter()
        .map(|column| column.quantity.name)
        .collect();
    let mut out = Written::default();
    out.text("{\"model\":");
    out.text(model);
    out.text(",\"service\":{\"name\":\"");
    out.text(SERVICE.name);
    out.text("\",\"version\":\"");
    out.text(SERVICE.version);
    out.text("\"},\"from\":{\"quantity\":\"");
    out.text(from.quantity.name);
    out.text("\",\"unit\":");
    out.string(from.unit.text());
    out.text(if from.per_h { ",\"per_h\":true}" } else { "}" });
    if !converted.branches.is_empty() {
        out.text(",\"branches\":");
        out.json(
            &converted
                .branches
                .iter()
                .map(Branch::of)
                .collect::<Vec<_>>(),
        );
    }
    out.text(",\"columns\":{");
    for (number, column) in converted.columns.into_iter().enumerate() {
        out.text(if number == 0 { "\"" } else { ",\"" });
        out.text(column.quantity.name);
        out.text("\":");
        write_column(&mut out, column);
    }
    out.text("},\"remarks\":");
    write_remarks(&mut out, &converted.remarks, &names);
    out.text("}\n");
    out
}

fn write_remarks(out: &mut Written, remarks: &Remarks, names: &[&'static str]) {
    if remarks.counts.is_empty() {
        return out.text("[],\"remark_counts\":[]");
    }
    let listed = remarks.first.iter();
    let listed = listed.map(|remark| RemarkWritten::of(remark, names));
    out.json(&listed.collect::<Vec<_>>());
    out.text(",\"remark_counts\":");
    let counts = remarks.counts.iter().map(|(code, rows)| RemarkCount {
        code: code.name(),
        rows: *rows,
    });
    out.json(&counts.collect::<Vec<_>>());
}

/// A column: what it is first, then its numbers.
fn write_column(out: &mut Written, column: Column) {
    out.text("{\"unit\":");
    out.string(column.unit.text());
    out.text(if column.per_h { ",\"per_h\":true" } else { "" });
    if let Some(length) = column.per_sound_horizon {
        out.text(",\"per_sound_horizon\":");
        out.number(length);
    }
    let accuracy = Accuracy::of(column.accuracy);
    out.text(",\"accuracy\":{");
    for (name, figure) in [
        ("\"relative\":", accuracy.relative),
        ("\"absolute\":", accuracy.absolute),
    ] {
        if let Some(figure) = figure {
            out.text(name);
            out.number(figure);
            out.text(",");
        }
    }
    out.text("\"basis\":\"");
    out.text(accuracy.basis);
    out.text("\"},\"values\":[");
    out.numbers(column.values);
    out.text("]");
    let branches = column.branches.len();
    for (number, branch) in column.branches.into_iter().enumerate() {
        out.text(if number == 0 {
            ",\"branches\":[{"
        } else {
            "]},{"
        });
        out.text(&format!("\"branch\":{},\"values\":[", branch.branch));
        out.numbers(branch.values);
        if number + 1 == branches {
            out.text("]}]");
        }
    }
    out.text("}");
}

#[derive(Serialize)]
struct Branch {
    branch: u32,
    redshift: [f64; 2],
}

impl Branch {
    fn of(range: &BranchRange) -> Branch {
        Branch {
            branch: range.branch,
            redshift: [range.redshift.0, range.redshift.1],
        }
    }
}

/// The accuracy of a column.
#[derive(Clone, Copy, Debug, Serialize, utoipa::ToSchema)]
pub struct Accuracy {
    /// The largest relative error.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub relative: Option<f64>,
    /// The largest error in the unit of the column.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub absolute: Option<f64>,
    /// `checked`: compared with direct evaluation when the model's tables were built; `bound`: proved.
    pub basis: &'static str,
}

impl Accuracy {
    /// As written.
    pub fn of(accuracy: StatedAccuracy) -> Accuracy {
        Accuracy {
            relative: accuracy.relative,
            absolute: accuracy.absolute,
            basis: match accuracy.basis {
                Basis::Checked => "checked",
                Basis::Bound => "bound",
            },
        }
    }
}

#[derive(Serialize)]
struct RemarkWritten {
    row: usize,
    #[serde(skip_serializing_if = "Option::is_none")]
    column: Option<&'static str>,
    code: &'static str,
    #[serde(skip_serializing_if = "Option::is_none")]
    detail: Option<String>,
}

impl RemarkWritten {
    fn of(remark: &Remark, names: &[&'static str]) -> RemarkWritten {
        RemarkWritten {
            row: remark.row,
            column: remark.column.and_then(|column| names.get(column).copied()),
            code: remark.code.name(),
            detail: (!remark.detail.is_none()).then(|| remark.detail.to_string()),
        }
    }
}

#[derive(Serialize)]
struct RemarkCount {
    code: &'static str,
    rows: u64,
}
