"""Answers from Pyodide and RDKit's wasm under Node, beside those of CPython."""

from __future__ import annotations

import json
import os
import shutil
import subprocess
import sys
from collections.abc import Callable
from pathlib import Path
from typing import Any

import pytest

FOLDER = Path(__file__).parent
ROOT = FOLDER.parents[1]
# ``calls`` is importable by its own name, as it is inside Pyodide.
sys.path.insert(0, str(FOLDER))


def node_modules() -> Path | None:
    """Where the npm packages are: the app's own, else the folder named by HOODSIDE_NODE_MODULES."""
    for folder in (ROOT / "web" / "node_modules", Path(os.environ.get("HOODSIDE_NODE_MODULES", "/nowhere"))):
        if (folder / "pyodide").is_dir() and (folder / "@rdkit" / "rdkit").is_dir():
            return folder
    return None


Runner = Callable[[list[list[Any]]], list[dict[str, Any]]]


@pytest.fixture(scope="session")
def in_browser(tmp_path_factory: pytest.TempPathFactory) -> Runner:
    """Answers to a list of calls from Pyodide and RDKit's wasm."""
    node, modules = shutil.which("node"), node_modules()
    if node is None:
        pytest.skip("needs Node 20 or later on PATH")
    if modules is None:
        pytest.skip("needs the npm packages pyodide and @rdkit/rdkit: run `npm ci` in web/")
    file = tmp_path_factory.mktemp("parity") / "calls.json"

    def run(calls: list[list[Any]]) -> list[dict[str, Any]]:
        file.write_text(json.dumps(calls), "utf-8")
        command = [node, str(FOLDER / "node_calls.mjs"), str(modules), str(file)]
        done = subprocess.run(command, capture_output=True, text=True, timeout=300, check=False)
        assert done.returncode == 0, done.stderr[-2000:]
        return json.loads(done.stdout)

    return run
