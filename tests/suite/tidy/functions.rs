//! Sizes of functions.

use super::source::sources;
use syn::spanned::Spanned;
use syn::visit::{self, Visit};

const LONGEST_FUNCTION: usize = 50;

/// Functions that may be longer (file and name), each with its reason.
const LONG_FUNCTIONS: &[(&str, &str, &str)] = &[];

#[test]
fn functions_are_short_enough_to_read() {
    let mut faults = Vec::new();
    let mut used = Vec::new();
    for source in sources(&["src"]) {
        let mut long = Long::default();
        long.visit_file(&syn::parse_file(&source.text).unwrap());
        for (name, lines) in long.functions {
            let excuse = LONG_FUNCTIONS
                .iter()
                .find(|(path, function, _)| *path == source.path && *function == name);
            match excuse {
                Some(excuse) => used.push(excuse),
                None => faults.push(format!("{}: {name} has {lines} lines", source.path)),
            }
        }
    }
    for excuse in LONG_FUNCTIONS {
        if !used.contains(&excuse) || excuse.2.is_empty() {
            faults.push(format!(
                "{excuse:?}: needs its excuse no more, or gives no reason"
            ));
        }
    }
    assert!(faults.is_empty(), "\n{}", faults.join("\n"));
}

#[derive(Default)]
struct Long {
    functions: Vec<(String, usize)>,
}

impl Long {
    /// Counts the body without its attributes and documentation.
    fn note(&mut self, signature: &syn::Signature, body: &syn::Block) {
        let lines = body.span().end().line + 1 - signature.span().start().line;
        if lines > LONGEST_FUNCTION {
            self.functions.push((signature.ident.to_string(), lines));
        }
    }
}

impl<'ast> Visit<'ast> for Long {
    fn visit_item_fn(&mut self, item: &'ast syn::ItemFn) {
        // A test may be one long list of cases.
        if item.attrs.iter().any(|attribute| {
            attribute
                .path()
                .segments
                .last()
                .is_some_and(|word| word.ident == "test")
        }) {
            return;
        }
        self.note(&item.sig, &item.block);
        visit::visit_item_fn(self, item);
    }

    fn visit_impl_item_fn(&mut self, item: &'ast syn::ImplItemFn) {
        self.note(&item.sig, &item.block);
        visit::visit_impl_item_fn(self, item);
    }
}
