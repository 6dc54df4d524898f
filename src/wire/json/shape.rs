//! serde over the tree: which member is wrong, and how, in words for the sender.

use super::super::code::Code;
use super::super::fault::Fault;
use super::super::nearest::meant;
use super::elements::{Cell, Elements};
use super::node::Node;
use crate::model::DARK_ENERGY_FORMS;
use serde::de::value::{BorrowedStrDeserializer, StringDeserializer};
use serde::de::{
    DeserializeSeed, Deserializer, Error, Expected, IntoDeserializer, MapAccess, Unexpected,
    Visitor,
};
use std::borrow::Cow;
use std::fmt::Display;

impl<'de> Deserializer<'de> for Node<'de> {
    type Error = Fault;

    #[inline]
    fn deserialize_any<V: Visitor<'de>>(self, visitor: V) -> Result<V::Value, Fault> {
        match self {
            Node::Null => visitor.visit_unit(),
            Node::Bool(value) => visitor.visit_bool(value),
            Node::Number(number) => visitor.visit_f64(number),
            Node::Text(Cow::Borrowed(text)) => visitor.visit_borrowed_str(text),
            Node::Text(Cow::Owned(text)) => visitor.visit_string(text),
            Node::Numbers(numbers) => {
                visitor.visit_seq(Elements::of(numbers.into_iter().map(Cell)))
            }
            Node::Array(elements) => visitor.visit_seq(Elements::of(elements.into_iter())),
            Node::Object(members) => visitor.visit_map(Members {
                rest: members.into_iter(),
                value: None,
            }),
        }
    }

    /// An absent member is one thing, null another: null must suit the type itself.
    #[inline]
    fn deserialize_option<V: Visitor<'de>>(self, visitor: V) -> Result<V::Value, Fault> {
        visitor.visit_some(self)
    }

    /// Structs are objects only; serde by itself would take an array of their members too.
    fn deserialize_struct<V: Visitor<'de>>(
        self,
        _name: &'static str,
        _fields: &'static [&'static str],
        visitor: V,
    ) -> Result<V::Value, Fault> {
        match self {
            Node::Object(_) => self.deserialize_any(visitor),
            other => Err(Fault::invalid_type(other.unexpected(), &visitor)),
        }
    }

    fn deserialize_newtype_struct<V: Visitor<'de>>(
        self,
        _name: &'static str,
        visitor: V,
    ) -> Result<V::Value, Fault> {
        visitor.visit_newtype_struct(self)
    }

    fn deserialize_enum<V: Visitor<'de>>(
        self,
        _name: &'static str,
        _variants: &'static [&'static str],
        visitor: V,
    ) -> Result<V::Value, Fault> {
        match self {
            Node::Text(text) => visitor.visit_enum(text.as_ref().into_deserializer()),
            other => Err(Fault::invalid_type(other.unexpected(), &"a string")),
        }
    }

    serde::forward_to_deserialize_any! {
        bool i8 i16 i32 i64 i128 u8 u16 u32 u64 u128 f32 f64 char str string bytes byte_buf
        unit unit_struct seq tuple tuple_struct map identifier ignored_any
    }
}

impl Node<'_> {
    fn unexpected(&self) -> Unexpected<'_> {
        match self {
            Node::Null => Unexpected::Unit,
            Node::Bool(value) => Unexpected::Bool(*value),
            Node::Number(number) => Unexpected::Float(*number),
            Node::Text(text) => Unexpected::Str(text),
            Node::Numbers(_) | Node::Array(_) => Unexpected::Seq,
            Node::Object(_) => Unexpected::Map,
        }
    }
}

struct Members<'de> {
    rest: std::vec::IntoIter<(Cow<'de, str>, Node<'de>)>,
    value: Option<(Cow<'de, str>, Node<'de>)>,
}

impl<'de> MapAccess<'de> for Members<'de> {
    type Error = Fault;

    fn next_key_seed<K: DeserializeSeed<'de>>(
        &mut self,
        seed: K,
    ) -> Result<Option<K::Value>, Fault> {
        self.value = self.rest.next();
        match &self.value {
            None => Ok(None),
            Some((Cow::Borrowed(name), _)) => seed
                .deserialize(BorrowedStrDeserializer::new(name))
                .map(Some),
            Some((Cow::Owned(name), _)) => seed
                .deserialize(StringDeserializer::new(name.clone()))
                .map(Some),
        }
    }

    fn next_value_seed<V: DeserializeSeed<'de>>(&mut self, seed: V) -> Result<V::Value, Fault> {
        match self.value.take() {
            Some((name, value)) => seed.deserialize(value).map_err(|fault| fault.inside(&name)),
            None => Err(Fault::custom("a value was asked for before its name")),
        }
    }
}

impl Error for Fault {
    fn custom<T: Display>(message: T) -> Fault {
        Fault::new(Code::WrongType, message.to_string()).at("")
    }

    fn invalid_type(found: Unexpected<'_>, expected: &dyn Expected) -> Fault {
        let (kind, value) = match found {
            Unexpected::Unit => ("null", None),
            Unexpected::Bool(value) => ("a boolean", Some(value.to_string())),
            Unexpected::Float(number) => ("a number", Some(number.to_string())),
            Unexpected::Str(text) => ("a string", Some(text.to_owned())),
            Unexpected::Map => ("an object", None),
            _ => ("an array", None),
        };
        let expected = match expected.to_string() {
            words if words == "f64" => "a number".to_owned(),
            words if words == "a sequence" => "an array".to_owned(),
            words if words.starts_with("struct ") => "an object".to_owned(),
            words => words,
        };
        let fault = Fault::new(
            Code::WrongType,
            format!("expected {expected}, found {kind}"),
        )
        .allowed(expected)
        .at("");
        match value {
            Some(value) => fault.value(value),
            None => fault,
        }
    }

    fn invalid_value(found: Unexpected<'_>, expected: &dyn Expected) -> Fault {
        let mut fault = Fault::invalid_type(found, expected);
        fault.code = Code::OutOfRange;
        fault.detail = format!("expected {expected}");
        fault
    }

    fn unknown_variant(variant: &str, expected: &'static [&'static str]) -> Fault {
        let detail = format!(
            "there is no \"{variant}\" here{}",
            meant(variant, expected.iter().copied())
        );
        Fault::new(Code::OutOfRange, detail)
            .value(variant)
            .allowed(expected.join(", "))
            .at("")
    }

    fn unknown_field(field: &str, expected: &'static [&'static str]) -> Fault {
        let shown: String = field.chars().take(40).collect();
        let detail = format!(
            "there is no member \"{shown}\" here{}",
            meant(field, expected.iter().copied())
        );
        Fault::new(Code::UnknownField, detail)
            .allowed(expected.join(", "))
            .at("")
            .inside(field)
    }

    fn missing_field(field: &'static str) -> Fault {
        let detail = format!("the member \"{field}\" is missing");
        let fault = Fault::new(Code::MissingField, detail).at("").inside(field);
        match field {
            "form" => fault.allowed(form_names()),
            _ => fault,
        }
    }

    fn duplicate_field(field: &'static str) -> Fault {
        let detail = format!("the member \"{field}\" is there twice");
        Fault::new(Code::DuplicateField, detail)
            .at("")
            .inside(field)
    }
}

/// What the one member that is a word may say.
fn form_names() -> String {
    let names: Vec<_> = DARK_ENERGY_FORMS.iter().map(|form| form.name).collect();
    names.join(", ")
}
