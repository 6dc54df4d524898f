//! Every problem code comes from some request.

use super::client::{Answer, ask, get, narrow, post, raw, shared, start, start_app};
use redfathom::api::{State, surrounded};
use redfathom::prepared::{Capacity, Prepared};
use redfathom::wire::Code;
use std::net::SocketAddr;
use std::sync::atomic::AtomicBool;
use std::sync::{Arc, mpsc};

/// A code and a request that it answers.
struct Case(&'static str, fn() -> Answer);

const JSON: [(&str, &str); 1] = [("content-type", "application/json")];

#[rustfmt::skip]
const CASES: &[Case] = &[
    Case("malformed_json", || post("/v1/convert", "{")),
    Case("json_not_finite", || post("/v1/convert", r#"{"from": {"quantity": "redshift", "values": [NaN]}}"#)),
    Case("malformed_query", || get("/v1/convert?redshift")),
    Case("unknown_field", || post("/v1/convert", r#"{"from": {"quantity": "redshift", "values": 1, "sigma": 0.1}}"#)),
    Case("duplicate_field", || get("/v1/convert?redshift=1&redshift=2")),
    Case("missing_field", || get("/v1/convert?to=age")),
    Case("wrong_type", || post("/v1/convert", r#"{"from": {"quantity": "redshift", "values": "1"}}"#)),
    Case("out_of_range", || get("/v1/convert?redshift=1&hubble_constant=0&matter=0.3")),
    Case("unknown_quantity", || get("/v1/convert?redshift=1&to=agee")),
    Case("unknown_parameter", || get("/v1/convert?redshfit=1")),
    Case("not_found", || get("/v2/convert")),
    Case("model_not_found", || get("/v1/models/planck-2019")),
    Case("method_not_allowed", || ask(shared(), "DELETE", "/v1/convert", &[], None)),
    Case("not_acceptable", || get("/v1/convert?redshift=1&format=xml")),
    Case("request_timeout", || raw(narrow(), b"POST /v1/convert HTTP/1.1\r\nhost: a\r\ncontent-type: application/json\r\ncontent-length: 9\r\nconnection: close\r\n\r\n{", false)),
    Case("body_too_large", || ask(narrow(), "POST", "/v1/convert", &JSON, Some(&[b' '; 20_001]))),
    Case("too_many_values", || get(&format!("/v1/convert?redshift=1{}", ",1".repeat(1000)))),
    Case("uri_too_long", || get(&format!("/v1/convert?redshift={}", "1".repeat(8200)))),
    Case("unsupported_media_type", || ask(shared(), "POST", "/v1/convert", &[("content-type", "text/csv")], Some(b"z\n1\n"))),
    Case("unsupported_encoding", || ask(shared(), "POST", "/v1/convert", &[JSON[0], ("content-encoding", "deflate")], Some(b"{}"))),
    Case("unknown_model", || get("/v1/convert?redshift=1&model=planck-2019")),
    Case("unknown_unit", || get("/v1/convert?redshift=1&to=age:fortnight")),
    Case("unit_mismatch", || get("/v1/convert?redshift=1&to=age:Mpc")),
    Case("duplicate_output", || get("/v1/convert?redshift=1&to=age,age:Myr")),
    Case("inconsistent_closure", || get("/v1/convert?redshift=1&hubble_constant=70&matter=0.3&curvature=0&dark_energy.form=cosmological_constant&dark_energy.density=0.6")),
    Case("impossible_model", || get("/v1/convert?redshift=1&hubble_constant=70&matter=0.01&baryons=0.05")),
    Case("indeterminate_model", || get(INDETERMINATE)),
    Case("model_too_costly", || get(TOO_COSTLY)),
    Case("undefined_in_model", || get("/v1/convert?redshift=1&to=cmb_temperature&hubble_constant=70&matter=0.3")),
    Case("headers_too_large", || ask(shared(), "GET", "/livez", &[("x-long", &"a".repeat(17_000))], None)),
    Case("internal_error", || ask(broken(), "GET", "/", &[], None)),
    Case("overloaded", overloaded),
    Case("draining", || ask(draining(), "GET", "/readyz", &[], None)),
];

#[test]
fn every_code_has_a_request_that_it_answers() {
    for code in Code::ALL {
        let case = CASES.iter().find(|case| case.0 == code.name());
        let answer = case
            .unwrap_or_else(|| panic!("no request gives {}", code.name()))
            .1();
        assert_eq!(
            answer.header("content-type"),
            Some("application/problem+json"),
            "{}",
            code.name()
        );
        let problem = answer.json();
        assert_eq!(problem["code"], code.name(), "{problem}");
        assert_eq!(problem["type"], format!("/problems/{}", code.name()));
        assert_eq!(problem["status"], code.status());
        assert_eq!(answer.status, code.status());
        assert!(problem["detail"].as_str().unwrap().len() > 10, "{problem}");
        assert!(answer.header("x-request-id").is_some());
        let page = get(&format!("/problems/{}", code.name())).json();
        assert_eq!(page["title"], problem["title"]);
        if code.status() == 503 {
            assert_eq!(answer.header("retry-after"), Some("1"));
        }
    }
    assert_eq!(CASES.len(), Code::ALL.len());
}

/// A service with a route that panics.
fn broken() -> SocketAddr {
    let broken = axum::Router::new().route(
        "/",
        axum::routing::get(|| async { panic!("on purpose") as &str }),
    );
    start_app(surrounded(broken))
}

fn draining() -> SocketAddr {
    let ready = Arc::new(AtomicBool::new(false));
    start(State {
        ready,
        ..State::shipped().unwrap()
    })
}

/// A service whose only worker is held while it is asked.
fn overloaded() -> Answer {
    let capacity = Capacity {
        workers: 1,
        waiting: 0,
        ..Capacity::default()
    };
    let prepared = Prepared::new(capacity);
    let state = Arc::new(State {
        prepared,
        ..State::shipped().unwrap()
    });
    let address = start_app(redfathom::api::app(Arc::clone(&state)));
    let (release, held) = mpsc::channel::<()>();
    let (started, running) = mpsc::channel::<()>();
    let worker = std::thread::spawn(move || {
        let runtime = tokio::runtime::Builder::new_current_thread()
            .build()
            .unwrap();
        let job = state.prepared.run(move || {
            started.send(()).unwrap();
            held.recv()
        });
        runtime.block_on(job).is_ok()
    });
    running.recv().unwrap();
    let answer = ask(address, "GET", "/v1/convert?redshift=1", &[], None);
    release.send(()).unwrap();
    assert!(worker.join().unwrap());
    assert_eq!(
        ask(address, "GET", "/v1/convert?redshift=1", &[], None).status,
        200
    );
    answer
}

/// A closed model on the border between a bounce and a beginning.
const INDETERMINATE: &str =
    "/v1/convert?redshift=1&hubble_constant=70&matter=0.3&curvature=-1.013460402873455";
/// The same so near to the border that it stands still for ages.
const TOO_COSTLY: &str =
    "/v1/convert?redshift=1&hubble_constant=70&matter=0.3&curvature=-1.0134604028734";
