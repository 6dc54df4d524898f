//! Logging: off the path of a request unless asked for.

use super::config::{LogFormat, LogLevel, ServeOptions};
use axum::Router;
use axum::extract::Request;
use axum::middleware::{Next, from_fn};
use axum::response::Response;
use std::time::Instant;
use tracing_subscriber::filter::LevelFilter;

/// Sends log lines to standard error, as the options say. A second call changes nothing.
pub(super) fn start_logging(options: &ServeOptions) {
    let level = match options.log {
        LogLevel::Off => LevelFilter::OFF,
        LogLevel::Error => LevelFilter::ERROR,
        LogLevel::Warn => LevelFilter::WARN,
        LogLevel::Info => LevelFilter::INFO,
    };
    let lines = tracing_subscriber::fmt()
        .with_max_level(level)
        .with_writer(std::io::stderr)
        .with_target(false);
    // An error means that a subscriber is set already, which is then the one that was wanted.
    let _ = match options.log_format {
        LogFormat::Text => lines.with_ansi(false).try_init(),
        LogFormat::Json => lines.json().flatten_event(true).try_init(),
    };
}

/// Adds one line a request, where the options ask for it.
pub(super) fn with_request_log(app: Router, options: &ServeOptions) -> Router {
    if options.log == LogLevel::Info {
        app.layer(from_fn(log_request))
    } else {
        app
    }
}

async fn log_request(request: Request, next: Next) -> Response {
    let started = Instant::now();
    let method = request.method().clone();
    let path = request.uri().path().to_owned();
    let response = next.run(request).await;
    let id = response
        .headers()
        .get("x-request-id")
        .and_then(|value| value.to_str().ok())
        .unwrap_or("");
    tracing::info!(
        %method,
        path,
        status = response.status().as_u16(),
        duration_ms = started.elapsed().as_secs_f64() * 1e3,
        request_id = id,
        "request"
    );
    response
}
