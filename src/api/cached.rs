//! Entity tags: an answer that the caller has already is not computed again.

use super::accept::Format;
use super::respond::whole;
use axum::http::header::{CACHE_CONTROL, ETAG, IF_NONE_MATCH};
use axum::http::{HeaderMap, HeaderValue, StatusCode};
use axum::response::Response;
use sha2::{Digest, Sha256};

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
        let mut hash = Sha256::new();
        for part in [&[env!("CARGO_PKG_VERSION").as_bytes()], parts].concat() {
            hash.update(part);
            hash.update([0]);
        }
        let mut tag = String::from("W/\"");
        for byte in hash.finalize().iter().take(TAG_BYTES) {
            tag.push_str(&format!("{byte:02x}"));
        }
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
        if let Ok(tag) = HeaderValue::from_str(&self.tag) {
            headers.insert(ETAG, tag);
        }
        headers.insert(CACHE_CONTROL, HeaderValue::from_static(self.control));
    }
}

const TAG_BYTES: usize = 8;
