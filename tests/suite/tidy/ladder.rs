//! Which room may name which: the ladder of DEVELOPERS.md as data.

use super::source::{root, sources};
use super::tokens::named;
use std::collections::BTreeSet;
use std::fs;

struct Room {
    name: &'static str,
    /// The crates that it may name.
    crates: &'static [&'static str],
    /// Lower rooms that it may not name all the same.
    never: &'static [&'static str],
    /// Mathematics and physics only: no input, output, clock or thread.
    pure: bool,
}

/// From the bottom up; a room may name those that stand before it.
const LADDER: &[Room] = &[
    Room {
        name: "numerics",
        crates: &["libm"],
        never: &[],
        pure: true,
    },
    Room {
        name: "model",
        crates: &["libm", "sha2", "thiserror"],
        never: &[],
        pure: true,
    },
    Room {
        name: "expansion",
        crates: &["libm", "thiserror"],
        never: &[],
        pure: true,
    },
    Room {
        name: "quantity",
        crates: &["libm", "thiserror"],
        never: &[],
        pure: true,
    },
    Room {
        name: "jobs",
        crates: &["libm", "thiserror"],
        never: &[],
        pure: true,
    },
    Room {
        name: "tables",
        crates: &["thiserror", "zmij"],
        never: &[],
        pure: false,
    },
    Room {
        name: "wire",
        crates: &[
            "fast_float2",
            "serde",
            "serde_json",
            "thiserror",
            "utoipa",
            "zmij",
        ],
        never: &[],
        pure: false,
    },
    Room {
        name: "page",
        crates: &[],
        never: &[],
        pure: false,
    },
    Room {
        name: "prepared",
        crates: &["moka", "thiserror", "tokio"],
        never: &["wire", "page", "tables"],
        pure: false,
    },
    Room {
        name: "api",
        crates: &[
            "axum",
            "brotli_decompressor",
            "bytes",
            "flate2",
            "futures_util",
            "http_body_util",
            "serde",
            "serde_json",
            "sha2",
            "thiserror",
            "tokio",
            "tower",
            "tower_http",
            "tracing",
            "utoipa",
            "utoipa_axum",
            "utoipa_swagger_ui",
            "zstd",
        ],
        never: &["numerics"],
        pure: false,
    },
    Room {
        name: "serve",
        crates: &[
            "axum",
            "clap",
            "hyper",
            "hyper_util",
            "thiserror",
            "tokio",
            "tracing",
            "tracing_subscriber",
        ],
        never: &["numerics"],
        pure: false,
    },
];

/// What mathematics does not need of the standard library.
const IMPURE: &[&str] = &["env", "fs", "io", "net", "process", "thread", "time"];

#[test]
fn rooms_name_only_what_stands_below_them() {
    let mut faults = Vec::new();
    let dependencies = dependencies();
    for source in sources(&["src"]) {
        let Some(name) = source.room() else { continue };
        let Some(height) = LADDER.iter().position(|room| room.name == name) else {
            faults.push(format!("{}: the room is not in the ladder", source.path));
            continue;
        };
        let room = &LADDER[height];
        let levels = source.words().skip(1).filter(|word| *word != "mod").count();
        let found = named(&source.text, levels);
        for (target, line) in found.rooms {
            let below = LADDER[..height].iter().any(|lower| lower.name == target);
            let known = LADDER.iter().any(|any| any.name == target);
            if known && target != name && (!below || room.never.contains(&target.as_str())) {
                faults.push(format!("{}:{line}: {name} names {target}", source.path));
            }
        }
        for (target, line) in found.crates {
            if dependencies.contains(&target) && !room.crates.contains(&target.as_str()) {
                faults.push(format!(
                    "{}:{line}: {name} names the crate {target}",
                    source.path
                ));
            }
        }
        if room.pure {
            faults.extend(impure(&source.text).map(|word| format!("{}: std::{word}", source.path)));
        }
    }
    assert!(faults.is_empty(), "\n{}", faults.join("\n"));
}

#[test]
fn every_room_is_in_the_ladder_once_and_stands_in_the_library() {
    let names: BTreeSet<_> = LADDER.iter().map(|room| room.name).collect();
    assert_eq!(names.len(), LADDER.len());
    let library = fs::read_to_string(root().join("src/lib.rs")).unwrap();
    for room in &names {
        assert!(library.contains(&format!("pub mod {room};")), "{room}");
    }
    assert_eq!(library.matches("pub mod ").count(), names.len());
}

#[test]
fn no_lint_against_platform_functions_is_silenced() {
    for source in sources(&["src"]) {
        assert!(
            !source.text.contains("clippy::disallowed_methods"),
            "{}",
            source.path
        );
    }
}

fn impure(text: &str) -> impl Iterator<Item = &'static str> {
    let code: String = text
        .lines()
        .map(|line| line.split("//").next().unwrap_or_default())
        .collect();
    IMPURE
        .iter()
        .copied()
        .filter(move |word| code.contains(&format!("std::{word}")))
}

/// The names of the crates in Cargo.toml as code writes them.
fn dependencies() -> BTreeSet<String> {
    let manifest = fs::read_to_string(root().join("Cargo.toml")).unwrap();
    let section = manifest
        .split("\n[")
        .find(|section| section.starts_with("dependencies]"))
        .unwrap();
    section
        .lines()
        .filter_map(|line| line.split_once(" = "))
        .map(|(name, _)| name.replace('-', "_"))
        .collect()
}
