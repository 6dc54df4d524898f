//! The description of a model as JSON.

use super::super::convert::{Accuracy, schema::Accuracies};
use super::super::service::Service;
use super::schema::ModelAnswer;
use super::{Model, ModelEcho};
use serde::ser::{SerializeMap, Serializer};
use serde::{Deserialize, Serialize};
use utoipa::ToSchema;

/// Which model to describe.
#[derive(Clone, Debug, Deserialize, PartialEq, ToSchema)]
#[serde(deny_unknown_fields)]
pub struct DescribeRequest {
    /// The model; without it the default one.
    #[schema(nullable = false, value_type = Option<Model>)]
    pub model: Option<Model>,
}

/// What follows from a model.
#[derive(Debug, Serialize, ToSchema)]
pub struct DescribeAnswer<'a> {
    /// The model in full, as it was closed.
    #[schema(value_type = ModelAnswer)]
    pub(super) model: ModelEcho<'a>,
    /// Which service answered.
    pub(super) service: Service,
    /// Fractions of the critical density today.
    pub(super) densities: Densities,
    /// Today.
    pub(super) today: Today,
    /// Redshifts at which one thing overtook another.
    pub(super) milestones: Milestones,
    /// Decoupling and the drag epoch.
    pub(super) early: Early,
    /// Horizons, comoving and so proper today.
    pub(super) horizons: Horizons,
    /// How it began.
    pub(super) past: Past,
    /// How it ends.
    pub(super) fate: Fate,
    /// The lowest and the highest redshift that are served.
    #[schema(value_type = Vec<f64>, min_items = 2, max_items = 2)]
    pub(super) redshift_range: [f64; 2],
    /// The numerical accuracy of each quantity that the model defines, by name.
    #[serde(serialize_with = "by_name")]
    #[schema(value_type = Accuracies)]
    pub(super) accuracy: Vec<(&'static str, Accuracy)>,
    /// Bytes of its tables.
    pub(super) table_bytes: usize,
}

fn by_name<S: Serializer>(
    accuracies: &[(&'static str, Accuracy)],
    serializer: S,
) -> Result<S::Ok, S::Error> {
    let mut members = serializer.serialize_map(Some(accuracies.len()))?;
    for (name, accuracy) in accuracies {
        members.serialize_entry(name, accuracy)?;
    }
    members.end()
}

/// A number with its unit, or null with the reason.
#[derive(Debug, Serialize, ToSchema)]
pub(super) struct Scalar {
    /// The number, or null.
    #[schema(required = true)]
    pub(super) value: Option<f64>,
    /// A VOUnits string.
    pub(super) unit: &'static str,
    /// Why there is no number.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub(super) reason: Option<&'static str>,
    /// Where the number is from.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub(super) source: Option<String>,
}

/// Fractions of the critical density today.
#[derive(Debug, Serialize, ToSchema)]
pub(super) struct Densities {
    /// Everything non-relativistic today, massive neutrinos included.
    pub(super) matter: f64,
    /// Baryons, contained in matter; null if not declared.
    #[schema(required = true)]
    pub(super) baryons: Option<f64>,
    /// Massive neutrinos, contained in matter.
    pub(super) massive_neutrinos: f64,
    /// Photons and massless neutrinos.
    pub(super) radiation: f64,
    /// Photons.
    pub(super) photons: f64,
    /// Massless neutrinos.
    pub(super) massless_neutrinos: f64,
    /// Curvature: positive = open.
    pub(super) curvature: f64,
    /// Dark energy.
    pub(super) dark_energy: f64,
}

/// Today.
#[derive(Debug, Serialize, ToSchema)]
pub(super) struct Today {
    /// Age of the universe.
    pub(super) age: Scalar,
    /// 1/H0.
    pub(super) hubble_time: Scalar,
    /// c/H0.
    pub(super) hubble_distance: Scalar,
    /// The deceleration parameter.
    pub(super) deceleration_parameter: Scalar,
}

/// Redshifts at which one thing overtook another.
#[derive(Debug, Serialize, ToSchema)]
pub(super) struct Milestones {
    /// Matter and radiation.
    pub(super) equality: Equality,
    /// Matter and dark energy, nearest to today.
    pub(super) matter_dark_energy_equality: Scalar,
    /// Changes between deceleration and acceleration, ascending.
    pub(super) acceleration: Vec<Scalar>,
    /// Peaks of the angular-diameter distance, ascending.
    pub(super) angular_diameter_peaks: Vec<Scalar>,
}

/// Equality of matter and radiation in two meanings.
#[derive(Debug, Serialize, ToSchema)]
pub(super) struct Equality {
    /// Matter less its massive neutrinos over photons and massless species only, as published tables print it.
    pub(super) all_neutrinos_massless: Scalar,
    /// Radiation is three times the pressure of every component, matter the rest.
    pub(super) pressure_split: Scalar,
}

/// Decoupling and the drag epoch.
#[derive(Debug, Serialize, ToSchema)]
pub(super) struct Early {
    /// Of photons.
    pub(super) decoupling: EarlyEpoch,
    /// Of baryons.
    pub(super) drag: EarlyEpoch,
    /// A fit of the sound horizon at the drag epoch.
    pub(super) sound_horizon_fit: Scalar,
    /// The fit of 1998, for comparison with papers that used it.
    pub(super) drag_redshift_historical: Scalar,
}

/// An epoch with the sound horizon to it.
#[derive(Debug, Serialize, ToSchema)]
pub(super) struct EarlyEpoch {
    /// Its redshift.
    pub(super) redshift: Scalar,
    /// Where the redshift is from.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub(super) source: Option<String>,
    /// The comoving sound horizon, integrated.
    pub(super) sound_horizon: Scalar,
}

/// Horizons, comoving and so proper today.
#[derive(Debug, Serialize, ToSchema)]
pub(super) struct Horizons {
    /// How far light can have come.
    pub(super) particle: Scalar,
    /// How far away light sent today can still arrive.
    pub(super) event: Scalar,
}

/// How the history began.
#[derive(Debug, Serialize, ToSchema)]
pub(super) struct Past {
    /// hot_beginning, bounce or none.
    pub(super) kind: &'static str,
    /// Where the bounce is.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub(super) redshift: Option<f64>,
}

/// How the history ends.
#[derive(Debug, Serialize, ToSchema)]
pub(super) struct Fate {
    /// expands_for_ever, recollapses or rip.
    pub(super) kind: &'static str,
    /// From today.
    pub(super) time: Scalar,
}
