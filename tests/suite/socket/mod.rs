//! Tests against the running service over a real socket.

mod around;
mod bad_input;
pub(crate) mod client;
mod convert;
mod hints;
mod models;
mod problems;
mod wording;
