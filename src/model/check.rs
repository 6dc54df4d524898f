//! Every member of a declaration by itself: there, known, and in range.

use super::parameter::{self as range, shown};
use super::{
    COSMOLOGICAL_CONSTANT, DARK_ENERGY_FORMS, DarkEnergyDeclaration, DarkEnergyForm, Declaration,
    ModelFault, ModelFaultKind, Parameter, Radiation, RadiationDeclaration,
};

/// A declaration whose members are all in range; −0 is 0, masses are sorted and
/// radiation without a temperature is gone.
pub(super) struct Checked {
    pub(super) hubble_constant: f64,
    pub(super) matter: f64,
    pub(super) curvature: Option<f64>,
    pub(super) baryons: Option<f64>,
    pub(super) radiation: Option<Radiation>,
    pub(super) form: &'static DarkEnergyForm,
    pub(super) parameters: Vec<f64>,
    pub(super) density: Option<f64>,
}

/// Checks every member; a number in the result is a placeholder where it has a fault.
pub(super) fn check(declared: &Declaration) -> Result<Checked, Vec<ModelFault>> {
    let mut faults = Vec::new();
    let hubble_constant = declared.hubble_constant;
    in_range(
        "/hubble_constant",
        &range::HUBBLE_CONSTANT,
        hubble_constant,
        &mut faults,
    );
    let matter = in_range("/matter", &range::MATTER, declared.matter, &mut faults);
    let curvature = declared
        .curvature
        .map(|value| in_range("/curvature", &range::CURVATURE, value, &mut faults));
    let baryons = declared
        .baryons
        .map(|value| in_range("/baryons", &range::BARYONS, value, &mut faults));
    let radiation = declared
        .radiation
        .as_ref()
        .and_then(|radiation| check_radiation(radiation, &mut faults));
    let (form, parameters, density) = match &declared.dark_energy {
        Some(dark_energy) => check_dark_energy(dark_energy, &mut faults),
        None => (&COSMOLOGICAL_CONSTANT, Vec::new(), None),
    };
    if !faults.is_empty() {
        return Err(faults);
    }
    Ok(Checked {
        hubble_constant,
        matter,
        curvature,
        baryons,
        radiation,
        form,
        parameters,
        density,
    })
}

/// The value with −0 as 0; a fault if it is outside its range.
fn in_range(pointer: &str, parameter: &Parameter, value: f64, faults: &mut Vec<ModelFault>) -> f64 {
    if !parameter.allows(value) {
        let allowed = parameter.allowed();
        let detail = format!("{} is {}, outside {allowed}", parameter.name, shown(value));
        faults.push(
            ModelFault::new(ModelFaultKind::OutOfRange, pointer, detail)
                .with_value(value)
                .with_allowed(allowed),
        );
    }
    value + 0.0
}

/// The value of a member that must be there.
fn required(
    pointer: &str,
    parameter: &Parameter,
    value: Option<f64>,
    missing: &str,
    faults: &mut Vec<ModelFault>,
) -> Option<f64> {
    if let Some(value) = value {
        return Some(in_range(pointer, parameter, value, faults));
    }
    faults.push(
        ModelFault::new(ModelFaultKind::MissingField, pointer, missing.to_owned())
            .with_allowed(parameter.allowed()),
    );
    None
}

fn check_radiation(
    declared: &RadiationDeclaration,
    faults: &mut Vec<ModelFault>,
) -> Option<Radiation> {
    let temperature = required(
        "/radiation/cmb_temperature",
        &range::CMB_TEMPERATURE,
        declared.cmb_temperature,
        "radiation needs its temperature today in K",
        faults,
    );
    let number = required(
        "/radiation/effective_neutrino_number",
        &range::EFFECTIVE_NEUTRINO_NUMBER,
        declared.effective_neutrino_number,
        "radiation needs N_eff; 0 is photons only",
        faults,
    );
    let masses = check_masses(&declared.neutrino_masses, faults);
    let (cmb_temperature, effective_neutrino_number) = (temperature?, number?);
    if masses.iter().any(|mass| *mass > 0.0) {
        let without = if cmb_temperature == 0.0 {
            "cmb_temperature is 0"
        } else if effective_neutrino_number == 0.0 {
            "effective_neutrino_number is 0"
        } else {
            ""
        };
        if !without.is_empty() {
            let detail = format!("neutrino masses without neutrinos: {without}");
            faults.push(
                ModelFault::new(
                    ModelFaultKind::Impossible,
                    "/radiation/neutrino_masses",
                    detail,
                )
                .with_allowed("no masses, or both above 0".to_owned()),
            );
        }
    }
    (cmb_temperature > 0.0).then_some(Radiation {
        cmb_temperature,
        effective_neutrino_number,
        neutrino_masses: masses,
    })
}

