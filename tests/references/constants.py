"""The constants the references are computed with, exact or to all printed digits.

Sources: CODATA 2018 (Tiesinga, Mohr, Newell & Taylor 2021, Rev. Mod. Phys. 93,
025010); astronomical unit: IAU 2012, Resolution B2; parsec = 648000/pi au:
IAU 2015, Resolution B2; Julian year: 365.25 d of 86400 s.
"""

from mpmath import mp, mpf, pi

mp.dps = 50

SPEED_OF_LIGHT_M_S = mpf(299792458)
PLANCK_J_S = mpf("6.62607015e-34")
BOLTZMANN_J_K = mpf("1.380649e-23")
ELECTRONVOLT_J = mpf("1.602176634e-19")
GRAVITATION = mpf("6.67430e-11")
PARSEC_M = mpf(149597870700) * 648000 / pi
MEGAPARSEC_M = PARSEC_M * 10**6
YEAR_S = mpf(31557600)
GYR_S = YEAR_S * 10**9

SPEED_OF_LIGHT_KM_S = SPEED_OF_LIGHT_M_S / 1000
# One km/s/Mpc in 1/s.
HUBBLE_UNIT = 1000 / MEGAPARSEC_M

# Photon density parameter = PHOTON_FACTOR * T^4 / H0^2 (T in K, H0 in km/s/Mpc):
# (8 pi G / 3 c^2) * (pi^2 k^4 / 15 hbar^3 c^3).
_hbar = PLANCK_J_S / (2 * pi)
_energy_density = pi**2 * BOLTZMANN_J_K**4 / (15 * _hbar**3 * SPEED_OF_LIGHT_M_S**3)
PHOTON_FACTOR = 8 * pi * GRAVITATION / (3 * SPEED_OF_LIGHT_M_S**2) * _energy_density / HUBBLE_UNIT**2

# Instantaneous decoupling: T_nu / T_photon = (4/11)^(1/3) (N_eff/3)^(1/4).
DECOUPLING_RATIO = (mpf(4) / 11) ** (mpf(1) / 3)
