//! One model's history: densities, direct quadrature, panels checked against
//! it, and their inverses.

mod budget;
mod build;
mod check;
mod densities;
mod epochs;
mod fit;
mod history;
mod inverse;
mod panels;
pub mod quadrature;
pub mod tail;
mod turning;

#[cfg(test)]
mod tests;

pub use budget::Composition;
pub use densities::{Densities, Terms};
pub use epochs::{Epoch, Epochs, Wanted};
pub use history::{Accuracy, Beginning, History, HistoryFault};
pub use inverse::Curve;
pub use turning::Turning;
