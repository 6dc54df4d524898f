//! Sizes, headings and names of files.

use super::source::sources;

const LONGEST_FILE: usize = 300;

/// Files that may be longer, each with its reason.
const LONG_FILES: &[(&str, &str)] = &[];

/// Words that name a drawer, not a thing.
const DRAWERS: &[&str] = &[
    "common", "helper", "helpers", "misc", "types", "util", "utils",
];

#[test]
fn files_are_short_enough_to_read() {
    let mut faults = Vec::new();
    let sources = sources(&["src", "tests", "benches"]);
    for source in &sources {
        let lines = source.text.lines().count();
        let excused = LONG_FILES.iter().any(|(path, _)| *path == source.path);
        if lines > LONGEST_FILE && !excused {
            faults.push(format!("{}: {lines} lines", source.path));
        }
        if lines <= LONGEST_FILE && excused {
            faults.push(format!("{}: needs its excuse no more", source.path));
        }
    }
    for (path, reason) in LONG_FILES {
        let known = sources.iter().any(|source| source.path == *path);
        if !known || reason.is_empty() {
            faults.push(format!("{path}: an excuse without a file or a reason"));
        }
    }
    assert!(faults.is_empty(), "\n{}", faults.join("\n"));
}

#[test]
fn every_file_says_what_it_is() {
    let silent: Vec<_> = sources(&["src", "tests", "benches"])
        .into_iter()
        .filter(|source| !source.text.starts_with("//! "))
        .map(|source| source.path)
        .collect();
    assert!(silent.is_empty(), "no //! at the top of {silent:?}");
}

#[test]
fn nothing_is_called_a_drawer() {
    for source in sources(&["src", "tests", "benches"]) {
        for word in source.words() {
            assert!(!DRAWERS.contains(&word), "{}", source.path);
        }
    }
}
