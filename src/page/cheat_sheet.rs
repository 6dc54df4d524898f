//! What a terminal gets at `/`: one screen that is also a shell script.

use super::examples::EXAMPLES;
use super::host::base;
use std::fmt::Write;

/// The cheat sheet of the service that a client reached as `host` (the value of its `Host` header);
/// it listens on `port`.
///
/// Every line is a comment or part of a command, so that it runs as printed.
pub fn cheat_sheet(host: &str, port: u16) -> String {
    let base = base(host, port);
    let mut text = format!(
        "# Redfathom {}: redshift, cosmic time and distance, into one another.\n\n",
        env!("CARGO_PKG_VERSION")
    );
    for example in EXAMPLES {
        // Writing to a String cannot fail.
        let _ = write!(text, "# {}\n{}\n", example.says, example.at(&base));
    }
    let _ = write!(
        text,
        "\n# more: {base}/docs (try it), {base}/openapi.json\n\
         # the figures are as good as the model; see what the answer says of it\n"
    );
    text
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn it_fits_on_one_screen() {
        let text = cheat_sheet("127.0.0.1:8080", 8080);
        assert!(text.lines().count() <= 24, "{text}");
        for line in text.lines() {
            assert!(line.chars().count() <= 80, "{line}");
        }
    }

    #[test]
    fn the_host_of_the_request_stands_in_each_command() {
        let text = cheat_sheet("distances.larkfield.example", 8080);
        assert_eq!(text.matches("\ncurl ").count(), EXAMPLES.len());
        assert!(!text.contains("{base}") && !text.contains("127.0.0.1"));
    }
}
