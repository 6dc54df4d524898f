//! Redshift and what is one with it: no table enters.

use super::*;
use crate::model::constants::SPEED_OF_LIGHT_KM_S;

pub(super) const REDSHIFT: Quantity = Quantity {
    name: "redshift",
    symbol: "z",
    unit: "1",
    ucd: "src.redshift",
    meaning: "Cosmological redshift.",
    domain: "0 to 1e9; −0.99 to 0 with future",
    tolerance: PRODUCT,
    table_error: None,
    scaling: HubbleScaling::None,
    future: true,
    forward: forward!(NOTHING, |epoch, _| epoch.redshift),
    condition: None,
    inverse: Some(Inverse::Direct {
        redshift: |value, _| value,
        sensitivity: f64::abs,
        domain: |_| (-1.0, f64::INFINITY),
    }),
    undefined: always,
    formula: "z = λ_observed/λ_emitted − 1",
    source: hogg("section 3"),
};

pub(super) const SCALE_FACTOR: Quantity = Quantity {
    name: "scale_factor",
    symbol: "a",
    unit: "1",
    ucd: "arith.factor",
    meaning: "Scale factor of the universe, 1 today.",
    domain: "above 0 to 1; above 1 with future",
    tolerance: PRODUCT,
    table_error: None,
    scaling: HubbleScaling::None,
    future: true,
    forward: forward!(NOTHING, |epoch, _| 1.0 / (1.0 + epoch.redshift)),
    condition: None,
    inverse: Some(Inverse::Direct {
        // Not 1/a − 1: near a = 1 the difference is exact.
        redshift: |value, _| (1.0 - value) / value,
        sensitivity: |z| 1.0 + z,
        domain: |_| (0.0, f64::INFINITY),
    }),
    undefined: always,
    formula: "a = 1/(1+z)",
    source: peebles("section 5"),
};

pub(super) const OPTICAL_VELOCITY: Quantity = Quantity {
    name: "optical_velocity",
    symbol: "cz",
    unit: "km/s",
    ucd: "spect.dopplerVeloc.opt",
    meaning: "Redshift times the speed of light (optical convention): a label, not a velocity.",
    domain: "0 upwards; below 0 with future",
    tolerance: PRODUCT,
    table_error: None,
    scaling: HubbleScaling::None,
    future: true,
    forward: forward!(NOTHING, |epoch, _| SPEED_OF_LIGHT_KM_S * epoch.redshift),
    condition: None,
    inverse: Some(Inverse::Direct {
        redshift: |value, _| value / SPEED_OF_LIGHT_KM_S,
        sensitivity: f64::abs,
        domain: |_| (-SPEED_OF_LIGHT_KM_S, f64::INFINITY),
    }),
    undefined: always,
    formula: "v = c z",
    source: GREISEN,
};

pub(super) const RADIO_VELOCITY: Quantity = Quantity {
    name: "radio_velocity",
    symbol: "v_radio",
    unit: "km/s",
    ucd: "spect.dopplerVeloc.radio",
    meaning: "Relative drop in frequency times the speed of light (radio convention).",
    domain: "0 to below c; below 0 with future",
    tolerance: PRODUCT,
    table_error: None,
    scaling: HubbleScaling::None,
    future: true,
    forward: forward!(NOTHING, |epoch, _| SPEED_OF_LIGHT_KM_S * epoch.redshift
        / (1.0 + epoch.redshift)),
    condition: None,
    inverse: Some(Inverse::Direct {
        redshift: |value, _| value / (SPEED_OF_LIGHT_KM_S - value),
        sensitivity: |z| z.abs() * (1.0 + z),
        domain: |_| (f64::NEG_INFINITY, SPEED_OF_LIGHT_KM_S),
    }),
    undefined: always,
    formula: "v = c z/(1+z)",
    source: GREISEN,
};

pub(super) const CMB_TEMPERATURE: Quantity = Quantity {
    name: "cmb_temperature",
    symbol: "T",
    unit: "K",
    ucd: "phys.temperature",
    meaning: "Temperature of the cosmic microwave background at that redshift.",
    domain: "today's temperature upwards; below it with future",
    tolerance: PRODUCT,
    table_error: None,
    scaling: HubbleScaling::None,
    future: true,
    forward: forward!(NOTHING, |epoch, frame| frame.cmb_temperature
        * (1.0 + epoch.redshift)),
    condition: None,
    inverse: Some(Inverse::Direct {
        redshift: |value, frame| (value - frame.cmb_temperature) / frame.cmb_temperature,
        sensitivity: |z| 1.0 + z,
        domain: |_| (0.0, f64::INFINITY),
    }),
    undefined: |spec| match &spec.radiation {
        Some(radiation) if radiation.cmb_temperature > 0.0 => None,
        _ => Some("the model declares no radiation"),
    },
    formula: "T = T₀ (1+z)",
    source: peebles("section 6"),
};

pub(super) const TIME_DILATION: Quantity = Quantity {
    name: "time_dilation",
    symbol: "1+z",
    unit: "1",
    ucd: "arith.factor",
    meaning: "Factor by which a process at that redshift seems slowed down.",
    domain: "1 upwards; below 1 with future",
    tolerance: PRODUCT,
    table_error: None,
    scaling: HubbleScaling::None,
    future: true,
    forward: forward!(NOTHING, |epoch, _| 1.0 + epoch.redshift),
    condition: None,
    inverse: None,
    undefined: always,
    formula: "dt_observed/dt_emitted = 1+z",
    source: Citation {
        authors: "White et al.",
        year: 2024,
        reference: "MNRAS 533, 3365",
        locator: "eq. 1",
    },
};

const GREISEN: Citation = Citation {
    authors: "Greisen et al.",
    year: 2006,
    reference: "A&A 446, 747",
    locator: "table 1 (from memory)",
};
