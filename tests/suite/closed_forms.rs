//! Special universes whose distances and times are known in closed form.

use std::f64::consts::PI;

use redfathom::expansion::{Beginning, History};
use redfathom::model::{DarkEnergyDeclaration, Declaration, RadiationDeclaration};
use redfathom::quantity::{Frame, named};

use crate::accuracy::references::{history_of, matter_model};

/// A few roundings on either side.
const CLOSE: f64 = 4e-15;
const REDSHIFTS: [f64; 9] = [1e-8, 1e-3, 0.1, 0.5, 1.0, 3.0, 30.0, 1089.92, 1e6];

fn value(history: &History, name: &str, z: f64) -> f64 {
    named(name).unwrap().at(z, &Frame::of(history))
}

#[track_caller]
fn close(value: f64, expected: f64, tolerance: f64) {
    assert!(
        (value / expected - 1.0).abs() <= tolerance,
        "{value} is not {expected}"
    );
}

/// Distances in Hubble distances.
fn distance(history: &History, name: &str, z: f64) -> f64 {
    value(history, name, z) / history.hubble_distance_mpc()
}

fn time(history: &History, name: &str, z: f64) -> f64 {
    value(history, name, z) / history.hubble_time_gyr()
}

/// Peebles 1993, Principles of Physical Cosmology, section 13 (from memory).
#[test]
fn einstein_de_sitter() {
    let history = history_of(&matter_model(50.0, 1.0, false));
    for z in REDSHIFTS {
        let root = (1.0 + z).sqrt();
        // 2 (1 − 1/√v) = 2 z / (√v (√v + 1)), which keeps its digits.
        let comoving = 2.0 * z / (root * (root + 1.0));
        close(distance(&history, "comoving_distance", z), comoving, CLOSE);
        close(
            distance(&history, "luminosity_distance", z),
            comoving * (1.0 + z),
            CLOSE,
        );
        close(
            time(&history, "age", z),
            2.0 / 3.0 / ((1.0 + z) * root),
            CLOSE,
        );
        close(time(&history, "conformal_time", z), 2.0 / root, CLOSE);
        close(value(&history, "deceleration_parameter", z), 0.5, CLOSE);
        let volume = 4.0 * PI / 3.0 * comoving * comoving * comoving;
        let cube = libm::pow(history.hubble_distance_mpc(), 3.0);
        close(
            value(&history, "comoving_volume", z) / cube,
            volume,
            3.0 * CLOSE,
        );
    }
    let peaks = &history.turning().angular_diameter;
    assert_eq!(peaks.len(), 1);
    close(peaks[0], 1.25, 1e-13);
    close(
        distance(&history, "angular_diameter_distance", 1.25),
        8.0 / 27.0,
        CLOSE,
    );
}

/// Milne 1935, Relativity, Gravitation and World-Structure: an empty universe (from memory).
#[test]
fn milne() {
    let history = history_of(&matter_model(70.0, 0.0, false));
    for z in REDSHIFTS {
        let across = z * (1.0 + 0.5 * z) / (1.0 + z);
        close(
            distance(&history, "comoving_distance", z),
            libm::log1p(z),
            CLOSE,
        );
        close(
            distance(&history, "transverse_comoving_distance", z),
            across,
            CLOSE,
        );
        close(time(&history, "age", z), 1.0 / (1.0 + z), CLOSE);
        close(
            value(&history, "hubble_parameter", z),
            70.0 * (1.0 + z),
            CLOSE,
        );
        let drift = value(&history, "redshift_drift", z) * history.hubble_time_gyr() * 1e9;
        assert!(drift.abs() <= 4.0 * f64::EPSILON * (1.0 + z), "{drift}");
    }
    assert!(history.conformal_time_today().is_none());
    assert!(history.turning().angular_diameter.is_empty());
}

/// de Sitter 1917, MNRAS 78, 3: a cosmological constant alone (from memory).
#[test]
fn de_sitter() {
    let history = history_of(&matter_model(70.0, 0.0, true));
    for z in REDSHIFTS {
        close(distance(&history, "comoving_distance", z), z, CLOSE);
        close(
            distance(&history, "luminosity_distance", z),
            z * (1.0 + z),
            CLOSE,
        );
        close(time(&history, "lookback_time", z), libm::log1p(z), CLOSE);
        close(value(&history, "deceleration_parameter", z), -1.0, CLOSE);
    }
    assert_eq!(history.beginning(), Beginning::None);
}

