"""Every quantity of the catalogue from the integrals at one redshift, and its condition.

The condition is max |d ln Q / d ln x| over the redshift and every model number,
found by moving the whole state along each direction by 1e-20 of itself.
"""

import constants as c
from mpmath import log10, mpf, nstr, pi, sin, sinh, sqrt

STEP = mpf("1e-20")
# Functions of the redshift alone: one file for all models.
REDSHIFT_ALONE = ["redshift", "scale_factor", "optical_velocity", "radio_velocity", "time_dilation"]
# Given for z >= 0 only.
NOT_IN_THE_FUTURE = [
    "comoving_distance", "transverse_comoving_distance", "angular_diameter_distance", "luminosity_distance",
    "distance_modulus", "light_travel_distance", "comoving_volume", "angular_scale", "comoving_angular_scale",
    "volume_element", "volume_averaged_distance", "alcock_paczynski",
]
NAMES = [
    "age", "lookback_time", "conformal_time", "recession_velocity", "hubble_parameter", "hubble_distance",
    "comoving_distance", "transverse_comoving_distance", "angular_diameter_distance", "luminosity_distance",
    "distance_modulus", "light_travel_distance", "comoving_volume", "cmb_temperature", "angular_scale",
    "comoving_angular_scale", "volume_element", "critical_density", "matter_fraction", "radiation_fraction",
    "curvature_fraction", "dark_energy_fraction", "massive_neutrino_fraction", "deceleration_parameter",
    "equation_of_state", "redshift_drift", "velocity_drift", "volume_averaged_distance", "alcock_paczynski",
]
KPC_PER_ARCSEC = 1000 * pi / 648000


class State:
    """What the quantities are made of, at one redshift; `terms` are plain numbers and slopes."""

    def __init__(self, **fields):
        self.__dict__.update(fields)

    def moved(self, **changes):
        other = State(**self.__dict__)
        other.__dict__.update(changes)
        return other


def _beyond_linear(x, sign):
    """x - sin x (sign -1) or sinh x - x (sign +1) by its series, for small x."""
    total, term, k = mpf(0), x**3 / 6, 3
    while abs(term) > abs(total) * mpf("1e-60") or total == 0:
        total += term
        term *= sign * x * x / ((k + 1) * (k + 2))
        k += 2
        if term == 0:
            break
    return total


def transverse(path, curvature):
    """D_M in Hubble distances, signed."""
    if curvature == 0:
        return path
    root = sqrt(abs(curvature))
    return (sin(root * path) if curvature < 0 else sinh(root * path)) / root


def volume(path, curvature):
    """Volume within `path` over the whole sky in cubic Hubble distances: pi/r^3 (2x - sin 2x) and its like."""
    if curvature == 0:
        return 4 * pi / 3 * path**3
    root = sqrt(abs(curvature))
    y, sign = 2 * root * path, (-1 if curvature < 0 else 1)
    if abs(y) < 1:
        body = _beyond_linear(y, sign)
    else:
        body = y - sin(y) if curvature < 0 else sinh(y) - y
    return pi / root**3 * body


def redshift_alone(z):
    v = 1 + z
    return {"redshift": z, "scale_factor": 1 / v, "optical_velocity": c.SPEED_OF_LIGHT_KM_S * z,
            "radio_velocity": c.SPEED_OF_LIGHT_KM_S * z / v, "time_dilation": v}


