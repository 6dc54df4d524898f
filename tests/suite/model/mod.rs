//! Declared models: closure, refusals, fingerprints, dark energy, published sets.

mod closure;
mod dark_energy;
mod densities;
mod fingerprint;
mod properties;
mod published;
mod ranges;
mod refusals;

use redfathom::model::{DarkEnergyDeclaration, Declaration, RadiationDeclaration, Spec};

/// A flat model of matter and a cosmological constant.
fn plain(hubble_constant: f64, matter: f64) -> Declaration {
    Declaration {
        hubble_constant,
        matter,
        ..Declaration::default()
    }
}

fn radiation(temperature: f64, number: f64, masses: &[f64]) -> Option<RadiationDeclaration> {
    Some(RadiationDeclaration {
        cmb_temperature: Some(temperature),
        effective_neutrino_number: Some(number),
        neutrino_masses: masses.to_vec(),
    })
}

fn dark_energy(
    form: &str,
    density: Option<f64>,
    numbers: &[(&str, f64)],
) -> Option<DarkEnergyDeclaration> {
    Some(DarkEnergyDeclaration {
        form: form.to_owned(),
        density,
        parameters: numbers
            .iter()
            .map(|(name, value)| ((*name).to_owned(), *value))
            .collect(),
    })
}

/// The declaration that an answer's echo of a spec is.
fn echo(spec: &Spec) -> Declaration {
    let form = spec.dark_energy.form;
    let names = form.parameters.iter().map(|parameter| parameter.name);
    let numbers: Vec<(&str, f64)> = names
        .zip(spec.dark_energy.parameters.iter().copied())
        .collect();
    Declaration {
        hubble_constant: spec.hubble_constant,
        matter: spec.matter,
        curvature: Some(spec.curvature),
        baryons: spec.baryons,
        radiation: spec.radiation.and_then(|content| {
            radiation(
                content.cmb_temperature,
                content.effective_neutrino_number,
                &content.neutrino_masses,
            )
        }),
        dark_energy: dark_energy(form.name, Some(spec.dark_energy.density), &numbers),
    }
}
