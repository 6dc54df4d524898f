//! What a conversion is asked for, and what can be wrong with that.

use thiserror::Error;

use crate::expansion::History;
use crate::quantity::{
    Frame, HubbleScaling, Inverter, QUANTITIES, Quantity, Scale, Unit, UnitFault,
};

/// A column of one quantity, to be turned into columns of others.
#[derive(Clone, Debug)]
pub struct Conversion<'a> {
    /// The model.
    pub history: &'a History,
    /// What is given.
    pub from: Source<'a>,
    /// What is wanted.
    pub to: Vec<Output>,
    /// Whether −1 < z < 0 is admitted.
    pub future: bool,
}

/// The given column.
#[derive(Clone, Debug)]
pub struct Source<'a> {
    /// Of which quantity.
    pub quantity: &'static Quantity,
    /// Its values; NaN stands for a missing one.
    pub values: &'a [f64],
    /// Their unit.
    pub unit: Unit,
    /// Whether they are given per h.
    pub per_h: bool,
    /// Which of several redshifts is meant.
    pub branch: Branch,
}

/// Which of several redshifts that share a value is meant.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Branch {
    /// By number: 1 is the nearest.
    Number(u32),
    /// The last.
    Far,
    /// Each of them.
    All,
}

/// A wanted column.
#[derive(Clone, Debug)]
pub struct Output {
    /// Of which quantity.
    pub quantity: &'static Quantity,
    /// In which unit; ignored per sound horizon.
    pub unit: Unit,
    /// Whether it is wanted per h.
    pub per_h: bool,
    /// The sound horizon in Mpc that it is divided by.
    pub per_sound_horizon: Option<f64>,
}

/// The part of a conversion that a fault is about.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum At {
    /// What is given.
    Source,
    /// An output, from 0.
    Output(usize),
}

/// Why a conversion is refused before any work.
#[derive(Clone, Debug, Error, PartialEq)]
pub enum ConvertFault {
    /// A quantity that redshifts do not follow from.
    #[error("{} cannot be given: a redshift does not follow from it", quantity)]
    NotInvertible {
        /// Its name.
        quantity: &'static str,
    },
    /// The model does not define a quantity.
    #[error("{quantity} is not defined: {reason}")]
    Undefined {
        /// Where.
        at: At,
        /// Its name.
        quantity: &'static str,
        /// Why.
        reason: &'static str,
    },
    /// A unit of another dimension.
    #[error("{fault}")]
    Unit {
        /// Where.
        at: At,
        /// What is wrong.
        fault: UnitFault,
    },
    /// `per_h` or `per_sound_horizon` where it has no meaning.
    #[error("{quantity} has no form {form}")]
    NoSuchForm {
        /// Where.
        at: At,
        /// Its name.
        quantity: &'static str,
        /// "per h" or "per sound horizon".
        form: &'static str,
    },
    /// A quantity twice in the outputs.
    #[error("{quantity} is asked for twice")]
    Duplicate {
        /// The second one, from 0.
        output: usize,
        /// Its name.
        quantity: &'static str,
    },
    /// A branch that does not exist.
    #[error("{quantity} has {branches} branch{} in this model: there is no branch {number}", if *.branches == 1 { "" } else { "es" })]
    NoSuchBranch {
        /// Its name.
        quantity: &'static str,
        /// The number asked for.
        number: u32,
        /// How many there are.
        branches: usize,
    },
}

impl<'a> Conversion<'a> {
    /// How many branches the given quantity has in this model.
    #[must_use]
    pub fn branches(&self) -> usize {
        let frame = Frame::of(self.history);
        let inverter = Inverter::prepare(&frame, self.from.quantity, self.future);
        inverter.map_or(0, |inverter| inverter.branches().len())
    }

