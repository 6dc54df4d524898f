//! The elements of arrays for serde; those of a column of numbers never become nodes.

use super::super::fault::Fault;
use super::node::Node;
use serde::de::{DeserializeSeed, Deserializer, SeqAccess, Visitor};

/// The elements of an array that are left.
pub(super) struct Elements<I> {
    rest: I,
    index: usize,
}

impl<I> Elements<I> {
    pub(super) fn of(rest: I) -> Elements<I> {
        Elements { rest, index: 0 }
    }
}

impl<'de, I, D> SeqAccess<'de> for Elements<I>
where
    I: ExactSizeIterator<Item = D>,
    D: Deserializer<'de, Error = Fault>,
{
    type Error = Fault;

    #[inline]
    fn next_element_seed<T: DeserializeSeed<'de>>(
        &mut self,
        seed: T,
    ) -> Result<Option<T::Value>, Fault> {
        let Some(element) = self.rest.next() else {
            return Ok(None);
        };
        self.index += 1;
        match seed.deserialize(element) {
            Ok(value) => Ok(Some(value)),
            Err(fault) => Err(fault.inside(&(self.index - 1).to_string())),
        }
    }

    fn size_hint(&self) -> Option<usize> {
        Some(self.rest.len())
    }
}

/// A number of a column; NaN stands for null.
pub(super) struct Cell(pub(super) f64);

impl<'de> Deserializer<'de> for Cell {
    type Error = Fault;

    #[inline]
    fn deserialize_any<V: Visitor<'de>>(self, visitor: V) -> Result<V::Value, Fault> {
        if self.0.is_nan() {
            return visitor.visit_unit();
        }
        visitor.visit_f64(self.0)
    }

    #[inline]
    fn deserialize_option<V: Visitor<'de>>(self, visitor: V) -> Result<V::Value, Fault> {
        visitor.visit_some(self)
    }

    fn deserialize_newtype_struct<V: Visitor<'de>>(
        self,
        _name: &'static str,
        visitor: V,
    ) -> Result<V::Value, Fault> {
        visitor.visit_newtype_struct(self)
    }

    fn deserialize_struct<V: Visitor<'de>>(
        self,
        name: &'static str,
        fields: &'static [&'static str],
        visitor: V,
    ) -> Result<V::Value, Fault> {
        Node::of_number(self.0).deserialize_struct(name, fields, visitor)
    }

    fn deserialize_enum<V: Visitor<'de>>(
        self,
        name: &'static str,
        variants: &'static [&'static str],
        visitor: V,
    ) -> Result<V::Value, Fault> {
        Node::of_number(self.0).deserialize_enum(name, variants, visitor)
    }

    serde::forward_to_deserialize_any! {
        bool i8 i16 i32 i64 i128 u8 u16 u32 u64 u128 f32 f64 char str string bytes byte_buf
        unit unit_struct seq tuple tuple_struct map identifier ignored_any
    }
}
