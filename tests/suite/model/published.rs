//! The published sets hold together: among themselves and with what is printed.

use redfathom::model::{DEFAULT_MODEL, Origin, PUBLISHED_SETS, PublishedSet, Status, Uncertainty};
use redfathom::numerics::DoubleDouble;

#[test]
fn every_set_closes_and_has_a_name_of_its_own() {
    let mut names: Vec<&str> = PUBLISHED_SETS.iter().map(|set| set.name).collect();
    for set in PUBLISHED_SETS {
        let spec = set.spec().unwrap();
        let miss = (spec.total() - DoubleDouble::from(1.0)).value();
        assert!(miss.abs() <= f64::EPSILON, "{}: {miss:e}", set.name);
        assert_eq!(spec.curvature, 0.0, "{}: all these are flat", set.name);
        let known = |c: char| c.is_ascii_lowercase() || c.is_ascii_digit() || c == '-';
        assert!(set.name.chars().all(known) && set.name.len() <= 64);
        assert!(!set.title.is_empty());
    }
    names.sort_unstable();
    names.dedup();
    assert_eq!(names.len(), PUBLISHED_SETS.len());
}

#[test]
fn the_default_is_confirmed() {
    let default = set(DEFAULT_MODEL);
    assert_eq!(default.status, Status::Confirmed);
    assert_eq!(default.status.name(), "confirmed");
    assert_eq!(
        default.source.to_string(),
        "Planck Collaboration VI (Aghanim et al.) 2020, A&A 641, A6, arXiv:1807.06209"
    );
    assert_eq!(set("round-70-30").source, Origin::CommonPractice);
}

/// Planck Collaboration VI 2020, A&A 641, A6, table 2 (table 1 for the best fit):
/// physical densities of baryons, cold matter and all matter, as printed.
#[test]
fn physical_densities_are_those_printed() {
    for (name, baryons, cold, matter, last_digit) in [
        ("planck-2018-cmb", 0.02236, 0.1202, 0.1432, 1e-4),
        ("planck-2018-cmb-lensing", 0.02237, 0.1200, 0.1430, 1e-4),
        (
            "planck-2018-cmb-lensing-bao",
            0.02242,
            0.11933,
            0.14240,
            1e-5,
        ),
        ("planck-2018-best-fit", 0.022383, 0.12011, 0.14314, 1e-5),
    ] {
        let spec = set(name).spec().unwrap();
        let h2 = (spec.hubble_constant / 100.0) * (spec.hubble_constant / 100.0);
        let found = spec.baryons.unwrap() * h2;
        assert!((found / baryons - 1.0).abs() < 1e-15, "{name}: {found}");
        // Half a last digit of H0 and of matter move the product by 1.8e-4 of itself.
        let found = spec.matter * h2;
        let rounding = last_digit + 3.1e-4 * matter;
        assert!((found - matter).abs() < rounding, "{name}: {found}");
        let massive = spec.massive_neutrino_density() * h2;
        let found = baryons + cold + massive;
        assert!(
            (found - matter).abs() < 1.1 * last_digit + 1e-5,
            "{name}: {found}"
        );
    }
}

/// The same table: Ω_Λ. The printed densities neglect radiation, 7.9e-5.
#[test]
fn the_closing_density_is_the_printed_one() {
    for (name, density) in [
        ("planck-2018-cmb", 0.6834),
        ("planck-2018-cmb-lensing", 0.6847),
        ("planck-2018-cmb-lensing-bao", 0.6889),
    ] {
        let found = set(name).spec().unwrap().dark_energy.density;
        assert!((found - density).abs() < 1e-4, "{name}: {found}");
    }
}

/// The correlation of H0 and Ω_m that the printed error of Ω_m h³ implies:
/// σ²(ln Ω_m h³) = σ²(ln Ω_m) + 9 σ²(ln h) + 6 ρ σ(ln Ω_m) σ(ln h).
/// Ω_m h³ from the same table.
#[test]
fn correlations_follow_from_the_printed_errors() {
    for (name, product, error) in [
        ("planck-2018-cmb", 0.09633, 0.00029),
        ("planck-2018-cmb-lensing", 0.09633, 0.00030),
        ("planck-2018-cmb-lensing-bao", 0.09635, 0.00030),
    ] {
        let set = set(name);
        let spec = set.spec().unwrap();
        let uncertainty = set.uncertainty.unwrap();
        assert_eq!(uncertainty.parameters, ["hubble_constant", "matter"]);
        let h = uncertainty.standard_deviations[0] / spec.hubble_constant;
        let m = uncertainty.standard_deviations[1] / spec.matter;
        let p: f64 = error / product;
        let implied = (p * p - m * m - 9.0 * h * h) / (6.0 * m * h);
        let held = uncertainty.correlations.unwrap()[0][1];
        assert!((implied - held).abs() < 3e-3, "{name}: {implied} {held}");
    }
}

#[test]
fn uncertainties_have_the_shape_of_their_parameters() {
    for set in PUBLISHED_SETS {
        let Some(uncertainty) = set.uncertainty else {
            continue;
        };
        let count = uncertainty.parameters.len();
        assert_eq!(uncertainty.standard_deviations.len(), count);
        assert!(uncertainty.standard_deviations.iter().all(|sd| *sd > 0.0));
        check_correlations(&uncertainty, count, set.name);
    }
}

fn check_correlations(uncertainty: &Uncertainty, count: usize, name: &str) {
    let Some(rows) = uncertainty.correlations else {
        return;
    };
    assert!(!uncertainty.correlations_source.is_empty(), "{name}");
    assert_eq!(rows.len(), count);
    for (i, row) in rows.iter().enumerate() {
        assert_eq!(row.len(), count);
        assert_eq!(row[i], 1.0);
        for (j, value) in row.iter().enumerate() {
            assert_eq!(*value, rows[j][i]);
            assert!(i == j || value.abs() < 1.0, "{name}");
        }
    }
}

fn set(name: &str) -> &'static PublishedSet {
    PUBLISHED_SETS.iter().find(|set| set.name == name).unwrap()
}
