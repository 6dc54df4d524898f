//! A model as somebody wrote it, unchecked.

/// A model as written: what is absent is `None`.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Declaration {
    /// H0 in km s⁻¹ Mpc⁻¹.
    pub hubble_constant: f64,
    /// Ω_m, massive neutrinos included.
    pub matter: f64,
    /// Ω_K: positive = open.
    pub curvature: Option<f64>,
    /// Ω_b, contained in `matter`.
    pub baryons: Option<f64>,
    /// Photons and neutrinos; absent = none.
    pub radiation: Option<RadiationDeclaration>,
    /// Absent = a cosmological constant that closes.
    pub dark_energy: Option<DarkEnergyDeclaration>,
}

/// Radiation as written.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct RadiationDeclaration {
    /// T0 in K.
    pub cmb_temperature: Option<f64>,
    /// N_eff.
    pub effective_neutrino_number: Option<f64>,
    /// In eV, in any order.
    pub neutrino_masses: Vec<f64>,
}

/// Dark energy as written.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct DarkEnergyDeclaration {
    /// The name of its form.
    pub form: String,
    /// Ω_DE; absent = it closes.
    pub density: Option<f64>,
    /// The numbers of its form by name.
    pub parameters: Vec<(String, f64)>,
}
