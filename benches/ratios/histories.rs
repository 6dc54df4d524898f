//! Tables of models: making them, reading them, inverting them.

use super::processor::Worker;
use super::rounds::{Case, Ratio, compare};
use super::server::{Server, get};
use super::singles::hello;
use redfathom::expansion::{Curve, Epochs, History, Wanted};
use redfathom::model::{Declaration, RadiationDeclaration, Spec};
use std::hint::black_box;
use std::sync::Arc;

const BUILDS: usize = 20;
const VALUES: usize = 100_000;

/// Compares the making of tables, with its check, with a hello over HTTP.
pub(crate) fn building(rounds: usize) {
    let mut server = Server::new(hello());
    let worker = Worker::new();
    let request = get("/");
    let build = |masses: &[f64]| {
        let (spec, worker) = (spec(masses), &worker);
        move || {
            let spec = spec.clone();
            let job =
                move || (0..BUILDS).for_each(|_| drop(black_box(History::build(black_box(&spec)))));
            worker.time_ns(job) as f64 / BUILDS as f64 / 1e3
        }
    };
    let mut cases = [
        Case {
            name: "hello",
            measure: Box::new(move || server.cost_ns(&request, 300) / 1e3),
        },
        Case {
            name: "build, Λ with radiation",
            measure: Box::new(build(&[])),
        },
        Case {
            name: "build, one massive neutrino",
            measure: Box::new(build(&[0.06])),
        },
        Case {
            name: "build, three massive neutrinos",
            measure: Box::new(build(&[0.01, 0.02, 0.06])),
        },
    ];
    let ratios = [
        Ratio {
            case: "build, Λ with radiation",
            to: "hello",
            goal: 25.0,
        },
        Ratio {
            case: "build, one massive neutrino",
            to: "hello",
            goal: 50.0,
        },
        Ratio {
            case: "build, three massive neutrinos",
            to: "hello",
            goal: 50.0,
        },
    ];
    compare(
        "Tables of a model, made and checked",
        "µs",
        rounds,
        &mut cases,
        &ratios,
    );
    for (name, masses) in [
        ("Λ with radiation", &[][..]),
        ("one massive neutrino", &[0.06]),
    ] {
        let bytes = History::build(&spec(masses))
            .expect("a usual model")
            .bytes();
        println!(
            "  {:<44}{bytes:>12} bytes   aim 65536",
            format!("tables, {name}")
        );
    }
}

/// Something to do with tables and redshifts.
type Job = Box<dyn Fn(&History, &[f64]) + Send + Sync>;

/// Compares the reading of tables with a logarithm over the same array.
pub(crate) fn evaluation(rounds: usize) {
    let history = Arc::new(History::build(&spec(&[0.06])).expect("a usual model"));
    let redshifts: Arc<Vec<f64>> = Arc::new(spread(VALUES));
    let worker = Worker::new();
    let timed = |job: Job| {
        let (history, redshifts, worker, job) = (
            Arc::clone(&history),
            Arc::clone(&redshifts),
            &worker,
            Arc::new(job),
        );
        move || {
            let (history, redshifts, job) = (
                Arc::clone(&history),
                Arc::clone(&redshifts),
                Arc::clone(&job),
            );
            worker.time_ns(move || job(&history, &redshifts)) as f64 / VALUES as f64
        }
    };
    let reading = |wanted: Wanted| {
        timed(Box::new(move |history, redshifts| {
            let mut epochs = Epochs::default();
            history.epochs(redshifts, wanted, &mut epochs);
            black_box(&epochs);
        }))
    };
    let inverting = |curve: Curve, values: Vec<f64>| {
        let (history, values, worker) = (Arc::clone(&history), Arc::new(values), &worker);
        move || {
            let (history, values) = (Arc::clone(&history), Arc::clone(&values));
            let job = move || {
                let mut redshifts = Vec::new();
                history.invert(curve, &values, &mut redshifts);
                black_box(&redshifts);
            };
            worker.time_ns(job) as f64 / VALUES as f64
        }
    };
    let mut curves = Epochs::default();
    history.epochs(&redshifts, Wanted::ALL, &mut curves);
    let none = Wanted::default();
    let mut cases = [
        Case {
            name: "f64::ln_1p",
            measure: Box::new(timed(Box::new(|_, redshifts| logarithms(redshifts)))),
        },
        Case {
            name: "age",
            measure: Box::new(reading(Wanted { age: true, ..none })),
        },
        Case {
            name: "comoving distance",
            measure: Box::new(reading(Wanted {
                comoving: true,
                ..none
            })),
        },
        Case {
            name: "redshift of an age",
            measure: Box::new(inverting(Curve::Age, curves.age)),
        },
        Case {
            name: "redshift of a distance",
            measure: Box::new(inverting(Curve::Comoving, curves.comoving)),
        },
    ];
    let ratios = [
        Ratio {
            case: "age",
            to: "f64::ln_1p",
            goal: 1.5,
        },
        Ratio {
            case: "comoving distance",
            to: "f64::ln_1p",
            goal: 1.5,
        },
        Ratio {
            case: "redshift of an age",
            to: "f64::ln_1p",
            goal: 20.0,
        },
        Ratio {
            case: "redshift of a distance",
            to: "f64::ln_1p",
            goal: 20.0,
        },
    ];
    compare("Tables, read", "ns per value", rounds, &mut cases, &ratios);
}

/// The yardstick: the platform's own logarithm.
#[allow(clippy::disallowed_methods)]
fn logarithms(redshifts: &[f64]) {
    black_box(
        redshifts
            .iter()
            .map(|redshift| redshift.ln_1p())
            .collect::<Vec<_>>(),
    );
}

/// Redshifts between 0.001 and 10.001 in no order, as full as a measurement's digits are.
pub(crate) fn spread(count: usize) -> Vec<f64> {
    const GOLDEN: f64 = 0.618_033_988_749_894_9;
    (0..count)
        .map(|index| 0.001 + 10.0 * (index as f64 * GOLDEN).fract())
        .collect()
}

/// A flat model with photons and neutrinos.
fn spec(masses: &[f64]) -> Spec {
    let radiation = RadiationDeclaration {
        cmb_temperature: Some(2.7255),
        effective_neutrino_number: Some(3.046),
        neutrino_masses: masses.to_vec(),
    };
    let declaration = Declaration {
        hubble_constant: 67.0,
        matter: 0.31,
        curvature: None,
        baryons: Some(0.049),
        radiation: Some(radiation),
        dark_energy: None,
    };
    declaration.close().expect("a usual model")
}
