//! The energy budget of one model at any redshift.

use crate::model::{DarkEnergyForm, Instant, MassiveNeutrino, Spec, neutrinos};
use crate::numerics::{DoubleDouble, exponential};

/// The densities of a model in units of today's critical density, ready to be
/// evaluated at any stretch v = 1 + z.
#[derive(Clone, Debug)]
pub struct Densities {
    /// Photons and massless neutrinos, ∝ v⁴.
    pub(super) radiation: f64,
    /// Matter without the massive neutrinos, ∝ v³.
    pub(super) cold_matter: f64,
    /// Ω_K, ∝ v².
    pub(super) curvature: DoubleDouble,
    /// Dark energy today.
    pub(super) dark_energy: DoubleDouble,
    pub(super) form: &'static DarkEnergyForm,
    parameters: Vec<f64>,
    pub(super) massive: Vec<MassiveNeutrino>,
    /// Terms of both signs: sums need more than a double near a zero of E².
    cancelling: bool,
}

/// The terms of E² = (H/H0)² at one stretch.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Terms {
    /// Photons and massless neutrinos.
    pub radiation: f64,
    /// Matter without the massive neutrinos.
    pub cold_matter: f64,
    /// Massive neutrinos, however fast they move.
    pub massive_neutrinos: f64,
    /// Curvature.
    pub curvature: f64,
    /// Dark energy.
    pub dark_energy: f64,
}

impl Densities {
    /// The densities of a closed spec; the closing term is taken to more than
    /// double precision, so that they sum to 1 exactly.
    #[must_use]
    pub fn of(spec: &Spec) -> Self {
        let massive = spec.massive_neutrinos();
        let radiation = spec.photons() + spec.massless_neutrinos();
        let massive_today: f64 = massive
            .iter()
            .map(|one| one.massless_density * neutrinos::energy(one.y))
            .sum();
        let filled = DoubleDouble::from(spec.matter) + radiation;
        let mut curvature = DoubleDouble::from(spec.curvature);
        let mut dark_energy = DoubleDouble::from(spec.dark_energy.density);
        if spec.dark_energy.density != 0.0 {
            dark_energy = DoubleDouble::from(1.0) - filled - curvature;
        } else if spec.curvature != 0.0 {
            curvature = DoubleDouble::from(1.0) - filled;
        }
        Densities {
            radiation,
            cold_matter: spec.matter - massive_today,
            curvature,
            dark_energy,
            form: spec.dark_energy.form,
            parameters: spec.dark_energy.parameters.clone(),
            massive,
            cancelling: spec.curvature < 0.0 || spec.dark_energy.density < 0.0,
        }
    }

    /// Ω_K today: positive = open.
    #[must_use]
    pub fn curvature(&self) -> f64 {
        self.curvature.hi
    }

    /// Whether terms of both signs meet, so that E² may reach zero.
    #[must_use]
    pub fn cancelling(&self) -> bool {
        self.cancelling
    }

    /// The terms of E² at the stretch v = 1 + z > 0.
    #[must_use]
    pub fn terms(&self, stretch: f64) -> Terms {
        let square = stretch * stretch;
        Terms {
            radiation: self.radiation * square * square,
            cold_matter: self.cold_matter * square * stretch,
            massive_neutrinos: self.massive_neutrinos(stretch),
            curvature: self.curvature.hi * square,
            dark_energy: self.dark_energy.hi * self.dark_energy_growth(stretch),
        }
    }

    /// E² = (H/H0)² at the stretch v; negative where no such moment exists.
    #[inline]
    #[must_use]
    pub fn rate_squared(&self, stretch: f64) -> f64 {
        let rest = self.dark_energy.hi * self.dark_energy_growth(stretch)
            + self.massive_neutrinos(stretch);
        let square = stretch * stretch;
        let filled = (self.radiation * stretch + self.cold_matter) * stretch;
        let sum = (filled + self.curvature.hi) * square + rest;
        // Where little is left of terms of both signs, their digits have gone too.
        if self.cancelling && sum < 0.25 * (filled * square + rest.abs()) {
            return self.cancelled_rate_squared(stretch, rest);
        }
        sum
    }

    /// The same sum in double-double arithmetic.
    #[cold]
    fn cancelled_rate_squared(&self, stretch: f64, rest: f64) -> f64 {
        let square = DoubleDouble::from(stretch) * stretch;
        let filled = (DoubleDouble::from(self.radiation) * stretch + self.cold_matter) * stretch;
        ((filled + self.curvature) * square + rest + self.dark_energy.lo).value()
    }

