//! One thing wrong with a request, and where.

use super::code::Code;

/// Where in a request something is wrong.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub enum Place {
    /// The request as a whole.
    #[default]
    Whole,
    /// A place in the JSON body, as an RFC 6901 pointer.
    Pointer(String),
    /// A query parameter by its name.
    Parameter(String),
}

/// One thing wrong with a request.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
#[error("{detail}")]
pub struct Fault {
    /// What kind of fault it is.
    pub code: Code,
    /// Where it is.
    pub place: Place,
    /// One sentence with the value, the bound and the unit.
    pub detail: String,
    /// The offending value as text.
    pub value: Option<String>,
    /// What would be right.
    pub allowed: Option<String>,
}

impl Fault {
    /// A fault of the request as a whole.
    pub fn new(code: Code, detail: impl Into<String>) -> Fault {
        Fault {
            code,
            place: Place::Whole,
            detail: detail.into(),
            value: None,
            allowed: None,
        }
    }

    /// The same at a place in the body.
    pub fn at(mut self, pointer: impl Into<String>) -> Fault {
        self.place = Place::Pointer(pointer.into());
        self
    }

    /// The same at a query parameter.
    pub fn parameter(mut self, name: impl Into<String>) -> Fault {
        self.place = Place::Parameter(name.into());
        self
    }

    /// The same with the offending value, cut to 100 characters.
    pub fn value(mut self, value: impl Into<String>) -> Fault {
        let mut value = value.into();
        if let Some((end, _)) = value.char_indices().nth(99) {
            value.truncate(end);
            value.push('…');
        }
        self.value = Some(value);
        self
    }

    /// The same with what would be right.
    pub fn allowed(mut self, allowed: impl Into<String>) -> Fault {
        self.allowed = Some(allowed.into());
        self
    }

    /// The same seen from one level further out: `segment` leads to where the pointer began.
    pub fn inside(mut self, segment: &str) -> Fault {
        let inner = match &self.place {
            Place::Pointer(pointer) => pointer.as_str(),
            _ => "",
        };
        let segment = segment.replace('~', "~0").replace('/', "~1");
        self.place = Place::Pointer(format!("/{segment}{inner}"));
        self
    }

    /// The pointer, if the fault is somewhere in a body.
    pub fn pointer(&self) -> Option<&str> {
        match &self.place {
            Place::Pointer(pointer) => Some(pointer),
            _ => None,
        }
    }
}
