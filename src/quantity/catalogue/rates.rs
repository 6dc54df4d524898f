//! The expansion rate, its change, and what it makes drift.

use super::*;
use crate::expansion::{Beginning, Epoch};
use crate::model::constants::SPEED_OF_LIGHT_KM_S;
use crate::quantity::Frame;

pub(super) const HUBBLE_PARAMETER: Quantity = Quantity {
    name: "hubble_parameter",
    symbol: "H",
    unit: "km/(s.Mpc)",
    ucd: "phys.cosmology;arith.rate",
    meaning: "Expansion rate at that redshift.",
    domain: "above 0",
    tolerance: PRODUCT,
    table_error: Some(|accuracy| accuracy.rate),
    scaling: HubbleScaling::None,
    future: true,
    forward: forward!(RATE, |epoch, frame| frame.hubble_constant * epoch.rate),
    condition: None,
    inverse: Some(Inverse::Solved {
        given: |value, _| value,
        given_slope: |_, _| 1.0,
        curve: &EXPANSION_RATE,
    }),
    undefined: always,
    formula: "H = H0 √(Ω_r(1+z)⁴ + Ω_m(1+z)³ + Ω_K(1+z)² + Ω_DE f(z))",
    source: hogg("section 4, eq. 14 (number from memory)"),
};

pub(super) const HUBBLE_DISTANCE: Quantity = Quantity {
    name: "hubble_distance",
    symbol: "D_H",
    unit: "Mpc",
    ucd: "pos.distance;phys.cosmology",
    meaning: "Speed of light over the expansion rate at that redshift.",
    domain: "above 0",
    tolerance: PRODUCT,
    table_error: Some(|accuracy| accuracy.rate),
    scaling: HubbleScaling::Power(1),
    future: false,
    forward: forward!(RATE, |epoch, frame| frame.hubble_distance_mpc / epoch.rate),
    condition: None,
    inverse: None,
    undefined: always,
    formula: "c/H",
    source: davis_lineweaver("section 2 (from memory)"),
};

pub(super) const DECELERATION_PARAMETER: Quantity = Quantity {
    name: "deceleration_parameter",
    symbol: "q",
    unit: "1",
    ucd: "phys.cosmology",
    meaning: "Deceleration of the expansion at that redshift: negative while it accelerates.",
    domain: "any number",
    tolerance: DIFFERENCE,
    table_error: None,
    scaling: HubbleScaling::None,
    future: true,
    forward: forward!(NOTHING, |epoch, frame| {
        frame
            .history
            .densities()
            .composition(epoch.redshift)
            .deceleration
    }),
    condition: Some(Condition {
        possible: |_| true,
        number: |deceleration, _, _| {
            // Nothing is left of nothing, in an empty universe.
            if deceleration == 0.0 {
                1.0
            } else {
                (1.0 + deceleration.abs()) / deceleration.abs()
            }
        },
    }),
    inverse: None,
    undefined: always,
    formula: "q = ½ Σ Ω_i(z) (1 + 3 w_i)",
    source: peebles("section 13"),
};

pub(super) const REDSHIFT_DRIFT: Quantity = Quantity {
    name: "redshift_drift",
    symbol: "ż",
    unit: "yr**-1",
    ucd: "src.redshift;arith.rate",
    meaning: "Change of the observed redshift of a comoving source per year of observation.",
    domain: "any number",
    tolerance: DIFFERENCE,
    table_error: Some(|accuracy| accuracy.rate),
    scaling: HubbleScaling::None,
    future: true,
    forward: forward!(RATE, |epoch, frame| drift(epoch, frame) / years(frame)),
    condition: Some(NEAR_STANDSTILL),
    inverse: None,
    undefined: always,
    formula: "dz/dt = (1+z) H0 − H",
    source: LOEB,
};

pub(super) const VELOCITY_DRIFT: Quantity = Quantity {
    name: "velocity_drift",
    symbol: "v̇",
    unit: "cm/(s.yr)",
    ucd: "phys.acceleration",
    meaning: "Redshift drift as a spectroscopic velocity shift per year, c ż/(1+z).",
    domain: "any number",
    tolerance: DIFFERENCE,
    table_error: Some(|accuracy| accuracy.rate),
    scaling: HubbleScaling::None,
    future: true,
    forward: forward!(RATE, |epoch, frame| {
        drift(epoch, frame) / (1.0 + epoch.redshift) * (SPEED_OF_LIGHT_CM_S / years(frame))
    }),
    condition: Some(NEAR_STANDSTILL_OF_VELOCITY),
    inverse: None,
    undefined: always,
    formula: "dv/dt = c ż/(1+z)",
    source: LOEB,
};

const DIFFERENCE: Tolerance = Tolerance::LargerTerm {
    ulps: 4.0,
    relative: 1e-14,
};

const SPEED_OF_LIGHT_CM_S: f64 = 1e5 * SPEED_OF_LIGHT_KM_S;

const LOEB: Citation = Citation {
    authors: "Loeb",
    year: 1998,
    reference: "ApJL 499, L111, arXiv:astro-ph/9802122",
    locator: "main relation (from memory)",
};

/// (1+z) − E.
fn drift(epoch: &Epoch, frame: &Frame) -> f64 {
    frame.history.densities().drift(epoch.redshift)
}

const NEAR_STANDSTILL: Condition = Condition {
    possible: |_| true,
    number: |drift_per_year, epoch, frame| {
        let terms = epoch.redshift.abs() + (epoch.rate - 1.0).abs();
        if epoch.redshift == 0.0 || drift_per_year == 0.0 {
            1.0
        } else {
            terms / (drift_per_year * years(frame)).abs()
        }
    },
};

/// The same for a velocity per year.
const NEAR_STANDSTILL_OF_VELOCITY: Condition = Condition {
    possible: |_| true,
    number: |velocity_per_year, epoch, frame| {
        let drift_per_year = velocity_per_year * (1.0 + epoch.redshift) / SPEED_OF_LIGHT_CM_S;
        (NEAR_STANDSTILL.number)(drift_per_year, epoch, frame)
    },
};

/// 1/H0 in years.
fn years(frame: &Frame) -> f64 {
    frame.hubble_time_gyr * 1e9
}

static EXPANSION_RATE: Solved = Solved {
    wanted: RATE,
    value: |epoch, frame| frame.hubble_constant * epoch.rate,
    slope: |epoch, frame| {
        let stretch = 1.0 + epoch.redshift;
        let densities = frame.history.densities();
        frame.hubble_constant * densities.rate_squared_slope(stretch) / (2.0 * epoch.rate)
    },
    turning: |turning| &turning.rate,
    horizon: |frame| match frame.history.beginning() {
        Beginning::Bounce { .. } => f64::NAN,
        _ => limit(frame, frame.history.densities().early_exponent()),
    },
    late_limit: |frame| match frame.history.turnaround() {
        Some(_) => f64::NAN,
        // Towards z → −1 a falling power grows.
        None => limit(frame, -frame.history.densities().late_exponent()),
    },
    future: true,
};

/// What H tends to where E² follows a leading power that grows with this
/// exponent on the way; only a constant term has the exponent 0.
fn limit(frame: &Frame, exponent: f64) -> f64 {
    if exponent > 0.0 {
        f64::INFINITY
    } else if exponent < 0.0 {
        0.0
    } else {
        let constant = frame.history.densities().terms(1.0).dark_energy;
        frame.hubble_constant * constant.sqrt()
    }
}
