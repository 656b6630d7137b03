"""The two kernels must agree: RDKit through Python bindings, and its wasm under Pyodide in Node."""

from __future__ import annotations

import csv
import json
import math
import re
from pathlib import Path

import calls as here
import pytest
from compare import Runner, same

pytestmark = pytest.mark.node

FOLDER = Path(__file__).parent
ROOT = FOLDER.parents[1]
CASES = json.loads((ROOT / "tests" / "cases" / "published.json").read_text("utf-8"))
SMILES = sorted({s for case in CASES for s in (case["smiles"], *case["rivals"])})
TRUTHS = sorted({case["smiles"] for case in CASES})

BAD = [
    "C1CC",
    "C(C",
    "C)C",
    "CC(C)(C)(C)C",
    "c1cccc1",
    "CC(=O)c",
    "[Xx]C",
    "CCQ",
    "C11",
    "[C",
    "C==C",
    "two words",
    "",
    "C" * 1000,
    "[CH2]" * 350,
    "{}",
    "\nname\n\n  2  1  0  0  0  0  0  0  0  0999 V2000\n",
    "\nname\n\nnonsense\n",
    "\nname\n\n999999  0  0  0  0  0  0  0  0999 V2000\n",
]
REACTIONS = [
    ("[C:1]=[C:2]>>[C:1](O)-[C:2]O", ["C/C=C/[C@H](F)C"]),
    ("[C:1]>>[C:1]F", ["CC(C)(C)C"]),
    ("[CH2:1][CH2:2]>>[C:1]=[C:2]", ["C1CC2CCC1CC2"]),
    ("[C:1](=[O:2])[OH].[N;H2,H1:3]>>[C:1](=[O:2])[N:3]", ["OC(=O)CCC(=O)O", "CNCCN"]),
    ("[c:1][H]>>[c:1]Br", ["Cc1ccccc1"]),
    ("[cH:1]>>[c:1]Br", ["Cc1ccccc1"]),
    ("[C:1]>>>", ["C"]),
]


def patterns() -> list[str]:
    """Every SMARTS of the facts tables."""
    found: dict[str, None] = {}
    for path in sorted((ROOT / "py" / "hoodside" / "facts").glob("*.csv")):
        for row in csv.DictReader(path.read_text("utf-8").splitlines()):
            found |= dict.fromkeys(v for k, v in row.items() if k and "smarts" in k and v)
    return list(found)


def test_structures_read_alike(in_browser: Runner) -> None:
    """Formula, canonical SMILES, InChIKey, atoms, bonds, rings, aromaticity, stereo."""
    answers = same(in_browser, [["calls.describe", s] for s in SMILES])
    assert all("ok" in answer for answer in answers)


def test_symmetry_alike(in_browser: Runner) -> None:
    same(in_browser, [["calls.symmetry", s] for s in TRUTHS])


def test_stereo_labels_alike(in_browser: Runner) -> None:
    marked = [s for s in SMILES if "@" in s or "/" in s]
    same(in_browser, [["calls.stereo_labels", s] for s in marked])


def test_substructure_matches_alike(in_browser: Runner) -> None:
    """All patterns of the facts tables on the published compounds: the same matches in the same order."""
    asked = patterns()
    assert len(asked) > 1000
    same(in_browser, [["calls.matches", s, asked] for s in TRUTHS[::3]])
    same(in_browser, [["calls.matches", s, asked[::5], False] for s in TRUTHS[::25]])


def test_more_than_a_thousand_matches_are_all_found(in_browser: Runner) -> None:
    """The wasm stops at 1,000 unless told otherwise: C60H122 has 61 * 60 ordered pairs of any two atoms."""
    answers = same(in_browser, [["calls.matches", "C" * 60, ["C.C", "[#6]~[#6]"], False]])
    assert [len(found) for found in answers[0]["ok"]] == [60 * 59, 2 * 59]


def test_round_trips_alike(in_browser: Runner) -> None:
    """CTfile and JSON graph give the structure back."""
    sources = [s for s in TRUTHS if "." not in s][::4]
    answers = same(in_browser, [["calls.again_from_graph", s] for s in sources])
    assert [a["ok"]["smiles"] for a in answers] == [here.describe(s)["smiles"] for s in sources]
    same(in_browser, [["calls.again_from_ctfile", s] for s in sources])


def test_drawings_alike(in_browser: Runner) -> None:
    """The same parts at the same distances (which way up a drawing lies may hang on the last digit)."""
    calls = [["calls.drawn", s, 300, 220] for s in TRUTHS[::10]]
    for call, theirs in zip(calls, in_browser(calls), strict=True):
        svg, coords = here.drawn(*call[1:])
        from_first = [math.dist(coords[0], xy) for xy in coords]
        assert [math.dist(theirs["ok"][1][0], xy) for xy in theirs["ok"][1]] == pytest.approx(
            from_first, abs=1
        )
        assert re.findall('class="[^"]*"', theirs["ok"][0]) == re.findall('class="[^"]*"', svg), call


def test_reactions_alike(in_browser: Runner) -> None:
    same(in_browser, [["calls.react", *reaction] for reaction in REACTIONS])


def test_refusals_alike(in_browser: Runner) -> None:
    """The same words for the same fault, and none of them stops the kernel."""
    answers = same(in_browser, [["calls.describe", s] for s in [*BAD, "CCO"]])
    assert ["error" in answer for answer in answers] == [True] * len(BAD) + [False]


def test_handles_are_freed(in_browser: Runner) -> None:
    """Reading 2,000 structures leaves a bounded number of wasm objects (its heap is not collected)."""
    (answer,) = in_browser([["calls.live_handles_after", (SMILES * 2)[:2000]]])
    assert 0 < answer["ok"] <= 256


def test_speed_in_pyodide(in_browser: Runner) -> None:
    """1,500 patterns on one structure in 25 ms, symmetry of 25 heavy atoms in 10 ms, once warm.

    Generous by a factor of four, since other work may share the machine.
    """
    asked = patterns()[:1500]
    fresh = [s for s in SMILES if 18 <= here.describe(s)["smiles"].count("C") <= 25][:12]
    rounds = [["calls.matches", s, asked] for s in fresh[:2]]
    timed = [["calls.seconds", "calls.matches", 1, s, asked] for s in fresh[2:]]
    symmetric = [["calls.seconds", "calls.symmetry", 1, s] for s in fresh]
    answers = in_browser([*rounds, *timed, *symmetric])[len(rounds) :]
    times = sorted(a["ok"][0] for a in answers[: len(timed)])
    assert times[len(times) // 2] < 4 * 0.025
    times = sorted(a["ok"][0] for a in answers[len(timed) :])
    assert times[len(times) // 2] < 4 * 0.010
