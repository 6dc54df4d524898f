//! The first page: a cheat sheet for terminals, a page for browsers.

use super::super::State;
use super::super::accept::{Format, TEXT, choose};
use super::super::refusal::Refusal;
use super::super::respond::whole;
use super::super::tags::AROUND;
use crate::page;
use axum::extract;
use axum::http::header::{CONTENT_SECURITY_POLICY, HOST, LINK};
use axum::http::{HeaderMap, HeaderValue};
use axum::response::Response;
use std::sync::Arc;

static HTML: Format = Format {
    name: "html",
    media_type: "text/html",
    content_type: "text/html; charset=utf-8",
};

/// Shows how to use the service
///
/// One screen of commands that work as printed for a terminal, a page for a browser.
#[utoipa::path(get, path = "/", operation_id = "getHome", tag = AROUND,
    responses((status = 200, description = "How to use the service.", content(
        (String = "text/plain"), (String = "text/html")))))]
pub(crate) async fn home(
    extract::State(state): extract::State<Arc<State>>,
    headers: HeaderMap,
) -> Result<Response, Refusal> {
    let host = headers
        .get(HOST)
        .and_then(|host| host.to_str().ok())
        .unwrap_or_default();
    let port = state.port.get().copied().unwrap_or(USUAL_PORT);
    // A browser names text/html; what accepts anything is a terminal.
    let format = choose(&[&TEXT, &HTML], None, &headers)?;
    let mut response = match format == &HTML {
        true => whole(format, page::browser(host, port)),
        false => whole(format, page::cheat_sheet(host, port)),
    };
    let headers = response.headers_mut();
    headers.insert(
        CONTENT_SECURITY_POLICY,
        HeaderValue::from_static(page::CONTENT_SECURITY_POLICY),
    );
    let links = "</openapi.json>; rel=\"service-desc\", </docs/>; rel=\"service-doc\"";
    headers.insert(LINK, HeaderValue::from_static(links));
    Ok(response)
}

/// Where the service listens unless it is told otherwise.
const USUAL_PORT: u16 = 8080;
