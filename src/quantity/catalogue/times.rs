//! Times: the age, the lookback time, the conformal time.

use super::*;
use crate::expansion::Curve;

pub(super) const AGE: Quantity = Quantity {
    name: "age",
    symbol: "t",
    unit: "Gyr",
    ucd: "time.age",
    meaning: "Age of the universe at that redshift.",
    domain: "above 0 to the age today; later with future",
    tolerance: PRODUCT,
    table_error: Some(|accuracy| accuracy.age),
    scaling: HubbleScaling::Power(1),
    future: true,
    forward: forward!(
        Wanted {
            age: true,
            ..NOTHING
        },
        |epoch, frame| frame.hubble_time_gyr * epoch.age
    ),
    condition: None,
    inverse: Some(Inverse::Table {
        curve: Curve::Age,
        scale: |frame| frame.hubble_time_gyr,
    }),
    undefined: always,
    formula: "t = ∫_z^∞ dz/[(1+z) H]",
    source: peebles("section 13"),
};

pub(super) const LOOKBACK_TIME: Quantity = Quantity {
    name: "lookback_time",
    symbol: "t_L",
    unit: "Gyr",
    ucd: "time.interval",
    meaning: "Time since the light was emitted.",
    domain: "0 to below the age today; negative with future",
    tolerance: PRODUCT,
    table_error: Some(|accuracy| accuracy.lookback),
    scaling: HubbleScaling::Power(1),
    future: true,
    forward: forward!(LOOKBACK, |epoch, frame| frame.hubble_time_gyr
        * epoch.lookback),
    condition: None,
    inverse: Some(Inverse::Table {
        curve: Curve::Lookback,
        scale: |frame| frame.hubble_time_gyr,
    }),
    undefined: always,
    formula: "t_L = ∫_0^z dz/[(1+z) H]",
    source: hogg("section 10"),
};

pub(super) const CONFORMAL_TIME: Quantity = Quantity {
    name: "conformal_time",
    symbol: "η",
    unit: "Gyr",
    ucd: "time;phys.cosmology",
    meaning: "Conformal time since the beginning, with a = 1 today; times c: the comoving particle horizon.",
    domain: "above 0 to its value today; later with future",
    tolerance: PRODUCT,
    table_error: Some(|accuracy| accuracy.conformal),
    scaling: HubbleScaling::Power(1),
    future: true,
    forward: forward!(
        Wanted {
            conformal: true,
            ..NOTHING
        },
        |epoch, frame| frame.hubble_time_gyr * epoch.conformal
    ),
    condition: None,
    inverse: Some(Inverse::Table {
        curve: Curve::Conformal,
        scale: |frame| frame.hubble_time_gyr,
    }),
    undefined: always,
    formula: "η = ∫_z^∞ dz/H",
    source: davis_lineweaver("appendix A (from memory)"),
};
