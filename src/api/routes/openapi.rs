//! The document that describes the service.

use super::super::accept::JSON;
use super::super::document::written;
use super::super::refusal::Refusal;
use super::super::respond::tagged;
use super::super::tags::AROUND;
use axum::http::HeaderMap;
use axum::response::Response;

/// Describes the service in OpenAPI 3.1
///
/// This document.
#[utoipa::path(get, path = "/openapi.json", operation_id = "getOpenApi", tag = AROUND,
    responses((status = 200, description = "The OpenAPI document.", body = Object)))]
pub(crate) async fn openapi(headers: HeaderMap) -> Result<Response, Refusal> {
    tagged(&JSON, written().as_bytes(), &headers)
}
