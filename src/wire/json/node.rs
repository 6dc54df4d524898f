//! The tree that a body becomes.

use std::borrow::Cow;

/// A JSON value; the members of an object keep their order.
#[derive(Clone, Debug, PartialEq)]
pub enum Node<'a> {
    /// null
    Null,
    /// true or false
    Bool(bool),
    /// A number, correctly rounded and finite.
    Number(f64),
    /// A string; borrowed unless it has escapes.
    Text(Cow<'a, str>),
    /// An array of numbers and nulls only (NaN marks a null), the empty array among them.
    Numbers(Vec<f64>),
    /// Any other array.
    Array(Vec<Node<'a>>),
    /// An object without duplicate names.
    Object(Vec<(Cow<'a, str>, Node<'a>)>),
}

/// How large a body may be, apart from its bytes.
#[derive(Clone, Debug)]
pub struct Bounds {
    /// Levels of arrays and objects.
    pub depth: usize,
    /// Elements of one array.
    pub elements: usize,
    /// Values that are not elements of an array of numbers.
    pub nodes: usize,
}

impl Default for Bounds {
    fn default() -> Bounds {
        Bounds {
            depth: 32,
            elements: 1_000_000,
            nodes: 1_100_000,
        }
    }
}

impl<'a> Node<'a> {
    pub(super) fn of_number(number: f64) -> Node<'a> {
        if number.is_nan() {
            Node::Null
        } else {
            Node::Number(number)
        }
    }

    /// Takes a member out of an object.
    pub fn take(&mut self, name: &str) -> Option<Node<'a>> {
        let Node::Object(members) = self else {
            return None;
        };
        let index = members.iter().position(|(member, _)| member == name)?;
        Some(members.remove(index).1)
    }
}
