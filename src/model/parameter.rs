//! The numbers a model is declared with: name, unit, range and meaning, each in
//! one place.

/// One number of a model.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Parameter {
    /// Its name in requests and answers.
    pub name: &'static str,
    /// VOUnits string; "1" without dimension.
    pub unit: &'static str,
    /// The smallest value allowed, or the bound that is not reached.
    pub minimum: f64,
    /// Whether `minimum` itself is refused.
    pub minimum_exclusive: bool,
    /// The largest value allowed.
    pub maximum: f64,
    /// One sentence.
    pub description: &'static str,
}

impl Parameter {
    /// Whether a value is in range; never for NaN.
    #[must_use]
    pub fn allows(&self, value: f64) -> bool {
        let above = if self.minimum_exclusive {
            value > self.minimum
        } else {
            value >= self.minimum
        };
        above && value <= self.maximum
    }

    /// The range in words, with its unit: "(0, 10000] km/(s.Mpc)".
    #[must_use]
    pub fn allowed(&self) -> String {
        let open = if self.minimum_exclusive { '(' } else { '[' };
        let range = format!("{open}{}, {}]", shown(self.minimum), shown(self.maximum));
        if self.unit == "1" {
            range
        } else {
            format!("{range} {}", self.unit)
        }
    }
}

/// Shortest decimal text that reads back as the same double, without a trailing `.0`.
#[must_use]
pub(super) fn shown(value: f64) -> String {
    let text = format!("{value:?}");
    text.strip_suffix(".0").unwrap_or(&text).to_owned()
}

/// At most so many neutrino masses are declared; the other species are massless.
pub const LARGEST_MASS_COUNT: usize = 3;

const fn number(
    name: &'static str,
    minimum: f64,
    maximum: f64,
    description: &'static str,
) -> Parameter {
    Parameter {
        name,
        unit: "1",
        minimum,
        minimum_exclusive: false,
        maximum,
        description,
    }
}

/// H0.
pub const HUBBLE_CONSTANT: Parameter = Parameter {
    name: "hubble_constant",
    unit: "km/(s.Mpc)",
    minimum: 0.0,
    minimum_exclusive: true,
    maximum: 1e4,
    description: "Expansion rate today, H0.",
};
/// Ω_m.
pub const MATTER: Parameter = number(
    "matter",
    0.0,
    100.0,
    "Density today of everything non-relativistic today over the critical density, massive neutrinos included.",
);
/// Ω_K.
pub const CURVATURE: Parameter = number(
    "curvature",
    -1000.0,
    1000.0,
    "Curvature term today: positive = open, negative = closed.",
);
/// Ω_b.
pub const BARYONS: Parameter = number(
    "baryons",
    0.0,
    100.0,
    "Density of baryons today, contained in matter.",
);
/// T0.
pub const CMB_TEMPERATURE: Parameter = Parameter {
    name: "cmb_temperature",
    unit: "K",
    minimum: 0.0,
    minimum_exclusive: false,
    maximum: 100.0,
    description: "Temperature of the background radiation today.",
};
/// N_eff.
pub const EFFECTIVE_NEUTRINO_NUMBER: Parameter = number(
    "effective_neutrino_number",
    0.0,
    20.0,
    "Effective number of neutrino species, shared by three; 0 = photons only.",
);
/// Each of at most three masses.
pub const NEUTRINO_MASS: Parameter = Parameter {
    name: "neutrino_masses",
    unit: "eV",
    minimum: 0.0,
    minimum_exclusive: false,
    maximum: 100.0,
    description: "Masses of at most three neutrino species; the rest are massless.",
};
/// Ω_DE.
pub const DARK_ENERGY_DENSITY: Parameter =
    number("density", -100.0, 100.0, "Density of dark energy today.");
/// w.
pub const EQUATION_OF_STATE: Parameter =
    number("w", -20.0, 5.0, "Pressure over density of dark energy.");

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_ends_of_a_range_are_told_and_kept() {
        assert!(!HUBBLE_CONSTANT.allows(0.0) && HUBBLE_CONSTANT.allows(f64::MIN_POSITIVE));
        assert!(HUBBLE_CONSTANT.allows(1e4) && !HUBBLE_CONSTANT.allows(1e4_f64.next_up()));
        assert!(MATTER.allows(0.0) && MATTER.allows(-0.0) && !MATTER.allows(-1e-300));
        assert!(!MATTER.allows(f64::NAN) && !MATTER.allows(f64::INFINITY));
        assert_eq!(HUBBLE_CONSTANT.allowed(), "(0, 10000] km/(s.Mpc)");
        assert_eq!(EQUATION_OF_STATE.allowed(), "[-20, 5]");
    }

    #[test]
    fn numbers_in_messages_stay_short() {
        assert_eq!(shown(70.0), "70");
        assert_eq!(shown(-1e-300), "-1e-300");
        assert_eq!(shown(f64::NAN), "NaN");
    }
}