    /// E = H/H0 at the stretch v; NaN where E² is negative.
    #[inline]
    #[must_use]
    pub fn rate(&self, stretch: f64) -> f64 {
        self.rate_squared(stretch).sqrt()
    }

    /// dE²/dv at the stretch v.
    #[must_use]
    pub fn rate_squared_slope(&self, stretch: f64) -> f64 {
        let polynomial = (4.0 * self.radiation * stretch + 3.0 * self.cold_matter) * stretch
            + 2.0 * self.curvature.hi;
        polynomial * stretch
            + self.massive_neutrino_slope(stretch)
            + self.dark_energy_slope(stretch)
    }

    /// Σ |terms| / E²: by how much rounding of one term grows in the sum.
    #[must_use]
    pub fn cancellation(&self, stretch: f64) -> f64 {
        let terms = self.terms(stretch);
        let sum = terms.radiation + terms.cold_matter + terms.massive_neutrinos;
        (sum + terms.curvature.abs() + terms.dark_energy.abs()) / self.rate_squared(stretch)
    }

    /// w of the dark energy at the stretch v.
    #[must_use]
    pub fn equation_of_state(&self, stretch: f64) -> f64 {
        (self.form.equation_of_state)(&self.parameters, &Instant::at_stretch(stretch))
    }

    /// Density of dark energy over that of today.
    #[inline]
    pub(super) fn dark_energy_growth(&self, stretch: f64) -> f64 {
        if self.form.ln_density.is_none() {
            return 1.0;
        }
        let ln_growth = self.ln_dark_energy_growth(&Instant::at_stretch(stretch));
        ln_growth.map_or(0.0, exponential)
    }

    /// Its logarithm; `None` where there is none or it is constant.
    pub(super) fn ln_dark_energy_growth(&self, instant: &Instant) -> Option<DoubleDouble> {
        let ln_density = self
            .form
            .ln_density
            .filter(|_| self.dark_energy.hi != 0.0)?;
        Some(ln_density(&self.parameters, instant))
    }

    /// ρ′ = 3 (1 + w) ρ / v, the continuity equation.
    fn dark_energy_slope(&self, stretch: f64) -> f64 {
        if self.form.ln_density.is_none() || self.dark_energy.hi == 0.0 {
            return 0.0;
        }
        let density = self.dark_energy.hi * self.dark_energy_growth(stretch);
        3.0 * (1.0 + self.equation_of_state(stretch)) * density / stretch
    }

    #[inline]
    fn massive_neutrinos(&self, stretch: f64) -> f64 {
        let mut sum = 0.0;
        for one in &self.massive {
            sum += one.massless_density * neutrinos::energy(one.y / stretch);
        }
        let square = stretch * stretch;
        sum * (square * square)
    }

    /// 3 P of the massive neutrinos in units of today's critical density.
    pub(super) fn massive_neutrino_pressure(&self, stretch: f64) -> f64 {
        let square = stretch * stretch;
        let sum: f64 = self
            .massive
            .iter()
            .map(|one| one.massless_density * neutrinos::pressure(one.y / stretch))
            .sum();
        sum * (square * square)
    }

    /// ρ′ = (3 ρ + 3 P) / v, the continuity equation.
    fn massive_neutrino_slope(&self, stretch: f64) -> f64 {
        (3.0 * self.massive_neutrinos(stretch) + self.massive_neutrino_pressure(stretch)) / stretch
    }

    /// The exponent n of the term that leads as v → ∞, E² ∝ vⁿ.
    #[must_use]
    pub fn early_exponent(&self) -> f64 {
        let mut leading = f64::NEG_INFINITY;
        let relativistic = self.radiation > 0.0 || !self.massive.is_empty();
        let dark_energy = (self.form.early_exponent)(&self.parameters);
        for (present, exponent) in [
            (relativistic, 4.0),
            (self.cold_matter > 0.0, 3.0),
            (self.curvature.hi != 0.0, 2.0),
            (self.dark_energy.hi != 0.0, dark_energy),
        ] {
            if present && exponent > leading {
                leading = exponent;
            }
        }
        leading
    }

    /// The exponent n of the term that leads as v → 0, E² ∝ vⁿ.
    #[must_use]
    pub fn late_exponent(&self) -> f64 {
        let mut leading = f64::INFINITY;
        let dark_energy = (self.form.late_exponent)(&self.parameters);
        for (present, exponent) in [
            (self.radiation > 0.0, 4.0),
            (self.cold_matter > 0.0 || !self.massive.is_empty(), 3.0),
            (self.curvature.hi != 0.0, 2.0),
            (self.dark_energy.hi != 0.0, dark_energy),
        ] {
            if present && exponent < leading {
                leading = exponent;
            }
        }
        leading
    }
}
