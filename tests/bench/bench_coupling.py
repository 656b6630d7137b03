"""Patterns and J values against published spectra.

Groups are given to signals as the check gives them. Reports differ in the smallest splitting they print and
in how near two J may lie before they are printed as one; that resolution is a habit of the report, not a
property of the compound. Hence three counts: the name ``predict`` gives; the name at the resolution that
suits the *other* signals of the same report best (never the signal itself); and any name between the finest
and the coarsest reading.
"""

from __future__ import annotations

import json
import sys
from collections import Counter
from collections.abc import Sequence
from dataclasses import dataclass
from itertools import product
from pathlib import Path
from typing import Any

HERE = Path(__file__).resolve()
sys.path[:0] = [str(HERE.parents[2] / "py"), str(HERE.parents[1])]

from hoodside.molecule import read_structure  # noqa: E402
from hoodside.predict.coupling import Coupling, predict_couplings  # noqa: E402
from hoodside.predict.model import ProtonGroup  # noqa: E402
from hoodside.predict.multiplet import MERGED, RESOLVED, combined_pattern, readable_patterns  # noqa: E402
from hoodside.readings.from_json import readings_from_json  # noqa: E402
from hoodside.readings.patterns import bare, couplings_named, partner_counts  # noqa: E402
from hoodside.weigh.expectations import expectations  # noqa: E402
from hoodside.weigh.protons.signals import Signal, prepare  # noqa: E402
from hoodside.weigh.protons.solve import solve  # noqa: E402

CASES = HERE.parents[1] / "cases"
USUAL = (RESOLVED, MERGED)
#: Resolutions a report may have: (Hz of the smallest splitting seen, Hz within which two J read as one).
RESOLUTIONS = (USUAL, *product((0.3, 0.6, 0.9, 1.2, RESOLVED, 2.0, 2.6, 3.3), (0.3, 0.6, MERGED, 1.5, 2.0)))

Pattern = tuple[str, tuple[float, ...]]


@dataclass(frozen=True)
class Comparison:
    """One printed signal with a definite pattern, and what is predicted for the groups in it."""

    id: str
    ppm: float
    printed: str
    j: tuple[float, ...]
    patterns: dict[
        tuple[float, float], tuple[Pattern, ...]
    ]  # of each group and of all together, by resolution
    readable: frozenset[str]

    def right_at(self, resolution: tuple[float, float]) -> bool:
        """Whether a group of the signal, or all of them together, is predicted as printed."""
        return any(name == self.printed for name, _ in self.patterns[resolution])

    def j_errors(self) -> list[float]:
        """|printed - predicted| of each J, paired by size, where the pattern is right somehow."""
        for patterns in self.patterns.values():
            for name, j in patterns:
                if name == self.printed and len(j) == len(self.j):
                    return [abs(a - b) for a, b in zip(sorted(j), sorted(self.j), strict=True)]
        return []


def reports() -> list[list[Comparison]]:
    """Printed signals with a definite pattern that hold groups, report by report."""
    cases = json.loads((CASES / "published.json").read_text("utf-8"))
    return [_of_case(case) for case in cases if case.get("h1")]


def _of_case(case: dict[str, Any]) -> list[Comparison]:
    readings = readings_from_json(case)
    expected = expectations(case["smiles"], readings)
    groups = expected.h1
    couplings = tuple(predict_couplings(read_structure(case["smiles"]), groups))
    solution = solve(groups, expected.patterns, prepare(readings))
    found = []
    for k, signal in enumerate(solution.signals):
        members = [m for m in solution.members(k) if not groups[m].exchangeable]
        if members and signal.pattern and bare(signal.pattern) not in ("m", "ABq"):
            found.append(_compared(case["id"], signal, members, groups, couplings))
    return found


def _compared(
    name: str,
    signal: Signal,
    members: list[int],
    groups: Sequence[ProtonGroup],
    couplings: Sequence[Coupling],
) -> Comparison:
    sets = [*[[m] for m in members], members]
    patterns = {r: tuple(combined_pattern(s, groups, couplings, *r) for s in sets) for r in RESOLUTIONS}
    readable = frozenset().union(*(readable_patterns(s, groups, couplings) for s in sets))
    return Comparison(name, signal.ppm, _ordered(signal), signal.j, patterns, readable)


def _ordered(signal: Signal) -> str:
    """The printed name, its letters in the order of the printed J, largest first ("dt, J = 4, 11" is td)."""
    counts = couplings_named(signal.pattern)
    if len(counts) != len(signal.j):
        return bare(signal.pattern)
    letters = {count: letter for letter, count in partner_counts().items()}
    pairs = sorted(zip(signal.j, counts, strict=True), reverse=True)
    return "".join(letters[count] for _, count in pairs) or "s"


def resolution_of(others: Sequence[Comparison], prior: Counter[tuple[float, float]]) -> tuple[float, float]:
    """The resolution that suits most of some signals; of equals the commonest elsewhere."""
    total = max(prior.values()) + 1
    return max(RESOLUTIONS, key=lambda r: sum(o.right_at(r) for o in others) + prior[r] / total)


def _right_at_print(report: Sequence[Comparison], prior: Counter[tuple[float, float]]) -> int:
    return sum(c.right_at(resolution_of([o for o in report if o is not c], prior)) for c in report)


def run() -> None:
    """Print the share of right patterns, the error of J, and the commonest confusions."""
    found = reports()
    every = [c for report in found for c in report]
    prior = Counter(r for c in every for r in set(RESOLUTIONS) if c.right_at(r))
    at_print = sum(_right_at_print(report, prior) for report in found)
    usual = sum(c.right_at(USUAL) for c in every)
    alike = sum(c.right_at(USUAL) or c.printed in c.readable for c in every)
    errors = [e for c in every for e in c.j_errors()]
    print(f"1H patterns: {len(every)} definite ones in {len(found)} reports")
    print(f"  as predict names them                            {usual / len(every):.1%}   (88 % asked)")
    print(f"  at the resolution of the report's other signals  {at_print / len(every):.1%}")
    print(f"  at some resolution                               {alike / len(every):.1%}")
    print(f"  J mean absolute error {sum(errors) / len(errors):.2f} Hz over {len(errors)}   (at most 0.9)")
    confused = Counter((c.printed, c.patterns[USUAL][-1][0]) for c in every if not c.right_at(USUAL))
    for (printed, predicted), count in confused.most_common(12):
        print(f"  {count:4d}  printed {printed:6s} predicted {predicted}")


if __name__ == "__main__":
    run()
