"""The app stays whole with the network off: host stopped, browser offline."""

from __future__ import annotations

from pathlib import Path
from threading import Thread

import pytest
from cheroot.wsgi import Server
from playwright.sync_api import Page
from werkzeug.exceptions import NotFound
from werkzeug.middleware.dispatcher import DispatcherMiddleware

from browser.stand import (
    START_ENGINE,
    WAIT_UNTIL_KEPT,
    Host,
    OpenDevice,
    call,
    copy_of_dist,
    publish,
    start_host,
    wait_until,
)
from hoodside_host import create_app

#: Benzene from the IUPAC atomic masses of 12C and 1H: 6 x (12 + 1.00782503).
BENZENE_MASS = 78.04695


def assert_engine_answers(page: Page) -> None:
    page.evaluate(START_ENGINE)
    described = call(page, "describe", {"structure": "c1ccccc1"})["result"]
    assert described["formula"] == "C6H6"
    assert abs(described["exact_mass"] - BENZENE_MASS) < 1e-4


def test_engine_answers_after_a_relaunch_without_network(own_host: Host, open_device: OpenDevice) -> None:
    device = open_device()
    page = device.new_page()
    page.goto(own_host.address)
    assert_engine_answers(page)
    assert page.evaluate(WAIT_UNTIL_KEPT)[-1][0] == "ready"
    device.close()
    own_host.stop()

    device = open_device()
    device.set_offline(True)
    page = device.new_page()
    page.goto(own_host.address)
    assert_engine_answers(page)
    assert page.evaluate(WAIT_UNTIL_KEPT)[-1][0] == "ready"


def test_ready_is_not_said_while_a_file_is_missing(own_host: Host, open_device: OpenDevice) -> None:
    page = open_device().new_page()
    page.goto(own_host.address)
    page.evaluate(WAIT_UNTIL_KEPT)
    page.evaluate("""async () => {
      const [name] = (await caches.keys()).filter((key) => key.includes('precache'));
      const cache = await caches.open(name);
      const [engine] = (await cache.keys()).filter((request) => request.url.includes('hoodside.zip'));
      await cache.delete(engine);
    }""")
    told = page.evaluate(WAIT_UNTIL_KEPT)
    assert [state for state, *_ in told] == ["checking", "fetching", "ready"]
    _, present, total = told[1]
    assert present == total - 1


def test_app_works_below_a_path_of_a_shared_host(dist: Path, open_device: OpenDevice) -> None:
    server = Server(("127.0.0.1", 0), DispatcherMiddleware(NotFound(), {"/lab/hoodside": create_app(dist)}))
    server.prepare()
    serving = Thread(target=server.serve, daemon=True)
    serving.start()
    address = f"http://127.0.0.1:{server.bind_addr[1]}/lab/hoodside/"
    page = open_device().new_page()
    page.goto(address)
    assert page.evaluate(WAIT_UNTIL_KEPT)[-1][0] == "ready"
    server.stop()
    serving.join()

    page.goto(address)
    assert_engine_answers(page)


def test_new_version_waits_until_it_is_asked_for(
    tmp_path: Path, open_device: OpenDevice, request: pytest.FixtureRequest
) -> None:
    dist = copy_of_dist(tmp_path)
    host = start_host(dist)
    request.addfinalizer(host.stop)
    page = open_device().new_page()
    page.goto(host.address)
    page.evaluate(WAIT_UNTIL_KEPT)

    _publish_mark(dist)
    page.reload()
    page.evaluate(WAIT_UNTIL_KEPT)
    wait_until(page, "window.applyUpdate")
    assert not page.evaluate("document.documentElement.dataset.mark")

    page.evaluate("window.loadedBefore = true; window.applyUpdate()")
    wait_until(page, "document.documentElement.dataset.mark === 'second' && !window.loadedBefore")
    host.stop()
    page.reload()
    assert page.evaluate("document.documentElement.dataset.mark") == "second"


def _publish_mark(dist: Path) -> None:
    """A second version of the app, to be told from the first by a mark on the page."""
    page = (dist / "index.html").read_text("utf-8")
    publish(dist, "index.html", page.replace("<html", '<html data-mark="second"', 1))
