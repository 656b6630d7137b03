"""The build refuses a bundle that would not start offline."""

from __future__ import annotations

from pathlib import Path

import pytest

from browser.stand import build, copy_of_dist

pytestmark = pytest.mark.node


@pytest.fixture(scope="module")
def dist(tmp_path_factory: pytest.TempPathFactory) -> Path:
    return copy_of_dist(tmp_path_factory.mktemp("built"))


def test_everything_sent_is_kept(dist: Path) -> None:
    build.write_service_worker(dist)
    kept = (dist / "sw-files.js").read_text("utf-8")
    sent = {str(path.relative_to(dist)) for path in dist.rglob("*") if path.is_file()}
    own = {name for name in sent if name.startswith("sw") or name.endswith(".gz")}
    assert not [name for name in sent - own if f'"{name}"' not in kept]


def test_file_needed_at_the_start_must_be_there(dist: Path) -> None:
    archive = dist / "runtime/hoodside.zip"
    content = archive.read_bytes()
    archive.unlink()
    with pytest.raises(build.StepError, match=r"runtime/hoodside\.zip is needed offline"):
        build.write_service_worker(dist)
    archive.write_bytes(content)


def test_file_over_the_limit_must_not_be_dropped_in_silence(dist: Path) -> None:
    large = dist / "large.json"
    large.write_bytes(b" " * (33 * 1024 * 1024))
    with pytest.raises(build.StepError, match=r"large\.json"):
        build.write_service_worker(dist)
    large.unlink()


def test_nothing_is_taken_from_elsewhere(dist: Path) -> None:
    page = (dist / "index.html").read_text("utf-8")
    assert "http://" not in page
    assert "https://" not in page
