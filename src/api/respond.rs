//! Answers as responses: small ones whole, large ones in chunks as they are written.

use super::accept::{Format, choose};
use super::cached::Cached;
use super::refusal::Refusal;
use axum::body::Body;
use axum::http::header::{CONTENT_TYPE, VARY};
use axum::http::{HeaderMap, HeaderValue};
use axum::response::Response;
use futures_util::stream;
use std::convert::Infallible;

/// Up to how many bytes an answer is sent whole, with its length.
pub const WHOLE_BYTES: usize = 128 * 1024;

/// A response with all of its body.
pub(super) fn whole(format: &Format, body: impl Into<Body>) -> Response {
    let mut response = Response::new(body.into());
    let headers = response.headers_mut();
    // Room for all that comes, so that the map does not grow step by step.
    headers.reserve(12);
    headers.insert(CONTENT_TYPE, HeaderValue::from_static(format.content_type));
    headers.insert(VARY, VARIES);
    response
}

/// A response that is compared with what the caller has, of a body that is made anyway.
///
/// # Errors
/// `not_acceptable` if the header Accept leaves no such format.
pub(crate) fn tagged(
    format: &'static Format,
    body: &[u8],
    headers: &HeaderMap,
) -> Result<Response, Refusal> {
    let format = choose(&[format], None, headers)?;
    let cached = Cached::of(&[body], false);
    Ok(cached.known(headers, format).unwrap_or_else(|| {
        let mut response = whole(format, body.to_vec());
        cached.mark(&mut response);
        response
    }))
}

/// A response whose body is made while it is sent; of less than [`WHOLE_BYTES`] it is made at once.
pub fn chunked(
    format: &Format,
    estimate: usize,
    chunks: impl Iterator<Item = Vec<u8>> + Send + 'static,
) -> Response {
    if estimate <= WHOLE_BYTES {
        let mut body = Vec::with_capacity(estimate);
        chunks.for_each(|chunk| body.extend_from_slice(&chunk));
        return whole(format, body);
    }
    whole(
        format,
        Body::from_stream(stream::iter(chunks.map(Ok::<_, Infallible>))),
    )
}

const VARIES: HeaderValue = HeaderValue::from_static("Accept, Accept-Encoding");
