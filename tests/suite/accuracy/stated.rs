//! What the service says about its own accuracy.

use redfathom::expansion::{Accuracy, Epoch, History};
use redfathom::jobs::{Branch, Conversion, Output, Source, convert};
use redfathom::quantity::{QUANTITIES, named};

use super::decimal::difference;
use super::forward::is_exempt;
use super::references::{Cell, Reference, redshift_alone, whole};
use super::report::Report;

/// A condition up to which the stated figure holds unscaled.
const WELL_CONDITIONED: f64 = 1.0;

#[test]
fn the_stated_accuracy_is_never_below_the_true_error() {
    let mut report = Report::default();
    for model in whole() {
        stated(model, &mut report);
    }
    report.conclude("stated accuracy");
}

fn stated(model: &Reference, report: &mut Report) {
    let redshifts: Vec<f64> = model.table.rows.iter().map(|row| row.0).collect();
    let from = named("redshift").unwrap();
    let defined = QUANTITIES
        .iter()
        .filter(|quantity| (quantity.undefined)(&model.spec).is_none());
    let conversion = Conversion {
        history: &model.history,
        from: Source {
            quantity: from,
            values: &redshifts,
            unit: from.default_unit(),
            per_h: false,
            branch: Branch::Number(1),
        },
        to: defined.map(Output::plain).collect(),
        future: true,
    };
    for column in convert(&conversion).unwrap().columns {
        let name = column.quantity.name;
        let (table, alone) = (&model.table, redshift_alone());
        let (table, place) = match (table.column(name), alone.column(name)) {
            (Some(place), _) => (table, place),
            (None, Some(place)) => (alone, place),
            (None, None) => continue,
        };
        for (z, value) in redshifts.iter().zip(&column.values) {
            let Some((_, cells)) = table.rows.iter().find(|row| row.0 == *z) else {
                continue;
            };
            if *z < 0.0 && !column.quantity.future || is_exempt(name, &model.name, *z) {
                continue;
            }
            let Cell::Value { text, condition } = &cells[place] else {
                assert!(
                    value.is_nan(),
                    "{name} under {} at z = {z:e} is {value}",
                    model.name
                );
                continue;
            };
            let reference: f64 = text.parse().unwrap();
            if *condition > WELL_CONDITIONED || reference == 0.0 {
                continue;
            }
            let error = difference(*value, text).abs();
            let relative = column
                .accuracy
                .relative
                .map_or(0.0, |relative| relative * reference.abs());
            let bound = relative.max(column.accuracy.absolute.unwrap_or(0.0));
            let figure = format!("error {error:.2e}, stated {bound:.2e}");
            report.take(name, &model.name, *z, error / bound, &figure);
        }
    }
}

/// A table, its checked error, and the reference's quantity that shows it.
type Checked = (
    &'static str,
    fn(&Accuracy) -> f64,
    fn(&Epoch, &History) -> f64,
);

const TABLES: &[Checked] = &[
    (
        "hubble_parameter",
        |accuracy| accuracy.rate,
        |epoch, history| epoch.rate * history.spec().hubble_constant,
    ),
    (
        "comoving_distance",
        |accuracy| accuracy.comoving,
        |epoch, history| epoch.comoving * history.hubble_distance_mpc(),
    ),
    (
        "lookback_time",
        |accuracy| accuracy.lookback,
        |epoch, history| epoch.lookback * history.hubble_time_gyr(),
    ),
    (
        "age",
        |accuracy| accuracy.age,
        |epoch, history| epoch.age * history.hubble_time_gyr(),
    ),
    (
        "conformal_time",
        |accuracy| accuracy.conformal,
        |epoch, history| epoch.conformal * history.hubble_time_gyr(),
    ),
];

/// Rounding of the numbers a table is made from, which its check does not see: the catalogue's promise.
const ROUNDING: f64 = 2e-15;

#[test]
fn tables_with_too_few_nodes_say_so() {
    let mut report = Report::default();
    for model in whole() {
        for nodes in [5, 6, 7, 8, 9, 10, 12] {
            let Ok(history) = History::build_with_nodes(&model.spec, nodes) else {
                continue;
            };
            for (name, checked, at) in TABLES {
                if let Some(column) = model.table.column(name) {
                    let label = format!("{name}, {nodes} nodes");
                    compare(
                        model,
                        &history,
                        (&label, checked(&history.accuracy()), *at),
                        column,
                        &mut report,
                    );
                }
            }
        }
    }
    report.conclude("tables with too few nodes");
}

fn compare(
    model: &Reference,
    history: &History,
    (label, checked, at): (&str, f64, fn(&Epoch, &History) -> f64),
    column: usize,
    report: &mut Report,
) {
    for (z, cells) in &model.table.rows {
        let Cell::Value { text, condition } = &cells[column] else {
            continue;
        };
        let reference: f64 = text.parse().unwrap();
        if reference == 0.0 {
            continue;
        }
        let error = (difference(at(&history.epoch(*z), history), text) / reference).abs();
        let beyond = (error - ROUNDING * condition).max(0.0);
        let figure = format!("error {error:.2e}, checked {checked:.2e}");
        report.take(label, &model.name, *z, beyond / checked, &figure);
    }
}
