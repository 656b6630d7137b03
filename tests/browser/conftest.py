"""A built app, a host serving it, and a Chromium to use it with."""

from __future__ import annotations

import os
from collections.abc import Iterator
from contextlib import contextmanager
from pathlib import Path

import pytest
from playwright.sync_api import Browser, BrowserContext, Page, Playwright, sync_playwright

from browser.stand import (
    ANSWER_MS,
    BARE_PAGE,
    BROWSER_FLAGS,
    Host,
    OpenDevice,
    build,
    copy_of_dist,
    start_host,
)


def pytest_collection_modifyitems(items: list[pytest.Item]) -> None:
    """Everything in this folder needs the browser."""
    for item in items:
        if Path(__file__).parent in item.path.parents:
            item.add_marker(pytest.mark.browser)


@pytest.fixture(scope="session")
def chromium_path() -> str:
    """Path of a Chromium; skips when there is none."""
    found = os.environ.get("HOODSIDE_CHROMIUM") or build.chromium()
    if not found:
        pytest.skip("no Chromium on PATH: `apt-get install chromium` (or Google Chrome) mends it")
    return found


@pytest.fixture(scope="session")
def dist(tmp_path_factory: pytest.TempPathFactory) -> Path:
    """The built app."""
    return copy_of_dist(tmp_path_factory.mktemp("served"))


@pytest.fixture(scope="session")
def host(dist: Path) -> Iterator[Host]:
    """A host that stays up through the session."""
    running = start_host(dist)
    yield running
    running.stop()


@pytest.fixture
def own_host(dist: Path) -> Iterator[Host]:
    """A host that the test may stop."""
    running = start_host(dist)
    yield running
    running.stop()


@pytest.fixture(scope="session")
def playwright() -> Iterator[Playwright]:
    """Playwright's driver."""
    with sync_playwright() as running:
        yield running


@pytest.fixture(scope="session")
def browser(playwright: Playwright, chromium_path: str) -> Iterator[Browser]:
    """One Chromium for tests that need nothing kept between visits."""
    running = playwright.chromium.launch(executable_path=chromium_path, args=BROWSER_FLAGS)
    yield running
    running.close()


@pytest.fixture
def page(browser: Browser, host: Host) -> Iterator[Page]:
    """The app, just opened by somebody who has never been here."""
    with _visit(browser, host.address) as page:
        yield page


@pytest.fixture
def bare_page(browser: Browser, host: Host) -> Iterator[Page]:
    """A page at the app's address on which nothing has been started."""
    with _visit(browser, f"{host.address}/{BARE_PAGE}") as page:
        yield page


@contextmanager
def _visit(browser: Browser, address: str) -> Iterator[Page]:
    context = browser.new_context()
    context.set_default_timeout(ANSWER_MS)
    page = context.new_page()
    page.goto(address)
    yield page
    context.close()


@pytest.fixture
def open_device(playwright: Playwright, chromium_path: str, tmp_path: Path) -> Iterator[OpenDevice]:
    """Opens the browser of one device; open it again and it still has what it kept."""
    opened: list[BrowserContext] = []

    def launch() -> BrowserContext:
        context = playwright.chromium.launch_persistent_context(
            tmp_path / "profile", executable_path=chromium_path, args=BROWSER_FLAGS
        )
        context.set_default_timeout(ANSWER_MS)
        opened.append(context)
        return context

    yield launch
    for context in opened:
        context.close()
