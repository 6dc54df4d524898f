//! One redshift by GET, against the least that the same server can answer.

use super::rounds::{Case, Ratio, compare as compare_cases};
use super::server::{Server, get};
use axum::Router;
use redfathom::api::{State, app};
use std::cell::RefCell;
use std::sync::Arc;

const REQUESTS: usize = 300;

/// Compares GETs of one redshift with a hello.
pub(crate) fn compare(rounds: usize) {
    let hello = RefCell::new(Server::new(hello()));
    let service = RefCell::new(Server::new(app(Arc::new(
        State::shipped().expect("the shipped models are models"),
    ))));
    let model = "model=planck-2018-cmb-lensing";
    let case = |name, server, target: String| {
        let request = get(&target);
        let server: &RefCell<Server> = server;
        Case {
            name,
            measure: Box::new(move || server.borrow_mut().cost_ns(&request, REQUESTS) / 1e3),
        }
    };
    let mut cases = [
        case("hello", &hello, "/".to_owned()),
        case("GET /livez", &service, "/livez".to_owned()),
        case(
            "GET one redshift, one output",
            &service,
            format!("/v1/convert?redshift=0.5&to=luminosity_distance&{model}"),
        ),
        case(
            "GET one redshift, nine outputs",
            &service,
            format!("/v1/convert?redshift=0.5&{model}"),
        ),
        case(
            "GET one age",
            &service,
            format!("/v1/convert?age=3&to=redshift&{model}"),
        ),
    ];
    let ratios = [
        Ratio {
            case: "GET /livez",
            to: "hello",
            goal: 1.5,
        },
        Ratio {
            case: "GET one redshift, one output",
            to: "hello",
            goal: 1.5,
        },
        Ratio {
            case: "GET one redshift, nine outputs",
            to: "hello",
            goal: 1.5,
        },
        Ratio {
            case: "GET one age",
            to: "hello",
            goal: 1.5,
        },
    ];
    compare_cases(
        "One redshift over HTTP, all layers",
        "µs of server per request",
        rounds,
        &mut cases,
        &ratios,
    );
}

/// The smallest service.
pub(crate) fn hello() -> Router {
    Router::new().route("/", axum::routing::get(|| async { "hello" }))
}
