//! From a declaration to a closed model: consistency and the closure rule.

use super::check::{Checked, check};
use super::parameter::{CURVATURE, DARK_ENERGY_DENSITY, Parameter, shown};
use super::{DarkEnergy, Declaration, ModelFault, ModelFaultKind, NONE, Spec};
use crate::numerics::DoubleDouble;

impl Declaration {
    /// Checks every number and closes the model.
    ///
    /// The rule: the density of the dark energy, a cosmological constant unless
    /// declared, closes where it is not given, curvature being 0 unless given;
    /// curvature closes where only the density is given, and under the form
    /// `none`, whose density is exactly 0. Both given must sum to 1 within 10⁻⁹,
    /// and the residue goes into the density, under `none` into the curvature.
    /// Sums carry 32 digits; a closing term below 8 ulp of Σ|terms| is exactly 0.
    ///
    /// # Errors
    /// Everything that is wrong, all at once, each with its pointer below the model.
    pub fn close(&self) -> Result<Spec, Vec<ModelFault>> {
        let checked = check(self)?;
        let (given_curvature, given_density) = (checked.curvature, checked.density);
        let mut spec = open(checked);
        if let Some(fault) = radiation_beyond_numbers(&spec) {
            return Err(vec![fault]);
        }
        let mut faults = Vec::new();
        faults.extend(parts_exceed_matter(&spec));
        faults.extend(balance(given_curvature, given_density, &mut spec));
        if !faults.is_empty() {
            return Err(faults);
        }
        if spec.dark_energy.density == 0.0 {
            // Without dark energy curvature closes, as an echo will declare it.
            let fixed = filled(&spec);
            let found = closing(&fixed, 0.0);
            spec.curvature = settled(spec.curvature, found, &fixed, 0.0);
        }
        simplify(&mut spec.dark_energy);
        Ok(spec)
    }
}

/// How far a declared sum may be from 1.
const LARGEST_RESIDUE: f64 = 1e-9;

/// The spec before closure: nothing but what does not close.
fn open(checked: Checked) -> Spec {
    Spec {
        hubble_constant: checked.hubble_constant,
        matter: checked.matter,
        curvature: 0.0,
        baryons: checked.baryons,
        radiation: checked.radiation,
        dark_energy: DarkEnergy {
            form: checked.form,
            parameters: checked.parameters,
            density: 0.0,
        },
    }
}

/// Shares of the critical density grow as 1/H0²: a tiny H0 leaves the range of doubles.
fn radiation_beyond_numbers(spec: &Spec) -> Option<ModelFault> {
    let radiation = spec.photons() + spec.massless_neutrinos() + spec.massive_neutrino_density();
    if radiation.is_finite() {
        return None;
    }
    let detail = format!(
        "hubble_constant is {}, so small that the radiation's share of the critical density is beyond the range of a double",
        shown(spec.hubble_constant)
    );
    Some(
        ModelFault::new(ModelFaultKind::Impossible, "/hubble_constant", detail)
            .with_value(spec.hubble_constant),
    )
}

/// Matter must hold its parts.
fn parts_exceed_matter(spec: &Spec) -> Option<ModelFault> {
    let massive = spec.massive_neutrino_density();
    let parts = spec.baryons.unwrap_or(0.0) + massive;
    if parts <= spec.matter {
        return None;
    }
    let baryons = spec
        .baryons
        .map(|baryons| format!("baryons {}", shown(baryons)));
    let massive = (massive > 0.0).then(|| format!("massive neutrinos {}", shown(massive)));
    let parts_named: Vec<String> = baryons.into_iter().chain(massive).collect();
    let detail = format!(
        "matter is {} and cannot hold its {}",
        shown(spec.matter),
        parts_named.join(" and ")
    );
    Some(
        ModelFault::new(ModelFaultKind::Impossible, "/matter", detail)
            .with_value(spec.matter)
            .with_allowed(format!("at least {}", shown(parts))),
    )
}

/// Fills in curvature and density by the rule, or says why it cannot.
fn balance(curvature: Option<f64>, density: Option<f64>, spec: &mut Spec) -> Option<ModelFault> {
    let absent = spec.dark_energy.form.absent;
    let fixed = filled(spec);
    match (curvature, density) {
        (Some(curvature), Some(density)) if !absent => {
            spec.curvature = curvature;
            let found = closing(&fixed, curvature);
            spec.dark_energy.density = settled(density, found, &fixed, curvature);
            disagreement(
                density - found,
                spec,
                density,
                Some(closing(&fixed, density)),
            )
            .or_else(|| impossible(&DARK_ENERGY_DENSITY, spec.dark_energy.density, spec))
        }
        (Some(given), _) if absent => {
            let found = closing(&fixed, 0.0);
            spec.curvature = settled(given, found, &fixed, 0.0);
            disagreement(given - found, spec, given, None)
                .or_else(|| impossible(&CURVATURE, spec.curvature, spec))
        }
        (None, _) if absent || density.is_some() => {
            spec.dark_energy.density = if absent { 0.0 } else { density.unwrap_or(0.0) };
            spec.curvature = closing(&fixed, spec.dark_energy.density);
            impossible(&CURVATURE, spec.curvature, spec)
        }
        _ => {
            spec.curvature = curvature.unwrap_or(0.0);
            spec.dark_energy.density = closing(&fixed, spec.curvature);
            impossible(&DARK_ENERGY_DENSITY, spec.dark_energy.density, spec)
        }
    }
}

