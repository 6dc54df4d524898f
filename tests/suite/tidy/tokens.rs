//! What a file names: the first word of each path outside its tests, in code, attributes and macros.

use proc_macro2::{Delimiter, Group, TokenStream, TokenTree};
use std::collections::BTreeSet;

/// The rooms and crates that a file names, with the line of the first mention.
#[derive(Default)]
pub(super) struct Named {
    pub(super) rooms: BTreeSet<(String, usize)>,
    pub(super) crates: BTreeSet<(String, usize)>,
}

/// Reads `text`, the file of a module `depth` levels below the crate.
pub(super) fn named(text: &str, depth: usize) -> Named {
    let mut named = Named::default();
    let tokens: TokenStream = text.parse().unwrap();
    walk(tokens, depth, &mut named);
    named
}

fn walk(tokens: TokenStream, depth: usize, named: &mut Named) {
    let tokens: Vec<TokenTree> = tokens.into_iter().collect();
    let mut at = 0;
    while let Some(token) = tokens.get(at) {
        if is_test_attribute(&tokens, at) {
            at = after_item(&tokens, at + 2);
            continue;
        }
        if let TokenTree::Ident(word) = token {
            if !follows_path(&tokens, at) {
                name(&tokens, at, depth, named);
            }
            let module = word == "mod";
            if let (true, Some(TokenTree::Group(body))) = (module, tokens.get(at + 2)) {
                walk(body.stream(), depth + 1, named);
                at += 3;
                continue;
            }
        }
        // The braces of a `use` go on with a path whose start was noted.
        if let TokenTree::Group(group) = token
            && !(at >= 2 && is_path(&tokens, at - 2))
        {
            walk(group.stream(), depth, named);
        }
        at += 1;
    }
}

/// Notes what the path that starts at `at` names.
fn name(tokens: &[TokenTree], at: usize, depth: usize, named: &mut Named) {
    let line = tokens[at].span().start().line;
    let mut supers = 0;
    let mut next = at;
    while is_word(tokens.get(next), "super") && is_path(tokens, next + 1) {
        supers += 1;
        next += 3;
    }
    let from_root = if supers > 0 {
        supers >= depth
    } else {
        is_word(tokens.get(at), "crate")
    };
    if from_root {
        let target = if supers > 0 { next } else { at + 3 };
        named.rooms.extend(
            firsts(tokens.get(target))
                .into_iter()
                .map(|room| (room, line)),
        );
    } else if supers == 0
        && (is_path(tokens, at + 1) || at > 0 && is_word(tokens.get(at - 1), "use"))
    {
        named.crates.insert((tokens[at].to_string(), line));
    }
}

/// The first words of `a` or of `{a::b, c}`.
fn firsts(target: Option<&TokenTree>) -> Vec<String> {
    match target {
        Some(TokenTree::Ident(word)) => vec![word.to_string()],
        Some(TokenTree::Group(group)) => group_firsts(group),
        _ => Vec::new(),
    }
}

fn group_firsts(group: &Group) -> Vec<String> {
    let tokens: Vec<TokenTree> = group.stream().into_iter().collect();
    let starts = |at: usize| {
        at == 0 || matches!(&tokens[at - 1], TokenTree::Punct(mark) if mark.as_char() == ',')
    };
    (0..tokens.len())
        .filter(|&at| starts(at))
        .map(|at| tokens[at].to_string())
        .collect()
}

fn is_word(token: Option<&TokenTree>, word: &str) -> bool {
    matches!(token, Some(TokenTree::Ident(found)) if found == word)
}

fn is_mark(token: Option<&TokenTree>, mark: char) -> bool {
    matches!(token, Some(TokenTree::Punct(found)) if found.as_char() == mark)
}

fn is_path(tokens: &[TokenTree], at: usize) -> bool {
    is_mark(tokens.get(at), ':') && is_mark(tokens.get(at + 1), ':')
}

/// Whether the word at `at` goes on with a path that began earlier.
fn follows_path(tokens: &[TokenTree], at: usize) -> bool {
    at >= 3 && is_path(tokens, at - 2) && matches!(tokens[at - 3], TokenTree::Ident(_))
}

/// `#[cfg(test)]` at `at`.
fn is_test_attribute(tokens: &[TokenTree], at: usize) -> bool {
    is_mark(tokens.get(at), '#')
        && matches!(tokens.get(at + 1), Some(TokenTree::Group(group))
            if group.stream().to_string().replace(' ', "") == "cfg(test)")
}

/// The place after the item that goes on at `at`.
fn after_item(tokens: &[TokenTree], at: usize) -> usize {
    let ends = |token: &TokenTree| match token {
        TokenTree::Group(group) => group.delimiter() == Delimiter::Brace,
        TokenTree::Punct(mark) => mark.as_char() == ';',
        _ => false,
    };
    tokens
        .iter()
        .skip(at)
        .position(ends)
        .map_or(tokens.len(), |offset| at + offset + 1)
}

#[test]
fn paths_are_found_wherever_they_stand() {
    let text = "use crate::{model::Spec, wire}; use serde; use super::api::x;
        #[derive(thiserror::Error)] struct A(crate::jobs::B);
        mod inner { use super::super::page; use super::local; }
        fn f() { format!(\"{}\", libm::exp(1.0)); a::crate_like::tokio::b() }
        #[cfg(test)] mod tests { use axum::Router; use crate::serve::x; }";
    let found = named(text, 1);
    let words = |set: &BTreeSet<(String, usize)>| {
        set.iter().map(|(word, _)| word.clone()).collect::<Vec<_>>()
    };
    assert_eq!(
        words(&found.rooms),
        ["api", "jobs", "model", "page", "wire"]
    );
    assert_eq!(words(&found.crates), ["a", "libm", "serde", "thiserror"]);
}
