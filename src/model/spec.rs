//! A checked, closed model.

use super::{DarkEnergyForm, constants, neutrinos};

/// A model whose densities sum to one: what an answer echoes and what every
/// computation starts from. Made by [`super::Declaration::close`].
#[derive(Clone, Debug, PartialEq)]
pub struct Spec {
    /// H0 in km s⁻¹ Mpc⁻¹.
    pub hubble_constant: f64,
    /// Ω_m, massive neutrinos included.
    pub matter: f64,
    /// Ω_K: positive = open.
    pub curvature: f64,
    /// Ω_b, contained in `matter`.
    pub baryons: Option<f64>,
    /// Photons and neutrinos.
    pub radiation: Option<Radiation>,
    /// Dark energy.
    pub dark_energy: DarkEnergy,
}

/// Photons and three neutrino species.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Radiation {
    /// T0 in K.
    pub cmb_temperature: f64,
    /// N_eff.
    pub effective_neutrino_number: f64,
    /// In eV, ascending; 0 = massless.
    pub neutrino_masses: [f64; 3],
}

/// Dark energy of one form.
#[derive(Clone, Debug, PartialEq)]
pub struct DarkEnergy {
    /// Its form.
    pub form: &'static DarkEnergyForm,
    /// Its numbers, in the order of the form's parameters.
    pub parameters: Vec<f64>,
    /// Ω_DE today.
    pub density: f64,
}

/// One massive neutrino species; its density at the stretch v is
/// `massless_density` · v⁴ · F(y/v), F being [`neutrinos::energy`].
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct MassiveNeutrino {
    /// In eV.
    pub mass_ev: f64,
    /// m c² / (k T_ν) today.
    pub y: f64,
    /// The density today of a massless species in its place.
    pub massless_density: f64,
}

impl Spec {
    /// Ω_γ today.
    #[must_use]
    pub fn photons(&self) -> f64 {
        self.radiation
            .map_or(0.0, |radiation| radiation.photons(self.hubble_constant))
    }

    /// The density today of all massless neutrino species.
    #[must_use]
    pub fn massless_neutrinos(&self) -> f64 {
        let Some(radiation) = self.radiation else {
            return 0.0;
        };
        let massless = radiation
            .neutrino_masses
            .iter()
            .filter(|mass| **mass == 0.0)
            .count();
        massless as f64 * radiation.massless_species(self.hubble_constant)
    }

    /// The massive neutrino species.
    #[must_use]
    pub fn massive_neutrinos(&self) -> Vec<MassiveNeutrino> {
        self.radiation.map_or(Vec::new(), |radiation| {
            radiation.massive_neutrinos(self.hubble_constant)
        })
    }

    /// The density today of all massive neutrinos, contained in `matter`.
    #[must_use]
    pub fn massive_neutrino_density(&self) -> f64 {
        self.massive_neutrinos()
            .iter()
            .map(|one| one.massless_density * neutrinos::energy(one.y))
            .sum()
    }
}

impl Radiation {
    /// Ω_γ for an H0 in km s⁻¹ Mpc⁻¹.
    #[must_use]
    pub fn photons(&self, hubble_constant: f64) -> f64 {
        let square = self.cmb_temperature * self.cmb_temperature;
        constants::PHOTON_DENSITY * (square / hubble_constant) * (square / hubble_constant)
    }

    /// The density of one massless neutrino species:
    /// (7/8) (4/11)^(4/3) (N_eff/3) Ω_γ.
    #[must_use]
    pub fn massless_species(&self, hubble_constant: f64) -> f64 {
        constants::NEUTRINO_TO_PHOTON
            * (self.effective_neutrino_number / 3.0)
            * self.photons(hubble_constant)
    }

    /// The massive neutrino species; T_ν = T0 (4/11)^(1/3) (N_eff/3)^(1/4).
    #[must_use]
    pub fn massive_neutrinos(&self, hubble_constant: f64) -> Vec<MassiveNeutrino> {
        let share = (self.effective_neutrino_number / 3.0).sqrt().sqrt();
        let thermal = constants::BOLTZMANN_EV_K
            * self.cmb_temperature
            * constants::NEUTRINO_TO_PHOTON_TEMPERATURE
            * share;
        self.neutrino_masses
            .iter()
            .filter(|mass| **mass > 0.0)
            .map(|mass| MassiveNeutrino {
                mass_ev: *mass,
                y: mass / thermal,
                massless_density: self.massless_species(hubble_constant),
            })
            .collect()
    }
}
