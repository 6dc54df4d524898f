//! The same request written as a query.

use super::super::code::Code;
use super::super::fault::{Fault, Place};
use super::super::model::Model;
use super::super::name_or::NameOr;
use super::super::numbers::Numbers;
use super::super::query::{Query, boolean, cut, number};
use super::request::{Branch, ConvertRequest, From, OutputRequest};
use crate::quantity::{QUANTITIES, Quantity};
use std::borrow::Cow;

/// How many values a query may have.
pub const MOST_VALUES: usize = 1000;

impl ConvertRequest {
    /// Reads the parameters of a conversion.
    ///
    /// # Errors
    /// What the query itself can be wrong about; the rest shows when it is resolved.
    pub fn of_query(mut query: Query<'_>) -> Result<ConvertRequest, Fault> {
        let model = Model::of_query(&mut query)?;
        let unit = query.take("unit").map(Cow::into_owned);
        let branch = query.take("branch").map(|word| branch(&word)).transpose()?;
        let to = query.take("to").map(|list| outputs(&list)).transpose()?;
        let future = query
            .take("future")
            .map(|word| boolean("future", &word))
            .transpose()?;
        let invertible = |key: &str| invertible().any(|quantity| quantity.name == key);
        let (given, second) = (query.take_any(invertible), query.take_any(invertible));
        query.finish(known())?;
        let (quantity, list) = match (given, second) {
            (Some(given), None) => given,
            (None, _) => {
                let detail = "no quantity is given, as in redshift=0.5";
                return Err(Fault::new(Code::MissingField, detail).parameter("redshift"));
            }
            (Some((one, _)), Some((other, _))) => {
                let detail = format!(
                    "\"{one}\" and \"{other}\" are given; convert from one quantity at a time"
                );
                return Err(Fault::new(Code::MalformedQuery, detail).parameter(other));
            }
        };
        let values = Numbers(values(&quantity, &list)?);
        let from = From {
            quantity: quantity.into_owned(),
            values,
            unit,
            per_h: None,
            branch,
        };
        Ok(ConvertRequest {
            model,
            from,
            to,
            future,
        })
    }
}

/// The name of the query parameter behind a pointer of the body.
pub fn as_parameter(fault: Fault, quantity: &str) -> Fault {
    let Place::Pointer(pointer) = &fault.place else {
        return fault;
    };
    let mut segments = pointer.split('/').skip(1);
    let name = match (segments.next(), segments.next()) {
        (Some("from"), Some("unit" | "per_h")) => "unit".to_owned(),
        (Some("from"), Some("branch")) => "branch".to_owned(),
        (Some("from"), _) => quantity.to_owned(),
        (Some("model"), Some(first)) => {
            let member = std::iter::once(first).chain(segments);
            // An element of a list has no parameter of its own.
            let names = member.filter(|name| name.parse::<usize>().is_err());
            names.collect::<Vec<_>>().join(".")
        }
        (Some(first), _) => first.to_owned(),
        (None, _) => return fault,
    };
    fault.parameter(name)
}

fn invertible() -> impl Iterator<Item = &'static Quantity> {
    QUANTITIES
        .iter()
        .filter(|quantity| quantity.inverse.is_some())
}

fn known() -> impl Iterator<Item = &'static str> {
    let plain = ["to", "unit", "branch", "future", "format"];
    let quantities = invertible().map(|quantity| quantity.name);
    plain
        .into_iter()
        .chain(Model::parameters())
        .chain(quantities)
}

fn values(quantity: &str, list: &str) -> Result<Vec<f64>, Fault> {
    let count = 1 + list.bytes().filter(|byte| *byte == b',').count();
    if count > MOST_VALUES {
        let detail =
            format!("{count} values are given, a query may have {MOST_VALUES}; send more by POST");
        return Err(Fault::new(Code::TooManyValues, detail).parameter(quantity));
    }
    let value = |text| match text {
        "null" => Ok(f64::NAN),
        text => number(quantity, text),
    };
    list.split(',').map(value).collect()
}

fn branch(word: &str) -> Result<Branch, Fault> {
    let number = || Branch::numbered(word.parse().ok()?);
    Branch::named(word).or_else(number).ok_or_else(|| {
        let detail = format!("there is no branch \"{}\"", cut(word));
        Fault::new(Code::OutOfRange, detail)
            .parameter("branch")
            .value(word)
            .allowed("near, far, all or a number from 1")
    })
}

/// A list such as `age:Myr,comoving_distance:Mpc:per_h`; commas never stand in a unit.
fn outputs(list: &str) -> Result<Vec<NameOr<OutputRequest>>, Fault> {
    list.split(',').map(output).collect()
}

fn output(text: &str) -> Result<NameOr<OutputRequest>, Fault> {
    let mut parts = text.split(':');
    let quantity = parts.next().unwrap_or_default().to_owned();
    let mut output = OutputRequest {
        quantity,
        unit: None,
        per_h: None,
        per_sound_horizon: None,
    };
    for part in parts {
        match part {
            "per_h" if output.per_h.is_none() => output.per_h = Some(true),
            "per_sound_horizon" if output.per_sound_horizon.is_none() => {
                output.per_sound_horizon = Some(super::request::PerSoundHorizon::Own(true));
            }
            unit if output.unit.is_none() && !unit.is_empty() => {
                output.unit = Some(unit.to_owned())
            }
            _ => {
                let detail = format!(
                    "\"{}\" is not of the form quantity, quantity:unit or quantity:unit:per_h",
                    cut(text)
                );
                return Err(Fault::new(Code::MalformedQuery, detail)
                    .parameter("to")
                    .value(text));
            }
        }
    }
    Ok(NameOr::Object(output))
}
