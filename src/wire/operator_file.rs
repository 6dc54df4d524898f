//! The operator's file: the team's own models and the default one.

use super::fault::Fault;
use super::json::{self, Bounds, Node};
use super::model::DeclaredModel;
use crate::model::Declaration;
use serde::Deserialize;
use serde::de::IgnoredAny;

/// The file as written.
#[derive(Clone, Debug, PartialEq)]
pub struct OperatorFile {
    /// The name of the model for requests that name none.
    pub default: Option<String>,
    /// The models in their order.
    pub models: Vec<OperatorModel>,
}

/// A model of the team.
#[derive(Clone, Debug, PartialEq)]
pub struct OperatorModel {
    /// Its name.
    pub name: String,
    /// Its numbers, unchecked.
    pub declaration: Declaration,
    /// What it is, for a person.
    pub title: Option<String>,
    /// Where its numbers come from.
    pub source: Option<String>,
}

/// Reads `{"default"?: name, "models"?: {name: a declared model with title? and source?}}`.
///
/// # Errors
/// The first fault of shape, with its pointer.
pub fn read(file: &[u8]) -> Result<OperatorFile, Fault> {
    let mut tree = json::tree(file, &Bounds::default())?;
    let models = match tree.take("models") {
        None => Vec::new(),
        Some(Node::Object(models)) => models,
        Some(other) => {
            let empty: Result<Empty, Fault> = json::shape(other);
            empty.map_err(|fault| fault.inside("models"))?;
            Vec::new()
        }
    };
    let rest: Rest = json::shape(tree)?;
    let models = models.into_iter().map(|(name, node)| {
        let read = model(&name, node);
        read.map_err(|fault| fault.inside(&name).inside("models"))
    });
    Ok(OperatorFile {
        default: rest.default,
        models: models.collect::<Result<_, _>>()?,
    })
}

/// What the file has beside its models.
#[derive(Deserialize)]
#[serde(deny_unknown_fields)]
struct Rest {
    default: Option<String>,
    /// Taken out before; named here so that a fault lists it.
    #[serde(rename = "models")]
    _models: Option<IgnoredAny>,
}

#[derive(Deserialize)]
struct Empty {}

fn model(name: &str, mut node: Node<'_>) -> Result<OperatorModel, Fault> {
    let mut text = |member: &str| {
        let text = node.take(member).map(json::shape::<String>).transpose();
        text.map_err(|fault| fault.inside(member))
    };
    let (title, source) = (text("title")?, text("source")?);
    let declared: DeclaredModel = json::shape(node)?;
    Ok(OperatorModel {
        name: name.to_owned(),
        declaration: declared.declaration(),
        title,
        source,
    })
}

#[cfg(test)]
#[allow(clippy::unwrap_used)]
mod tests {
    use super::read;

    #[test]
    fn a_file_becomes_models() {
        let file = br#"{"default": "larkfield-2026", "models": {
            "larkfield-2026": {"title": "Larkfield Deep Survey, 2026", "hubble_constant": 70, "matter": 0.3},
            "larkfield-2025": {"hubble_constant": 71, "matter": 0.28, "source": "survey paper I"}}}"#;
        let file = read(file).unwrap();
        assert_eq!(file.default.as_deref(), Some("larkfield-2026"));
        let names: Vec<_> = file
            .models
            .iter()
            .map(|model| model.name.as_str())
            .collect();
        assert_eq!(names, ["larkfield-2026", "larkfield-2025"]);
        assert_eq!(
            file.models[0].title.as_deref(),
            Some("Larkfield Deep Survey, 2026")
        );
        assert_eq!(file.models[1].declaration.hubble_constant, 71.0);
        assert_eq!(file.models[1].source.as_deref(), Some("survey paper I"));
    }

    #[test]
    fn a_bad_file_is_refused_with_its_pointer() {
        for (file, pointer) in [
            (r#"{"defualt": "a"}"#, "/defualt"),
            (r#"{"models": []}"#, "/models"),
            (
                r#"{"models": {"a/b": {"matter": 0.3}}}"#,
                "/models/a~1b/hubble_constant",
            ),
            (
                r#"{"models": {"a": {"hubble_constant": 70, "matter": 0.3, "title": 1}}}"#,
                "/models/a/title",
            ),
            (
                r#"{"models": {"a": {"hubble_constant": 70, "matter": 0.3, "wa": 1}}}"#,
                "/models/a/wa",
            ),
            (r#"{"models": {"a": "planck"}}"#, "/models/a"),
        ] {
            let fault = read(file.as_bytes()).unwrap_err();
            assert_eq!(fault.pointer(), Some(pointer), "{file}: {fault}");
        }
    }
}
