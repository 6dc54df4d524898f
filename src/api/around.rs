//! The one layer of our own around every route: size of the head, identity, faults, timing.

use super::cached::push_hexadecimal;
use super::pack::packed;
use super::refusal::{Refusal, explained};
use super::timing::{SERVER_TIMING, Timing};
use crate::wire::{Code, Fault};
use axum::extract::Request;
use axum::http::header::ACCEPT_ENCODING;
use axum::http::{HeaderMap, HeaderName, HeaderValue};
use axum::middleware::Next;
use axum::response::{IntoResponse, Response};
use futures_util::FutureExt;
use std::hash::{BuildHasher, RandomState};
use std::panic::AssertUnwindSafe;
use std::sync::LazyLock;
use std::sync::atomic::{AtomicU64, Ordering};

/// The longest path and query in bytes.
pub const URI_BYTES: usize = 8192;
/// The largest sum of the header fields in bytes.
pub const HEADER_BYTES: usize = 16 * 1024;

/// Answers `request` by the routes inside; whatever happens there, the answer is well formed.
pub(super) async fn around(request: Request, next: Next) -> Response {
    let timing = Timing::start();
    let id = request_id(request.headers());
    let trace = request
        .headers()
        .get(TRACEPARENT)
        .filter(|value| is_traceparent(value.as_bytes()))
        .cloned();
    let accepted = request.headers().get(ACCEPT_ENCODING).cloned();
    let answer = match head_fault(&request) {
        Some(fault) => Refusal::from(fault).into_response(),
        None => match AssertUnwindSafe(next.run(request)).catch_unwind().await {
            Ok(response) => explained(packed(response, accepted).await),
            Err(_) => {
                tracing::error!(request_id = ?id, "a request met a panic");
                let detail = "the service met a fault of its own; it was recorded";
                Refusal::from(Fault::new(Code::InternalError, detail)).into_response()
            }
        },
    };
    finished(answer, timing, id, trace)
}

fn finished(
    mut response: Response,
    mut timing: Timing,
    id: HeaderValue,
    trace: Option<HeaderValue>,
) -> Response {
    let headers = response.headers_mut();
    headers.insert(REQUEST_ID, id);
    if let Some(trace) = trace {
        headers.insert(TRACEPARENT, trace);
    }
    if !headers.contains_key(SERVER_TIMING) {
        timing.end("total");
        timing.tell(headers);
    }
    response
}

const REQUEST_ID: HeaderName = HeaderName::from_static("x-request-id");
const TRACEPARENT: HeaderName = HeaderName::from_static("traceparent");

fn head_fault(request: &Request) -> Option<Fault> {
    let uri = request
        .uri()
        .path_and_query()
        .map_or(0, |uri| uri.as_str().len());
    if uri > URI_BYTES {
        let detail = format!(
            "path and query have {uri} bytes, the limit is {URI_BYTES}; send longer lists by POST"
        );
        return Some(Fault::new(Code::UriTooLong, detail));
    }
    let fields = request.headers().iter();
    let header: usize = fields
        .map(|(name, value)| name.as_str().len() + value.len() + 4)
        .sum();
    (header > HEADER_BYTES).then(|| {
        let detail = format!("the header fields have {header} bytes, the limit is {HEADER_BYTES}");
        Fault::new(Code::HeadersTooLarge, detail)
    })
}

/// The caller's id if it is fit to be logged, else one of our own.
fn request_id(headers: &HeaderMap) -> HeaderValue {
    static NEXT: AtomicU64 = AtomicU64::new(0);
    static SEED: LazyLock<RandomState> = LazyLock::new(RandomState::new);
    let fit = |id: &&HeaderValue| {
        let plain = |byte: &u8| byte.is_ascii_alphanumeric() || b"-_.:/+=".contains(byte);
        (1..=128).contains(&id.len()) && id.as_bytes().iter().all(plain)
    };
    headers
        .get(REQUEST_ID)
        .filter(fit)
        .cloned()
        .unwrap_or_else(|| {
            let number = SEED.hash_one(NEXT.fetch_add(1, Ordering::Relaxed));
            let mut id = String::with_capacity(16);
            push_hexadecimal(&mut id, number);
            HeaderValue::try_from(id).unwrap_or(HeaderValue::from_static("-"))
        })
}

/// Whether this is version 00 of W3C Trace Context: `00-<32 hex>-<16 hex>-<2 hex>`, neither id zero.
fn is_traceparent(value: &[u8]) -> bool {
    let hex = |part: &[u8]| {
        part.iter()
            .all(|byte| matches!(byte, b'0'..=b'9' | b'a'..=b'f'))
    };
    let parts: Vec<&[u8]> = value.split(|byte| *byte == b'-').collect();
    let [version, trace, parent, flags] = parts.as_slice() else {
        return false;
    };
    *version == b"00"
        && (trace.len(), parent.len(), flags.len()) == (32, 16, 2)
        && [trace, parent, flags].iter().all(|part| hex(part))
        && [trace, parent]
            .iter()
            .all(|part| part.iter().any(|byte| *byte != b'0'))
}
