"""Spin simulation timed on a page of the built app in Chromium, by the engine in its worker."""

from __future__ import annotations

import math
import tempfile
from pathlib import Path

from playwright.sync_api import Page, sync_playwright

from bench.spin_timing import timed_system
from bench.tables import Figure
from bench.thread_time import worker_ms
from browser.stand import (
    ANSWER_MS,
    BARE_PAGE,
    BROWSER_FLAGS,
    START_ENGINE,
    build,
    call,
    copy_of_dist,
    start_host,
)
from hoodside.predict.spins.contract import system_to_json

#: Seconds allowed, by number of spins.
ALLOWED = {8: 0.25, 10: 1.5}
#: Further sizes of the cost curve, chains.
CURVE = (4, 6, 9, 11, 12)
#: Warm runs, of which the fastest counts.
RUNS = 5
FIELD = 400.0

#: Milliseconds of each run from the call to its answer, a shift moving a little every time; the method used.
TIMED = """async ([system, runs]) => {
  const took = [];
  let method;
  for (let k = 0; k < runs; k += 1) {
    system.nuclei[0].ppm += 0.001;
    const began = performance.now();
    ({ method } = await window.engine.call('spins', system));
    took.push(performance.now() - began);
  }
  return [took, method];
}"""
#: The same for the trace of a structure.
TRACED = """async ([smiles, mhz, runs]) => {
  const took = [];
  for (let k = 0; k < runs; k += 1) {
    const began = performance.now();
    await window.engine.call('trace', { smiles, mhz: mhz + 0.01 * k });
    took.push(performance.now() - began);
  }
  return took;
}"""


def on_page(large: str) -> list[Figure]:
    """Seconds for systems of several sizes, then for the trace of a large molecule by clusters."""
    with tempfile.TemporaryDirectory() as scratch, sync_playwright() as playwright:
        profile = Path(scratch) / "profile"
        host = start_host(copy_of_dist(Path(scratch)))
        context = playwright.chromium.launch_persistent_context(
            profile, executable_path=build.chromium(), args=BROWSER_FLAGS
        )
        context.set_default_timeout(ANSWER_MS)
        try:
            page = context.new_page()
            page.goto(f"{host.address}/{BARE_PAGE}")
            page.evaluate(START_ENGINE)
            call(page, "about", {})
            return [*_systems(page, profile), *_molecule(page, large)]
        finally:
            context.close()
            host.stop()


def _systems(page: Page, profile: Path) -> list[Figure]:
    sizes = [(kind, n, RUNS) for kind in ("chain", "full", "pairs") for n in ALLOWED]
    return [_system(page, profile, *size) for size in [*sizes, *(("chain", n, 2) for n in CURVE)]]


def _system(page: Page, profile: Path, kind: str, n: int, runs: int) -> Figure:
    system = system_to_json(timed_system(kind, n), FIELD)
    page.evaluate(TIMED, [system, 1])
    before = worker_ms(profile)
    took, method = page.evaluate(TIMED, [system, runs])
    busy = math.nan if before is None else ((worker_ms(profile) or math.nan) - before) / runs
    note = f"mean {sum(took) / runs / 1000:.3f}, processor time of the thread {busy / 1000:.3f}"
    return Figure(
        f"{n} spins ({kind}, {method}), page", min(took) / 1000, "s", most=ALLOWED.get(n), note=note
    )


def _molecule(page: Page, smiles: str) -> list[Figure]:
    found = []
    for mhz in (60.0, 400.0):
        first, *warm = page.evaluate(TRACED, [smiles, mhz, 3])
        note = f"first {first / 1000:.2f}"
        found.append(Figure(f"31 spins by clusters, {mhz:g} MHz, page", min(warm) / 1000, "s", note=note))
    return found
