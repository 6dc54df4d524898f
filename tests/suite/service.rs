//! The real binary, started for a test and ended with it.

use std::io::{BufRead, BufReader};
use std::process::{Child, Command, Output, Stdio};
use std::time::{Duration, Instant};

/// A running service.
pub(crate) struct Service {
    child: Child,
    /// Its `host:port`.
    pub(crate) address: String,
    /// What it printed at its start.
    pub(crate) greeting: String,
}

impl Service {
    /// Starts it on a free port with further `options`.
    pub(crate) fn start(options: &[&str]) -> Service {
        Service::start_with(options, &[])
    }

    /// The same, with environment variables.
    pub(crate) fn start_with(options: &[&str], variables: &[(&str, &str)]) -> Service {
        let mut child = redfathom()
            .args(["serve", "--listen", "127.0.0.1:0"])
            .args(options)
            .envs(variables.iter().copied())
            .stdout(Stdio::piped())
            .stderr(Stdio::null())
            .spawn()
            .unwrap();
        let mut lines = BufReader::new(child.stdout.take().unwrap()).lines();
        let mut greeting = Vec::new();
        let complete = |lines: &[String]| {
            let commands = lines
                .iter()
                .filter(|line| line.starts_with("curl "))
                .count();
            let quotes: usize = lines.iter().map(|line| line.matches('\'').count()).sum();
            commands == 3 && quotes.is_multiple_of(2)
        };
        while !complete(&greeting) {
            greeting.push(
                lines
                    .next()
                    .expect("the service says where it listens")
                    .unwrap(),
            );
        }
        let address = greeting[0].rsplit("http://").next().unwrap().to_owned();
        Service {
            child,
            address,
            greeting: greeting.join("\n"),
        }
    }

    /// Sends the signal (`TERM`, `INT`).
    pub(crate) fn signal(&self, name: &str) {
        let sent = Command::new("kill")
            .args(["-s", name, &self.child.id().to_string()])
            .status();
        assert!(sent.unwrap().success());
    }

    /// Waits for its end; the exit code, or `None` after ten seconds.
    pub(crate) fn end(&mut self) -> Option<i32> {
        let start = Instant::now();
        while start.elapsed() < Duration::from_secs(10) {
            if let Some(status) = self.child.try_wait().unwrap() {
                return status.code();
            }
            std::thread::sleep(Duration::from_millis(5));
        }
        None
    }
}

impl Drop for Service {
    fn drop(&mut self) {
        // Fails only where the process has ended, which is what is wanted.
        let _ = self.child.kill();
        let _ = self.child.wait();
    }
}

/// The binary, free of the settings of whoever runs the tests.
pub(crate) fn redfathom() -> Command {
    let mut command = Command::new(env!("CARGO_BIN_EXE_redfathom"));
    for (name, _) in std::env::vars().filter(|(name, _)| name.starts_with("REDFATHOM_")) {
        command.env_remove(name);
    }
    command
}

/// Runs `script` with the shell, as a reader who pastes it would.
pub(crate) fn shell(script: &str) -> Output {
    Command::new("bash")
        .args(["-euo", "pipefail", "-c", script])
        .output()
        .unwrap()
}
