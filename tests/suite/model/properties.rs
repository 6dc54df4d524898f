//! Laws of closure over random declarations.

use super::{dark_energy, echo, plain, radiation};
use proptest::prelude::*;
use redfathom::model::{DarkEnergyDeclaration, Declaration, RadiationDeclaration};
use redfathom::numerics::DoubleDouble;

fn any_radiation() -> impl Strategy<Value = Option<RadiationDeclaration>> {
    let masses = prop::collection::vec(prop_oneof![Just(0.0), 1e-6..1.0_f64], 0..=3);
    let present = (0.001..10.0_f64, 0.01..10.0_f64, masses)
        .prop_map(|(temperature, number, masses)| radiation(temperature, number, &masses));
    prop_oneof![Just(None), present]
}

fn any_dark_energy() -> impl Strategy<Value = Option<DarkEnergyDeclaration>> {
    let density = prop::option::of(-2.0..2.0_f64);
    prop_oneof![
        Just(None),
        Just(dark_energy("none", None, &[])),
        density
            .clone()
            .prop_map(|density| dark_energy("cosmological_constant", density, &[])),
        (density, prop_oneof![Just(-1.0), -3.0..1.0_f64]).prop_map(|(density, w)| dark_energy(
            "constant",
            density,
            &[("w", w)]
        )),
    ]
}

prop_compose! {
    /// Declarations that leave something to close.
    fn any_declaration()(
        hubble_constant in 20.0..200.0_f64,
        matter in 0.2..3.0_f64,
        curvature in prop::option::of(-2.0..2.0_f64),
        baryons in prop::option::of(0.0..0.1_f64),
        content in any_radiation(),
        form in any_dark_energy(),
    ) -> Declaration {
        let open = form.as_ref().is_none_or(|form| form.density.is_none() && form.form != "none");
        Declaration {
            curvature: curvature.filter(|_| open),
            baryons,
            radiation: content,
            dark_energy: form,
            ..plain(hubble_constant, matter)
        }
    }
}

proptest! {
    #[test]
    fn the_densities_sum_to_one(model in any_declaration()) {
        // Heavy neutrinos in a slow expansion may exceed matter: refused elsewhere.
        prop_assume!(model.close().is_ok());
        let spec = model.close().unwrap();
        let miss = (spec.total() - DoubleDouble::from(1.0)).value().abs();
        let scale = spec.matter + spec.photons() + spec.massless_neutrinos()
            + spec.curvature.abs() + spec.dark_energy.density.abs();
        prop_assert!(miss <= 8.0 * f64::EPSILON * scale, "{miss:e}");
        let closing = if spec.curvature == 0.0 || model.curvature.is_some() {
            spec.dark_energy.density
        } else {
            spec.curvature
        };
        if closing != 0.0 && spec.dark_energy.density != 0.0 {
            prop_assert!(miss <= 0.5 * f64::EPSILON * closing.abs(), "{miss:e} {closing}");
        }
    }

    #[test]
    fn the_echo_of_a_model_is_the_model(model in any_declaration()) {
        prop_assume!(model.close().is_ok());
        let spec = model.close().unwrap();
        let again = echo(&spec).close().unwrap();
        prop_assert_eq!(&again, &spec);
        prop_assert_eq!(again.canonical_bytes(), spec.canonical_bytes());
    }

    #[test]
    fn what_is_written_is_what_is_got(model in any_declaration()) {
        prop_assume!(model.close().is_ok());
        let spec = model.close().unwrap();
        prop_assert_eq!(spec.hubble_constant, model.hubble_constant);
        prop_assert_eq!(spec.matter, model.matter);
        prop_assert_eq!(spec.baryons, model.baryons);
        if let Some(curvature) = model.curvature {
            prop_assert_eq!(spec.curvature, curvature);
        }
        let density = model.dark_energy.as_ref().and_then(|form| form.density);
        if let Some(density) = density {
            prop_assert_eq!(spec.dark_energy.density, density);
        }
        let content = model.radiation.clone().unwrap_or_default();
        prop_assert_eq!(
            spec.radiation.map(|radiation| radiation.cmb_temperature),
            content.cmb_temperature
        );
    }

    #[test]
    fn a_full_declaration_that_misses_one_is_refused(
        model in any_declaration(),
        miss in prop_oneof![-0.5..-2e-9_f64, 2e-9..0.5_f64],
    ) {
        prop_assume!(model.close().is_ok());
        let mut full = echo(&model.close().unwrap());
        let form = full.dark_energy.as_mut().unwrap();
        if form.form == "none" {
            full.curvature = full.curvature.map(|curvature| curvature + miss);
        } else {
            form.density = form.density.map(|density| density + miss);
        }
        let faults = full.close().unwrap_err();
        prop_assert_eq!(faults.len(), 1);
        prop_assert_eq!(faults[0].kind, redfathom::model::ModelFaultKind::InconsistentClosure);
    }
}
