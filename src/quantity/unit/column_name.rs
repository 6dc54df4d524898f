//! The name of a column in a table.

use super::Unit;
use crate::quantity::Quantity;

/// The quantity and its unit in lower case: powers appended, products joined by
/// `_`, all divisors after one `_per_`; then `_per_h` or `_per_sound_horizon`.
///
/// `luminosity_distance_mpc`, `hubble_parameter_km_per_s_mpc`, `redshift`.
#[must_use]
pub fn column_name(
    quantity: &Quantity,
    unit: &Unit,
    per_h: bool,
    per_sound_horizon: bool,
) -> String {
    let mut name = quantity.name.to_owned();
    let part = |positive: bool| {
        let of_sign = unit
            .0
            .factors
            .iter()
            .filter(move |factor| (factor.power > 0) == positive);
        let words: Vec<String> = of_sign
            .map(|factor| word(&factor.symbol, factor.power.unsigned_abs()))
            .collect();
        words.join("_")
    };
    let (over, under) = (part(true), part(false));
    if !over.is_empty() {
        name.push('_');
        name.push_str(&over);
    }
    if !under.is_empty() {
        name.push_str("_per_");
        name.push_str(&under);
    }
    if per_h {
        name.push_str("_per_h");
    } else if per_sound_horizon {
        name.push_str("_per_sound_horizon");
    }
    name
}

fn word(symbol: &str, power: u32) -> String {
    let symbol = if symbol == "%" {
        "percent".to_owned()
    } else {
        symbol.to_ascii_lowercase()
    };
    if power == 1 {
        symbol
    } else {
        format!("{symbol}{power}")
    }
}
