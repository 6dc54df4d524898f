//! The models that have names.

use super::super::State;
use super::super::accept::JSON;
use super::super::model::{entry, status};
use super::super::refusal::Refusal;
use super::super::respond::tagged;
use super::super::tags::MODELS;
use crate::wire::model::ModelsAnswer;
use crate::wire::{Code, Fault, Query};
use axum::extract::{self, RawQuery};
use axum::http::HeaderMap;
use axum::response::Response;
use std::sync::Arc;

/// Lists the models that have names
///
/// Those whose numbers were checked against their source, and the team's own; sets from memory only
/// with `?status=from_memory`. The default as shipped: `planck-2018-cmb-lensing`.
#[utoipa::path(get, path = "/v1/models", operation_id = "listModels", tag = MODELS,
    params(("status" = Option<String>, Query, description = "Only those of this status: confirmed, partly_confirmed, from_memory or operator.", pattern = "^(confirmed|partly_confirmed|from_memory|operator)$")),
    responses((status = 200, description = "The models.", body = ModelsAnswer)))]
pub(crate) async fn models(
    extract::State(state): extract::State<Arc<State>>,
    RawQuery(query): RawQuery,
    headers: HeaderMap,
) -> Result<Response, Refusal> {
    let mut query = Query::read(query.as_deref())?;
    let asked = query.take("status");
    query.finish(["status"].into_iter())?;
    if asked
        .as_deref()
        .is_some_and(|asked| !STATUSES.contains(&asked))
    {
        let fault = Fault::new(Code::OutOfRange, "there is no such status").parameter("status");
        return Err(fault
            .value(asked.unwrap_or_default())
            .allowed(STATUSES.join(", "))
            .into());
    }
    let wanted = |status: &str| {
        asked
            .as_deref()
            .map_or(status != "from_memory", |asked| asked == status)
    };
    let entries = state
        .models
        .iter()
        .filter(|entry| wanted(status(&entry.provenance)));
    let answer = ModelsAnswer {
        default: state.models.default_name(),
        models: entries.map(entry).collect(),
    };
    tagged(
        &JSON,
        &serde_json::to_vec(&answer).unwrap_or_default(),
        &headers,
    )
}

const STATUSES: [&str; 4] = ["confirmed", "partly_confirmed", "from_memory", "operator"];
