//! The history of one model: what the tables know at a redshift.

use std::sync::OnceLock;

use thiserror::Error;

use super::panels::{Panel, Panels, polynomial, polynomials};
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
    domain: Domain,
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

/// Which columns of [`Epochs`] are asked for.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub struct Wanted {
    /// E and E − 1.
    pub rate: bool,
    /// Comoving distance.
    pub comoving: bool,
    /// Lookback time.
    pub lookback: bool,
    /// Age.
    pub age: bool,
    /// Conformal time.
    pub conformal: bool,
}

impl Wanted {
    /// Every column.
    pub const ALL: Wanted = Wanted {
        rate: true,
        comoving: true,
        lookback: true,
        age: true,
        conformal: true,
    };

    /// What either of two asks for.
    #[must_use]
    pub fn union(self, other: Wanted) -> Wanted {
        Wanted {
            rate: self.rate || other.rate,
            comoving: self.comoving || other.comoving,
            lookback: self.lookback || other.lookback,
            age: self.age || other.age,
            conformal: self.conformal || other.conformal,
        }
    }
}

/// What the tables know at one redshift, in units of 1/H0 and c/H0.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Epoch {
    /// z.
    pub redshift: f64,
    /// E = H/H0.
    pub rate: f64,
    /// E − 1, with its own relative accuracy as z → 0.
    pub rate_excess: f64,
    /// Comoving distance along the line of sight; negative for z < 0.
    pub comoving: f64,
    /// Lookback time; negative for z < 0.
    pub lookback: f64,
    /// Age; infinite without a beginning.
    pub age: f64,
    /// Conformal time since the beginning; infinite where it diverges.
    pub conformal: f64,
}

/// Columns of [`Epoch`]s for a block of redshifts; columns not wanted stay empty.
#[derive(Clone, Debug, Default)]
pub struct Epochs {
    /// E = H/H0.
    pub rate: Vec<f64>,
    /// E − 1.
    pub rate_excess: Vec<f64>,
    /// Comoving distance.
    pub comoving: Vec<f64>,
    /// Lookback time.
    pub lookback: Vec<f64>,
    /// Age.
    pub age: Vec<f64>,
    /// Conformal time.
    pub conformal: Vec<f64>,
}

impl Epochs {
    /// One row; columns that were not wanted read as zero.
    #[inline]
    #[must_use]
    pub fn row(&self, redshift: f64, row: usize) -> Epoch {
        let read = |column: &[f64]| column.get(row).copied().unwrap_or(0.0);
        Epoch {
            redshift,
            rate: read(&self.rate),
            rate_excess: read(&self.rate_excess),
            comoving: read(&self.comoving),
            lookback: read(&self.lookback),
            age: read(&self.age),
            conformal: read(&self.conformal),
        }
    }
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

    /// Everything at one redshift.
    #[must_use]
    pub fn epoch(&self, redshift: f64) -> Epoch {
        let panel = self.panels.panel(redshift);
        let u = panel.coordinate(redshift);
        let distance = u * polynomial(&panel.distance, u);
        let time = u * polynomial(&panel.time, u);
        let base = &panel.at_centre;
        Epoch {
            redshift,
            rate: panel.rate_factor(u) * polynomial(&panel.rate, u),
            rate_excess: excess(panel, u),
            comoving: base.comoving + distance,
            lookback: base.lookback + time,
            age: base.age - time,
            conformal: base.conformal - distance,
        }
    }

    /// Fills the wanted columns for a block of redshifts, all inside the range;
    /// each value has the same bits whatever block it stands in.
    pub fn epochs(&self, redshifts: &[f64], wanted: Wanted, out: &mut Epochs) {
        let rows = |wanted: bool| if wanted { redshifts.len() } else { 0 };
        out.rate.resize(rows(wanted.rate), 0.0);
        out.rate_excess.resize(rows(wanted.rate), 0.0);
        out.comoving.resize(rows(wanted.comoving), 0.0);
        out.lookback.resize(rows(wanted.lookback), 0.0);
        out.age.resize(rows(wanted.age), 0.0);
        out.conformal.resize(rows(wanted.conformal), 0.0);
        let mut start = 0;
        for block in redshifts.chunks(8) {
            let mut eight = [0.0; 8];
            eight[..block.len()].copy_from_slice(block);
            self.eight_epochs(&eight, wanted, start, block.len(), out);
            start += block.len();
        }
    }

    fn eight_epochs(
        &self,
        redshifts: &[f64; 8],
        wanted: Wanted,
        start: usize,
        count: usize,
        out: &mut Epochs,
    ) {
        let panels = redshifts.map(|redshift| self.panels.panel(redshift));
        let mut u = [0.0; 8];
        for lane in 0..8 {
            u[lane] = if self.domain.turns() {
                panels[lane].coordinate(redshifts[lane])
            } else {
                panels[lane].linear_coordinate(redshifts[lane])
            };
        }
        let rows = start..start + count;
        if wanted.comoving || wanted.conformal {
            let distance = polynomials(panels.map(|panel| &panel.distance), &u);
            let columns = [
                (
                    wanted.comoving,
                    &mut out.comoving,
                    panels.map(|panel| panel.at_centre.comoving),
                    1.0,
                ),
                (
                    wanted.conformal,
                    &mut out.conformal,
                    panels.map(|panel| panel.at_centre.conformal),
                    -1.0,
                ),
            ];
            for (_, column, base, sign) in columns.into_iter().filter(|(wanted, ..)| *wanted) {
                for (lane, cell) in column[rows.clone()].iter_mut().enumerate() {
                    *cell = base[lane] + sign * (u[lane] * distance[lane]);
                }
            }
        }
        if wanted.lookback || wanted.age {
            let time = polynomials(panels.map(|panel| &panel.time), &u);
            let columns = [
                (
                    wanted.lookback,
                    &mut out.lookback,
                    panels.map(|panel| panel.at_centre.lookback),
                    1.0,
                ),
                (
                    wanted.age,
                    &mut out.age,
                    panels.map(|panel| panel.at_centre.age),
                    -1.0,
                ),
            ];
            for (_, column, base, sign) in columns.into_iter().filter(|(wanted, ..)| *wanted) {
                for (lane, cell) in column[rows.clone()].iter_mut().enumerate() {
                    *cell = base[lane] + sign * (u[lane] * time[lane]);
                }
            }
        }
        if wanted.rate {
            let rate = polynomials(panels.map(|panel| &panel.rate), &u);
            for (lane, cell) in out.rate[rows.clone()].iter_mut().enumerate() {
                *cell = panels[lane].rate_factor(u[lane]) * rate[lane];
            }
            for (lane, cell) in out.rate_excess[rows].iter_mut().enumerate() {
                *cell = excess(panels[lane], u[lane]);
            }
        }
    }
}

/// E − 1: on the panels that touch today the polynomial starts with exactly 1,
/// so leaving it out loses nothing; elsewhere the difference is taken.
fn excess(panel: &Panel, u: f64) -> f64 {
    if panel.rate[0] == 1.0 {
        let mut rest = panel.rate;
        rest[0] = 0.0;
        polynomial(&rest, u)
    } else {
        panel.rate_factor(u) * polynomial(&panel.rate, u) - 1.0
    }
}
