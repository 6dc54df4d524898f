//! What the universe is made of at a redshift.

use std::f64::consts::PI;

use super::*;
use crate::expansion::Composition;
use crate::model::constants::{GRAVITATION, MEGAPARSEC_M};
use crate::quantity::Frame;

pub(super) const CRITICAL_DENSITY: Quantity = Quantity {
    name: "critical_density",
    symbol: "ρ_c",
    unit: "kg.m**-3",
    ucd: "phys.density;phys.cosmology",
    meaning: "Mass density at which the universe would be flat.",
    domain: "above 0",
    tolerance: PRODUCT,
    // For a condition of 1: that of a square is 2.
    table_error: Some(|accuracy| accuracy.rate),
    scaling: HubbleScaling::None,
    future: true,
    forward: forward!(RATE, |epoch, frame| {
        let per_second = frame.hubble_constant * epoch.rate * (1e3 / MEGAPARSEC_M);
        3.0 * per_second * per_second / (8.0 * PI * GRAVITATION)
    }),
    condition: None,
    inverse: None,
    undefined: always,
    formula: "ρ_c = 3 H²/(8π G)",
    source: peebles("section 5"),
};

pub(super) const MATTER_FRACTION: Quantity = Quantity {
    name: "matter_fraction",
    symbol: "Ω_m(z)",
    unit: "1",
    ucd: "phys.density;arith.ratio",
    meaning: "Share of matter in the critical density at that redshift, massive neutrinos included.",
    domain: "0 upwards; the fractions of matter, radiation, curvature and dark energy sum to 1",
    tolerance: PRODUCT,
    table_error: None,
    scaling: HubbleScaling::None,
    future: true,
    forward: forward!(NOTHING, |epoch, frame| at(epoch.redshift, frame).matter),
    condition: None,
    inverse: None,
    undefined: always,
    formula: "Ω_m(z) = ρ_m(z)/ρ_c(z)",
    source: peebles("section 13"),
};

pub(super) const RADIATION_FRACTION: Quantity = Quantity {
    name: "radiation_fraction",
    symbol: "Ω_r(z)",
    meaning: "Share of photons and massless neutrinos in the critical density at that redshift.",
    domain: "0 upwards",
    forward: forward!(NOTHING, |epoch, frame| at(epoch.redshift, frame).radiation),
    formula: "Ω_r(z) = ρ_r(z)/ρ_c(z)",
    ..MATTER_FRACTION
};

pub(super) const CURVATURE_FRACTION: Quantity = Quantity {
    name: "curvature_fraction",
    symbol: "Ω_K(z)",
    meaning: "Share of curvature at that redshift: positive when open, negative when closed.",
    domain: "any number up to 1",
    forward: forward!(NOTHING, |epoch, frame| at(epoch.redshift, frame).curvature),
    formula: "Ω_K(z) = Ω_K (1+z)²/E²",
    ..MATTER_FRACTION
};

pub(super) const DARK_ENERGY_FRACTION: Quantity = Quantity {
    name: "dark_energy_fraction",
    symbol: "Ω_DE(z)",
    meaning: "Share of dark energy in the critical density at that redshift.",
    domain: "any number",
    forward: forward!(NOTHING, |epoch, frame| at(epoch.redshift, frame)
        .dark_energy),
    formula: "Ω_DE(z) = Ω_DE f(z)/E²",
    ..MATTER_FRACTION
};

pub(super) const MASSIVE_NEUTRINO_FRACTION: Quantity = Quantity {
    name: "massive_neutrino_fraction",
    symbol: "Ω_ν(z)",
    meaning: "Share of massive neutrinos in the critical density at that redshift; contained in the matter fraction.",
    domain: "0 to the matter fraction",
    forward: forward!(NOTHING, |epoch, frame| at(epoch.redshift, frame)
        .massive_neutrino),
    formula: "Ω_ν(z) = ρ_ν(z)/ρ_c(z), ρ_ν the Fermi–Dirac integral of each mass",
    ..MATTER_FRACTION
};

pub(super) const EQUATION_OF_STATE: Quantity = Quantity {
    name: "equation_of_state",
    symbol: "w",
    ucd: "phys.cosmology",
    meaning: "Pressure over energy density of the dark energy at that redshift.",
    domain: "any number",
    forward: forward!(NOTHING, |epoch, frame| {
        frame
            .history
            .densities()
            .equation_of_state(1.0 + epoch.redshift)
    }),
    undefined: |spec| {
        spec.dark_energy
            .form
            .absent
            .then_some("the model has no dark energy")
    },
    formula: "w = P/ρ, as declared",
    source: Citation {
        authors: "Chevallier & Polarski",
        year: 2001,
        reference: "IJMPD 10, 213, arXiv:gr-qc/0009008",
        locator: "section 2 (from memory)",
    },
    ..MATTER_FRACTION
};

#[inline]
fn at(redshift: f64, frame: &Frame) -> Composition {
    frame.history.densities().composition(redshift)
}
