//! Round trips through every inverse, on every branch.

use redfathom::quantity::{Frame, Inverter, QUANTITIES, Quantity, Solution, Tolerance};

use super::decimal::ulp;
use super::references::{Reference, whole};
use super::report::Report;

/// Values may miss by this many units in the last place, besides the redshift's own.
const ULPS: f64 = 4.0;

/// Inverses that are not tried: quantity, model, reason.
const EXEMPTIONS: &[(&str, &str, &str)] =
    &[("hubble_parameter", "de-sitter", "the rate is constant")];

/// |dy/dz|, the steeper side of a kink, to a few per cent.
fn slope(quantity: &Quantity, z: f64, model: &Reference, frame: &Frame) -> f64 {
    if quantity.name == "distance_modulus" {
        let distance = redfathom::quantity::named("luminosity_distance").unwrap();
        return 5.0 / std::f64::consts::LN_10 * slope(distance, z, model, frame)
            / distance.at(z, frame);
    }
    let step = 1e-5 * (1.0 + z);
    let lowest = if quantity.future { model.range.0 } else { 0.0 };
    let (low, high) = ((z - step).max(lowest), (z + step).min(model.range.1));
    let here = quantity.at(z, frame);
    let below = if low < z {
        (here - quantity.at(low, frame)) / (z - low)
    } else {
        0.0
    };
    let above = if high > z {
        (quantity.at(high, frame) - here) / (high - z)
    } else {
        0.0
    };
    below.abs().max(above.abs())
}

/// What a value may differ from the one that was inverted.
fn allowed(quantity: &Quantity, value: f64, z: f64, model: &Reference, frame: &Frame) -> f64 {
    let size = match quantity.tolerance {
        Tolerance::Absolute(_) => value.abs().max(4.0),
        _ => value,
    };
    ULPS * ulp(size) + slope(quantity, z, model, frame) * ulp(z)
}

fn round_trips(model: &Reference, quantity: &'static Quantity, report: &mut Report) {
    let frame = Frame::of(&model.history);
    let skipped = EXEMPTIONS
        .iter()
        .any(|(name, under, _)| (*name, *under) == (quantity.name, &model.name));
    if skipped || (quantity.undefined)(&model.spec).is_some() {
        return;
    }
    let Some(inverter) = Inverter::prepare(&frame, quantity, true) else {
        return;
    };
    let branches = inverter.branches();
    let redshifts = model.table.rows.iter().map(|row| row.0);
    let redshifts: Vec<f64> = redshifts.filter(|z| *z >= 0.0 || quantity.future).collect();
    let values: Vec<f64> = redshifts.iter().map(|z| quantity.at(*z, &frame)).collect();
    // What cannot be told from the end of the range may lie beyond it.
    let farthest = quantity.at(model.range.1, &frame);
    let at_the_end = |value: f64| (value - farthest).abs() <= ULPS * ulp(farthest);
    let mut reached = vec![false; values.len()];
    let mut solution = Solution::default();
    for (number, (low, high)) in branches.iter().enumerate() {
        inverter.solve(&values, number, &mut solution);
        for (row, found) in solution.redshifts.iter().enumerate() {
            let (z, value) = (redshifts[row], values[row]);
            if !value.is_finite() || found.is_nan() {
                continue;
            }
            if !is_inside(*found, *low, *high) && !at_the_end(value) {
                report.fail(format!(
                    "{} under {}: {found:e} is outside branch {number}",
                    quantity.name, model.name
                ));
            }
            reached[row] |= (*low..=*high).contains(&z);
            let error = (quantity.at(*found, &frame) - value).abs();
            let share = error / allowed(quantity, value, *found, model, &frame);
            let figure = format!("z back {found:e}, value off {:.1} ulp", error / ulp(value));
            report.take(quantity.name, &model.name, z, share, &figure);
        }
    }
    for (row, reached) in reached.iter().enumerate() {
        if values[row].is_finite() && !reached && !at_the_end(values[row]) {
            let z = redshifts[row];
            report.fail(format!(
                "{} under {}: no redshift for that of z = {z:e}",
                quantity.name, model.name
            ));
        }
    }
}

/// Inside a branch, or beyond an end by what rounding makes of a turning point.
fn is_inside(z: f64, low: f64, high: f64) -> bool {
    z >= low - 1e-7 * (1.0 + low.abs()) && z <= high + 1e-6 * (1.0 + high.abs())
}

#[test]
fn values_come_back_from_every_branch() {
    let mut report = Report::default();
    for model in whole() {
        for quantity in QUANTITIES
            .iter()
            .filter(|quantity| quantity.inverse.is_some())
        {
            round_trips(model, quantity, &mut report);
        }
    }
    report.conclude("inverse");
}
