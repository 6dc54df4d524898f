//! The answer of a conversion as JSON.

use super::super::model::ModelEcho;
use super::super::service::{SERVICE, Service};
use super::super::written::Written;
use crate::jobs::{Basis, Column, Converted, Remark, StatedAccuracy};
use crate::tables::Given;
use serde::Serialize;

/// Writes the answer; the numbers follow when it is sent.
pub fn written(model: &ModelEcho<'_>, from: &Given, converted: Converted) -> Written {
    let names: Vec<&'static str> = converted
        .columns
        .iter()
        .map(|column| column.quantity.name)
        .collect();
    let mut out = Written::default();
    let branches = converted.branches.iter().map(|range| Branch {
        branch: range.branch,
        redshift: [range.redshift.0, range.redshift.1],
    });
    out.open_object(&Head {
        model,
        service: SERVICE,
        from: FromEcho {
            quantity: from.quantity.name,
            unit: from.unit.text(),
            per_h: from.per_h.then_some(true),
        },
        branches: branches.collect(),
    });
    out.text(",\"columns\":{");
    for (number, column) in converted.columns.into_iter().enumerate() {
        out.text(if number == 0 { "\"" } else { ",\"" });
        out.text(column.quantity.name);
        out.text("\":");
        write_column(&mut out, column);
    }
    out.text("},\"remarks\":");
    let remarks = converted
        .remarks
        .first
        .iter()
        .map(|remark| RemarkWritten::of(remark, &names));
    out.json(&remarks.collect::<Vec<_>>());
    out.text(",\"remark_counts\":");
    let counts = converted
        .remarks
        .counts
        .iter()
        .map(|(code, rows)| RemarkCount {
            code: code.name(),
            rows: *rows,
        });
    out.json(&counts.collect::<Vec<_>>());
    out.text("}\n");
    out
}

/// A column: what it is first, then its numbers.
fn write_column(out: &mut Written, column: Column) {
    out.open_object(&ColumnHead {
        unit: column.unit.text(),
        per_h: column.per_h.then_some(true),
        per_sound_horizon: column.per_sound_horizon,
        accuracy: Accuracy::of(column.accuracy),
    });
    out.text(",\"values\":[");
    out.numbers(column.values);
    out.text("]");
    if !column.branches.is_empty() {
        out.text(",\"branches\":[");
        for (number, branch) in column.branches.into_iter().enumerate() {
            out.text(if number == 0 { "" } else { "," });
            out.text(&format!("{{\"branch\":{},\"values\":[", branch.branch));
            out.numbers(branch.values);
            out.text("]}");
        }
        out.text("]");
    }
    out.text("}");
}

#[derive(Serialize)]
struct Head<'a> {
    model: &'a ModelEcho<'a>,
    service: Service,
    from: FromEcho<'a>,
    #[serde(skip_serializing_if = "Vec::is_empty")]
    branches: Vec<Branch>,
}

#[derive(Serialize)]
struct FromEcho<'a> {
    quantity: &'static str,
    unit: &'a str,
    #[serde(skip_serializing_if = "Option::is_none")]
    per_h: Option<bool>,
}

#[derive(Serialize)]
struct Branch {
    branch: u32,
    redshift: [f64; 2],
}

#[derive(Serialize)]
struct ColumnHead<'a> {
    unit: &'a str,
    #[serde(skip_serializing_if = "Option::is_none")]
    per_h: Option<bool>,
    #[serde(skip_serializing_if = "Option::is_none")]
    per_sound_horizon: Option<f64>,
    accuracy: Accuracy,
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
