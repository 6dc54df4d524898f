//! What photons and neutrinos weigh, against 50-digit values.

use super::{plain, radiation};
use redfathom::model::{Declaration, Spec};

/// Models with Ω_γ, Ω of the massless species, and (y, Ω) of the massive ones:
/// `tests/references/model_vectors.py`.
struct Expected {
    hubble_constant: f64,
    matter: f64,
    content: (f64, f64, &'static [f64]),
    photons: f64,
    massless: f64,
    massive: &'static [(f64, f64)],
}

const EXPECTED: &[Expected] = &[
    Expected {
        hubble_constant: 67.36,
        matter: 0.3153,
        content: (2.7255, 3.046, &[0.06]),
        photons: 5.450_239_999_655_5e-5,
        massless: 2.513_537_648_385_011e-5,
        massive: &[(356.553_123_457_213_3, 0.001_422_007_034_866_799_2)],
    },
    Expected {
        hubble_constant: 70.0,
        matter: 0.3,
        content: (2.7255, 3.046, &[0.05, 0.2, 0.01]),
        photons: 5.046_888_425_947_117e-5,
        massless: 0.0,
        massive: &[
            (59.425_520_576_202_224, 0.000_219_851_628_585_024_25),
            (297.127_602_881_011_1, 0.001_097_332_642_537_325_8),
            (1_188.510_411_524_044_5, 0.004_389_029_063_797_041_5),
        ],
    },
    Expected {
        hubble_constant: 50.0,
        matter: 1.0,
        content: (8.0, 0.5, &[]),
        photons: 0.007_342_686_354_304_622,
        massless: 0.000_833_788_901_173_280_9,
        massive: &[],
    },
];

fn spec(expected: &Expected) -> Spec {
    let (temperature, number, masses) = expected.content;
    let model = Declaration {
        radiation: radiation(temperature, number, masses),
        ..plain(expected.hubble_constant, expected.matter)
    };
    model.close().unwrap()
}

#[track_caller]
fn close(found: f64, expected: f64, ulps: f64) {
    let error = (found - expected).abs();
    assert!(
        error <= ulps * f64::EPSILON * expected.abs(),
        "{found:e} {expected:e}"
    );
}

#[test]
fn radiation_and_neutrinos_are_rounded_once() {
    for expected in EXPECTED {
        let spec = spec(expected);
        close(spec.photons(), expected.photons, 0.0);
        close(spec.massless_neutrinos(), expected.massless, 0.0);
        let massive = spec.massive_neutrinos();
        assert_eq!(massive.len(), expected.massive.len());
        for (species, (y, density)) in massive.iter().zip(expected.massive) {
            close(species.y, *y, 0.0);
            close(species.density(), *density, 2.0);
        }
        let total: f64 = expected.massive.iter().map(|(_, density)| density).sum();
        close(spec.massive_neutrino_density(), total, 2.0);
    }
}

#[test]
fn a_massless_species_is_the_limit_of_a_light_one() {
    let with = |masses: &[f64]| Declaration {
        radiation: radiation(2.7255, 3.046, masses),
        ..plain(70.0, 0.3)
    };
    let massless = with(&[]).close().unwrap();
    let light = with(&[1e-12]).close().unwrap();
    let species = light.massive_neutrinos();
    assert_eq!(species.len(), 1);
    close(
        light.massless_neutrinos() + species[0].density(),
        massless.massless_neutrinos(),
        2.0,
    );
}

#[test]
fn without_radiation_nothing_radiates() {
    let spec = plain(70.0, 0.3).close().unwrap();
    assert_eq!((spec.photons(), spec.massless_neutrinos()), (0.0, 0.0));
    assert!(spec.massive_neutrinos().is_empty());
}

/// Particle Data Group 2024, Phys. Rev. D 110, 030001, table of astrophysical
/// constants (from memory): Ω_γ h² = 2.473e-5 (T/2.7255 K)⁴. Mangano et al. 2005,
/// Nucl. Phys. B 729, 221: Ω_ν h² = Σm/93.14 eV with non-thermal corrections,
/// which shift the thermal value kept here by 0.16 %.
#[test]
fn the_printed_coefficients_are_met() {
    let spec = spec(&EXPECTED[0]);
    let h2 = 0.6736 * 0.6736;
    assert!((spec.photons() * h2 - 2.473e-5).abs() < 0.5e-8);
    let printed = 0.06 / 93.14;
    assert!((spec.massive_neutrino_density() * h2 / printed - 1.0).abs() < 2e-3);
}
