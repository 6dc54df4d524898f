//! The error of one value, and what the catalogue allows it.

use redfathom::quantity::{Quantity, Tolerance};

use super::decimal::{difference, ulp};
use super::references::{Cell, Reference};

/// Below this |z| differences keep their relative accuracy.
const NEAR_TODAY: f64 = 1e-2;

/// The error of one value and its bound, in the same unit.
pub(super) struct Error {
    pub error: f64,
    pub allowed: f64,
    /// The condition that the bound was widened by.
    pub condition: f64,
    /// The reference as a double.
    pub reference: f64,
}

/// The values of one row of a reference that bounds of other quantities need.
pub(super) struct Row<'a> {
    pub model: &'a Reference,
    pub redshift: f64,
    pub cells: &'a [Cell],
}

impl Row<'_> {
    fn cell(&self, name: &str) -> Option<(f64, f64)> {
        match &self.cells[self.model.table.column(name)?] {
            Cell::Value { text, condition } => Some((text.parse().unwrap(), *condition)),
            _ => None,
        }
    }

    fn value(&self, name: &str) -> f64 {
        self.cell(name).map_or(0.0, |cell| cell.0)
    }

    /// The larger of the two terms whose difference the quantity is.
    fn larger_term(&self, name: &str) -> f64 {
        let stretch = 1.0 + self.redshift;
        let hubble_constant = self.model.spec.hubble_constant;
        // One km/s/Mpc in 1/yr.
        let per_year = 1.022_712_165_045_695e-12;
        match name {
            "redshift_drift" => {
                per_year * (hubble_constant * stretch).max(self.value("hubble_parameter"))
            }
            "velocity_drift" => {
                let rate = self.value("hubble_parameter") / stretch;
                2.997_924_58e10 * per_year * hubble_constant.max(rate)
            }
            "deceleration_parameter" => {
                let w = self.value("equation_of_state");
                let dark = 0.5 * (1.0 + 3.0 * w) * self.value("dark_energy_fraction");
                let braking =
                    0.5 * self.value("matter_fraction") + self.value("radiation_fraction");
                dark.abs().max(braking)
            }
            _ => panic!("{name} is no difference of two terms"),
        }
    }

    /// Compares a value with the reference.
    pub(super) fn error(&self, quantity: &Quantity, value: f64, cell: (&str, f64)) -> Error {
        let (text, condition) = cell;
        let reference: f64 = text.parse().unwrap();
        let error = difference(value, text).abs();
        let (allowed, condition) = match quantity.tolerance {
            Tolerance::Relative(relative) => (relative * reference.abs() * condition, condition),
            Tolerance::Absolute(absolute) => {
                let inside = self.cell("luminosity_distance").map_or(1.0, |cell| cell.1);
                ((absolute + ulp(reference)) * inside, inside)
            }
            Tolerance::LargerTerm { ulps, relative } => {
                let bound = ulps * ulp(self.larger_term(quantity.name));
                if self.redshift.abs() <= NEAR_TODAY && reference != 0.0 {
                    (bound.min(relative * reference.abs() * condition), condition)
                } else {
                    (bound, condition)
                }
            }
        };
        Error {
            error,
            allowed,
            condition,
            reference,
        }
    }
}
