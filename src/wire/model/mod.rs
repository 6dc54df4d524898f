//! Models on the wire: requested, echoed, listed, described.

mod describe;
mod described;
mod echo;
mod faults;
mod list;
mod request;
pub mod schema;

pub use describe::{DescribeAnswer, DescribeRequest};
pub use echo::{ModelEcho, SpecEcho};
pub use faults::model_faults;
pub use list::{ModelEntry, ModelsAnswer};
pub use request::{DeclaredModel, Model};
