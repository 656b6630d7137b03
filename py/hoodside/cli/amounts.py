"""The ``amounts`` command."""

from __future__ import annotations

import argparse
from collections.abc import Iterator
from typing import Any

from hoodside.cli.answer import answer_all
from hoodside.cli.files import read_json


def run(options: argparse.Namespace) -> int:
    """Answer every question of the input."""
    questions, several = read_json(options.file)
    return answer_all("amounts", questions, several, options.json, _lines)


def _lines(answer: dict[str, Any]) -> Iterator[str]:
    for name, value in answer.items():
        if name not in ("kind", "assumptions"):
            yield from _value(name.replace("_", " "), value)
    yield from (f"   {line}" for line in answer.get("assumptions", []))


def _value(name: str, value: Any) -> Iterator[str]:
    if isinstance(value, dict) and "value" in value:
        u = value.get("u", value.get("uncertainty"))
        yield f"{name}  {value['value']:.4g}" + (f" ± {u:.2g}" if isinstance(u, int | float) else "")
    elif isinstance(value, dict):
        for key, inner in value.items():
            yield from _value(f"{name}, {key}", inner)
    elif isinstance(value, list):
        for at, inner in enumerate(value, start=1):
            label = inner.get("name", at) if isinstance(inner, dict) else at
            yield from _value(f"{name}, {label}", inner)
    else:
        yield f"{name}  {value}"
