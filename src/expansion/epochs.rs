//! What the tables know at a redshift, by row and by block.

use std::ops::Range;

use super::History;
use super::panels::{LANES, Panel, Powers, Sums, polynomial, polynomials};
use crate::numerics::two_sum;

/// Which columns of [`Epochs`] are asked for.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub struct Wanted {
    /// E = H/H0.
    pub rate: bool,
    /// Comoving distance.
    pub comoving: bool,
    /// What the comoving distance leaves out.
    pub comoving_rest: bool,
    /// Lookback time.
    pub lookback: bool,
    /// Age.
    pub age: bool,
    /// Conformal time.
    pub conformal: bool,
}

impl Wanted {
    /// No column.
    pub const NOTHING: Wanted = Wanted {
        rate: false,
        comoving: false,
        comoving_rest: false,
        lookback: false,
        age: false,
        conformal: false,
    };

    /// Every column.
    pub const ALL: Wanted = Wanted {
        rate: true,
        comoving: true,
        comoving_rest: true,
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
            comoving_rest: self.comoving_rest || other.comoving_rest,
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
    /// Comoving distance along the line of sight; negative for z < 0.
    pub comoving: f64,
    /// What rounding took from the comoving distance, for functions that
    /// magnify it, such as the hyperbolic sine of a large distance.
    pub comoving_rest: f64,
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
    /// Comoving distance.
    pub comoving: Vec<f64>,
    /// What rounding took from it.
    pub comoving_rest: Vec<f64>,
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
            comoving: read(&self.comoving),
            comoving_rest: read(&self.comoving_rest),
            lookback: read(&self.lookback),
            age: read(&self.age),
            conformal: read(&self.conformal),
        }
    }
}

impl History {
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
            comoving: base.comoving + distance,
            comoving_rest: rest(base, distance),
            lookback: base.lookback + time,
            age: base.age - time,
            conformal: base.conformal - distance,
        }
    }

    /// Fills the wanted columns for a block of redshifts, all inside the range;
    /// each value has the same bits whatever block it stands in.
    pub fn epochs(&self, redshifts: &[f64], wanted: Wanted, out: &mut Epochs) {
        out.resize(redshifts.len(), wanted);
        let mut start = 0;
        for block in redshifts.chunks(LANES) {
            let mut lanes = [0.0; LANES];
            lanes[..block.len()].copy_from_slice(block);
            self.lanes(&lanes, start..start + block.len(), wanted, out);
            start += block.len();
        }
    }

    /// The panels of the redshifts with the local coordinates there.
    #[inline]
    fn coordinates(&self, redshifts: &[f64; LANES]) -> ([&Panel; LANES], [f64; LANES]) {
        let panels: [&Panel; LANES] =
            std::array::from_fn(|lane| self.panels.panel(redshifts[lane]));
        let turns = self.domain.turns();
        let u = std::array::from_fn(|lane| {
            if turns {
                panels[lane].coordinate(redshifts[lane])
            } else {
                panels[lane].linear_coordinate(redshifts[lane])
            }
        });
        (panels, u)
    }

    #[inline]
    fn lanes(
        &self,
        redshifts: &[f64; LANES],
        rows: Range<usize>,
        wanted: Wanted,
        out: &mut Epochs,
    ) {
        let (panels, u) = self.coordinates(redshifts);
        if wanted.comoving || wanted.comoving_rest || wanted.conformal {
            let distance = integral(std::array::from_fn(|lane| &panels[lane].distance), &u);
            let base = |lane: usize| &panels[lane].at_centre;
            fill(&mut out.comoving, wanted.comoving, &rows, |lane| {
                base(lane).comoving + distance[lane]
            });
            fill(
                &mut out.comoving_rest,
                wanted.comoving_rest,
                &rows,
                |lane| rest(base(lane), distance[lane]),
            );
            fill(&mut out.conformal, wanted.conformal, &rows, |lane| {
                base(lane).conformal - distance[lane]
            });
        }
        if wanted.lookback || wanted.age {
            let time = integral(std::array::from_fn(|lane| &panels[lane].time), &u);
            let base = |lane: usize| &panels[lane].at_centre;
            fill(&mut out.lookback, wanted.lookback, &rows, |lane| {
                base(lane).lookback + time[lane]
            });
            fill(&mut out.age, wanted.age, &rows, |lane| {
                base(lane).age - time[lane]
            });
        }
        if wanted.rate {
            let rate = polynomials(std::array::from_fn(|lane| &panels[lane].rate), &u);
            fill(&mut out.rate, true, &rows, |lane| {
                panels[lane].rate_factor(u[lane]) * rate[lane]
            });
        }
    }
}

impl Epochs {
    fn resize(&mut self, count: usize, wanted: Wanted) {
        for (column, wanted) in [
            (&mut self.rate, wanted.rate),
            (&mut self.comoving, wanted.comoving),
            (&mut self.comoving_rest, wanted.comoving_rest),
            (&mut self.lookback, wanted.lookback),
            (&mut self.age, wanted.age),
            (&mut self.conformal, wanted.conformal),
        ] {
            column.resize(if wanted { count } else { 0 }, 0.0);
        }
    }
}

/// Fills the rows of one column.
#[inline]
fn fill(column: &mut [f64], wanted: bool, rows: &Range<usize>, lane: impl Fn(usize) -> f64) {
    if !wanted {
        return;
    }
    let Some(cells) = column.get_mut(rows.clone()) else {
        return;
    };
    for (number, cell) in cells.iter_mut().enumerate().take(LANES) {
        *cell = lane(number);
    }
}

/// u · Σ `powers[k]` uᵏ on one panel a lane.
#[inline]
fn integral(powers: [&Powers; LANES], u: &[f64; LANES]) -> [f64; LANES] {
    let mut integral = polynomials(powers, u);
    for lane in 0..LANES {
        integral[lane] *= u[lane];
    }
    integral
}

/// What base + distance loses by rounding, and what the base had lost before.
fn rest(base: &Sums, distance: f64) -> f64 {
    base.comoving_low + two_sum(base.comoving, distance).1
}
