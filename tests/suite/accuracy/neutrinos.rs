//! The Fermi–Dirac integrals of massive neutrinos.

use redfathom::model::neutrinos;

use super::decimal::difference;
use super::references::{text, values};

/// Relative errors: a part of the promise of E² and of q.
const ENERGY: f64 = 4e-16;
const PRESSURE: f64 = 1e-15;

#[test]
fn energy_and_pressure_agree_with_the_integrals() {
    let file = text(&values().join("neutrinos.tsv"));
    let rows = file
        .lines()
        .skip_while(|line| !line.starts_with("y\t"))
        .skip(1);
    let (mut worst, mut worst_pressure) = ((0.0, 0.0), (0.0, 0.0));
    for row in rows {
        let cells: Vec<&str> = row.split('\t').collect();
        let y: f64 = cells[0].parse().unwrap();
        let error = |value: f64, reference: &str| {
            (difference(value, reference) / reference.parse::<f64>().unwrap()).abs()
        };
        let energy = error(neutrinos::energy(y), cells[1]);
        let pressure = error(neutrinos::pressure(y), cells[2]);
        if energy > worst.0 {
            worst = (energy, y);
        }
        if pressure > worst_pressure.0 {
            worst_pressure = (pressure, y);
        }
    }
    println!(
        "F: worst relative error {:.2e} at y = {:e}",
        worst.0, worst.1
    );
    println!(
        "G: worst relative error {:.2e} at y = {:e}",
        worst_pressure.0, worst_pressure.1
    );
    assert!(worst.0 <= ENERGY && worst_pressure.0 <= PRESSURE);
}