fn check_masses(
    declared: &[f64],
    faults: &mut Vec<ModelFault>,
) -> [f64; range::LARGEST_MASS_COUNT] {
    let pointer = "/radiation/neutrino_masses";
    let mut masses = [0.0; range::LARGEST_MASS_COUNT];
    if declared.len() > masses.len() {
        let detail = format!("{} neutrino masses for three species", declared.len());
        let mut fault = ModelFault::new(ModelFaultKind::OutOfRange, pointer, detail)
            .with_allowed("at most 3 masses".to_owned());
        fault.value = Some(format!("{} masses", declared.len()));
        faults.push(fault);
    }
    for (position, (mass, place)) in declared.iter().zip(&mut masses).enumerate() {
        let pointer = format!("{pointer}/{position}");
        *place = in_range(&pointer, &range::NEUTRINO_MASS, *mass, faults);
    }
    masses.sort_by(f64::total_cmp);
    masses
}

fn check_dark_energy(
    declared: &DarkEnergyDeclaration,
    faults: &mut Vec<ModelFault>,
) -> (&'static DarkEnergyForm, Vec<f64>, Option<f64>) {
    let density = declared.density.map(|value| {
        in_range(
            "/dark_energy/density",
            &range::DARK_ENERGY_DENSITY,
            value,
            faults,
        )
    });
    let known = DARK_ENERGY_FORMS
        .iter()
        .find(|form| form.name == declared.form);
    let Some(form) = known else {
        let names: Vec<&str> = DARK_ENERGY_FORMS.iter().map(|form| form.name).collect();
        let detail = format!("no form of dark energy is called {:?}", declared.form);
        let mut fault = ModelFault::new(ModelFaultKind::UnknownForm, "/dark_energy/form", detail)
            .with_allowed(names.join(", "));
        fault.value = Some(declared.form.clone());
        faults.push(fault);
        return (&COSMOLOGICAL_CONSTANT, Vec::new(), density);
    };
    if form.absent && density.is_some_and(|density| density != 0.0) {
        let detail = format!("the form {} has density 0", form.name);
        faults.push(
            ModelFault::new(ModelFaultKind::Impossible, "/dark_energy/density", detail)
                .with_value(density.unwrap_or(0.0))
                .with_allowed("0".to_owned()),
        );
    }
    (
        form,
        check_parameters(form, &declared.parameters, faults),
        density,
    )
}

fn check_parameters(
    form: &DarkEnergyForm,
    declared: &[(String, f64)],
    faults: &mut Vec<ModelFault>,
) -> Vec<f64> {
    for (position, (name, value)) in declared.iter().enumerate() {
        let pointer = format!("/dark_energy/{name}");
        if !form.parameters.iter().any(|known| known.name == name) {
            let names: Vec<&str> = form.parameters.iter().map(|known| known.name).collect();
            let detail = format!("the form {} has no {name}", form.name);
            let fault =
                ModelFault::new(ModelFaultKind::UnknownField, pointer, detail).with_value(*value);
            faults.push(match names.as_slice() {
                [] => fault,
                names => fault.with_allowed(names.join(", ")),
            });
        } else if declared
            .iter()
            .take(position)
            .any(|(other, _)| other == name)
        {
            let detail = format!("{name} is given twice");
            faults.push(
                ModelFault::new(ModelFaultKind::Impossible, pointer, detail).with_value(*value),
            );
        }
    }
    let mut numbers = Vec::with_capacity(form.parameters.len());
    for parameter in form.parameters {
        let given = declared.iter().find(|(name, _)| name == parameter.name);
        numbers.extend(required(
            &format!("/dark_energy/{}", parameter.name),
            parameter,
            given.map(|(_, value)| *value),
            &format!("the form {} needs {}", form.name, parameter.name),
            faults,
        ));
    }
    numbers
}
