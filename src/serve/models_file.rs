//! The operator's file of models: read once, at start; anything wrong in it stops the start.

use crate::prepared::{BookFault, ModelBook};
use crate::wire::{Fault, operator_file};
use std::fs;
use std::path::{Path, PathBuf};

/// Why there is no model book.
#[derive(Debug, thiserror::Error)]
pub(super) enum ModelsFault {
    /// The file cannot be read.
    #[error("{}: {fault}", path.display())]
    Unreadable {
        /// The file.
        path: PathBuf,
        /// What the system says.
        fault: std::io::Error,
    },
    /// Something in the file is wrong.
    #[error("{}: {}: {detail}", path.display(), if pointer.is_empty() { "the whole file" } else { pointer })]
    Wrong {
        /// The file.
        path: PathBuf,
        /// The place, as a JSON pointer.
        pointer: String,
        /// What is wrong with it.
        detail: String,
    },
    /// A shipped set does not make a model, which our own tests exclude.
    #[error("a shipped model: {0}")]
    Shipped(BookFault),
    /// The default that flag or environment name is unknown.
    #[error("--default-model {name}: no model has this name; known are {known}")]
    UnknownDefault {
        /// The name.
        name: String,
        /// All names.
        known: String,
    },
}

/// The shipped models, those of `file`, and the default: `chosen`, else the file's, else the shipped one.
pub(super) fn open(file: Option<&Path>, chosen: Option<&str>) -> Result<ModelBook, ModelsFault> {
    let mut book = ModelBook::shipped().map_err(ModelsFault::Shipped)?;
    if let Some(path) = file {
        add(&mut book, path)?;
    }
    if let Some(name) = chosen {
        book.set_default(name)
            .map_err(|_| ModelsFault::UnknownDefault {
                name: name.to_owned(),
                known: book.names().collect::<Vec<_>>().join(", "),
            })?;
    }
    Ok(book)
}

/// What is wrong, with what would be right.
fn told(fault: &Fault) -> String {
    match &fault.allowed {
        Some(allowed) => format!("{fault} (allowed: {allowed})"),
        None => fault.to_string(),
    }
}

fn add(book: &mut ModelBook, path: &Path) -> Result<(), ModelsFault> {
    let wrong = |pointer: String, detail: String| ModelsFault::Wrong {
        path: path.to_owned(),
        pointer,
        detail,
    };
    let text = fs::read(path).map_err(|fault| ModelsFault::Unreadable {
        path: path.to_owned(),
        fault,
    })?;
    let file = operator_file::read(&text)
        .map_err(|fault| wrong(fault.pointer().unwrap_or_default().to_owned(), told(&fault)))?;
    for model in file.models {
        // No name that can be given needs escaping, but this may be another.
        let pointer = format!(
            "/models/{}",
            model.name.replace('~', "~0").replace('/', "~1")
        );
        let added = book.add(&model.name, &model.declaration, model.title, model.source);
        added.map_err(|fault| match fault {
            // The first is enough to find the place; all of them stand in one line.
            BookFault::Model(faults) => {
                let place = faults.first().map_or("", |fault| fault.pointer.as_str());
                let details: Vec<_> = faults.iter().map(|fault| fault.detail.as_str()).collect();
                wrong(format!("{pointer}{place}"), details.join("; "))
            }
            other => wrong(pointer, other.to_string()),
        })?;
    }
    if let Some(name) = file.default {
        book.set_default(&name).map_err(|fault| {
            let known: Vec<_> = book.names().collect();
            let detail = format!("{name}: {fault}; known are {}", known.join(", "));
            wrong("/default".to_owned(), detail)
        })?;
    }
    Ok(())
}
