//! Refusals as responses: every problem the service answers with is made here.

use crate::wire::{Code, Fault, Problem};
use axum::body::Body;
use axum::http::header::{ALLOW, CONTENT_TYPE, RETRY_AFTER, VARY};
use axum::http::{HeaderValue, StatusCode};
use axum::response::{IntoResponse, Response};

/// What is wrong with a request, instead of its answer.
#[derive(Debug)]
pub struct Refusal(pub Vec<Fault>);

impl From<Fault> for Refusal {
    fn from(fault: Fault) -> Refusal {
        Refusal(vec![fault])
    }
}

impl From<Vec<Fault>> for Refusal {
    fn from(faults: Vec<Fault>) -> Refusal {
        Refusal(faults)
    }
}

impl IntoResponse for Refusal {
    fn into_response(self) -> Response {
        let problem = Problem::of(&self.0);
        // A problem is text and small numbers: it can always be written.
        let body = serde_json::to_vec(&problem).unwrap_or_default();
        let mut response = Response::new(Body::from(body));
        *response.status_mut() =
            StatusCode::from_u16(problem.status).unwrap_or(StatusCode::INTERNAL_SERVER_ERROR);
        let headers = response.headers_mut();
        headers.insert(CONTENT_TYPE, HeaderValue::from_static(PROBLEM_JSON));
        if problem.status == 503 {
            headers.insert(RETRY_AFTER, HeaderValue::from_static("1"));
        }
        response
    }
}

/// The media type of a problem.
pub(super) const PROBLEM_JSON: &str = "application/problem+json";

/// Gives a refusal that the framework made by itself its problem body.
pub(super) fn explained(response: Response) -> Response {
    let status = response.status();
    let plain = status.is_client_error() || status.is_server_error();
    let has_problem = response
        .headers()
        .get(CONTENT_TYPE)
        .is_some_and(|kind| kind == PROBLEM_JSON);
    if !plain || has_problem {
        return response;
    }
    let (code, detail) = match status.as_u16() {
        404 => (Code::NotFound, "there is nothing at this address"),
        // The framework's only own 400: a path that is not UTF-8.
        400 => (
            Code::NotFound,
            "the path is not UTF-8, so there is nothing at this address",
        ),
        405 => (
            Code::MethodNotAllowed,
            "this route does not know the method; see the header Allow",
        ),
        406 => (
            Code::NotAcceptable,
            "the accepted codings leave none that can be written",
        ),
        _ => (Code::InternalError, "the service met a fault of its own"),
    };
    let mut explained = Refusal::from(Fault::new(code, detail)).into_response();
    // The rest, such as a tag, belongs to the answer that the framework refused to send.
    for name in [ALLOW, VARY] {
        if let Some(value) = response.headers().get(&name) {
            explained.headers_mut().insert(name, value.clone());
        }
    }
    explained
}
