//! The Rust files of the project.

use std::fs;
use std::path::{Path, PathBuf};

/// A Rust file, its path relative to the project.
pub(super) struct Source {
    pub(super) path: String,
    pub(super) text: String,
}

impl Source {
    /// The room of a file under `src`, if it is in one.
    pub(super) fn room(&self) -> Option<&str> {
        self.path
            .strip_prefix("src/")?
            .split_once('/')
            .map(|(room, _)| room)
    }

    /// The words of its path: folders and the file without its ending.
    pub(super) fn words(&self) -> impl Iterator<Item = &str> {
        self.path.trim_end_matches(".rs").split('/')
    }
}

/// Every Rust file under the folders given, in order of its path.
pub(super) fn sources(folders: &[&str]) -> Vec<Source> {
    let mut paths = Vec::new();
    for folder in folders {
        collect(&root().join(folder), &mut paths);
    }
    paths.sort();
    let found: Vec<_> = paths
        .into_iter()
        .map(|path| Source {
            text: fs::read_to_string(&path).unwrap(),
            path: path
                .strip_prefix(root())
                .unwrap()
                .to_str()
                .unwrap()
                .to_owned(),
        })
        .collect();
    assert!(!found.is_empty(), "no sources under {folders:?}");
    found
}

/// The folder of the project.
pub(super) fn root() -> &'static Path {
    Path::new(env!("CARGO_MANIFEST_DIR"))
}

fn collect(folder: &Path, paths: &mut Vec<PathBuf>) {
    let Ok(entries) = fs::read_dir(folder) else {
        return;
    };
    for entry in entries {
        let path = entry.unwrap().path();
        if path.is_dir() {
            collect(&path, paths);
        } else if path.extension().is_some_and(|ending| ending == "rs") {
            paths.push(path);
        }
    }
}
