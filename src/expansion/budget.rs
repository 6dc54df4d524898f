//! The energy budget at one redshift, in double-double arithmetic: shares of
//! the critical density, and differences that would lose their digits.

use super::Densities;
use crate::model::{Instant, MassiveNeutrino, neutrinos};
use crate::numerics::{DoubleDouble, exponential, gauss_legendre_16, two_sum};

/// Shares of the critical density at one redshift, with what follows from them.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Composition {
    /// Matter, massive neutrinos included.
    pub matter: f64,
    /// Photons and massless neutrinos.
    pub radiation: f64,
    /// Curvature: positive = open.
    pub curvature: f64,
    /// Dark energy.
    pub dark_energy: f64,
    /// Massive neutrinos, contained in `matter`.
    pub massive_neutrino: f64,
    /// w of the dark energy.
    pub equation_of_state: f64,
    /// q = −a ä / ȧ².
    pub deceleration: f64,
}

/// Below this |z| differences that vanish today are formed term by term.
const NEAR_TODAY: f64 = 0.5;

impl Densities {
    /// Shares of the critical density, w and q at a redshift.
    ///
    /// # Accuracy
    /// Each share within 2 ulp; q within 4 ulp of its larger term. At a turning
    /// point all are infinite.
    ///
    /// # References
    /// q = ½ Σ (1 + 3 wᵢ) Ωᵢ: Peebles 1993, Principles of Physical Cosmology, section 13.
    #[must_use]
    pub fn composition(&self, redshift: f64) -> Composition {
        let stretch = exact_stretch(redshift);
        let square = stretch * stretch;
        let radiation = square * square * self.radiation;
        let cold_matter = square * stretch * self.cold_matter;
        let curvature = square * self.curvature;
        let dark_energy = self.dark_energy * self.dark_energy_growth(stretch.hi);
        let massive = self.massive_sum(square, |one| neutrinos::energy(one.y / stretch.hi));
        let pressure = self.massive_sum(square, |one| neutrinos::pressure(one.y / stretch.hi));
        let matter = cold_matter + massive;
        let total = radiation + matter + curvature + dark_energy;
        let equation_of_state = self.equation_of_state(stretch.hi);
        let active = DoubleDouble::from(1.0) + DoubleDouble::from(equation_of_state) * 3.0;
        let braking = radiation * 2.0 + matter + pressure + dark_energy * active;
        let share = |term: DoubleDouble| {
            if total.value() > 0.0 || term.value() == 0.0 {
                (term / total).value()
            } else {
                // At a turning point the rate is zero, and rounding has the sign.
                term.value() / 0.0
            }
        };
        Composition {
            matter: share(matter),
            radiation: share(radiation),
            curvature: share(curvature),
            dark_energy: share(dark_energy),
            massive_neutrino: share(massive),
            equation_of_state,
            deceleration: share(braking * 0.5),
        }
    }

    /// The sum whose sign is that of q, Σ (1 + 3 wᵢ) ρᵢ, relative to the sum of
    /// the sizes of its terms: from −1 to 1, and without the pole that q has at a
    /// turning point; 0 where every term is.
    #[must_use]
    pub fn braking(&self, redshift: f64) -> f64 {
        let stretch = 1.0 + redshift;
        let terms = self.terms(stretch);
        let pressure = self.massive_neutrino_pressure(stretch);
        let fluids = 2.0 * terms.radiation + terms.cold_matter + terms.massive_neutrinos + pressure;
        let thrice = 3.0 * self.equation_of_state(stretch);
        let dark_energy = terms.dark_energy * (1.0 + thrice);
        let sizes = fluids + terms.dark_energy.abs() * (1.0 + thrice.abs());
        if sizes > 0.0 {
            (fluids + dark_energy) / sizes
        } else {
            0.0
        }
    }

    /// 1 + z − E, the redshift drift in units of H0.
    ///
    /// It is formed as (v² − E²)/(v + E), v² being Σ Ωᵢ v², so that near today
    /// nothing cancels but what cancels in nature.
    ///
    /// # Accuracy
    /// Within 3 ulp of the larger term; relative 10⁻¹⁴ as z → 0.
    ///
    /// # References
    /// Loeb 1998, The Astrophysical Journal 499, L111.
    #[must_use]
    pub fn drift(&self, redshift: f64) -> f64 {
        let stretch = exact_stretch(redshift);
        let square = stretch * stretch;
        let z = DoubleDouble::from(redshift);
        let twice = stretch + 1.0;
        // Σ Ωᵢ (v² − vⁿ): curvature drops out.
        let radiation = square * z * twice * -self.radiation;
        let cold_matter = square * z * -self.cold_matter;
        let mut constant = DoubleDouble::default();
        if self.form.ln_density.is_none() {
            constant = z * twice * self.dark_energy;
        }
        let rest =
            self.evolving_difference(redshift) + self.massive_difference(redshift, stretch.hi);
        let difference = radiation + cold_matter + constant + rest;
        let mut rate_squared = square + -difference;
        if rate_squared.hi < 0.5 * square.hi {
            // What is left of v² has lost digits: the sum of the terms has not.
            rate_squared = DoubleDouble::from(self.rate_squared(stretch.hi));
        }
        let rate = rate_squared.sqrt();
        (difference / (stretch + rate)).value()
    }

    /// Ω_DE (v² − growth) of dark energy that is not constant.
    fn evolving_difference(&self, redshift: f64) -> f64 {
        let instant = Instant::at_redshift(redshift);
        let Some(ln_growth) = self.ln_dark_energy_growth(&instant) else {
            return 0.0;
        };
        let difference = if redshift.abs() < NEAR_TODAY {
            redshift * (2.0 + redshift) - libm::expm1(ln_growth.value())
        } else {
            instant.stretch * instant.stretch - exponential(ln_growth)
        };
        self.dark_energy.hi * difference
    }

    /// Σ A (v² F(y) − v⁴ F(y/v)) of the massive neutrinos.
    fn massive_difference(&self, redshift: f64, stretch: f64) -> f64 {
        let square = stretch * stretch;
        let mut sum = 0.0;
        for one in &self.massive {
            let growth = if redshift.abs() < NEAR_TODAY {
                // s² F(y/s) has the slope s (F + G).
                gauss_legendre_16(0.0, redshift, |z| {
                    let s = 1.0 + z;
                    let y = one.y / s;
                    s * (neutrinos::energy(y) + neutrinos::pressure(y))
                })
            } else {
                square * neutrinos::energy(one.y / stretch) - neutrinos::energy(one.y)
            };
            sum -= one.massless_density * square * growth;
        }
        sum
    }

    fn massive_sum(
        &self,
        square: DoubleDouble,
        factor: impl Fn(&MassiveNeutrino) -> f64,
    ) -> DoubleDouble {
        let sum: f64 = self
            .massive
            .iter()
            .map(|one| one.massless_density * factor(one))
            .sum();
        square * square * sum
    }
}

/// 1 + z without rounding.
fn exact_stretch(redshift: f64) -> DoubleDouble {
    let (hi, lo) = two_sum(1.0, redshift);
    DoubleDouble { hi, lo }
}
