//! The words of the service on the wire: requests read, answers written, faults placed.

pub mod json;
pub mod nearest;
pub mod numbers;
pub mod problem;

pub use nearest::nearest;
pub use numbers::Numbers;
pub use problem::{Code, Fault, Place, Problem};
