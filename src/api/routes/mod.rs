//! The routes, one a file: this list is the table of contents of the service.

mod describe;
mod get_convert;
mod home;
mod livez;
mod model;
mod models;
mod openapi;
mod post_convert;
mod problem;
mod quantities;
mod readyz;
mod version;

use super::State;
use super::document::Base;
use std::sync::Arc;
use utoipa::OpenApi;
use utoipa_axum::router::OpenApiRouter;
use utoipa_axum::routes;

/// Every route with its handler and its part of the OpenAPI document.
pub(crate) fn routes() -> OpenApiRouter<Arc<State>> {
    OpenApiRouter::with_openapi(Base::openapi())
        .routes(routes!(post_convert::convert, get_convert::get_convert))
        .routes(routes!(quantities::quantities))
        .routes(routes!(models::models))
        .routes(routes!(model::model))
        .routes(routes!(describe::describe))
        .routes(routes!(version::version))
        .routes(routes!(home::home))
        .routes(routes!(openapi::openapi))
        .routes(routes!(problem::problem))
        .routes(routes!(livez::livez))
        .routes(routes!(readyz::readyz))
}
