//! From start to stop: signals, the time to be taken out of rotation, the last requests.

use std::sync::Arc;
use std::sync::atomic::{AtomicBool, Ordering};
use std::time::Duration;
use tokio::signal::unix::{Signal, SignalKind, signal};

/// Why the service stops.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum Reason {
    /// SIGTERM, from an orchestrator that takes us out of rotation first.
    Told,
    /// SIGINT, from a person at the terminal.
    Interrupted,
}

/// The signals that stop the service.
#[derive(Debug)]
pub(super) struct StopSignals {
    terminate: Signal,
    interrupt: Signal,
}

impl StopSignals {
    /// Listens for both signals from now on. Must be called inside the runtime.
    ///
    /// # Errors
    /// That of the system, if it refuses the handlers.
    pub(super) fn new() -> std::io::Result<StopSignals> {
        Ok(StopSignals {
            terminate: signal(SignalKind::terminate())?,
            interrupt: signal(SignalKind::interrupt())?,
        })
    }

    /// Returns when the service is to stop accepting: after a signal, and after `drain` if it was SIGTERM.
    ///
    /// `ready` is false from the signal on. A second signal ends the drain.
    pub(super) async fn stop(&mut self, ready: Arc<AtomicBool>, drain: Duration) {
        let reason = self.next().await;
        ready.store(false, Ordering::Release);
        tracing::info!("stopping");
        if reason == Reason::Told && !drain.is_zero() {
            tokio::select! {
                () = tokio::time::sleep(drain) => {}
                _ = self.next() => {}
            }
        }
    }

    async fn next(&mut self) -> Reason {
        tokio::select! {
            _ = self.terminate.recv() => Reason::Told,
            _ = self.interrupt.recv() => Reason::Interrupted,
        }
    }
}
