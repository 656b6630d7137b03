"""Start-up, warm work, size and memory of the app in Chromium, kept on the device, network off."""

from __future__ import annotations

import json
import math
import shutil
import statistics
import tempfile
import time
from collections.abc import Iterator
from contextlib import contextmanager
from dataclasses import dataclass, field
from pathlib import Path
from typing import Any

from playwright.sync_api import Page, Playwright, sync_playwright

from bench.browser_work import warm_up, warm_work
from bench.tables import Figure, print_figures
from bench.thread_time import worker_ms
from browser.stand import (
    ANSWER_MS,
    BARE_PAGE,
    BROWSER_FLAGS,
    START_ENGINE,
    WAIT_UNTIL_KEPT,
    build,
    call,
    copy_of_dist,
    start_host,
)
from hoodside.engine import handle

STARTS = 5
CHECKS = 15
MB = 1e6
STOCK_FILES = ("pyodide.mjs", "pyodide.asm.mjs", "pyodide.asm.wasm", "python_stdlib.zip", "pyodide-lock.json")

#: One structure, ten readings of several kinds (made up from the predicted spectrum; only time counts here).
TEN_READINGS: dict[str, Any] = {
    "formula": "C10H12O",
    "solvent": "CDCl3",
    "mhz": 400,
    "h1": [
        {"ppm": 9.97, "mult": "s", "n": 1},
        {"ppm": 7.81, "mult": "d", "j": [8.2], "n": 2},
        {"ppm": 7.38, "mult": "d", "j": [8.2], "n": 2},
        {"ppm": 2.98, "mult": "sept", "j": [6.9], "n": 1},
        {"ppm": 1.28, "mult": "d", "j": [6.9], "n": 6},
    ],
    "c13": [192.0, 156.2, 130.0],
    "ir": [{"cm1": 1700, "strength": "strong", "shape": "sharp"}],
    "ir_clear": [[3200, 3600]],
    "candidates": ["CC(C)c1ccc(C=O)cc1"],
    "intended": 0,
}

#: Isomers of C10H12O, none of them asked about before.
NEVER_SEEN = [
    "CCCc1ccc(C=O)cc1",
    "CC(C)c1cccc(C=O)c1",
    "CCC(=O)Cc1ccccc1",
    "CC(=O)CCc1ccccc1",
    "CCCC(=O)c1ccccc1",
    "CC(C)C(=O)c1ccccc1",
    "C=CCOCc1ccccc1",
    "CC1(C)Cc2ccccc2O1",
]

#: Milliseconds from asking for the engine until it has answered.
OUR_START = """async () => {
  const { createEngine } = await import('./worker/client.js');
  window.began = performance.now();
  window.engine = createEngine();
  await window.engine.call('about');
  return performance.now() - window.began;
}"""

#: ... and until it has described a structure.
FIRST_STRUCTURE = """async () => {
  await window.engine.call('describe', { structure: 'CC(C)c1ccc(C=O)cc1' });
  return performance.now() - window.began;
}"""

#: Milliseconds from asking for an unchanged Pyodide until it has added one and one.
STOCK_START = """() => new Promise((resolve, reject) => {
  const began = performance.now();
  const worker = new Worker('./stock/stock-worker.mjs', { type: 'module' });
  worker.onerror = reject;
  worker.onmessage = () => resolve(performance.now() - began);
})"""

#: Milliseconds of each check; a shift moves a little every time, as when readings are being typed.
TIMED_CHECKS = """async ([params, structures]) => {
  const took = [];
  for (const structure of structures) {
    params.h1[0].ppm += 0.003;
    params.candidates = [structure];
    const began = performance.now();
    await window.engine.call('check', params);
    took.push(performance.now() - began);
  }
  return took;
}"""


def run() -> None:
    """Install, go offline, measure, print."""
    with tempfile.TemporaryDirectory() as scratch, sync_playwright() as playwright:
        device = Device(playwright, Path(scratch) / "profile")
        _install(device, _dist_with_stock(Path(scratch)))
        print_figures([_size(), *_starts(device)])
        print_figures(_checks(device))
        print_figures(_work(device))


@dataclass
class Device:
    """A browser that keeps what it has between one opening and the next."""

    playwright: Playwright
    profile: Path
    address: str = ""

    @contextmanager
    def opened(self, offline: bool = True) -> Iterator[Page]:
        """The browser just opened, on a page at the app's address on which nothing has been started."""
        context = self.playwright.chromium.launch_persistent_context(
            self.profile, executable_path=build.chromium(), args=BROWSER_FLAGS
        )
        context.set_default_timeout(ANSWER_MS)
        context.set_offline(offline)
        page = context.new_page()
        page.goto(f"{self.address}/{BARE_PAGE}")
        yield page
        context.close()


