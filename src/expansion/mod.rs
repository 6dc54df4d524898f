//! One model's history: densities, direct quadrature, panels checked against
//! it, and their inverses.

mod build;
mod check;
mod densities;
mod fit;
mod history;
mod inverse;
mod panels;
pub mod quadrature;
mod tail;
mod turning;

#[cfg(test)]
mod tests;

pub use densities::{Composition, Densities, Terms};
pub use history::{Accuracy, Beginning, Epoch, Epochs, History, HistoryFault, Wanted};
pub use inverse::Curve;
pub use turning::Turning;
