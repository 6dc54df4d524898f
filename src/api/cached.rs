//! Entity tags: an answer that the caller has already is not computed again.

use super::accept::Format;
use super::respond::whole;
use axum::http::header::{CACHE_CONTROL, ETAG, IF_NONE_MATCH};
use axum::http::{HeaderMap, HeaderValue, StatusCode};
use axum::response::Response;

/// What a cache may do with an answer.
#[derive(Debug)]
pub(super) struct Cached {
    tag: String,
    control: &'static str,
}

impl Cached {
    /// For an answer that follows from the version of the service and `parts` alone.
    ///
    /// `lasting` says that it stays the same under its address as long as the version does; the
    /// default model may be another one tomorrow.
    pub(super) fn of(parts: &[&[u8]], lasting: bool) -> Cached {
        // A tag tells the representations of one address apart: 64 bits are enough (FNV-1a; Fowler,
        // Noll & Vo 1991, from memory).
        let parts =
            std::iter::once(env!("CARGO_PKG_VERSION").as_bytes()).chain(parts.iter().copied());
        let bytes = parts.flat_map(|part| part.iter().chain(&[0]));
        let hash = bytes.fold(0xcbf2_9ce4_8422_2325_u64, |hash, byte| {
            (hash ^ u64::from(*byte)).wrapping_mul(0x0100_0000_01b3)
        });
        let mut tag = String::with_capacity(20);
        tag.push_str("W/\"");
        push_hexadecimal(&mut tag, hash);
        tag.push('"');
        let control = if lasting {
            "public, max-age=3600"
        } else {
            "no-cache"
        };
        Cached { tag, control }
    }

    /// The answer 304 if the caller has this one.
    pub(super) fn known(&self, headers: &HeaderMap, format: &Format) -> Option<Response> {
        let mut tags = headers
            .get_all(IF_NONE_MATCH)
            .iter()
            .filter_map(|value| value.to_str().ok());
        let opaque =
            |tag: &str| tag.trim().trim_start_matches("W/") == self.tag.trim_start_matches("W/");
        let known = tags.any(|list| list.trim() == "*" || list.split(',').any(opaque));
        known.then(|| {
            let mut response = whole(format, "");
            *response.status_mut() = StatusCode::NOT_MODIFIED;
            response.headers_mut().remove("content-type");
            self.mark(&mut response);
            response
        })
    }

    /// Puts tag and lifetime on an answer.
    pub(super) fn mark(&self, response: &mut Response) {
        let headers = response.headers_mut();
        if let Ok(tag) = HeaderValue::try_from(self.tag.as_str()) {
            headers.insert(ETAG, tag);
        }
        headers.insert(CACHE_CONTROL, HeaderValue::from_static(self.control));
    }
}

/// Appends the 16 digits of a number.
pub(super) fn push_hexadecimal(text: &mut String, number: u64) {
    for shift in (0..16).rev() {
        let digit = (number >> (4 * shift)) & 15;
        text.extend(
            u32::try_from(digit)
                .ok()
                .and_then(|digit| char::from_digit(digit, 16)),
        );
    }
}
