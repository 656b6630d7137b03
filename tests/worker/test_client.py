"""Runs the JavaScript tests of the worker's client under Node's own test runner."""

from __future__ import annotations

import os
import shutil
import subprocess
from pathlib import Path

import pytest

SUITE = Path(__file__).with_name("client.test.mjs")


@pytest.mark.node
def test_no_caller_is_left_waiting() -> None:
    node = os.environ.get("HOODSIDE_NODE") or shutil.which("node")
    if not node:
        pytest.skip("no Node: `python3 build.py test` brings one")
    done = subprocess.run(
        [node, "--test", str(SUITE)], capture_output=True, text=True, timeout=120, check=False
    )
    assert done.returncode == 0, done.stdout + done.stderr
