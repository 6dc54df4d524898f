//! Distances, and what is a distance by another name.

use super::*;
use crate::expansion::{Curve, Epoch};
use crate::model::constants::SPEED_OF_LIGHT_KM_S;
use crate::quantity::Frame;

pub(super) const COMOVING_DISTANCE: Quantity = Quantity {
    name: "comoving_distance",
    symbol: "D_C",
    unit: "Mpc",
    ucd: "pos.distance;phys.cosmology",
    meaning: "Comoving distance along the line of sight: the proper distance today.",
    domain: "0 upwards",
    tolerance: PRODUCT,
    table_error: Some(|accuracy| accuracy.comoving),
    scaling: HubbleScaling::Power(1),
    future: false,
    forward: forward!(COMOVING, |epoch, frame| frame.hubble_distance_mpc
        * epoch.comoving),
    condition: None,
    inverse: Some(Inverse::Table {
        curve: Curve::Comoving,
        scale: |frame| frame.hubble_distance_mpc,
    }),
    undefined: always,
    formula: "D_C = c ∫_0^z dz/H",
    source: hogg("section 4, eq. 15 (number from memory)"),
};

pub(super) const RECESSION_VELOCITY: Quantity = Quantity {
    name: "recession_velocity",
    symbol: "v_rec",
    unit: "km/s",
    ucd: "phys.veloc;phys.cosmology",
    meaning: "Rate at which the proper distance grows today, H0 times the comoving distance; may exceed c and is not cz.",
    domain: "0 upwards",
    tolerance: PRODUCT,
    table_error: Some(|accuracy| accuracy.comoving),
    scaling: HubbleScaling::None,
    future: false,
    forward: forward!(COMOVING, |epoch, _| SPEED_OF_LIGHT_KM_S * epoch.comoving),
    condition: None,
    inverse: Some(Inverse::Table {
        curve: Curve::Comoving,
        scale: |_| SPEED_OF_LIGHT_KM_S,
    }),
    undefined: always,
    formula: "v = H0 D_C",
    source: davis_lineweaver("eq. 4 (number from memory)"),
};

pub(super) const TRANSVERSE_COMOVING_DISTANCE: Quantity = Quantity {
    name: "transverse_comoving_distance",
    symbol: "D_M",
    unit: "Mpc",
    ucd: "pos.distance;phys.cosmology",
    meaning: "Comoving size over angle; absolute beyond the antipode of a closed model.",
    domain: "0 upwards",
    tolerance: PRODUCT,
    table_error: Some(|accuracy| accuracy.comoving),
    scaling: HubbleScaling::Power(1),
    future: false,
    forward: forward!(COMOVING, transverse_mpc),
    condition: Some(NEAR_ANTIPODES),
    inverse: Some(Inverse::Solved {
        given: |value, _| value,
        given_slope: |_, _| 1.0,
        curve: &TRANSVERSE,
    }),
    undefined: always,
    formula: "D_M = (c/H0) sinh(√Ω_K D_C H0/c)/√Ω_K; D_C for Ω_K = 0; sin and |Ω_K| for Ω_K < 0",
    source: hogg("section 5, eq. 16"),
};

pub(super) const ANGULAR_DIAMETER_DISTANCE: Quantity = Quantity {
    name: "angular_diameter_distance",
    symbol: "D_A",
    unit: "Mpc",
    ucd: "pos.distance;phys.cosmology",
    meaning: "Proper size over angle at that redshift.",
    domain: "0 to its maximum in the model; decreases with redshift beyond it",
    tolerance: PRODUCT,
    table_error: Some(|accuracy| accuracy.comoving),
    scaling: HubbleScaling::Power(1),
    future: false,
    forward: forward!(COMOVING, |epoch, frame| transverse_mpc(epoch, frame)
        / (1.0 + epoch.redshift)),
    condition: Some(NEAR_ANTIPODES),
    inverse: Some(Inverse::Solved {
        given: |value, _| value,
        given_slope: |_, _| 1.0,
        curve: &ANGULAR_DIAMETER,
    }),
    undefined: always,
    formula: "D_A = D_M/(1+z)",
    source: hogg("section 6, eq. 18 (number from memory)"),
};

pub(super) const LUMINOSITY_DISTANCE: Quantity = Quantity {
    name: "luminosity_distance",
    symbol: "D_L",
    unit: "Mpc",
    ucd: "pos.distance;phys.cosmology",
    meaning: "Distance at which a source would show its bolometric flux in a static flat space.",
    domain: "0 upwards",
    tolerance: PRODUCT,
    table_error: Some(|accuracy| accuracy.comoving),
    scaling: HubbleScaling::Power(1),
    future: false,
    forward: forward!(COMOVING, |epoch, frame| transverse_mpc(epoch, frame)
        * (1.0 + epoch.redshift)),
    condition: Some(NEAR_ANTIPODES),
    inverse: Some(Inverse::Solved {
        given: |value, _| value,
        given_slope: |_, _| 1.0,
        curve: &LUMINOSITY,
    }),
    undefined: always,
    formula: "D_L = (1+z) D_M",
    source: hogg("section 7, eq. 21 (number from memory)"),
};

