//! Schemas that follow from data instead of a struct.

use crate::model::Parameter;
use utoipa::openapi::schema::{
    AdditionalProperties, KnownFormat, Object, ObjectBuilder, OneOfBuilder, Schema, SchemaFormat,
    SchemaType, Type,
};
use utoipa::openapi::{Ref, RefOr};

/// The schema of a number with the range of its parameter.
pub(super) fn number(parameter: &Parameter) -> Object {
    let unit = match parameter.unit {
        "1" => String::new(),
        unit => format!(" Unit: {unit}."),
    };
    let number = ObjectBuilder::new()
        .schema_type(Type::Number)
        .format(Some(SchemaFormat::KnownFormat(KnownFormat::Double)))
        .description(Some(format!("{}{unit}", parameter.description)))
        .maximum(Some(parameter.maximum));
    match parameter.minimum_exclusive {
        true => number.exclusive_minimum(Some(parameter.minimum)).build(),
        false => number.minimum(Some(parameter.minimum)).build(),
    }
}

/// The schema of a string that is one of `words`.
pub(super) fn words<'a>(words: impl IntoIterator<Item = &'a str>, description: &str) -> Object {
    ObjectBuilder::new()
        .schema_type(Type::String)
        .enum_values(Some(words))
        .description(Some(description))
        .build()
}

/// The beginning of an object that has no members but those named.
pub(super) fn closed_object(description: &str) -> ObjectBuilder {
    ObjectBuilder::new()
        .schema_type(SchemaType::new(Type::Object))
        .description(Some(description))
        .additional_properties(Some(AdditionalProperties::FreeForm(false)))
}

/// A reference to a schema by its name.
pub(super) fn reference(name: &str) -> RefOr<Schema> {
    RefOr::Ref(Ref::from_schema_name(name))
}

/// One of several schemas.
pub(super) fn one_of(
    schemas: impl IntoIterator<Item = RefOr<Schema>>,
    description: &str,
) -> OneOfBuilder {
    let one_of = OneOfBuilder::new().description(Some(description));
    schemas.into_iter().fold(one_of, OneOfBuilder::item)
}
