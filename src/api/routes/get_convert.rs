//! Conversions in a query: for the shell, and for caches.

use super::super::accept::choose;
use super::super::cached::Cached;
use super::super::conversion::{FORMATS, answer};
use super::super::model::Chosen;
use super::super::refusal::Refusal;
use super::super::tags::CONVERT;
use super::super::timing::Timing;
use super::super::{State, examples};
use crate::wire::convert::schema::ConvertAnswer;
use crate::wire::convert::{ConvertQuery, ConvertRequest, as_parameter};
use crate::wire::{Fault, Query};
use axum::extract::{self, RawQuery};
use axum::http::HeaderMap;
use axum::response::Response;
use std::sync::Arc;

/// Converts a few values
///
/// The bytes that POST answers, for up to 1000 values in the query; an answer has an entity tag. Given
/// values per h, and a sound horizon other than the model's own, can be written in POST only.
/// Worked: `?redshift=3&to=age&hubble_constant=70&matter=1` gives (2/3)/H0/8 = 1.1641 Gyr.
#[utoipa::path(get, path = "/v1/convert", operation_id = "getConvert", tag = CONVERT,
    params(ConvertQuery),
    responses((status = 200, description = "The columns.", content(
        (ConvertAnswer = "application/json", example = json!(examples::answer())), (String = "text/plain"), (String = "text/csv")), headers(
        ("redfathom-model" = String, description = "The fingerprint of the model; of text and csv only, JSON has it inside."),
        ("redfathom-version" = String, description = "The version of the service; of text and csv only.")))))]
pub(crate) async fn get_convert(
    extract::State(state): extract::State<Arc<State>>,
    RawQuery(query): RawQuery,
    headers: HeaderMap,
) -> Result<Response, Refusal> {
    let mut timing = Timing::start();
    let mut query = Query::read(query.as_deref())?;
    let canonical = query.canonical();
    let format = choose(&FORMATS, query.take("format").as_deref(), &headers)?;
    let request = ConvertRequest::of_query(query)?;
    let given = request.from.quantity.clone();
    let refused = |faults: Vec<Fault>| {
        faults
            .into_iter()
            .map(|fault| as_parameter(fault, &given))
            .collect::<Vec<_>>()
    };
    let lasting = request.model.is_some();
    let mut asked = request.resolve(state.limits.size()).map_err(refused)?;
    let model = Chosen::of(&state, asked.model.take()).map_err(refused)?;
    let parts = ["convert", &canonical, &model.fingerprint, format.name];
    let cached = Cached::of(&parts.map(str::as_bytes), lasting);
    if let Some(known) = cached.known(&headers, format) {
        return Ok(known);
    }
    timing.end("read");
    let mut response = answer(&state, asked, &model, format, timing)
        .await
        .map_err(|fault| refused(vec![fault]))?;
    cached.mark(&mut response);
    Ok(response)
}
