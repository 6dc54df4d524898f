//! The `redfathom` command.
#![forbid(unsafe_code)]

use std::process::ExitCode;

fn main() -> ExitCode {
    redfathom::serve::run()
}
