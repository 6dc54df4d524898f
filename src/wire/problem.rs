//! Problems as RFC 9457 writes them.

use super::code::Code;
use super::fault::{Fault, Place};
use serde::Serialize;
use utoipa::ToSchema;

/// A problem as RFC 9457 writes it.
#[derive(Debug, Serialize, ToSchema)]
pub struct Problem {
    /// The address of the explanation of the code.
    #[serde(rename = "type")]
    #[schema(format = "uri-reference", examples("/problems/unknown_quantity"))]
    pub kind: String,
    /// What the code means, in a few words.
    pub title: &'static str,
    /// The status of the answer.
    #[schema(minimum = 400, maximum = 599)]
    pub status: u16,
    /// What is wrong with this request.
    pub detail: String,
    /// The code; new ones may come, so treat an unknown one by its status.
    pub code: &'static str,
    /// The single faults, at most 20 of them.
    #[serde(skip_serializing_if = "Vec::is_empty")]
    #[schema(required = false)]
    pub errors: Vec<ProblemError>,
    /// How many faults there are, listed or not.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false, minimum = 1)]
    pub errors_total: Option<usize>,
}

/// One fault of a request.
#[derive(Debug, Serialize, ToSchema)]
pub struct ProblemError {
    /// Where in the body, as an RFC 6901 pointer.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub pointer: Option<String>,
    /// Which query parameter.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub parameter: Option<String>,
    /// What is wrong there.
    pub detail: String,
    /// The offending value as text, cut to 100 characters.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub value: Option<String>,
    /// What would be right.
    #[serde(skip_serializing_if = "Option::is_none")]
    #[schema(nullable = false)]
    pub allowed: Option<String>,
}

/// How many faults of one request are listed.
const LISTED: usize = 20;

impl Problem {
    /// The problem of a request with these faults; the first one gives code and detail.
    pub fn of(faults: &[Fault]) -> Problem {
        let code = faults
            .first()
            .map_or(Code::InternalError, |fault| fault.code);
        let (name, status, title, description) = code.entry();
        let detail = faults
            .first()
            .map_or(description, |fault| fault.detail.as_str());
        let errors: Vec<_> = faults
            .iter()
            .filter(|fault| fault.place != Place::Whole || faults.len() > 1)
            .collect();
        Problem {
            kind: format!("/problems/{name}"),
            title,
            status,
            detail: detail.to_owned(),
            code: name,
            errors_total: (!errors.is_empty()).then_some(errors.len()),
            errors: errors
                .into_iter()
                .take(LISTED)
                .map(ProblemError::of)
                .collect(),
        }
    }
}

impl ProblemError {
    fn of(fault: &Fault) -> ProblemError {
        let (pointer, parameter) = match &fault.place {
            Place::Whole => (None, None),
            Place::Pointer(pointer) => (Some(pointer.clone()), None),
            Place::Parameter(name) => (None, Some(name.clone())),
        };
        ProblemError {
            pointer,
            parameter,
            detail: fault.detail.clone(),
            value: fault.value.clone(),
            allowed: fault.allowed.clone(),
        }
    }
}

/// The explanation of a problem code.
#[derive(Debug, Serialize, ToSchema)]
pub struct ProblemPage {
    /// The code.
    #[schema(examples("unknown_quantity"))]
    pub code: &'static str,
    /// The status of answers with it.
    #[schema(minimum = 400, maximum = 599)]
    pub status: u16,
    /// What it means, in a few words.
    pub title: &'static str,
    /// When it comes, and what helps.
    pub description: &'static str,
}

impl ProblemPage {
    /// The explanation of this code.
    pub fn of(code: Code) -> ProblemPage {
        let (code, status, title, description) = code.entry();
        ProblemPage {
            code,
            status,
            title,
            description,
        }
    }
}
