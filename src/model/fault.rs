//! What can be wrong with a declared model.

use thiserror::Error;

use super::parameter::shown;

/// One thing wrong with a declared model.
#[derive(Clone, Debug, Error, PartialEq)]
#[error("{pointer}: {detail}")]
pub struct ModelFault {
    /// Where, as a JSON pointer below the model: `/dark_energy/w`.
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
#[derive(Clone, Copy, Debug, PartialEq, Eq, Hash)]
pub enum ModelFaultKind {
    /// A member that is needed is absent.
    MissingField,
    /// A member that this form does not have.
    UnknownField,
    /// A number, or a count of numbers, outside its range.
    OutOfRange,
    /// A dark-energy form nobody declared.
    UnknownForm,
    /// Curvature and density are both given and the sum is not 1.
    InconsistentClosure,
    /// Values that are each allowed and cannot be true together.
    Impossible,
}

impl ModelFault {
    pub(super) fn new(kind: ModelFaultKind, pointer: impl Into<String>, detail: String) -> Self {
        ModelFault {
            pointer: pointer.into(),
            kind,
            detail,
            value: None,
            allowed: None,
        }
    }

    pub(super) fn with_value(mut self, value: f64) -> Self {
        self.value = Some(shown(value));
        self
    }

    pub(super) fn with_allowed(mut self, allowed: String) -> Self {
        self.allowed = Some(allowed);
        self
    }
}
