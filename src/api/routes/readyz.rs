//! Whether new requests should come here.

use super::super::State;
use super::super::refusal::Refusal;
use super::super::tags::AROUND;
use crate::wire::{Code, Fault};
use axum::extract;
use axum::http::header::CACHE_CONTROL;
use axum::response::IntoResponse;
use std::sync::Arc;
use std::sync::atomic::Ordering;

/// Tells whether new requests should come here
///
/// For the balancer: 503 with the code `draining` as soon as the instance is about to stop.
#[utoipa::path(get, path = "/readyz", operation_id = "getReadyz", tag = AROUND,
    responses((status = 200, description = "Requests are welcome.", body = String, content_type = "text/plain", example = "ok\n")))]
pub(crate) async fn readyz(
    extract::State(state): extract::State<Arc<State>>,
) -> Result<impl IntoResponse, Refusal> {
    if state.ready.load(Ordering::Relaxed) {
        return Ok(([(CACHE_CONTROL, "no-store")], "ok\n"));
    }
    let detail = "this instance is about to stop; send new requests to another one";
    Err(Fault::new(Code::Draining, detail).into())
}
