"""Runs the JavaScript tests of what needs no browser under Node's own test runner."""

from __future__ import annotations

import os
import shutil
import subprocess
from pathlib import Path

import pytest

HERE = Path(__file__).parent


@pytest.mark.node
@pytest.mark.parametrize("suite", sorted(HERE.glob("*.test.mjs")), ids=lambda path: path.name.split(".")[0])
def test_suites_of_node_pass(suite: Path) -> None:
    node = os.environ.get("HOODSIDE_NODE") or shutil.which("node")
    if not node:
        pytest.skip("no Node: `python3 build.py test` brings one")
    done = subprocess.run(
        [node, "--test", str(suite)], capture_output=True, text=True, timeout=120, check=False
    )
    assert done.returncode == 0, done.stdout + done.stderr
