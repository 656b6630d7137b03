"""Patterns and J values against published spectra."""

from __future__ import annotations

import json
import sys
from collections import Counter
from dataclasses import dataclass
from pathlib import Path

HERE = Path(__file__).resolve()
sys.path[:0] = [str(HERE.parents[2] / "py"), str(HERE.parents[1])]

from bench.bench_proton import expected  # noqa: E402
from bench.proton_matching import match, read_signals  # noqa: E402
from hoodside.molecule import read_structure  # noqa: E402
from hoodside.predict.coupling import predict_couplings  # noqa: E402
from hoodside.predict.model import ProtonGroup  # noqa: E402
from hoodside.predict.multiplet import apply_multiplets  # noqa: E402
from hoodside.predict.proton import predict_protons  # noqa: E402
from hoodside.readings.patterns import bare, normalise_pattern  # noqa: E402

CASES = HERE.parents[1] / "cases"
#: MHz taken where a report names no field.
USUAL_FIELD = 400.0


@dataclass(frozen=True)
class Comparison:
    """One printed signal with a definite pattern, and the predicted groups matched to it."""

    id: str
    ppm: float
    printed: str
    j: tuple[float, ...]
    groups: tuple[ProtonGroup, ...]

    @property
    def right(self) -> bool:
        """Whether a group matched to the signal has the printed pattern."""
        return any(bare(g.mult) == bare(self.printed) for g in self.groups)

    def j_errors(self) -> list[float]:
        """|printed - predicted| of each J, paired largest first, over the groups of equal pattern."""
        for g in self.groups:
            if bare(g.mult) == bare(self.printed) and len(g.j) == len(self.j):
                pairs = zip(sorted(g.j), sorted(self.j), strict=True)
                return [abs(a - b) for a, b in pairs]
        return []


def comparisons() -> list[Comparison]:
    """Every printed signal with a definite pattern in tests/cases/published.json that a group matches."""
    found = []
    for case in json.loads((CASES / "published.json").read_text("utf-8")):
        if case.get("h1"):
            found += _of_case(case)
    return found


def _of_case(case: dict) -> list[Comparison]:  # type: ignore[type-arg]
    structure = read_structure(case["smiles"])
    solvent = case.get("solvent") or "CDCl3"
    groups = predict_protons(structure, solvent)
    couplings = predict_couplings(structure, groups, solvent)
    groups = apply_multiplets(groups, couplings, float(case.get("mhz") or USUAL_FIELD))
    given = match([expected(g) for g in groups], read_signals(case["h1"]))
    found = []
    for k, entry in enumerate(case["h1"]):
        printed = normalise_pattern(entry.get("mult") or "m")
        matched = tuple(g for g, s in zip(groups, given, strict=True) if s == k and not g.exchangeable)
        if matched and bare(printed) not in ("m", "ABq"):
            ppm = entry.get("ppm", entry.get("lo"))
            found.append(Comparison(case["id"], ppm, printed, tuple(entry.get("j") or ()), matched))
    return found


def run() -> None:
    """Print the share of right patterns, the error of J, and the commonest confusions."""
    found = comparisons()
    errors = [e for c in found for e in c.j_errors()]
    right = sum(c.right for c in found)
    print(
        f"1H patterns: {right} of {len(found)} definite patterns right ({100 * right / len(found):.1f} %); "
        f"J mean absolute error {sum(errors) / len(errors):.2f} Hz over {len(errors)}"
    )
    confused = Counter((bare(c.printed), c.groups[0].mult) for c in found if not c.right)
    for (printed, predicted), count in confused.most_common(12):
        print(f"  {count:4d}  printed {printed:6s} predicted {predicted}")


if __name__ == "__main__":
    run()
