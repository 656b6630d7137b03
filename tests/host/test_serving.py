"""The host as a program: what it prints and how it refuses."""

from __future__ import annotations

import os
import subprocess
import sys
import urllib.request
from pathlib import Path

import pytest

ROOT = Path(__file__).resolve().parents[2]


def run_host(*arguments: str) -> subprocess.Popen[str]:
    return subprocess.Popen(
        [sys.executable, "-m", "hoodside_host", *arguments],
        env={**os.environ, "PYTHONPATH": str(ROOT / "py")},
        stdout=subprocess.PIPE,
        stderr=subprocess.PIPE,
        text=True,
    )


@pytest.fixture
def dist(tmp_path: Path) -> Path:
    (tmp_path / "index.html").write_text("<!doctype html><title>built</title>", "utf-8")
    return tmp_path


def test_address_printed_is_the_address_served(dist: Path) -> None:
    host = run_host("--dist", str(dist), "--port", "0")
    try:
        assert host.stdout is not None
        address = next(
            word for word in host.stdout.readline().split() if word.startswith("http://127.0.0.1:")
        )
        with urllib.request.urlopen(address) as answer:
            assert b"built" in answer.read()
    finally:
        host.terminate()
        host.communicate(timeout=20)


def test_lan_is_told_what_phones_need(dist: Path) -> None:
    host = run_host("--dist", str(dist), "--port", "0", "--lan")
    try:
        assert host.stdout is not None
        told = "".join(host.stdout.readline() for _ in range(4))
        assert "HTTPS" in told
    finally:
        host.terminate()
        host.communicate(timeout=20)


def test_unbuilt_app_is_refused_with_the_mend(tmp_path: Path) -> None:
    host = run_host("--dist", str(tmp_path))
    _, said = host.communicate(timeout=20)
    assert host.returncode == 2
    assert "build.py build" in said
    assert "Traceback" not in said


def test_taken_port_is_refused_with_the_mend(dist: Path) -> None:
    first = run_host("--dist", str(dist), "--port", "0")
    try:
        assert first.stdout is not None
        port = first.stdout.readline().split(":")[2].split()[0]
        second = run_host("--dist", str(dist), "--port", port)
        _, said = second.communicate(timeout=20)
        assert second.returncode == 2
        assert "--port" in said
        assert "Traceback" not in said
    finally:
        first.terminate()
        first.communicate(timeout=20)
