//! Conversions and descriptions of invented models.
#![allow(clippy::unwrap_used, clippy::panic)]

mod back;
mod described;
mod reach;
mod requests;
mod rows;

use super::*;
use crate::expansion::History;
use crate::model::{DarkEnergyDeclaration, Declaration, RadiationDeclaration};
use crate::quantity::{QUANTITIES, Quantity, Unit, named};

fn build(declaration: &Declaration) -> History {
    History::build(&declaration.close().unwrap()).unwrap()
}

fn plain(matter: f64, curvature: f64) -> History {
    build(&Declaration {
        hubble_constant: 70.0,
        matter,
        curvature: Some(curvature),
        ..Declaration::default()
    })
}

fn with_radiation() -> History {
    let radiation = RadiationDeclaration {
        cmb_temperature: Some(2.7255),
        effective_neutrino_number: Some(3.046),
        neutrino_masses: vec![0.06],
    };
    build(&Declaration {
        hubble_constant: 67.36,
        matter: 0.3153,
        baryons: Some(0.049_302),
        radiation: Some(radiation),
        ..Declaration::default()
    })
}

fn quantity(name: &str) -> &'static Quantity {
    named(name).unwrap()
}

fn source<'a>(name: &str, values: &'a [f64]) -> Source<'a> {
    let quantity = quantity(name);
    Source {
        quantity,
        values,
        unit: quantity.default_unit(),
        per_h: false,
        branch: Branch::Number(1),
    }
}

fn conversion<'a>(history: &'a History, from: Source<'a>, to: &[&str]) -> Conversion<'a> {
    let to = to
        .iter()
        .map(|name| Output::plain(quantity(name)))
        .collect();
    Conversion {
        history,
        from,
        to,
        future: false,
    }
}

fn codes(converted: &Converted, row: usize) -> Vec<&'static str> {
    converted.remarks.row_codes(row).map(Code::name).collect()
}
