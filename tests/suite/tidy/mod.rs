//! The laws of the house that a compiler does not enforce.

mod files;
mod functions;
mod ladder;
mod modules;
mod source;
mod tokens;
