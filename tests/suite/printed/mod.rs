//! What papers and books print, recomputed under the cosmology each adopted.

mod ages;
mod conversions;
mod scalars;
mod statements;
