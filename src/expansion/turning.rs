//! Where curves turn: zeros of the expansion rate, extrema of the rate and of
//! the transverse distances.

use super::panels::{HIGHEST_OCTAVE, LOWEST_OCTAVE};
use super::{Densities, History, HistoryFault};
use crate::numerics::{bracketed_root, two_sum};

/// Redshifts at which a curve has an extremum, ascending.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Turning {
    /// Of the expansion rate E, over the whole range.
    pub rate: Vec<f64>,
    /// Of the absolute transverse comoving distance, z > 0: equators and
    /// antipodes of a closed model.
    pub transverse: Vec<f64>,
    /// Of the absolute angular-diameter distance, z > 0.
    pub angular_diameter: Vec<f64>,
    /// Of the absolute luminosity distance, z > 0.
    pub luminosity: Vec<f64>,
}

/// Points sampled on each panel in search of a change of sign.
const SAMPLES: u32 = 4;
/// A relative difference below this has no sign that rounding could not have made.
const SIGNIFICANT: f64 = 1e-12;

impl Turning {
    pub(super) fn of(history: &History) -> Turning {
        let densities = history.densities();
        let curvature = densities.curvature();
        let root = curvature.abs().sqrt();
        // D_M and dD_M/dD_C as functions of D_C.
        let transverse = |z: f64| -> (f64, f64) {
            let angle = root * history.epoch(z).comoving;
            if curvature < 0.0 {
                (libm::sin(angle) / root, libm::cos(angle))
            } else if curvature > 0.0 {
                (libm::sinh(angle) / root, libm::cosh(angle))
            } else {
                (history.epoch(z).comoving, 1.0)
            }
        };
        // d ln D_M / d ln v: an extremum of D_M v^∓1 is where it is ±1.
        let growth = |z: f64| {
            let (distance, slope) = transverse(z);
            slope * (1.0 + z) / (history.epoch(z).rate * distance)
        };
        let angular = |z: f64| growth(z) - 1.0;
        let luminosity = |z: f64| growth(z) + 1.0;
        let closed = curvature < 0.0;
        let antipodes = || zeros(history, 0.0, |z| transverse(z).0);
        let with_antipodes = |mut roots: Vec<f64>| {
            roots.extend(antipodes());
            roots.sort_by(f64::total_cmp);
            roots
        };
        Turning {
            rate: zeros(history, history.range().0, |z| {
                densities.rate_squared_slope(1.0 + z)
            }),
            transverse: if closed {
                with_antipodes(zeros(history, 0.0, |z| transverse(z).1))
            } else {
                Vec::new()
            },
            angular_diameter: with_antipodes_if(closed, zeros(history, 0.0, angular), antipodes),
            luminosity: if closed {
                with_antipodes(zeros(history, 0.0, luminosity))
            } else {
                Vec::new()
            },
        }
    }
}

fn with_antipodes_if(
    closed: bool,
    mut roots: Vec<f64>,
    antipodes: impl Fn() -> Vec<f64>,
) -> Vec<f64> {
    if closed {
        roots.extend(antipodes());
        roots.sort_by(f64::total_cmp);
    }
    roots
}

/// The zeros of a dimensionless function above a redshift, found between samples on every panel.
fn zeros(history: &History, above: f64, function: impl Fn(f64) -> f64) -> Vec<f64> {
    let highest = history.range().1;
    let on_panel = |pair: &[f64]| {
        let (low, high) = (
            pair.first().copied().unwrap_or(f64::NAN),
            pair.last().copied().unwrap_or(f64::NAN),
        );
        (0..SAMPLES).map(move |sample| low + (high - low) * f64::from(sample) / f64::from(SAMPLES))
    };
    // The last sample stands just inside the range, where a bounce would be.
    let samples = history
        .edges()
        .windows(2)
        .flat_map(on_panel)
        .filter(|z| *z > above && *z < highest);
    let mut found = Vec::new();
    let mut last: Option<(f64, f64)> = None;
    for z in samples.chain([highest - 1e-12 * highest.abs()]) {
        let value = function(z);
        if value.abs() < SIGNIFICANT {
            continue;
        }
        if let Some((previous, at_previous)) = last
            && (at_previous < 0.0) != (value < 0.0)
            && let Some(root) = bracketed_root(previous, z, &function)
            // Through a pole the sign changes as well.
            && function(root).abs() < 0.5
        {
            found.push(root);
        }
        last = Some((z, value));
    }
    found
}

