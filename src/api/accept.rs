//! Which format an answer has: `format=` first, else the header Accept.

use crate::wire::{Code, Fault};
use axum::http::HeaderMap;
use axum::http::header::ACCEPT;

/// A format that answers can have.
#[derive(Debug, PartialEq, Eq)]
pub struct Format {
    /// As `format=` spells it.
    pub name: &'static str,
    /// Its media type, without parameters.
    pub media_type: &'static str,
    /// The value of Content-Type.
    pub content_type: &'static str,
}

/// JSON, what anyone gets who does not ask.
pub(super) static JSON: Format = Format {
    name: "json",
    media_type: "application/json",
    content_type: "application/json",
};
/// Aligned lines for a terminal.
pub(super) static TEXT: Format = Format {
    name: "text",
    media_type: "text/plain",
    content_type: "text/plain; charset=utf-8",
};
/// A table with one header line.
pub(super) static CSV: Format = Format {
    name: "csv",
    media_type: "text/csv",
    content_type: "text/csv; charset=utf-8; header=present",
};

/// The format wanted among those `offered`, the first of them where nothing is said.
///
/// # Errors
/// `not_acceptable` if none is left.
pub(super) fn choose(
    offered: &[&'static Format],
    asked: Option<&str>,
    headers: &HeaderMap,
) -> Result<&'static Format, Fault> {
    if let Some(asked) = asked {
        let found = offered.iter().find(|format| format.name == asked);
        return found.copied().ok_or_else(|| {
            let names: Vec<_> = offered.iter().map(|format| format.name).collect();
            Fault::new(Code::NotAcceptable, "this route has no such format")
                .parameter("format")
                .value(asked)
                .allowed(names.join(", "))
        });
    }
    if !headers.contains_key(ACCEPT) {
        return offered
            .first()
            .copied()
            .ok_or_else(|| refused(offered, "no format"));
    }
    let ranges: Vec<(&str, f64)> = headers
        .get_all(ACCEPT)
        .iter()
        .filter_map(|value| value.to_str().ok())
        .flat_map(|value| value.split(','))
        .map(range)
        .collect();
    let mut best: Option<(&'static Format, f64)> = None;
    for format in offered {
        let quality = quality(format.media_type, &ranges);
        // Of equals the first one offered wins.
        if quality > best.map_or(0.0, |(_, quality)| quality) {
            best = Some((format, quality));
        }
    }
    best.map(|(format, _)| format).ok_or_else(|| {
        refused(
            offered,
            "the header Accept leaves none of the formats of this route",
        )
    })
}

/// A header has no place among the listed faults, so the sentence lists what there is.
fn refused(offered: &[&'static Format], detail: &str) -> Fault {
    let names: Vec<_> = offered.iter().map(|format| format.media_type).collect();
    Fault::new(
        Code::NotAcceptable,
        format!("{detail}: {}", names.join(", ")),
    )
}

/// A media range and its quality.
fn range(text: &str) -> (&str, f64) {
    let mut parts = text.split(';').map(str::trim);
    let media = parts.next().unwrap_or("");
    let quality = parts.find_map(|part| part.strip_prefix("q=").or(part.strip_prefix("Q=")));
    (
        media,
        quality
            .and_then(|quality| quality.parse().ok())
            .unwrap_or(1.0),
    )
}

/// The quality of a media type: the most specific range that covers it decides (RFC 9110, 12.5.1).
fn quality(media_type: &str, ranges: &[(&str, f64)]) -> f64 {
    let group = media_type.split('/').next().unwrap_or("");
    let specificity = |media: &str| match media.split_once('/') {
        _ if media.eq_ignore_ascii_case(media_type) => 3,
        Some((kind, "*")) if kind.eq_ignore_ascii_case(group) => 2,
        Some(("*", "*")) => 1,
        _ => 0,
    };
    let covering = ranges
        .iter()
        .map(|(media, quality)| (specificity(media), *quality));
    let best = covering
        .filter(|(specificity, _)| *specificity > 0)
        .max_by_key(|(specificity, _)| *specificity);
    best.map_or(0.0, |(_, quality)| quality)
}

#[cfg(test)]
#[allow(clippy::unwrap_used)]
mod tests {
    use super::*;

    fn chosen(accept: &str) -> Option<&'static str> {
        let mut headers = HeaderMap::new();
        headers.insert(ACCEPT, accept.parse().unwrap());
        choose(&[&JSON, &TEXT, &CSV], None, &headers)
            .ok()
            .map(|format| format.name)
    }

    #[test]
    fn the_most_wanted_format_wins() {
        for (accept, name) in [
            ("*/*", Some("json")),
            ("text/csv", Some("csv")),
            ("text/*", Some("text")),
            ("text/plain;q=0.5, text/csv", Some("csv")),
            ("text/html, application/xhtml+xml, */*;q=0.8", Some("json")),
            ("application/json;q=0, */*", Some("text")),
            ("image/png", None),
            ("", None),
        ] {
            assert_eq!(chosen(accept), name, "{accept}");
        }
    }
}
