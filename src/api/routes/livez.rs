//! Whether the process answers.

use super::super::tags::AROUND;
use axum::http::header::CACHE_CONTROL;
use axum::response::IntoResponse;

/// Tells that the process answers
///
/// For the supervisor of the process: it says nothing about the load.
#[utoipa::path(get, path = "/livez", operation_id = "getLivez", tag = AROUND,
    responses((status = 200, description = "The process answers.", body = String, content_type = "text/plain", example = "ok\n")))]
pub(crate) async fn livez() -> impl IntoResponse {
    ([(CACHE_CONTROL, "no-store")], "ok\n")
}
