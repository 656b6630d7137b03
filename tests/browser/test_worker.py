"""The chemistry's thread in a real browser: stopping, crashing, and hosts that serve it badly."""

from __future__ import annotations

from playwright.sync_api import Page, Route

from browser.stand import START_ENGINE, call


def test_engine_says_what_it_is(bare_page: Page) -> None:
    bare_page.evaluate(START_ENGINE)
    about = call(bare_page, "about", {})["result"]
    assert about["python"].startswith("3.14")
    assert about["kernel_version"].startswith("2026.09")


def test_bad_structure_is_an_answer_not_a_crash(bare_page: Page) -> None:
    bare_page.evaluate(START_ENGINE)
    for nonsense in ("C1CC", "C(C)(C)(C)(C)C", "not a molecule", ""):
        error = call(bare_page, "describe", {"structure": nonsense})["error"]
        assert error["code"].startswith("invalid")
        assert error["message"]
        assert error["hint"]
    assert call(bare_page, "describe", {"structure": "CCO"})["result"]["formula"] == "C2H6O"


def test_hundreds_of_atoms_are_answered_and_a_thousand_refused(bare_page: Page) -> None:
    bare_page.evaluate(START_ENGINE)
    assert call(bare_page, "describe", {"structure": "C" * 200})["result"]["heavy_atoms"] == 200
    assert call(bare_page, "describe", {"structure": "C" * 1000})["error"]["code"] == "invalid_structure"
    assert call(bare_page, "describe", {"structure": "CCO"})["result"]["formula"] == "C2H6O"


def test_stopping_a_running_job_leaves_those_behind_it(bare_page: Page) -> None:
    bare_page.evaluate(START_ENGINE)
    call(bare_page, "about", {})
    first, second = bare_page.evaluate("""async () => {
      const stop = new AbortController();
      const first = window.engine.call('describe', { structure: 'CCO' }, { signal: stop.signal })
        .catch((error) => error.code);
      const second = window.engine.call('describe', { structure: 'CCN' });
      stop.abort();
      return [await first, (await second).formula];
    }""")
    assert first == "stopped"
    assert second == "C2H7N"


def test_wasm_under_a_wrong_type_still_starts(bare_page: Page) -> None:
    bare_page.context.route("**/*.wasm", _as_octet_stream)
    bare_page.evaluate(START_ENGINE)
    assert "result" in call(bare_page, "about", {})


def test_missing_file_is_named(bare_page: Page) -> None:
    bare_page.context.route("**/pyodide.asm.wasm", lambda route: route.fulfill(status=404, body="gone"))
    bare_page.evaluate(START_ENGINE)
    error = call(bare_page, "about", {})["error"]
    assert error["code"] == "engine_failed"
    assert "pyodide.asm.wasm" in error["message"]
    assert "404" in error["message"]


def test_script_under_a_wrong_type_is_named(bare_page: Page) -> None:
    bare_page.context.route("**/rdkit.mjs", lambda route: route.fulfill(content_type="text/plain", body="0"))
    bare_page.evaluate(START_ENGINE)
    error = call(bare_page, "about", {})["error"]
    assert error["code"] == "engine_failed"
    assert "rdkit.mjs as text/plain" in error["message"]


def _as_octet_stream(route: Route) -> None:
    answer = route.fetch()
    route.fulfill(response=answer, headers={**answer.headers, "content-type": "application/octet-stream"})
