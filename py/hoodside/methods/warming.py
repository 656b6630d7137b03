"""Made ready while nobody waits: tables read, patterns compiled, in slices no call has to wait long for."""

from __future__ import annotations

import time
from collections.abc import Iterator
from importlib import import_module
from typing import Any

from hoodside.methods.arguments import integer

#: Everyday compounds that between them hold what most patterns ask for.
_STRUCTURES = ("CCCO", "CC(O)C(N)CC=CC1CCCO1", "CCOC(=O)c1ccc(C)cc1", "Clc1cc(C#N)cnc1NC(=O)CSC")
_READINGS: dict[str, Any] = {
    "h1": [{"ppm": 7.9, "mult": "d", "j": [8.2], "n": 2}, {"ppm": 4.3, "mult": "q", "n": 2}],
    "c13": [166.0, 129.0, 60.8],
    "ir": [1715],
    "ir_clear": [[3200, 3600]],
}
#: Loaded one by one, from the ground up.
_MODULES = (
    "predict.proton",
    "predict.coupling",
    "predict.carbon",
    "predict.infrared",
    "predict.mass",
    "weigh.structure",
    "advise.next",
    "check",
    "rivals",
    "hunt",
)
_FITTED = ("proton_learned", "proton_splits", "carbon_learned")
_HUNTED, _RIVALS = _STRUCTURES[2], 4
_USUAL_MS, _LEAST_MS, _MOST_MS = 40, 1, 10_000


def warm(slice_ms: int = _USUAL_MS) -> dict[str, Any]:
    """Make ready for about ``slice_ms`` (one piece of it at the least); ask again until ``done``."""
    until = time.monotonic() + integer(slice_ms, "slice_ms", _LEAST_MS, _MOST_MS) / 1000
    for _ in _left:
        if time.monotonic() >= until:
            return {"done": False}
    return {"done": True}


def _pieces() -> Iterator[None]:
    """What a first check and a first hunt would otherwise have to do before anything else."""
    for name in _MODULES:
        import_module(f"hoodside.{name}")
        yield
    from hoodside.predict.learned import learned_table

    for name in _FITTED:
        learned_table(name)
        yield
    yield from _first_checks()
    yield from _first_hunt()


def _first_checks() -> Iterator[None]:
    from hoodside.check import check_case
    from hoodside.readings.from_json import readings_from_json
    from hoodside.weigh.expectations import Expectations, expectations

    readings = readings_from_json(_READINGS)
    yield
    for smiles in _STRUCTURES:
        expected = expectations(smiles, readings)
        for kind in (Expectations.h1, Expectations.c13, Expectations.ir, Expectations.ms):
            kind.__get__(expected, Expectations)
            yield
        check_case({**_READINGS, "candidates": [smiles]})
        yield


def _first_hunt() -> Iterator[None]:
    from hoodside.hunt import Hunt
    from hoodside.molecule.structure import read_structure
    from hoodside.readings.from_json import readings_from_json

    hunt = Hunt(read_structure(_HUNTED), readings_from_json(_READINGS), limit=_RIVALS, allowed=False)
    while not hunt.done:
        hunt.go_on(0)
        yield


_left = _pieces()
