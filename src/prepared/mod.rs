//! What is made once and used often: the tables of models, and the pool that makes them.

mod histories;
mod pool;
mod store;

pub use histories::{Capacity, Prepared, Unprepared};
pub use pool::{Overloaded, Pool};
pub use store::{Store, Weighed};
