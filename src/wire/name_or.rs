//! A member that is a name or an object.

use serde::de::value::MapAccessDeserializer;
use serde::de::{Deserialize, Deserializer, Error, MapAccess, Visitor};
use std::fmt;
use std::marker::PhantomData;

/// A name, or all that is behind such a name written out.
#[derive(Clone, Debug, PartialEq)]
pub enum NameOr<T> {
    /// The name.
    Name(String),
    /// The object.
    Object(T),
}

impl<'de, T: Deserialize<'de>> Deserialize<'de> for NameOr<T> {
    fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<NameOr<T>, D::Error> {
        deserializer.deserialize_any(NameOrVisitor(PhantomData))
    }
}

struct NameOrVisitor<T>(PhantomData<T>);

impl<'de, T: Deserialize<'de>> Visitor<'de> for NameOrVisitor<T> {
    type Value = NameOr<T>;

    fn expecting(&self, words: &mut fmt::Formatter<'_>) -> fmt::Result {
        words.write_str("a name or an object")
    }

    fn visit_str<E: Error>(self, name: &str) -> Result<NameOr<T>, E> {
        Ok(NameOr::Name(name.to_owned()))
    }

    fn visit_map<A: MapAccess<'de>>(self, members: A) -> Result<NameOr<T>, A::Error> {
        T::deserialize(MapAccessDeserializer::new(members)).map(NameOr::Object)
    }
}
