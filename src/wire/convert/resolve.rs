//! From names to the catalogue: what the request asks of the job.

use super::super::code::Code;
use super::super::fault::Fault;
use super::super::model::Model;
use super::super::name_or::NameOr;
use super::super::nearest::meant;
use super::super::query::cut;
use super::request::{Branch, ConvertRequest, From, OutputRequest, PerSoundHorizon};
use super::unit::unit;
use crate::expansion::History;
use crate::jobs::{self, Conversion, Output, PrintedEpochs, Source};
use crate::quantity::{QUANTITIES, Quantity, named};
use crate::tables::Given;

/// A request whose names are known and whose size is allowed.
#[derive(Clone, Debug)]
pub struct Asked {
    /// The model as written; absent for the default.
    pub model: Option<Model>,
    size: Size,
    /// The given column.
    pub from: Given,
    branch: jobs::Branch,
    /// The wanted columns; absent for the default ones.
    to: Option<Vec<Wanted>>,
    future: bool,
}

#[derive(Clone, Debug)]
struct Wanted {
    output: Output,
    own_sound_horizon: bool,
}

/// How many values a request may have, and values times outputs.
#[derive(Clone, Copy, Debug)]
pub struct Size {
    /// Values.
    pub values: usize,
    /// Values times outputs.
    pub results: usize,
}

/// What is answered when `to` is absent.
pub const DEFAULT_OUTPUTS: [&str; 9] = [
    "redshift",
    "age",
    "lookback_time",
    "comoving_distance",
    "luminosity_distance",
    "angular_diameter_distance",
    "distance_modulus",
    "angular_scale",
    "comoving_volume",
];

impl ConvertRequest {
    /// Finds what the names stand for.
    ///
    /// # Errors
    /// All unknown names and units at once; a request that is too large.
    pub fn resolve(self, size: Size) -> Result<Asked, Vec<Fault>> {
        let mut faults = Vec::new();
        if self.to.as_ref().is_some_and(Vec::is_empty) {
            faults.push(
                Fault::new(
                    Code::OutOfRange,
                    "\"to\" is empty; leave it out for the default outputs",
                )
                .at("/to")
                .allowed("at least one quantity"),
            );
        }
        let outputs = self.to.as_ref().map_or(DEFAULT_OUTPUTS.len(), Vec::len);
        let rows = self.from.values.0.len();
        faults.extend(size.fault(rows, outputs));
        let branch = match self.from.branch {
            None => jobs::Branch::Number(1),
            Some(Branch::Number(number)) => jobs::Branch::Number(number),
            Some(Branch::Far) => jobs::Branch::Far,
            Some(Branch::All) => jobs::Branch::All,
        };
        let from = given(self.from).map_err(|fault| faults.push(fault));
        let mut to = None;
        for (number, output) in self.to.into_iter().flatten().enumerate() {
            match wanted(output, number) {
                Ok(output) => to
                    .get_or_insert_with(|| Vec::with_capacity(outputs))
                    .push(output),
                Err(fault) => faults.push(fault),
            }
        }
        match from {
            Ok(from) if faults.is_empty() => Ok(Asked {
                model: self.model,
                size,
                from,
                branch,
                to,
                future: self.future.unwrap_or(false),
            }),
            _ => Err(faults),
        }
    }
}

impl Size {
    fn fault(self, rows: usize, outputs: usize) -> Option<Fault> {
        let detail = if rows > self.values {
            format!(
                "{rows} values are more than the {} of a request",
                self.values
            )
        } else if rows.saturating_mul(outputs) > self.results {
            format!(
                "{rows} values times {outputs} columns are more than the {} results of a request",
                self.results
            )
        } else {
            return None;
        };
        Some(
            Fault::new(Code::TooManyValues, format!("{detail}; send it in parts"))
                .at("/from/values"),
        )
    }
}

