//! The process: command line, listener, life cycle, logging. Nothing names this room.

mod config;
mod health;
mod life;
mod listener;
mod models_file;
mod service;
mod telemetry;

pub use config::{Command, CommandLine, ServeOptions};
pub use listener::{ListenerLimits, Stopped, listen};

use clap::Parser;
use std::process::ExitCode;

/// Does what the command line says; what `main` returns.
pub fn run() -> ExitCode {
    let line = CommandLine::parse();
    let outcome = match line.command {
        None => service::run(&line.serve).map_err(|fault| fault.to_string()),
        Some(Command::Serve(options)) => service::run(&options).map_err(|fault| fault.to_string()),
        Some(Command::Openapi) => print(crate::api::written()),
        Some(Command::Healthcheck(options)) => health::check(options.listen),
    };
    match outcome {
        Ok(()) => ExitCode::SUCCESS,
        Err(fault) => {
            eprintln!("redfathom: {fault}");
            ExitCode::FAILURE
        }
    }
}

/// To standard output; a reader that has gone away (`| head`) is no fault.
fn print(text: &str) -> Result<(), String> {
    use std::io::{ErrorKind, Write};
    match std::io::stdout().write_all(text.as_bytes()) {
        Err(fault) if fault.kind() != ErrorKind::BrokenPipe => Err(fault.to_string()),
        _ => Ok(()),
    }
}
