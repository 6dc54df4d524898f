//! Units: the grammar of VOUnits as far as quantities need it, exact factors,
//! and the names of columns. No unit string is known anywhere else.

mod column_name;
mod dimension;
mod grammar;
mod scale;
mod symbols;

use thiserror::Error;

pub use column_name::column_name;
pub use dimension::Dimension;
pub use scale::Scale;

use crate::numerics::DoubleDouble;

/// A unit as somebody wrote it, understood.
#[derive(Clone, Debug, PartialEq)]
pub struct Unit {
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

    /// A unit of the catalogue, known to be one: a test reads them all.
    pub(super) fn of_catalogue(text: &str) -> Unit {
        Unit::parse(text).unwrap_or_else(|_| Unit::dimensionless())
    }

    /// The unit of pure numbers.
    #[must_use]
    pub fn dimensionless() -> Unit {
        Unit {
            text: "1".to_owned(),
            factors: Vec::new(),
            dimension: Dimension::default(),
            size: DoubleDouble::from(1.0),
        }
    }

    /// As it was written.
    #[must_use]
    pub fn text(&self) -> &str {
        &self.text
    }

    /// What it measures.
    #[must_use]
    pub fn dimension(&self) -> Dimension {
        self.dimension
    }

    /// The scale that takes numbers in this unit to numbers in another.
    ///
    /// # Errors
    /// [`UnitFault::Mismatch`] when they do not measure the same.
    pub fn to(&self, other: &Unit) -> Result<Scale, UnitFault> {
        if self.dimension != other.dimension {
            return Err(UnitFault::Mismatch {
                unit: self.text.clone(),
                wanted: other.text.clone(),
            });
        }
        Ok(Scale::ratio(self.size, other.size))
    }
}

impl std::fmt::Display for Unit {
    fn fmt(&self, formatter: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        formatter.write_str(&self.text)
    }
}
