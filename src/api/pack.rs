//! Packing of large JSON answers, as the caller accepts it.

use super::accept::JSON;
use axum::body::{Body, HttpBody};
use axum::extract::Request;
use axum::http::HeaderValue;
use axum::http::header::{ACCEPT_ENCODING, CONTENT_ENCODING, CONTENT_TYPE};
use axum::response::Response;
use std::convert::Infallible;
use std::future::ready;
use tower::{Layer, ServiceExt, service_fn};
use tower_http::CompressionLevel;
use tower_http::compression::CompressionLayer;

/// The answer packed by the coding that `accepted` prefers, if it is worth it.
///
/// The layer of the framework stands here and not around the routes: small answers do not pay for it.
pub(super) async fn packed(response: Response, accepted: Option<HeaderValue>) -> Response {
    let Some(accepted) = accepted.filter(|_| is_worth_it(&response)) else {
        return response;
    };
    let mut request = Request::new(Body::empty());
    request.headers_mut().insert(ACCEPT_ENCODING, accepted);
    let mut response = Some(response);
    let answer = service_fn(move |_: Request| {
        ready(Ok::<_, Infallible>(response.take().unwrap_or_default()))
    });
    let layer = CompressionLayer::new().quality(CompressionLevel::Fastest);
    match layer.layer(answer).oneshot(request).await {
        Ok(packed) => packed.map(Body::new),
        Err(never) => match never {},
    }
}

/// Smaller answers would cost more to pack than to send.
const PACKED_FROM_BYTES: u64 = 10_000;

fn is_worth_it(response: &Response) -> bool {
    let headers = response.headers();
    let is_json = headers
        .get(CONTENT_TYPE)
        .is_some_and(|kind| kind == JSON.content_type);
    let bytes = response.body().size_hint().exact();
    is_json
        && bytes.is_none_or(|bytes| bytes >= PACKED_FROM_BYTES)
        && !headers.contains_key(CONTENT_ENCODING)
}
