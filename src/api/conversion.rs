//! A conversion from the request understood to the answer written.

use super::State;
use super::accept::{CSV, Format, JSON, TEXT};
use super::model::{Chosen, overloaded};
use super::refusal::Refusal;
use super::respond::{WHOLE_BYTES, chunked, whole};
use super::timing::Timing;
use crate::expansion::History;
use crate::jobs::{Converted, PrintedEpochs, convert};
use crate::tables::{Given, Table, csv, text};
use crate::wire::Fault;
use crate::wire::convert::{Asked, ConvertRequest, convert_fault, written};
use crate::wire::json::{self, Bounds};
use crate::wire::service::SERVICE;
use axum::body::Bytes;
use axum::http::header::LINK;
use axum::http::{HeaderName, HeaderValue};
use axum::response::Response;
use std::sync::Arc;

/// The formats of a conversion, the first one for those who don't ask.
pub(super) static FORMATS: [&Format; 3] = [&JSON, &TEXT, &CSV];

/// Reads the body of a conversion.
///
/// # Errors
/// What is wrong with it, whatever the model.
pub(super) async fn read(state: &State, body: Bytes) -> Result<Asked, Refusal> {
    let size = state.limits.size();
    let bounds = Bounds {
        elements: size.values,
        ..Bounds::default()
    };
    let small = body.len() <= INLINE_BYTES;
    let read = move || -> Result<Asked, Vec<Fault>> {
        let request: ConvertRequest = json::read(&body, &bounds).map_err(|fault| vec![fault])?;
        request.resolve(size)
    };
    if small {
        return Ok(read()?);
    }
    Ok(state.prepared.run(read).await.map_err(overloaded)??)
}

/// Up to how many bytes a body is read on the thread of its connection.
const INLINE_BYTES: usize = 64 * 1024;

/// Converts and writes the answer.
///
/// # Errors
/// What is wrong with the request in this model.
pub(super) async fn answer(
    state: &State,
    asked: Asked,
    model: &Chosen<'_>,
    format: &'static Format,
    mut timing: Timing,
) -> Result<Response, Fault> {
    let history = model.history(state).await?;
    timing.end("model");
    let printed = model.printed;
    let (given, converted) = if asked.work() <= INLINE_WORK {
        run(asked, &history, printed)?
    } else {
        let job = state.prepared.run(move || run(asked, &history, printed));
        job.await.map_err(overloaded)??
    };
    timing.end("compute");
    let mut response = respond(state, model, given, converted, format);
    timing.tell(response.headers_mut());
    Ok(response)
}

/// Up to how many results a conversion does not leave the thread that reads its connection.
const INLINE_WORK: usize = 4096;

fn run(
    asked: Asked,
    history: &Arc<History>,
    printed: PrintedEpochs,
) -> Result<(Given, Converted), Fault> {
    let converted =
        convert(&asked.conversion(history, printed)?).map_err(|fault| convert_fault(&fault))?;
    Ok((asked.from, converted))
}

fn respond(
    state: &State,
    model: &Chosen<'_>,
    given: Given,
    converted: Converted,
    format: &'static Format,
) -> Response {
    if format == &JSON {
        let written = written(&model.written(state), &given, converted);
        let estimate = written.estimate();
        if estimate <= WHOLE_BYTES {
            return whole(format, written.whole());
        }
        return chunked(format, estimate, written.chunks());
    }
    let table = Table::of(given, converted);
    let estimate = table.estimate();
    let mut response = if format == &CSV {
        chunked(format, estimate, csv::chunks(table))
    } else {
        let footer = format!(
            "{}, {} {}; {} digits here, all of them in csv and json",
            model.label(),
            SERVICE.name,
            SERVICE.version,
            text::DIGITS
        );
        chunked(format, estimate, text::chunks(table, footer))
    };
    let headers = response.headers_mut();
    if let Ok(fingerprint) = HeaderValue::from_str(&model.fingerprint) {
        headers.insert(MODEL, fingerprint);
    }
    headers.insert(VERSION, HeaderValue::from_static(SERVICE.version));
    headers.insert(
        LINK,
        HeaderValue::from_static("</v1/quantities>; rel=\"describedby\""),
    );
    response
}

const MODEL: HeaderName = HeaderName::from_static("redfathom-model");
const VERSION: HeaderName = HeaderName::from_static("redfathom-version");
