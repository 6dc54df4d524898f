//! What becomes of the universe: the event horizon and the fate.

use super::description::{Fate, FateKind, Scalar};
use crate::expansion::{Densities, History};
use crate::numerics::{bracketed_root, gauss_legendre_16};

/// v is halved this often before a history is taken to follow its leading term.
const HALVINGS: usize = 300;
/// The share of other terms below which the leading one stands alone.
const ALONE: f64 = 1e-17;

/// The comoving event horizon in c/H0: ∫_{−1}^0 dz/E.
pub(super) fn event_horizon(history: &History) -> Result<f64, &'static str> {
    if turnaround(history).is_some() {
        return Err("the universe recollapses");
    }
    let exponent = history.densities().late_exponent();
    if exponent >= 2.0 {
        return Err("there is none: light reaches everything in time");
    }
    let densities = history.densities();
    let rest = to_the_end(
        history,
        |v| 1.0 / densities.rate(v),
        |v| v / (1.0 - 0.5 * exponent),
    );
    Ok(rest - history.epoch(history.range().0).comoving)
}

/// How it ends, with the time from today in Gyr.
pub(super) fn fate(history: &History) -> Fate {
    let densities = history.densities();
    let exponent = densities.late_exponent();
    let in_gyr = |time: f64| Scalar::from(history.hubble_time_gyr() * time, "Gyr");
    let to_edge = -history.epoch(history.range().0).lookback;
    if let Some(turn) = turnaround(history) {
        let time = to_edge + time_to_turnaround(densities, turn, 1.0 + history.range().0);
        let time = match history.age_today() {
            Some(age) => in_gyr(2.0 * time + age),
            None => Scalar::none("Gyr", "the model has no beginning to mirror"),
        };
        return Fate {
            kind: FateKind::Recollapses,
            time,
        };
    }
    if exponent < 0.0 {
        let rest = to_the_end(
            history,
            |v| 1.0 / (v * densities.rate(v)),
            |_| -2.0 / exponent,
        );
        return Fate {
            kind: FateKind::Rip,
            time: in_gyr(to_edge + rest),
        };
    }
    Fate {
        kind: FateKind::ExpandsForEver,
        time: Scalar::none("Gyr", "it has no end"),
    }
}

/// ∫₀^{v₁} of a function from the end of the tables; `tail` times 1/E closes the
/// integral below v, where dark energy alone is left.
fn to_the_end(history: &History, function: impl Fn(f64) -> f64, tail: impl Fn(f64) -> f64) -> f64 {
    let densities = history.densities();
    let mut high = 1.0 + history.range().0;
    let mut sum = 0.0;
    for _ in 0..HALVINGS {
        let others = 1.0 - densities.terms(high).dark_energy / densities.rate_squared(high);
        if others.abs() < ALONE {
            break;
        }
        sum += gauss_legendre_16(0.5 * high, high, &function);
        high *= 0.5;
    }
    sum + tail(high) / densities.rate(high)
}

/// The stretch v at which the expansion comes to rest.
fn turnaround(history: &History) -> Option<f64> {
    if let Some(redshift) = history.turnaround() {
        return Some(1.0 + redshift);
    }
    let densities = history.densities();
    if !densities.cancelling() {
        return None;
    }
    let mut high = 1.0 + history.range().0;
    for _ in 0..HALVINGS {
        let low = 0.5 * high;
        if densities.rate_squared(low) < 0.0 {
            return bracketed_root(low, high, |v| densities.rate_squared(v));
        }
        high = low;
    }
    None
}

/// ∫ dv/(v E) from the turnaround, in √(v − v_turn), where it is smooth.
fn time_to_turnaround(densities: &Densities, turn: f64, from: f64) -> f64 {
    if from <= turn {
        return 0.0;
    }
    let mut high = (from - turn).sqrt();
    let mut sum = 0.0;
    for _ in 0..60 {
        sum += gauss_legendre_16(0.5 * high, high, |root| {
            let v = turn + root * root;
            2.0 * root / (v * densities.rate(v))
        });
        high *= 0.5;
    }
    if sum.is_finite() { sum } else { f64::NAN }
}
