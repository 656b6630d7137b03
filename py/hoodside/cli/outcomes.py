"""The ``outcomes`` command."""

from __future__ import annotations

import argparse
from collections.abc import Iterator
from typing import Any

from hoodside.cli.answer import answer_one, columns


def run(options: argparse.Namespace) -> int:
    """Say what a step may have given."""
    asked = {
        "structure": options.smiles,
        "reagents": options.reagents,
        "partner": options.partner,
        "kind": options.kind,
    }
    return answer_one("outcomes", {k: v for k, v in asked.items() if v}, options.json, _lines)


def _lines(answer: dict[str, Any]) -> Iterator[str]:
    rows = [[o["role"], o["formula"], o["smiles"], o["stereo"], o["name"]] for o in answer["outcomes"]]
    yield from columns(rows)
    if answer["no_step"]:
        yield f"! {answer['no_step']}"
    elif answer["unknown"]:
        yield f"! Not known as reagents: {', '.join(answer['unknown'])}"
    for caution in answer["cautions"]:
        yield f"caution  {caution['reagent']}: {caution['hazards']}. Quench: {caution['quench']}"
    if answer["cautions"]:
        yield "Local rules, the supplier's safety sheet and licensed practice come first."