def of_state(s):
    """{name: value or None} in the catalogue's units."""
    hubble_distance = c.SPEED_OF_LIGHT_KM_S / s.hubble_constant
    hubble_time = 1 / (s.hubble_constant * c.HUBBLE_UNIT) / c.GYR_S
    squared = sum(s.values.values())
    rate = sqrt(squared)
    across = transverse(s.path, s.curvature)
    d_m, d_l = abs(across) * hubble_distance, abs(across) * hubble_distance * s.v
    per_second = s.hubble_constant * c.HUBBLE_UNIT
    drift = per_second * (s.v - rate)
    matter = s.values["cold"] + s.values["neutrinos"]
    return {
        "age": None if s.age is None else hubble_time * s.age,
        "lookback_time": hubble_time * s.time,
        "conformal_time": None if s.conformal is None else hubble_time * s.conformal,
        "recession_velocity": c.SPEED_OF_LIGHT_KM_S * s.path,
        "hubble_parameter": s.hubble_constant * rate,
        "hubble_distance": hubble_distance / rate,
        "comoving_distance": hubble_distance * s.path,
        "transverse_comoving_distance": d_m,
        "angular_diameter_distance": d_m / s.v,
        "luminosity_distance": d_l,
        "distance_modulus": 5 * log10(d_l) + 25 if d_l != 0 else None,
        "light_travel_distance": hubble_distance * s.time,
        "comoving_volume": volume(s.path, s.curvature) * hubble_distance**3,
        "cmb_temperature": None if s.temperature is None else s.temperature * s.v,
        "angular_scale": d_m / s.v * KPC_PER_ARCSEC,
        "comoving_angular_scale": d_m * KPC_PER_ARCSEC,
        "volume_element": hubble_distance * d_m**2 / rate,
        "critical_density": 3 * per_second**2 * squared / (8 * pi * c.GRAVITATION),
        "matter_fraction": matter / squared,
        "radiation_fraction": s.values["radiation"] / squared,
        "curvature_fraction": s.values["curvature"] / squared,
        "dark_energy_fraction": s.values["dark"] / squared,
        "massive_neutrino_fraction": s.values["neutrinos"] / squared,
        "deceleration_parameter": sum(s.slopes.values()) / (2 * squared) - 1,
        "equation_of_state": s.w,
        "redshift_drift": drift * c.YEAR_S,
        "velocity_drift": c.SPEED_OF_LIGHT_M_S * 100 * drift / s.v * c.YEAR_S,
        "volume_averaged_distance": (s.z * d_m**2 * hubble_distance / rate) ** (mpf(1) / 3) if s.z > 0 else mpf(0),
        "alcock_paczynski": abs(across) * rate,
    }


def state(universe, z, inward, outward, conformal):
    """The State at z, and the States moved along each direction."""
    v = 1 + z
    terms, changes = universe.terms(v)
    none = universe.dark_energy == "none"
    here = State(
        z=z, v=v, hubble_constant=universe.hubble_constant, curvature=universe.curvature,
        temperature=universe.temperature, w=None if none else universe.w,
        path=outward.path, time=outward.time,
        age=None if inward is None else inward.time, conformal=inward.path if conformal else None,
        values={k: t.value for k, t in terms.items()}, slopes={k: t.slope for k, t in terms.items()},
    )
    rate = sqrt(sum(here.values.values()))
    dz = STEP * z
    moved = [here.moved(
        z=z + dz, v=v + dz, path=here.path + dz / rate, time=here.time + dz / (v * rate),
        age=None if here.age is None else here.age - dz / (v * rate),
        conformal=None if here.conformal is None else here.conformal - dz / rate,
        values={k: t.value + dz / v * t.slope for k, t in terms.items()},
        slopes={k: t.slope + dz / v * t.second for k, t in terms.items()},
    )]
    for i, (name, change) in enumerate(changes.items()):
        d = universe.directions[name]
        moved.append(here.moved(
            hubble_constant=here.hubble_constant * (1 + STEP * d["hubble_constant"]),
            curvature=here.curvature + STEP * d["curvature"],
            temperature=None if here.temperature is None else here.temperature * (1 + STEP * d["cmb_temperature"]),
            w=None if none else here.w + STEP * d["w"],
            path=here.path + STEP * mpf(outward.d_path[i]), time=here.time + STEP * mpf(outward.d_time[i]),
            age=None if here.age is None else here.age + STEP * mpf(inward.d_time[i]),
            conformal=None if here.conformal is None else here.conformal + STEP * mpf(inward.d_path[i]),
            values={k: here.values[k] + STEP * t.value for k, t in change.items()},
            slopes={k: here.slopes[k] + STEP * t.slope for k, t in change.items()},
        ))
    return here, moved


def with_conditions(universe, z, inward, outward, conformal):
    """{name: (value or None, condition)} at z."""
    here, moved = state(universe, z, inward, outward, conformal)
    values = of_state(here)
    others = [of_state(m) for m in moved]
    result = {}
    for name, value in values.items():
        condition = mpf(0)
        if value:
            for other in others:
                if other[name] is not None:
                    condition = max(condition, abs((other[name] - value) / (value * STEP)))
        result[name] = (value, condition)
    return result


def written(value, condition):
    """`value` with 21 digits, then `~condition` if that is above 1.005."""
    if value is None:
        return "-"
    text = nstr(value, 21, strip_zeros=True, min_fixed=-4, max_fixed=12)
    text = text[:-2] if text.endswith(".0") else text.replace(".0e", "e")
    if condition > mpf("1.005"):
        digits = nstr(condition, 3, strip_zeros=True, min_fixed=-4, max_fixed=6)
        text += "~" + (digits[:-2] if digits.endswith(".0") else digits.replace(".0e", "e"))
    return text
