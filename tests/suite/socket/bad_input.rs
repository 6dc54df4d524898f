//! Bad input: each has its own code, none is a fault of ours.

use super::client::{Answer, ask, get, narrow, post, raw, shared};
use serde_json::Value;
use std::io::{Read, Write};

pub(super) fn refused(answer: &Answer, status: u16, code: &str) -> Value {
    let problem = answer.json();
    assert_eq!(
        (answer.status, problem["code"].as_str()),
        (status, Some(code)),
        "{problem}"
    );
    problem
}

pub(super) fn body(from: &str) -> Answer {
    post(
        "/v1/convert",
        &format!(r#"{{"from": {{"quantity": "redshift", "values": {from}}}}}"#),
    )
}

#[test]
fn what_is_no_number_in_json_is_refused_where_it_stands() {
    for (values, pointer) in [
        ("[1, NaN]", "/from/values/1"),
        ("-Infinity", "/from/values"),
        ("[1e400]", "/from/values/0"),
    ] {
        let problem = refused(&body(values), 400, "json_not_finite");
        assert_eq!(problem["errors"][0]["pointer"], pointer);
        assert!(problem["detail"].as_str().unwrap().contains("send null"));
    }
    for text in ["NaN", "inf", "-Infinity", "1e", "0x10", "--1", ""] {
        let problem = refused(
            &get(&format!("/v1/convert?redshift={text}")),
            400,
            "wrong_type",
        );
        assert_eq!(problem["errors"][0]["parameter"], "redshift");
    }
    refused(&get("/v1/convert?redshift=1e400"), 400, "out_of_range");
}

#[test]
fn strings_and_nests_are_refused_where_they_stand() {
    for (values, pointer) in [
        (r#""0.5""#, "/from/values"),
        (r#"[0.5, "0.6"]"#, "/from/values/1"),
        ("[0.5, [0.6]]", "/from/values/1"),
        ("[true]", "/from/values/0"),
        ("{}", "/from/values"),
        ("null", "/from/values"),
    ] {
        let problem = refused(&body(values), 400, "wrong_type");
        assert_eq!(problem["errors"][0]["pointer"], pointer, "{values}");
    }
    refused(&body(&"[".repeat(10_000)), 400, "malformed_json");
}

/// Rows that can't be converted are no reason to refuse the others.
#[test]
fn values_outside_the_domain_are_null_with_a_remark() {
    let answer = body("[-1, -2, -1e300, 1e300, null, 0.5]").json();
    let ages = answer["columns"]["age"]["values"].as_array().unwrap();
    assert!(ages[..5].iter().all(Value::is_null));
    assert!(ages[5].is_f64());
    let codes: Vec<_> = answer["remarks"]
        .as_array()
        .unwrap()
        .iter()
        .map(|remark| remark["code"].as_str().unwrap())
        .collect();
    assert_eq!(
        codes,
        [
            "outside_domain",
            "outside_domain",
            "outside_domain",
            "beyond_model_range",
            "missing"
        ]
    );
}

#[test]
fn unknown_and_duplicate_members_are_refused() {
    let problem = refused(&post("/v1/convert", r#"{"form": 1}"#), 400, "unknown_field");
    assert_eq!(problem["errors"][0]["pointer"], "/form");
    assert!(
        problem["detail"].as_str().unwrap().contains("\"from\""),
        "{problem}"
    );
    let twice = r#"{"from": {"quantity": "redshift", "values": 1, "values": 2}}"#;
    let problem = refused(&post("/v1/convert", twice), 400, "duplicate_field");
    assert_eq!(problem["errors"][0]["pointer"], "/from/values");
    // What comes in later versions is not taken silently now.
    for later in [
        r#""interval": 0.9"#,
        r#""quantiles": [0.5]"#,
        r#""model_uncertainty": true"#,
    ] {
        let body = format!(r#"{{"from": {{"quantity": "redshift", "values": 1}}, {later}}}"#);
        refused(&post("/v1/convert", &body), 400, "unknown_field");
    }
    refused(
        &post(
            "/v1/convert",
            r#"{"from": {"quantity": "redshift", "values": 1}, "to": []}"#,
        ),
        400,
        "out_of_range",
    );
    refused(&get("/v1/convert?redshift=1&age=2"), 400, "malformed_query");
    refused(
        &get("/v1/convert?redshift=1&model=planck-2018-cmb-lensing&matter=0.3"),
        400,
        "malformed_query",
    );
    refused(
        &get("/v1/convert?redshift=1&to=age:Myr:Gyr"),
        400,
        "malformed_query",
    );
    refused(
        &get("/v1/convert?angular_scale=1"),
        400,
        "unknown_parameter",
    );
    refused(&get("/v1/convert?redshift=%zz"), 400, "malformed_query");
}

#[test]
fn impossible_models_are_told_all_their_faults() {
    let body = r#"{"model": {"hubble_constant": -70, "matter": -0.3, "radiation": {"cmb_temperature": 200, "effective_neutrino_number": 3}},
        "from": {"quantity": "redshift", "values": 1}}"#;
    let problem = refused(&post("/v1/convert", body), 400, "out_of_range");
    let pointers: Vec<_> = problem["errors"]
        .as_array()
        .unwrap()
        .iter()
        .map(|error| error["pointer"].as_str().unwrap())
        .collect();
    assert_eq!(
        pointers,
        [
            "/model/hubble_constant",
            "/model/matter",
            "/model/radiation/cmb_temperature"
        ]
    );
    assert_eq!(problem["errors_total"], 3);
    let body = r#"{"model": {"hubble_constant": 70, "matter": 0.3, "curvature": 0, "dark_energy": {"form": "cosmological_constant", "density": 0.6}},
        "from": {"quantity": "redshift", "values": 1}}"#;
    let problem = refused(&post("/v1/convert", body), 422, "inconsistent_closure");
    assert!(
        problem["detail"].as_str().unwrap().contains("0.7"),
        "{problem}"
    );
    for (dark_energy, code) in [
        (r#"{"form": "constant"}"#, "missing_field"),
        (r#"{"form": "constant", "w": -1, "wa": 0}"#, "unknown_field"),
        (r#"{"form": "quintom"}"#, "out_of_range"),
        (r#"{"w": -1}"#, "missing_field"),
        (r#"[]"#, "wrong_type"),
    ] {
        let body = format!(
            r#"{{"model": {{"hubble_constant": 70, "matter": 0.3, "dark_energy": {dark_energy}}}, "from": {{"quantity": "redshift", "values": 1}}}}"#
        );
        refused(&post("/v1/convert", &body), 400, code);
    }
}

#[test]
fn too_much_is_refused() {
    let many = format!("[{}1]", "1,".repeat(10_000_000 - 1));
    let problem = refused(&body(&many), 413, "too_many_values");
    assert_eq!(problem["errors"][0]["pointer"], "/from/values");
    // 500 values are allowed there, and 1000 results.
    let some = format!("[{}1]", "1,".repeat(399));
    let request = format!(
        r#"{{"from": {{"quantity": "redshift", "values": {some}}}, "to": ["age", "lookback_time", "redshift"]}}"#
    );
    let answer = ask(
        narrow(),
        "POST",
        "/v1/convert",
        &[("content-type", "application/json")],
        Some(request.as_bytes()),
    );
    refused(&answer, 413, "too_many_values");
    // Every branch counts: two here, so 399 values to two quantities are 1596 results.
    let request = format!(
        r#"{{"from": {{"quantity": "angular_diameter_distance", "values": {some}, "branch": "all"}}, "to": ["age", "redshift"]}}"#
    );
    let json = [("content-type", "application/json")];
    let answer = ask(
        narrow(),
        "POST",
        "/v1/convert",
        &json,
        Some(request.as_bytes()),
    );
    refused(&answer, 413, "too_many_values");
    refused(
        &get(&format!("/v1/convert?redshift={}", "a".repeat(8192))),
        414,
        "uri_too_long",
    );
}

/// A body of a declared length beyond the limit is refused before any of it is sent.
#[test]
fn a_body_that_is_too_large_is_refused_unread() {
    let mut stream = std::net::TcpStream::connect(shared()).unwrap();
    let head = "POST /v1/convert HTTP/1.1\r\nhost: a\r\ncontent-type: application/json\r\ncontent-length: 33554433\r\n\r\n";
    stream.write_all(head.as_bytes()).unwrap();
    let mut answer = [0; 12];
    stream.read_exact(&mut answer).unwrap();
    assert_eq!(&answer, b"HTTP/1.1 413");
    // Without a declared length it is refused as soon as it is too large.
    let chunk = format!("4e20\r\n{}\r\n", " ".repeat(20_000));
    let head = "POST /v1/convert HTTP/1.1\r\nhost: a\r\ncontent-type: application/json\r\nconnection: close\r\ntransfer-encoding: chunked\r\n\r\n";
    let request = format!("{head}{chunk}{chunk}0\r\n\r\n");
    refused(
        &raw(narrow(), request.as_bytes(), false),
        413,
        "body_too_large",
    );
}

#[test]
fn what_is_not_json_is_refused_by_its_type_or_its_bytes() {
    for kind in [
        "text/csv",
        "application/x-www-form-urlencoded",
        "application/octet-stream",
        "nonsense",
    ] {
        let answer = ask(
            shared(),
            "POST",
            "/v1/convert",
            &[("content-type", kind)],
            Some(b"{}"),
        );
        assert_eq!(
            refused(&answer, 415, "unsupported_media_type")["status"],
            415
        );
    }
    refused(
        &ask(shared(), "POST", "/v1/convert", &[], Some(b"{}")),
        415,
        "unsupported_media_type",
    );
    let json = [("content-type", "application/json; charset=utf-8")];
    let problem = refused(
        &ask(
            shared(),
            "POST",
            "/v1/convert",
            &json,
            Some(b"{\n \"\xff\""),
        ),
        400,
        "malformed_json",
    );
    assert!(
        problem["detail"].as_str().unwrap().contains("line 2"),
        "{problem}"
    );
    refused(
        &ask(shared(), "POST", "/v1/convert", &json, Some(b"")),
        400,
        "malformed_json",
    );
    refused(
        &post(
            "/v1/convert",
            r#"{"from": {"quantity": "redshift", "values": 1}} {}"#,
        ),
        400,
        "malformed_json",
    );
}
