//! Units of a request: read, compared with their quantity, and what was meant by a wrong one.

use super::super::code::Code;
use super::super::fault::Fault;
use super::super::nearest::nearest;
use crate::quantity::{HubbleScaling, Quantity, Unit, UnitFault};

/// The unit that `text` names, or the one of the catalogue.
///
/// # Errors
/// `unknown_unit`, or `unit_mismatch` where it measures something else, with the usual ones.
pub(super) fn unit(
    quantity: &Quantity,
    text: Option<String>,
    pointer: impl Fn() -> String,
) -> Result<Unit, Fault> {
    let Some(text) = text else {
        return Ok(quantity.default_unit());
    };
    let unit = Unit::parse(&text).and_then(|unit| unit.to(&quantity.default_unit()).map(|_| unit));
    unit.map_err(|fault| {
        let mut refused = unit_fault(&fault).at(pointer());
        refused.detail += &hint(quantity, &text);
        let usual: Vec<_> = usual(quantity).collect();
        let allowed = format!(
            "a VOUnits 1.1 string that measures what {} does, such as {}",
            quantity.unit,
            usual.join(", ")
        );
        refused.value(text).allowed(allowed)
    })
}

/// The fault of a unit, without its place.
pub(super) fn unit_fault(fault: &UnitFault) -> Fault {
    let code = match fault {
        UnitFault::Mismatch { .. } => Code::UnitMismatch,
        UnitFault::Malformed { .. } | UnitFault::Unknown { .. } => Code::UnknownUnit,
    };
    Fault::new(code, fault.to_string())
}

/// The end of a sentence that offers what may have been meant.
fn hint(quantity: &Quantity, text: &str) -> String {
    let fits = |text: &str| {
        let unit = Unit::parse(text).ok();
        unit.is_some_and(|unit| unit.to(&quantity.default_unit()).is_ok())
    };
    let has_h = quantity.scaling != HubbleScaling::None;
    let over_h = text.strip_suffix("/h").or(text.strip_prefix("h-1 "));
    if let Some(unit) = over_h.filter(|unit| has_h && fits(unit)) {
        return format!("; for {unit} over h write the unit {unit} and per_h, as in {unit}:per_h");
    }
    let respelt = respelt(text);
    if respelt != text && fits(&respelt) {
        return format!("; write {respelt}");
    }
    match nearest(&respelt, usual(quantity)) {
        Some(unit) => format!("; did you mean \"{unit}\"?"),
        None => String::new(),
    }
}

/// The text with powers and symbols as VOUnits spells them: `Gpc3` becomes `Gpc**3`.
fn respelt(text: &str) -> String {
    let mut out = String::with_capacity(2 * text.len());
    let mut last = ' ';
    for letter in text.replace('^', "").chars() {
        let begins_power = letter.is_ascii_digit() || letter == '-';
        if begins_power && last.is_ascii_alphabetic() {
            out.push_str("**");
        }
        out.push(letter);
        last = letter;
    }
    let words = SPELLINGS
        .iter()
        .fold(out, |out, (wrong, right)| out.replace(wrong, right));
    match words.split('/').collect::<Vec<_>>().as_slice() {
        // One quotient at most.
        [first, rest @ ..] if rest.len() > 1 => format!("{first}/({})", rest.join(".")),
        _ => words,
    }
}

/// Symbols in use beside those of VOUnits.
const SPELLINGS: [(&str, &str); 3] = [("Msun", "solMass"), ("ly", "lyr"), ("lyrr", "lyr")];

/// The usual units of a quantity.
fn usual(quantity: &Quantity) -> impl Iterator<Item = &'static str> {
    let own = quantity.default_unit();
    let fits = move |text: &&str| Unit::parse(text).is_ok_and(|unit| unit.to(&own).is_ok());
    USUAL.into_iter().filter(fits)
}

/// Units that papers give these quantities in.
const USUAL: [&str; 29] = [
    "1",
    "%",
    "Gyr",
    "Myr",
    "kyr",
    "yr",
    "s",
    "Mpc",
    "Gpc",
    "kpc",
    "pc",
    "Glyr",
    "Mlyr",
    "lyr",
    "km",
    "m",
    "Gpc**3",
    "Mpc**3",
    "km/s",
    "m/s",
    "km/(s.Mpc)",
    "Gyr**-1",
    "mag",
    "K",
    "kpc/arcsec",
    "Mpc/deg",
    "Mpc**3/sr",
    "kg.m**-3",
    "solMass/Mpc**3",
];

#[cfg(test)]
#[allow(clippy::unwrap_used)]
mod tests {
    use super::*;
    use crate::quantity::{QUANTITIES, named};

    #[test]
    fn what_was_meant_is_offered() {
        for (quantity, text, words) in [
            ("age", "Gyrs", "did you mean \"Gyr\"?"),
            ("comoving_distance", "Gly", "write Glyr"),
            ("comoving_distance", "MPC", "did you mean \"Mpc\"?"),
            ("comoving_distance", "Mpc/h", "the unit Mpc and per_h"),
            ("comoving_volume", "Gpc3", "write Gpc**3"),
            ("comoving_volume", "Gpc^3", "write Gpc**3"),
            ("hubble_parameter", "km/s/Mpc", "write km/(s.Mpc)"),
            ("critical_density", "Msun/Mpc**3", "write solMass/Mpc**3"),
        ] {
            let fault = unit(named(quantity).unwrap(), Some(text.to_owned()), String::new);
            let detail = fault.unwrap_err().detail;
            assert!(detail.contains(words), "{text}: {detail}");
        }
    }

    #[test]
    fn every_quantity_has_usual_units() {
        for quantity in QUANTITIES {
            let spellings = usual(quantity).count();
            let rare = ["yr**-1", "cm/(s.yr)"].contains(&quantity.unit);
            assert!(spellings > 0 || rare, "{}", quantity.name);
        }
    }
}
