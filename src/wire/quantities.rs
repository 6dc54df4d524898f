//! The catalogue of quantities as JSON.

use super::service::{SERVICE, Service};
use crate::quantity::{HubbleScaling, QUANTITIES, Quantity, Tolerance, column_name};
use serde::Serialize;
use utoipa::ToSchema;

/// Every quantity.
#[derive(Debug, Serialize, ToSchema)]
pub struct QuantitiesAnswer {
    /// Which service answered.
    pub service: Service,
    /// The quantities.
    pub quantities: Vec<QuantityEntry>,
}

/// What a quantity is.
#[derive(Debug, Serialize, ToSchema)]
pub struct QuantityEntry {
    /// As requests and answers write it.
    #[schema(examples("luminosity_distance"))]
    pub name: &'static str,
    /// As papers write it.
    pub symbol: &'static str,
    /// The unit unless another is asked for, a VOUnits string.
    pub unit: &'static str,
    /// UCD1+ words.
    pub ucd: &'static str,
    /// What it is.
    pub description: &'static str,
    /// The values it takes.
    pub domain: &'static str,
    /// The numerical error that is promised and tested, for a condition number up to 1; an error grows with a larger one. The column of an answer states what holds there: this, or more where the model's tables, a conversion through them, or the last digit of a modulus make more.
    pub accuracy: CatalogueAccuracy,
    /// Whether a redshift follows from it, so that it may stand in `from`.
    pub invertible: bool,
    /// Whether it is given for −1 < z < 0 with `"future": true`.
    pub future: bool,
    /// What `per_h` does; absent where it has no meaning.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub per_h: Option<String>,
    /// The name of its column in tables.
    pub column: String,
    /// The formula.
    pub formula: &'static str,
    /// Where the formula stands.
    pub source: String,
}

/// A promised error.
#[derive(Debug, Serialize, ToSchema)]
pub struct CatalogueAccuracy {
    /// Relative.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub relative: Option<f64>,
    /// In the unit of the quantity.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub absolute: Option<f64>,
    /// Of a difference, which passes through zero: in units in the last place of its larger term; `relative` then holds as z → 0.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub ulps_of_larger_term: Option<f64>,
}

impl QuantitiesAnswer {
    /// The catalogue.
    pub fn all() -> QuantitiesAnswer {
        QuantitiesAnswer {
            service: SERVICE,
            quantities: QUANTITIES.iter().map(QuantityEntry::of).collect(),
        }
    }
}

impl QuantityEntry {
    fn of(quantity: &Quantity) -> QuantityEntry {
        QuantityEntry {
            name: quantity.name,
            symbol: quantity.symbol,
            unit: quantity.unit,
            ucd: quantity.ucd,
            description: quantity.meaning,
            domain: quantity.domain,
            accuracy: CatalogueAccuracy::of(quantity.tolerance),
            invertible: quantity.inverse.is_some(),
            future: quantity.future,
            per_h: match quantity.scaling {
                HubbleScaling::None => None,
                HubbleScaling::Power(1) => Some("times h".to_owned()),
                HubbleScaling::Power(power) => Some(format!("times h**{power}")),
                HubbleScaling::Modulus => Some("plus 5 log10 h".to_owned()),
            },
            column: column_name(quantity, &quantity.default_unit(), false, false),
            formula: quantity.formula,
            source: quantity.source.to_string(),
        }
    }
}

impl CatalogueAccuracy {
    fn of(tolerance: Tolerance) -> CatalogueAccuracy {
        let (relative, absolute, ulps_of_larger_term) = match tolerance {
            Tolerance::Relative(relative) => (Some(relative), None, None),
            Tolerance::Absolute(absolute) => (None, Some(absolute), None),
            Tolerance::LargerTerm { ulps, relative } => (Some(relative), None, Some(ulps)),
        };
        CatalogueAccuracy {
            relative,
            absolute,
            ulps_of_larger_term,
        }
    }
}
