//! What can be wrong with a declared model.

use thiserror::Error;

/// One thing wrong with a declared model.
#[derive(Clone, Debug, Error, PartialEq)]
#[error("{pointer}: {detail}")]
pub struct ModelFault {
    /// Where, as a JSON pointer below the model.
    pub pointer: String,
    /// Which kind of thing.
    pub kind: ModelFaultKind,
    /// In words, with the value, the bound and the unit.
    pub detail: String,
    /// The value as text.
    pub value: Option<String>,
    /// What would be allowed.
    pub allowed: Option<String>,
}

/// Kinds of [`ModelFault`].
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum ModelFaultKind {
    /// A member that is needed is absent.
    MissingField,
    /// A member that this form does not have.
    UnknownField,
    /// A number outside its range.
    OutOfRange,
    /// A dark-energy form nobody declared.
    UnknownForm,
    /// The densities do not sum to one.
    InconsistentClosure,
    /// Values that cannot be true together.
    Impossible,
}
