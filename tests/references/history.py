"""The integrals of one universe over a list of v = 1 + z.

Gauss-Legendre in v between neighbouring points, panels no wider than a quarter
of the distance to the nearest root of E^2 in the complex plane; from the last
point outwards until one power rules to 1e-10, and a closed sum of powers from
there to infinity. Age and conformal time add up from infinity, distance and
lookback from v = 1. Beside each integral run its changes per ln(parameter), in
floats.
"""

import math
from functools import lru_cache

import mpmath
from mpmath import mp, mpf, sqrt

TARGET = 42  # decimal digits of a panel


@lru_cache(maxsize=None)
def legendre(count):
    """Nodes and weights on [-1, 1]."""
    nodes = []
    with mp.workdps(mp.dps + 10):
        for i in range(1, count + 1):
            x = mpmath.cos(mpmath.pi * (i - mpf(1) / 4) / (count + mpf(1) / 2))
            for _ in range(8):
                before, now = mpf(1), x
                for k in range(2, count + 1):
                    before, now = now, ((2 * k - 1) * x * now - (k - 1) * before) / k
                slope = count * (x * now - before) / (x * x - 1)
                x -= now / slope
            nodes.append((x, 2 / ((1 - x * x) * slope * slope)))
    return nodes


class Integrals:
    """Between two points or up to one: Int dv/(vE), Int dv/E, and their changes."""

    def __init__(self, time, path, d_time, d_path):
        self.time, self.path, self.d_time, self.d_path = time, path, d_time, d_path

    def plus(self, other):
        return Integrals(
            self.time + other.time, self.path + other.path,
            [a + b for a, b in zip(self.d_time, other.d_time)],
            [a + b for a, b in zip(self.d_path, other.d_path)],
        )

    def negated(self):
        return Integrals(-self.time, -self.path, [-a for a in self.d_time], [-a for a in self.d_path])


class History:
    """`finer` > 1 narrows the panels and adds nodes: another quadrature to compare with.
    `bounces`: no beginning, whatever the largest power says."""

    def __init__(self, universe, finer=1, bounces=False):
        self.universe, self.finer, self.bounces = universe, finer, bounces
        self.directions = universe.float_directions()
        self.roots = self._roots()

    def _roots(self):
        """Roots of E^2 with massive neutrinos as matter and dark energy as a constant: they only set widths."""
        u = self.universe
        coefficients = [float(c) for c in (u.radiation, u.matter, u.curvature, mpf(0), u.dark)]
        while coefficients and coefficients[0] == 0:
            coefficients.pop(0)
        return [complex(r) for r in mpmath.polyroots(coefficients, maxsteps=500, extraprec=200)] if len(coefficients) > 1 else []

    def zero(self):
        nothing = [0.0] * len(self.directions)
        return Integrals(mpf(0), mpf(0), nothing, nothing)

    def _distance(self, v):
        v = float(v)
        return min([1.0] + [abs(v - r) / v for r in self.roots])

    def between(self, low, high):
        """Int from low to high, low <= high."""
        total = self.zero()
        left = low
        while left < high:
            distance = min(self._distance(left), self._distance(min(left * mpf("1.3"), high)))
            if distance < 1e-7:
                raise ArithmeticError(f"{self.universe.name}: E = 0 near v = {left}")
            widest = 1 + mpf(min(0.5, 0.5 * distance) / self.finer)
            right = high if high <= left * widest else left * widest
            half = float((right - left) / (right + left))
            spread = max(1.5, 1.6 * distance / half) if half > 0 else 1e9
            count = min(60, 3 + 4 * (self.finer - 1) + math.ceil(TARGET / (2 * math.log10(spread))))
            total = total.plus(self._panel(left, right, count))
            left = right
        return total

    def _panel(self, left, right, count):
        center, half = (left + right) / 2, (right - left) / 2
        time, path = mpf(0), mpf(0)
        d_time, d_path = [0.0] * len(self.directions), [0.0] * len(self.directions)
        for x, weight in legendre(count):
            v = center + half * x
            squared, neutrinos, shape = self.universe.rate_squared(v)
            if squared <= 0:
                raise ArithmeticError(f"{self.universe.name}: E^2 <= 0 at v = {v}")
            part = weight * half / sqrt(squared)
            path += part
            time += part / v
            changes = self.universe.float_changes(v, neutrinos, shape, self.directions)
            factor = -0.5 * float(part / squared)
            for i, change in enumerate(changes):
                d_path[i] += factor * change
                d_time[i] += factor * change / float(v)
        return Integrals(time, path, d_time, d_path)

    def _tail(self, last):
        """From the last point to infinity; time or path None where it diverges."""
        powers = self.universe.powers()
        lead, power = max(powers, key=lambda term: term[1])
        if power <= 0 or self.bounces:
            return None
        start = max(last, mpf(10) ** 9) * 10**10
        rest = [(c / lead, p - power) for c, p in powers if p != power]
        while sum(abs(c) * start**q for c, q in rest) > mpf("1e-10"):
            start *= 10
        series, product, binomial = [(mpf(1), mpf(0))], [(mpf(1), mpf(0))], mpf(1)
        for k in range(1, 6):
            binomial *= (mpf(1) / 2 - k) / k
            product = [(a * c, p + q) for a, p in product for c, q in rest if abs(a * c) * start ** (p + q) > mpf("1e-60")]
            series += [(binomial * a, p) for a, p in product]
        root = sqrt(lead)

        def integral(extra):
            # Int_start^inf v^(q - power/2 - extra) dv, term by term
            total = mpf(0)
            for c, q in series:
                exponent = power / 2 + extra - q
                if exponent <= 1:
                    return None
                total += c * start ** (1 - exponent) / (exponent - 1)
            return total / root

        nothing = [0.0] * len(self.directions)
        path = integral(0)
        end = Integrals(integral(1), mpf(0) if path is None else path, nothing, nothing)
        return self.between(last, start).plus(end), path is not None

    def at(self, points):
        """{v: (inward, outward)}: Integrals from v to infinity (None without a beginning;
        its path counts only if `conformal`), and signed Integrals from 1 to v."""
        points = sorted(set(points) | {mpf(1)})
        gaps = [self.between(a, b) for a, b in zip(points, points[1:])]
        start = points.index(mpf(1))
        outward = {points[start]: self.zero()}
        for i in range(start, len(points) - 1):
            outward[points[i + 1]] = outward[points[i]].plus(gaps[i])
        for i in range(start, 0, -1):
            outward[points[i - 1]] = outward[points[i]].plus(gaps[i - 1].negated())
        tail = self._tail(points[-1])
        self.has_beginning = tail is not None
        self.conformal = tail is not None and tail[1]
        inward = {}
        if tail is not None:
            total = tail[0]
            inward[points[-1]] = total
            for i in range(len(points) - 1, 0, -1):
                total = total.plus(gaps[i - 1])
                inward[points[i - 1]] = total
        return {v: (inward.get(v), outward[v]) for v in points}

    def comoving(self, v):
        """Int_1^v dv/E, signed, for the search of special redshifts."""
        v = mpf(v)
        return self.between(mpf(1), v).path if v >= 1 else -self.between(v, mpf(1)).path
