//! The models that have names, as JSON.

use super::{DeclaredModel, SpecEcho};
use crate::model::{Printed, PublishedSet, Uncertainty};
use serde::Serialize;
use utoipa::ToSchema;

/// The models that have names.
#[derive(Debug, Serialize, ToSchema)]
pub struct ModelsAnswer<'a> {
    /// The name of the model for requests that name none.
    #[schema(examples("planck-2018-cmb-lensing"))]
    pub default: &'a str,
    /// The models.
    pub models: Vec<ModelEntry<'a>>,
}

/// A model that has a name.
#[derive(Debug, Serialize, ToSchema)]
pub struct ModelEntry<'a> {
    /// Its name in requests; a shipped name never changes its numbers.
    pub name: &'a str,
    /// What it is, for a person.
    pub title: &'a str,
    /// How well its numbers were checked: confirmed (each number that its source prints was compared with it; a note names what is not printed there), partly_confirmed (some were), from_memory (none was); operator for the team's own.
    pub status: &'static str,
    /// The label of the spec.
    pub fingerprint: &'a str,
    /// The closed model.
    #[schema(value_type = DeclaredModel)]
    pub spec: SpecEcho<'a>,
    /// Where its numbers come from.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub source: Option<String>,
    /// The table of the source.
    #[serde(skip_serializing_if = "str::is_empty")]
    #[schema(required = false)]
    pub table: &'static str,
    /// The column of the table.
    #[serde(skip_serializing_if = "str::is_empty")]
    #[schema(required = false)]
    pub column: &'static str,
    /// What is not said elsewhere, such as which numbers the source does not print.
    #[serde(skip_serializing_if = "str::is_empty")]
    #[schema(required = false)]
    pub note: &'static str,
    /// The errors of those of its numbers that the source gives any for; the others have none here.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub uncertainty: Option<UncertaintyEntry>,
    /// What the source prints about the model besides its parameters.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub printed: Option<PrintedEntry>,
}

/// The errors of a model's numbers.
#[derive(Debug, Serialize, ToSchema)]
pub struct UncertaintyEntry {
    /// Members of the model, with dots.
    #[schema(value_type = Vec<String>)]
    pub parameters: &'static [&'static str],
    /// One a parameter, in its unit.
    #[schema(value_type = Vec<f64>)]
    pub standard_deviations: &'static [f64],
    /// Rows of the correlation matrix; absent where it is not known.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false, value_type = Option<Vec<Vec<f64>>>)]
    pub correlations: Option<&'static [&'static [f64]]>,
    /// Where the correlations come from.
    #[serde(skip_serializing_if = "str::is_empty")]
    #[schema(required = false)]
    pub correlations_source: &'static str,
}

/// What a source prints that follows from its parameters.
#[derive(Debug, Serialize, ToSchema)]
pub struct PrintedEntry {
    /// Age today, Gyr.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub age_gyr: Option<f64>,
    /// Redshift of decoupling.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub decoupling_redshift: Option<f64>,
    /// Comoving sound horizon at decoupling, Mpc.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub decoupling_sound_horizon_mpc: Option<f64>,
    /// Redshift of the drag epoch.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub drag_redshift: Option<f64>,
    /// Comoving sound horizon at the drag epoch, Mpc.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub drag_sound_horizon_mpc: Option<f64>,
    /// Redshift of equality, all neutrinos counted massless.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub equality_redshift: Option<f64>,
}

impl<'a> ModelEntry<'a> {
    /// The same with all that a published set knows of itself.
    pub fn published(self, set: &'static PublishedSet) -> ModelEntry<'a> {
        ModelEntry {
            source: Some(set.source.to_string()),
            table: set.table,
            column: set.column,
            note: set.note,
            uncertainty: set.uncertainty.map(UncertaintyEntry::of),
            printed: (set.printed != Printed::default()).then(|| PrintedEntry::of(&set.printed)),
            ..self
        }
    }
}

impl UncertaintyEntry {
    fn of(uncertainty: Uncertainty) -> UncertaintyEntry {
        UncertaintyEntry {
            parameters: uncertainty.parameters,
            standard_deviations: uncertainty.standard_deviations,
            correlations: uncertainty.correlations,
            correlations_source: uncertainty.correlations_source,
        }
    }
}

impl PrintedEntry {
    fn of(printed: &Printed) -> PrintedEntry {
        PrintedEntry {
            age_gyr: printed.age_gyr,
            decoupling_redshift: printed.decoupling_redshift,
            decoupling_sound_horizon_mpc: printed.decoupling_sound_horizon_mpc,
            drag_redshift: printed.drag_redshift,
            drag_sound_horizon_mpc: printed.drag_sound_horizon_mpc,
            equality_redshift: printed.equality_redshift,
        }
    }
}
