//! The first page: a cheat sheet for terminals, a page for browsers.

use super::super::accept::{Format, TEXT, choose};
use super::super::document::AROUND;
use super::super::refusal::Refusal;
use super::super::respond::whole;
use crate::page;
use axum::http::header::{CONTENT_SECURITY_POLICY, HOST, LINK};
use axum::http::{HeaderMap, HeaderValue};
use axum::response::Response;

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
pub(crate) async fn home(headers: HeaderMap) -> Result<Response, Refusal> {
    let host = headers
        .get(HOST)
        .and_then(|host| host.to_str().ok())
        .unwrap_or("127.0.0.1:8080");
    // A browser names text/html; what accepts anything is a terminal.
    let format = choose(&[&TEXT, &HTML], None, &headers)?;
    let mut response = match format == &HTML {
        true => whole(format, page::browser(host)),
        false => whole(format, page::cheat_sheet(host)),
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
