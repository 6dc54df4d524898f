//! A model as requests write it: by name or by its numbers.

use super::super::code::Code;
use super::super::fault::Fault;
use super::super::json::{self, Node};
use super::super::name_or::NameOr;
use super::super::query::{Query, number};
use crate::model::{DARK_ENERGY_FORMS, DarkEnergyDeclaration, Declaration, RadiationDeclaration};
use serde::Deserialize;
use serde::de::{Deserializer, Error, IgnoredAny, MapAccess, Visitor};
use std::borrow::Cow;
use std::fmt;
use std::sync::LazyLock;

/// The model of a request.
#[derive(Clone, Debug, Deserialize, PartialEq)]
pub struct Model(pub NameOr<DeclaredModel>);

/// A model by its numbers, as written.
#[derive(Clone, Debug, Deserialize, PartialEq)]
#[serde(deny_unknown_fields)]
pub struct DeclaredModel {
    hubble_constant: f64,
    matter: f64,
    curvature: Option<f64>,
    baryons: Option<f64>,
    radiation: Option<DeclaredRadiation>,
    dark_energy: Option<DeclaredDarkEnergy>,
}

#[derive(Clone, Debug, Deserialize, PartialEq)]
#[serde(deny_unknown_fields)]
struct DeclaredRadiation {
    cmb_temperature: Option<f64>,
    effective_neutrino_number: Option<f64>,
    neutrino_masses: Option<Vec<f64>>,
}

#[derive(Clone, Debug, PartialEq)]
struct DeclaredDarkEnergy {
    form: String,
    density: Option<f64>,
    parameters: Vec<(String, f64)>,
}

impl DeclaredModel {
    /// The declaration, unchecked.
    pub fn declaration(self) -> Declaration {
        Declaration {
            hubble_constant: self.hubble_constant,
            matter: self.matter,
            curvature: self.curvature,
            baryons: self.baryons,
            radiation: self.radiation.map(|radiation| RadiationDeclaration {
                cmb_temperature: radiation.cmb_temperature,
                effective_neutrino_number: radiation.effective_neutrino_number,
                neutrino_masses: radiation.neutrino_masses.unwrap_or_default(),
            }),
            dark_energy: self.dark_energy.map(|dark_energy| DarkEnergyDeclaration {
                form: dark_energy.form,
                density: dark_energy.density,
                parameters: dark_energy.parameters,
            }),
        }
    }
}

/// The members of a declared model that a query can write, with dots.
static MEMBERS: LazyLock<Vec<String>> = LazyLock::new(|| {
    let plain = [
        "hubble_constant",
        "matter",
        "curvature",
        "baryons",
        "radiation.cmb_temperature",
        "radiation.effective_neutrino_number",
        "radiation.neutrino_masses",
    ];
    let dark_energy = DARK_ENERGY_MEMBERS
        .iter()
        .map(|member| format!("dark_energy.{member}"));
    plain
        .into_iter()
        .map(str::to_owned)
        .chain(dark_energy)
        .collect()
});

/// The members of dark energy in all its forms.
static DARK_ENERGY_MEMBERS: LazyLock<Vec<&'static str>> = LazyLock::new(|| {
    let mut members = vec!["form", "density"];
    for parameter in DARK_ENERGY_FORMS.iter().flat_map(|form| form.parameters) {
        if !members.contains(&parameter.name) {
            members.push(parameter.name);
        }
    }
    members
});

