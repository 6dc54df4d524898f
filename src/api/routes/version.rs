//! Which program this is, what it computes with, and how much it takes.

use super::super::State;
use super::super::accept::JSON;
use super::super::around::{HEADER_BYTES, URI_BYTES};
use super::super::refusal::Refusal;
use super::super::respond::tagged;
use super::super::tags::AROUND;
use crate::wire::Query;
use crate::wire::convert::MOST_VALUES;
use crate::wire::service::{Build, Constant, SERVICE, StatedLimits, VersionAnswer};
use axum::extract::{self, RawQuery};
use axum::http::HeaderMap;
use axum::response::Response;
use std::sync::Arc;

/// Tells the version, the constants and the limits
///
/// The same request gets the same bytes from the same version, on every machine.
#[utoipa::path(get, path = "/v1/version", operation_id = "getVersion", tag = AROUND,
    responses((status = 200, description = "The version.", body = VersionAnswer)))]
pub(crate) async fn version(
    extract::State(state): extract::State<Arc<State>>,
    RawQuery(query): RawQuery,
    headers: HeaderMap,
) -> Result<Response, Refusal> {
    Query::read(query.as_deref())?.finish(std::iter::empty())?;
    let limits = &state.limits;
    let answer = VersionAnswer {
        name: SERVICE.name,
        version: SERVICE.version,
        build: Build::this(),
        constants: Constant::all(),
        limits: StatedLimits {
            body_bytes: limits.body_bytes,
            values: limits.values,
            results: limits.results,
            query_values: MOST_VALUES,
            uri_bytes: URI_BYTES,
            header_bytes: HEADER_BYTES,
            body_seconds: limits.body_seconds,
        },
    };
    tagged(
        &JSON,
        &serde_json::to_vec(&answer).unwrap_or_default(),
        &headers,
    )
}
