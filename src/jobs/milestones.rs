//! When one component of the universe overtook another.

use super::description::{Equality, Milestones, Scalar};
use crate::expansion::History;
use crate::model::neutrinos;
use crate::numerics::bracketed_root;

/// Points sampled on each panel of the history in search of a change of sign.
const SAMPLES: u32 = 4;
/// A share of the terms below this has no sign that rounding could not have made.
const SIGNIFICANT: f64 = 1e-12;

/// The redshifts at which one thing overtook another.
pub(super) fn milestones(history: &History) -> Milestones {
    let acceleration = zeros(history, |z| history.densities().braking(z));
    let redshift = |z: f64| Scalar::from(z, "1");
    Milestones {
        equality: equality(history),
        matter_dark_energy_equality: matter_dark_energy(history),
        acceleration: acceleration.into_iter().map(redshift).collect(),
        angular_diameter_peaks: peaks(history).into_iter().map(redshift).collect(),
    }
}

fn equality(history: &History) -> Equality {
    let spec = history.spec();
    let massive = spec.massive_neutrinos();
    let photons = spec.photons();
    if photons == 0.0 {
        let none = Scalar::none("1", "the model declares no radiation");
        return Equality {
            all_neutrinos_massless: none.clone(),
            pressure_split: none,
        };
    }
    let today: f64 = massive
        .iter()
        .map(|one| one.massless_density * neutrinos::energy(one.y))
        .sum();
    let cold = spec.matter - today;
    let massless: f64 = massive.iter().map(|one| one.massless_density).sum();
    let radiation = photons + spec.massless_neutrinos() + massless;
    let matter = if cold > 0.0 {
        Some(cold / radiation - 1.0)
    } else {
        None
    };
    let split = zeros(history, |z| {
        let v = 1.0 + z;
        let pressures = massive
            .iter()
            .map(|one| one.massless_density * neutrinos::pressure(one.y / v));
        let energies = massive
            .iter()
            .map(|one| one.massless_density * neutrinos::energy(one.y / v));
        let (pressure, energy): (f64, f64) = (pressures.sum(), energies.sum());
        share(
            (photons + spec.massless_neutrinos() + 2.0 * pressure) * v,
            energy * v + cold,
        )
    });
    Equality {
        all_neutrinos_massless: Scalar::optional(matter, "1", "there is no other matter"),
        pressure_split: Scalar::optional(split.last().copied(), "1", "neither overtakes the other"),
    }
}

/// Where matter and dark energy are equal, nearest to today.
fn matter_dark_energy(history: &History) -> Scalar {
    if history.spec().dark_energy.density == 0.0 {
        return Scalar::none("1", "the model has no dark energy");
    }
    let crossings = zeros(history, |z| {
        let terms = history.densities().terms(1.0 + z);
        share(
            terms.cold_matter + terms.massive_neutrinos,
            terms.dark_energy,
        )
    });
    let distance = |z: &f64| libm::log1p(*z).abs();
    let nearest = crossings
        .into_iter()
        .min_by(|one, other| distance(one).total_cmp(&distance(other)));
    Scalar::optional(nearest, "1", "neither overtakes the other")
}

/// The largest of its neighbours among the turning points of D_A.
fn peaks(history: &History) -> Vec<f64> {
    let frame = crate::quantity::Frame::of(history);
    let distance = |z: f64| frame.transverse(&history.epoch(z)).abs() / (1.0 + z);
    let turning = &history.turning().angular_diameter;
    let step = |z: f64| 1e-3 * (1.0 + z);
    let peak = |z: &&f64| {
        distance(**z) >= distance(**z - step(**z)) && distance(**z) >= distance(**z + step(**z))
    };
    turning.iter().filter(peak).copied().collect()
}

/// How much larger one term is than another, as a share of both.
fn share(one: f64, other: f64) -> f64 {
    let sizes = one.abs() + other.abs();
    if sizes > 0.0 {
        (one - other) / sizes
    } else {
        0.0
    }
}

/// The changes of sign of a share over the range of a history, ascending;
/// between the samples where it is more than rounding.
fn zeros(history: &History, function: impl Fn(f64) -> f64) -> Vec<f64> {
    let (lowest, highest) = history.range();
    let mut samples = vec![lowest];
    for pair in history.edges().windows(2) {
        if let &[low, high] = pair {
            let part = (high - low) / f64::from(SAMPLES);
            samples.extend((0..SAMPLES).map(|number| low + f64::from(number) * part));
        }
    }
    samples.retain(|z| (lowest..=highest).contains(z));
    samples.push(highest);
    samples.retain(|z| function(*z).abs() >= SIGNIFICANT);
    samples
        .windows(2)
        .filter_map(|pair| {
            let &[low, high] = pair else { return None };
            bracketed_root(low, high, &function)
        })
        .collect()
}
