"""The ``parse`` command."""

from __future__ import annotations

import argparse
from collections.abc import Iterator
from typing import Any

from hoodside.cli.answer import answer_one, columns, cut
from hoodside.cli.files import read_text


def run(options: argparse.Namespace) -> int:
    """Read a report."""
    return answer_one("parse", {"text": read_text(options.file)}, options.json, _lines)


def _lines(answer: dict[str, Any]) -> Iterator[str]:
    yield from columns([p["means"], cut(p["text"], 60)] for p in answer["pieces"])
    yield from (f"! {warning}" for warning in answer["readings"].get("warnings", []))
    if answer["unread"]:
        yield "Not read"
    for piece in answer["unread"]:
        yield f"   {piece['start']}-{piece['end']}: {cut(piece['text'], 60)!r} {piece['why']}"
