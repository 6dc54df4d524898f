//! The query parameters of a conversion, as the OpenAPI document lists them.

use super::super::schema::{number, reference, words};
use super::query::MOST_VALUES;
use crate::model::parameter::{
    BARYONS, CMB_TEMPERATURE, CURVATURE, DARK_ENERGY_DENSITY, EFFECTIVE_NEUTRINO_NUMBER,
    HUBBLE_CONSTANT, MATTER,
};
use crate::model::{self, DARK_ENERGY_FORMS};
use crate::quantity::QUANTITIES;
use serde_json::{Value, json};
use utoipa::IntoParams;
use utoipa::openapi::path::{Parameter, ParameterBuilder, ParameterIn};
use utoipa::openapi::schema::{Object, ObjectBuilder, Schema, Type};
use utoipa::openapi::{RefOr, Required};

/// The query of `GET /v1/convert`.
#[derive(Debug)]
pub struct ConvertQuery;

/// The query of a route that answers in several formats.
#[derive(Debug)]
pub struct FormatQuery;

impl IntoParams for ConvertQuery {
    fn into_params(_: impl Fn() -> Option<ParameterIn>) -> Vec<Parameter> {
        let quantities = QUANTITIES.iter().filter(|quantity| quantity.inverse.is_some()).map(|quantity| {
            let description = format!(
                "{} Values in {} unless `unit` says otherwise: up to {MOST_VALUES} numbers with commas between them; \
                 `null` for a missing one. Exactly one quantity is given.",
                quantity.meaning, quantity.unit
            );
            let example = (quantity.name == "redshift").then(|| json!("0.5,1.2"));
            parameter(quantity.name, &description, pattern(NUMBERS, 8000), example)
        });
        let plain = [
            parameter(
                "to",
                TO,
                pattern(OUTPUTS, 2000),
                Some(json!("age,luminosity_distance")),
            ),
            parameter(
                "unit",
                "The unit of the given values, a VOUnits 1.1 string.",
                text(100),
                None,
            ),
            parameter(
                "branch",
                BRANCH,
                pattern("^(near|far|all|[1-9][0-9]{0,2})$", 4),
                None,
            ),
            parameter(
                "future",
                FUTURE,
                ObjectBuilder::new().schema_type(Type::Boolean).build(),
                None,
            ),
        ];
        let model = parameter("model", MODEL, reference("ModelName"), None);
        quantities
            .chain(plain)
            .chain([model])
            .chain(declared())
            .chain([format()])
            .collect()
    }
}

impl IntoParams for FormatQuery {
    fn into_params(_: impl Fn() -> Option<ParameterIn>) -> Vec<Parameter> {
        vec![format()]
    }
}

const NUMBERS: &str = "^(null|[-+]?([0-9]+[.]?[0-9]*|[.][0-9]+)([eE]([-+]?[0-9]{1,2}|-[0-9]{3}|[+]?[12][0-9]{2}|[+]?30[0-7]))?)\
    (,(null|[-+]?([0-9]+[.]?[0-9]*|[.][0-9]+)([eE]([-+]?[0-9]{1,2}|-[0-9]{3}|[+]?[12][0-9]{2}|[+]?30[0-7]))?))*$";
const OUTPUTS: &str = "^[a-z_]+(:[^,:]+){0,2}(,[a-z_]+(:[^,:]+){0,2})*$";
const TO: &str = "The quantities wanted, with commas between them, each as `name`, `name:unit`, `name:unit:per_h` or \
    `name:per_sound_horizon` (the model's own sound horizon), such as `age:Myr,comoving_distance:Mpc:per_h`; per h means \
    times h, so that `comoving_distance:Mpc:per_h` is in Mpc over h. Without it: redshift, age, lookback_time, comoving_distance, \
    luminosity_distance, angular_diameter_distance, distance_modulus, angular_scale, comoving_volume.";
const BRANCH: &str = "Which redshift is meant where several give the value: `near` (also without this parameter), `far`, \
    a number counted from 1 at the lowest, or `all`.";
const FUTURE: &str = "Whether times, rates and fractions are given for −1 < z < 0 too.";
const MODEL: &str = "The name of a model; or declare one by its members (`hubble_constant=70&matter=0.3`). Without either \
    the default model is used.";

/// The members of a declared model.
fn declared() -> Vec<Parameter> {
    let member = |name: &str, parameter: &model::Parameter| scalar(name, number(parameter));
    let forms = words(
        DARK_ENERGY_FORMS.iter().map(|form| form.name),
        "The form of dark energy.",
    );
    let mut members = vec![
        member("hubble_constant", &HUBBLE_CONSTANT),
        member("matter", &MATTER),
        member("curvature", &CURVATURE),
        member("baryons", &BARYONS),
        member("radiation.cmb_temperature", &CMB_TEMPERATURE),
        member(
            "radiation.effective_neutrino_number",
            &EFFECTIVE_NEUTRINO_NUMBER,
        ),
        parameter(
            "radiation.neutrino_masses",
            "Of a declared model: masses of at most three neutrino species in eV, with commas between them.",
            pattern(NUMBERS, 100),
            None,
        ),
        scalar("dark_energy.form", forms),
        member("dark_energy.density", &DARK_ENERGY_DENSITY),
    ];
    for own in DARK_ENERGY_FORMS.iter().flat_map(|form| form.parameters) {
        let name = format!("dark_energy.{}", own.name);
        if members.iter().all(|member| member.name != name) {
            members.push(member(&name, own));
        }
    }
    members
}

fn scalar(name: &str, schema: Object) -> Parameter {
    let description = schema.description.clone().unwrap_or_default();
    parameter(
        name,
        &format!("Of a declared model: {description}"),
        schema,
        None,
    )
}

fn format() -> Parameter {
    let schema = words(["json", "text", "csv"], "A format.");
    parameter(
        "format",
        "The format of the answer; it goes before the header Accept.",
        schema,
        None,
    )
}

fn text(longest: usize) -> Object {
    ObjectBuilder::new()
        .schema_type(Type::String)
        .min_length(Some(1))
        .max_length(Some(longest))
        .build()
}

fn pattern(pattern: &str, longest: usize) -> Object {
    let mut schema = text(longest);
    schema.pattern = Some(pattern.to_owned());
    schema
}

fn parameter(
    name: &str,
    description: &str,
    schema: impl Into<RefOr<Schema>>,
    example: Option<Value>,
) -> Parameter {
    ParameterBuilder::new()
        .name(name)
        .parameter_in(ParameterIn::Query)
        .required(Required::False)
        .description(Some(description))
        .schema(Some(schema))
        .example(example)
        .build()
}
