"""The ``check`` command."""

from __future__ import annotations

import argparse
from collections.abc import Iterator
from typing import Any

from hoodside.cli.answer import answer_all, columns, unsaturations
from hoodside.cli.case_document import check_object
from hoodside.cli.files import read_json

_MOST_FINDINGS = 12


def run(options: argparse.Namespace) -> int:
    """Weigh every case of the input: check objects, or cases saved by the app."""
    cases, several = read_json(options.file)
    return answer_all("check", [check_object(case) for case in cases], several, options.json, _lines)


def _lines(answer: dict[str, Any]) -> Iterator[str]:
    facts = [answer["id"], answer["formula"], unsaturations(answer.get("dbe"))]
    yield "  ".join(part for part in facts if part)
    yield from (f"! {warning}" for warning in answer["warnings"])
    candidates = _named(answer["candidates"])
    if candidates:
        yield from columns(_ranking(candidates), right=(2, 3))
    for candidate in candidates:
        yield from _reasons(candidate)
    yield from _next(answer["next"])
    yield ""


def _ranking(candidates: list[dict[str, Any]]) -> Iterator[list[object]]:
    yield ["", "verdict", "weight", "share", "structure"]
    for c in candidates:
        share = f"{100 * c['share']:.0f} %"
        yield [c["name"], c["verdict"], f"{c['weight_db']:.1f}", share, c["smiles"]]


def _named(candidates: list[dict[str, Any]]) -> list[dict[str, Any]]:
    """Candidates with the names that the sentences call them by: "A" for the first given, "rival 1"."""
    return [{**c, "name": c["name"].removeprefix("structure ")} for c in candidates]


def _reasons(candidate: dict[str, Any]) -> Iterator[str]:
    yield ""
    yield f"{candidate['name']}  {candidate['smiles']}: {candidate.get('sentence') or candidate['verdict']}"
    telling = sorted(candidate["findings"], key=lambda f: -abs(f["weight_db"]))[:_MOST_FINDINGS]
    telling.sort(key=lambda f: f["weight_db"])
    rows = [[f"{f['weight_db']:+.1f}", f["kind"], f["text"]] for f in telling]
    yield from (f"   {line}" for line in columns(rows, right=(0,)))
    said = {f["text"] for f in candidate["findings"]}
    yield from (f"   {left['text']}" for left in candidate["unexplained"] if left["text"] not in said)


def _next(measures: list[dict[str, Any]]) -> Iterator[str]:
    if measures:
        yield ""
        yield "Next"
    for entry in measures:
        yield f"   {entry['expected_db']:.1f}  {entry['measure']}: {entry['why']}"
        yield from (f"        caution: {caution}" for caution in entry["cautions"])
