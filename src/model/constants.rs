//! Constants of nature and of convention.
//!
//! CODATA 2018 (Tiesinga, Mohr, Newell & Taylor 2021, Rev. Mod. Phys. 93,
//! 025010); astronomical unit of IAU 2012 Resolution B2; the parsec is
//! 648000/π au (IAU 2015 Resolution B2, note 4). c, h, k and e are exact;
//! G carries a relative uncertainty of 2.2·10⁻⁵, which goes straight into the
//! photon density and the critical density.

use crate::numerics::DoubleDouble;

/// Speed of light in vacuum, km/s (exact).
pub const SPEED_OF_LIGHT_KM_S: f64 = 299_792.458;
/// Planck constant, J s (exact).
pub const PLANCK_CONSTANT_J_S: f64 = 6.626_070_15e-34;
/// Boltzmann constant, J/K (exact).
pub const BOLTZMANN_CONSTANT_J_K: f64 = 1.380_649e-23;
/// One electronvolt, J (exact).
pub const ELECTRONVOLT_J: f64 = 1.602_176_634e-19;
/// Newtonian constant of gravitation, m³ kg⁻¹ s⁻² (± 1.5·10⁻¹⁵).
pub const GRAVITATION: f64 = 6.674_30e-11;
/// Astronomical unit, m (exact).
pub const ASTRONOMICAL_UNIT_M: f64 = 149_597_870_700.0;
/// Megaparsec, m: 10⁶ · 648000/π au, rounded to a double.
pub const MEGAPARSEC_M: f64 = 3.085_677_581_491_367e22;
/// Julian year of 365.25 days, s (exact).
pub const JULIAN_YEAR_S: f64 = 31_557_600.0;
/// Hubble time of a Hubble constant of 1 km/s/Mpc, Gyr.
pub const HUBBLE_TIME_GYR_KM_S_MPC: f64 = 977.792_221_680_789_2;

/// Ω_γ H0²/T⁴ in (km/s/Mpc)²/K⁴: 8πG/(3c²) · π²k⁴/(15ħ³c³), with 32 digits.
pub const PHOTON_DENSITY: DoubleDouble = DoubleDouble {
    hi: 0.004481620089297255,
    lo: -3.1492142981769256e-19,
};
/// Energy density of one massless neutrino species over that of the photons
/// when N_eff = 3: (7/8)(4/11)^(4/3).
pub const NEUTRINO_TO_PHOTON: DoubleDouble = DoubleDouble {
    hi: 0.22710731766023895,
    lo: 1.3554304160729337e-17,
};
/// Temperature of the neutrinos over that of the photons when N_eff = 3: (4/11)^(1/3).
pub const NEUTRINO_TO_PHOTON_TEMPERATURE: DoubleDouble = DoubleDouble {
    hi: 0.7137658555036082,
    lo: 1.0878583801573446e-17,
};
/// e/k: temperature whose kT is one electronvolt, K/eV.
pub const KELVIN_PER_ELECTRONVOLT: DoubleDouble = DoubleDouble {
    hi: 11604.518121550083,
    lo: -7.726003836152112e-13,
};
