"""The Fermi-Dirac integrals of a massive neutrino, to more than 45 digits.

    F(y) = 120/(7 pi^4) Int_0^inf p^2 sqrt(p^2 + y^2) / (e^p + 1) dp
    G(y) = 120/(7 pi^4) Int_0^inf p^4 / sqrt(p^2 + y^2) / (e^p + 1) dp

energy density and three times the pressure, each over the energy density of a
massless species; y = m c^2 / (k T). The trapezoid rule in ln p converges like
exp(-pi^2 / step) for every y, since the integrands are analytic in the strip
|Im ln p| < pi/2. The sums run in fixed point on integers, which is quick.
"""

import math

import constants  # noqa: F401  (sets the working precision)
from mpmath import exp, mp, mpf, pi
from mpmath.libmp import MPZ, isqrt

BITS = 240
STEP = 1 / mpf(13)
LOWEST, HIGHEST = -36, 5


def _fixed(value, bits=BITS):
    return MPZ(int(mp.ldexp(value, bits)))


def _nodes():
    points = []
    for j in range(LOWEST * 13, HIGHEST * 13 + 1):
        p = exp(j * STEP)
        weight = STEP * p**3 / (exp(p) + 1) * 120 / (7 * pi**4)
        points.append((p, weight))
    return points


with mp.workdps(80):
    _FIXED = [(_fixed(p * p, 2 * BITS), _fixed(p * p), _fixed(w)) for p, w in _nodes()]
# A coarser rule in plain floats (error exp(-4 pi^2)) for conditions only.
_FLOATS = []
for _j in range(LOWEST * 4, HIGHEST * 4 + 1):
    _p = math.exp(_j / 4)
    if _p < 120:
        _FLOATS.append((_p * _p, 30 / (7 * math.pi**4) * _p**3 / (math.exp(_p) + 1)))


def integrals(y):
    """F, G, y F' and y G' at y."""
    y = mpf(y)
    with mp.workdps(80):
        y_squared = _fixed(y * y, 2 * BITS)
    energy = pressure = energy_slope = pressure_slope = 0
    for p2_wide, p2, weight in _FIXED:
        root = isqrt(p2_wide + y_squared)
        over_root = (weight << BITS) // root
        energy += weight * root
        part = over_root * p2 >> BITS
        pressure += part
        energy_slope += over_root
        pressure_slope += (part << BITS) // root * y_squared // root
    unit = mpf(2) ** BITS
    return (
        mpf(int(energy)) / unit**2,
        mpf(int(pressure)) / unit,
        mpf(int(energy_slope)) / unit * y * y,
        -mpf(int(pressure_slope)) / unit**2 if y else mpf(0),
    )


def energy(y):
    """F alone."""
    with mp.workdps(80):
        y_squared = _fixed(mpf(y) ** 2, 2 * BITS)
    total = 0
    for p2_wide, _, weight in _FIXED:
        total += weight * isqrt(p2_wide + y_squared)
    return mpf(int(total)) / mpf(2) ** (2 * BITS)


def energy_slope_float(y):
    """y F' to about ten digits, for conditions."""
    y2 = y * y
    return y2 * sum(w / math.sqrt(p2 + y2) for p2, w in _FLOATS)
