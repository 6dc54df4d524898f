//! Round trips through the service's own conversion.

use proptest::prelude::*;
use redfathom::expansion::History;
use redfathom::jobs::{Branch, Conversion, Output, Source, convert};
use redfathom::quantity::{Quantity, named};

use super::models::{config, defined, histories, inside, on_references, redshifts};

fn converted(
    history: &History,
    from: &'static Quantity,
    to: &'static Quantity,
    values: &[f64],
) -> Vec<Vec<f64>> {
    let unit = from.default_unit();
    let source = Source {
        quantity: from,
        values,
        unit,
        per_h: false,
        branch: Branch::All,
    };
    let conversion = Conversion {
        history,
        from: source,
        to: vec![Output::plain(to)],
        future: false,
    };
    let mut columns = convert(&conversion).unwrap().columns;
    let column = columns.remove(0);
    column
        .branches
        .into_iter()
        .map(|branch| branch.values)
        .collect()
}

/// From redshift to a quantity and back on some branch, to what rounding of the quantity leaves of it.
fn round_trips(history: &History, redshifts: &[f64]) {
    let redshift = named("redshift").unwrap();
    let redshifts: Vec<f64> = inside(history, redshifts)
        .into_iter()
        .filter(|z| *z > 1e-9 && *z < 1e8)
        .collect();
    for quantity in defined(history).filter(|quantity| quantity.inverse.is_some()) {
        let values = converted(history, redshift, quantity, &redshifts).remove(0);
        let back = converted(history, quantity, redshift, &values);
        for (row, z) in redshifts.iter().enumerate() {
            let value = values[row];
            if !value.is_finite() {
                continue;
            }
            // By how much z must move before the value does, with room for χ/|tan χ|: 32 ulp of it.
            let frame = redfathom::quantity::Frame::of(history);
            let slope_over = |step: f64| {
                (quantity.at(z + step, &frame) - quantity.at(z - step, &frame)).abs() / (2.0 * step)
            };
            // The nearer one too: a volume hardly grows in the last stretch before an antipode.
            let slope = slope_over(1e-4 * z).min(slope_over(1e-7 * z));
            let condition = frame.transverse_condition(&history.epoch(*z)).max(1.0);
            let noise = 32.0 * f64::EPSILON * condition;
            let spread = noise * (value.abs().max(4.0 * f64::EPSILON) / slope + z);
            // Where the value hardly fixes z, or a turning point is near, other tests look.
            if spread.is_nan() || spread > 1e-4 * z {
                continue;
            }
            let best = back
                .iter()
                .map(|branch| (branch[row] - z).abs())
                .fold(f64::INFINITY, f64::min);
            assert!(
                best <= spread,
                "{} of z = {z:e} comes back {best:e} off, not {spread:e}",
                quantity.name
            );
        }
    }
}

proptest! {
    #![proptest_config(config())]

    #[test]
    fn conversions_come_back(history in histories(), redshifts in redshifts()) {
        round_trips(&history, &redshifts);
    }
}

#[test]
fn conversions_come_back_under_the_references() {
    on_references(round_trips);
}
