//! A strict JSON reader: one pass into a small tree, then serde over the tree.
//!
//! Own code, because a batch of redshifts goes through it: arrays of numbers become a `Vec<f64>`
//! at once, correctly rounded, and every fault knows its place.

mod elements;
mod node;
mod number;
mod reader;
mod shape;
#[cfg(test)]
#[allow(clippy::unwrap_used, clippy::panic)]
mod tests;
mod text;

pub use node::{Bounds, Node};

use super::fault::Fault;
use serde::Deserialize;

/// Reads a body of the shape `T`.
///
/// # Errors
/// The first fault, with its exact pointer.
pub fn read<'de, T: Deserialize<'de>>(body: &'de [u8], bounds: &Bounds) -> Result<T, Fault> {
    shape(tree(body, bounds)?)
}

/// Reads a body of any shape.
///
/// # Errors
/// The first fault, with its exact pointer.
pub fn tree<'de>(body: &'de [u8], bounds: &Bounds) -> Result<Node<'de>, Fault> {
    reader::read(body, bounds)
}

/// Gives a tree the shape `T`.
///
/// # Errors
/// The first fault, with its exact pointer.
pub fn shape<'de, T: Deserialize<'de>>(node: Node<'de>) -> Result<T, Fault> {
    T::deserialize(node)
}
