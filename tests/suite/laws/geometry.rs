//! Relations between distances, scales, rates and fractions at one redshift.

use std::f64::consts::PI;

use proptest::prelude::*;
use redfathom::expansion::History;

use super::models::{config, histories, inside, near, on_references, redshifts, value};

/// A handful of roundings.
const ROUNDINGS: f64 = 3e-15;
const SPEED_OF_LIGHT: f64 = 299_792.458;

/// Etherington 1933, Phil. Mag. 15, 761: D_L = (1+z)² D_A, and D_M between them.
fn duality(history: &History, redshifts: &[f64]) {
    for z in inside(history, redshifts).into_iter().filter(|z| *z >= 0.0) {
        let v = 1.0 + z;
        let at = |name| value(history, name, z);
        let (near_side, across) = (
            at("angular_diameter_distance"),
            at("transverse_comoving_distance"),
        );
        near(
            at("luminosity_distance"),
            v * v * near_side,
            ROUNDINGS,
            v * v * near_side,
            "duality",
        );
        near(across, v * near_side, ROUNDINGS, across, "D_M");
        let kpc_per_arcsec = PI / 648.0;
        near(
            at("angular_scale"),
            near_side * kpc_per_arcsec,
            ROUNDINGS,
            at("angular_scale"),
            "scale",
        );
        near(
            at("comoving_angular_scale"),
            across * kpc_per_arcsec,
            ROUNDINGS,
            across,
            "comoving scale",
        );
        let rate = at("hubble_parameter");
        let element = SPEED_OF_LIGHT / rate * across * across;
        near(
            at("volume_element"),
            element,
            ROUNDINGS,
            element,
            "dV/dz dΩ",
        );
        let ratio = across * rate / SPEED_OF_LIGHT;
        near(at("alcock_paczynski"), ratio, ROUNDINGS, ratio, "F_AP");
        let cube = z * across * across * SPEED_OF_LIGHT / rate;
        near(
            libm::pow(at("volume_averaged_distance"), 3.0),
            cube,
            2.0 * ROUNDINGS,
            cube,
            "D_V³",
        );
        near(
            at("recession_velocity"),
            at("comoving_distance") * history.spec().hubble_constant,
            ROUNDINGS,
            at("recession_velocity"),
            "H0 D_C",
        );
        if z > 0.0 {
            let modulus = 5.0 * libm::log10(at("luminosity_distance")) + 25.0;
            near(
                at("distance_modulus"),
                modulus,
                4.0 * f64::EPSILON,
                modulus.abs().max(25.0),
                "modulus",
            );
        }
    }
}

fn rates(history: &History, redshifts: &[f64]) {
    for z in inside(history, redshifts) {
        let at = |name| value(history, name, z);
        let rate = at("hubble_parameter");
        near(
            at("hubble_distance") * rate,
            SPEED_OF_LIGHT,
            ROUNDINGS,
            SPEED_OF_LIGHT,
            "c/H",
        );
        let ratio = rate / history.spec().hubble_constant;
        let today = value(history, "critical_density", 0.0);
        near(
            at("critical_density") / today,
            ratio * ratio,
            2.0 * ROUNDINGS,
            ratio * ratio,
            "ρ_c",
        );
        near(
            at("time_dilation") * at("scale_factor"),
            1.0,
            ROUNDINGS,
            1.0,
            "a (1+z)",
        );
        let drift = at("redshift_drift") * SPEED_OF_LIGHT * 1e5 / (1.0 + z);
        near(
            at("velocity_drift"),
            drift,
            2.0 * ROUNDINGS,
            drift,
            "velocity drift",
        );
        let temperature = value(history, "cmb_temperature", 0.0) * (1.0 + z);
        near(
            at("cmb_temperature"),
            temperature,
            ROUNDINGS,
            temperature,
            "T",
        );
    }
}

fn fractions(history: &History, redshifts: &[f64]) {
    const FOUR: [&str; 4] = [
        "matter_fraction",
        "radiation_fraction",
        "curvature_fraction",
        "dark_energy_fraction",
    ];
    for z in inside(history, redshifts) {
        let four = FOUR.map(|name| value(history, name, z));
        let (sum, size) = (
            four.iter().sum::<f64>(),
            four.iter().map(|part| part.abs()).sum::<f64>(),
        );
        near(sum, 1.0, ROUNDINGS, size, "the four fractions");
        let neutrinos = value(history, "massive_neutrino_fraction", z);
        assert!(
            (0.0..=four[0] * (1.0 + ROUNDINGS)).contains(&neutrinos),
            "neutrinos {neutrinos} of {}",
            four[0]
        );
    }
}

proptest! {
    #![proptest_config(config())]

    #[test]
    fn relations_at_one_redshift(history in histories(), redshifts in redshifts()) {
        duality(&history, &redshifts);
        rates(&history, &redshifts);
        fractions(&history, &redshifts);
    }
}

#[test]
fn relations_at_one_redshift_under_the_references() {
    on_references(duality);
    on_references(rates);
    on_references(fractions);
}
