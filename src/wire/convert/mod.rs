//! Conversions on the wire.

mod answer;
mod faults;
mod parameters;
mod query;
mod request;
mod resolve;
pub mod schema;
mod unit;

pub use answer::{Accuracy, written};
pub use faults::convert_fault;
pub use parameters::{ConvertQuery, FormatQuery};
pub use query::{MOST_VALUES, as_parameter};
pub use request::{Branch, ConvertRequest, From, OutputRequest, PerSoundHorizon};
pub use resolve::{Asked, DEFAULT_OUTPUTS, Size};
