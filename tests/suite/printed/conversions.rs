//! The statements, each put through the service's conversion in the printed units.

use std::collections::BTreeSet;

use redfathom::jobs::{Branch, Conversion, Output, Source, convert};
use redfathom::model::{Declaration, RadiationDeclaration};
use redfathom::quantity::{Unit, named};

use super::statements::{STATEMENTS, Statement};
use crate::accuracy::references::{history_of, matter_model};

fn recomputed(statement: &Statement) -> f64 {
    let (hubble_constant, matter) = statement.model;
    let history = history_of(&Declaration {
        radiation: statement
            .radiation
            .map(|(temperature, number)| RadiationDeclaration {
                cmb_temperature: Some(temperature),
                effective_neutrino_number: Some(number),
                neutrino_masses: Vec::new(),
            }),
        ..matter_model(hubble_constant, matter, true)
    });
    let (from, from_unit, value) = statement.from;
    let (to, to_unit) = statement.to;
    let conversion = Conversion {
        history: &history,
        from: Source {
            quantity: named(from).unwrap(),
            values: &[value],
            unit: Unit::parse(from_unit).unwrap(),
            per_h: false,
            branch: Branch::Number(1),
        },
        to: vec![Output {
            unit: Unit::parse(to_unit).unwrap(),
            ..Output::plain(named(to).unwrap())
        }],
        future: false,
    };
    convert(&conversion).unwrap().columns[0].values[0]
}

#[test]
fn printed_statements_are_reproduced() {
    let mut wrong = Vec::new();
    for statement in STATEMENTS {
        let value = recomputed(statement);
        println!(
            "{value:12.6e} {:10} {} ({})",
            statement.to.1, statement.statement, statement.source
        );
        // Printed values that end in 5 were rounded either way.
        if (value - statement.printed).abs() > statement.half_unit * (1.0 + 1e-9) {
            wrong.push(format!("{}: {value}", statement.statement));
        }
    }
    assert!(wrong.is_empty(), "{wrong:#?}");
    let quantities: BTreeSet<&str> = STATEMENTS
        .iter()
        .flat_map(|statement| [statement.from.0, statement.to.0])
        .collect();
    assert!(
        STATEMENTS.len() >= 25 && quantities.len() >= 6,
        "{} of {quantities:?}",
        STATEMENTS.len()
    );
}
