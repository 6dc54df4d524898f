//! What all requests share.

use super::model::Echoes;
use crate::prepared::{BookFault, Capacity, ModelBook, Prepared};
use crate::wire::convert::Size;
use std::sync::atomic::AtomicBool;
use std::sync::{Arc, OnceLock};

/// The state of a running service.
pub struct State {
    /// Models made ready, and the workers that make them.
    pub prepared: Prepared,
    /// The models that have names.
    pub models: ModelBook,
    /// How much a request may ask for.
    pub limits: Limits,
    /// What answers say of the named models.
    pub echoes: Echoes,
    /// False when the service is about to stop.
    pub ready: Arc<AtomicBool>,
    /// The port that it listens on, as soon as it does.
    pub port: OnceLock<u16>,
}

/// How much a request may ask for.
#[derive(Clone, Debug, PartialEq)]
pub struct Limits {
    /// Bytes of a body, packed and unpacked.
    pub body_bytes: usize,
    /// Values to convert.
    pub values: usize,
    /// Values times outputs.
    pub results: usize,
    /// Seconds until a body must be complete.
    pub body_seconds: f64,
}

impl Default for Limits {
    fn default() -> Limits {
        Limits {
            body_bytes: 32 * 1024 * 1024,
            values: 1_000_000,
            results: 8_000_000,
            body_seconds: 30.0,
        }
    }
}

impl Limits {
    /// How many values and results a request may have.
    pub fn size(&self) -> Size {
        Size {
            values: self.values,
            results: self.results,
        }
    }
}

impl State {
    /// What a service has that is started without options.
    ///
    /// # Errors
    /// The faults of a shipped model, which a test excludes.
    pub fn shipped() -> Result<State, BookFault> {
        let models = ModelBook::shipped()?;
        Ok(State {
            prepared: Prepared::new(Capacity::default()),
            echoes: Echoes::of(&models),
            models,
            limits: Limits::default(),
            ready: Arc::new(AtomicBool::new(true)),
            port: OnceLock::new(),
        })
    }
}