    /// The inverse of the given quantity, if everything asked for can be answered.
    pub(super) fn check(&self, frame: &Frame<'a>) -> Result<Inverter<'a>, ConvertFault> {
        let quantity = self.from.quantity;
        defined(self.history, quantity, At::Source)?;
        let Some(inverter) =
            Inverter::prepare_for(frame, quantity, self.future, self.from.values.len())
        else {
            return Err(ConvertFault::NotInvertible {
                quantity: quantity.name,
            });
        };
        let branches = inverter.branches().len();
        if let Branch::Number(number) = self.from.branch
            && !(1..=branches).contains(&(number as usize))
        {
            return Err(ConvertFault::NoSuchBranch {
                quantity: quantity.name,
                number,
                branches,
            });
        }
        for (number, output) in self.to.iter().enumerate() {
            defined(self.history, output.quantity, At::Output(number))?;
            if self.to[..number]
                .iter()
                .any(|earlier| earlier.quantity == output.quantity)
            {
                return Err(ConvertFault::Duplicate {
                    output: number,
                    quantity: output.quantity.name,
                });
            }
        }
        Ok(inverter)
    }
}

impl Source<'_> {
    /// From the given numbers to the catalogue's unit.
    pub(super) fn scale(&self, hubble_constant: f64) -> Result<Scale, ConvertFault> {
        let at = At::Source;
        let unit = self
            .unit
            .to(&self.quantity.default_unit())
            .map_err(|fault| ConvertFault::Unit { at, fault })?;
        if !self.per_h {
            return Ok(unit);
        }
        let h = hubble_constant / 100.0;
        match self.quantity.scaling {
            HubbleScaling::None => Err(no_such_form(at, self.quantity, "per h")),
            HubbleScaling::Power(power) => Ok(unit.then(Scale::division(power_of(h, power)))),
            HubbleScaling::Modulus => Ok(unit.then(Scale::shift(-5.0 * libm::log10(h)))),
        }
    }
}

impl Output {
    /// The output in the unit of the catalogue.
    #[must_use]
    pub fn plain(quantity: &'static Quantity) -> Output {
        Output {
            quantity,
            unit: quantity.default_unit(),
            per_h: false,
            per_sound_horizon: None,
        }
    }

    /// From the catalogue's unit to the wanted one; `number` is its place.
    pub(super) fn scale(&self, number: usize, hubble_constant: f64) -> Result<Scale, ConvertFault> {
        let at = At::Output(number);
        if let Some(horizon) = self.per_sound_horizon {
            if !self.quantity.is_length() || self.per_h {
                return Err(no_such_form(at, self.quantity, "per sound horizon"));
            }
            return Ok(Scale::division(horizon));
        }
        let unit = self
            .quantity
            .default_unit()
            .to(&self.unit)
            .map_err(|_| ConvertFault::Unit {
                at,
                fault: UnitFault::Mismatch {
                    unit: self.unit.text().to_owned(),
                    wanted: self.quantity.unit.to_owned(),
                },
            })?;
        if !self.per_h {
            return Ok(unit);
        }
        let h = hubble_constant / 100.0;
        match self.quantity.scaling {
            HubbleScaling::None => Err(no_such_form(at, self.quantity, "per h")),
            HubbleScaling::Power(power) => Ok(Scale::factor(power_of(h, power)).then(unit)),
            HubbleScaling::Modulus => Ok(Scale::shift(5.0 * libm::log10(h)).then(unit)),
        }
    }
}

/// The quantities that a model defines, in the order of the catalogue.
pub(super) fn defined_quantities(history: &History) -> impl Iterator<Item = &'static Quantity> {
    QUANTITIES
        .iter()
        .filter(|quantity| (quantity.undefined)(history.spec()).is_none())
}

fn defined(history: &History, quantity: &'static Quantity, at: At) -> Result<(), ConvertFault> {
    match (quantity.undefined)(history.spec()) {
        Some(reason) => Err(ConvertFault::Undefined {
            at,
            quantity: quantity.name,
            reason,
        }),
        None => Ok(()),
    }
}

fn no_such_form(at: At, quantity: &Quantity, form: &'static str) -> ConvertFault {
    ConvertFault::NoSuchForm {
        at,
        quantity: quantity.name,
        form,
    }
}

fn power_of(h: f64, power: u8) -> f64 {
    (0..power).fold(1.0, |product, _| product * h)
}
