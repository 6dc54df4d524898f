//! Ages that the sources of published sets print.

use redfathom::expansion::History;
use redfathom::model::{Declaration, PUBLISHED_SETS};

/// Of the printed standard deviation: posterior means of parameters do not give the mean of the age.
const SHARE_OF_ERROR: f64 = 0.1;

fn age(declaration: &Declaration) -> f64 {
    let history = History::build(&declaration.close().unwrap()).unwrap();
    history.age_today().unwrap() * history.hubble_time_gyr()
}

/// Half a unit of the last digit of a number as printed.
fn half_unit(value: f64) -> f64 {
    let text = value.to_string();
    let decimals = text.split_once('.').map_or(0, |parts| parts.1.len());
    0.5 * libm::pow(10.0, -f64::from(u32::try_from(decimals).unwrap()))
}

#[test]
fn printed_ages_follow_from_the_printed_parameters() {
    let mut compared = 0;
    for set in PUBLISHED_SETS {
        let Some(printed) = set.printed.age_gyr else {
            continue;
        };
        let declaration = set.declaration();
        let recomputed = age(&declaration);
        let moved = |change: fn(&mut Declaration, f64), by: f64| {
            let mut other = declaration.clone();
            change(&mut other, by);
            (age(&other) - recomputed).abs()
        };
        let rounding = moved(
            |d, by| d.hubble_constant += by,
            half_unit(declaration.hubble_constant),
        ) + moved(|d, by| d.matter += by, half_unit(declaration.matter))
            + half_unit(printed);
        let error = SHARE_OF_ERROR * set.printed.age_standard_deviation_gyr.unwrap_or(0.0);
        println!(
            "{:34} printed {printed}, recomputed {recomputed:.4}, allowed {:.4}",
            set.name,
            rounding + error
        );
        assert!(
            (recomputed - printed).abs() <= rounding + error,
            "{}: {recomputed}",
            set.name
        );
        compared += 1;
    }
    assert!(compared > 0);
}
