"""Spin systems to time, and how long they take; runs on CPython and in Pyodide."""

from __future__ import annotations

import random
import time

from hoodside.predict.spins.exact import exact_lines
from hoodside.predict.spins.model import Nuclei, SpinSystem

#: Runs of which the fastest counts.
_RUNS = 3


def timed_system(kind: str, n: int) -> SpinSystem:
    """``n`` spins: "chain" couples neighbours and next neighbours, "full" all, "pairs" is a chain of CH2."""
    rng = random.Random(n)
    if kind == "pairs":
        return _pairs(rng, n)
    groups = tuple(Nuclei(rng.uniform(0, 30 * n)) for _ in range(n))
    near = n if kind == "full" else 2
    pairs = tuple((a, b, rng.uniform(1, 14)) for a in range(n) for b in range(a + 1, min(n, a + 1 + near)))
    return SpinSystem(groups, pairs)


def _pairs(rng: random.Random, n: int) -> SpinSystem:
    """CH2 whose two H have one shift but two J to each neighbour: AA'BB'CC'..."""
    groups = tuple(Nuclei(hz) for hz in [rng.uniform(0, 30 * n) for _ in range(n // 2)] for _ in range(2))
    pairs = [(k, k + 1, -13.0) for k in range(0, n, 2)]
    for k in range(0, n - 2, 2):
        gauche, anti = rng.uniform(5, 7), rng.uniform(7, 9)
        pairs += [(k, k + 2, gauche), (k + 1, k + 3, gauche), (k, k + 3, anti), (k + 1, k + 2, anti)]
    return SpinSystem(groups, tuple(pairs))


def seconds(kind: str, n: int) -> float:
    """Seconds of the fastest warm run."""
    system = timed_system(kind, n)
    best = float("inf")
    for _ in range(_RUNS):
        began = time.perf_counter()
        exact_lines(system)
        best = min(best, time.perf_counter() - began)
    return best
