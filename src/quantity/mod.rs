//! The catalogue of quantities: name, unit, domain, accuracy, forward, inverse, source; and the unit grammar.

mod catalogue;
mod definition;
mod frame;
mod inverse;
mod knots;
mod reach;
mod rounding;
mod solved;
pub mod unit;

pub use catalogue::{QUANTITIES, named};
pub use definition::{
    Block, Condition, Forward, HubbleScaling, ILL_CONDITIONED, Inverse, Quantity, Solved, Tolerance,
};
pub use frame::Frame;
pub use inverse::{Inverter, Solution};
pub use reach::Miss;
pub use unit::{Scale, Unit, UnitFault, column_name};
