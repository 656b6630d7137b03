"""The ``rivals`` command."""

from __future__ import annotations

import argparse
from collections.abc import Iterator
from typing import Any

from hoodside.cli.answer import answer_one, columns
from hoodside.cli.case_document import check_object
from hoodside.cli.files import read_json
from hoodside.cli.missing import needs


def run(options: argparse.Namespace) -> int:
    """Put up rivals of one structure."""
    needs("rivals")
    asked: dict[str, Any] = {"smiles": options.smiles}
    if options.readings:
        asked["readings"] = check_object(read_json(options.readings)[0][0])
        if isinstance(asked["readings"], dict) and asked["readings"].get("step"):
            asked["step"] = asked["readings"]["step"]
    if options.start:
        stated = {"start": options.start, "reagents": options.reagents, "partner": options.partner}
        asked["step"] = {key: value for key, value in stated.items() if value}
    if options.limit:
        asked["limit"] = options.limit
    return answer_one("rivals", asked, options.json, _lines)


def _lines(answer: dict[str, Any]) -> Iterator[str]:
    rows = [[rival["smiles"], rival["formula"], "; ".join(rival["how"])] for rival in answer["rivals"]]
    yield from columns(rows)
    if answer.get("note"):
        yield answer["note"]
