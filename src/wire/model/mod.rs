//! Models on the wire: requested, echoed, listed, described.

mod echo;
mod faults;
mod request;
pub mod schema;

pub use echo::{ModelEcho, SpecEcho};
pub use faults::model_faults;
pub use request::{DeclaredModel, Model};