impl Model {
    /// The query parameters that tell the model.
    pub fn parameters() -> impl Iterator<Item = &'static str> {
        std::iter::once("model").chain(MEMBERS.iter().map(String::as_str))
    }

    /// Takes the model out of a query: `model=` or the members of a declared one.
    ///
    /// # Errors
    /// `wrong_type` for what is no number, `missing_field`, `malformed_query` for both at once.
    pub fn of_query(query: &mut Query<'_>) -> Result<Option<Model>, Fault> {
        let name = query.take("model");
        let form = query.value("dark_energy.form");
        // A form that does not exist may have any member: the form is what is wrong then.
        let strange = form.is_some_and(|form| !is_form(form));
        let is_member = |key: &str| {
            MEMBERS.iter().any(|member| member == key) || strange && key.starts_with("dark_energy.")
        };
        let members: Vec<_> = std::iter::from_fn(|| query.take_any(is_member)).collect();
        match (name, members.first()) {
            (None, None) => Ok(None),
            (Some(name), None) => Ok(Some(Model(NameOr::Name(name.into_owned())))),
            (Some(_), Some((member, _))) => {
                let detail =
                    format!("\"model\" names a model and \"{member}\" declares one; give either");
                Err(Fault::new(Code::MalformedQuery, detail).parameter(member.as_ref()))
            }
            (None, Some(_)) => {
                let declared = json::shape(tree(&members)?).map_err(|fault| dotted(&fault))?;
                Ok(Some(Model(NameOr::Object(declared))))
            }
        }
    }
}

fn is_form(name: &str) -> bool {
    DARK_ENERGY_FORMS.iter().any(|form| form.name == name)
}

/// The members of a query as the object they stand for.
fn tree<'m>(members: &'m [(Cow<'_, str>, Cow<'_, str>)]) -> Result<Node<'m>, Fault> {
    let mut root: Vec<(Cow<'m, str>, Node<'m>)> = Vec::new();
    for (key, text) in members {
        let (parent, member) = match key.split_once('.') {
            None => ("", key.as_ref()),
            Some(split) => split,
        };
        let value = match member {
            "form" => Node::Text(Cow::Borrowed(text)),
            "neutrino_masses" => {
                let masses = text.split(',').map(|mass| number(key, mass));
                Node::Numbers(masses.collect::<Result<_, _>>()?)
            }
            _ => Node::Number(number(key, text)?),
        };
        let member = (Cow::Borrowed(member), value);
        match root.iter_mut().find(|(name, _)| name == parent) {
            _ if parent.is_empty() => root.push(member),
            Some((_, Node::Object(members))) => members.push(member),
            _ => root.push((Cow::Borrowed(parent), Node::Object(vec![member]))),
        }
    }
    Ok(Node::Object(root))
}

fn dotted(fault: &Fault) -> Fault {
    let pointer = fault.pointer().unwrap_or_default();
    let name = pointer.trim_start_matches('/').replace('/', ".");
    let mut fault = fault.clone();
    if fault.code == Code::MissingField {
        fault.detail = format!("the query parameter \"{name}\" is missing");
    }
    fault.parameter(name)
}

impl<'de> Deserialize<'de> for DeclaredDarkEnergy {
    fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<Self, D::Error> {
        deserializer.deserialize_map(DarkEnergyVisitor)
    }
}

struct DarkEnergyVisitor;

impl<'de> Visitor<'de> for DarkEnergyVisitor {
    type Value = DeclaredDarkEnergy;

    fn expecting(&self, words: &mut fmt::Formatter<'_>) -> fmt::Result {
        words.write_str("an object")
    }

    /// Which parameter belongs to which form is for the model to say.
    fn visit_map<A: MapAccess<'de>>(self, mut members: A) -> Result<Self::Value, A::Error> {
        let (mut form, mut density, mut parameters) = (None::<String>, None, Vec::new());
        let mut strange: Option<String> = None;
        while let Some(name) = members.next_key::<String>()? {
            match name.as_str() {
                "form" => form = Some(members.next_value()?),
                "density" => density = Some(members.next_value()?),
                other if DARK_ENERGY_MEMBERS.contains(&other) => {
                    parameters.push((name, members.next_value()?));
                }
                _ => {
                    members.next_value::<IgnoredAny>()?;
                    strange.get_or_insert(name);
                }
            }
        }
        let form = form.ok_or_else(|| A::Error::missing_field("form"))?;
        // As in a query: the members of a form that does not exist are not what is wrong.
        if let (true, Some(strange)) = (is_form(&form), strange) {
            return Err(A::Error::unknown_field(&strange, &DARK_ENERGY_MEMBERS));
        }
        Ok(DeclaredDarkEnergy {
            form,
            density,
            parameters,
        })
    }
}
