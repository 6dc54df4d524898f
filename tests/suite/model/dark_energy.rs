//! Laws that every form of dark energy obeys, whatever its formula.

use redfathom::model::{DARK_ENERGY_FORMS, DarkEnergyForm, Instant};

/// Numbers in the middle of what is interesting: −0.9, 0.3, …
fn numbers(form: &DarkEnergyForm) -> Vec<f64> {
    [-0.9, 0.3, 0.1, 0.05]
        .into_iter()
        .cycle()
        .take(form.parameters.len())
        .collect()
}

fn ln_density(form: &DarkEnergyForm, numbers: &[f64], redshift: f64) -> f64 {
    form.ln_density.map_or(0.0, |ln_density| {
        ln_density(numbers, &Instant::at_redshift(redshift)).value()
    })
}

/// Energy conservation: d ln ρ / d ln(1 + z) = 3 (1 + w).
#[test]
fn density_and_equation_of_state_conserve_energy() {
    for form in DARK_ENERGY_FORMS.iter().filter(|form| !form.absent) {
        let numbers = numbers(form);
        for redshift in [-0.9, -0.3, 0.0, 0.5, 3.0, 1e3, 1e6] {
            let step = 1e-3;
            let at = |shift: f64| {
                let stretch = (1.0 + redshift) * libm::exp(shift);
                ln_density(form, &numbers, stretch - 1.0)
            };
            // Fourth-order central difference in ln(1 + z).
            let slope =
                (8.0 * (at(step) - at(-step)) - (at(2.0 * step) - at(-2.0 * step))) / (12.0 * step);
            let w = (form.equation_of_state)(&numbers, &Instant::at_redshift(redshift));
            let error = slope - 3.0 * (1.0 + w);
            assert!(error.abs() < 1e-9, "{} at {redshift}: {error:e}", form.name);
        }
    }
}

#[test]
fn the_density_today_is_the_density_today() {
    for form in DARK_ENERGY_FORMS {
        assert_eq!(ln_density(form, &numbers(form), 0.0), 0.0, "{}", form.name);
    }
}

#[test]
fn the_leading_exponents_are_those_of_the_density() {
    for form in DARK_ENERGY_FORMS {
        let numbers = numbers(form);
        let early = ln_density(form, &numbers, 1e15) - ln_density(form, &numbers, 1e12);
        let expected = (form.early_exponent)(&numbers) * libm::log(1e3);
        assert!((early - expected).abs() < 1e-6, "{}", form.name);
        let late = |stretch: f64| {
            form.ln_density.map_or(0.0, |ln_density| {
                ln_density(&numbers, &Instant::at_stretch(stretch)).value()
            })
        };
        let expected = (form.late_exponent)(&numbers) * libm::log(1e3);
        assert!(
            (late(1e-6) - late(1e-9) - expected).abs() < 1e-6,
            "{}",
            form.name
        );
    }
}

/// Constant w: Turner & White 1997, Phys. Rev. D 56, R4439: ρ ∝ (1 + z)^(3(1+w)).
#[test]
fn a_constant_equation_of_state_gives_a_power() {
    let constant = DARK_ENERGY_FORMS
        .iter()
        .find(|form| form.name == "constant")
        .unwrap();
    for (w, power) in [(0.0, 3.0), (-1.0 / 3.0, 2.0), (-1.5, -1.5), (1.0, 6.0)] {
        let found = ln_density(constant, &[w], 7.0);
        let expected = power * libm::log(8.0);
        assert!((found - expected).abs() <= 4e-16 * expected.abs(), "{w}");
    }
}

#[test]
fn names_are_unique_and_simpler_forms_are_known() {
    let mut names: Vec<&str> = DARK_ENERGY_FORMS.iter().map(|form| form.name).collect();
    names.sort_unstable();
    names.dedup();
    assert_eq!(names.len(), DARK_ENERGY_FORMS.len());
    let constant = DARK_ENERGY_FORMS
        .iter()
        .find(|form| form.name == "constant")
        .unwrap();
    let simpler = |w: f64| (constant.simplest)(&[w]).map(|form| form.name);
    assert_eq!(simpler(-1.0), Some("cosmological_constant"));
    assert_eq!(simpler(-0.99), None);
}
