"""Decodes ordinate tables in the ASDF forms AFFN, PAC, SQZ, DIF and DUP.

Source: McDonald & Wilks, Appl. Spectrosc. 1988, 42, 151, section on ASCII squeezed-difference form.
"""

from __future__ import annotations

import re
from dataclasses import dataclass, field

from hoodside.errors import InvalidInputError

#: First digit, with its sign, of a value in squeezed form; of a difference; of a repeat count.
_SQUEEZED = {
    "@": "0",
    **{c: str(i) for i, c in enumerate("ABCDEFGHI", 1)},
    **{c: f"-{i}" for i, c in enumerate("abcdefghi", 1)},
}
_DIFFERENCE = {
    "%": "0",
    **{c: str(i) for i, c in enumerate("JKLMNOPQR", 1)},
    **{c: f"-{i}" for i, c in enumerate("jklmnopqr", 1)},
}
_REPEAT = {c: str(i) for i, c in enumerate("STUVWXYZs", 1)}
_TOKEN = re.compile(
    r"[@A-DF-Ia-i%J-Rj-rS-Zs]\d*\.?\d*|E\d*\.?\d*|[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]\d+)?|\?|[^\s,;]"
)
_ABSCISSA = re.compile(r"\s*[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]\d+)?")
#: A repeat that would give more points than this is a broken file.
MOST_POINTS = 2_000_000


@dataclass(slots=True)
class Ordinates:
    """What a table held; ``None`` stands where the file says that there is no value."""

    y: list[float | None] = field(default_factory=list)
    starts: list[tuple[float, int]] = field(default_factory=list)  # X of a line, index of its first ordinate
    failed_checks: int = 0  # lines whose first ordinate disagrees with the last of the line before


def decode(table: str) -> Ordinates:
    """Decode the lines of an XYDATA table in the form (X++(Y..Y)), factors not applied.

    Raises: InvalidInputError naming the line that cannot be read.
    """
    found = Ordinates()
    checks = False  # the line before ended in difference form: this one repeats its last ordinate
    for number, line in enumerate(table.splitlines(), start=1):
        if not line.strip():
            continue
        abscissa = _ABSCISSA.match(line)
        if abscissa is None:
            raise _unreadable(number, line.strip()[:20], "It does not begin with an X value.")
        checks = _decode_line(line[abscissa.end() :], float(abscissa[0]), number, checks, found)
    return found


def _decode_line(rest: str, x: float, number: int, checks: bool, into: Ordinates) -> bool:
    """Decode one line; answers whether its last ordinate was a difference."""
    repeated = into.y.pop() if checks and into.y else None
    first = len(into.y)
    into.starts.append((x, first))
    step: float | None = None
    for token in _TOKEN.findall(rest):
        step = _take(token, step, number, into)
    if repeated is not None and len(into.y) == first:
        into.y.append(repeated)
    elif repeated is not None and into.y[first] != repeated:
        into.failed_checks += 1
    return step is not None


def _take(token: str, step: float | None, number: int, into: Ordinates) -> float | None:
    """Add what a token stands for; answers the difference that a repeat would apply again."""
    letter = token[0]
    if letter == "?":
        into.y.append(None)
        return None
    if letter in _DIFFERENCE:
        step = _value(_DIFFERENCE[letter] + token[1:], number, token)
        into.y.append(_previous(into, number, token) + step)
        return step
    if letter in _REPEAT:
        _repeat(into, step, int(float(_REPEAT[letter] + token[1:])), number, token)
        return step
    into.y.append(_value(_SQUEEZED[letter] + token[1:] if letter in _SQUEEZED else token, number, token))
    return None


def _repeat(into: Ordinates, step: float | None, count: int, number: int, token: str) -> None:
    if count < 1 or len(into.y) + count > MOST_POINTS:
        raise _unreadable(number, token, f"It would repeat a value {count} times.")
    for _ in range(count - 1):
        value = into.y[-1] if into.y and step is None else _previous(into, number, token) + (step or 0.0)
        into.y.append(value)


def _previous(into: Ordinates, number: int, token: str) -> float:
    value = into.y[-1] if into.y else None
    if value is None:
        raise _unreadable(number, token, "A difference needs a value before it.")
    return value


def _value(text: str, number: int, token: str) -> float:
    try:
        return float(text)
    except ValueError as err:
        raise _unreadable(
            number, token, "It is no number in any of the forms AFFN, PAC, SQZ, DIF, DUP."
        ) from err


def _unreadable(number: int, token: str, why: str) -> InvalidInputError:
    return InvalidInputError(
        f"Line {number} of the data table cannot be read at {token!r}. {why}",
        hint="The file is damaged; export it again.",
        field="text",
        value=token,
    )
