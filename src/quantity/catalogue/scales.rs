//! Sizes per angle and their ratio to depths.

use std::f64::consts::PI;

use super::distances::{NEAR_ANTIPODES, transverse_mpc};
use super::*;

pub(super) const ANGULAR_SCALE: Quantity = Quantity {
    name: "angular_scale",
    symbol: "D_A per arcsec",
    unit: "kpc/arcsec",
    ucd: "pos.distance;arith.ratio",
    meaning: "Proper size seen under one second of arc.",
    domain: "0 to its maximum in the model; decreases with redshift beyond it",
    tolerance: PRODUCT,
    table_error: Some(|accuracy| accuracy.comoving),
    scaling: HubbleScaling::Power(1),
    future: false,
    forward: forward!(COMOVING, |epoch, frame| {
        KPC_PER_ARCSEC * (transverse_mpc(epoch, frame) / (1.0 + epoch.redshift))
    }),
    condition: Some(NEAR_ANTIPODES),
    inverse: None,
    undefined: always,
    formula: "D_A π/648000",
    source: hogg("section 6"),
};

pub(super) const COMOVING_ANGULAR_SCALE: Quantity = Quantity {
    name: "comoving_angular_scale",
    symbol: "D_M per arcsec",
    unit: "kpc/arcsec",
    ucd: "pos.distance;arith.ratio",
    meaning: "Comoving size seen under one second of arc.",
    domain: "0 upwards",
    tolerance: PRODUCT,
    table_error: Some(|accuracy| accuracy.comoving),
    scaling: HubbleScaling::Power(1),
    future: false,
    forward: forward!(COMOVING, |epoch, frame| KPC_PER_ARCSEC
        * transverse_mpc(epoch, frame)),
    condition: Some(NEAR_ANTIPODES),
    inverse: None,
    undefined: always,
    formula: "D_M π/648000",
    source: hogg("section 5"),
};

pub(super) const ALCOCK_PACZYNSKI: Quantity = Quantity {
    name: "alcock_paczynski",
    symbol: "F_AP",
    unit: "1",
    ucd: "arith.ratio;phys.cosmology",
    meaning: "Ratio of the depth in redshift to the angle of a sphere that expands with the universe.",
    domain: "0 upwards",
    tolerance: PRODUCT,
    // Two tables: what an answer states may exceed the tolerance.
    table_error: Some(|accuracy| accuracy.comoving + accuracy.rate),
    scaling: HubbleScaling::None,
    future: false,
    forward: forward!(RATE_AND_COMOVING, |epoch, frame| frame
        .transverse(epoch)
        .abs()
        * epoch.rate),
    condition: Some(NEAR_ANTIPODES),
    inverse: None,
    undefined: always,
    formula: "F_AP = D_M H/c",
    source: Citation {
        authors: "Alcock & Paczynski",
        year: 1979,
        reference: "Nature 281, 358",
        locator: "main relation (from memory)",
    },
};

/// kpc per second of arc at a distance of 1 Mpc.
const KPC_PER_ARCSEC: f64 = PI / 648.0;
