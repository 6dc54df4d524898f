//! The numerical accuracy that an answer states.

use crate::expansion::History;
use crate::quantity::{Inverse, Quantity, Scale, Tolerance};

/// The stated error of a column, for a condition κ ≤ 1.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct StatedAccuracy {
    /// Relative error.
    pub relative: Option<f64>,
    /// Error in the unit of the column.
    pub absolute: Option<f64>,
    /// What stands behind it.
    pub basis: Basis,
}

/// What stands behind a stated accuracy.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Basis {
    /// The tables of the model were compared with direct evaluation when they were built.
    Checked,
    /// A few rounded operations on the given numbers, and nothing else.
    Bound,
}

/// 5/ln 10: magnitudes for a relative error of a distance.
const MAGNITUDES: f64 = 2.171_472_409_516_259;

/// The larger of the catalogue's tolerance and what the checked errors of the
/// tables make, for values given as `from`; in the catalogue's unit.
pub(super) fn stated(history: &History, from: Option<&Quantity>, to: &Quantity) -> StatedAccuracy {
    let tables = history.accuracy();
    let through = from
        .filter(|from| from.name != "redshift")
        .and_then(|from| from.table_error);
    let inverse_error = match from.and_then(|from| from.inverse.as_ref()) {
        Some(Inverse::Solved { .. } | Inverse::Table { .. }) => {
            through.map_or(0.0, |error| error(&tables))
        }
        _ => 0.0,
    };
    let own = to.table_error.map_or(0.0, |error| error(&tables));
    let basis = if own == 0.0 && inverse_error == 0.0 && to.table_error.is_none() && closed(to) {
        Basis::Bound
    } else {
        Basis::Checked
    };
    match to.tolerance {
        // One unit in the last place of a modulus up to 128 belongs to the promise.
        Tolerance::Absolute(tolerance) => {
            let tolerance = tolerance + 64.0 * f64::EPSILON;
            let error = own + MAGNITUDES * inverse_error;
            StatedAccuracy {
                relative: None,
                absolute: Some(tolerance.max(error)),
                basis,
            }
        }
        Tolerance::Relative(tolerance)
        | Tolerance::LargerTerm {
            relative: tolerance,
            ..
        } => StatedAccuracy {
            relative: Some(tolerance.max(own + inverse_error)),
            absolute: None,
            basis,
        },
    }
}

/// Quantities that are a closed form in redshift alone.
fn closed(quantity: &Quantity) -> bool {
    quantity.forward.wanted == crate::expansion::Wanted::default()
        && (matches!(quantity.inverse, Some(Inverse::Direct { .. }))
            || quantity.name == "time_dilation")
}

impl StatedAccuracy {
    /// The same in the unit of a column.
    pub(super) fn scaled(self, scale: &Scale) -> StatedAccuracy {
        StatedAccuracy {
            absolute: self
                .absolute
                .map(|error| scale.apply_difference(error).abs()),
            ..self
        }
    }
}
