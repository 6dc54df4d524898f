//! What the service costs, as ratios of processor time within one run.
//!
//! `cargo bench` prints all tables; `cargo bench -- tables` or `-- requests` one
//! half, `-- --rounds 101` more rounds. A time never fails: the machine may be busy.
//!
//! Times are those of the kernel's scheduler for the threads of the service
//! (one thread of runtime, beside the pool), not of a clock on the wall. Each
//! round measures every case once, and a ratio compares within its round; the
//! table shows medians and quartiles over the rounds.
#![allow(clippy::expect_used, clippy::panic, clippy::unwrap_used)]

mod batches;
mod client;
mod histories;
mod processor;
mod rounds;
mod server;
mod singles;

use std::process::Command;

fn main() {
    let arguments: Vec<String> = std::env::args().skip(1).collect();
    if on_one_processor(&arguments) {
        return;
    }
    let wanted = |name: &str| arguments.iter().any(|word| word == name);
    let all = !wanted("tables") && !wanted("requests");
    let rounds = arguments
        .iter()
        .skip_while(|word| *word != "--rounds")
        .nth(1);
    let rounds = rounds.map_or(31, |word| word.parse().expect("--rounds takes a number"));
    if all || wanted("tables") {
        histories::evaluation(rounds);
        histories::building(rounds);
    }
    if all || wanted("requests") {
        singles::compare(rounds);
        batches::compare(rounds);
    }
}

/// Runs this program again on one processor, where the system can do that, so that no case pays for
/// waking another one and a second does not.
fn on_one_processor(arguments: &[String]) -> bool {
    const MARK: &str = "RATIOS_ON_ONE_PROCESSOR";
    if std::env::var_os(MARK).is_some() {
        return false;
    }
    let last = std::thread::available_parallelism()
        .map_or(0, |count| count.get() - 1)
        .to_string();
    let program = std::env::current_exe().expect("a program has a path");
    let run = Command::new("taskset")
        .arg("-c")
        .arg(last)
        .arg(program)
        .args(arguments)
        .env(MARK, "")
        .status();
    let done = run.is_ok_and(|status| status.success());
    if !done {
        println!(
            "(not on one processor: `taskset` is missing or was refused; ratios of requests mean less)"
        );
    }
    done
}
