//! Conversions with a body.

use super::super::accept::choose;
use super::super::conversion::{FORMATS, answer, read};
use super::super::model::Chosen;
use super::super::refusal::Refusal;
use super::super::tags::CONVERT;
use super::super::timing::Timing;
use super::super::{State, body, examples};
use crate::wire::Query;
use crate::wire::convert::schema::ConvertAnswer;
use crate::wire::convert::{ConvertRequest, FormatQuery};
use axum::body::Body;
use axum::extract::{self, RawQuery};
use axum::http::HeaderMap;
use axum::response::Response;
use std::sync::Arc;

/// Converts a column of values
///
/// Takes the values of one quantity and gives those of others, row for row: redshifts to times and
/// distances, an age or a distance to redshifts, one distance to another. Worked: in a model with
/// H0 = 70 km/s/Mpc and matter 1, redshift 3 is at the age (2/3)/H0/8 = 1.1641 Gyr.
#[utoipa::path(post, path = "/v1/convert", operation_id = "convert", tag = CONVERT,
    params(FormatQuery),
    request_body(content = ConvertRequest, description = "What to convert.", examples(
        ("catalogue" = (summary = "Redshifts of the Larkfield Deep Survey", value = json!(examples::value(examples::CATALOGUE)))),
        ("epoch" = (summary = "When was the universe 3 Gyr old?", value = json!(examples::value(examples::EPOCH)))),
        ("declared" = (summary = "A declared model, other units", value = json!(examples::value(examples::DECLARED)))),
        ("branches" = (summary = "Both redshifts of an angular-diameter distance", value = json!(examples::value(examples::BRANCHES)))))),
    responses((status = 200, description = "The columns.", content(
        (ConvertAnswer = "application/json", example = json!(examples::answer())), (String = "text/plain"), (String = "text/csv")), headers(
        ("redfathom-model" = String, description = "The fingerprint of the model; of text and csv only, JSON has it inside."),
        ("redfathom-version" = String, description = "The version of the service; of text and csv only.")))))]
pub(crate) async fn convert(
    extract::State(state): extract::State<Arc<State>>,
    RawQuery(query): RawQuery,
    headers: HeaderMap,
    body: Body,
) -> Result<Response, Refusal> {
    let mut timing = Timing::start();
    let mut query = Query::read(query.as_deref())?;
    let format = choose(&FORMATS, query.take("format").as_deref(), &headers)?;
    query.finish(["format"].into_iter())?;
    let bytes = body::json(&state, &headers, body).await?;
    let mut asked = read(&state, bytes).await?;
    timing.end("read");
    let model = Chosen::of(&state, asked.model.take())?;
    Ok(answer(&state, asked, &model, format, timing).await?)
}
