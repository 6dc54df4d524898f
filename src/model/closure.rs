//! From a declaration to a closed, checked model.
//!
//! The rule: without dark energy a cosmological constant closes, and curvature
//! is zero unless given; dark energy without a density closes likewise; a
//! density without curvature lets curvature close; the form `none` has density
//! zero, and curvature closes; if all is given the sum must be one.

use super::parameter as range;
use super::{
    COSMOLOGICAL_CONSTANT, DARK_ENERGY_FORMS, DarkEnergy, DarkEnergyDeclaration, DarkEnergyForm,
    Declaration, ModelFault, ModelFaultKind, Parameter, Radiation, RadiationDeclaration, Spec,
};
use crate::numerics::DoubleDouble;

/// How far a declared sum may be from one; what is left goes into the closing term.
const CLOSURE_TOLERANCE: f64 = 1e-9;

impl Declaration {
    /// Checks every number and closes the model.
    ///
    /// # Errors
    /// Everything that is wrong, all at once, each with its pointer below the model.
    pub fn close(&self) -> Result<Spec, Vec<ModelFault>> {
        let mut faults = Faults(Vec::new());
        faults.check(
            "/hubble_constant",
            &range::HUBBLE_CONSTANT,
            self.hubble_constant,
        );
        faults.check("/matter", &range::MATTER, self.matter);
        faults.check_given("/curvature", &range::CURVATURE, self.curvature);
        faults.check_given("/baryons", &range::BARYONS, self.baryons);
        let radiation = self
            .radiation
            .as_ref()
            .and_then(|radiation| faults.radiation(radiation));
        let (form, parameters) = match &self.dark_energy {
            None => (&COSMOLOGICAL_CONSTANT, Vec::new()),
            Some(declared) => faults
                .dark_energy(declared)
                .unwrap_or((&COSMOLOGICAL_CONSTANT, Vec::new())),
        };
        if !faults.0.is_empty() {
            return Err(faults.0);
        }
        let mut spec = Spec {
            hubble_constant: self.hubble_constant,
            matter: self.matter + 0.0,
            curvature: self.curvature.unwrap_or(0.0) + 0.0,
            baryons: self.baryons,
            radiation: radiation.filter(|radiation| radiation.cmb_temperature > 0.0),
            dark_energy: DarkEnergy {
                form,
                parameters,
                density: 0.0,
            },
        };
        faults.contents(&spec);
        faults.balance(self, &mut spec);
        if faults.0.is_empty() {
            Ok(spec)
        } else {
            Err(faults.0)
        }
    }
}

/// The faults found so far.
struct Faults(Vec<ModelFault>);

impl Faults {
    fn push(
        &mut self,
        pointer: &str,
        kind: ModelFaultKind,
        detail: String,
        value: Option<String>,
        allowed: Option<String>,
    ) {
        self.0.push(ModelFault {
            pointer: pointer.to_owned(),
            kind,
            detail,
            value,
            allowed,
        });
    }

    fn check(&mut self, pointer: &str, parameter: &Parameter, value: f64) {
        if !parameter.allows(value) {
            let allowed = parameter.allowed();
            let detail = format!("{} is {value}, outside {allowed}", parameter.name);
            self.push(
                pointer,
                ModelFaultKind::OutOfRange,
                detail,
                Some(value.to_string()),
                Some(allowed),
            );
        }
    }

    fn check_given(&mut self, pointer: &str, parameter: &Parameter, value: Option<f64>) {
        if let Some(value) = value {
            self.check(pointer, parameter, value);
        }
    }

    fn missing(&mut self, pointer: &str, detail: &str) {
        self.push(
            pointer,
            ModelFaultKind::MissingField,
            detail.to_owned(),
            None,
            None,
        );
    }

