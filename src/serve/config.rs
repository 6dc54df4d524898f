//! The command line and the environment: every option of the service stands here once.

use clap::{Args, Parser, Subcommand, ValueEnum};
use std::net::SocketAddr;
use std::num::NonZeroUsize;
use std::path::PathBuf;
use std::time::Duration;

/// Turns redshift, cosmic time and distance into one another over HTTP.
///
/// Without a command it starts the service, as `redfathom serve` does. It needs
/// no configuration, no account and no other service, dials out to nothing and
/// keeps nothing on disk.
#[derive(Debug, Parser)]
#[command(
    name = "redfathom",
    version,
    args_conflicts_with_subcommands = true,
    max_term_width = 100,
    after_help = EXAMPLES
)]
pub struct CommandLine {
    /// What to do instead of serving.
    #[command(subcommand)]
    pub command: Option<Command>,
    /// The options of `serve`, also understood without the word.
    #[command(flatten)]
    pub serve: ServeOptions,
}

/// What `redfathom` can be told to do.
#[derive(Debug, Subcommand)]
pub enum Command {
    /// Start the service (also what happens without a command).
    #[command(after_help = EXAMPLES)]
    Serve(Box<ServeOptions>),
    /// Print the OpenAPI 3.1 document of the service to standard output.
    Openapi,
    /// Ask a running service whether it is ready: exit code 0 if it is, 1 if not.
    Healthcheck(HealthcheckOptions),
}

/// The options of the service. A flag wins over its environment variable.
#[derive(Clone, Debug, Args)]
pub struct ServeOptions {
    /// Address and port to listen on; port 0 takes any free one and prints it.
    #[arg(long, env = "REDFATHOM_LISTEN", default_value = DEFAULT_ADDRESS, value_name = "ADDRESS:PORT")]
    pub listen: SocketAddr,

    /// JSON file with the team's own models: {"default": NAME, "models": {NAME: MODEL}}.
    ///
    /// A model is written as in a request, with an optional "title" and
    /// "source". The file is read once, at start; anything wrong in it stops
    /// the start and is named by its exact place. It cannot redefine a shipped
    /// name.
    #[arg(long, env = "REDFATHOM_MODELS", value_name = "FILE")]
    pub models: Option<PathBuf>,

    /// Model for requests that name none. Wins over the models file's "default".
    #[arg(long, env = "REDFATHOM_DEFAULT_MODEL", value_name = "NAME")]
    pub default_model: Option<String>,

    /// Memory for prepared models, in bytes; a model takes at most about 64 KiB.
    #[arg(long, env = "REDFATHOM_CACHE_BYTES", default_value_t = 64 << 20, value_name = "BYTES")]
    pub cache_bytes: u64,

    /// Threads that compute, and as many that talk to clients [default: the processors of the machine].
    #[arg(long, env = "REDFATHOM_WORKERS", value_name = "COUNT")]
    pub workers: Option<NonZeroUsize>,

    /// Computations that may wait for a worker; beyond, requests get 503 with Retry-After.
    #[arg(
        long,
        env = "REDFATHOM_WAITING",
        default_value_t = 128,
        value_name = "COUNT"
    )]
    pub waiting: usize,

    /// Connections open at once; further ones wait until one closes.
    #[arg(
        long,
        env = "REDFATHOM_CONNECTIONS",
        default_value = "1024",
        value_name = "COUNT"
    )]
    pub connections: NonZeroUsize,

    /// Seconds for which a stopping service says "not ready" at /readyz and still answers.
    ///
    /// Behind a load balancer, longer than it takes to notice. Counts for
    /// SIGTERM only; SIGINT (Ctrl-C) stops without this delay.
    #[arg(long, env = "REDFATHOM_DRAIN_SECONDS", default_value = "0", value_parser = seconds, value_name = "SECONDS")]
    pub drain_seconds: Duration,

    /// Seconds that requests already under way get to finish when the service stops.
    #[arg(long, env = "REDFATHOM_GRACE_SECONDS", default_value = "30", value_parser = seconds, value_name = "SECONDS")]
    pub grace_seconds: Duration,

    /// What is logged to standard error; `info` gives one line a request.
    #[arg(
        long,
        env = "REDFATHOM_LOG",
        default_value = "warn",
        value_name = "LEVEL"
    )]
    pub log: LogLevel,

    /// How log lines are written.
    #[arg(
        long,
        env = "REDFATHOM_LOG_FORMAT",
        default_value = "text",
        value_name = "FORMAT"
    )]
    pub log_format: LogFormat,
}

/// The options of `healthcheck`.
#[derive(Clone, Debug, Args)]
pub struct HealthcheckOptions {
    /// Address and port of the service.
    #[arg(long, env = "REDFATHOM_LISTEN", default_value = DEFAULT_ADDRESS, value_name = "ADDRESS:PORT")]
    pub listen: SocketAddr,
}

/// How much is logged.
#[derive(Clone, Copy, Debug, PartialEq, Eq, ValueEnum)]
pub enum LogLevel {
    /// Nothing.
    Off,
    /// Faults of the service itself.
    Error,
    /// Also what an operator should look at.
    Warn,
    /// Also one line for each request.
    Info,
}

/// How a log line is written.
#[derive(Clone, Copy, Debug, PartialEq, Eq, ValueEnum)]
pub enum LogFormat {
    /// For people.
    Text,
    /// One JSON object a line.
    Json,
}

const DEFAULT_ADDRESS: &str = "127.0.0.1:8080";

const EXAMPLES: &str = "\
Examples:
  redfathom                                        serve on 127.0.0.1:8080
  redfathom --listen 0.0.0.0:80 --models team.json serve everyone, with the team's models
  curl 127.0.0.1:8080                              what can be asked, on one screen
  redfathom openapi > openapi.json                 for a client generator";

/// Reads a number of seconds, whole or with a fraction, up to a day.
fn seconds(text: &str) -> Result<Duration, String> {
    let value: f64 = text
        .parse()
        .map_err(|_| "not a number of seconds".to_owned())?;
    if (0.0..=86_400.0).contains(&value) {
        Ok(Duration::from_secs_f64(value))
    } else {
        Err("must lie between 0 and 86400 seconds".to_owned())
    }
}

#[cfg(test)]
#[allow(clippy::unwrap_used)]
mod tests {
    use super::*;
    use clap::CommandFactory;

    #[test]
    fn the_definition_is_consistent() {
        CommandLine::command().debug_assert();
    }

    #[test]
    fn serving_needs_no_word() {
        for words in [
            &["redfathom", "--listen", "127.0.0.1:0"][..],
            &["redfathom", "serve", "--listen", "127.0.0.1:0"],
        ] {
            let parsed = CommandLine::try_parse_from(words).unwrap();
            let options = match parsed.command {
                Some(Command::Serve(options)) => *options,
                _ => parsed.serve,
            };
            assert_eq!(options.listen, "127.0.0.1:0".parse().unwrap());
        }
    }

    #[test]
    fn every_option_has_its_environment_variable() {
        for argument in CommandLine::command().get_arguments() {
            let name = argument.get_id().as_str();
            if !matches!(name, "help" | "version") {
                let variable = argument
                    .get_env()
                    .map(|text| text.to_string_lossy().into_owned());
                assert_eq!(variable, Some(format!("REDFATHOM_{}", name.to_uppercase())));
            }
        }
    }

    #[test]
    fn times_are_bounded() {
        assert_eq!(seconds("0.5"), Ok(Duration::from_millis(500)));
        for wrong in ["-1", "NaN", "1e9", "soon"] {
            assert!(seconds(wrong).is_err(), "{wrong}");
        }
    }
}
