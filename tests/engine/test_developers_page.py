"""DEVELOPERS.md says what the code does."""

from __future__ import annotations

import re
from pathlib import Path

from hoodside.engine import METHODS

ROOT = Path(__file__).parents[2]


def test_the_table_of_methods_is_that_of_the_door() -> None:
    page = (ROOT / "DEVELOPERS.md").read_text(encoding="utf-8")
    table = page.split("## The engine's door")[1].split("\n## ")[0]
    assert sorted(re.findall(r"^\| `(\w+)` \|", table, re.MULTILINE)) == sorted(METHODS)


def test_files_the_page_names_are_there() -> None:
    page = (ROOT / "DEVELOPERS.md").read_text(encoding="utf-8")
    named = set(re.findall(r"`((?:py|web|tests)/[\w./]+?)/?`", page))
    assert named
    assert [path for path in sorted(named) if not any(ROOT.glob(path.replace("NAME", "*")))] == []