    fn radiation(&mut self, declared: &RadiationDeclaration) -> Option<Radiation> {
        let before = self.0.len();
        self.check_given(
            "/radiation/cmb_temperature",
            &range::CMB_TEMPERATURE,
            declared.cmb_temperature,
        );
        let number = declared.effective_neutrino_number;
        self.check_given(
            "/radiation/effective_neutrino_number",
            &range::EFFECTIVE_NEUTRINO_NUMBER,
            number,
        );
        if declared.cmb_temperature.is_none() {
            self.missing(
                "/radiation/cmb_temperature",
                "radiation needs its temperature today in K",
            );
        }
        if number.is_none() {
            self.missing(
                "/radiation/effective_neutrino_number",
                "radiation needs N_eff; 0 means photons only",
            );
        }
        let mut masses = [0.0; 3];
        let given = &declared.neutrino_masses;
        if given.len() > masses.len() {
            let detail = format!("{} neutrino masses for three species", given.len());
            let allowed = Some("at most 3 masses".to_owned());
            self.push(
                "/radiation/neutrino_masses",
                ModelFaultKind::OutOfRange,
                detail,
                None,
                allowed,
            );
        }
        for (position, (mass, place)) in given.iter().zip(&mut masses).enumerate() {
            self.check(
                &format!("/radiation/neutrino_masses/{position}"),
                &range::NEUTRINO_MASS,
                *mass,
            );
            *place = *mass + 0.0;
        }
        masses.sort_by(f64::total_cmp);
        let cold = declared.cmb_temperature == Some(0.0) || number == Some(0.0);
        if cold && masses.iter().any(|mass| *mass > 0.0) {
            let detail =
                "neutrino masses need neutrinos: a temperature and an effective number above zero"
                    .to_owned();
            self.push(
                "/radiation/neutrino_masses",
                ModelFaultKind::Impossible,
                detail,
                None,
                None,
            );
        }
        (self.0.len() == before).then_some(Radiation {
            cmb_temperature: declared.cmb_temperature? + 0.0,
            effective_neutrino_number: number? + 0.0,
            neutrino_masses: masses,
        })
    }

    fn dark_energy(
        &mut self,
        declared: &DarkEnergyDeclaration,
    ) -> Option<(&'static DarkEnergyForm, Vec<f64>)> {
        let Some(form) = DARK_ENERGY_FORMS
            .iter()
            .copied()
            .find(|form| form.name == declared.form)
        else {
            let names: Vec<&str> = DARK_ENERGY_FORMS.iter().map(|form| form.name).collect();
            let detail = format!("no form of dark energy is called {:?}", declared.form);
            let value = Some(declared.form.clone());
            self.push(
                "/dark_energy/form",
                ModelFaultKind::UnknownForm,
                detail,
                value,
                Some(names.join(", ")),
            );
            return None;
        };
        let before = self.0.len();
        self.check_given(
            "/dark_energy/density",
            &range::DARK_ENERGY_DENSITY,
            declared.density,
        );
        for (name, _) in &declared.parameters {
            if !form
                .parameters
                .iter()
                .any(|parameter| parameter.name == name)
            {
                let detail = format!("the form {} has no {name}", form.name);
                self.push(
                    &format!("/dark_energy/{name}"),
                    ModelFaultKind::UnknownField,
                    detail,
                    None,
                    None,
                );
            }
        }
        let mut numbers = Vec::new();
        for parameter in form.parameters {
            let pointer = format!("/dark_energy/{}", parameter.name);
            match declared
                .parameters
                .iter()
                .find(|(name, _)| name == parameter.name)
            {
                None => self.missing(
                    &pointer,
                    &format!("the form {} needs {}", form.name, parameter.name),
                ),
                Some((_, value)) => {
                    self.check(&pointer, parameter, *value);
                    numbers.push(*value + 0.0);
                }
            }
        }
        (self.0.len() == before).then_some((form, numbers))
    }