/// What does not close.
fn filled(spec: &Spec) -> [f64; 3] {
    [spec.matter, spec.photons(), spec.massless_neutrinos()]
}

/// 1 less the terms; exactly 0 where that is below 8 ulp of Σ|terms|, so that
/// rounding does not create physics.
fn closing(fixed: &[f64; 3], other: f64) -> f64 {
    let rest = fixed
        .iter()
        .fold(DoubleDouble::from(1.0) + -other, |rest, term| rest + -term)
        .value();
    if rest.abs() < negligible(fixed, &[other]) {
        0.0
    } else {
        rest
    }
}

/// The closing term of a full declaration: the given one where it differs from
/// the computed one by rounding only, so that an echo declares the same model.
fn settled(given: f64, found: f64, fixed: &[f64; 3], other: f64) -> f64 {
    let residue = (given - found).abs();
    if found != 0.0 && residue < negligible(fixed, &[other, given]) {
        given
    } else {
        found
    }
}

/// 8 ulp of the sum of all sizes.
fn negligible(fixed: &[f64; 3], others: &[f64]) -> f64 {
    let scale: f64 = fixed.iter().chain(others).map(|term| term.abs()).sum();
    8.0 * (scale.next_up() - scale)
}

/// The fault of two given terms that do not sum to 1 with the rest; `spec` holds
/// the closing term in place of the given one.
fn disagreement(
    residue: f64,
    spec: &Spec,
    given: f64,
    closing_curvature: Option<f64>,
) -> Option<ModelFault> {
    if residue.abs() <= LARGEST_RESIDUE {
        return None;
    }
    let sum = shown(1.0 + residue);
    let radiation = radiation_takes(spec);
    let (pointer, detail, allowed) = match closing_curvature {
        Some(curvature) => {
            let (density, curvature) = (shown(spec.dark_energy.density), shown(curvature));
            (
                "/dark_energy/density",
                format!(
                    "the densities sum to {sum}, not 1{radiation}; leave out dark_energy.density, which then is {density}, or curvature, which then is {curvature}"
                ),
                format!("{density}, or curvature {curvature}"),
            )
        }
        None => {
            let curvature = shown(spec.curvature);
            (
                "/curvature",
                format!(
                    "the densities sum to {sum}, not 1{radiation}; leave out curvature, which then is {curvature}"
                ),
                curvature,
            )
        }
    };
    Some(
        ModelFault::new(ModelFaultKind::InconsistentClosure, pointer, detail)
            .with_value(given)
            .with_allowed(allowed),
    )
}

/// The fault of a closing term that would not be allowed if it were declared.
fn impossible(parameter: &Parameter, closing: f64, spec: &Spec) -> Option<ModelFault> {
    if parameter.allows(closing) {
        return None;
    }
    let (pointer, name) = if parameter.name == CURVATURE.name {
        ("/curvature", "curvature")
    } else {
        ("/dark_energy/density", "the density of dark energy")
    };
    let allowed = parameter.allowed();
    let detail = format!(
        "{name} would have to be {} to close the model{}, outside {allowed}",
        shown(closing),
        radiation_takes(spec)
    );
    Some(
        ModelFault::new(ModelFaultKind::Impossible, pointer, detail)
            .with_value(closing)
            .with_allowed(allowed),
    )
}

fn radiation_takes(spec: &Spec) -> String {
    let radiation = spec.photons() + spec.massless_neutrinos();
    if radiation > 0.0 {
        format!(" (radiation takes {radiation:.3e})")
    } else {
        String::new()
    }
}

/// Replaces the form by the simplest equal one: equal universes then have equal
/// specs, bytes and histories, whoever declared them first.
fn simplify(dark_energy: &mut DarkEnergy) {
    while let Some(simpler) = (dark_energy.form.simplest)(&dark_energy.parameters) {
        dark_energy.form = simpler;
        // Every simpler form so far has no numbers of its own.
        dark_energy.parameters.clear();
    }
    if dark_energy.density == 0.0 {
        dark_energy.form = &NONE;
        dark_energy.parameters.clear();
    }
}
