"""Writes the references: `python make.py`; compares what stands there with another quadrature: `python make.py --check`.

Needs mpmath (gmpy2 makes it quicker); see README.md for the files' format.
"""

import argparse
import multiprocessing
import pathlib
import random
import sys
import time

import closed_forms
import fermi
import quantities
import redshifts
from history import History
from mpmath import mp, mpf
from universes import LIMITED, WHOLE

VALUES = pathlib.Path(__file__).parent / "values"
HEAD = "# Made by tests/references/make.py: see README.md there.\n"


def jobs():
    """(index, universe, low, high): every universe with the range of its references."""
    listed = [(u, -0.99, 1e9) for u in WHOLE] + LIMITED
    return [(i, *entry) for i, entry in enumerate(listed)]


def _points(index, universe, low, high, history):
    points = redshifts.for_everyone(index)
    if universe.name != "bounce":
        points += redshifts.special(universe, history, (low, high))
    return sorted({z + 0.0 for z in points if low <= z <= high} | {low, high})


def _header(universe, low, high, table):
    lines = [HEAD, f"name\t{universe.name}\n", f"title\t{universe.title}\n", f"dark_energy\t{universe.dark_energy}\n"]
    lines += [f"{key}\t{value!r}\n" for key, value in universe.written.items()]
    if universe.masses:
        lines.append("neutrino_masses\t" + ",".join(repr(m) for m in universe.masses) + "\n")
    lines.append(f"range\t{low!r},{high!r}\n")
    reasons = {}
    if not table.has_beginning:
        reasons["age"] = "the integral from the beginning diverges: no beginning"
    if not table.conformal:
        reasons["conformal_time"] = "the integral from the beginning diverges"
    if universe.temperature is None:
        reasons["cmb_temperature"] = "no radiation declared"
    if universe.dark_energy == "none":
        reasons["equation_of_state"] = "no dark energy"
    return lines + [f"without\t{key}\t{reason}\n" for key, reason in reasons.items()], reasons


def write_universe(job):
    """One file of values; returns its name, its points and the seconds it took."""
    index, universe, low, high = job
    begun = time.time()
    table = History(universe, bounces=universe.name == "bounce")
    points = _points(index, universe, low, high, table)
    integrals = table.at([1 + mpf(z) for z in points])
    lines, reasons = _header(universe, low, high, table)
    names = [name for name in quantities.NAMES if name not in reasons]
    lines.append("redshift\t" + "\t".join(names) + "\n")
    for z in points:
        inward, outward = integrals[1 + mpf(z)]
        row = quantities.with_conditions(universe, mpf(z), inward, outward, table.conformal)
        cells = [
            "" if z < 0 and name in quantities.NOT_IN_THE_FUTURE else quantities.written(*row[name]) for name in names
        ]
        lines.append(repr(z) + "\t" + "\t".join(cells) + "\n")
    folder = VALUES / ("limited" if index >= len(WHOLE) else "whole")
    folder.mkdir(parents=True, exist_ok=True)
    (folder / f"{universe.name}.tsv").write_text("".join(lines))
    return universe.name, len(points), time.time() - begun


def write_redshift_alone():
    """The quantities that need no universe."""
    points = set(redshifts.LANDMARKS)
    for edge in redshifts.EDGES:
        points |= set(redshifts.neighbours(edge))
    lines = [HEAD, "name\tredshift-alone\n", "title\tquantities of the redshift alone\n"]
    lines.append("redshift\t" + "\t".join(quantities.REDSHIFT_ALONE) + "\n")
    for z in sorted(z + 0.0 for z in points if -0.99 <= z <= 1e9):
        exact = mpf(z)
        values, moved = (quantities.redshift_alone(x) for x in (exact, exact * (1 + quantities.STEP)))
        cells = []
        for name in quantities.REDSHIFT_ALONE:
            value = values[name]
            condition = abs((moved[name] - value) / (value * quantities.STEP)) if value else mpf(0)
            cells.append(quantities.written(value, condition))
        lines.append(repr(z) + "\t" + "\t".join(cells) + "\n")
    (VALUES / "redshift-alone.tsv").write_text("".join(lines))


def write_neutrinos():
    """F(y) and G(y) at octave edges and on either side, and log-spaced between."""
    chance = random.Random(7)
    points = [2.0**k for k in range(-20, 31, 5)] + [10 ** chance.uniform(-6, 9) for _ in range(40)]
    for k in range(-11, 11):
        for m in (1.0, 1.5):
            points += redshifts.neighbours(2.0**k * m)
    points += [10 ** chance.uniform(-3, 3) for _ in range(60)]
    lines = [HEAD, "name\tneutrinos\n", "title\tFermi-Dirac energy F(y) and pressure G(y)\n", "y\tenergy\tpressure\n"]
    for y in sorted(set(points)):
        energy, pressure, _, _ = fermi.integrals(y)
        lines.append(f"{y!r}\t{quantities.written(energy, 0)}\t{quantities.written(pressure, 0)}\n")
    (VALUES / "neutrinos.tsv").write_text("".join(lines))


def read(path):
    """{redshift: {name: text}} of one file."""
    rows, names = {}, None
    for line in path.read_text().splitlines():
        cells = line.split("\t")
        if names is None:
            names = cells if cells[0] == "redshift" else None
        else:
            rows[float(cells[0])] = dict(zip(names[1:], cells[1:]))
    return rows


def check(sample=6):
    """Recomputes some rows of every universe with narrower panels; returns the worst disagreement."""
    worst = mpf(0)
    chance = random.Random()
    for index, universe, low, high in jobs():
        folder = VALUES / ("limited" if index >= len(WHOLE) else "whole")
        rows = read(folder / f"{universe.name}.tsv")
        table = History(universe, finer=2, bounces=universe.name == "bounce")
        points = chance.sample(sorted(rows), sample)
        integrals = table.at([1 + mpf(z) for z in points])
        here = mpf(0)
        for z in points:
            inward, outward = integrals[1 + mpf(z)]
            values = quantities.with_conditions(universe, mpf(z), inward, outward, table.conformal)
            for name, cell in rows[z].items():
                text = cell.split("~")[0]
                if text in ("", "-", "0"):
                    continue
                here = max(here, abs(mpf(text) / values[name][0] - 1))
        print(f"  {universe.name:24s} {mp.nstr(here, 2)}", flush=True)
        worst = max(worst, here)
    return worst


def main():
    parser = argparse.ArgumentParser(description=__doc__)
    parser.add_argument("--check", action="store_true", help="compare, write nothing")
    parser.add_argument("--processes", type=int, default=1)
    parser.add_argument("--only", default="", help="the universes whose names hold this")
    options = parser.parse_args()
    print("worst disagreement with closed forms:", mp.nstr(closed_forms.compare(), 2))
    if options.check:
        worst = check()
        print("worst disagreement with the other quadrature:", mp.nstr(worst, 2))
        sys.exit(worst > mpf("1e-20"))
    VALUES.mkdir(exist_ok=True)
    write_redshift_alone()
    write_neutrinos()
    wanted = [job for job in jobs() if options.only in job[1].name]
    with multiprocessing.Pool(options.processes) as pool:
        for name, count, seconds in pool.imap_unordered(write_universe, wanted):
            print(f"  {name:24s} {count:4d} redshifts {seconds:6.1f} s", flush=True)


if __name__ == "__main__":
    main()