impl Asked {
    /// The job, for a model's history and its printed values.
    ///
    /// # Errors
    /// `undefined_in_model` if the model has no sound horizon, `too_many_values` if all branches
    /// together are too many.
    pub fn conversion<'a>(
        &'a self,
        history: &'a History,
        printed: PrintedEpochs,
    ) -> Result<Conversion<'a>, Fault> {
        let from = Source {
            quantity: self.from.quantity,
            values: &self.from.values,
            unit: self.from.unit.clone(),
            per_h: self.from.per_h,
            branch: self.branch,
        };
        let to = match &self.to {
            Some(to) => to
                .iter()
                .enumerate()
                .map(|(number, wanted)| wanted.output(number, history, printed))
                .collect::<Result<_, _>>()?,
            None => {
                let defined = |quantity: &&Quantity| (quantity.undefined)(history.spec()).is_none();
                let quantities = DEFAULT_OUTPUTS.iter().filter_map(|name| named(name));
                quantities.filter(defined).map(Output::plain).collect()
            }
        };
        let conversion = Conversion {
            history,
            from,
            to,
            future: self.future,
        };
        if self.branch == jobs::Branch::All {
            let columns = conversion.to.len().saturating_mul(conversion.branches());
            if let Some(fault) = self.size.fault(self.from.values.len(), columns) {
                return Err(fault);
            }
        }
        Ok(conversion)
    }

    /// How many values will be computed, about.
    pub fn work(&self) -> usize {
        let outputs = self.to.as_ref().map_or(DEFAULT_OUTPUTS.len(), Vec::len);
        self.from.values.len().saturating_mul(outputs)
    }
}

impl Wanted {
    fn output(
        &self,
        number: usize,
        history: &History,
        printed: PrintedEpochs,
    ) -> Result<Output, Fault> {
        let mut output = self.output.clone();
        if self.own_sound_horizon {
            let own = jobs::sound_horizon_at_drag_mpc(history, printed);
            output.per_sound_horizon = Some(own.ok_or_else(|| {
                let detail = "the sound horizon needs a model with baryons and radiation; give it in Mpc instead";
                Fault::new(Code::UndefinedInModel, detail).at(format!("/to/{number}/per_sound_horizon"))
            })?);
        }
        Ok(output)
    }
}

fn given(from: From) -> Result<Given, Fault> {
    let quantity = known(&from.quantity, || "/from/quantity".to_owned())?;
    if quantity.inverse.is_none() {
        let detail = format!(
            "\"{}\" can't be converted from: a redshift does not follow from it",
            quantity.name
        );
        return Err(Fault::new(Code::UnknownQuantity, detail)
            .at("/from/quantity")
            .value(quantity.name)
            .allowed(names(|quantity| quantity.inverse.is_some())));
    }
    Ok(Given {
        quantity,
        values: from.values.0,
        unit: unit(quantity, from.unit, || "/from/unit".to_owned())?,
        per_h: from.per_h.unwrap_or(false),
    })
}

fn wanted(output: NameOr<OutputRequest>, number: usize) -> Result<Wanted, Fault> {
    let output = match output {
        NameOr::Name(name) => {
            let output = Output::plain(known(&name, || format!("/to/{number}"))?);
            return Ok(Wanted {
                output,
                own_sound_horizon: false,
            });
        }
        NameOr::Object(output) => output,
    };
    let quantity = known(&output.quantity, || format!("/to/{number}/quantity"))?;
    let (own_sound_horizon, per_sound_horizon) = match output.per_sound_horizon {
        None => (false, None),
        Some(PerSoundHorizon::Own(own)) => (own, None),
        Some(PerSoundHorizon::Length(length)) => (false, Some(length)),
    };
    let output = Output {
        quantity,
        unit: unit(quantity, output.unit, || format!("/to/{number}/unit"))?,
        per_h: output.per_h.unwrap_or(false),
        per_sound_horizon,
    };
    Ok(Wanted {
        output,
        own_sound_horizon,
    })
}

fn known(name: &str, pointer: impl Fn() -> String) -> Result<&'static Quantity, Fault> {
    named(name).ok_or_else(|| {
        let meant = meant(name, QUANTITIES.iter().map(|quantity| quantity.name));
        let detail = format!("there is no quantity \"{}\"{meant}", cut(name));
        Fault::new(Code::UnknownQuantity, detail)
            .at(pointer())
            .value(name)
            .allowed(names(|_| true))
    })
}

fn names(wanted: impl Fn(&Quantity) -> bool) -> String {
    let names: Vec<_> = QUANTITIES
        .iter()
        .filter(|quantity| wanted(quantity))
        .map(|quantity| quantity.name)
        .collect();
    names.join(", ")
}
