"""Reads single fields of JSON input; every complaint names the field, the value and the mend."""

from __future__ import annotations

import math
import re
from collections.abc import Callable, Iterator
from dataclasses import dataclass
from typing import Any, TypeVar

from hoodside.errors import InvalidInputError

T = TypeVar("T")
_NUMBER = re.compile(r"[+-]?(?:\d+(?:[.,]\d*)?|[.,]\d+)(?:[eE][+-]?\d+)?")
_MINUS = str.maketrans("−–‒", "---")
#: More rows of one kind than any printout has; keeps a slip from filling the memory of a phone.
MAX_ROWS = 2_000


@dataclass(frozen=True, slots=True)
class Span:
    """What a number may be: its bounds, its unit, and what it is called."""

    what: str
    lo: float
    hi: float
    unit: str = ""

    @property
    def words(self) -> str:
        """The bounds in words."""
        return f"from {self.lo:g} to {self.hi:g} {self.unit}".strip()


def number(value: object, field: str, span: Span) -> float:
    """A number within its span; text is read with "." or "," as decimal sign.

    Raises: InvalidInputError.
    """
    found = _as_float(value)
    if found is None:
        raise refusal(
            field, value, f"{show(value)} is no number.", f"Give the {span.what} as a number {span.words}."
        )
    if not span.lo <= found <= span.hi:
        unit = f" {span.unit}" if span.unit else ""
        raise refusal(
            field, value, f"{found:g}{unit} is no possible {span.what}.", f"Give a {span.what} {span.words}."
        )
    return found


def _as_float(value: object) -> float | None:
    if isinstance(value, str):
        text = value.strip().translate(_MINUS)
        if not _NUMBER.fullmatch(text):
            return None
        value = float(text.replace(",", "."))
    if isinstance(value, bool) or not isinstance(value, int | float):
        return None
    try:
        found = float(value)
    except OverflowError:
        return None
    return found if math.isfinite(found) else None


def text(value: object, field: str, most: int = 200) -> str:
    """A short text; None counts as empty. Raises: InvalidInputError."""
    if value is None:
        return ""
    if not isinstance(value, str):
        raise refusal(field, value, f"{show(value)} is no text.", "Put it in quotes.")
    if len(value) > most:
        raise refusal(field, value, f"The text has {len(value)} characters.", f"Keep it under {most}.")
    return value.strip()


def flag(value: object, field: str) -> bool:
    """True or false; None counts as false. Raises: InvalidInputError."""
    if value is None or isinstance(value, bool):
        return bool(value)
    raise refusal(field, value, f"{show(value)} is neither true nor false.", "Write true or false.")


def rows(value: object, field: str, read: Callable[[Any, str], T]) -> tuple[T, ...]:
    """A list, each entry read with its own path ("h1[2]"); None counts as empty.

    Raises: InvalidInputError.
    """
    if value is None:
        return ()
    if not isinstance(value, list | tuple):
        raise refusal(field, value, f"{show(value)} is no list.", "Put the readings in [ ].")
    if len(value) > MAX_ROWS:
        raise refusal(field, None, f"There are {len(value)} entries.", f"Give at most {MAX_ROWS}.")
    return tuple(read(entry, f"{field}[{i}]") for i, entry in enumerate(value))


def record(value: object, field: str, hint: str) -> dict[str, Any]:
    """A JSON object. Raises: InvalidInputError."""
    if not isinstance(value, dict):
        raise refusal(field, value, f"{show(value)} is no object with named fields.", hint)
    return value


def given(entry: dict[str, Any], *names: str) -> Iterator[str]:
    """Those of the names that the entry holds with a value."""
    return (name for name in names if entry.get(name) not in (None, ""))


def refusal(field: str, value: object, message: str, hint: str) -> InvalidInputError:
    """The error for a field, to be raised."""
    return InvalidInputError(message, hint=hint, field=field, value=value)


def show(value: object) -> str:
    """A value as it may stand in a message: quoted text, cut when long."""
    shown = repr(value)
    return shown if len(shown) <= 60 else f"{shown[:57]}..."
