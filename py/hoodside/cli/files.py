"""Reads input from files and stdin."""

from __future__ import annotations

import json
import sys
from collections.abc import Iterator
from typing import Any

from hoodside.errors import InvalidInputError

#: Larger input is refused rather than read into memory.
MOST_BYTES = 50_000_000


def read_text(name: str) -> str:
    """The text of a file, or of stdin for "-". Raises: InvalidInputError."""
    return _decoded(_bytes(name), name)


def _bytes(name: str) -> bytes:
    try:
        if name == "-":
            if sys.stdin is None:
                raise ValueError("stdin is closed")
            content = sys.stdin.buffer.read(MOST_BYTES + 1)
        else:
            with open(name, "rb") as file:
                content = file.read(MOST_BYTES + 1)
    except (OSError, ValueError) as err:
        reason = getattr(err, "strerror", None) or str(err)
        raise InvalidInputError(
            f"{name!r} cannot be read: {reason}.", hint="Check the name, or use - for stdin.", field="FILE"
        ) from err
    if len(content) > MOST_BYTES:
        hint = f"Give at most {MOST_BYTES // 1_000_000} MB."
        raise InvalidInputError(f"{name!r} is too large.", hint=hint, field="FILE")
    return content


def _decoded(content: bytes, name: str) -> str:
    marked = content.startswith((b"\xff\xfe", b"\xfe\xff"))
    for encoding in ("utf-16",) if marked else ("utf-8-sig", "cp1252"):
        try:
            return content.decode(encoding)
        except UnicodeDecodeError:
            continue
    raise InvalidInputError(f"{name!r} is no text.", hint="Save it as UTF-8 text.", field="FILE")


def read_json(name: str) -> tuple[list[Any], bool]:
    """The cases of a file and whether there are several (a JSON array, or JSON Lines).

    Raises: InvalidInputError with line and column where the JSON breaks off.
    """
    content = read_text(name)
    if not content.strip():
        raise InvalidInputError(
            "The input is empty.", hint="Give one JSON object, or an array of them.", field="FILE"
        )
    try:
        found = json.loads(content)
    except json.JSONDecodeError as err:
        lines = list(_json_lines(content)) if err.msg == "Extra data" else []
        if not lines:
            raise _broken(err) from err
        return lines, True
    except RecursionError as err:
        hint = "Give one JSON object, or an array of them."
        raise InvalidInputError("The JSON is nested too deeply.", hint=hint, field="FILE") from err
    except ValueError as err:  # a number of thousands of digits
        hint = "Shorten the longest number."
        raise InvalidInputError(f"The JSON cannot be read: {err}.", hint=hint, field="FILE") from err
    return (found, True) if isinstance(found, list) else ([found], False)


def _json_lines(content: str) -> Iterator[Any]:
    """One value per line; nothing when a line is no JSON by itself."""
    values = []
    for line in content.splitlines():
        try:
            values += [json.loads(line)] if line.strip() else []
        except json.JSONDecodeError:
            return
    yield from values


def _broken(err: json.JSONDecodeError) -> InvalidInputError:
    near = err.doc[err.pos : err.pos + 20].strip().splitlines()
    return InvalidInputError(
        f"The JSON breaks off at line {err.lineno}, column {err.colno}: {err.msg.lower()}"
        + (f", near {near[0]!r}." if near else "."),
        hint="Mend it there.",
        field="FILE",
    )
