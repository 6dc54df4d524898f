//! Volumes and the distance averaged over them.

use std::f64::consts::PI;

use super::distances::NEAR_ANTIPODES;
use super::*;
use crate::expansion::Epoch;
use crate::quantity::Frame;

pub(super) const COMOVING_VOLUME: Quantity = Quantity {
    name: "comoving_volume",
    symbol: "V_C",
    unit: "Mpc**3",
    ucd: "phys.volume;phys.cosmology",
    meaning: "Comoving volume out to that redshift, whole sky; counts space again beyond the antipode of a closed model.",
    domain: "0 upwards",
    tolerance: PRODUCT,
    // For a condition of 1: that of a cube is 3.
    table_error: Some(|accuracy| accuracy.comoving),
    scaling: HubbleScaling::Power(3),
    future: false,
    forward: forward!(PRECISE, |epoch, frame| {
        let cube =
            frame.hubble_distance_mpc * frame.hubble_distance_mpc * frame.hubble_distance_mpc;
        cube * frame.volume(epoch)
    }),
    condition: None,
    inverse: Some(Inverse::Solved {
        given: |value, frame| radius(value) / frame.hubble_distance_mpc,
        given_slope: |value, given| given / (3.0 * value),
        curve: &VOLUME,
    }),
    undefined: always,
    formula: "V_C = 4π ∫ D_M² dD_C = (4π/3) D_M³ for Ω_K = 0",
    source: hogg("section 9, eq. 29 (number from memory)"),
};

pub(super) const VOLUME_ELEMENT: Quantity = Quantity {
    name: "volume_element",
    symbol: "dV_C/dΩdz",
    unit: "Mpc**3/sr",
    ucd: "phys.volume;arith.ratio",
    meaning: "Comoving volume per steradian and unit redshift.",
    domain: "0 upwards",
    tolerance: PRODUCT,
    // For a condition of 1: that in H0 is 3.
    table_error: Some(|accuracy| (2.0 * accuracy.comoving + accuracy.rate) / 3.0),
    scaling: HubbleScaling::Power(3),
    future: false,
    forward: forward!(RATE_AND_COMOVING, |epoch, frame| {
        let transverse = frame.hubble_distance_mpc * frame.transverse(epoch);
        frame.hubble_distance_mpc * (transverse * transverse) / epoch.rate
    }),
    condition: Some(NEAR_ANTIPODES),
    inverse: None,
    undefined: always,
    formula: "dV_C/dΩ dz = (c/H) D_M²",
    source: hogg("section 9, eq. 28 (number from memory)"),
};

pub(super) const VOLUME_AVERAGED_DISTANCE: Quantity = Quantity {
    name: "volume_averaged_distance",
    symbol: "D_V",
    unit: "Mpc",
    ucd: "pos.distance;phys.cosmology",
    meaning: "Mean of two transverse and one radial distance, as acoustic scales average them.",
    domain: "0 upwards",
    tolerance: PRODUCT,
    table_error: Some(|accuracy| (2.0 * accuracy.comoving + accuracy.rate) / 3.0),
    scaling: HubbleScaling::Power(1),
    future: false,
    forward: forward!(RATE_AND_COMOVING, |epoch, frame| {
        let transverse = frame.transverse(epoch).abs();
        if transverse == 0.0 {
            return 0.0;
        }
        // The ratio stays near 1 where the cube would leave the range of doubles.
        frame.hubble_distance_mpc
            * transverse
            * libm::cbrt(epoch.redshift / (transverse * epoch.rate))
    }),
    condition: Some(NEAR_ANTIPODES),
    inverse: None,
    undefined: always,
    formula: "D_V = [z D_M² c/H]^(1/3)",
    source: Citation {
        authors: "Eisenstein et al.",
        year: 2005,
        reference: "ApJ 633, 560, arXiv:astro-ph/0501171",
        locator: "eq. 2 (number from memory)",
    },
};

/// A cube triples the rounding of the distance: its rest is wanted too.
const PRECISE: Wanted = Wanted {
    comoving_rest: true,
    ..COMOVING
};

/// The radius of a Euclidean ball of this volume.
fn radius(volume: f64) -> f64 {
    libm::cbrt(0.75 / PI * volume)
}

/// The volume solved for by the radius of a ball that holds it, which grows
/// like z near today, in units of c/H0.
static VOLUME: Solved = Solved {
    wanted: Wanted {
        rate: true,
        ..PRECISE
    },
    value: radius_of_volume,
    slope: |epoch, frame| {
        let radius = radius_of_volume(epoch, frame);
        let transverse = frame.transverse(epoch);
        let ratio = if radius == 0.0 {
            1.0
        } else {
            transverse / radius
        };
        ratio * ratio / epoch.rate
    },
    turning: |_| &[],
    horizon: |frame| {
        let horizon = frame.history.conformal_time_today();
        horizon.map_or(f64::INFINITY, |comoving| {
            radius_of_volume(
                &Epoch {
                    comoving,
                    ..Epoch::default()
                },
                frame,
            )
        })
    },
    late_limit: |_| f64::NAN,
    future: false,
};

fn radius_of_volume(epoch: &Epoch, frame: &Frame) -> f64 {
    radius(frame.volume(epoch))
}
