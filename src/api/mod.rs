//! The service over HTTP: routes, what stands around them, refusals, the OpenAPI document.

mod accept;
mod around;
mod body;
mod cached;
mod conversion;
mod document;
mod examples;
mod model;
mod refusal;
mod respond;
mod routes;
mod state;
mod timing;
mod unpack;

pub use around::{HEADER_BYTES, URI_BYTES};
pub use document::{document, written};
pub use refusal::Refusal;
pub use respond::{WHOLE_BYTES, chunked};
pub use state::{Limits, State};

use axum::Router;
use axum::http::header::CONTENT_TYPE;
use axum::http::{Extensions, HeaderMap, StatusCode, Version};
use axum::middleware::from_fn;
use std::sync::Arc;
use tower_http::CompressionLevel;
use tower_http::compression::CompressionLayer;
use tower_http::compression::predicate::{Predicate, SizeAbove};
use utoipa_swagger_ui::{Config, SwaggerUi};

/// The whole service; a test may call it without a socket.
pub fn app(state: Arc<State>) -> Router {
    let (router, _) = routes::routes().split_for_parts();
    surrounded(router.with_state(state).merge(docs()))
}

/// Puts around a router what stands around the service.
pub fn surrounded(router: Router) -> Router {
    let packed = CompressionLayer::new()
        .quality(CompressionLevel::Fastest)
        .compress_when(SizeAbove::new(PACKED_FROM_BYTES).and(is_json));
    router.layer(packed).layer(from_fn(around::around))
}

/// Smaller answers would cost more to pack than to send.
const PACKED_FROM_BYTES: u64 = 10_000;

fn is_json(_: StatusCode, _: Version, headers: &HeaderMap, _: &Extensions) -> bool {
    headers
        .get(CONTENT_TYPE)
        .is_some_and(|kind| kind == accept::JSON.content_type)
}

/// The interactive documentation; its files are part of the program.
fn docs() -> Router {
    let config = Config::from("/openapi.json")
        // Else the page asks a server on the Internet about the document.
        .validator_url("none")
        .try_it_out_enabled(true);
    SwaggerUi::new("/docs").config(config).into()
}
