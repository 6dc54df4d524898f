//! What stands around the routes: tags, methods, codings, identities, timing.

use super::client::{ask, get, get_with, raw, shared};
use std::io::{Read, Write};

const TARGET: &str = "/v1/convert?redshift=0.5,1.2&to=age&model=planck-2018-cmb-lensing";

#[test]
fn an_answer_that_is_known_is_not_sent_again() {
    let answer = get(TARGET);
    let tag = answer.header("etag").unwrap();
    assert!(tag.starts_with("W/\""), "{tag}");
    assert_eq!(answer.header("cache-control"), Some("public, max-age=3600"));
    for known in [
        tag,
        tag.trim_start_matches("W/"),
        "*",
        &format!("\"other\", {tag}"),
    ] {
        let again = get_with(TARGET, &[("if-none-match", known)]);
        assert_eq!(again.status, 304, "{known}");
        assert!(again.body.is_empty());
        assert_eq!(again.header("etag"), Some(tag));
        assert!(again.header("vary").is_some() && again.header("cache-control").is_some());
        assert!(!again.header("server-timing").unwrap().contains("compute"));
    }
    // The order of the parameters does not matter, all else does.
    let same = get("/v1/convert?to=age&model=planck-2018-cmb-lensing&redshift=0.5%2C1.2");
    assert_eq!(same.header("etag"), Some(tag));
    for other in ["&future=true", "&format=csv"] {
        assert_ne!(
            get(&format!("{TARGET}{other}")).header("etag"),
            Some(tag),
            "{other}"
        );
    }
    let default = get("/v1/convert?redshift=0.5,1.2&to=age");
    assert_eq!(default.header("cache-control"), Some("no-cache"));
    assert_ne!(default.header("etag"), Some(tag));
    for target in [
        "/openapi.json",
        "/v1/quantities",
        "/v1/models",
        "/v1/version",
    ] {
        let tag = get(target).header("etag").unwrap().to_owned();
        assert_eq!(
            get_with(target, &[("if-none-match", &tag)]).status,
            304,
            "{target}"
        );
    }
}

#[test]
fn head_is_get_without_its_body() {
    for target in [TARGET, "/", "/v1/models", "/livez", "/openapi.json"] {
        let got = get(target);
        let head = ask(shared(), "HEAD", target, &[], None);
        assert_eq!(head.status, 200, "{target}");
        assert!(head.body.is_empty());
        assert_eq!(head.header("content-length"), got.header("content-length"));
        assert_eq!(head.header("etag"), got.header("etag"));
        assert_eq!(head.header("content-type"), got.header("content-type"));
    }
}

#[test]
fn other_methods_are_told_which_there_are() {
    for (method, target, allowed) in [
        ("PUT", "/v1/convert", ["GET", "POST"].as_slice()),
        ("GET", "/v1/models/describe", &["POST"]),
        ("POST", "/v1/models", &["GET", "HEAD"]),
        ("OPTIONS", "/livez", &["GET"]),
        ("PATCH", "/problems/not_found", &["GET"]),
    ] {
        let answer = ask(shared(), method, target, &[], None);
        assert_eq!(answer.status, 405, "{method} {target}");
        let allow = answer.header("allow").unwrap();
        for method in allowed {
            assert!(allow.contains(method), "{target}: {allow}");
        }
        assert_eq!(answer.json()["code"], "method_not_allowed");
    }
}

#[test]
fn the_wanted_format_is_given_or_refused() {
    for (accept, kind) in [
        ("text/csv", "text/csv; charset=utf-8; header=present"),
        ("*/*", "application/json"),
        ("text/html, */*;q=0.1", "application/json"),
        ("text/plain", "text/plain; charset=utf-8"),
    ] {
        let answer = get_with(TARGET, &[("accept", accept)]);
        assert_eq!(answer.header("content-type"), Some(kind), "{accept}");
        assert_eq!(answer.header("vary"), Some("Accept, Accept-Encoding"));
    }
    let refused = get_with(TARGET, &[("accept", "image/png")]);
    assert_eq!(refused.status, 406);
    assert_eq!(refused.json()["code"], "not_acceptable");
    // What the query asks for goes first.
    let asked = get_with(
        &format!("{TARGET}&format=csv"),
        &[("accept", "application/json")],
    );
    assert_eq!(
        asked.header("content-type"),
        Some("text/csv; charset=utf-8; header=present")
    );
}

#[test]
fn packed_bodies_are_read_and_their_size_is_bounded() {
    let body = br#"{"from": {"quantity": "redshift", "values": [0.5, 1.2]}, "to": ["age"]}"#;
    let plain = send(body, None);
    assert_eq!(plain.status, 200);
    let (first, second) = body.split_at(20);
    // Both members of a gzip body count.
    let gzip = [packed(first), packed(second)].concat();
    for (coding, packed) in [
        ("gzip", gzip),
        ("br", brotli(body)),
        ("zstd", zstd::encode_all(&body[..], 3).unwrap()),
    ] {
        let answer = send(&packed, Some(coding));
        assert_eq!(answer.body, plain.body, "{coding}");
        let cut = send(&packed[..packed.len() - 5], Some(coding));
        assert_eq!(cut.json()["code"], "unsupported_encoding", "{coding}");
    }
    let spaces = vec![b' '; 33_554_433];
    let bomb = zstd::encode_all(&spaces[..], 3).unwrap();
    assert!(bomb.len() < 100_000);
    assert_eq!(send(&bomb, Some("zstd")).json()["code"], "body_too_large");
    assert_eq!(
        send(body, Some("gzip, br")).json()["code"],
        "unsupported_encoding"
    );
}

