"""Measures the scatter of each 1H scheme on published spectra and writes facts/proton_schemes.csv.

Signals are matched by the full prediction; the scatter is that of the scheme's own value about the matched
signal, robust against misassignment. Run it before fit_proton.py when a scheme has changed.
"""

from __future__ import annotations

import csv
import sys
from collections import defaultdict
from pathlib import Path

import numpy as np

HERE = Path(__file__).resolve()
sys.path[:0] = [str(HERE.parents[2] / "py"), str(HERE.parents[1])]

from bench.fit_proton import FACTS, Model, predict  # noqa: E402
from bench.proton_cases import Compound, load_compounds  # noqa: E402
from bench.proton_matching import match  # noqa: E402
from hoodside.molecule import read_structure  # noqa: E402
from hoodside.predict.learned import learned_table  # noqa: E402
from hoodside.predict.proton.classes import class_estimates  # noqa: E402
from hoodside.predict.proton.predict import scheme_estimates  # noqa: E402
from hoodside.predict.proton.view import View  # noqa: E402

#: 0.6745 of a normal deviation holds half of the values.
HALF = 0.6745
LEAST = 0.04  # ppm


def scatter() -> dict[str, tuple[float, int]]:
    """Scheme -> (robust standard deviation in ppm, number of signals)."""
    model = Model(learned_table("proton_learned"), learned_table("proton_splits"))
    left: dict[str, list[float]] = defaultdict(list)
    for item in load_compounds():
        if item.origin in ("published", "reactions"):
            for scheme, error in _errors(item, match(item.expected(predict(model, item)), item.signals)):
                left[scheme].append(error)
    return {k: (max(float(np.median(v)) / HALF, LEAST), len(v)) for k, v in sorted(left.items())}


def _errors(item: Compound, given: list[int]) -> list[tuple[str, float]]:
    structure = read_structure(item.smiles)
    view, classes = View(structure), class_estimates(structure)
    found = []
    for site, k in zip(item.sites, given, strict=True):
        if k >= 0 and site.exchange is None:
            for e in scheme_estimates(view, classes, site.hydrogens.atoms[0], site.hydrogens.slot):
                found.append((e.scheme, abs(item.signals[k].ppm - e.ppm)))
    return found


def main() -> None:
    """Write the table."""
    found = scatter()
    source = "scatter about the signals of tests/cases/published.json and reactions.json"
    with (FACTS / "proton_schemes.csv").open("w", newline="", encoding="utf-8") as file:
        out = csv.writer(file, lineterminator="\n")
        out.writerow(["scheme", "sd_ppm", "cases", "source", "origin"])
        for scheme, (sd, cases) in found.items():
            out.writerow([scheme, f"{sd:.3f}", cases, source, "fit"])


if __name__ == "__main__":
    main()
