"""Start-up, warm check, size and memory of the app in Chromium, kept on the device, network off."""

from __future__ import annotations

import json
import shutil
import statistics
import tempfile
import time
from collections.abc import Iterator
from contextlib import contextmanager
from pathlib import Path

from playwright.sync_api import BrowserContext, Page, Playwright, sync_playwright

from bench.tables import Figure, print_figures
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
TEN_READINGS = {
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

#: Milliseconds from asking for the engine until it has described a structure.
OUR_START = """async () => {
  const { createEngine } = await import('./worker/client.js');
  const began = performance.now();
  const engine = createEngine();
  await engine.call('describe', { structure: 'CC(C)c1ccc(C=O)cc1' });
  const took = performance.now() - began;
  engine.close();
  return took;
}"""

#: Milliseconds from asking for an unchanged Pyodide until it has added one and one.
STOCK_START = """() => new Promise((resolve, reject) => {
  const began = performance.now();
  const worker = new Worker('./stock/stock-worker.mjs', { type: 'module' });
  worker.onerror = reject;
  worker.onmessage = () => { resolve(performance.now() - began); worker.terminate(); };
})"""

TIMED_CHECKS = """async ([params, times]) => {
  const took = [];
  for (let i = 0; i < times; i++) {
    const began = performance.now();
    await window.engine.call('check', params);
    took.push(performance.now() - began);
  }
  return took;
}"""


def run() -> None:
    """Install, go offline, measure, print."""
    with tempfile.TemporaryDirectory() as scratch, sync_playwright() as playwright:
        dist = _dist_with_stock(Path(scratch))
        with _offline_device(playwright, dist, Path(scratch)) as (device, address):
            figures = [*_starts(device, address), *_checks(device, address)]
    print_figures([*figures, _size()])


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


@contextmanager
def _offline_device(
    playwright: Playwright, dist: Path, scratch: Path
) -> Iterator[tuple[BrowserContext, str]]:
    """A browser that has the app and has just been opened again, host stopped and network off."""

    def launch() -> BrowserContext:
        device = playwright.chromium.launch_persistent_context(
            scratch / "profile", executable_path=build.chromium(), args=BROWSER_FLAGS
        )
        device.set_default_timeout(ANSWER_MS)
        return device

    host = start_host(dist)
    device = launch()
    page = device.new_page()
    page.goto(host.address)
    page.evaluate(WAIT_UNTIL_KEPT)
    device.close()
    host.stop()
    device = launch()
    device.set_offline(True)
    yield device, host.address
    device.close()


def _fresh_page(device: BrowserContext, address: str) -> Page:
    """A page at the app's address on which nothing has been started."""
    page = device.new_page()
    page.goto(f"{address}/{BARE_PAGE}")
    return page


def _starts(device: BrowserContext, address: str) -> list[Figure]:
    """Both starts by turns, so that whatever else the machine does weighs on both."""
    took: dict[str, list[float]] = {OUR_START: [], STOCK_START: []}
    for _ in range(STARTS):
        for script, times in took.items():
            page = _fresh_page(device, address)
            times.append(page.evaluate(script))
            page.close()
    ours, stock = (statistics.median(times) for times in took.values())
    return [
        Figure("offline start until the engine answers", ours, "ms", note=_spread(took[OUR_START])),
        Figure("stock Pyodide boot, same device", stock, "ms", note=_spread(took[STOCK_START])),
        Figure("ratio", ours / stock, most=0.35),
    ]


def _checks(device: BrowserContext, address: str) -> list[Figure]:
    page = _fresh_page(device, address)
    page.evaluate(START_ENGINE)
    first, *warm = page.evaluate(TIMED_CHECKS, [TEN_READINGS, CHECKS])
    memory = call(page, "worker.memory", {})["result"]
    page.close()
    return [
        Figure("check, 1 structure, 10 readings, first", first, "ms"),
        Figure("the same, warm", statistics.median(warm), "ms", most=150, note=_spread(warm)),
        Figure("the same on CPython, warm", _check_on_cpython(), "ms"),
        Figure(
            "worker memory, peak of both wasm heaps",
            sum(memory.values()) / MB,
            "MB",
            most=150,
            note=str(memory),
        ),
    ]


def _check_on_cpython() -> float:
    params = json.dumps(TEN_READINGS)
    took = []
    for _ in range(CHECKS):
        began = time.perf_counter()
        handle("check", params)
        took.append(1000 * (time.perf_counter() - began))
    return statistics.median(took[1:])


def _size() -> Figure:
    files = [path for path in build.DIST.rglob("*") if path.is_file() and path.suffix != ".gz"]
    sent = sum((zipped if (zipped := Path(f"{path}.gz")).exists() else path).stat().st_size for path in files)
    return Figure("bundle as transferred", sent / MB, "MB", most=14, note=f"{len(files)} files")


def _spread(times: list[float]) -> str:
    return f"{min(times):.0f} to {max(times):.0f}, n = {len(times)}"
