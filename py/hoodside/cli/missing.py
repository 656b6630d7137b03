"""Says plainly when a command is not part of a build."""

from __future__ import annotations

from hoodside.engine import METHODS
from hoodside.errors import InvalidInputError


def needs(method: str) -> None:
    """Raises: InvalidInputError when the engine has no such method."""
    if method not in METHODS:
        raise InvalidInputError(
            f"The command {method} is not part of this version.",
            hint="python -m hoodside --help lists the commands.",
        )
