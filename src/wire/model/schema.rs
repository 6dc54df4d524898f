//! The schemas of models, made from the ranges and forms that check them.

use super::super::schema::{closed_object, number, one_of, reference, words};
use super::{DeclaredModel, Model};
use crate::model::parameter::{
    BARYONS, CMB_TEMPERATURE, CURVATURE, DARK_ENERGY_DENSITY, EFFECTIVE_NEUTRINO_NUMBER,
    HUBBLE_CONSTANT, MATTER, NEUTRINO_MASS,
};
use crate::model::{DARK_ENERGY_FORMS, DarkEnergyForm};
use serde_json::json;
use std::borrow::Cow;
use utoipa::openapi::RefOr;
use utoipa::openapi::schema::{ArrayBuilder, Discriminator, Object, ObjectBuilder, Schema, Type};
use utoipa::{PartialSchema, ToSchema};

type Schemas = Vec<(String, RefOr<Schema>)>;

impl PartialSchema for Model {
    fn schema() -> RefOr<Schema> {
        let description =
            "A cosmological model: the name of one that GET /v1/models lists, or a declared one.";
        one_of(
            [reference("ModelName"), reference("DeclaredModel")],
            description,
        )
        .into()
    }
}

impl ToSchema for Model {
    fn name() -> Cow<'static, str> {
        "Model".into()
    }

    fn schemas(schemas: &mut Schemas) {
        schemas.push(("ModelName".to_owned(), model_name().into()));
        schemas.push(("DeclaredModel".to_owned(), DeclaredModel::schema()));
        DeclaredModel::schemas(schemas);
    }
}

impl PartialSchema for DeclaredModel {
    fn schema() -> RefOr<Schema> {
        let description = "A model by its numbers today, as fractions of the critical density. Without dark_energy a \
            cosmological constant closes the sum to 1, curvature being 0 unless given; dark_energy without density \
            closes likewise; density without curvature lets curvature close; with both, the sum with radiation must \
            be 1 within 1e-9, and what is missing goes into the density, as the model of the answer shows.";
        closed_object(description)
            .property("hubble_constant", number(&HUBBLE_CONSTANT))
            .property("matter", number(&MATTER))
            .property("curvature", number(&CURVATURE))
            .property("baryons", number(&BARYONS))
            .property("radiation", reference("Radiation"))
            .property("dark_energy", reference("DarkEnergy"))
            .required("hubble_constant")
            .required("matter")
            .examples([json!({"hubble_constant": 70.0, "matter": 0.3})])
            .into()
    }
}

impl ToSchema for DeclaredModel {
    fn name() -> Cow<'static, str> {
        "DeclaredModel".into()
    }

    fn schemas(schemas: &mut Schemas) {
        schemas.push(("Radiation".to_owned(), radiation().into()));
        schemas.push(("DarkEnergy".to_owned(), dark_energy()));
        for form in DARK_ENERGY_FORMS {
            schemas.push((schema_name(form), dark_energy_form(form).into()));
        }
    }
}

fn model_name() -> Object {
    ObjectBuilder::new()
        .schema_type(Type::String)
        .pattern(Some("^[a-z0-9][a-z0-9-]{0,63}$"))
        .description(Some(
            "The name of a model that GET /v1/models lists; operators add names of their own.",
        ))
        .examples(["planck-2018-cmb-lensing"])
        .build()
}

fn radiation() -> Object {
    let masses = ArrayBuilder::new()
        .items(number(&NEUTRINO_MASS))
        .max_items(Some(3))
        .description(Some(
            "Masses of at most three neutrino species in any order, in eV; the rest are massless.",
        ));
    closed_object("Photons and neutrinos. Without it the model has none.")
        .property("cmb_temperature", number(&CMB_TEMPERATURE))
        .property("effective_neutrino_number", number(&EFFECTIVE_NEUTRINO_NUMBER))
        .property("neutrino_masses", masses)
        .required("cmb_temperature")
        .required("effective_neutrino_number")
        .examples([json!({"cmb_temperature": 2.7255, "effective_neutrino_number": 3.046, "neutrino_masses": [0.06]})])
        .build()
}

/// Each form is an object of its own that owns its `form`: generators make discriminated unions of that.
fn dark_energy() -> RefOr<Schema> {
    let schemas = DARK_ENERGY_FORMS
        .iter()
        .map(|form| reference(&schema_name(form)));
    let mapping = DARK_ENERGY_FORMS.iter().map(|form| {
        let target = format!("#/components/schemas/{}", schema_name(form));
        (form.name.to_owned(), target)
    });
    one_of(schemas, "Dark energy in one of its forms.")
        .discriminator(Some(Discriminator::with_mapping("form", mapping)))
        .into()
}

fn dark_energy_form(form: &DarkEnergyForm) -> Object {
    let mut density = number(&DARK_ENERGY_DENSITY);
    if form.absent {
        (density.minimum, density.maximum) = (Some(0.0.into()), Some(0.0.into()));
    }
    let description = format!("{} Source: {}.", form.description, form.source);
    let object = closed_object(&description)
        .property("form", words([form.name], "Which form it is."))
        .property("density", density)
        .required("form");
    let with_parameters = form.parameters.iter().fold(object, |object, parameter| {
        object
            .property(parameter.name, number(parameter))
            .required(parameter.name)
    });
    with_parameters.build()
}

/// `linear_in_scale_factor` → `DarkEnergyLinearInScaleFactor`.
fn schema_name(form: &DarkEnergyForm) -> String {
    let words = form.name.split('_').map(|word| {
        let (first, rest) = word.split_at(word.len().min(1));
        format!("{}{rest}", first.to_ascii_uppercase())
    });
    format!("DarkEnergy{}", words.collect::<String>())
}

/// The model of an answer.
#[derive(Debug, ToSchema)]
pub struct ModelAnswer {
    /// Its name, if it has one.
    #[schema(nullable = false)]
    pub name: Option<String>,
    /// How well its numbers were checked: confirmed (each number that its source prints was compared with it; a note names what is not printed there), partly_confirmed (some were), from_memory (none was); operator for the team's own.
    #[schema(nullable = false)]
    pub status: Option<String>,
    /// True if the request named no model and this one is the default.
    #[schema(nullable = false)]
    pub defaulted: Option<bool>,
    /// The label of the spec: `rf1-` and 16 hexadecimal digits of the hash of its canonical bytes.
    #[schema(examples("rf1-0123456789abcdef"))]
    pub fingerprint: String,
    /// The closed model in full.
    pub spec: DeclaredModel,
}
