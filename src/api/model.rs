//! The model of a request: found by its name or closed from its numbers, then made ready.

use super::State;
use crate::expansion::{History, HistoryFault};
use crate::jobs::PrintedEpochs;
use crate::model::Spec;
use crate::prepared::{Entry, ModelBook, Overloaded, Provenance, Unprepared};
use crate::wire::model::{Model, ModelEcho, ModelEntry, SpecEcho, model_faults};
use crate::wire::{Code, Fault, NameOr, meant};
use std::borrow::Cow;
use std::collections::HashMap;
use std::sync::Arc;

/// A checked model with what an answer says of it.
#[derive(Debug)]
pub(super) struct Chosen<'a> {
    name: Option<&'a str>,
    status: Option<&'static str>,
    defaulted: bool,
    /// The label of its spec.
    pub fingerprint: Cow<'a, str>,
    spec: Cow<'a, Spec>,
    /// What its paper prints.
    pub printed: PrintedEpochs,
}

impl<'a> Chosen<'a> {
    /// The model that a request names or declares, or the default one.
    ///
    /// # Errors
    /// `unknown_model`, or all faults of the declaration.
    pub(super) fn of(state: &'a State, model: Option<Model>) -> Result<Chosen<'a>, Vec<Fault>> {
        match model.map(|model| model.0) {
            None => {
                let name = state.models.default_name();
                let entry = state
                    .models
                    .get(name)
                    .ok_or_else(|| vec![unknown(state, name)])?;
                Ok(Chosen {
                    defaulted: true,
                    ..Chosen::named(entry)
                })
            }
            Some(NameOr::Name(name)) => {
                let entry = state
                    .models
                    .get(&name)
                    .ok_or_else(|| vec![unknown(state, &name)])?;
                Ok(Chosen::named(entry))
            }
            Some(NameOr::Object(declared)) => {
                let closed = declared.declaration().close();
                let spec = closed.map_err(|faults| model_faults(&faults, "/model"))?;
                Ok(Chosen {
                    name: None,
                    status: None,
                    defaulted: false,
                    fingerprint: spec.fingerprint().into(),
                    spec: Cow::Owned(spec),
                    printed: PrintedEpochs::default(),
                })
            }
        }
    }

    fn named(entry: &'a Entry) -> Chosen<'a> {
        Chosen {
            name: Some(&entry.name),
            status: Some(status(&entry.provenance)),
            defaulted: false,
            fingerprint: Cow::Borrowed(&entry.fingerprint),
            spec: Cow::Borrowed(&entry.spec),
            printed: match &entry.provenance {
                Provenance::Shipped(set) => PrintedEpochs {
                    decoupling_redshift: set.printed.decoupling_redshift,
                    drag_redshift: set.printed.drag_redshift,
                },
                Provenance::Operator { .. } => PrintedEpochs::default(),
            },
        }
    }

    /// Its tables.
    ///
    /// # Errors
    /// Why they can't be made, or `overloaded`.
    pub(super) async fn history(&self, state: &State) -> Result<Arc<History>, Fault> {
        state.prepared.history(&self.spec).await.map_err(unprepared)
    }

    /// What the answer says of it.
    pub(super) fn echo(&self) -> ModelEcho<'_> {
        ModelEcho {
            name: self.name,
            status: self.status,
            defaulted: self.defaulted.then_some(true),
            fingerprint: &self.fingerprint,
            spec: SpecEcho(&self.spec),
        }
    }

    /// The same, written.
    pub(crate) fn written(&self, state: &'a State) -> Cow<'a, str> {
        let kept = self
            .name
            .and_then(|name| state.echoes.get(name, self.defaulted));
        kept.map_or_else(|| text(&self.echo()).into(), Cow::Borrowed)
    }

    /// Its name and its fingerprint, as far as it has them.
    pub(super) fn label(&self) -> String {
        match self.name {
            Some(name) => format!("{name} ({})", self.fingerprint),
            None => format!("declared model ({})", self.fingerprint),
        }
    }
}

/// What answers say of the named models, written once.
#[derive(Clone, Debug, Default)]
pub struct Echoes {
    /// By name; first where the request names the model, then where it is the default.
    written: HashMap<String, [String; 2]>,
}

impl Echoes {
    /// Of all models of a book.
    pub fn of(models: &ModelBook) -> Echoes {
        let echo = |entry| {
            let named = Chosen::named(entry);
            let defaulted = Chosen {
                defaulted: true,
                ..Chosen::named(entry)
            };
            [text(&named.echo()), text(&defaulted.echo())]
        };
        Echoes {
            written: models
                .iter()
                .map(|entry| (entry.name.clone(), echo(entry)))
                .collect(),
        }
    }

    fn get(&self, name: &str, defaulted: bool) -> Option<&str> {
        let [named, default] = self.written.get(name)?;
        Some(if defaulted { default } else { named })
    }
}

/// Small and without maps of other keys than strings: it can be written.
fn text(echo: &ModelEcho<'_>) -> String {
    serde_json::to_string(echo).unwrap_or_default()
}

/// How well the numbers of a named model were checked against their source.
pub(super) fn status(provenance: &Provenance) -> &'static str {
    match provenance {
        Provenance::Shipped(set) => set.status.name(),
        Provenance::Operator { .. } => "operator",
    }
}

/// What the list says of a model that has a name.
pub(crate) fn entry(entry: &Entry) -> ModelEntry<'_> {
    let plain = ModelEntry {
        name: &entry.name,
        title: &entry.title,
        status: status(&entry.provenance),
        fingerprint: &entry.fingerprint,
        spec: SpecEcho(&entry.spec),
        source: None,
        table: "",
        column: "",
        note: "",
        uncertainty: None,
        printed: None,
    };
    match &entry.provenance {
        Provenance::Shipped(set) => plain.published(set),
        Provenance::Operator { source } => ModelEntry {
            source: source.clone(),
            ..plain
        },
    }
}

/// The refusal of a name that no model has; its place is for the caller to say.
pub(super) fn no_such_model(state: &State, code: Code, name: &str) -> Fault {
    let shown: String = name.chars().take(64).collect();
    let meant = meant(name, state.models.names());
    let names: Vec<_> = state.models.names().collect();
    Fault::new(code, format!("there is no model \"{shown}\"{meant}"))
        .value(name)
        .allowed(names.join(", "))
}

fn unknown(state: &State, name: &str) -> Fault {
    no_such_model(state, Code::UnknownModel, name).at("/model")
}

fn unprepared(fault: Unprepared) -> Fault {
    match fault {
        Unprepared::Overloaded(fault) => overloaded(fault),
        Unprepared::History(fault) => {
            let code = match fault {
                HistoryFault::Indeterminate { .. } => Code::IndeterminateModel,
                HistoryFault::TooCostly { .. } => Code::ModelTooCostly,
            };
            Fault::new(code, fault.to_string()).at("/model")
        }
    }
}

/// The refusal of work when too much is waiting.
pub(super) fn overloaded(fault: Overloaded) -> Fault {
    Fault::new(Code::Overloaded, fault.to_string())
}
