"""1H shifts against published spectra: error by class, worst misses, spread of the stated uncertainty."""

from __future__ import annotations

import json
import sys
from collections import defaultdict
from dataclasses import dataclass
from pathlib import Path

import numpy as np

HERE = Path(__file__).resolve()
sys.path[:0] = [str(HERE.parents[2] / "py"), str(HERE.parents[1])]

from bench.proton_matching import Expected, Signal, match, outside, read_signals  # noqa: E402
from hoodside.molecule import Structure, read_structure  # noqa: E402
from hoodside.predict.model import ProtonGroup  # noqa: E402
from hoodside.predict.proton import predict_protons  # noqa: E402

CASES = HERE.parents[1] / "cases"


@dataclass(frozen=True)
class Spectrum:
    """A published 1H spectrum with its structure."""

    id: str
    structure: Structure
    solvent: str
    signals: list[Signal]


def load_spectra(*files: str) -> list[Spectrum]:
    """Spectra of tests/cases/published.json and of the products in reactions.json."""
    found = []
    for name in files or ("published",):
        product = "product_" if name == "reactions" else ""
        for case in json.loads((CASES / f"{name}.json").read_text("utf-8")):
            if case.get(f"{product}h1"):
                structure = read_structure(case[f"{product}smiles"])
                solvent = case.get("solvent") or "CDCl3"
                found.append(Spectrum(case["id"], structure, solvent, read_signals(case[f"{product}h1"])))
    return found


@dataclass(frozen=True)
class Miss:
    """One predicted group and the signal it was given."""

    id: str
    group: ProtonGroup
    signal: Signal

    @property
    def error(self) -> float:
        """Signal minus prediction, ppm, from the middle of the signal."""
        return self.signal.ppm - self.group.ppm

    @property
    def beyond(self) -> float:
        """Distance from the printed range, ppm."""
        return outside(self.group.ppm, self.signal)


def expected(group: ProtonGroup) -> Expected:
    """A predicted group as the matching sees it."""
    lo, hi = (group.lo, group.hi) if group.lo is not None and group.hi is not None else (group.ppm, group.ppm)
    return Expected(group.ppm, group.n, group.exchangeable, lo, hi)


def misses(spectrum: Spectrum, groups: tuple[ProtonGroup, ...]) -> list[Miss]:
    """Every fixed H group with its signal."""
    given = match([expected(g) for g in groups], spectrum.signals)
    return [
        Miss(spectrum.id, g, spectrum.signals[k])
        for g, k in zip(groups, given, strict=True)
        if k >= 0 and not g.exchangeable
    ]


def report(found: list[Miss], title: str, worst: int = 25) -> None:
    """Print the table."""
    error = np.abs([m.error for m in found])
    beyond = np.array([m.beyond for m in found])
    print(
        f"{title}: {len(found)} groups; mean absolute error {error.mean():.3f} ppm from the middle of the signal, "
        f"{beyond.mean():.3f} from its range; 95 % within {np.quantile(error, 0.95):.2f} / {np.quantile(beyond, 0.95):.2f}"
    )
    by: dict[str, list[Miss]] = defaultdict(list)
    for m in found:
        by[m.group.environment].append(m)
    rows = sorted(by.items(), key=lambda kv: -sum(m.beyond for m in kv[1]))
    print(f"  {'environment':42s} {'n':>5s} {'mae':>6s} {'bias':>6s}  worst")
    for name, members in rows[:worst]:
        bad = max(members, key=lambda m: m.beyond)
        print(
            f"  {name:42s} {len(members):5d} {np.mean([m.beyond for m in members]):6.3f} "
            f"{np.mean([m.error for m in members]):+6.3f}  {bad.error:+.2f} {bad.id} atoms {bad.group.atoms}"
        )


def run() -> None:
    """Print the error table of the shipped predictor over published.json."""
    spectra = load_spectra("published")
    found = [m for s in spectra for m in misses(s, predict_protons(s.structure, s.solvent))]
    report(found, "1H, shipped predictor")


if __name__ == "__main__":
    run()
