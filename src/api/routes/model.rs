//! One model that has a name.

use super::super::State;
use super::super::accept::JSON;
use super::super::model::{entry, no_such_model};
use super::super::refusal::Refusal;
use super::super::respond::tagged;
use super::super::tags::MODELS;
use crate::wire::model::ModelEntry;
use crate::wire::{Code, Query};
use axum::extract::{self, Path, RawQuery};
use axum::http::HeaderMap;
use axum::response::Response;
use std::sync::Arc;

/// Shows a model that has a name
///
/// Its closed numbers, where they come from, and the errors that are published of them. For example
/// `planck-2018-cmb-lensing`: H0 = 67.36 ± 0.54 km/s/Mpc, matter 0.3153 ± 0.0073.
#[utoipa::path(get, path = "/v1/models/{name}", operation_id = "getModel", tag = MODELS,
    params(("name" = String, Path, description = "The name of a model.", example = "planck-2018-cmb-lensing", pattern = "^[a-z0-9][a-z0-9-]{0,63}$")),
    responses((status = 200, description = "The model.", body = ModelEntry)))]
pub(crate) async fn model(
    extract::State(state): extract::State<Arc<State>>,
    Path(name): Path<String>,
    RawQuery(query): RawQuery,
    headers: HeaderMap,
) -> Result<Response, Refusal> {
    Query::read(query.as_deref())?.finish(std::iter::empty())?;
    let Some(found) = state.models.get(&name) else {
        let fault = no_such_model(&state, Code::ModelNotFound, &name);
        return Err(fault.parameter("name").into());
    };
    tagged(
        &JSON,
        &serde_json::to_vec(&entry(found)).unwrap_or_default(),
        &headers,
    )
}
