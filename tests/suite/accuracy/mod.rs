//! Every quantity under every model against references of more than double
//! precision, with the tolerance of the catalogue.

mod decimal;
mod errors;
mod forward;
mod inverse;
mod neutrinos;
pub(crate) mod references;
mod report;
mod stated;
mod through;
