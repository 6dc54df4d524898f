//! A value has the same bits alone, in any block, and beside any other.

use redfathom::expansion::{Epochs, Wanted};
use redfathom::jobs::{Branch, Conversion, Output, Source, convert};
use redfathom::quantity::{Block, Frame, QUANTITIES, Quantity, named};

use crate::accuracy::references::{Reference, whole};

fn same(left: f64, right: f64) -> bool {
    left.to_bits() == right.to_bits() || left.is_nan() && right.is_nan()
}

#[test]
fn rows_and_blocks_agree() {
    for model in whole() {
        let frame = Frame::of(&model.history);
        let redshifts: Vec<f64> = model.table.rows.iter().map(|row| row.0).collect();
        let mut epochs = Epochs::default();
        for quantity in QUANTITIES {
            let needed = frame.wanted(quantity.forward.wanted);
            for (wanted, block) in [(needed, 7), (Wanted::ALL, redshifts.len())] {
                for redshifts in redshifts.chunks(block) {
                    model.history.epochs(redshifts, wanted, &mut epochs);
                    let mut values = vec![0.0; redshifts.len()];
                    (quantity.forward.fill)(
                        &Block {
                            redshifts,
                            epochs: &epochs,
                        },
                        &frame,
                        &mut values,
                    );
                    for (z, value) in redshifts.iter().zip(&values) {
                        let alone = quantity.at(*z, &frame);
                        assert!(
                            same(*value, alone),
                            "{} under {} at {z:e}",
                            quantity.name,
                            model.name
                        );
                    }
                }
            }
        }
    }
}

fn converted(
    model: &Reference,
    from: &'static Quantity,
    values: &[f64],
    to: &[&'static Quantity],
) -> Vec<Vec<f64>> {
    let conversion = Conversion {
        history: &model.history,
        from: Source {
            quantity: from,
            values,
            unit: from.default_unit(),
            per_h: false,
            branch: Branch::Number(1),
        },
        to: to.iter().map(|quantity| Output::plain(quantity)).collect(),
        future: true,
    };
    convert(&conversion)
        .unwrap()
        .columns
        .into_iter()
        .map(|column| column.values)
        .collect()
}

#[test]
fn conversions_do_not_see_their_neighbours() {
    let targets = [
        named("redshift").unwrap(),
        named("luminosity_distance").unwrap(),
        named("age").unwrap(),
    ];
    for model in whole() {
        let frame = Frame::of(&model.history);
        for from in QUANTITIES
            .iter()
            .filter(|quantity| quantity.inverse.is_some())
        {
            if (from.undefined)(&model.spec).is_some() {
                continue;
            }
            let values: Vec<f64> = model
                .table
                .rows
                .iter()
                .step_by(3)
                .map(|row| from.at(row.0, &frame))
                .collect();
            let all = converted(model, from, &values, &targets);
            for (column, target) in targets.iter().enumerate() {
                let mut backwards = values.clone();
                backwards.reverse();
                let reversed = converted(model, from, &backwards, &[*target]).remove(0);
                let alone = converted(model, from, &values[2..3], &[*target]).remove(0);
                assert!(
                    same(alone[0], all[column][2]),
                    "{} under {}",
                    from.name,
                    model.name
                );
                for (one, other) in all[column].iter().zip(reversed.iter().rev()) {
                    assert!(
                        same(*one, *other),
                        "{} to {} under {}",
                        from.name,
                        target.name,
                        model.name
                    );
                }
            }
        }
    }
}
