//! What is made once and used often: the book of models, their tables, and the pool that makes them.

mod book;
mod histories;
mod pool;
mod store;

pub use book::{BookFault, Entry, ModelBook, Provenance};
pub use histories::{Capacity, Prepared, Unprepared};
pub use pool::{Overloaded, Pool};
pub use store::{Store, Weighed};