/// Photons alone: E = v².
#[test]
fn pure_radiation() {
    let history = history_of(&Declaration {
        radiation: Some(RadiationDeclaration {
            cmb_temperature: Some(100.0),
            effective_neutrino_number: Some(0.0),
            neutrino_masses: Vec::new(),
        }),
        // Makes the photons of 100 K critical to 7e-17, which closure takes for exact.
        ..matter_model(669.449_033_855_248_3, 0.0, false)
    });
    assert_eq!(history.spec().curvature, 0.0);
    for z in REDSHIFTS {
        let v = 1.0 + z;
        close(distance(&history, "comoving_distance", z), z / v, CLOSE);
        close(time(&history, "age", z), 0.5 / (v * v), CLOSE);
        close(time(&history, "conformal_time", z), 1.0 / v, CLOSE);
        close(value(&history, "deceleration_parameter", z), 1.0, CLOSE);
    }
}

/// Mattig 1958, Astron. Nachr. 284, 109: matter alone, any curvature (from memory).
#[test]
fn mattig() {
    for matter in [0.05, 0.3125, 0.75, 1.5, 2.0] {
        let history = history_of(&matter_model(65.0, matter, false));
        for z in REDSHIFTS {
            // Terrell 1977, Am. J. Phys. 45, 869: the same without cancellation (from memory).
            let root = (1.0 + matter * z).sqrt();
            let luminosity = z * (1.0 + z * (1.0 - 0.5 * matter) / (1.0 + root + 0.5 * matter * z));
            close(
                distance(&history, "luminosity_distance", z),
                luminosity,
                2.0 * CLOSE,
            );
        }
    }
}

/// Peebles 1993, section 13: ages of matter alone, open and closed (from memory).
#[test]
fn ages_of_matter_alone() {
    let open = |m: f64| {
        let rest = 1.0 - m;
        1.0 / rest - m / (2.0 * rest * rest.sqrt()) * libm::acosh(2.0 / m - 1.0)
    };
    for matter in [0.05, 0.3125, 0.5] {
        let history = history_of(&matter_model(65.0, matter, false));
        close(history.age_today().unwrap(), open(matter), CLOSE);
    }
    let closed = history_of(&matter_model(65.0, 2.0, false));
    close(closed.age_today().unwrap(), PI / 2.0 - 1.0, CLOSE);
    // a_max = Ω/(Ω − 1) = 2: the expansion ends at z = −1/2.
    close(closed.turnaround().unwrap(), -0.5, CLOSE);
}

/// Peebles 1993, section 13: matter and Λ, flat (from memory).
#[test]
fn flat_lambda() {
    for matter in [0.1, 0.3, 0.7] {
        let history = history_of(&matter_model(70.0, matter, true));
        let lambda = 1.0 - matter;
        for z in REDSHIFTS {
            let growth = (lambda / matter).sqrt() / ((1.0 + z) * (1.0 + z).sqrt());
            let age = 2.0 / (3.0 * lambda.sqrt()) * libm::asinh(growth);
            close(time(&history, "age", z), age, CLOSE);
        }
        let onset = libm::cbrt(2.0 * lambda / matter) - 1.0;
        let q = value(&history, "deceleration_parameter", onset);
        assert!(q.abs() < 1e-14, "q = {q} at the onset of acceleration");
        let equality = libm::cbrt(lambda / matter) - 1.0;
        close(value(&history, "matter_fraction", equality), 0.5, CLOSE);
    }
}

/// One constituent with constant w: E = v^(3(1+w)/2) = v^n.
#[test]
fn constant_equation_of_state_alone() {
    for w in [-0.75_f64, -0.5, 0.25, 1.0] {
        let history = history_of(&Declaration {
            dark_energy: Some(DarkEnergyDeclaration {
                form: "constant".to_owned(),
                density: None,
                parameters: vec![("w".to_owned(), w)],
            }),
            ..matter_model(70.0, 0.0, true)
        });
        let n = 1.5 * (1.0 + w);
        for z in REDSHIFTS {
            let ln_v = libm::log1p(z);
            let comoving = -libm::expm1((1.0 - n) * ln_v) / (n - 1.0);
            // The logarithm's half ulp is raised by its own size.
            let tolerance = CLOSE * (1.0 + ln_v);
            close(
                distance(&history, "comoving_distance", z),
                comoving,
                tolerance,
            );
            close(
                time(&history, "age", z),
                libm::exp(-n * ln_v) / n,
                tolerance,
            );
            close(value(&history, "deceleration_parameter", z), n - 1.0, CLOSE);
        }
    }
}

/// Light has gone a quarter and half of the way round a closed universe at χ = π/2 and π
/// (Carroll, Press & Turner 1992, ARA&A 30, 499, from memory).
#[test]
fn antipodes() {
    let history = history_of(&Declaration {
        curvature: Some(-0.8),
        ..matter_model(70.0, 0.3, true)
    });
    let turning = history.turning();
    let root = 0.8_f64.sqrt();
    let angles: Vec<f64> = turning
        .transverse
        .iter()
        .map(|z| root * history.epoch(*z).comoving)
        .collect();
    assert_eq!(angles.len(), 2);
    close(angles[0], PI / 2.0, 1e-12);
    close(angles[1], PI, 1e-12);
}
