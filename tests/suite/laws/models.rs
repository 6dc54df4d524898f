//! Random models and redshifts, and the laws' ways of reading quantities.

use proptest::collection::vec;
use proptest::prelude::*;
use redfathom::expansion::History;
use redfathom::model::{DarkEnergyDeclaration, Declaration, RadiationDeclaration};
use redfathom::quantity::{Frame, QUANTITIES, Quantity, named};

use crate::accuracy::references::whole;

/// A model somebody may declare; the few that are impossible are drawn again.
pub(super) fn declarations() -> impl Strategy<Value = Declaration> {
    let curvature = prop_oneof![Just(None), (-0.3..0.5_f64).prop_map(Some)];
    let masses = vec(prop_oneof![Just(0.0), 1e-3..0.6_f64], 0..=3);
    let radiation = (0.1..8.0_f64, prop_oneof![Just(0.0), 0.5..6.0_f64], masses).prop_map(
        |(temperature, number, masses)| RadiationDeclaration {
            cmb_temperature: Some(temperature),
            effective_neutrino_number: Some(number),
            neutrino_masses: if number == 0.0 { Vec::new() } else { masses },
        },
    );
    let radiation = prop_oneof![1 => Just(None), 3 => radiation.prop_map(Some)];
    let form = |name: &str, parameters| {
        Some(DarkEnergyDeclaration {
            form: name.to_owned(),
            density: None,
            parameters,
        })
    };
    let dark_energy = prop_oneof![
        2 => Just(None),
        1 => Just(form("none", Vec::new())),
        3 => (-1.6..0.3_f64).prop_map(move |w| form("constant", vec![("w".to_owned(), w)])),
    ];
    (
        30.0..150.0_f64,
        0.1..1.2_f64,
        curvature,
        radiation,
        dark_energy,
    )
        .prop_map(
            |(hubble_constant, matter, curvature, radiation, dark_energy)| Declaration {
                hubble_constant,
                matter,
                curvature: if dark_energy.as_ref().is_some_and(|form| form.form == "none") {
                    None
                } else {
                    curvature
                },
                baryons: None,
                radiation,
                dark_energy,
            },
        )
}

/// Histories of such models.
pub(super) fn histories() -> impl Strategy<Value = History> {
    declarations().prop_filter_map("impossible", |declaration| {
        History::build(&declaration.close().ok()?).ok()
    })
}

/// Redshifts over all magnitudes, ascending.
pub(super) fn redshifts() -> impl Strategy<Value = Vec<f64>> {
    vec(
        (-8.0..9.0_f64).prop_map(|power| libm::pow(10.0, power)),
        1..12,
    )
    .prop_map(sorted)
}

fn sorted(mut values: Vec<f64>) -> Vec<f64> {
    values.sort_by(f64::total_cmp);
    values
}

/// Those of the redshifts that a history is told for.
pub(super) fn inside(history: &History, redshifts: &[f64]) -> Vec<f64> {
    let (low, high) = history.range();
    redshifts
        .iter()
        .copied()
        .filter(|z| (low..=high).contains(z))
        .collect()
}

/// A quantity at a redshift; NaN where the model does not define it.
pub(super) fn value(history: &History, name: &str, z: f64) -> f64 {
    let quantity = named(name).unwrap();
    if (quantity.undefined)(history.spec()).is_some() {
        return f64::NAN;
    }
    quantity.at(z, &Frame::of(history))
}

/// The quantities a model defines.
pub(super) fn defined(history: &History) -> impl Iterator<Item = &'static Quantity> {
    QUANTITIES
        .iter()
        .filter(|quantity| (quantity.undefined)(history.spec()).is_none())
}

/// Runs a law on the models of the references as well.
pub(super) fn on_references(law: impl Fn(&History, &[f64])) {
    for model in whole() {
        let redshifts: Vec<f64> = model.table.rows.iter().map(|row| row.0).collect();
        law(&model.history, &redshifts);
    }
}

/// |a − b| within a share of a scale, or both without a value.
#[track_caller]
pub(super) fn near(a: f64, b: f64, share: f64, scale: f64, what: &str) {
    if a.is_nan() && b.is_nan() || a == b {
        return;
    }
    assert!((a - b).abs() <= share * scale.abs(), "{what}: {a} and {b}");
}

/// How many random models each law sees; nothing is written beside the tests.
pub(super) fn config() -> ProptestConfig {
    ProptestConfig {
        failure_persistence: None,
        ..ProptestConfig::with_cases(48)
    }
}
