//! Module lists against folders: a file that nothing declares is neither compiled nor formatted.

use super::source::{Source, sources};
use std::collections::BTreeSet;

#[test]
fn every_file_is_declared_plainly_by_its_folder() {
    for folder in ["src", "tests/suite", "benches"] {
        let sources = sources_of(folder);
        for source in &sources {
            if let Some(owner) = owner(source, folder, &sources) {
                assert!(
                    declared(owner).contains(&module(source)),
                    "{} is not in {}",
                    source.path,
                    owner.path
                );
            }
        }
    }
}

#[test]
fn a_module_with_files_of_its_own_is_a_folder_with_mod_rs() {
    let sources = sources(&["src", "tests/suite"]);
    let paths: BTreeSet<_> = sources.iter().map(|source| source.path.as_str()).collect();
    for source in &sources {
        let (folder, _) = source.path.rsplit_once('/').unwrap();
        assert!(
            !paths.contains(format!("{folder}.rs").as_str()),
            "{folder} is a file and a folder"
        );
    }
}

fn sources_of(folder: &str) -> Vec<Source> {
    if super::source::root().join(folder).is_dir() {
        sources(&[folder])
    } else {
        Vec::new()
    }
}

/// The file that must declare `source`: `mod.rs` beside it, or the crate's root.
fn owner<'a>(source: &Source, top: &str, all: &'a [Source]) -> Option<&'a Source> {
    let (mut folder, file) = source.path.rsplit_once('/')?;
    if file == "mod.rs" {
        folder = folder.rsplit_once('/')?.0;
    }
    let roots: &[&str] = if folder == top {
        &["lib.rs", "main.rs"]
    } else {
        &["mod.rs", "main.rs"]
    };
    let owner = roots.iter().find_map(|root| {
        all.iter()
            .find(|any| any.path == format!("{folder}/{root}"))
    })?;
    let is_root = folder == top && ["lib.rs", "main.rs"].contains(&file);
    (owner.path != source.path && !is_root).then_some(owner)
}

/// The name under which a file is declared.
fn module(source: &Source) -> String {
    source
        .words()
        .filter(|word| *word != "mod")
        .last()
        .unwrap()
        .to_owned()
}

fn declared(owner: &Source) -> BTreeSet<String> {
    let file = syn::parse_file(&owner.text).unwrap();
    let plain = |item: syn::Item| match item {
        syn::Item::Mod(module) if module.content.is_none() => Some(module.ident.to_string()),
        _ => None,
    };
    file.items.into_iter().filter_map(plain).collect()
}
