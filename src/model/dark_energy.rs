//! The forms dark energy may take: one literal each.

use super::parameter::EQUATION_OF_STATE;
use super::{Citation, Instant, Parameter};
use crate::numerics::DoubleDouble;

/// One form of dark energy.
pub struct DarkEnergyForm {
    /// Its name in requests and answers.
    pub name: &'static str,
    /// One sentence.
    pub description: &'static str,
    /// Where it was proposed.
    pub source: Citation,
    /// Its numbers, in the order in which the functions take them.
    pub parameters: &'static [Parameter],
    /// Whether its density today is always zero.
    pub absent: bool,
    /// w at a moment.
    pub equation_of_state: fn(&[f64], &Instant) -> f64,
    /// ln(density/density today) as an unevaluated sum, so that the exponential
    /// keeps its digits at the largest redshifts; `None`: constant.
    pub ln_density: Option<fn(&[f64], &Instant) -> DoubleDouble>,
    /// n in density ∝ vⁿ as v → ∞.
    pub early_exponent: fn(&[f64]) -> f64,
    /// n in density ∝ vⁿ as v → 0.
    pub late_exponent: fn(&[f64]) -> f64,
    /// The simplest form that is the same universe with these numbers, where
    /// that is another one.
    pub simplest: fn(&[f64]) -> Option<&'static DarkEnergyForm>,
}

impl PartialEq for DarkEnergyForm {
    fn eq(&self, other: &Self) -> bool {
        self.name == other.name
    }
}

impl std::fmt::Debug for DarkEnergyForm {
    /// The name says it all.
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        f.write_str(self.name)
    }
}

/// Every form.
pub static DARK_ENERGY_FORMS: &[&DarkEnergyForm] = &[&NONE, &COSMOLOGICAL_CONSTANT, &CONSTANT];

/// No dark energy at all.
pub static NONE: DarkEnergyForm = DarkEnergyForm {
    name: "none",
    description: "No dark energy: its density is exactly zero and curvature closes.",
    source: Citation {
        authors: "Friedmann",
        year: 1922,
        reference: "Z. Phys. 10, 377",
        locator: "",
    },
    parameters: &[],
    absent: true,
    equation_of_state: |_, _| -1.0,
    ln_density: None,
    early_exponent: |_| 0.0,
    late_exponent: |_| 0.0,
    simplest: |_| None,
};

/// Λ.
pub static COSMOLOGICAL_CONSTANT: DarkEnergyForm = DarkEnergyForm {
    name: "cosmological_constant",
    description: "A constant density, w = -1.",
    source: Citation {
        authors: "Einstein",
        year: 1917,
        reference: "Sitzungsberichte der Preussischen Akademie der Wissenschaften, 142",
        locator: "",
    },
    parameters: &[],
    absent: false,
    equation_of_state: |_, _| -1.0,
    ln_density: None,
    early_exponent: |_| 0.0,
    late_exponent: |_| 0.0,
    simplest: |_| None,
};

/// Constant w.
pub static CONSTANT: DarkEnergyForm = DarkEnergyForm {
    name: "constant",
    description: "A constant ratio w of pressure to density.",
    source: Citation {
        authors: "Turner & White",
        year: 1997,
        reference: "Phys. Rev. D 56, R4439",
        locator: "from memory",
    },
    parameters: &[EQUATION_OF_STATE],
    absent: false,
    equation_of_state: |numbers, _| first(numbers),
    ln_density: Some(|numbers, instant| instant.ln_stretch * power(first(numbers))),
    early_exponent: |numbers| power(first(numbers)).hi,
    late_exponent: |numbers| power(first(numbers)).hi,
    simplest: |numbers| (first(numbers) == -1.0).then_some(&COSMOLOGICAL_CONSTANT),
};

fn first(numbers: &[f64]) -> f64 {
    numbers.first().copied().unwrap_or(f64::NAN)
}

/// 3 (1 + w) without rounding.
fn power(w: f64) -> DoubleDouble {
    (DoubleDouble::from(1.0) + w) * 3.0
}
