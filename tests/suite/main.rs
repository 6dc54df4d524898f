//! The integration tests: one binary, one module a topic.
#![allow(clippy::unwrap_used, clippy::expect_used, clippy::panic)]

mod accuracy;
mod closed_forms;
mod command_line;
mod laws;
mod model;
mod openapi;
mod printed;
mod readme;
mod same_bits;
mod service;
mod socket;
mod tidy;
mod units;
