//! Units: the grammar of VOUnits as far as quantities need it, exact factors,
//! and the names of columns. No unit string is known anywhere else.

mod column_name;
mod dimension;
mod grammar;
mod scale;
mod symbols;

use std::sync::{Arc, LazyLock};

use thiserror::Error;

pub use column_name::column_name;
pub use dimension::Dimension;
pub use scale::Scale;

use super::QUANTITIES;
use crate::numerics::DoubleDouble;

/// A unit as somebody wrote it, understood.
#[derive(Clone, Debug, PartialEq)]
pub struct Unit(Arc<Parts>);

/// What a unit is made of.
#[derive(Clone, Debug, PartialEq)]
struct Parts {
    text: String,
    factors: Vec<Factor>,
    dimension: Dimension,
    /// In metres, kilograms, seconds, kelvins, degrees and magnitudes.
    size: DoubleDouble,
}

/// One symbol of a unit with its power, as written.
#[derive(Clone, Debug, PartialEq, Eq)]
struct Factor {
    symbol: String,
    power: i32,
}

/// Why a text is no unit that the service knows.
#[derive(Clone, Debug, Error, PartialEq, Eq)]
pub enum UnitFault {
    /// The text does not follow the grammar.
    #[error("\"{text}\" is not a VOUnits expression: {reason}")]
    Malformed {
        /// The text, shortened.
        text: String,
        /// What is wrong.
        reason: String,
    },
    /// A symbol is not known.
    #[error("\"{symbol}\" is not a unit that the service knows")]
    Unknown {
        /// The symbol.
        symbol: String,
    },
    /// The unit measures something else.
    #[error("\"{unit}\" does not measure what \"{wanted}\" does")]
    Mismatch {
        /// The unit given.
        unit: String,
        /// The unit it must be convertible to.
        wanted: String,
    },
}

impl Unit {
    /// Reads a unit: products `.`, one quotient `/`, parentheses, integer powers
    /// `**`, SI prefixes; `1` for dimensionless.
    ///
    /// # Errors
    /// [`UnitFault::Malformed`] or [`UnitFault::Unknown`].
    ///
    /// # References
    /// Demleitner et al. 2023, Units in the VO 1.1, IVOA Recommendation
    /// (grammar from memory).
    pub fn parse(text: &str) -> Result<Unit, UnitFault> {
        grammar::parse(text)
    }

    /// A unit of the catalogue, read once; a test reads them all.
    pub(super) fn of_catalogue(text: &str) -> Unit {
        static UNITS: LazyLock<Vec<Unit>> = LazyLock::new(|| {
            let mut texts: Vec<&str> = QUANTITIES.iter().map(|quantity| quantity.unit).collect();
            texts.sort_unstable();
            texts.dedup();
            texts
                .iter()
                .filter_map(|text| Unit::parse(text).ok())
                .collect()
        });
        let known = UNITS.iter().find(|unit| unit.text() == text);
        known.cloned().unwrap_or_else(Unit::dimensionless)
    }

    /// The unit of pure numbers.
    #[must_use]
    pub fn dimensionless() -> Unit {
        Unit(Arc::new(Parts::one("1")))
    }

    /// As it was written.
    #[must_use]
    pub fn text(&self) -> &str {
        &self.0.text
    }

    /// What it measures.
    #[must_use]
    pub fn dimension(&self) -> Dimension {
        self.0.dimension
    }

    /// The scale that takes numbers in this unit to numbers in another.
    ///
    /// # Errors
    /// [`UnitFault::Mismatch`] when they do not measure the same.
    pub fn to(&self, other: &Unit) -> Result<Scale, UnitFault> {
        if Arc::ptr_eq(&self.0, &other.0) {
            return Ok(Scale::IDENTITY);
        }
        if self.0.dimension != other.0.dimension {
            return Err(UnitFault::Mismatch {
                unit: self.0.text.clone(),
                wanted: other.0.text.clone(),
            });
        }
        Ok(Scale::ratio(self.0.size, other.0.size))
    }
}

impl Parts {
    /// Nothing but its text, of size 1.
    fn one(text: &str) -> Parts {
        Parts {
            text: text.to_owned(),
            factors: Vec::new(),
            dimension: Dimension::default(),
            size: DoubleDouble::from(1.0),
        }
    }
}

impl std::fmt::Display for Unit {
    fn fmt(&self, formatter: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        formatter.write_str(&self.0.text)
    }
}
