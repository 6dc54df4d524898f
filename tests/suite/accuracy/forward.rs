//! From redshift to every quantity.

use redfathom::quantity::{Frame, QUANTITIES, Quantity};

use super::errors::Row;
use super::references::{Cell, Reference, Table, limited, redshift_alone, whole};
use super::report::Report;

/// Values that are not compared: quantity, model, |z| up to which, reason.
const EXEMPTIONS: &[(&str, &str, f64, &str)] = &[
    ("redshift_drift", "pure-radiation", 1e-1, STANDSTILL),
    ("velocity_drift", "pure-radiation", 1e-1, STANDSTILL),
];
const STANDSTILL: &str = "no temperature and Hubble constant give a radiation density of exactly 1: \
    E is 1 + 3e-17 today, which the difference shows as z → 0";

pub(super) fn is_exempt(quantity: &str, model: &str, redshift: f64) -> bool {
    let mut exempt = EXEMPTIONS.iter();
    exempt.any(|(name, under, below, _)| {
        (*name, *under) == (quantity, model) && redshift.abs() <= *below
    })
}

/// Compares every quantity of one model with all its references.
fn compare(model: &Reference, report: &mut Report) {
    let frame = Frame::of(&model.history);
    for quantity in QUANTITIES {
        if let Some(reason) = model.without.get(quantity.name) {
            let has_value = quantity.at(0.5_f64.min(model.range.1), &frame).is_finite();
            if has_value && (quantity.undefined)(&model.spec).is_none() {
                report.fail(format!(
                    "{} under {} has a value, but: {reason}",
                    quantity.name, model.name
                ));
            }
            continue;
        }
        if let Some(column) = model.table.column(quantity.name) {
            compare_column(model, quantity, &model.table, column, report);
        } else if let Some(column) = redshift_alone().column(quantity.name) {
            compare_column(model, quantity, redshift_alone(), column, report);
        } else {
            report.fail(format!(
                "{} under {} has no reference",
                quantity.name, model.name
            ));
        }
    }
}

fn compare_column(
    model: &Reference,
    quantity: &Quantity,
    table: &Table,
    column: usize,
    report: &mut Report,
) {
    let frame = Frame::of(&model.history);
    let (low, high) = model.range;
    for (redshift, cells) in table
        .rows
        .iter()
        .filter(|row| (low..=high).contains(&row.0))
    {
        if *redshift < 0.0 && !quantity.future {
            continue;
        }
        if is_exempt(quantity.name, &model.name, *redshift) {
            continue;
        }
        let value = quantity.at(*redshift, &frame);
        let row = Row {
            model,
            redshift: *redshift,
            cells,
        };
        match &cells[column] {
            Cell::Absent => {
                report.fail(format!(
                    "{} under {} has no reference at z = {redshift:e}",
                    quantity.name, model.name
                ));
            }
            Cell::Divergent if value.is_finite() => {
                report.fail(format!(
                    "{} under {} is {value} at z = {redshift:e}",
                    quantity.name, model.name
                ));
            }
            Cell::Divergent => {}
            Cell::Value { text, condition } => {
                let error = row.error(quantity, value, (text, *condition));
                let share = if error.error == 0.0 {
                    0.0
                } else {
                    error.error / error.allowed
                };
                let figure = format!(
                    "error {:.2e}, relative {:.2e}, κ {:.3}",
                    error.error,
                    error.error / error.reference.abs(),
                    error.condition
                );
                report.take(quantity.name, &model.name, *redshift, share, &figure);
            }
        }
    }
}

#[test]
fn every_quantity_under_every_model_keeps_its_tolerance() {
    let mut report = Report::default();
    for model in whole() {
        assert_eq!(model.history.range(), model.range, "{}", model.name);
        compare(model, &mut report);
    }
    report.conclude("forward");
}

#[test]
fn models_that_bounce_or_turn_around_keep_it_too() {
    let mut report = Report::default();
    for model in limited() {
        let (low, high) = model.history.range();
        assert!(
            low <= model.range.0 && high >= model.range.1,
            "{}: {low} … {high}",
            model.name
        );
        compare(model, &mut report);
    }
    report.conclude("forward, limited range");
}
