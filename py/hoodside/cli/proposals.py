"""The ``proposals`` command."""

from __future__ import annotations

import argparse
from collections.abc import Iterator
from typing import Any

from hoodside.cli.answer import answer_one, columns
from hoodside.cli.case_document import check_object
from hoodside.cli.files import read_json


def run(options: argparse.Namespace) -> int:
    """Say what readings suggest without a structure; candidates of the file are left aside."""
    asked: dict[str, Any] = {"readings": check_object(read_json(options.file)[0][0])}
    if options.limit:
        asked["limit"] = options.limit
    return answer_one("proposals", asked, options.json, _lines)


def _lines(answer: dict[str, Any]) -> Iterator[str]:
    yield "Fragments" if answer["fragments"] else "No fragment is forced by these readings."
    rows = [[f"{f['weight_db']:+.1f}", _counted(f), f["reason"]] for f in answer["fragments"]]
    yield from (f"   {line}" for line in columns(rows, right=(0,)))
    if answer["structures"]:
        yield "Structures"
    found = [[f"{s['weight_db']:+.1f}", s["verdict"], s["smiles"]] for s in answer["structures"]]
    yield from (f"   {line}" for line in columns(found, right=(0,)))
    if answer["note"]:
        yield answer["note"]


def _counted(fragment: dict[str, Any]) -> str:
    times = "" if fragment["times"] == 1 else f"{fragment['times']} x "
    return f"{times}{fragment['fragment']}"
