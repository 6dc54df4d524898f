//! Reading a request's body: its type, its size, its coding and its time, in this order.

use super::State;
use super::refusal::Refusal;
use super::unpack::{Coding, too_large};
use crate::wire::{Code, Fault};
use axum::body::{Body, Bytes};
use axum::http::HeaderMap;
use axum::http::header::{CONTENT_ENCODING, CONTENT_LENGTH, CONTENT_TYPE};
use http_body_util::BodyExt;
use std::time::Duration;

/// The JSON body of a request, unpacked.
///
/// # Errors
/// Whatever can be said from the header alone is said before a byte of the body is read.
pub(super) async fn json(state: &State, headers: &HeaderMap, body: Body) -> Result<Bytes, Refusal> {
    check_type(headers)?;
    let coding = Coding::of(headers.get_all(CONTENT_ENCODING).iter())?;
    let limit = state.limits.body_bytes;
    let declared = headers
        .get(CONTENT_LENGTH)
        .and_then(|length| length.to_str().ok()?.parse::<usize>().ok());
    if declared.is_some_and(|declared| declared > limit) {
        return Err(too_large("the body", limit).into());
    }
    let seconds = state.limits.body_seconds;
    let packed = tokio::time::timeout(
        Duration::from_secs_f64(seconds),
        collect(body, declared.unwrap_or(0), limit),
    );
    let packed = packed.await.map_err(|_| {
        let detail = format!("the body was not complete after {seconds} s");
        Fault::new(Code::RequestTimeout, detail)
    })??;
    match coding {
        Coding::Identity => Ok(packed),
        packing => {
            let unpacked = state.prepared.run(move || packing.unpack(&packed, limit));
            Ok(unpacked.await.map_err(super::model::overloaded)??.into())
        }
    }
}

fn check_type(headers: &HeaderMap) -> Result<(), Fault> {
    let kind = headers
        .get(CONTENT_TYPE)
        .map(|kind| kind.to_str().unwrap_or(""));
    let essence = kind
        .and_then(|kind| kind.split(';').next())
        .unwrap_or("")
        .trim();
    if essence.eq_ignore_ascii_case("application/json") {
        return Ok(());
    }
    let detail = match kind {
        None => "the header Content-Type is missing; send application/json",
        Some(_) => "the body's Content-Type is not application/json",
    };
    Err(Fault::new(Code::UnsupportedMediaType, detail)
        .value(kind.unwrap_or(""))
        .allowed("application/json"))
}

/// What a body may reserve before it comes.
const RESERVED_BYTES: usize = 2 * 1024 * 1024;

async fn collect(mut body: Body, declared: usize, limit: usize) -> Result<Bytes, Fault> {
    let mut first = Bytes::new();
    let mut whole: Vec<u8> = Vec::new();
    while let Some(frame) = body.frame().await {
        let frame = frame.map_err(|_| Fault::new(Code::RequestTimeout, "the body ended early"))?;
        let Ok(data) = frame.into_data() else {
            continue;
        };
        if data.len() + first.len() + whole.len() > limit {
            return Err(too_large("the body", limit));
        }
        if first.is_empty() && whole.is_empty() {
            // Most bodies come in one piece and need no copy.
            first = data;
            continue;
        }
        if whole.is_empty() {
            whole.extend_from_slice(&first);
            first = Bytes::new();
        }
        let come = whole.len() + data.len();
        if come > whole.capacity() {
            // Room for what is declared, but little that has not come.
            let wanted = declared.min(RESERVED_BYTES.max(2 * come)).max(come);
            whole.reserve_exact(wanted - whole.len());
        }
        whole.extend_from_slice(&data);
    }
    Ok(if whole.is_empty() {
        first
    } else {
        whole.into()
    })
}
