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


#: Rooms of the engine from the ground up; one may import from lower steps, and from its own step only itself.
STEPS = (
    {"errors"},
    {"facts"},
    {"ring_names"},
    {"molecule", "names", "readings", "numerics", "numerics_browser", "numerics_cpython"},
    {"predict", "reagent_names"},
    {"weigh", "rivals", "amounts", "record"},
    {"advise"},
    {"put_up"},
    {"check", "hunt"},
    {"methods"},
    {"engine"},
    {"cli"},
)
#: Within one step: the numerics a platform brings.
_SAME_STEP = {("numerics", "numerics_browser"), ("numerics", "numerics_cpython")}


def _rooms_imported(source: str) -> set[str]:
    named = re.findall(r"^\s*(?:from|import) hoodside\.(\w+)", source, re.MULTILINE)
    return {*named, *re.findall(r"^\s*from hoodside import (\w+)", source, re.MULTILINE)}


def test_imports_point_one_way() -> None:
    step_of = {room: step for step, rooms in enumerate(STEPS) for room in rooms}
    engine = ROOT / "py" / "hoodside"
    wrong = []
    for path in sorted(engine.rglob("*.py")):
        room = path.relative_to(engine).parts[0].removesuffix(".py")
        if room.startswith("__"):
            continue
        for other in _rooms_imported(path.read_text(encoding="utf-8")) - {room}:
            if step_of[other] >= step_of[room] and (room, other) not in _SAME_STEP:
                wrong.append(f"{path.relative_to(engine)} imports {other}")
    assert wrong == []
