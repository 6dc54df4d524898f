//! The service over HTTP: routes, what stands around them, refusals, the OpenAPI document.

mod accept;
mod around;
mod body;
mod cached;
mod conversion;
mod document;
mod examples;
mod model;
mod pack;
mod refusal;
mod respond;
mod routes;
mod state;
mod tags;
mod timing;
mod unpack;

pub use around::{HEADER_BYTES, URI_BYTES};
pub use document::{document, written};
pub use model::Echoes;
pub use refusal::Refusal;
pub use respond::{WHOLE_BYTES, chunked};
pub use state::{Limits, State};

use axum::Router;
use axum::middleware::from_fn;
use std::sync::Arc;
use utoipa_swagger_ui::{Config, SwaggerUi};

/// The whole service; a test may call it without a socket.
pub fn app(state: Arc<State>) -> Router {
    let (router, _) = routes::routes().split_for_parts();
    surrounded(router.with_state(state).merge(docs()))
}

/// Puts around a router what stands around the service.
pub fn surrounded(router: Router) -> Router {
    router.layer(from_fn(around::around))
}

/// The interactive documentation; its files are part of the program.
fn docs() -> Router {
    let config = Config::from("/openapi.json")
        // Else the page asks a server on the Internet about the document.
        .validator_url("none")
        .try_it_out_enabled(true);
    SwaggerUi::new("/docs").config(config).into()
}
