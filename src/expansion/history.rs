//! The history of one model: what the tables know at a redshift.

use std::sync::OnceLock;

use thiserror::Error;

use super::panels::Panels;
use super::turning::Domain;
use super::{Densities, Turning, build};
use crate::model::{Spec, constants};
use crate::numerics::{Chebyshev, LARGEST_NODES};

/// The smallest redshift served.
const LOWEST_REDSHIFT: f64 = -0.99;
/// The largest redshift served.
const HIGHEST_REDSHIFT: f64 = 1e9;

/// The tables of one model: immutable, shared by any number of threads.
///
/// Everything is in units of the Hubble time 1/H0 and the Hubble distance c/H0.
#[derive(Debug)]
pub struct History {
    spec: Spec,
    densities: Densities,
    pub(super) domain: Domain,
    pub(super) panels: Panels,
    accuracy: Accuracy,
    turning: OnceLock<Turning>,
}

/// Why a model has no history that can be told.
#[derive(Clone, Debug, Error, PartialEq)]
pub enum HistoryFault {
    /// The sign of E² depends on the last digits of the parameters.
    #[error(
        "near redshift {redshift} the expansion rate vanishes within the last digits of the parameters"
    )]
    Indeterminate {
        /// Where |E²| is smallest.
        redshift: f64,
    },
    /// The history varies so fast that its tables would be too large.
    #[error("the history near redshift {redshift} needs larger tables than a model may have")]
    TooCostly {
        /// Where halving the panels did not help.
        redshift: f64,
    },
}

/// The checked relative error of each table, for arguments taken as exact.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Accuracy {
    /// Of E = H/H0.
    pub rate: f64,
    /// Of comoving distances.
    pub comoving: f64,
    /// Of lookback times.
    pub lookback: f64,
    /// Of conformal times.
    pub conformal: f64,
    /// Of ages.
    pub age: f64,
}

/// How the history began.
#[derive(Clone, Copy, Debug, PartialEq)]
pub enum Beginning {
    /// The scale factor was zero a finite time ago.
    BigBang,
    /// Contraction turned into expansion at a largest redshift.
    Bounce {
        /// That redshift.
        redshift: f64,
    },
    /// The age diverges: there was no beginning.
    None,
}

impl History {
    /// Builds and checks the tables of a model; some tens of microseconds.
    ///
    /// # Errors
    /// [`HistoryFault`] where the model has no history over the whole range.
    pub fn build(spec: &Spec) -> Result<History, HistoryFault> {
        static PLAN: OnceLock<Chebyshev> = OnceLock::new();
        Self::with_plan(spec, PLAN.get_or_init(|| Chebyshev::new(LARGEST_NODES)))
    }

    /// The same with fewer nodes on each panel: worse tables, whose stated
    /// error says so.
    ///
    /// # Errors
    /// As [`History::build`].
    pub fn build_with_nodes(spec: &Spec, nodes: usize) -> Result<History, HistoryFault> {
        Self::with_plan(spec, &Chebyshev::new(nodes))
    }

    fn with_plan(spec: &Spec, plan: &Chebyshev) -> Result<History, HistoryFault> {
        let densities = Densities::of(spec);
        let domain = Domain::of(&densities)?;
        let (panels, accuracy) = build::build(&densities, &domain, plan)?;
        Ok(History {
            spec: spec.clone(),
            densities,
            domain,
            panels,
            accuracy,
            turning: OnceLock::new(),
        })
    }

    /// The model.
    #[must_use]
    pub fn spec(&self) -> &Spec {
        &self.spec
    }

    /// Its energy budget.
    #[must_use]
    pub fn densities(&self) -> &Densities {
        &self.densities
    }

    /// The lowest and the highest redshift that the history is told for: the
    /// ends of the tables, or turning points of the expansion.
    #[must_use]
    pub fn range(&self) -> (f64, f64) {
        let (low, high) = (
            self.domain.low.stretch - 1.0,
            self.domain.high.stretch - 1.0,
        );
        (low.max(LOWEST_REDSHIFT), high.min(HIGHEST_REDSHIFT))
    }

    /// The redshift at which the expansion will turn into contraction, if it does.
    #[must_use]
    pub fn turnaround(&self) -> Option<f64> {
        self.domain
            .low
            .turns
            .then_some(self.domain.low.stretch - 1.0)
    }

    /// Heap bytes of the tables.
    #[must_use]
    pub fn bytes(&self) -> usize {
        self.panels.bytes() + size_of::<History>()
    }

    /// The checked relative errors.
    #[must_use]
    pub fn accuracy(&self) -> Accuracy {
        self.accuracy
    }

    /// c/H0 in Mpc.
    #[must_use]
    pub fn hubble_distance_mpc(&self) -> f64 {
        constants::SPEED_OF_LIGHT_KM_S / self.spec.hubble_constant
    }

    /// 1/H0 in Gyr (Julian years).
    #[must_use]
    pub fn hubble_time_gyr(&self) -> f64 {
        constants::HUBBLE_TIME_GYR_KM_S_MPC / self.spec.hubble_constant
    }

    /// Redshifts of the panel edges, ascending: knots that bracket inverses.
    #[must_use]
    pub fn edges(&self) -> &[f64] {
        &self.panels.edges
    }

    /// Where the curves that can turn do so; found once, when first asked for.
    #[must_use]
    pub fn turning(&self) -> &Turning {
        self.turning.get_or_init(|| Turning::of(self))
    }

    /// How the history began.
    #[must_use]
    pub fn beginning(&self) -> Beginning {
        if self.domain.high.turns {
            Beginning::Bounce {
                redshift: self.domain.high.stretch - 1.0,
            }
        } else if self.age_today().is_some() {
            Beginning::BigBang
        } else {
            Beginning::None
        }
    }

    /// The age today in units of 1/H0; `None` without a beginning.
    #[must_use]
    pub fn age_today(&self) -> Option<f64> {
        Some(self.epoch(0.0).age).filter(|age| age.is_finite())
    }

    /// The conformal time today in units of 1/H0; `None` where it diverges.
    #[must_use]
    pub fn conformal_time_today(&self) -> Option<f64> {
        Some(self.epoch(0.0).conformal).filter(|time| time.is_finite())
    }
}
