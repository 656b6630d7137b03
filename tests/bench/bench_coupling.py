"""Patterns and J values against published spectra."""

from __future__ import annotations

import json
import sys
from collections import Counter
from collections.abc import Sequence
from dataclasses import dataclass
from pathlib import Path

HERE = Path(__file__).resolve()
sys.path[:0] = [str(HERE.parents[2] / "py"), str(HERE.parents[1])]

from bench.proton_matching import Expected, match, read_signals  # noqa: E402
from hoodside.molecule import read_structure  # noqa: E402
from hoodside.predict.coupling import predict_couplings  # noqa: E402
from hoodside.predict.model import ProtonGroup  # noqa: E402
from hoodside.predict.multiplet import apply_multiplets, combined_pattern, readable_patterns  # noqa: E402
from hoodside.predict.proton import predict_protons  # noqa: E402
from hoodside.readings.patterns import bare, normalise_pattern  # noqa: E402

CASES = HERE.parents[1] / "cases"
#: ppm that a wrong pattern weighs against a shift when groups are exchanged.
MISMATCH = 0.1
#: MHz taken where a report names no field.
USUAL_FIELD = 400.0


@dataclass(frozen=True)
class Comparison:
    """One printed signal with a definite pattern, and the patterns predicted for what was matched to it."""

    id: str
    ppm: float
    printed: str
    j: tuple[float, ...]
    groups: tuple[ProtonGroup, ...]
    patterns: tuple[tuple[str, tuple[float, ...]], ...]
    readable: frozenset[str]  # names the same couplings get at other resolutions

    @property
    def right(self) -> bool:
        """Whether what was matched to the signal is predicted with the printed pattern."""
        return any(bare(mult) == bare(self.printed) for mult, _ in self.patterns)

    def j_errors(self) -> list[float]:
        """|printed - predicted| of each J, paired largest first, where the pattern is right."""
        for mult, j in self.patterns:
            if bare(mult) == bare(self.printed) and len(j) == len(self.j):
                return [abs(a - b) for a, b in zip(sorted(j), sorted(self.j), strict=True)]
        return []


def comparisons(by_pattern: bool = False) -> list[Comparison]:
    """Every printed signal with a definite pattern in tests/cases/published.json that a group matches.

    ``by_pattern``: groups of like shift go where their pattern fits, as a chemist assigns them.
    """
    found = []
    for case in json.loads((CASES / "published.json").read_text("utf-8")):
        if case.get("h1"):
            found += _of_case(case, by_pattern)
    return found


def _of_case(case: dict, by_pattern: bool) -> list[Comparison]:  # type: ignore[type-arg]
    structure = read_structure(case["smiles"])
    solvent = case.get("solvent") or "CDCl3"
    groups = predict_protons(structure, solvent)
    couplings = predict_couplings(structure, groups, solvent)
    groups = apply_multiplets(groups, couplings, float(case.get("mhz") or USUAL_FIELD))
    given = match([_expected(g) for g in groups], read_signals(case["h1"]))
    if by_pattern:
        given = _exchanged(given, groups, case["h1"])
    found = []
    for k, entry in enumerate(case["h1"]):
        printed = normalise_pattern(entry.get("mult") or "m")
        matched = [i for i, s in enumerate(given) if s == k and not groups[i].exchangeable]
        if matched and bare(printed) not in ("m", "ABq"):
            patterns = [(groups[i].mult, groups[i].j) for i in matched]
            patterns += [combined_pattern(matched, groups, couplings)] if len(matched) > 1 else []
            ppm, j = entry.get("ppm", entry.get("lo")), tuple(entry.get("j") or ())
            here = tuple(groups[i] for i in matched)
            sets = [*[[i] for i in matched], matched]
            readable = frozenset().union(*(readable_patterns(m, groups, couplings) for m in sets))
            found.append(Comparison(case["id"], ppm, printed, j, here, tuple(patterns), readable))
    return found


def _exchanged(
    given: Sequence[int],
    groups: Sequence[ProtonGroup],
    entries: Sequence[dict],  # type: ignore[type-arg]
) -> list[int]:
    """The assignment with groups of equal size exchanged where patterns gain and shifts hardly lose."""
    given = list(given)
    shifts = [(e.get("ppm", e.get("lo")) + e.get("ppm", e.get("hi"))) / 2 for e in entries]
    printed = [bare(normalise_pattern(e.get("mult") or "m")) for e in entries]

    def away(k: int, s: int) -> float:
        return abs(groups[k].ppm - shifts[s]) + (MISMATCH if groups[k].mult != printed[s] else 0.0)

    for i in range(len(groups)):
        for k in range(i):
            a, b = given[i], given[k]
            if a < 0 or b < 0 or a == b or groups[i].n != groups[k].n or groups[i].exchangeable:
                continue
            if not groups[k].exchangeable and away(i, b) + away(k, a) < away(i, a) + away(k, b):
                given[i], given[k] = b, a
    return given


def _expected(group: ProtonGroup) -> Expected:
    lo, hi = (group.lo, group.hi) if group.lo is not None and group.hi is not None else (group.ppm, group.ppm)
    return Expected(group.ppm, group.n, group.exchangeable, lo, hi)


def run() -> None:
    """Print the share of right patterns, the error of J, and the commonest confusions."""
    summary("assigned by shift alone", comparisons())
    found = comparisons(by_pattern=True)
    summary("assigned by shift and pattern", found)
    confused = Counter((bare(c.printed), c.patterns[-1][0]) for c in found if not c.right)
    for (printed, predicted), count in confused.most_common(12):
        print(f"  {count:4d}  printed {printed:6s} predicted {predicted}")


def summary(title: str, found: Sequence[Comparison]) -> None:
    """One line of figures."""
    errors = [e for c in found for e in c.j_errors()]
    right = sum(c.right for c in found)
    alike = sum(c.right or bare(c.printed) in c.readable for c in found)
    print(
        f"1H patterns, {title}: of {len(found)} definite ones {right / len(found):.1%} as printed, "
        f"{alike / len(found):.1%} at the resolution of the print; "
        f"J mean absolute error {sum(errors) / len(errors):.2f} Hz over {len(errors)}"
    )


if __name__ == "__main__":
    run()
