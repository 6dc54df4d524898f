//! The OpenAPI document: gathered from the routes, completed with what is the same for all.

use super::tags::{AROUND, CONVERT, MODELS};
use crate::wire::{Code, Problem};
use std::sync::LazyLock;
use utoipa::OpenApi;
use utoipa::openapi::path::Operation;
use utoipa::openapi::{Content, HttpMethod, Ref, RefOr, Response, ResponseBuilder};

/// The OpenAPI 3.1 document of the service.
pub fn document() -> utoipa::openapi::OpenApi {
    let mut document = super::routes::routes().into_openapi();
    for (path, item) in &mut document.paths.paths {
        for method in [HttpMethod::Get, HttpMethod::Post] {
            let operation = match method {
                HttpMethod::Get => item.get.as_mut(),
                _ => item.post.as_mut(),
            };
            if let Some(operation) = operation {
                add_refusals(path, operation);
            }
        }
    }
    document
}

/// The document as it is served and committed.
pub fn written() -> &'static str {
    static WRITTEN: LazyLock<String> = LazyLock::new(|| {
        let mut text = document().to_pretty_json().unwrap_or_default();
        text.push('\n');
        text
    });
    &WRITTEN
}

/// The document before its routes.
#[derive(OpenApi)]
#[openapi(
    info(
        title = "Redfathom",
        description = DESCRIPTION,
        license(name = "MIT OR Apache-2.0", identifier = "MIT OR Apache-2.0")
    ),
    servers((url = "/", description = "This instance")),
    components(schemas(Problem)),
    tags(
        (name = CONVERT, description = "Redshifts, times and distances into one another."),
        (name = MODELS, description = "The models that have names, and what follows from a model."),
        (name = AROUND, description = "The service itself.")
    )
)]
pub(crate) struct Base;

const DESCRIPTION: &str = "Turns redshift, cosmic time and distance into one another under a declared cosmological model.\n\n\
The service is stateless: the model travels with the request or is named, and every answer names it by its fingerprint, \
with the version of the service and the numerical accuracy reached. That accuracy says how well the numbers follow from \
the declared model; it says nothing about how well the model describes the universe, and below z ≈ 0.03 a peculiar \
motion of some 300 km/s is the largest error of a distance anyway.\n\n\
Columns in, columns out, row for row: a row that can't be converted is null and has a remark with its code; it spoils no \
other row. A request that can't be understood is refused whole by a problem (RFC 9457). All POSTs are pure computations \
and safe to repeat. Bodies may be packed (Content-Encoding gzip, br, zstd). `x-request-id` and `traceparent` are returned. \
Units are VOUnits 1.1 strings, meanings UCD1+ words. Within v1 only additions follow: optional request members, answer \
members, codes, quantities.";

/// What every operation can answer instead, by status.
fn add_refusals(path: &str, operation: &mut Operation) {
    let body = operation.request_body.is_some();
    let parameters = operation.parameters.is_some();
    let named = path.contains('{');
    let model = body || path == "/v1/convert";
    let statuses = [
        (400, parameters && !named || body),
        (404, named),
        (406, path.starts_with("/v1/") || path == "/" || named),
        (408, body),
        (413, model),
        (415, body),
        (422, model),
        (503, model || path == "/readyz"),
    ];
    let responses = &mut operation.responses.responses;
    for (status, _) in statuses.into_iter().filter(|(_, possible)| *possible) {
        responses.insert(status.to_string(), RefOr::T(refusal(status)));
    }
    responses.insert("default".to_owned(), RefOr::T(refusal(0)));
}

fn refusal(status: u16) -> Response {
    let of_status = |code: &&Code| status == 0 || code.status() == status;
    let codes: Vec<_> = Code::ALL
        .iter()
        .filter(of_status)
        .map(|code| code.name())
        .collect();
    let description = match status {
        0 => "Any other problem.".to_owned(),
        _ => format!("A problem: {}.", codes.join(", ")),
    };
    let content = Content::new(Some(RefOr::Ref(Ref::from_schema_name("Problem"))));
    ResponseBuilder::new()
        .description(description)
        .content(super::refusal::PROBLEM_JSON, content)
        .build()
}
