"""Prints the densities and the canonical vectors that tests/suite/model holds.

Densities: from the CODATA 2018 constants with 50 digits, each declared number
being the exact value of its double. Vectors: the layout that
src/model/canonical.rs documents, written here a second time.
"""

import hashlib
import struct

from mpmath import mp, mpf, pi

from neutrino_table import energy_and_pressure

mp.dps = 50
C, H, K, E = mpf(299792458), mpf("6.62607015e-34"), mpf("1.380649e-23"), mpf("1.602176634e-19")
G, AU = mpf("6.67430e-11"), mpf(149597870700)
MEGAPARSEC = 648000 / pi * AU * 10**6


def densities(hubble_constant, matter, temperature, number, masses):
    rate = mpf(hubble_constant) * 1000 / MEGAPARSEC
    critical = 3 * rate**2 * C**2 / (8 * pi * G)
    energy = pi**2 * (K * mpf(temperature)) ** 4 / (15 * (H / (2 * pi) * C) ** 3)
    photons = energy / critical
    ratio = (mpf(4) / 11) ** (mpf(1) / 3) * (mpf(number) / 3) ** (mpf(1) / 4)
    species = mpf(7) / 8 * ratio**4 * photons
    massive = []
    for mass in masses:
        y = mpf(mass) * E / (K * ratio * mpf(temperature))
        massive.append((y, species * energy_and_pressure(y)[0]))
    massless = species * (3 - len(masses))
    closing = 1 - mpf(matter) - photons - massless
    return photons, massless, massive, closing


def canonical(hubble_constant, matter, curvature, baryons, temperature, number, masses, form, density, numbers):
    real = lambda x: struct.pack(">d", x)
    data = b"rf1-declared\0" + real(hubble_constant) + real(matter) + real(curvature)
    data += bytes([baryons is not None]) + real(baryons or 0.0)
    data += real(temperature) + real(number) + b"".join(map(real, masses))
    data += bytes([len(form)]) + form.encode() + real(density)
    data += struct.pack(">I", len(numbers)) + b"".join(map(real, numbers))
    return data


def show(name, data):
    print(name, "rf1-" + hashlib.sha256(data).hexdigest()[:16])
    print("   ", data.hex())


if __name__ == "__main__":
    for declared in (
        (67.36, 0.3153, 2.7255, 3.046, [0.06]),
        (70.0, 0.3, 2.7255, 3.046, [0.01, 0.05, 0.2]),
        (50.0, 1.0, 8.0, 0.5, []),
    ):
        photons, massless, massive, closing = densities(*declared)
        print(declared)
        print("    photons", repr(float(photons)), "massless", repr(float(massless)))
        print("    massive", [(repr(float(y)), repr(float(d))) for y, d in massive])
        print("    closing", repr(float(closing)))
    none = [0.0] * 3
    show("round", canonical(70.0, 0.3, 0.0, None, 0.0, 0.0, none, "cosmological_constant", 0.7, []))
    show("einstein-de-sitter", canonical(50.0, 1.0, 0.0, None, 0.0, 0.0, none, "none", 0.0, []))
    show("w", canonical(70.0, 0.3, -0.1, 0.05, 0.0, 0.0, none, "constant", 0.8, [-0.9]))
    closing = float(densities(67.36, 0.3153, 2.7255, 3.046, [0.06])[3])
    baryons = 0.02237 / (0.6736 * 0.6736)
    show(
        "planck-2018-cmb-lensing",
        canonical(67.36, 0.3153, 0.0, baryons, 2.7255, 3.046, [0.0, 0.0, 0.06], "cosmological_constant", closing, []),
    )
