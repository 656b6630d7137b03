"""Spin simulation: agreement with a dense Hamiltonian, speed, clusters, and couplings read back."""

from __future__ import annotations

import json
import os
import random
import shutil
import subprocess
import sys
import time
from array import array
from collections.abc import Callable
from pathlib import Path
from typing import Any

# Small matrices run faster on one thread; both sides of every comparison get the same.
os.environ.setdefault("OPENBLAS_NUM_THREADS", "1")

HERE = Path(__file__).resolve()
sys.path[:0] = [str(HERE.parents[2] / "py"), str(HERE.parents[1])]

from bench.spin_families import FAMILIES, worst_line  # noqa: E402
from bench.spin_timing import seconds, timed_system  # noqa: E402
from bench.spins_on_page import on_page  # noqa: E402
from bench.synthetic_multiplets import mixture  # noqa: E402
from bench.tables import Figure, print_figures  # noqa: E402
from engine.dense_spins import dense_lines, tuned_dense_lines  # noqa: E402
from hoodside.molecule import read_structure  # noqa: E402
from hoodside.numerics import merge_lines  # noqa: E402
from hoodside.predict.spins import (  # noqa: E402
    LineList,
    Nuclei,
    SpinSystem,
    cluster_lines,
    exact_lines,
    predict_spectrum,
)
from hoodside.predict.spins.comparing import displacement  # noqa: E402
from hoodside.predict.spins.multiplet_reading import read_multiplet  # noqa: E402

#: Systems of each kind, and states of a cluster too small for them.
CLUSTERED, SMALL = 6, 20
#: A molecule of 30 H in one spin system, made up for the purpose.
LARGE = "CCCCCCC(C)CCCCCCCO"
MULTIPLETS = 300


def run() -> None:
    """Print all figures."""
    print_figures([*agreement(), *speed(), *in_pyodide(), *on_page(LARGE), *clusters(), *reading()])
    cost_curve()


def agreement() -> list[Figure]:
    """Worst difference from the dense Hamiltonian over 40 random systems of 2 to 8 spins."""
    away, off = 0.0, 0.0
    for seed in range(40):
        rng = random.Random(seed)
        n = 2 + seed % 7
        shifts = [rng.uniform(0, 100) for _ in range(n)]
        pairs = tuple((a, b, rng.uniform(-16, 16)) for a in range(n) for b in range(a) if rng.random() < 0.7)
        found = exact_lines(SpinSystem(tuple(map(Nuclei, shifts)), pairs))
        hz, intensity = dense_lines(shifts, pairs)
        dense = LineList(*merge_lines(_array(hz), _array(intensity), 1e-7, 1e-7))
        strongest = max(dense.intensity)
        for at, size in zip(dense.hz, dense.intensity, strict=True):
            if size > 1e-5 * strongest:
                k = min(range(len(found)), key=lambda k, at=at: abs(found.hz[k] - at))
                away = max(away, abs(found.hz[k] - at))
                off = max(off, abs(found.intensity[k] - size) / strongest)
    return [
        Figure("positions against dense, worst", away, "Hz", most=1e-6),
        Figure("intensities against dense, worst", off, "of strongest", most=1e-6),
    ]


def _array(values: Any) -> array[float]:
    return array("d", values)


def speed() -> list[Figure]:
    """Seconds on CPython, and the same system by the dense Hamiltonian."""
    eight, ten = seconds("full", 8), seconds("full", 10)
    system = timed_system("full", 10)
    plain, tuned = (_dense_seconds(system, method) for method in (dense_lines, tuned_dense_lines))
    return [
        Figure("8 spins, CPython", eight, "s"),
        Figure("10 spins, CPython", ten, "s"),
        Figure("10 spins, dense", plain, "s"),
        Figure("10 spins, dense over ours", plain / ten, "times", least=20),
        Figure("10 spins, tuned dense over ours", tuned / ten, "times"),
    ]


def _dense_seconds(system: SpinSystem, method: Callable[..., Any]) -> float:
    """Seconds of the faster of two runs to a sorted line list."""
    best = float("inf")
    for _ in range(2):
        began = time.perf_counter()
        hz, intensity = method([g.hz for g in system.groups], system.couplings)
        merge_lines(_array(hz), _array(intensity), 1e-7, 1e-7)
        best = min(best, time.perf_counter() - began)
    return best


