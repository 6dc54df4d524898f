//! Redfathom turns redshift, cosmic time and distance into one another under a
//! declared cosmological model.
//!
//! The rooms stand in the order of the ladder: each may name only rooms above
//! its own line here. `DEVELOPERS.md` explains why.
#![forbid(unsafe_code)]

pub mod api;
pub mod expansion;
pub mod jobs;
pub mod model;
pub mod numerics;
pub mod page;
pub mod prepared;
pub mod quantity;
pub mod serve;
pub mod tables;
pub mod wire;
