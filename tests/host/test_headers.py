"""Every header that the offline app depends on, file by file.

Types: WHATWG HTML (module scripts need a JavaScript type), W3C WebAssembly Web API (``application/wasm``),
W3C Manifest (``application/manifest+json``). Policy: W3C Content Security Policy Level 3.
"""

from __future__ import annotations

import base64
import gzip
import hashlib
from pathlib import Path

import pytest
from flask.testing import FlaskClient

from hoodside_host import create_app

IMPORT_MAP = '{"imports":{"preact":"./vendor/preact.js"}}'
PAGE = (
    f'<!doctype html><script type="importmap">{IMPORT_MAP}</script><script type="module" src="a.js"></script>'
)

TYPES = {
    "index.html": "text/html; charset=utf-8",
    "app/main.js": "text/javascript; charset=utf-8",
    "worker/worker.mjs": "text/javascript; charset=utf-8",
    "runtime/pyodide.asm.wasm": "application/wasm",
    "runtime/stdlib.zip": "application/zip",
    "runtime/pyodide-lock.json": "application/json",
    "manifest.webmanifest": "application/manifest+json",
    "styles/base.css": "text/css; charset=utf-8",
    "icons/mark.svg": "image/svg+xml; charset=utf-8",
    "icons/mark-180.png": "image/png",
    "sw.js": "text/javascript; charset=utf-8",
    "strange.xyz": "application/octet-stream",
}


@pytest.fixture
def client(tmp_path: Path) -> FlaskClient:
    for name in TYPES:
        path = tmp_path / name
        path.parent.mkdir(parents=True, exist_ok=True)
        path.write_text(PAGE if name == "index.html" else f"content of {name}", "utf-8")
    zipped = tmp_path / "runtime/pyodide.asm.wasm.gz"
    zipped.write_bytes(gzip.compress(b"content of runtime/pyodide.asm.wasm"))
    return create_app(tmp_path).test_client()


def script_sources(client: FlaskClient, name: str) -> set[str]:
    policy = client.get(f"/{name}").headers["Content-Security-Policy"]
    directives = dict(part.strip().split(" ", 1) for part in policy.split(";"))
    return set(directives["script-src"].split())


@pytest.mark.parametrize(("name", "content_type"), TYPES.items())
def test_content_type_is_stated_and_not_guessed(client: FlaskClient, name: str, content_type: str) -> None:
    response = client.get(f"/{name}")
    assert response.status_code == 200
    assert response.headers["Content-Type"] == content_type
    assert response.headers["X-Content-Type-Options"] == "nosniff"


def test_root_is_the_page(client: FlaskClient) -> None:
    assert client.get("/").get_data(as_text=True) == PAGE
    assert client.get("/").headers["Content-Type"] == TYPES["index.html"]


@pytest.mark.parametrize("name", TYPES)
def test_nothing_is_used_again_without_asking(client: FlaskClient, name: str) -> None:
    response = client.get(f"/{name}")
    assert response.headers["Cache-Control"] == "no-cache"
    again = client.get(f"/{name}", headers={"If-None-Match": response.headers["ETag"]})
    assert again.status_code == 304


def test_only_the_worker_may_build_code_from_text(client: FlaskClient) -> None:
    assert "'unsafe-eval'" in script_sources(client, "worker/worker.mjs")
    others = [name for name in TYPES if name != "worker/worker.mjs"]
    assert not [name for name in others if "'unsafe-eval'" in script_sources(client, name)]


def test_page_may_run_its_own_import_map_and_wasm_and_nothing_else_inline(client: FlaskClient) -> None:
    digest = base64.b64encode(hashlib.sha256(IMPORT_MAP.encode()).digest()).decode()
    assert script_sources(client, "") == {"'self'", "'wasm-unsafe-eval'", f"'sha256-{digest}'"}


def test_page_takes_nothing_from_elsewhere_and_stands_in_no_frame(client: FlaskClient) -> None:
    policy = client.get("/").headers["Content-Security-Policy"]
    assert "default-src 'self'" in policy
    assert "frame-ancestors 'none'" in policy
    assert "http" not in policy
    assert client.get("/").headers["Referrer-Policy"] == "no-referrer"


def test_page_is_isolated_from_other_origins(client: FlaskClient) -> None:
    headers = client.get("/").headers
    assert headers["Cross-Origin-Opener-Policy"] == "same-origin"
    assert headers["Cross-Origin-Embedder-Policy"] == "require-corp"


def test_zipped_file_is_sent_to_those_who_take_it(client: FlaskClient) -> None:
    path = "/runtime/pyodide.asm.wasm"
    zipped = client.get(path, headers={"Accept-Encoding": "gzip, br"})
    assert zipped.headers["Content-Encoding"] == "gzip"
    assert zipped.headers["Content-Type"] == "application/wasm"
    assert zipped.headers["Vary"] == "Accept-Encoding"
    plain = client.get(path, headers={"Accept-Encoding": "identity"})
    assert "Content-Encoding" not in plain.headers
    assert plain.headers["Vary"] == "Accept-Encoding"
    assert gzip.decompress(zipped.data) == plain.data


def test_zipped_and_plain_differ_in_their_tags(client: FlaskClient) -> None:
    path = "/runtime/pyodide.asm.wasm"
    tags = {
        client.get(path, headers={"Accept-Encoding": way}).headers["ETag"] for way in ("gzip", "identity")
    }
    assert len(tags) == 2


def test_gzip_refused_by_weight_is_not_sent(client: FlaskClient) -> None:
    refused = client.get("/runtime/pyodide.asm.wasm", headers={"Accept-Encoding": "gzip;q=0"})
    assert "Content-Encoding" not in refused.headers


@pytest.mark.parametrize(
    "name", ["missing.js", "../pyproject.toml", "runtime", "api/unknown", "%2e%2e/secret"]
)
def test_what_is_not_in_the_bundle_is_not_served(client: FlaskClient, name: str) -> None:
    assert client.get(f"/{name}").status_code == 404


def test_ping_is_answered_and_never_kept(client: FlaskClient) -> None:
    response = client.get("/api/ping")
    assert response.get_json()["name"] == "hoodside"
    assert response.headers["Cache-Control"] == "no-store"
