//! The model book: every model that has a name, and the one for requests that name none.

use crate::model::{DEFAULT_MODEL, Declaration, ModelFault, PUBLISHED_SETS, PublishedSet, Spec};
use std::collections::HashMap;

/// The shipped published sets and the operator's own models.
#[derive(Clone, Debug)]
pub struct ModelBook {
    entries: Vec<Entry>,
    places: HashMap<String, usize>,
    default: String,
}

/// A model with a name.
#[derive(Clone, Debug)]
pub struct Entry {
    /// The name under which requests ask for it.
    pub name: String,
    /// What it is, for a person.
    pub title: String,
    /// Who stands for its numbers.
    pub provenance: Provenance,
    /// The closed model.
    pub spec: Spec,
    /// The label of `spec`.
    pub fingerprint: String,
}

/// Who stands for the numbers of a model.
#[derive(Clone, Debug)]
pub enum Provenance {
    /// A published set of ours.
    Shipped(&'static PublishedSet),
    /// The operator, with the source that they give.
    Operator {
        /// Where the numbers come from, in the operator's words.
        source: Option<String>,
    },
}

/// Why a model cannot have a name.
#[derive(Clone, Debug, PartialEq, thiserror::Error)]
pub enum BookFault {
    /// The name has another form than names have.
    #[error(
        "a model name has 1 to 64 lower-case letters, digits and hyphens, and begins with no hyphen"
    )]
    MalformedName,
    /// The name is that of a route.
    #[error("this name is reserved")]
    ReservedName,
    /// The name belongs to a shipped model, whose numbers never change.
    #[error("this is the name of a shipped model, which keeps its numbers; choose another")]
    ShippedName,
    /// The name was given before.
    #[error("this name is given twice")]
    RepeatedName,
    /// No model has the name.
    #[error("no model has this name")]
    UnknownName,
    /// The numbers do not make a model.
    #[error("the model is not valid")]
    Model(Vec<ModelFault>),
}

impl ModelBook {
    /// What we ship, with its default.
    ///
    /// # Errors
    /// The faults of a shipped set, which a test excludes.
    pub fn shipped() -> Result<ModelBook, BookFault> {
        let mut book = ModelBook {
            entries: Vec::new(),
            places: HashMap::new(),
            default: DEFAULT_MODEL.to_owned(),
        };
        for set in PUBLISHED_SETS {
            let spec = set.spec().map_err(BookFault::Model)?;
            book.insert(
                set.name.to_owned(),
                set.title.to_owned(),
                Provenance::Shipped(set),
                spec,
            );
        }
        Ok(book)
    }

    /// Adds a model of the operator.
    ///
    /// # Errors
    /// If the name cannot be given, or the declaration does not make a model.
    pub fn add(
        &mut self,
        name: &str,
        declaration: &Declaration,
        title: Option<String>,
        source: Option<String>,
    ) -> Result<(), BookFault> {
        if !is_name(name) {
            return Err(BookFault::MalformedName);
        }
        if RESERVED.contains(&name) {
            return Err(BookFault::ReservedName);
        }
        match self.get(name).map(|entry| &entry.provenance) {
            Some(Provenance::Shipped(_)) => return Err(BookFault::ShippedName),
            Some(Provenance::Operator { .. }) => return Err(BookFault::RepeatedName),
            None => {}
        }
        let spec = declaration.close().map_err(BookFault::Model)?;
        let title = title.unwrap_or_else(|| name.to_owned());
        self.insert(
            name.to_owned(),
            title,
            Provenance::Operator { source },
            spec,
        );
        Ok(())
    }

    /// Makes `name` the model for requests that name none.
    ///
    /// # Errors
    /// [`BookFault::UnknownName`].
    pub fn set_default(&mut self, name: &str) -> Result<(), BookFault> {
        let entry = self.get(name).ok_or(BookFault::UnknownName)?;
        self.default = entry.name.clone();
        Ok(())
    }

    /// The model called `name`.
    pub fn get(&self, name: &str) -> Option<&Entry> {
        self.places
            .get(name)
            .and_then(|place| self.entries.get(*place))
    }

    /// The name of the model for requests that name none.
    pub fn default_name(&self) -> &str {
        &self.default
    }

    /// All models: the shipped ones in their order, then the operator's in theirs.
    pub fn iter(&self) -> impl Iterator<Item = &Entry> {
        self.entries.iter()
    }

    /// All names, in the order of [`ModelBook::iter`].
    pub fn names(&self) -> impl Iterator<Item = &str> {
        self.entries.iter().map(|entry| entry.name.as_str())
    }

    fn insert(&mut self, name: String, title: String, provenance: Provenance, spec: Spec) {
        let fingerprint = spec.fingerprint();
        self.places.insert(name.clone(), self.entries.len());
        self.entries.push(Entry {
            name,
            title,
            provenance,
            spec,
            fingerprint,
        });
    }
}

/// Names under `/v1/models/` that are routes.
const RESERVED: &[&str] = &["describe"];

const LONGEST_NAME: usize = 64;

fn is_name(text: &str) -> bool {
    let plain = |byte: u8| byte.is_ascii_lowercase() || byte.is_ascii_digit();
    text.len() <= LONGEST_NAME
        && text.bytes().next().is_some_and(plain)
        && text.bytes().all(|byte| plain(byte) || byte == b'-')
}

#[cfg(test)]
#[allow(clippy::unwrap_used)]
mod tests {
    use super::*;

    fn flat() -> Declaration {
        Declaration {
            hubble_constant: 70.0,
            matter: 0.3,
            curvature: None,
            baryons: None,
            radiation: None,
            dark_energy: None,
        }
    }

    #[test]
    fn every_shipped_set_is_a_model_and_the_default_is_among_them() {
        let book = ModelBook::shipped().unwrap();
        assert_eq!(book.names().count(), PUBLISHED_SETS.len());
        assert!(book.names().all(is_name));
        assert!(book.get(book.default_name()).is_some());
    }

    #[test]
    fn the_operator_adds_models_and_names_the_default() {
        let mut book = ModelBook::shipped().unwrap();
        book.add(
            "larkfield-2026",
            &flat(),
            None,
            Some("survey paper II".to_owned()),
        )
        .unwrap();
        book.set_default("larkfield-2026").unwrap();
        assert_eq!(book.default_name(), "larkfield-2026");
        assert_eq!(
            book.get("larkfield-2026").unwrap().spec.hubble_constant,
            70.0
        );
        assert_eq!(book.set_default("larkfeld"), Err(BookFault::UnknownName));
    }

    #[test]
    fn names_that_cannot_be_given_are_refused() {
        let mut book = ModelBook::shipped().unwrap();
        for name in ["", "-a", "Larkfield", "a b", "a/b", "é", &"a".repeat(65)] {
            assert_eq!(
                book.add(name, &flat(), None, None),
                Err(BookFault::MalformedName),
                "{name}"
            );
        }
        assert_eq!(
            book.add("describe", &flat(), None, None),
            Err(BookFault::ReservedName)
        );
        assert_eq!(
            book.add(DEFAULT_MODEL, &flat(), None, None),
            Err(BookFault::ShippedName)
        );
        book.add("ours", &flat(), None, None).unwrap();
        assert_eq!(
            book.add("ours", &flat(), None, None),
            Err(BookFault::RepeatedName)
        );
        let impossible = Declaration {
            matter: -1.0,
            ..flat()
        };
        assert!(
            matches!(book.add("theirs", &impossible, None, None), Err(BookFault::Model(faults)) if !faults.is_empty())
        );
    }
}
