"""Spin systems to time, and how long they take; runs on CPython and in Pyodide."""

from __future__ import annotations

import random
import time

from hoodside.predict.spins.exact import exact_lines
from hoodside.predict.spins.model import Nuclei, SpinSystem

#: Runs of which the fastest counts.
_RUNS = 3


def timed_system(kind: str, n: int) -> SpinSystem:
    """``n`` different spins: "chain" couples neighbours and next neighbours, "full" every pair."""
    rng = random.Random(n)
    groups = tuple(Nuclei(rng.uniform(0, 30 * n)) for _ in range(n))
    near = n if kind == "full" else 2
    pairs = tuple((a, b, rng.uniform(1, 14)) for a in range(n) for b in range(a + 1, min(n, a + 1 + near)))
    return SpinSystem(groups, pairs)


def seconds(kind: str, n: int) -> float:
    """Seconds of the fastest warm run."""
    system = timed_system(kind, n)
    best = float("inf")
    for _ in range(_RUNS):
        began = time.perf_counter()
        exact_lines(system)
        best = min(best, time.perf_counter() - began)
    return best
