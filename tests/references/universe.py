"""One model: its exact densities, the rate of expansion, and how both answer to each parameter.

Every parameter is the exact value of a double. The closing density is computed
from these exactly; a closing term below 8 ulp of the sum of the terms is zero.
E^2(v) = sum of the terms, v = 1 + z.
"""

import math

import constants
import fermi
from mpmath import log, mpf


class Term:
    """One constituent at one v: its share of E^2, the slope in ln v, and the slope's slope."""

    def __init__(self, value, slope, second):
        self.value, self.slope, self.second = value, slope, second


class Universe:
    """hubble_constant, matter, curvature, cmb_temperature, effective_neutrino_number,
    neutrino_masses, w: doubles. `curvature` None: it closes; `dark_energy`: none |
    cosmological_constant | constant."""

    def __init__(self, name, title, hubble_constant, matter, curvature=0.0, dark_energy="cosmological_constant",
                 w=-1.0, cmb_temperature=None, effective_neutrino_number=0.0, neutrino_masses=()):
        self.name, self.title, self.dark_energy = name, title, dark_energy
        self.written = {"hubble_constant": hubble_constant, "matter": matter}
        self.masses = sorted(float(m) for m in neutrino_masses)
        if dark_energy == "none":
            curvature = None
        else:
            self.written["curvature"] = curvature
        if dark_energy == "constant":
            self.written["w"] = w
        if cmb_temperature is not None:
            self.written["cmb_temperature"] = cmb_temperature
            self.written["effective_neutrino_number"] = effective_neutrino_number
        self.hubble_constant, self.matter = mpf(hubble_constant), mpf(matter)
        self.w = mpf(w)
        self.temperature = None if cmb_temperature is None else mpf(cmb_temperature)
        self._radiate(effective_neutrino_number)
        self._close(curvature)
        self._directions()

    def _radiate(self, number):
        photons, number = mpf(0), mpf(number)
        if self.temperature is not None:
            photons = constants.PHOTON_FACTOR * self.temperature**4 / self.hubble_constant**2
        ratio = constants.DECOUPLING_RATIO * (number / 3) ** (mpf(1) / 4)
        self.one_massless = photons * mpf(7) / 8 * ratio**4
        heavy = [m for m in self.masses if m > 0] if number > 0 and photons > 0 else []
        self.radiation = photons + self.one_massless * (3 - len(heavy))
        self.y = []
        for mass in heavy:
            thermal = constants.BOLTZMANN_J_K * self.temperature * ratio
            self.y.append(mpf(mass) * constants.ELECTRONVOLT_J / thermal)
        self.today = [fermi.integrals(y) for y in self.y]
        self.neutrinos_today = sum((self.one_massless * f[0] for f in self.today), mpf(0))
        self.cold = self.matter - self.neutrinos_today

    def _close(self, curvature):
        terms = [mpf(1), self.matter, self.radiation]
        if curvature is not None:
            terms.append(mpf(curvature))
        rest = terms[0] - sum(terms[1:])
        if abs(rest) < 8 * mpf(2) ** -52 * sum(abs(t) for t in terms):
            rest = mpf(0)
        self.curvature = mpf(curvature) if curvature is not None else rest
        self.closing = rest
        self.dark = mpf(0) if curvature is None else rest

    def _directions(self):
        """Change of each density per unit change of ln(parameter): (cold, radiation, curvature,
        dark energy, w, neutrino amplitude (relative), ln y of each massive species, own shifts)."""
        self.directions = {}
        wanted = [("hubble_constant", {}), ("matter", {"matter": self.matter})]
        if self.dark_energy != "none":
            wanted.append(("curvature", {"curvature": self.curvature}))
        if self.dark_energy == "constant":
            wanted.append(("w", {"w": self.w}))
        if self.temperature is not None:
            wanted.append(("cmb_temperature", {}))
        if self.one_massless > 0:
            wanted.append(("effective_neutrino_number", {}))
        for i in range(len(self.y)):
            wanted.append((f"neutrino_mass_{i + 1}", {"species": i}))
        for name, own in wanted:
            self.directions[name] = self._direction(name, own)

    def _direction(self, name, own):
        amplitude, ln_y = mpf(0), [mpf(0)] * len(self.y)
        massless = self.one_massless * (3 - len(self.y))
        radiation = mpf(0)
        if name == "hubble_constant":
            amplitude, radiation = mpf(-2), -2 * self.radiation
        elif name == "cmb_temperature":
            amplitude, radiation = mpf(4), 4 * self.radiation
            ln_y = [mpf(-1)] * len(self.y)
        elif name == "effective_neutrino_number":
            amplitude, radiation = mpf(1), massless
            ln_y = [mpf(-1) / 4] * len(self.y)
        elif "species" in own:
            ln_y[own["species"]] = mpf(1)
        neutrinos = mpf(0)
        for (energy, _, slope, _), d in zip(self.today, ln_y):
            neutrinos += self.one_massless * (amplitude * energy + slope * d)
        matter, curvature = own.get("matter", mpf(0)), own.get("curvature", mpf(0))
        closing = -(matter + radiation + curvature)
        dark = mpf(0)
        if self.dark_energy == "none":
            curvature = closing
        else:
            dark = closing
        return {
            "cold": matter - neutrinos, "radiation": radiation, "curvature": curvature, "dark": dark,
            "w": own.get("w", mpf(0)), "amplitude": amplitude, "ln_y": ln_y,
            "hubble_constant": mpf(1 if name == "hubble_constant" else 0),
            "cmb_temperature": mpf(1 if name == "cmb_temperature" else 0),
        }

    def dark_power(self):
        """Exponent p of the dark-energy density v^p."""
        return 3 * (1 + self.w) if self.dark_energy == "constant" else mpf(0)

    def _dark_shape(self, v):
        return v ** self.dark_power() if self.dark_energy == "constant" else mpf(1)

    def rate_squared(self, v):
        """E^2 and the neutrinos' and dark energy's shapes, the quadrature's only need."""
        neutrinos = [fermi.energy(y / v) for y in self.y]
        total = ((self.cold + self.radiation * v) * v + self.curvature) * v * v
        v4 = v**4
        for f in neutrinos:
            total += self.one_massless * v4 * f
        shape = self._dark_shape(v)
        return total + self.dark * shape, neutrinos, shape

    def float_directions(self):
        """The directions as floats, for the conditions of the integrals."""
        return [
            (float(d["cold"]), float(d["radiation"]), float(d["curvature"]), float(d["dark"]), float(d["w"]),
             float(d["amplitude"]), [float(x) for x in d["ln_y"]])
            for d in self.directions.values()
        ]

    def float_changes(self, v, neutrinos, shape, directions):
        """dE^2/dln(parameter) of every parameter at v, as floats."""
        v, shape = float(v), float(shape)
        v2, v3, v4 = v * v, v**3, v**4
        one, dark = float(self.one_massless), float(self.dark)
        pairs = []
        for f, y in zip(neutrinos, self.y):
            pairs.append((one * v4 * float(f), one * v4 * fermi.energy_slope_float(float(y) / v)))
        tilt = dark * shape * 3 * math.log(v)
        changes = []
        for cold, radiation, curvature, de, w, amplitude, ln_y in directions:
            change = cold * v3 + radiation * v4 + curvature * v2 + de * shape + tilt * w
            for (rho, slope), d in zip(pairs, ln_y):
                change += amplitude * rho + slope * d
            changes.append(change)
        return changes

    def terms(self, v):
        """All terms at v, with their changes per ln(parameter): {name: Term}, {parameter: {name: Term}}."""
        v2, v3, v4 = v**2, v**3, v**4
        p, shape, ln_v = self.dark_power(), self._dark_shape(v), log(v)
        terms = {
            "cold": Term(self.cold * v3, 3 * self.cold * v3, 9 * self.cold * v3),
            "radiation": Term(self.radiation * v4, 4 * self.radiation * v4, 16 * self.radiation * v4),
            "curvature": Term(self.curvature * v2, 2 * self.curvature * v2, 4 * self.curvature * v2),
            "dark": Term(self.dark * shape, p * self.dark * shape, p * p * self.dark * shape),
        }
        species = [fermi.integrals(y / v) for y in self.y]
        one = self.one_massless * v4
        total, slope, second = mpf(0), mpf(0), mpf(0)
        for f, g, f1, g1 in species:
            total += one * f
            slope += one * (3 * f + g)
            second += one * (4 * (3 * f + g) - (3 * f1 + g1))
        terms["neutrinos"] = Term(total, slope, second)
        changes = {}
        for name, d in self.directions.items():
            tilt = 3 * d["w"]
            value, grade = mpf(0), mpf(0)
            for (f, g, f1, g1), ln_y in zip(species, d["ln_y"]):
                value += one * (d["amplitude"] * f + ln_y * f1)
                grade += one * (d["amplitude"] * (3 * f + g) + ln_y * (3 * f1 + g1))
            changed = d["dark"] * shape + terms["dark"].value * tilt * ln_v
            changes[name] = {
                "cold": Term(d["cold"] * v3, 3 * d["cold"] * v3, None),
                "radiation": Term(d["radiation"] * v4, 4 * d["radiation"] * v4, None),
                "curvature": Term(d["curvature"] * v2, 2 * d["curvature"] * v2, None),
                "dark": Term(changed, p * changed + tilt * terms["dark"].value, None),
                "neutrinos": Term(value, grade, None),
            }
        return terms, changes

    def powers(self):
        """E^2 as [(coefficient, power of v)] for v so large that y/v < 1e-13."""
        powers = [(self.radiation + self.one_massless * len(self.y), mpf(4)), (self.cold, mpf(3))]
        bend = sum((5 * y * y for y in self.y), mpf(0)) * self.one_massless / (7 * constants.pi**2)
        powers.append((self.curvature + bend, mpf(2)))
        powers.append((self.dark, self.dark_power()))
        return [(c, p) for c, p in powers if c != 0]
