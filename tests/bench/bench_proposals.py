"""Proposals from readings alone: how often structures can be put together, and whether the truth is first."""

from __future__ import annotations

import json
import time
from pathlib import Path

from bench.tables import Figure, print_figures
from hoodside.advise.proposals import propose
from hoodside.molecule import read_structure
from hoodside.readings.from_json import readings_from_json
from hoodside.rivals.names import flat

CASES = Path(__file__).parents[1] / "cases" / "published.json"
#: Every n-th case, to keep the section short.
_EVERY = 4


def run() -> None:
    """Print how often a structure is proposed and found; constitutions are compared."""
    places: list[int | None] = []
    answered, forced, right, seconds = 0, 0, 0, []
    for case in json.loads(CASES.read_text("utf-8"))[::_EVERY]:
        began = time.process_time()
        found = propose(readings_from_json(case), limit=60)
        seconds.append(time.process_time() - began)
        truth = read_structure(case["smiles"])
        strong = [f for f in found.fragments if f.weight_db >= 15]
        forced += len(strong)
        right += sum(bool(truth.matches(f.sign.smarts)) for f in strong)
        if found.structures:
            answered += 1
            names = [flat(proposal.smiles) for proposal in found.structures]
            places.append(names.index(flat(truth.smiles)) if flat(truth.smiles) in names else None)
    first = sum(place == 0 for place in places)
    print_figures(
        [
            Figure(
                "fragments of 15 dB and more that are there", 100 * right / forced, "%", note=f"of {forced}"
            ),
            Figure(
                "cases with structures proposed",
                100 * answered / len(seconds),
                "%",
                note=f"of {len(seconds)}",
            ),
            Figure("... the truth first", 100 * first / max(1, answered), "%"),
            Figure(
                "... the truth in the first five",
                100 * sum((p or 0) < 5 and p is not None for p in places) / max(1, answered),
                "%",
            ),
            Figure("CPU time per case, mean", sum(seconds) / len(seconds), "s"),
            Figure("CPU time per case, slowest", max(seconds), "s"),
        ]
    )