fn send(body: &[u8], coding: Option<&str>) -> super::client::Answer {
    let mut headers = vec![("content-type", "application/json")];
    headers.extend(coding.map(|coding| ("content-encoding", coding)));
    ask(shared(), "POST", "/v1/convert", &headers, Some(body))
}

fn packed(bytes: &[u8]) -> Vec<u8> {
    let mut encoder = flate2::write::GzEncoder::new(Vec::new(), flate2::Compression::default());
    encoder.write_all(bytes).unwrap();
    encoder.finish().unwrap()
}

/// A Brotli stream of one uncompressed block (RFC 7932, section 9.2), of at most 64 KiB.
fn brotli(bytes: &[u8]) -> Vec<u8> {
    // WBITS = 16: one bit 0. Then ISLAST = 0, MNIBBLES = 4: 00, MLEN - 1: 16 bits, ISUNCOMPRESSED = 1.
    let length = u32::try_from(bytes.len() - 1).unwrap();
    let header = (length << 4) | (1 << 20);
    let mut out = header.to_le_bytes()[..3].to_vec();
    out.extend_from_slice(bytes);
    // ISLAST = 1, ISLASTEMPTY = 1.
    out.push(3);
    out
}

#[test]
fn large_json_answers_are_packed_as_asked() {
    let redshifts: Vec<String> = (0..900)
        .map(|row| format!("{:.3}", f64::from(row) * 0.002))
        .collect();
    let target = format!("/v1/convert?redshift={}&to=age", redshifts.join(","));
    let plain = get(&target);
    assert!(plain.header("content-encoding").is_none());
    for coding in ["gzip", "br", "zstd"] {
        let answer = get_with(&target, &[("accept-encoding", coding)]);
        assert_eq!(answer.header("content-encoding"), Some(coding));
        let mut unpacked = Vec::new();
        match coding {
            "gzip" => flate2::read::GzDecoder::new(&answer.body[..]).read_to_end(&mut unpacked),
            "br" => brotli_decompressor::Decompressor::new(&answer.body[..], 4096)
                .read_to_end(&mut unpacked),
            _ => zstd::stream::read::Decoder::new(&answer.body[..])
                .unwrap()
                .read_to_end(&mut unpacked),
        }
        .unwrap();
        assert_eq!(unpacked, plain.body, "{coding}");
    }
    // Small answers and tables are not packed.
    assert!(
        get_with(TARGET, &[("accept-encoding", "gzip")])
            .header("content-encoding")
            .is_none()
    );
    let table = get_with(
        &format!("{target}&format=csv"),
        &[("accept-encoding", "gzip")],
    );
    assert!(table.header("content-encoding").is_none());
}

#[test]
fn identities_are_returned_if_they_are_fit() {
    let trace = "00-0af7651916cd43dd8448eb211c80319c-b7ad6b7169203331-01";
    let answer = get_with(
        "/livez",
        &[("x-request-id", "larkfield-42"), ("traceparent", trace)],
    );
    assert_eq!(answer.header("x-request-id"), Some("larkfield-42"));
    assert_eq!(answer.header("traceparent"), Some(trace));
    let zero = "00-00000000000000000000000000000000-b7ad6b7169203331-01";
    for (id, trace) in [
        ("a b", "nonsense"),
        ("<script>", zero),
        (&"a".repeat(200), "00-1-2-3"),
    ] {
        let answer = get_with("/livez", &[("x-request-id", id), ("traceparent", trace)]);
        assert_eq!(answer.header("x-request-id").unwrap().len(), 16);
        assert!(answer.header("traceparent").is_none());
    }
    assert_ne!(
        get("/livez").header("x-request-id"),
        get("/livez").header("x-request-id")
    );
}

#[test]
fn the_time_is_accounted_for() {
    let timing = get(TARGET).header("server-timing").unwrap().to_owned();
    for stage in ["read;dur=", "model;dur=", "compute;dur="] {
        assert!(timing.contains(stage), "{timing}");
    }
}

/// Two requests on one connection, the first of them refused.
#[test]
fn a_refusal_leaves_the_connection_in_order() {
    let request = "GET /v1/convert?redshift=x HTTP/1.1\r\nhost: a\r\n\r\nGET /livez HTTP/1.1\r\nhost: a\r\nconnection: close\r\n\r\n";
    let answer = raw(shared(), request.as_bytes(), true);
    assert_eq!(answer.status, 400);
    assert!(String::from_utf8_lossy(&answer.body).ends_with("\r\n\r\nok\n"));
}
