"""What kind of text a structure was given in, and the guards before any of it reaches a kernel."""

from __future__ import annotations

import re
from enum import Enum

from hoodside.errors import StructureError

#: Most heavy atoms that are handed to a kernel: RDKit's wasm traps for good on very large input.
MAX_ATOMS = 300
MAX_SMILES_CHARS = 2_000
MAX_CTFILE_CHARS = 100_000

# In SMILES every atom is a bracket or one of the organic-subset symbols.
_SMILES_ATOM = re.compile(r"\[[^\]]*\]|Br|Cl|[BCNOPSFIbcnops*]")


class Notation(Enum):
    """Notations a structure can come in."""

    SMILES = "SMILES"
    CTFILE = "CTfile"
    JSON = "RDKit JSON"


def notation_of(source: str) -> Notation:
    """Tell SMILES, CTfile and RDKit JSON apart by their look."""
    if source.lstrip().startswith("{"):
        return Notation.JSON
    return Notation.CTFILE if "\n" in source.strip("\n") else Notation.SMILES


def check_size(source: str) -> None:
    """Refuse what a kernel cannot survive. Raises: StructureError when empty or too large."""
    if not source.strip():
        raise StructureError("The structure is empty.", hint="Give a SMILES or a CTfile.", value=source)
    notation = notation_of(source)
    if notation is Notation.JSON:
        return
    limit = MAX_SMILES_CHARS if notation is Notation.SMILES else MAX_CTFILE_CHARS
    if len(source) > limit:
        raise _too_large(f"{len(source):,} characters long; the limit is {limit:,}", source)
    if notation is Notation.SMILES and (atoms := len(_SMILES_ATOM.findall(source))) > MAX_ATOMS:
        raise _too_large(f"of {atoms} atoms; the limit is {MAX_ATOMS}", source)


def parse_failure(source: str, reason: str) -> StructureError:
    """The error for text that a kernel could not make a molecule of."""
    notation = notation_of(source).value
    shown = source if len(source) <= 60 else source[:57] + "..."
    tail = f": {reason}" if reason else ""
    return StructureError(
        f"{shown!r} cannot be read as {notation}{tail}.",
        hint="Check brackets, ring closures and valences.",
        value=source,
    )


def _too_large(what: str, source: str) -> StructureError:
    return StructureError(
        f"The structure is {what}.", hint="Check the part of interest on its own.", value=source
    )
