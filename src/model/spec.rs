//! A closed model: every density known, nothing left to decide.

use super::constants::{
    KELVIN_PER_ELECTRONVOLT, NEUTRINO_TO_PHOTON, NEUTRINO_TO_PHOTON_TEMPERATURE, PHOTON_DENSITY,
};
use super::{DarkEnergyForm, neutrinos};
use crate::numerics::DoubleDouble;

/// A checked and closed model in canonical form: equal universes have equal specs.
///
/// [`Declaration::close`](super::Declaration::close) makes it; densities are
/// those of today over the critical density.
#[derive(Clone, Debug, PartialEq)]
pub struct Spec {
    /// H0, km/s/Mpc.
    pub hubble_constant: f64,
    /// Ω_m, massive neutrinos included.
    pub matter: f64,
    /// Ω_K; positive is open.
    pub curvature: f64,
    /// Ω_b, part of `matter`; absent when not declared.
    pub baryons: Option<f64>,
    /// Photons and neutrinos; absent when there are none.
    pub radiation: Option<Radiation>,
    /// The form without dark energy is the only one with density zero.
    pub dark_energy: DarkEnergy,
}

/// Photons and three neutrino species.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Radiation {
    /// Temperature of the microwave background today, K; positive.
    pub cmb_temperature: f64,
    /// N_eff; 0 is photons only.
    pub effective_neutrino_number: f64,
    /// Masses, eV, ascending; a massless species is 0.
    pub neutrino_masses: [f64; 3],
}

/// Dark energy with its density.
#[derive(Clone, Debug, PartialEq)]
pub struct DarkEnergy {
    /// Its law.
    pub form: &'static DarkEnergyForm,
    /// The numbers of the form, in its order.
    pub parameters: Vec<f64>,
    /// Ω of the dark energy today.
    pub density: f64,
}

/// One massive neutrino species; its density at 1 + z = v is
/// `massless_density` · v⁴ · F(y/v) with F = [`neutrinos::energy`].
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct MassiveNeutrino {
    /// Mass, eV.
    pub mass_ev: f64,
    /// m c²/(k T_ν) today.
    pub y: f64,
    /// Ω today of a massless species at the same temperature.
    pub massless_density: f64,
}

impl MassiveNeutrino {
    /// Ω of this species today, rest mass and motion together.
    #[must_use]
    pub fn density(&self) -> f64 {
        self.massless_density * neutrinos::energy(self.y)
    }
}

impl Spec {
    /// Ω_γ today, within an ulp for the stated constants; 0 without radiation.
    #[must_use]
    pub fn photons(&self) -> f64 {
        self.radiation
            .map_or(0.0, |radiation| radiation.photons(self.hubble_constant))
    }

    /// Ω today of all massless neutrino species together; 0 without radiation.
    #[must_use]
    pub fn massless_neutrinos(&self) -> f64 {
        self.radiation.map_or(0.0, |radiation| {
            radiation.massless_neutrinos(self.hubble_constant)
        })
    }

    /// Ω today of photons and massless neutrinos.
    #[must_use]
    pub fn relativistic(&self) -> f64 {
        self.photons() + self.massless_neutrinos()
    }

    /// The massive species, ascending in mass; part of `matter`.
    #[must_use]
    pub fn massive_neutrinos(&self) -> Vec<MassiveNeutrino> {
        self.radiation.map_or_else(Vec::new, |radiation| {
            radiation.massive_neutrinos(self.hubble_constant)
        })
    }

    /// Ω today of all massive neutrino species together; part of `matter`.
    #[must_use]
    pub fn massive_neutrino_density(&self) -> f64 {
        self.massive_neutrinos()
            .iter()
            .map(MassiveNeutrino::density)
            .sum()
    }

    /// The sum of all densities, which closure brings to 1, as an unevaluated
    /// sum: what it differs from 1 by is the rounding of the closing term.
    #[must_use]
    pub fn total(&self) -> DoubleDouble {
        DoubleDouble::from(self.matter)
            + self.photons()
            + self.massless_neutrinos()
            + self.curvature
            + self.dark_energy.density
    }
}

impl Radiation {
    /// Ω_γ today for a Hubble constant in km/s/Mpc.
    pub(super) fn photons(&self, hubble_constant: f64) -> f64 {
        self.photons_exact(hubble_constant).value()
    }

    /// Ω today of the massless species together.
    pub(super) fn massless_neutrinos(&self, hubble_constant: f64) -> f64 {
        let massless = self.neutrino_masses.iter().filter(|mass| **mass == 0.0);
        (self.one_massless(hubble_constant) * massless.count() as f64).value()
    }

    /// The species with a mass.
    pub(super) fn massive_neutrinos(&self, hubble_constant: f64) -> Vec<MassiveNeutrino> {
        let massless_density = self.one_massless(hubble_constant).value();
        self.neutrino_masses
            .iter()
            .filter(|mass| **mass > 0.0)
            .map(|&mass_ev| MassiveNeutrino {
                mass_ev,
                y: self.mass_over_temperature(mass_ev),
                massless_density,
            })
            .collect()
    }

    fn photons_exact(&self, hubble_constant: f64) -> DoubleDouble {
        let square = DoubleDouble::from(self.cmb_temperature) * self.cmb_temperature;
        let ratio = square / DoubleDouble::from(hubble_constant);
        PHOTON_DENSITY * (ratio * ratio)
    }

    /// Ω today of one massless species: (7/8)(4/11)^(4/3) (N_eff/3) Ω_γ.
    fn one_massless(&self, hubble_constant: f64) -> DoubleDouble {
        let share = self.share();
        self.photons_exact(hubble_constant) * (NEUTRINO_TO_PHOTON * share)
    }

    /// m c²/(k T_ν) with T_ν = (4/11)^(1/3) (N_eff/3)^(1/4) T0.
    fn mass_over_temperature(&self, mass_ev: f64) -> f64 {
        let temperature =
            NEUTRINO_TO_PHOTON_TEMPERATURE * self.share().sqrt().sqrt() * self.cmb_temperature;
        (KELVIN_PER_ELECTRONVOLT * mass_ev / temperature).value()
    }

    fn share(&self) -> DoubleDouble {
        DoubleDouble::from(self.effective_neutrino_number) / DoubleDouble::from(3.0)
    }
}
