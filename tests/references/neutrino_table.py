"""Prints src/model/neutrinos/coefficients.rs: python3 neutrino_table.py > FILE.

The energy density F(y) and three times the pressure G(y) of a relic
Fermi-Dirac species of mass m over the energy density of a massless one,
y = m c^2 / (k T):

    F(y) = 120/(7 pi^4) Int_0^inf p^2 sqrt(p^2 + y^2) / (e^p + 1) dp
    G(y) = 120/(7 pi^4) Int_0^inf p^4 / sqrt(p^2 + y^2) / (e^p + 1) dp

Quadrature: the trapezoid rule in ln p, which converges geometrically because
the integrands are analytic in a strip of half-width pi/2 about the real axis.
`python3 neutrino_table.py values` prints check values instead.
"""

import sys

from mpmath import mp, mpf, chebyt, cos, exp, factorial, binomial, log, pi, sqrt, taylor, zeta

mp.dps = 50
FIRST_OCTAVE, LAST_OCTAVE = -10, 9  # the table spans 2**-10 <= y < 2**9
NODES, COEFFICIENTS = 26, 16
STEP = mpf(1) / 14


def grid():
    points = []
    index = -int(40 / STEP)
    while True:
        p = exp(index * STEP)
        if p > 160:
            return points
        points.append((p * p, 120 / (7 * pi**4) * STEP * p**3 / (exp(p) + 1)))
        index += 1


GRID = grid()


def energy_and_pressure(y):
    square = mpf(y) ** 2
    roots = [(weight, p2, sqrt(p2 + square)) for p2, weight in GRID]
    energy = sum(weight * root for weight, p2, root in roots)
    pressure = sum(weight * p2 / root for weight, p2, root in roots)
    return energy, pressure


def panels():
    for octave in range(FIRST_OCTAVE, LAST_OCTAVE):
        for half in (0, 1):
            lower = mpf(2) ** octave * (1 + mpf(half) / 2)
            yield lower, lower + mpf(2) ** octave / 2


def polynomial(values):
    """Monomial coefficients in u of the interpolant through Chebyshev nodes, cut."""
    angles = [pi * (k + mpf(1) / 2) / NODES for k in range(NODES)]
    series = [
        2 * sum(v * cos(n * a) for v, a in zip(values, angles)) / NODES for n in range(NODES)
    ]
    series[0] /= 2
    monomials = [mpf(0)] * COEFFICIENTS
    for n in range(COEFFICIENTS):
        for power, factor in enumerate(TAYLOR[n]):
            monomials[power] += series[n] * factor
    return monomials


TAYLOR = [taylor(lambda x, n=n: chebyt(n, x), 0, n) for n in range(COEFFICIENTS)]


def literal(x):
    return repr(float(x))


def row(monomials):
    first = float(monomials[0])
    numbers = [first, float(monomials[0] - mpf(first))] + [float(m) for m in monomials[1:]]
    return "    [" + ", ".join(repr(n) for n in numbers) + "],"


def small_coefficients():
    """b, c5, c6 of F = 1 + c2 y^2 + y^4 (a ln y + b + c5 y + c6 y^2) + O(y^7).

    The last two are residues of the Mellin transform; b is what is left of F.
    """
    norm = 120 / (7 * pi**4)
    c2, a = 5 / (7 * pi**2), mpf(15) / (14 * pi**4)
    c5, c6 = -norm / 30, norm / 32 * -7 * zeta(-2, derivative=1)
    y = mpf(2) ** -18
    energy, _ = energy_and_pressure(y)
    b = (energy - 1 - c2 * y**2) / y**4 - a * log(y) - c5 * y - c6 * y**2
    return b, c5, c6


def large_coefficients(count):
    """c_k of F = sum c_k y^(1 - 2k): the binomial series, integrated term by term."""
    result = []
    for k in range(count):
        n = 2 * k + 3
        moment = factorial(n - 1) * zeta(n) * (1 - mpf(2) ** (1 - n))
        result.append(120 / (7 * pi**4) * binomial(mpf(1) / 2, k) * moment)
    return result


def table():
    energies, pressures = [], []
    for lower, upper in panels():
        angles = [pi * (k + mpf(1) / 2) / NODES for k in range(NODES)]
        middle, half = (lower + upper) / 2, (upper - lower) / 2
        values = [energy_and_pressure(middle + half * cos(a)) for a in angles]
        energies.append(row(polynomial([v[0] for v in values])))
        pressures.append(row(polynomial([v[1] for v in values])))
    print("//! Coefficients of the massive-neutrino integrals, printed by")
    print("//! `tests/references/neutrino_table.py`; its head says what they are.")
    print()
    print("/// One panel: a0, what a0 leaves out, a1 … a15 of a polynomial in u ∈ [−1, 1].")
    print(f"pub(super) type Panel = [f64; {COEFFICIENTS + 1}];")
    print()
    print("/// b, c₅, c₆ of F = 1 + 5y²/(7π²) + y⁴ (15/(14π⁴) ln y + b + c₅y + c₆y²) for small y.")
    small = ", ".join(literal(c) for c in small_coefficients())
    print(f"pub(super) const SMALL: [f64; 3] = [{small}];")
    print()
    print("/// c_k of F = Σ c_k y^(1 − 2k) for large y.")
    large = ", ".join(literal(c) for c in large_coefficients(7))
    print(f"pub(super) const LARGE: [f64; 7] = [{large}];")
    for name, what, rows in (
        ("ENERGY", "F", energies),
        ("PRESSURE", "G", pressures),
    ):
        print()
        print(f"/// {what} in two panels an octave from 2⁻¹⁰ to 2⁹.")
        print("#[rustfmt::skip]")
        print(f"pub(super) static {name}: [Panel; {len(rows)}] = [")
        print("\n".join(rows))
        print("];")


def check_values():
    grid_points = [mpf(2) ** k for k in (-20, -11, -10, -9, -5, -1, 0, 1, 3, 6, 8, 9, 10, 14)]
    others = [mpf(float(x)) for x in (1e-3, 0.01, 0.3, 0.77, 1.9, 4.4, 11.3, 77.7, 355.1, 511.9, 700.0, 1e5)]
    below = [mpf(float(2.0**9) - 2.0**-44), mpf(2.0**-10 - 2.0**-63)]
    for y in sorted(grid_points + others + below):
        energy, pressure = energy_and_pressure(y)
        slope = (energy - pressure) / y
        pair = lambda x: f"({float(x)!r}, {float(x - mpf(float(x)))!r})"
        print(f"    ({float(y)!r}, {pair(energy)}, {pair(pressure)}, {pair(slope)}),")


if __name__ == "__main__":
    check_values() if sys.argv[1:] == ["values"] else table()