/// One end of the interval of stretches around today in which E² > 0.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct End {
    /// The stretch there, as an unevaluated sum.
    pub stretch: f64,
    pub stretch_low: f64,
    /// Whether E² vanishes there; otherwise the tables end.
    pub turns: bool,
}

/// The stretches a history is told for.
#[derive(Clone, Copy, Debug, PartialEq)]
pub(super) struct Domain {
    pub low: End,
    pub high: End,
}

impl End {
    fn of_tables(octave: i32) -> End {
        End {
            stretch: libm::ldexp(1.0, octave),
            stretch_low: 0.0,
            turns: false,
        }
    }

    /// The zero of E² in a bracket: bisected in doubles, then one Newton step
    /// whose correction is kept beside it.
    fn turning_point(densities: &Densities, low: f64, high: f64) -> Result<End, HistoryFault> {
        let square = |stretch| densities.rate_squared(stretch);
        let stretch = bracketed_root(low, high, square).unwrap_or(high);
        let slope = densities.rate_squared_slope(stretch);
        let correction = -densities.rate_squared(stretch) / slope;
        if !correction.is_finite() || correction.abs() > 1e-9 * stretch {
            return Err(HistoryFault::Indeterminate {
                redshift: stretch - 1.0,
            });
        }
        let (stretch, stretch_low) = two_sum(stretch, correction);
        Ok(End {
            stretch,
            stretch_low,
            turns: true,
        })
    }
}

/// Steps an octave is searched with for zeros of E² and of its slope.
const STEPS: i32 = 64;

impl Domain {
    /// Whether the expansion turns round at either end.
    #[inline]
    pub(super) fn turns(&self) -> bool {
        self.low.turns || self.high.turns
    }

    /// The connected interval around today in which E² is positive.
    ///
    /// # Errors
    /// [`HistoryFault::Indeterminate`] where a minimum of E² is zero within the
    /// last digits of the parameters.
    pub(super) fn of(densities: &Densities) -> Result<Domain, HistoryFault> {
        if !densities.cancelling() {
            return Ok(Domain {
                low: End::of_tables(LOWEST_OCTAVE),
                high: End::of_tables(HIGHEST_OCTAVE),
            });
        }
        Ok(Domain {
            low: first_zero(densities, LOWEST_OCTAVE)?.unwrap_or(End::of_tables(LOWEST_OCTAVE)),
            high: first_zero(densities, HIGHEST_OCTAVE)?.unwrap_or(End::of_tables(HIGHEST_OCTAVE)),
        })
    }
}

/// The zero of E² nearest to today on the way to v = 2^octave, if there is one.
fn first_zero(densities: &Densities, octave: i32) -> Result<Option<End>, HistoryFault> {
    let direction = octave.signum();
    let stretch = |step: i32| {
        let part = f64::from(step.rem_euclid(STEPS)) / f64::from(STEPS);
        libm::ldexp(1.0 + part, step.div_euclid(STEPS))
    };
    let mut before = 1.0;
    for step in 1..=STEPS * octave.abs() {
        let here = stretch(direction * step);
        if densities.rate_squared(here) <= 0.0 {
            return End::turning_point(densities, before, here).map(Some);
        }
        // A minimum between two positive values may dip below zero.
        let slope = |stretch| densities.rate_squared_slope(stretch);
        let falls_then_rises =
            f64::from(direction) * slope(before) < 0.0 && f64::from(direction) * slope(here) > 0.0;
        if falls_then_rises && let Some(lowest) = bracketed_root(before, here, slope) {
            match sign_at_minimum(densities, lowest) {
                Some(true) => {}
                Some(false) => return End::turning_point(densities, before, lowest).map(Some),
                None => {
                    return Err(HistoryFault::Indeterminate {
                        redshift: lowest - 1.0,
                    });
                }
            }
        }
        before = here;
    }
    Ok(None)
}

/// Whether E² is clearly positive, clearly negative, or (`None`) neither.
fn sign_at_minimum(densities: &Densities, stretch: f64) -> Option<bool> {
    let square = densities.rate_squared(stretch);
    let terms = densities.terms(stretch);
    let scale = terms.radiation
        + terms.cold_matter
        + terms.massive_neutrinos
        + terms.curvature.abs()
        + terms.dark_energy.abs();
    (square.abs() > 20.0 * f64::EPSILON * scale).then_some(square > 0.0)
}
