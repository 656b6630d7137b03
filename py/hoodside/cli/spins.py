"""The ``spins`` command."""

from __future__ import annotations

import argparse
from collections.abc import Iterator
from typing import Any

from hoodside.cli.answer import answer_all, columns
from hoodside.cli.files import read_json
from hoodside.cli.missing import needs


def run(options: argparse.Namespace) -> int:
    """Simulate every spin system of the input."""
    needs("spins")
    systems, several = read_json(options.file)
    return answer_all("spins", systems, several, options.json, _lines)


def _lines(answer: dict[str, Any]) -> Iterator[str]:
    off = f", a line may be off by {answer['error_hz']:.2f} Hz" if "error_hz" in answer else ""
    yield f"method: {answer['method']}{off}"
    rows = [
        [f"{line['ppm']:.4f}", f"{line['hz']:.2f}", f"{line['intensity']:.4f}"] for line in answer["lines"]
    ]
    yield from columns([["ppm", "Hz", "intensity"], *rows], right=(0, 1, 2))
