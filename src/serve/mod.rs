//! The process: command line, listener, life cycle, logging. Nothing names this room.

mod config;
mod health;
mod life;
mod listener;
mod telemetry;

pub use config::{Command, CommandLine, ServeOptions};
pub use listener::{ListenerLimits, Stopped, listen};