def _dist_with_stock(scratch: Path) -> Path:
    """The built app with an unchanged Pyodide beside it, both kept on the device by one service worker."""
    dist = copy_of_dist(scratch)
    stock = dist / "stock"
    stock.mkdir()
    for name in STOCK_FILES:
        shutil.copy(build.NPM_PACKAGES / "pyodide" / name, stock)
    shutil.copy(Path(__file__).with_name("stock-worker.mjs"), stock)
    build.write_service_worker(dist)
    return dist


def _install(device: Device, dist: Path) -> None:
    """Fetch everything onto the device, then stop the host."""
    host = start_host(dist)
    device.address = host.address
    with device.opened(offline=False) as page:
        page.evaluate(WAIT_UNTIL_KEPT)
    host.stop()


@dataclass
class Starts:
    """What several starts of one kind took, ms: by the clock, and of the worker thread's processor time."""

    clock: list[float] = field(default_factory=list)
    processor: list[float] = field(default_factory=list)

    def time(self, device: Device, page: Page, script: str) -> None:
        """Start once more."""
        self.clock.append(page.evaluate(script))
        self.processor.append(worker_ms(device.profile) or math.nan)


def _starts(device: Device) -> list[Figure]:
    """Both starts by turns, each in a browser just opened: what else the machine does weighs on both."""
    ours, stock, described = Starts(), Starts(), Starts()
    for _ in range(STARTS):
        with device.opened() as page:
            ours.time(device, page, OUR_START)
            described.time(device, page, FIRST_STRUCTURE)
        with device.opened() as page:
            stock.time(device, page, STOCK_START)
    best = f"of the best {min(ours.clock) / min(stock.clock):.2f}"
    return [
        _median("offline start until the engine answers", ours.clock),
        _median("the same until a structure is described", described.clock),
        _median("stock Pyodide boot, same device", stock.clock),
        Figure("start, ratio to stock", _ratio(ours.clock, stock.clock), most=0.35, note=best),
        _median("processor time of our thread until it answers", ours.processor),
        _median("processor time of stock's thread", stock.processor),
        Figure("processor time, ratio to stock", _ratio(ours.processor, stock.processor), most=0.35),
    ]


def _ratio(ours: list[float], stock: list[float]) -> float:
    return statistics.median(ours) / statistics.median(stock)


def _median(name: str, times: list[float], most: float | None = None) -> Figure:
    spread = f"{min(times):.3g} to {max(times):.3g}, n = {len(times)}"
    return Figure(name, statistics.median(times), "ms", most=most, note=spread)


def _checks(device: Device) -> list[Figure]:
    with device.opened() as page:
        page.evaluate(START_ENGINE)
        call(page, "about", {})
        first, *warm = page.evaluate(TIMED_CHECKS, [TEN_READINGS, TEN_READINGS["candidates"] * CHECKS])
        others = page.evaluate(TIMED_CHECKS, [TEN_READINGS, NEVER_SEEN])
        memory = call(page, "worker.memory", {})["result"]
    with device.opened() as page:
        page.evaluate(START_ENGINE)
        call(page, "about", {})
        longest, whole = warm_up(page)
        (ready,) = page.evaluate(TIMED_CHECKS, [TEN_READINGS, TEN_READINGS["candidates"]])
    held = sum(memory.values()) / MB
    parts = ", ".join(f"{name} {size / MB:.0f}" for name, size in memory.items())
    return [
        Figure("check, 1 structure, 10 readings, first", first, "ms"),
        Figure(
            "the same once warmed up unasked",
            ready,
            "ms",
            note=f"{whole:.0f} ms, longest slice {longest:.0f}",
        ),
        _median("the same, warm", warm, most=150),
        _median("the same, warm, a structure not seen before", others, most=150),
        _median("the same on CPython, warm", _checks_on_cpython()),
        Figure("worker memory, peak of both wasm heaps", held, "MB", most=150, note=parts),
    ]


def _work(device: Device) -> list[Figure]:
    with device.opened() as page:
        page.evaluate(START_ENGINE)
        call(page, "about", {})
        return warm_work(page, device.profile)


def _checks_on_cpython() -> list[float]:
    took = []
    for turn in range(CHECKS):
        first, *rest = TEN_READINGS["h1"]
        params = {**TEN_READINGS, "h1": [{**first, "ppm": first["ppm"] + 0.003 * turn}, *rest]}
        began = time.perf_counter()
        handle("check", json.dumps(params))
        took.append(1000 * (time.perf_counter() - began))
    return took[1:]


def _size() -> Figure:
    files = [path for path in build.DIST.rglob("*") if path.is_file() and path.suffix != ".gz"]
    sent = sum((zipped if (zipped := Path(f"{path}.gz")).exists() else path).stat().st_size for path in files)
    return Figure("bundle as transferred", sent / MB, "MB", most=14, note=f"{len(files)} files")
