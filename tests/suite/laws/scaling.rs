//! What the Hubble constant does when all densities stay as they are.

use proptest::prelude::*;
use redfathom::expansion::History;
use redfathom::model::Declaration;
use redfathom::quantity::{HubbleScaling, QUANTITIES};

use super::models::{config, declarations, inside, near, redshifts, value};

/// Four times the Hubble constant, with twice the temperature and masses, is the same universe
/// four times as fast: densities of radiation go like T⁴/H0².
fn four_times(declaration: &Declaration) -> Declaration {
    let mut scaled = declaration.clone();
    scaled.hubble_constant *= 4.0;
    if let Some(radiation) = &mut scaled.radiation {
        radiation.cmb_temperature = radiation
            .cmb_temperature
            .map(|temperature| 2.0 * temperature);
        radiation
            .neutrino_masses
            .iter_mut()
            .for_each(|mass| *mass *= 2.0);
    }
    scaled
}

fn scaling(slow: &History, fast: &History, redshifts: &[f64]) {
    for z in inside(slow, redshifts) {
        for quantity in QUANTITIES {
            let (before, after) = (value(slow, quantity.name, z), value(fast, quantity.name, z));
            let expected = match (quantity.scaling, quantity.name) {
                (HubbleScaling::Modulus, _) => before - 5.0 * libm::log10(4.0),
                (HubbleScaling::Power(power), _) => before / libm::pow(4.0, f64::from(power)),
                (_, "hubble_parameter" | "redshift_drift" | "velocity_drift") => 4.0 * before,
                (_, "critical_density") => 16.0 * before,
                (_, "cmb_temperature") => 2.0 * before,
                _ => before,
            };
            // All factors are powers of two: nothing but the modulus rounds differently.
            let scale = match quantity.scaling {
                HubbleScaling::Modulus => expected.abs().max(25.0),
                _ => expected.abs(),
            };
            near(after, expected, 1e-14, scale, quantity.name);
        }
    }
}

proptest! {
    #![proptest_config(config())]

    #[test]
    fn quantities_scale_with_the_hubble_constant(declaration in declarations(), redshifts in redshifts()) {
        let build = |declaration: &Declaration| History::build(&declaration.close().ok()?).ok();
        if let (Some(slow), Some(fast)) = (build(&declaration), build(&four_times(&declaration))) {
            scaling(&slow, &fast, &redshifts);
        }
    }
}
