"""The redshifts of the references, chosen to hit what can go wrong.

Every universe: both ends, tiny |z|, landmarks, log-spaced random ones by a
fixed seed, its own share of the edges of panels (two per octave of 1 + z) with
one double on either side, its turning points and their neighbourhood.
"""

import math
import random

from mpmath import mpf, pi, sqrt

from quantities import transverse

LANDMARKS = [
    -0.99, -0.9, -0.5, -0.1, -1e-3, -1e-8, -1e-12, -(2.0**-53), 0.0, 2.0**-52, 1e-12, 1e-8, 1e-5, 1e-3, 0.01, 0.1, 0.5, 1.0, 2.0, 3.0, 6.0,
    10.0, 30.0, 100.0, 1089.92, 1e4, 1e5, 1e6, 1e8, 1e9,
]
EDGES = sorted(
    2.0**k * m - 1 for k in range(-7, 30) for m in (1.0, 1.5) if -0.99 < 2.0**k * m - 1 <= 1e9 and 2.0**k * m != 1
)
RANDOMS, OWN_EDGES = 18, 11


def neighbours(z):
    return [math.nextafter(z, -math.inf), z, math.nextafter(z, math.inf)]


def for_everyone(index):
    """All but the special ones; `index` of the universe sets its share of edges and its seed."""
    chance = random.Random(1000 + index)
    points = list(LANDMARKS)
    for j in range(OWN_EDGES):
        points += neighbours(EDGES[(index + j * len(EDGES) // OWN_EDGES) % len(EDGES)])
    for _ in range(RANDOMS):
        points.append(10 ** chance.uniform(-6, 9) if chance.random() < 0.85 else -chance.uniform(1e-4, 0.99))
    return points


def _root(function, low, high, steps=48):
    """The sign change of `function` between low and high."""
    below = function(low)
    for _ in range(steps):
        middle = (low + high) / 2
        value = function(middle)
        if (value > 0) == (below > 0):
            low = middle
        else:
            high = middle
    return low


def special(universe, history, conformal_range):
    """Peaks of the angular-diameter, transverse and luminosity distances, equator and antipode, equality."""
    grid = [mpf(10) ** (mpf(j) / 8) for j in range(-8, 73)]
    paths = []
    total, before = mpf(0), mpf(1)
    for z in grid:
        total += history.between(before, 1 + z).path
        before = 1 + z
        paths.append(total)

    def path(z):
        i = max((j for j in range(len(grid)) if grid[j] <= z), default=0)
        return paths[i] + history.between(1 + grid[i], 1 + z).path if z >= grid[i] else history.comoving(1 + z)

    def slope(power):
        def function(z):
            # d ln(v^power S(D)) / dz, times S(D)
            d, v = path(z), 1 + z
            cosine = sqrt(1 + universe.curvature * transverse(d, universe.curvature) ** 2)
            if universe.curvature < 0 and (sqrt(-universe.curvature) * d / pi) % 2 > 0.5 and (
                    sqrt(-universe.curvature) * d / pi) % 2 < 1.5:
                cosine = -cosine
            return cosine / sqrt(universe.rate_squared(v)[0]) + power * transverse(d, universe.curvature) / v
        return function

    functions = [slope(-1), slope(1), slope(0)] if universe.curvature < 0 else [slope(-1)]
    if universe.curvature < 0:
        functions.append(lambda z: sqrt(-universe.curvature) * path(z) - pi)
    points = []
    for number, function in enumerate(functions):
        values = [function(z) for z in grid]
        for i in range(len(grid) - 1):
            if (values[i] > 0) != (values[i + 1] > 0):
                at = float(_root(function, grid[i], grid[i + 1]))
                near = [1e-3, 1e-6] if number == 3 else [1e-4]
                points += [at] + [at * (1 + s * e) for e in near for s in (-1, 1)]
    if universe.radiation > 0 and universe.cold > 0:
        points.append(float(universe.cold / universe.radiation) - 1)
    return [z for z in points if conformal_range[0] <= z <= conformal_range[1]]
