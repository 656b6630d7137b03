"""Rivals: how many of the look-alikes that chemists listed are put up unprompted, and how fast.

A listed look-alike counts as recovered when it is among the best 200: the same constitution where the list
leaves its configuration open, the same relative configuration where the list marks it.
"""

from __future__ import annotations

import argparse
import json
import re
import time
from dataclasses import dataclass, field
from pathlib import Path
from typing import Any

from bench.tables import Figure, print_figures
from hoodside.check import check_case
from hoodside.hunt import Hunt
from hoodside.molecule.kernel import kernel
from hoodside.molecule.structure import Structure, read_structure
from hoodside.readings.from_json import readings_from_json
from hoodside.rivals import Rival, find_rivals, iterate_rivals
from hoodside.rivals.names import flat, name_of
from hoodside.weigh.verdict import FITS

CASES = Path(__file__).parents[1] / "cases" / "published.json"
LIMIT = 200
_DEPTHS = (20, 50, 100)
_READINGS = ("formula", "solvent", "mhz", "h1", "c13", "ir", "ir_medium", "ms", "hrms")
#: Hunts take longest: they are made for every so manieth case. The app puts up as many of what they find.
_EVERY_MISSING = 8
_PUT_UP = 3
_LONGEST_S = 60.0


@dataclass
class _Tally:
    ranks: list[int | None] = field(default_factory=list)
    missed: list[str] = field(default_factory=list)
    seconds: list[float] = field(default_factory=list)
    firsts: list[float] = field(default_factory=list)
    sizes: list[int] = field(default_factory=list)


def run(every: int = 1, show_missed: bool = False) -> None:
    """Print recovery at several depths of the list, and times; of every n-th case only, if asked."""
    tally = _Tally()
    for case in json.loads(CASES.read_text("utf-8"))[::every]:
        _measure(read_structure(case["smiles"]), case["rivals"], tally)
    print("\n".join(tally.missed) if show_missed else "", end="\n" if show_missed else "")
    _print(tally)
    print_figures(_missing(every * _EVERY_MISSING))


def _measure(intended: Structure, listed: list[str], tally: _Tally) -> None:
    began = time.process_time()
    next(iterate_rivals(intended, limit=LIMIT), None)
    tally.firsts.append(time.process_time() - began)
    began = time.process_time()
    found = find_rivals(intended, limit=LIMIT).rivals
    tally.seconds.append(time.process_time() - began)
    tally.sizes.append(len(found))
    for smiles in listed:
        rank = rank_of(smiles, found)
        tally.ranks.append(rank)
        if rank is None:
            tally.missed.append(f"  {intended.smiles} -> {name_of(smiles)}")


def _print(tally: _Tally) -> None:
    total = len(tally.ranks)
    hits = [rank for rank in tally.ranks if rank is not None]
    name = f"listed look-alikes among the best {LIMIT}"
    print_figures(
        [
            Figure(name, 100 * len(hits) / total, "%", least=85, note=f"of {total}"),
            *(
                Figure(f"... among the best {n}", 100 * sum(r < n for r in hits) / total, "%")
                for n in _DEPTHS
            ),
            Figure("CPU time per compound, mean", sum(tally.seconds) / len(tally.seconds), "s", most=1),
            Figure("CPU time per compound, slowest", max(tally.seconds), "s"),
            Figure(
                "CPU time to the first slice, mean",
                1000 * sum(tally.firsts) / len(tally.firsts),
                "ms",
                most=60,
            ),
            Figure("rivals put up, mean", sum(tally.sizes) / len(tally.sizes)),
        ]
    )


def _missing(every: int) -> list[Figure]:
    """Verdicts on the best of a list, as it stands and with the near look-alikes a hunt puts up unasked."""
    absent: list[tuple[bool, bool]] = []
    present: list[tuple[bool, bool]] = []
    for case in json.loads(CASES.read_text("utf-8"))[::every]:
        readings = {key: case[key] for key in _READINGS if case.get(key)}
        if len(case["rivals"]) > 1:
            absent.append(_fits(readings, case["rivals"]))
            present.append(_fits(readings, [case["smiles"], *case["rivals"]]))
    return [
        _share("truth not on the list: best one fits", [before for before, _ in absent]),
        _share("... with look-alikes put up unasked", [after for _, after in absent]),
        _share("truth on the list: best one fits", [before for before, _ in present]),
        _share("... with look-alikes put up unasked", [after for _, after in present]),
    ]


def _share(name: str, flags: list[bool]) -> Figure:
    return Figure(name, 100 * sum(flags) / len(flags), "%", note=f"of {len(flags)} cases")


def _fits(readings: dict[str, Any], candidates: list[str]) -> tuple[bool, bool]:
    """Whether the best of a list fits, before and after its near look-alikes are put up."""
    best = check_case({**readings, "candidates": candidates})["candidates"][0]
    hunt = Hunt(read_structure(best["smiles"]), readings_from_json(readings))
    hunt.go_on(_LONGEST_S)
    near = [{"smiles": r["smiles"], "how": r["how"]} for r in hunt.answer()["rivals"] if r["near"]]
    again = check_case({**readings, "candidates": candidates, "put_up": near[:_PUT_UP]})["candidates"]
    own = next(c for c in again if c["index"] is not None)
    return best["verdict"] == FITS, own["verdict"] == FITS


def rank_of(listed: str, found: tuple[Rival, ...]) -> int | None:
    """Place of a listed structure, from 0; None when it is not there."""
    name = name_of(listed)
    is_open = not re.search(r"[@/\\]", name)
    for rank, rival in enumerate(found):
        if name == rival.smiles or (is_open and name == flat(rival.smiles)):
            return rank
    if "[nH]" not in name:
        return None
    key = kernel().inchikey(name)  # azoles: the place of the NH is no difference
    return next((rank for rank, rival in enumerate(found) if kernel().inchikey(rival.smiles) == key), None)


if __name__ == "__main__":
    parser = argparse.ArgumentParser(description="Recovery of listed look-alikes.")
    parser.add_argument("--every", type=int, default=1)
    parser.add_argument("--missed", action="store_true")
    chosen = parser.parse_args()
    run(chosen.every, chosen.missed)
