//! Numbers on the wire: columns in, shortest round-trip digits out.

use crate::tables::digits::shortest;
use serde::de::{Deserialize, Deserializer, Error, SeqAccess, Unexpected, Visitor};
use std::fmt;

/// A number or an array of numbers and nulls; NaN marks a null.
#[derive(Clone, Debug, PartialEq)]
pub struct Numbers(pub Vec<f64>);

/// Appends the shortest digits that read back as `number`, or `null` for what is not finite.
#[inline]
pub fn write(out: &mut Vec<u8>, number: f64) {
    if number.is_finite() {
        shortest(out, number);
    } else {
        out.extend_from_slice(b"null");
    }
}

/// Appends numbers with commas between them.
pub fn write_list(out: &mut Vec<u8>, numbers: &[f64]) {
    for (index, number) in numbers.iter().enumerate() {
        if index > 0 {
            out.push(b',');
        }
        write(out, *number);
    }
}

/// About how many bytes a written number takes with its separator: enough to reserve by.
pub const WRITTEN_BYTES: usize = 20;

impl<'de> Deserialize<'de> for Numbers {
    fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<Numbers, D::Error> {
        deserializer.deserialize_any(Column)
    }
}

struct Column;

impl<'de> Visitor<'de> for Column {
    type Value = Numbers;

    fn expecting(&self, words: &mut fmt::Formatter<'_>) -> fmt::Result {
        words.write_str("a number or an array of numbers and nulls")
    }

    fn visit_f64<E: Error>(self, number: f64) -> Result<Numbers, E> {
        Ok(Numbers(vec![number]))
    }

    fn visit_seq<A: SeqAccess<'de>>(self, mut elements: A) -> Result<Numbers, A::Error> {
        let mut numbers = Vec::with_capacity(elements.size_hint().unwrap_or(0).min(MOST_RESERVED));
        while let Some(Element(number)) = elements.next_element()? {
            numbers.push(number);
        }
        Ok(Numbers(numbers))
    }
}

/// No more is reserved on the word of a size hint.
const MOST_RESERVED: usize = 1 << 20;

/// A number or null.
struct Element(f64);

impl<'de> Deserialize<'de> for Element {
    #[inline]
    fn deserialize<D: Deserializer<'de>>(deserializer: D) -> Result<Element, D::Error> {
        deserializer.deserialize_any(ElementVisitor)
    }
}

struct ElementVisitor;

impl Visitor<'_> for ElementVisitor {
    type Value = Element;

    fn expecting(&self, words: &mut fmt::Formatter<'_>) -> fmt::Result {
        words.write_str("a number or null")
    }

    #[inline]
    fn visit_f64<E: Error>(self, number: f64) -> Result<Element, E> {
        Ok(Element(number))
    }

    fn visit_unit<E: Error>(self) -> Result<Element, E> {
        Ok(Element(f64::NAN))
    }

    fn visit_bool<E: Error>(self, value: bool) -> Result<Element, E> {
        Err(E::invalid_type(Unexpected::Bool(value), &self))
    }
}
