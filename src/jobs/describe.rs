//! Describes a model: what it is made of, its milestones and its end.

use super::description::{Budget, Description, Horizons, Past, PastKind, Scalar, Today};
use super::early::PrintedEpochs;
use super::{accuracy, conversion, early, future, milestones};
use crate::expansion::{Beginning, History};

/// Describes a model; `printed` holds what its paper prints.
#[must_use]
pub fn describe(history: &History, printed: PrintedEpochs) -> Description {
    Description {
        densities: budget(history),
        today: today(history),
        milestones: milestones::milestones(history),
        early: early::early(history, printed),
        horizons: horizons(history),
        past: past(history),
        fate: future::fate(history),
        redshift_range: history.range(),
        accuracy: conversion::defined_quantities(history)
            .map(|quantity| (quantity, accuracy::stated(history, None, quantity)))
            .collect(),
        table_bytes: history.bytes(),
    }
}

fn budget(history: &History) -> Budget {
    let spec = history.spec();
    Budget {
        matter: spec.matter,
        baryons: spec.baryons,
        massive_neutrinos: history.densities().terms(1.0).massive_neutrinos,
        radiation: spec.photons() + spec.massless_neutrinos(),
        photons: spec.photons(),
        massless_neutrinos: spec.massless_neutrinos(),
        curvature: spec.curvature,
        dark_energy: spec.dark_energy.density,
    }
}

fn today(history: &History) -> Today {
    let age = history
        .age_today()
        .map(|age| history.hubble_time_gyr() * age);
    Today {
        age: Scalar::optional(age, "Gyr", "the model has no beginning"),
        hubble_time: Scalar::from(history.hubble_time_gyr(), "Gyr"),
        hubble_distance: Scalar::from(history.hubble_distance_mpc(), "Mpc"),
        deceleration_parameter: Scalar::from(
            history.densities().composition(0.0).deceleration,
            "1",
        ),
    }
}

fn horizons(history: &History) -> Horizons {
    let in_mpc = |distance: f64| history.hubble_distance_mpc() * distance;
    let particle = history.conformal_time_today().map(in_mpc);
    let event = match future::event_horizon(history) {
        Ok(distance) => Scalar::from(in_mpc(distance), "Mpc"),
        Err(reason) => Scalar::none("Mpc", reason),
    };
    Horizons {
        particle: Scalar::optional(particle, "Mpc", "light has come from everywhere"),
        event,
    }
}

fn past(history: &History) -> Past {
    let (kind, redshift) = match history.beginning() {
        Beginning::BigBang => (PastKind::HotBeginning, None),
        Beginning::Bounce { redshift } => (PastKind::Bounce, Some(redshift)),
        Beginning::None => (PastKind::None, None),
    };
    Past { kind, redshift }
}
