//! Builds the panels of a history and joins them.

use super::fit::Fit;
use super::panels::{HALF_OCTAVES, Panel, Panels, Sums, half_octave, polynomial};
use super::turning::{Domain, End};
use super::{Accuracy, Densities, HistoryFault, check, tail};
use crate::numerics::{Chebyshev, DoubleDouble, LARGEST_NODES};

/// Panels a table may have: with some 520 bytes each they stay within 512 KB.
const MOST_PANELS: usize = 960;
/// Halvings a half-octave may undergo.
const MOST_HALVINGS: u32 = 40;
/// The share of its own stretch that a panel beside a turning point may span.
const ROOT_SPAN: f64 = 0.125;

/// The panels of a model over its domain, and their checked accuracy.
pub(super) fn build(
    densities: &Densities,
    domain: &Domain,
    plan: &Chebyshev,
) -> Result<(Panels, Accuracy), HistoryFault> {
    let mut fits = Vec::with_capacity(HALF_OCTAVES + 16);
    let (mut low, mut high) = (domain.low.stretch, domain.high.stretch);
    if domain.low.turns {
        let fit = beside_turning_point(densities, plan, domain.low, 1.0);
        low = fit.high;
        fits.push(fit);
    }
    let last = domain
        .high
        .turns
        .then(|| beside_turning_point(densities, plan, domain.high, 1.0));
    if let Some(fit) = &last {
        high = fit.low;
    }
    for number in 0..HALF_OCTAVES {
        let (from, to) = (
            half_octave(number).max(low),
            half_octave(number + 1).min(high),
        );
        if from < to {
            halve_until_converged(densities, plan, from, to, MOST_HALVINGS, &mut fits)?;
        }
    }
    fits.extend(last);
    let accuracy = check::accuracy(densities, &fits, plan);
    Ok((join(densities, domain, &fits), accuracy))
}

/// The panel that begins at a turning point, shortened until it has converged;
/// it never reaches `today`.
fn beside_turning_point(densities: &Densities, plan: &Chebyshev, end: End, today: f64) -> Fit {
    let side = if end.stretch < today { 1.0 } else { -1.0 };
    let mut span = ROOT_SPAN * end.stretch.min((end.stretch - today).abs());
    loop {
        let fit = Fit::root(densities, plan, end, end.stretch + side * span);
        if fit.converged || plan.nodes().len() < LARGEST_NODES || span < 1e-6 * end.stretch {
            return fit;
        }
        span *= 0.5;
    }
}

fn halve_until_converged(
    densities: &Densities,
    plan: &Chebyshev,
    low: f64,
    high: f64,
    halvings: u32,
    fits: &mut Vec<Fit>,
) -> Result<(), HistoryFault> {
    let fit = Fit::line(densities, plan, low, high);
    // A plan with few nodes never converges: it is there to be checked as it is.
    if fit.converged || plan.nodes().len() < LARGEST_NODES {
        fits.push(fit);
        return Ok(());
    }
    if halvings == 0 || fits.len() >= MOST_PANELS {
        return Err(HistoryFault::TooCostly {
            redshift: low - 1.0,
        });
    }
    let middle = low + 0.5 * (high - low);
    halve_until_converged(densities, plan, low, middle, halvings - 1, fits)?;
    halve_until_converged(densities, plan, middle, high, halvings - 1, fits)
}

/// Sums the panels from both sides: distances and lookback times outward from
/// today, ages and conformal times inward from infinity, so that each keeps its
/// relative accuracy where it is small.
fn join(densities: &Densities, domain: &Domain, fits: &[Fit]) -> Panels {
    let mut panels: Vec<Panel> = fits.iter().map(Fit::panel).collect();
    let mut edges: Vec<f64> = fits.iter().map(|fit| fit.low - 1.0).collect();
    edges.push(domain.high.stretch - 1.0);
    let mut sums = vec![Sums::default(); edges.len()];
    let steps: Vec<Steps> = fits
        .iter()
        .zip(&panels)
        .map(|(fit, panel)| Steps::of(fit, panel))
        .collect();
    let today = fits.partition_point(|fit| fit.low < 1.0);
    sum_from_today(&mut panels, &mut sums, &steps, today);
    let beginning = if domain.high.turns {
        (f64::INFINITY, f64::INFINITY)
    } else {
        (
            tail::comoving(densities, domain.high.stretch),
            tail::lookback(densities, domain.high.stretch),
        )
    };
    sum_from_the_beginning(&mut panels, &mut sums, &steps, beginning);
    Panels::new(panels, edges, &sums)
}

fn sum_from_today(panels: &mut [Panel], sums: &mut [Sums], steps: &[Steps], today: usize) {
    let (mut comoving, mut lookback) = (DoubleDouble::default(), DoubleDouble::default());
    for (number, step) in steps.iter().enumerate().skip(today) {
        let centre = &mut panels[number].at_centre;
        centre.set_comoving(comoving + -step.distance_low);
        centre.lookback = (lookback + -step.time_low).value();
        comoving = comoving + step.distance_high + -step.distance_low;
        lookback = lookback + step.time_high + -step.time_low;
        sums[number + 1].comoving = comoving.value();
        sums[number + 1].lookback = lookback.value();
    }
    (comoving, lookback) = (DoubleDouble::default(), DoubleDouble::default());
    for (number, step) in steps.iter().enumerate().take(today).rev() {
        let centre = &mut panels[number].at_centre;
        centre.set_comoving(comoving + -step.distance_high);
        centre.lookback = (lookback + -step.time_high).value();
        comoving = comoving + step.distance_low + -step.distance_high;
        lookback = lookback + step.time_low + -step.time_high;
        sums[number].comoving = comoving.value();
        sums[number].lookback = lookback.value();
    }
}

/// `beginning`: conformal time and age at the top, infinite where they diverge.
fn sum_from_the_beginning(
    panels: &mut [Panel],
    sums: &mut [Sums],
    steps: &[Steps],
    beginning: (f64, f64),
) {
    // Infinity would become NaN in double-double arithmetic.
    let start = |time: f64| DoubleDouble::from(if time.is_finite() { time } else { 0.0 });
    let read = |sum: DoubleDouble, start: f64| {
        if start.is_finite() {
            sum.value()
        } else {
            start
        }
    };
    let (mut conformal, mut age) = (start(beginning.0), start(beginning.1));
    if let Some(last) = sums.last_mut() {
        (last.conformal, last.age) = beginning;
    }
    for (number, step) in steps.iter().enumerate().rev() {
        let centre = &mut panels[number].at_centre;
        centre.conformal = read(conformal + step.distance_high, beginning.0);
        centre.age = read(age + step.time_high, beginning.1);
        conformal = conformal + step.distance_high + -step.distance_low;
        age = age + step.time_high + -step.time_low;
        sums[number].conformal = read(conformal, beginning.0);
        sums[number].age = read(age, beginning.1);
    }
}

/// The integrals from the origin of a panel's coordinate to its two ends.
struct Steps {
    distance_low: f64,
    distance_high: f64,
    time_low: f64,
    time_high: f64,
}

impl Steps {
    fn of(fit: &Fit, panel: &Panel) -> Self {
        let (low, high) = fit.ends();
        Steps {
            distance_low: low * polynomial(&panel.distance, low),
            distance_high: high * polynomial(&panel.distance, high),
            time_low: low * polynomial(&panel.time, low),
            time_high: high * polynomial(&panel.time, high),
        }
    }
}