pub(super) const DISTANCE_MODULUS: Quantity = Quantity {
    name: "distance_modulus",
    symbol: "μ",
    unit: "mag",
    ucd: "phot.mag.distMod",
    meaning: "Apparent minus absolute bolometric magnitude.",
    domain: "any number; diverges at z = 0",
    tolerance: Tolerance::Absolute(1e-14),
    // 5/ln 10 magnitudes for a relative error of the distance.
    table_error: Some(|accuracy| 2.171_472_409_516_259 * accuracy.comoving),
    scaling: HubbleScaling::Modulus,
    future: false,
    forward: forward!(COMOVING, |epoch, frame| {
        5.0 * libm::log10(transverse_mpc(epoch, frame) * (1.0 + epoch.redshift)) + 25.0
    }),
    condition: Some(NEAR_ANTIPODES),
    inverse: Some(Inverse::Solved {
        given: |value, _| libm::exp10((value - 25.0) / 5.0),
        given_slope: |_, given| given * (std::f64::consts::LN_10 / 5.0),
        curve: &LUMINOSITY,
    }),
    undefined: always,
    formula: "μ = 5 log10(D_L/Mpc) + 25",
    source: hogg("section 7, eq. 25 (number from memory)"),
};

pub(super) const LIGHT_TRAVEL_DISTANCE: Quantity = Quantity {
    name: "light_travel_distance",
    symbol: "c t_L",
    unit: "Mpc",
    ucd: "pos.distance;phys.cosmology",
    meaning: "Lookback time times the speed of light.",
    domain: "0 to below c times the age today",
    tolerance: PRODUCT,
    table_error: Some(|accuracy| accuracy.lookback),
    scaling: HubbleScaling::Power(1),
    future: false,
    forward: forward!(LOOKBACK, |epoch, frame| frame.hubble_distance_mpc
        * epoch.lookback),
    condition: None,
    inverse: Some(Inverse::Table {
        curve: Curve::Lookback,
        scale: |frame| frame.hubble_distance_mpc,
    }),
    undefined: always,
    formula: "c t_L",
    source: hogg("section 10"),
};

/// |D_M| in Mpc.
#[inline]
pub(super) fn transverse_mpc(epoch: &Epoch, frame: &Frame) -> f64 {
    frame.hubble_distance_mpc * frame.transverse(epoch).abs()
}

/// Where D_M returns to zero, its relative error grows without bound.
pub(super) const NEAR_ANTIPODES: Condition = Condition {
    possible: |frame| frame.reaches_antipode(),
    number: |_, epoch, frame| frame.transverse_condition(epoch),
};

/// d|D_M|/dz in Mpc.
fn transverse_slope_mpc(epoch: &Epoch, frame: &Frame) -> f64 {
    let sign = if frame.transverse(epoch) < 0.0 {
        -1.0
    } else {
        1.0
    };
    sign * frame.hubble_distance_mpc * frame.transverse_slope(epoch) / epoch.rate
}

/// What |D_M| tends to; a closed model may reach more.
fn transverse_horizon_mpc(frame: &Frame) -> f64 {
    match frame.history.conformal_time_today() {
        Some(comoving) if frame.curvature >= 0.0 => {
            let horizon = Epoch {
                comoving,
                ..Epoch::default()
            };
            transverse_mpc(&horizon, frame)
        }
        _ => f64::INFINITY,
    }
}

static TRANSVERSE: Solved = Solved {
    wanted: RATE_AND_COMOVING,
    value: transverse_mpc,
    slope: transverse_slope_mpc,
    turning: |turning| &turning.transverse,
    horizon: transverse_horizon_mpc,
    late_limit: |_| f64::NAN,
    future: false,
};

static ANGULAR_DIAMETER: Solved = Solved {
    wanted: RATE_AND_COMOVING,
    value: |epoch, frame| transverse_mpc(epoch, frame) / (1.0 + epoch.redshift),
    slope: |epoch, frame| {
        let stretch = 1.0 + epoch.redshift;
        (transverse_slope_mpc(epoch, frame) - transverse_mpc(epoch, frame) / stretch) / stretch
    },
    turning: |turning| &turning.angular_diameter,
    horizon: |_| f64::INFINITY,
    late_limit: |_| f64::NAN,
    future: false,
};

static LUMINOSITY: Solved = Solved {
    wanted: RATE_AND_COMOVING,
    value: |epoch, frame| transverse_mpc(epoch, frame) * (1.0 + epoch.redshift),
    slope: |epoch, frame| {
        transverse_slope_mpc(epoch, frame) * (1.0 + epoch.redshift) + transverse_mpc(epoch, frame)
    },
    turning: |turning| &turning.luminosity,
    horizon: |_| f64::INFINITY,
    late_limit: |_| f64::NAN,
    future: false,
};