def in_pyodide() -> list[Figure]:
    """Seconds in Pyodide under Node, where the packages are there: the solver alone, without the door."""
    node = shutil.which("node")
    folders = (
        HERE.parents[2] / "web/node_modules",
        Path(os.environ.get("HOODSIDE_NODE_MODULES", "/nowhere")),
    )
    modules = next((f for f in folders if (f / "ml-matrix").is_dir() and (f / "pyodide").is_dir()), None)
    if node is None or modules is None:
        print("Not timed in Pyodide: needs Node and the npm packages pyodide and ml-matrix.")
        return []
    command = [node, str(HERE.parent / "spins_in_browser.mjs"), str(modules)]
    done = subprocess.run(command, capture_output=True, text=True, timeout=300, check=True)
    found = json.loads(done.stdout)
    return [
        Figure(f"{n} spins ({kind}), Pyodide", found[kind][n], "s", most={"8": 0.25, "10": 1.5}[n])
        for kind in found
        for n in found[kind]
    ]


def clusters() -> list[Figure]:
    """Clusters against exact lines of systems of 9 to 11 H, and whether the stated errors cover the true."""
    figures, covered, total = [], 0, 0
    for mhz in (40.0, 60.0, 80.0, 100.0, 400.0):
        worst = 0.0
        for system in (family(mhz, seed) for family in FAMILIES.values() for seed in range(CLUSTERED)):
            reduced = cluster_lines(system)
            away = worst_line(exact_lines(system), reduced)
            worst, total, covered = max(worst, away), total + 1, covered + (away <= reduced.error_hz)
        figures.append(Figure(f"clusters at {mhz:g} MHz, worst line", worst, "widths of 1 Hz", most=0.05))
    figures.append(
        Figure(f"stated errors that cover ({total} systems)", 100 * covered / total, "%", least=95)
    )
    return [*figures, *small_clusters()]


def small_clusters() -> list[Figure]:
    """The same where clusters may not grow: six spins at most, so that much is lost."""
    covered, total = 0, 0
    for mhz in (60.0, 100.0):
        for system in (family(mhz, seed) for family in FAMILIES.values() for seed in range(CLUSTERED)):
            reduced = cluster_lines(system, states=SMALL, most_states=SMALL)
            total += 1
            covered += displacement(exact_lines(system), reduced) <= reduced.error_hz
    name = f"stated errors that cover, clusters of {SMALL} states"
    return [Figure(name, 100 * covered / total, "%", least=90)]


def reading() -> list[Figure]:
    """Made-up multiplets whose pattern and J (within 0.4 Hz) come back."""
    rng, right = random.Random(1), 0
    began = time.perf_counter()
    for made in mixture(rng, MULTIPLETS):
        found = read_multiplet(made.hz, made.heights).readings
        right += bool(found) and found[0].pattern == made.pattern and _near(found[0].j, made.j)
    each = (time.perf_counter() - began) / MULTIPLETS
    return [
        Figure("multiplets read right", 100 * right / MULTIPLETS, "%", least=95),
        Figure("one multiplet read in", 1000 * each, "ms"),
    ]


def _near(a: tuple[float, ...], b: tuple[float, ...]) -> bool:
    return len(a) == len(b) and all(abs(x - y) <= 0.4 for x, y in zip(a, b, strict=True))


def cost_curve() -> None:
    """Print seconds by size: exact to 12 spins, then a molecule of 30 spins by clusters."""
    print(
        "  exact, chain of n different spins: "
        + ", ".join(f"{n}: {seconds('chain', n):.3f} s" for n in (4, 6, 8, 10, 11, 12))
    )
    structure = read_structure(LARGE)
    for mhz in (60.0, 400.0):
        began = time.perf_counter()
        groups, systems = predict_spectrum(structure, mhz=mhz)
        spent = time.perf_counter() - began
        largest = max(systems, key=lambda s: len(s.groups))
        size = sum(groups[g].n for g in largest.groups)
        print(
            f"  {LARGE} at {mhz:g} MHz, {size} spins in one system: {spent:.2f} s, {largest.lines.method}, "
            f"{len(largest.lines)} lines, error {largest.lines.error_hz:.3f} Hz"
        )


if __name__ == "__main__":
    run()
