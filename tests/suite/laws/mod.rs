//! What holds for every quantity under every model: the references' models and
//! random ones.

mod continuity;
mod geometry;
mod inverses;
mod models;
mod scaling;
mod times;
