//! A hundred thousand redshifts by POST, against echoes of the same array.

use super::histories::spread;
use super::rounds::{Case, Ratio, compare as compare_cases};
use super::server::{Server, post};
use axum::body::{Body, Bytes};
use axum::routing::post as to;
use axum::{Json, Router};
use futures_util::stream;
use redfathom::api::{State, app};
use redfathom::wire::json::{self, Bounds};
use redfathom::wire::{Numbers, Written, numbers};
use serde::{Deserialize, Serialize};
use std::cell::RefCell;
use std::convert::Infallible;
use std::sync::Arc;

const VALUES: usize = 100_000;

/// Compares conversions of a batch with echoes.
pub(crate) fn compare(rounds: usize) {
    let echoes = RefCell::new(Server::new(echoes()));
    let service = RefCell::new(Server::new(app(Arc::new(
        State::shipped().expect("the shipped models are models"),
    ))));
    let values = written(&spread(VALUES));
    let echo = format!("{{\"values\":[{values}]}}");
    let convert = |outputs: &str| {
        format!(
            "{{\"model\":\"planck-2018-cmb-lensing\",\"from\":{{\"quantity\":\"redshift\",\"values\":[{values}]}},\"to\":[{outputs}]}}"
        )
    };
    let case = |name, server, target: &str, body: &str| {
        let request = post(target, body);
        let server: &RefCell<Server> = server;
        Case {
            name,
            measure: Box::new(move || server.borrow_mut().cost_ns(&request, 1) / VALUES as f64),
        }
    };
    let three = "\"age\",\"comoving_distance\",\"luminosity_distance\"";
    let mut cases = [
        case("echo, same code", &echoes, "/same", &echo),
        case("echo, axum Json", &echoes, "/json", &echo),
        case("parse N, write 3 N, same code", &echoes, "/same3", &echo),
        case(
            "one distance",
            &service,
            "/v1/convert",
            &convert("\"comoving_distance\""),
        ),
        case("three outputs", &service, "/v1/convert", &convert(three)),
    ];
    let ratios = [
        Ratio {
            case: "one distance",
            to: "echo, same code",
            goal: 1.2,
        },
        Ratio {
            case: "one distance",
            to: "echo, axum Json",
            goal: 0.9,
        },
        Ratio {
            case: "three outputs",
            to: "parse N, write 3 N, same code",
            goal: 1.15,
        },
    ];
    compare_cases(
        "A JSON batch of 100 000 redshifts",
        "ns of server per redshift",
        rounds,
        &mut cases,
        &ratios,
    );
}

#[derive(Deserialize, Serialize)]
struct Idiomatic {
    values: Vec<f64>,
}

#[derive(Deserialize)]
struct Same {
    values: Numbers,
}

fn echoes() -> Router {
    Router::new()
        .route(
            "/json",
            to(|Json(body): Json<Idiomatic>| async move { Json(body) }),
        )
        .route("/same", to(|body: Bytes| async move { same(&body, 1) }))
        .route("/same3", to(|body: Bytes| async move { same(&body, 3) }))
        .layer(axum::extract::DefaultBodyLimit::max(64 << 20))
}

/// Reads and writes as the service does, the numbers `copies` times over.
fn same(body: &[u8], copies: usize) -> Body {
    let bounds = Bounds {
        elements: VALUES,
        ..Bounds::default()
    };
    let same: Same = json::read(body, &bounds).expect("our own body");
    let mut written = Written::default();
    for copy in 1..copies {
        written.text(if copy == 1 { "{\"copies\":[" } else { "],[" });
        written.numbers(same.values.0.clone());
    }
    written.text(if copies == 1 {
        "{\"values\":["
    } else {
        "],\"values\":["
    });
    written.numbers(same.values.0);
    written.text("]}");
    Body::from_stream(stream::iter(written.chunks().map(Ok::<_, Infallible>)))
}

fn written(redshifts: &[f64]) -> String {
    let mut text = Vec::new();
    numbers::write_list(&mut text, redshifts);
    String::from_utf8(text).expect("digits are ASCII")
}
