//! The stated accuracy of conversions that begin with another quantity than redshift.

use redfathom::jobs::{Branch, Conversion, Output, Source, convert};
use redfathom::quantity::{Frame, QUANTITIES, Quantity};

use super::decimal::difference;
use super::forward::is_exempt;
use super::references::{Cell, Reference, Table, redshift_alone, whole};
use super::report::Report;

/// The given value is rounded to a double: half a unit, relative.
const HALF_UNIT: f64 = f64::EPSILON / 2.0;
/// Beyond this condition of the whole way a value is remarked upon, not promised.
const WORST_CONDITION: f64 = 1e6;

/// Below this |d ln y/d ln z| the value hardly knows its redshift, and differences of it are noise.
const SHALLOWEST: f64 = 1e-7;

/// The column of a quantity, among a model's or those of the redshift alone.
fn find<'a>(model: &'a Reference, name: &str) -> Option<(&'a Table, usize)> {
    [&model.table, redshift_alone()]
        .into_iter()
        .find_map(|table| Some((table, table.column(name)?)))
}

fn cell((table, column): (&Table, usize), z: f64) -> Option<(&str, f64)> {
    let (_, cells) = table.rows.iter().find(|row| row.0 == z)?;
    match &cells[column] {
        Cell::Value { text, condition } => Some((text, *condition)),
        _ => None,
    }
}

/// d ln y / d ln z.
fn exponent(quantity: &Quantity, z: f64, frame: &Frame) -> f64 {
    let (low, high) = (z * (1.0 - 1e-5), z * (1.0 + 1e-5));
    let (below, above) = (quantity.at(low, frame), quantity.at(high, frame));
    if quantity.unit == "mag" {
        // Of the distance inside, whose magnitudes count.
        return (above - below) / 2e-5 * std::f64::consts::LN_10 / 5.0;
    }
    (above / below - 1.0) / 2e-5
}

fn through(model: &Reference, from: &'static Quantity, report: &mut Report) {
    let Some(given) = find(model, from.name) else {
        return;
    };
    let rows = model
        .table
        .rows
        .iter()
        .map(|row| row.0)
        .filter(|z| *z > 1e-9 && *z < 1e8);
    let rows: Vec<(f64, &str, f64)> = rows
        .filter_map(|z| cell(given, z).map(|(text, condition)| (z, text, condition)))
        .collect();
    let values: Vec<f64> = rows.iter().map(|row| row.1.parse().unwrap()).collect();
    let defined = QUANTITIES
        .iter()
        .filter(|quantity| (quantity.undefined)(&model.spec).is_none());
    let conversion = Conversion {
        history: &model.history,
        from: Source {
            quantity: from,
            values: &values,
            unit: from.default_unit(),
            per_h: false,
            branch: Branch::All,
        },
        to: defined.map(Output::plain).collect(),
        future: false,
    };
    let columns = convert(&conversion).unwrap().columns;
    let frame = Frame::of(&model.history);
    for (row, (z, _, from_condition)) in rows.iter().enumerate() {
        let off = |branch: &usize| (columns[0].branches[*branch].values[row] - z).abs();
        let branches = 0..columns[0].branches.len();
        let Some(branch) = branches
            .filter(|branch| off(branch).is_finite())
            .min_by(|a, b| off(a).total_cmp(&off(b)))
        else {
            continue;
        };
        let steepness = exponent(from, *z, &frame);
        if steepness.abs() < SHALLOWEST {
            continue;
        }
        for column in &columns {
            let name = column.quantity.name;
            let Some(target) = find(model, name).and_then(|place| cell(place, *z)) else {
                continue;
            };
            let value = column.branches[branch].values[row];
            let reference: f64 = target.0.parse().unwrap();
            let passed = (exponent(column.quantity, *z, &frame) / steepness).abs();
            let condition = target.1 + passed * from_condition;
            let usable = condition < WORST_CONDITION && reference != 0.0;
            if !usable || is_exempt(name, &model.name, *z) {
                continue;
            }
            // A modulus counts in magnitudes per relative error of its distance.
            let scale = if column.quantity.unit == "mag" {
                2.2
            } else {
                reference.abs()
            };
            let size = if from.unit == "mag" {
                values[row].abs().max(4.0)
            } else {
                1.0
            };
            let stated = column
                .accuracy
                .absolute
                .or(column.accuracy.relative.map(|share| share * scale))
                .unwrap();
            let bound = stated * condition + HALF_UNIT * size * passed * scale;
            let error = difference(value, target.0).abs();
            let figure = format!("error {error:.2e}, bound {bound:.2e}, κ {condition:.1}");
            report.take(
                &format!("{} to {name}", from.name),
                &model.name,
                *z,
                error / bound,
                &figure,
            );
        }
    }
}

#[test]
fn the_stated_accuracy_holds_through_inverses() {
    let mut report = Report::default();
    for model in whole() {
        for from in QUANTITIES
            .iter()
            .filter(|quantity| quantity.inverse.is_some())
        {
            if (from.undefined)(&model.spec).is_none()
                && (from.name, model.name.as_str()) != ("hubble_parameter", "de-sitter")
            {
                through(model, from, &mut report);
            }
        }
    }
    report.conclude("stated accuracy through inverses");
}
