"""The integrals against formulas that owe nothing to the quadrature; prints the worst disagreement."""

from mpmath import asinh, elliprf, hyp2f1, log, mp, mpf, polyroots, sinh, sqrt

from history import History
from quantities import transverse
from universes import LIMITED, WHOLE

POINTS = [mpf(x) for x in ("-0.9", "-0.5", "1e-12", "1e-3", "0.5", "1", "3", "30", "1089.92", "1e6", "1e9")]


def _carlson(universe, v):
    """Int_1^v dv/E for a polynomial E^2 of degree 3 or 4 (Carlson 1988, Math. Comp. 51, 267)."""
    powers = [universe.radiation, universe.cold, universe.curvature, mpf(0), universe.dark]
    while powers[0] == 0:
        powers.pop(0)
    roots = polyroots(powers, maxsteps=2000, extraprec=400)
    lead, x, y = powers[0], mpf(v), mpf(1)
    upper = [sqrt(x - r) for r in roots] + [mpf(1)] * (4 - len(roots))
    lower = [sqrt(y - r) for r in roots] + [mpf(1)] * (4 - len(roots))

    def mixed(i, j):
        k, m = [n for n in range(4) if n not in (i, j)]
        return (upper[i] * upper[j] * lower[k] * lower[m] + lower[i] * lower[j] * upper[k] * upper[m]) / (x - y)

    sign = 1 if x > y else -1
    return sign * (2 * elliprf(mixed(0, 1) ** 2, mixed(0, 2) ** 2, mixed(0, 3) ** 2) / sqrt(lead)).real


def _checks(universe, inward, outward, v):
    """(what, quadrature, formula) that hold for this universe at v."""
    z, m, dark = v - 1, universe.matter, universe.dark
    plain = universe.temperature is None
    if universe.name == "einstein-de-sitter":
        yield "path", outward.path, 2 * (1 - 1 / sqrt(v))
        yield "age", inward.time, mpf(2) / 3 * v ** mpf(-1.5)
        yield "conformal", inward.path, 2 / sqrt(v)
    if universe.name == "milne":
        yield "path", outward.path, log(v)
        yield "age", inward.time, 1 / v
        yield "across", transverse(outward.path, universe.curvature), sinh(log(v))
    if universe.name == "de-sitter":
        yield "path", outward.path, z
        yield "lookback", outward.time, log(v)
    if universe.name == "pure-radiation":
        root = sqrt(universe.radiation)
        yield "path", outward.path, z / v / root
        yield "age", inward.time, 1 / (2 * root * v * v)
    if universe.name == "radiation-open":
        r, k = universe.radiation, universe.curvature
        yield "age", inward.time, (sqrt(r + k / v**2) - sqrt(r)) / k
        yield "conformal", inward.path, asinh(sqrt(k / r) / v) / sqrt(k)
    if universe.name in ("open-plain", "recollapse"):
        mattig = 2 / m**2 * (m * z + (m - 2) * (sqrt(1 + m * z) - 1)) / v
        yield "Mattig", transverse(outward.path, universe.curvature), mattig
    if plain and universe.curvature == 0 and 0 < m < 1:
        yield "arcsinh age", inward.time, 2 / (3 * sqrt(dark)) * asinh(sqrt(dark / m) * v ** mpf(-1.5))
        body = hyp2f1(mpf(1) / 6, mpf(1) / 2, mpf(7) / 6, -dark / (m * v**3))
        yield "2F1 conformal", inward.path, 2 / sqrt(m * v) * body
    if not universe.y and universe.w == -1 and universe.dark != 0 and m > 0:
        yield "Carlson", outward.path, _carlson(universe, v)


def compare():
    """Worst relative disagreement over all; printed per formula."""
    worst = {}
    every = [(u, POINTS) for u in WHOLE] + [
        (u, [z for z in POINTS if low <= z <= high]) for u, low, high in LIMITED]
    for universe, points in every:
        vs = [1 + z for z in points]
        table = History(universe, bounces=universe.name == "bounce").at(vs)
        for v in vs:
            inward, outward = table[v]
            with mp.workdps(90):  # the formulas cancel where the quadrature does not
                checks = list(_checks(universe, inward, outward, v))
            for what, quadrature, formula in checks:
                error = abs(quadrature / formula - 1)
                key = f"{what} ({universe.name})"
                worst[key] = max(worst.get(key, mpf(0)), error)
    for key, error in worst.items():
        print(f"  {key:44s} {mp.nstr(error, 2)}")
    return max(worst.values())


if __name__ == "__main__":
    print("worst disagreement with closed forms:", mp.nstr(compare(), 2))
