"""The parameters of a call against what a function takes. Imports next to nothing: a start needs it."""

from __future__ import annotations

import inspect
from collections.abc import Callable
from functools import cache
from typing import Any

from hoodside.errors import InvalidInputError


@cache
def _parameters(run: Callable[..., Any]) -> tuple[frozenset[str], frozenset[str], bool]:
    """Names needed, names known, and whether any name will do."""
    declared = inspect.signature(run).parameters.values()
    free = any(p.kind is p.VAR_KEYWORD for p in declared)
    named = [p for p in declared if p.kind is not p.VAR_KEYWORD]
    return (
        frozenset(p.name for p in named if p.default is p.empty),
        frozenset(p.name for p in named),
        free,
    )


def check_arguments(method: str, run: Callable[..., Any], arguments: dict[str, Any]) -> None:
    """Hold arguments against what a function takes.

    Raises: InvalidInputError naming the first that is missing or unknown.
    """
    needed, known, free = _parameters(run)
    for name in sorted(needed - arguments.keys()):
        raise InvalidInputError(f"{method} needs {name!r}.", hint=f"Give {name!r}.", field=name)
    unknown = sorted(arguments.keys() - known)
    if unknown and not free:
        raise InvalidInputError(
            f"{method} takes no {unknown[0]!r}.",
            hint=f"It takes {', '.join(sorted(known)) or 'nothing'}.",
            field=unknown[0],
        )
