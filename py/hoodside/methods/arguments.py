"""Plain arguments of methods, checked."""

from __future__ import annotations

from typing import Any

from hoodside.readings.fields import Span, number, refusal, rows, show, text


def short_text(value: object, field: str, most: int = 2_000) -> str:
    """A text of bounded length. Raises: InvalidInputError."""
    if value is None:
        raise refusal(field, None, f"{field} is missing.", f"Give {field} as text.")
    if isinstance(value, str) and "\n" in value:
        # A CTfile starts with lines that may be blank: its white space counts.
        text(value, field, most)
        return value
    return text(value, field, most)


def integer(value: object, field: str, lo: int, hi: int) -> int:
    """A whole number within bounds. Raises: InvalidInputError."""
    found = number(value, field, Span(field, lo, hi))
    if found != int(found):
        raise refusal(field, value, f"{show(value)} is no whole number.", f"Give a whole {field}.")
    return int(found)


def integers(value: Any, field: str) -> tuple[int, ...]:
    """A list of whole numbers from 0. Raises: InvalidInputError."""
    return rows(value, field, lambda entry, path: integer(entry, path, 0, 10**6))
