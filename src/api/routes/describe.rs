//! What follows from a model.

use super::super::accept::{JSON, choose};
use super::super::model::{Chosen, overloaded};
use super::super::refusal::Refusal;
use super::super::respond::whole;
use super::super::tags::MODELS;
use super::super::timing::Timing;
use super::super::{State, body, examples};
use crate::jobs::describe as job;
use crate::wire::Query;
use crate::wire::json::{self, Bounds};
use crate::wire::model::{DescribeAnswer, DescribeRequest};
use axum::body::Body;
use axum::extract::{self, RawQuery};
use axum::http::HeaderMap;
use axum::response::Response;
use std::sync::Arc;

/// Describes a model
///
/// Its densities, age, milestones, early epochs, horizons, beginning and end. Worked: in a model with
/// H0 = 70 km/s/Mpc and matter 1 the age today is (2/3)/H0 = 9.3123 Gyr.
#[utoipa::path(post, path = "/v1/models/describe", operation_id = "describeModel", tag = MODELS,
    request_body(content = DescribeRequest, description = "Which model.", examples(
        ("named" = (summary = "A model by its name", value = json!(examples::value(examples::NAMED_MODEL)))),
        ("declared" = (summary = "A declared model", value = json!(examples::value(examples::DECLARED_MODEL)))))),
    responses((status = 200, description = "What follows from it.", body = DescribeAnswer)))]
pub(crate) async fn describe(
    extract::State(state): extract::State<Arc<State>>,
    RawQuery(query): RawQuery,
    headers: HeaderMap,
    body: Body,
) -> Result<Response, Refusal> {
    let mut timing = Timing::start();
    let mut query = Query::read(query.as_deref())?;
    let format = choose(&[&JSON], query.take("format").as_deref(), &headers)?;
    query.finish(["format"].into_iter())?;
    let bytes = body::json(&state, &headers, body).await?;
    let request: DescribeRequest = json::read(&bytes, &Bounds::default())?;
    let model = Chosen::of(&state, request.model)?;
    timing.end("read");
    let (history, printed) = (model.history(&state).await?, model.printed);
    timing.end("model");
    let described = state
        .prepared
        .run(move || job(&history, printed))
        .await
        .map_err(overloaded)?;
    timing.end("compute");
    let answer = DescribeAnswer::of(model.echo(), described);
    let mut response = whole(format, serde_json::to_vec(&answer).unwrap_or_default());
    timing.tell(response.headers_mut());
    Ok(response)
}
