"""What the browser tests stand on: a host to start and stop, and scripts to run on a page of the app."""

from __future__ import annotations

import os
import shutil
import subprocess
import sys
import time
from collections.abc import Callable
from dataclasses import dataclass
from pathlib import Path
from typing import Any

from playwright.sync_api import BrowserContext, Error, Page

ROOT = Path(__file__).resolve().parents[2]
sys.path.insert(0, str(ROOT))

import build  # noqa: E402

BROWSER_FLAGS = [
    *("--no-sandbox", "--disable-gpu", "--no-first-run", "--disable-background-networking"),
    *("--disable-component-update", "--disable-sync"),
]
ANSWER_MS = 60_000

#: A page beside the app on which nothing has been started, for tests of the engine's thread alone.
BARE_PAGE = "bare.html"

#: Opens the browser of one device, whose storage outlives closing it.
OpenDevice = Callable[[], BrowserContext]

#: Starts the app's own engine client on a page and leaves it at ``window.engine``.
START_ENGINE = """async () => {
  const { createEngine } = await import('./worker/client.js');
  window.states = [];
  window.engine = createEngine({ onState: (state, detail) => window.states.push([state, detail]) });
}"""

#: What one call gave: its result, or the fields of its error.
CALL = """async ([method, params, options]) => {
  try {
    return { result: await window.engine.call(method, params, options) };
  } catch ({ code, message, hint, field, value }) {
    return { error: { code, message, hint, field, value } };
  }
}"""

#: Waits until the app says that it is kept on this device; gives all it said on the way.
WAIT_UNTIL_KEPT = """async () => {
  const { watchOffline } = await import('./worker/offline.js');
  const told = [];
  await watchOffline({
    onState: (state, kept) => told.push([state, kept?.present, kept?.total]),
    onUpdate: (apply) => { window.applyUpdate = apply; },
  });
  return told;
}"""


@dataclass
class Host:
    """A running host; ``stop`` ends it for good."""

    address: str
    process: subprocess.Popen[str]

    def stop(self) -> None:
        self.process.terminate()
        self.process.wait(timeout=20)


def start_host(dist: Path) -> Host:
    """Serve ``dist`` on a free port of this machine."""
    process = subprocess.Popen(
        [sys.executable, "-m", "hoodside_host", "--dist", str(dist), "--port", "0"],
        env={**os.environ, "PYTHONPATH": str(ROOT / "py")},
        stdout=subprocess.PIPE,
        text=True,
    )
    assert process.stdout is not None
    greeting = process.stdout.readline()
    address = next(word for word in greeting.split() if word.startswith("http://"))
    return Host(address, process)


def copy_of_dist(folder: Path) -> Path:
    """The built app, in a copy that a build going on beside the tests does not touch."""
    build.build(groups=("host", "test"))
    copy = Path(shutil.copytree(build.DIST, folder / "dist"))
    (copy / BARE_PAGE).write_text("<!doctype html><title>bare</title>", "utf-8")
    return copy


def publish(dist: Path, name: str, text: str) -> None:
    """Put a changed file into ``dist`` as a build would, with a new service worker."""
    (dist / name).write_text(text, "utf-8")
    (dist / f"{name}.gz").unlink(missing_ok=True)
    build.write_service_worker(dist)


def call(page: Page, method: str, params: dict[str, Any], **options: object) -> dict[str, Any]:
    """One call of the engine started on ``page``: ``{"result": ...}`` or ``{"error": ...}``."""
    answer: dict[str, Any] = page.evaluate(CALL, [method, params, options])
    return answer


def wait_until(page: Page, expression: str) -> None:
    """Wait until a JavaScript expression holds.

    Playwright's own ``wait_for_function`` builds code from text, which the app's content policy forbids.
    """
    until = time.monotonic() + ANSWER_MS / 1000
    while not _holds(page, expression):
        if time.monotonic() > until:
            raise TimeoutError(f"{expression} did not come true")
        page.wait_for_timeout(100)


def _holds(page: Page, expression: str) -> bool:
    try:
        return bool(page.evaluate(f"!!({expression})"))
    except Error:  # the page was being loaded anew
        return False
