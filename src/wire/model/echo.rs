//! A model as answers show it: in full, whatever the request left to the closure rule.

use crate::model::{DarkEnergy, Radiation, Spec};
use serde::ser::{Serialize, SerializeMap, Serializer};

/// The model of an answer.
#[derive(Clone, Debug, serde::Serialize)]
pub struct ModelEcho<'a> {
    /// Its name, if it has one.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub name: Option<&'a str>,
    /// How well its numbers were checked against their source.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub status: Option<&'static str>,
    /// Whether the request named none.
    #[serde(skip_serializing_if = "Option::is_none")]
    pub defaulted: Option<bool>,
    /// The label of the spec.
    pub fingerprint: &'a str,
    /// The closed model.
    pub spec: SpecEcho<'a>,
}

/// A closed model, written as a declared one.
#[derive(Clone, Copy, Debug)]
pub struct SpecEcho<'a>(pub &'a Spec);

impl Serialize for SpecEcho<'_> {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        let spec = self.0;
        let mut members = serializer.serialize_map(None)?;
        members.serialize_entry("hubble_constant", &spec.hubble_constant)?;
        members.serialize_entry("matter", &spec.matter)?;
        members.serialize_entry("curvature", &spec.curvature)?;
        if let Some(baryons) = spec.baryons {
            members.serialize_entry("baryons", &baryons)?;
        }
        if let Some(radiation) = &spec.radiation {
            members.serialize_entry("radiation", &RadiationEcho(radiation))?;
        }
        members.serialize_entry("dark_energy", &DarkEnergyEcho(&spec.dark_energy))?;
        members.end()
    }
}

struct RadiationEcho<'a>(&'a Radiation);

impl Serialize for RadiationEcho<'_> {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        let mut members = serializer.serialize_map(None)?;
        members.serialize_entry("cmb_temperature", &self.0.cmb_temperature)?;
        members.serialize_entry(
            "effective_neutrino_number",
            &self.0.effective_neutrino_number,
        )?;
        let masses = self.0.neutrino_masses.iter().filter(|mass| **mass > 0.0);
        members.serialize_entry("neutrino_masses", &masses.collect::<Vec<_>>())?;
        members.end()
    }
}

struct DarkEnergyEcho<'a>(&'a DarkEnergy);

impl Serialize for DarkEnergyEcho<'_> {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        let mut members = serializer.serialize_map(None)?;
        members.serialize_entry("form", self.0.form.name)?;
        members.serialize_entry("density", &self.0.density)?;
        for (parameter, value) in self.0.form.parameters.iter().zip(&self.0.parameters) {
            members.serialize_entry(parameter.name, value)?;
        }
        members.end()
    }
}
