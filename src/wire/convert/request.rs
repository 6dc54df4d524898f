//! The body of a conversion, as it is written.

use super::super::model::Model;
use super::super::name_or::NameOr;
use super::super::numbers::Numbers;
use serde::Deserialize;
use serde::de::{Deserializer, Error, Unexpected, Visitor};
use std::fmt;
use utoipa::ToSchema;

/// What to convert, into what, and under which model.
#[derive(Clone, Debug, Deserialize, PartialEq, ToSchema)]
#[serde(deny_unknown_fields)]
pub struct ConvertRequest {
    /// The cosmological model: the name of a published or team set, or a declared one. Without it the default model is used, and the answer's model says `defaulted`.
    #[schema(nullable = false, value_type = Option<Model>)]
    pub model: Option<Model>,
    /// The quantity that is given, with its values.
    pub from: From,
    /// The quantities wanted, each once. Without it: redshift, age, lookback_time, comoving_distance, luminosity_distance, angular_diameter_distance, distance_modulus, angular_scale, comoving_volume, as far as the model defines them.
    #[schema(nullable = false, value_type = Option<Vec<super::schema::Output>>, min_items = 1, max_items = 64)]
    pub to: Option<Vec<NameOr<OutputRequest>>>,
    /// Whether times, rates and fractions are given for −1 < z < 0 too; without it such rows are null with the remark `blueshift`.
    #[schema(nullable = false)]
    pub future: Option<bool>,
}

/// The quantity that is given, with its values.
#[derive(Clone, Debug, Deserialize, PartialEq, ToSchema)]
#[serde(deny_unknown_fields)]
pub struct From {
    /// An invertible quantity.
    #[schema(value_type = super::schema::InvertibleQuantityName)]
    pub quantity: String,
    /// A number, or an array of numbers and nulls; the answer has one row for each.
    #[schema(value_type = super::schema::Values)]
    pub values: Numbers,
    /// The unit of the values, a VOUnits 1.1 string; without it the unit that GET /v1/quantities lists.
    #[schema(nullable = false, max_length = 100)]
    pub unit: Option<String>,
    /// Whether the values are multiplied by h = H0/(100 km/(s.Mpc)) to the power of the quantity, as lengths in Mpc over h are; the unit string then is Mpc.
    #[schema(nullable = false)]
    pub per_h: Option<bool>,
    /// Which redshift is meant where several give the value: `near` (the lowest, also without this member), `far` (the highest), a number counted from 1 at the lowest, or `all`.
    #[schema(nullable = false, value_type = Option<super::schema::Branch>)]
    pub branch: Option<Branch>,
}

/// A quantity that is wanted, with its options.
#[derive(Clone, Debug, Deserialize, PartialEq, ToSchema)]
#[serde(deny_unknown_fields)]
pub struct OutputRequest {
    /// Any quantity.
    #[schema(value_type = super::schema::QuantityName)]
    pub quantity: String,
    /// The unit wanted, a VOUnits 1.1 string of the same dimension.
    #[schema(nullable = false, max_length = 100)]
    pub unit: Option<String>,
    /// Whether the values are multiplied by h = H0/(100 km/(s.Mpc)) to the power of the quantity, so that lengths are in Mpc over h; the unit string stays Mpc. Moduli gain 5 log10 h.
    #[schema(nullable = false)]
    pub per_h: Option<bool>,
    /// Whether a distance is divided by the sound horizon: `true` for the model's own integral to its drag redshift, or a length in Mpc.
    #[schema(nullable = false, value_type = Option<super::schema::PerSoundHorizon>)]
    pub per_sound_horizon: Option<PerSoundHorizon>,
}

/// Which redshift is meant where several give one value.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Branch {
    /// Counted from 1 at the lowest redshift.
    Number(u32),
    /// The highest redshift.
    Far,
    /// Every one, each in a column of its own.
    All,
}

impl Branch {
    /// The branch that a word names.
    pub fn named(word: &str) -> Option<Branch> {
        match word {
            "near" => Some(Branch::Number(1)),
            "far" => Some(Branch::Far),
            "all" => Some(Branch::All),
            _ => None,
        }
    }

    /// The branch of this number.
    pub fn numbered(number: f64) -> Option<Branch> {
        let fits = (1.0..=LAST_BRANCH).contains(&number) && number.floor() == number;
        // Checked: a whole number that an u32 holds.
        fits.then_some(Branch::Number(number as u32))
    }
}

/// No model turns as often.
const LAST_BRANCH: f64 = 1000.0;
const BRANCHES: &str = "\"near\", \"far\", \"all\" or a number from 1 to 1000";

/// What a distance is divided by.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum PerSoundHorizon {
    /// The model's own sound horizon, or nothing.
    Own(bool),
    /// A length in Mpc.
    Length(f64),
}

impl<'de> Deserialize<'de> for Branch {
    fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<Branch, D::Error> {
        deserializer.deserialize_any(BranchVisitor)
    }
}

struct BranchVisitor;

impl Visitor<'_> for BranchVisitor {
    type Value = Branch;

    fn expecting(&self, words: &mut fmt::Formatter<'_>) -> fmt::Result {
        words.write_str(BRANCHES)
    }

    fn visit_str<E: Error>(self, word: &str) -> Result<Branch, E> {
        Branch::named(word).ok_or_else(|| E::invalid_value(Unexpected::Str(word), &self))
    }

    fn visit_f64<E: Error>(self, number: f64) -> Result<Branch, E> {
        Branch::numbered(number).ok_or_else(|| E::invalid_value(Unexpected::Float(number), &self))
    }
}

impl<'de> Deserialize<'de> for PerSoundHorizon {
    fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<PerSoundHorizon, D::Error> {
        deserializer.deserialize_any(PerSoundHorizonVisitor)
    }
}

struct PerSoundHorizonVisitor;

impl Visitor<'_> for PerSoundHorizonVisitor {
    type Value = PerSoundHorizon;

    fn expecting(&self, words: &mut fmt::Formatter<'_>) -> fmt::Result {
        words.write_str("true, false or a length in Mpc, above 0 and at most 10000")
    }

    fn visit_bool<E: Error>(self, own: bool) -> Result<PerSoundHorizon, E> {
        Ok(PerSoundHorizon::Own(own))
    }

    fn visit_f64<E: Error>(self, length: f64) -> Result<PerSoundHorizon, E> {
        if length > 0.0 && length <= LONGEST_SOUND_HORIZON_MPC {
            return Ok(PerSoundHorizon::Length(length));
        }
        Err(E::invalid_value(Unexpected::Float(length), &self))
    }
}

/// The longest sound horizon that is taken, in Mpc; measured ones are near 147.
pub(super) const LONGEST_SOUND_HORIZON_MPC: f64 = 10_000.0;
