//! The constants everything rests on, exact unless an uncertainty is given.
//!
//! CODATA 2018 (Tiesinga et al. 2021, Reviews of Modern Physics 93, 025010);
//! the astronomical unit of IAU 2012 resolution B2 and the parsec of IAU 2015
//! resolution B2 (648000/π au); the Julian year of 365.25 d.

/// c in km/s.
pub const SPEED_OF_LIGHT_KM_S: f64 = 299_792.458;
/// G in m³ kg⁻¹ s⁻²; relative standard uncertainty 2.2e-5.
pub const GRAVITATION: f64 = 6.674_30e-11;
/// One megaparsec in metres.
pub const MEGAPARSEC_M: f64 = 3.085677581491367e+22;
/// One Julian year in seconds.
pub const JULIAN_YEAR_S: f64 = 31_557_600.0;
/// 1/H0 in Gyr for H0 = 1 km s⁻¹ Mpc⁻¹.
pub const HUBBLE_TIME_GYR_KM_S_MPC: f64 = 977.7922216807892;
/// Boltzmann's constant in eV/K.
pub const BOLTZMANN_EV_K: f64 = 8.617333262145177e-05;
/// Ω_γ H0² / T⁴ with H0 in km s⁻¹ Mpc⁻¹ and T in K:
/// 8πG/(3c²) · π²k⁴/(15 ħ³c³); G's uncertainty goes straight into it.
pub const PHOTON_DENSITY: f64 = 0.004481620089297255;
/// (7/8) (4/11)^(4/3): a massless neutrino species over the photons, for N_eff = 3.
pub const NEUTRINO_TO_PHOTON: f64 = 0.22710731766023895;
/// (4/11)^(1/3): the temperature of neutrinos over that of photons, for N_eff = 3.
pub const NEUTRINO_TO_PHOTON_TEMPERATURE: f64 = 0.7137658555036082;
