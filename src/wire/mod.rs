//! The words of the service on the wire: requests read, answers written, faults placed.

pub mod code;
pub mod convert;
pub mod fault;
pub mod json;
pub mod model;
pub mod name_or;
pub mod nearest;
pub mod numbers;
pub mod operator_file;
pub mod problem;
pub mod quantities;
pub mod query;
mod schema;
pub mod service;
pub mod written;

pub use code::Code;
pub use fault::{Fault, Place};
pub use name_or::NameOr;
pub use nearest::meant;
pub use numbers::Numbers;
pub use problem::{Problem, ProblemPage};
pub use query::Query;
pub use written::Written;
