//! A hash over the bits of many results, compared with a checked-in one.
//!
//! `tests/run` runs it a second time with the processor's fused and wide
//! instructions hidden from the platform's library.

use redfathom::expansion::History;
use redfathom::model::PUBLISHED_SETS;
use redfathom::quantity::{Frame, Inverter, QUANTITIES, Solution};

use crate::accuracy::references::{limited, whole};

/// Changes only together with a change of results: say in the commit which and why.
const EXPECTED: u64 = 0xd698_0ba6_b14f_9f85;

/// Fowler–Noll–Vo 1a of 64 bits.
struct Hash(u64);

impl Hash {
    fn take(&mut self, value: f64) {
        // One pattern for all values that are none.
        let bits = if value.is_nan() {
            f64::NAN.to_bits()
        } else {
            value.to_bits()
        };
        for byte in bits.to_le_bytes() {
            self.0 = (self.0 ^ u64::from(byte)).wrapping_mul(0x100_0000_01b3);
        }
    }

    fn take_history(&mut self, history: &History, redshifts: &[f64]) {
        let frame = Frame::of(history);
        let (low, high) = history.range();
        let redshifts: Vec<f64> = redshifts
            .iter()
            .copied()
            .filter(|z| (low..=high).contains(z))
            .collect();
        for quantity in QUANTITIES {
            let values: Vec<f64> = redshifts.iter().map(|z| quantity.at(*z, &frame)).collect();
            values.iter().for_each(|value| self.take(*value));
            let Some(inverter) = Inverter::prepare(&frame, quantity, true) else {
                continue;
            };
            let mut solution = Solution::default();
            for branch in 0..inverter.branches().len() {
                inverter.solve(&values, branch, &mut solution);
                solution
                    .redshifts
                    .iter()
                    .for_each(|value| self.take(*value));
            }
        }
        let accuracy = history.accuracy();
        for value in [
            accuracy.rate,
            accuracy.comoving,
            accuracy.lookback,
            accuracy.age,
            accuracy.conformal,
        ] {
            self.take(value);
        }
    }
}

#[test]
fn results_have_the_checked_in_bits() {
    let mut hash = Hash(0xcbf2_9ce4_8422_2325);
    for model in whole().iter().chain(limited()) {
        let redshifts: Vec<f64> = model.table.rows.iter().map(|row| row.0).collect();
        hash.take_history(&model.history, &redshifts);
    }
    let redshifts: Vec<f64> = (-9..=90)
        .map(|step| libm::pow(10.0, f64::from(step) / 10.0) - 0.1)
        .collect();
    for set in PUBLISHED_SETS {
        hash.take_history(&History::build(&set.spec().unwrap()).unwrap(), &redshifts);
    }
    assert_eq!(
        hash.0, EXPECTED,
        "the bits of results are now {:#018x}",
        hash.0
    );
}
