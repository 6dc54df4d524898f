//! The document that describes the service.

use super::super::accept::JSON;
use super::super::cached::Cached;
use super::super::document::{AROUND, written};
use super::super::respond::whole;
use axum::http::HeaderMap;
use axum::response::Response;

/// Describes the service in OpenAPI 3.1
///
/// This document.
#[utoipa::path(get, path = "/openapi.json", operation_id = "getOpenApi", tag = AROUND,
    responses((status = 200, description = "The OpenAPI document.", body = Object)))]
pub(crate) async fn openapi(headers: HeaderMap) -> Response {
    let document = written();
    let cached = Cached::of(&["openapi", document], false);
    cached.known(&headers, &JSON).unwrap_or_else(|| {
        let mut response = whole(&JSON, document);
        cached.mark(&mut response);
        response
    })
}
