//! The catalogue of quantities.

use super::super::accept::JSON;
use super::super::refusal::Refusal;
use super::super::respond::tagged;
use super::super::tags::CONVERT;
use crate::wire::Query;
use crate::wire::quantities::QuantitiesAnswer;
use axum::extract::RawQuery;
use axum::http::HeaderMap;
use axum::response::Response;
use std::sync::LazyLock;

static BODY: LazyLock<Vec<u8>> =
    LazyLock::new(|| serde_json::to_vec(&QuantitiesAnswer::all()).unwrap_or_default());

/// Lists the quantities
///
/// Symbol, unit, UCD, domain, promised accuracy and formula of each, and whether a redshift follows
/// from it. For example `age`: unit Gyr, invertible, relative error at most 2e-15.
#[utoipa::path(get, path = "/v1/quantities", operation_id = "listQuantities", tag = CONVERT,
    responses((status = 200, description = "The quantities.", body = QuantitiesAnswer)))]
pub(crate) async fn quantities(
    RawQuery(query): RawQuery,
    headers: HeaderMap,
) -> Result<Response, Refusal> {
    Query::read(query.as_deref())?.finish(std::iter::empty())?;
    tagged(&JSON, BODY.as_slice(), &headers)
}