    /// Matter must hold its parts.
    fn contents(&mut self, spec: &Spec) {
        let massive = spec.massive_neutrino_density();
        let parts = spec.baryons.unwrap_or(0.0) + massive;
        if parts > spec.matter {
            let detail = match spec.baryons {
                Some(baryons) if massive == 0.0 => format!(
                    "matter {} is less than the baryons {baryons} it holds",
                    spec.matter
                ),
                Some(baryons) => {
                    format!(
                        "matter {} is less than the baryons {baryons} and massive neutrinos {massive} it holds",
                        spec.matter
                    )
                }
                None => format!(
                    "matter {} is less than the massive neutrinos {massive} it holds",
                    spec.matter
                ),
            };
            let allowed = Some(format!("at least {parts}"));
            self.push(
                "/matter",
                ModelFaultKind::Impossible,
                detail,
                Some(spec.matter.to_string()),
                allowed,
            );
        }
    }

    /// Closes the model by its rule, or says what would.
    fn balance(&mut self, declared: &Declaration, spec: &mut Spec) {
        let radiation = spec.photons() + spec.massless_neutrinos();
        let filled = DoubleDouble::from(spec.matter) + radiation;
        let one = DoubleDouble::from(1.0);
        let density = declared
            .dark_energy
            .as_ref()
            .and_then(|dark_energy| dark_energy.density);
        let absent = spec.dark_energy.form.absent;
        if absent && density.is_some_and(|density| density != 0.0) {
            let detail = format!("the form {} has density 0", spec.dark_energy.form.name);
            self.push(
                "/dark_energy/density",
                ModelFaultKind::Impossible,
                detail,
                density.map(|d| d.to_string()),
                Some("0".to_owned()),
            );
            return;
        }
        let closing_curvature = rounded_off(
            one - filled - DoubleDouble::from(density.unwrap_or(0.0)),
            &[spec.matter, radiation, density.unwrap_or(0.0)],
        );
        let closing_density = rounded_off(
            one - filled - DoubleDouble::from(spec.curvature),
            &[spec.matter, radiation, spec.curvature],
        );
        let off = match (declared.curvature, density) {
            (Some(curvature), _) if absent => curvature - closing_curvature,
            (Some(_), Some(density)) => density - closing_density,
            _ => 0.0,
        };
        if off.abs() > CLOSURE_TOLERANCE {
            self.inconsistent(radiation, absent, closing_curvature, closing_density, off);
            return;
        }
        match (declared.curvature, density) {
            _ if absent => spec.curvature = closing_curvature,
            (None, Some(density)) => {
                spec.curvature = closing_curvature;
                spec.dark_energy.density = density + 0.0;
            }
            _ => spec.dark_energy.density = closing_density,
        }
    }

    fn inconsistent(
        &mut self,
        radiation: f64,
        absent: bool,
        curvature: f64,
        density: f64,
        off: f64,
    ) {
        let radiation = if radiation > 0.0 {
            format!("radiation takes {radiation:.3e}; ")
        } else {
            String::new()
        };
        let detail = if absent {
            format!(
                "the densities sum to 1 {off:+.3e}; {radiation}leave out curvature, or set it to {curvature}"
            )
        } else {
            format!(
                "the densities sum to 1 {off:+.3e}; {radiation}leave out dark_energy.density or set it to {density}, or leave out curvature or set it to {curvature}"
            )
        };
        let pointer = if absent {
            "/curvature"
        } else {
            "/dark_energy/density"
        };
        self.push(
            pointer,
            ModelFaultKind::InconsistentClosure,
            detail,
            None,
            None,
        );
    }
}

/// A closing term; exactly zero where it is below 8 ulp of the sum of all terms,
/// so that rounding does not create physics.
fn rounded_off(closing: DoubleDouble, terms: &[f64]) -> f64 {
    let scale: f64 = 1.0 + terms.iter().map(|term| term.abs()).sum::<f64>();
    let value = closing.value();
    if value.abs() <= 8.0 * f64::EPSILON * scale {
        0.0
    } else {
        value
    }
}
