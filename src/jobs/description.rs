//! What is told about a model.

use super::StatedAccuracy;
use crate::quantity::Quantity;

/// Everything that is told about a model.
#[derive(Clone, Debug)]
pub struct Description {
    /// Shares of the critical density today.
    pub densities: Budget,
    /// Today.
    pub today: Today,
    /// Redshifts at which one thing overtook another.
    pub milestones: Milestones,
    /// Decoupling and the drag epoch.
    pub early: Early,
    /// Horizons, comoving = proper today.
    pub horizons: Horizons,
    /// How it began.
    pub past: Past,
    /// How it ends.
    pub fate: Fate,
    /// The lowest and the highest redshift that are served.
    pub redshift_range: (f64, f64),
    /// The numerical accuracy of each quantity that the model defines.
    pub accuracy: Vec<(&'static Quantity, StatedAccuracy)>,
    /// Bytes of its tables.
    pub table_bytes: usize,
}

/// A number with its unit, or the reason why there is none.
#[derive(Clone, Debug, PartialEq)]
pub struct Scalar {
    /// The number.
    pub value: Option<f64>,
    /// VOUnits.
    pub unit: &'static str,
    /// Why there is none.
    pub reason: Option<&'static str>,
    /// Where it is from.
    pub source: Option<String>,
}

/// Shares of the critical density today.
#[derive(Clone, Debug, PartialEq)]
pub struct Budget {
    /// Everything non-relativistic today, massive neutrinos included.
    pub matter: f64,
    /// Baryons, contained in matter; `None` where they are not declared.
    pub baryons: Option<f64>,
    /// Massive neutrinos, contained in matter.
    pub massive_neutrinos: f64,
    /// Photons and massless neutrinos.
    pub radiation: f64,
    /// Photons.
    pub photons: f64,
    /// Massless neutrinos.
    pub massless_neutrinos: f64,
    /// Curvature: positive = open.
    pub curvature: f64,
    /// Dark energy.
    pub dark_energy: f64,
}

/// Today.
#[derive(Clone, Debug, PartialEq)]
pub struct Today {
    /// Gyr.
    pub age: Scalar,
    /// 1/H0 in Gyr.
    pub hubble_time: Scalar,
    /// c/H0 in Mpc.
    pub hubble_distance: Scalar,
    /// q.
    pub deceleration_parameter: Scalar,
}

/// Redshifts at which one thing overtook another.
#[derive(Clone, Debug, PartialEq)]
pub struct Milestones {
    /// Of matter and radiation.
    pub equality: Equality,
    /// Of matter and dark energy, nearest to today.
    pub matter_dark_energy_equality: Scalar,
    /// Changes between deceleration and acceleration, ascending.
    pub acceleration: Vec<Scalar>,
    /// Peaks of the angular-diameter distance, ascending.
    pub angular_diameter_peaks: Vec<Scalar>,
}

/// Equality of matter and radiation, in two meanings.
#[derive(Clone, Debug, PartialEq)]
pub struct Equality {
    /// Matter less its massive neutrinos over photons and massless species only, as tables print it.
    pub all_neutrinos_massless: Scalar,
    /// Radiation is 3P of every component, matter the rest.
    pub pressure_split: Scalar,
}

/// Decoupling and the drag epoch.
#[derive(Clone, Debug, PartialEq)]
pub struct Early {
    /// Of photons.
    pub decoupling: EarlyEpoch,
    /// Of baryons.
    pub drag: EarlyEpoch,
    /// A fit of the sound horizon at the drag epoch, Mpc.
    pub sound_horizon_fit: Scalar,
    /// The fit of 1998, kept for comparison with papers that used it.
    pub drag_redshift_historical: Scalar,
}

/// An epoch with the sound horizon to it.
#[derive(Clone, Debug, PartialEq)]
pub struct EarlyEpoch {
    /// Its redshift, with its source.
    pub redshift: Scalar,
    /// The comoving sound horizon in Mpc, integrated.
    pub sound_horizon: Scalar,
}

/// Horizons in Mpc, comoving = proper today.
#[derive(Clone, Debug, PartialEq)]
pub struct Horizons {
    /// How far light can have come.
    pub particle: Scalar,
    /// How far away light sent today can still arrive.
    pub event: Scalar,
}

/// How the history began.
#[derive(Clone, Debug, PartialEq)]
pub struct Past {
    /// In one word.
    pub kind: PastKind,
    /// Where a bounce is.
    pub redshift: Option<f64>,
}

/// How a history can begin.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum PastKind {
    /// From a scale factor of zero, a finite time ago.
    HotBeginning,
    /// From a contraction.
    Bounce,
    /// At no finite time.
    None,
}

/// How the history ends.
#[derive(Clone, Debug, PartialEq)]
pub struct Fate {
    /// In one word.
    pub kind: FateKind,
    /// From today, Gyr.
    pub time: Scalar,
}

/// How a history can end.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum FateKind {
    /// It does not.
    ExpandsForEver,
    /// The expansion turns round; the time is that of the final collapse.
    Recollapses,
    /// The expansion rate diverges at a finite time.
    Rip,
}

impl Scalar {
    pub(super) fn from(value: f64, unit: &'static str) -> Scalar {
        Scalar::optional(Some(value), unit, "it is not finite")
    }

    pub(super) fn none(unit: &'static str, reason: &'static str) -> Scalar {
        Scalar::optional(None, unit, reason)
    }

    pub(super) fn optional(value: Option<f64>, unit: &'static str, reason: &'static str) -> Scalar {
        let value = value.filter(|value| value.is_finite());
        Scalar {
            value,
            unit,
            reason: value.is_none().then_some(reason),
            source: None,
        }
    }

    pub(super) fn with_source(self, source: &str) -> Scalar {
        Scalar {
            source: self.value.map(|_| source.to_owned()),
            ..self
        }
    }
}
