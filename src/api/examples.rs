//! The requests that the OpenAPI document shows; a test sends each of them.

use crate::expansion::History;
use crate::jobs::{PrintedEpochs, convert};
use crate::wire::NameOr;
use crate::wire::convert::{ConvertRequest, Size, written};
use crate::wire::json::{self, Bounds};
use crate::wire::model::{ModelEcho, SpecEcho};
use serde_json::Value;

/// Redshifts of the Larkfield Deep Survey, one of them missing.
pub(super) const CATALOGUE: &str = r#"{
  "model": "planck-2018-cmb-lensing",
  "from": {"quantity": "redshift", "values": [0.5, 1.2, null]},
  "to": ["age", "luminosity_distance", {"quantity": "angular_scale"}]
}"#;

/// An age under the default model.
pub(super) const EPOCH: &str = r#"{
  "from": {"quantity": "age", "values": 3.0},
  "to": ["redshift"]
}"#;

/// A declared model and other units.
pub(super) const DECLARED: &str = r#"{
  "model": {"hubble_constant": 70.0, "matter": 0.3, "dark_energy": {"form": "constant", "w": -0.9}},
  "from": {"quantity": "redshift", "values": [0.5, 1.2]},
  "to": [{"quantity": "age", "unit": "Myr"}, {"quantity": "comoving_distance", "unit": "Mpc", "per_h": true}]
}"#;

/// A distance that two redshifts have.
pub(super) const BRANCHES: &str = r#"{
  "model": {"hubble_constant": 70.0, "matter": 0.3},
  "from": {"quantity": "angular_diameter_distance", "values": [1500.0], "unit": "Mpc", "branch": "all"},
  "to": ["redshift"]
}"#;

/// A model by its name.
pub(super) const NAMED_MODEL: &str = r#"{"model": "planck-2018-cmb-lensing"}"#;

/// A model of matter alone.
pub(super) const DECLARED_MODEL: &str = r#"{
  "model": {"hubble_constant": 70.0, "matter": 1.0, "dark_energy": {"form": "none"}}
}"#;

/// An example as a value.
pub(super) fn value(text: &str) -> Value {
    serde_json::from_str(text).unwrap_or_default()
}

/// The answer to [`DECLARED`], as the service gives it: the same bits on every machine.
pub(super) fn answer() -> Value {
    answer_to(DECLARED).unwrap_or_default()
}

fn answer_to(body: &str) -> Option<Value> {
    let request: ConvertRequest = json::read(body.as_bytes(), &Bounds::default()).ok()?;
    let size = Size {
        values: 10,
        results: 100,
    };
    let mut asked = request.resolve(size).ok()?;
    let NameOr::Object(declared) = asked.model.take()?.0 else {
        return None;
    };
    let history = History::build(&declared.declaration().close().ok()?).ok()?;
    let converted = convert(&asked.conversion(&history, PrintedEpochs::default()).ok()?).ok()?;
    let fingerprint = history.spec().fingerprint();
    let echo = ModelEcho {
        name: None,
        status: None,
        defaulted: None,
        fingerprint: &fingerprint,
        spec: SpecEcho(history.spec()),
    };
    let echo = serde_json::to_string(&echo).ok()?;
    serde_json::from_slice(&written(&echo, &asked.from, converted).whole()).ok()
}
