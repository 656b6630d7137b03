"""Prints answers: JSON for scripts, compact tables for people."""

from __future__ import annotations

import json
import sys
from collections.abc import Callable, Iterable, Sequence
from typing import Any

from hoodside.engine import call, error_of
from hoodside.errors import HoodsideError, InvalidInputError

Table = Callable[[Any], Iterable[str]]


def answer_one(method: str, arguments: dict[str, Any], as_json: bool, table: Table) -> int:
    """Call a method of the engine and print what it answers; the exit code."""
    show(call(method, arguments), as_json, table)
    return 0


def answer_all(method: str, cases: Sequence[Any], several: bool, as_json: bool, table: Table) -> int:
    """Call a method for each case. Of several, a bad one is answered by its error; the rest still run."""
    bad: list[HoodsideError] = []
    for at, case in enumerate(cases):
        try:
            show(call(method, _object(case)), as_json, table)
        except HoodsideError as err:
            if not several:
                raise
            err.field = f"[{at}]" + (f".{err.field}" if err.field else "")
            bad.append(err)
            _show_error(case, err, as_json)
    if bad:
        more = f" ({len(bad)} of {len(cases)} cases could not be done)" if len(bad) > 1 else ""
        print(bad[0].one_line() + more, file=sys.stderr)
    return 2 if bad else 0


def show(answer: Any, as_json: bool, table: Table) -> None:
    """Print one answer."""
    print(json.dumps(answer, allow_nan=False) if as_json else "\n".join(table(answer)), flush=True)


def _object(case: Any) -> dict[str, Any]:
    if not isinstance(case, dict):
        raise InvalidInputError(
            f"{json.dumps(case)[:60]} is no JSON object.", hint='Write {"h1": [...], "candidates": [...]}.'
        )
    return case


def _show_error(case: Any, err: HoodsideError, as_json: bool) -> None:
    if as_json:
        name = case.get("id", "") if isinstance(case, dict) else ""
        print(json.dumps({"id": name, "error": error_of(err)}), flush=True)


def columns(rows: Iterable[Sequence[object]], right: Sequence[int] = ()) -> list[str]:
    """Rows of cells as aligned lines; columns in ``right`` are set flush right."""
    texts = [["" if cell is None else str(cell) for cell in row] for row in rows]
    if not texts:
        return []
    widths = [max(len(row[k]) for row in texts) for k in range(len(texts[0]))]
    return [
        "  ".join(
            cell.rjust(width) if k in right else cell.ljust(width)
            for k, (cell, width) in enumerate(zip(row, widths, strict=True))
        ).rstrip()
        for row in texts
    ]


def cut(text: str, most: int = 88) -> str:
    """A text on one line, cut when long."""
    line = " ".join(text.split())
    return line if len(line) <= most else f"{line[: most - 3]}..."


def unsaturations(degree: float | None) -> str:
    """ "5 unsaturations", "1 unsaturation", nothing where it is unknown."""
    return "" if degree is None else f"{degree:g} unsaturation{'' if degree == 1 else 's'}"
