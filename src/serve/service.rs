//! Puts the service together and runs it until it is told to stop.

use super::config::ServeOptions;
use super::life::StopSignals;
use super::listener::{ListenerLimits, Stopped, listen};
use super::models_file::{self, ModelsFault};
use super::telemetry::{start_logging, with_request_log};
use crate::api::{Echoes, Limits, State, app};
use crate::page::EXAMPLES;
use crate::prepared::{Capacity, Prepared, Provenance, Unprepared};
use std::io::Write;
use std::net::SocketAddr;
use std::sync::atomic::AtomicBool;
use std::sync::{Arc, OnceLock};
use std::time::Duration;
use tokio::net::TcpListener;

/// Why the service did not start.
#[derive(Debug, thiserror::Error)]
pub(super) enum StartFault {
    /// The models are not as they should be.
    #[error(transparent)]
    Models(#[from] ModelsFault),
    /// A model has no history.
    #[error("the model {name}: {fault}")]
    Model {
        /// Its name.
        name: String,
        /// Why.
        fault: Unprepared,
    },
    /// The address cannot be had.
    #[error("cannot listen on {address}: {fault}")]
    Listen {
        /// The address.
        address: SocketAddr,
        /// What the system says.
        fault: std::io::Error,
    },
    /// The system refuses threads or signals.
    #[error("the system refuses to let the service run: {0}")]
    System(#[from] std::io::Error),
}

/// Runs the service; returns after a stop.
pub(super) fn run(options: &ServeOptions) -> Result<(), StartFault> {
    start_logging(options);
    let models = models_file::open(options.models.as_deref(), options.default_model.as_deref())?;
    let capacity = capacity(options);
    let state = Arc::new(State {
        prepared: Prepared::new(capacity),
        echoes: Echoes::of(&models),
        models,
        limits: Limits::default(),
        ready: Arc::new(AtomicBool::new(true)),
        port: OnceLock::new(),
    });
    let runtime = tokio::runtime::Builder::new_multi_thread()
        .worker_threads(capacity.workers)
        .enable_all()
        .build()?;
    let outcome = runtime.block_on(serve(options, state));
    // Computations of requests that were cut off are not waited for.
    runtime.shutdown_background();
    outcome
}

async fn serve(options: &ServeOptions, state: Arc<State>) -> Result<(), StartFault> {
    let mut signals = StopSignals::new()?;
    warm(&state).await?;
    let refused = |fault| StartFault::Listen {
        address: options.listen,
        fault,
    };
    let listener = TcpListener::bind(options.listen).await.map_err(refused)?;
    let address = listener.local_addr().map_err(refused)?;
    // It is set once, here.
    let _ = state.port.set(address.port());
    greet(address, state.models.default_name());
    let stop = signals.stop(Arc::clone(&state.ready), options.drain_seconds);
    let limits = ListenerLimits {
        connections: options.connections.get(),
        headers: HEADER_DEADLINE,
        grace: options.grace_seconds,
    };
    let app = with_request_log(app(Arc::clone(&state)), options);
    if listen(listener, app, limits, stop).await == Stopped::CutOff {
        tracing::warn!("requests were cut off when the grace ran out");
    }
    Ok(())
}

/// Prepares the default model, for the first request, and the operator's, to know that they can be.
async fn warm(state: &State) -> Result<(), StartFault> {
    for entry in state.models.iter() {
        let ours = matches!(entry.provenance, Provenance::Operator { .. });
        if ours || entry.name == state.models.default_name() {
            let outcome = state.prepared.history(&entry.spec).await;
            outcome.map_err(|fault| StartFault::Model {
                name: entry.name.clone(),
                fault,
            })?;
        }
    }
    Ok(())
}

/// Says where the service is and what to try.
fn greet(address: SocketAddr, default_model: &str) {
    let mut text = format!(
        "redfathom {} listens on http://{address}\n",
        env!("CARGO_PKG_VERSION")
    );
    text += &format!("The default model is {default_model}. Try:\n");
    for example in EXAMPLES.iter().take(3) {
        text += &format!(
            "\n# {}\n{}\n",
            example.says,
            example.at(&format!("http://{address}"))
        );
    }
    // Nobody need read it: a closed standard output is no reason to stop.
    let _ = std::io::stdout().write_all(text.as_bytes());
}

fn capacity(options: &ServeOptions) -> Capacity {
    let usual = Capacity::default();
    Capacity {
        cache_bytes: options.cache_bytes,
        workers: options.workers.map_or(usual.workers, usize::from),
        waiting: options.waiting,
    }
}

/// Time for a request's headers to be complete.
const HEADER_DEADLINE: Duration = Duration::from_secs(10);
