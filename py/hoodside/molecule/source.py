"""What kind of text a structure was given in, and the guards before any of it reaches a kernel."""

from __future__ import annotations

import re
from enum import Enum

from hoodside.errors import StructureError
from hoodside.molecule.complaints import in_plain_words
from hoodside.molecule.ctfile import fault_of, read_counts

#: Most heavy atoms that are handed to a kernel: RDKit's wasm traps for good on very large input.
MAX_ATOMS = 300
MAX_SMILES_CHARS = 2_000
MAX_CTFILE_CHARS = 100_000
#: An atom or bond of a JSON graph opens one brace; a molecule has rarely more than 1.3 bonds per atom.
_MAX_JSON_BRACES = 1_000

# In SMILES every atom is a bracket or one of the organic-subset symbols.
_SMILES_ATOM = re.compile(r"\[[^\]]*\]|Br|Cl|[BCNOPSFIbcnops*]")
_SHOWN_CHARS = 60


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
    """Refuse what a kernel cannot survive. Raises: StructureError when empty, too large or no such text."""
    if not source.strip():
        raise StructureError("The structure is empty.", hint="Give a SMILES or a CTfile.", value=source)
    _CHECKS[notation_of(source)](source)


def check_atoms(atoms: int, source: str) -> None:
    """Refuse more atoms than kernels survive. Raises: StructureError."""
    if atoms > MAX_ATOMS:
        raise _too_large(f"of {atoms} atoms; the limit is {MAX_ATOMS}", source)


def parse_failure(source: str, log: str) -> StructureError:
    """The error for text that a kernel could not make a molecule of, from what RDKit logged."""
    complaint = in_plain_words(log, source)
    return _unreadable(source, complaint.reason, complaint.mend)


def _check_smiles(source: str) -> None:
    _check_length(source, MAX_SMILES_CHARS)
    check_atoms(len(_SMILES_ATOM.findall(source)), source)
    blank = re.search(r"\s", source.strip())
    if blank:
        raise _unreadable(source, "it holds a blank", "Give the SMILES alone, without blanks or a name.")


def _check_ctfile(source: str) -> None:
    _check_length(source, MAX_CTFILE_CHARS)
    counts = read_counts(source)
    if counts is None:
        raise _unreadable(
            source,
            "its fourth line gives no numbers of atoms and bonds",
            "Give the whole file, three header lines too.",
        )
    check_atoms(counts.atoms, source)
    fault = fault_of(source, counts)
    if fault:
        raise _unreadable(source, fault, "Save the file again from where it was drawn.")


def _check_json(source: str) -> None:
    if source.count("{") > _MAX_JSON_BRACES:
        raise _too_large(f"of more than {MAX_ATOMS} atoms", source)
    if '"rdkitjson"' not in source:
        raise _unreadable(source, "it has no rdkitjson header", "Give a SMILES or a CTfile.")


_CHECKS = {Notation.SMILES: _check_smiles, Notation.CTFILE: _check_ctfile, Notation.JSON: _check_json}


def _check_length(source: str, limit: int) -> None:
    if len(source) > limit:
        raise _too_large(f"{len(source):,} characters long; the limit is {limit:,}", source)


def _unreadable(source: str, reason: str, mend: str) -> StructureError:
    shown = source if len(source) <= _SHOWN_CHARS else source[: _SHOWN_CHARS - 3] + "..."
    tail = f": {reason}" if reason else ""
    return StructureError(
        f"{shown!r} cannot be read as {notation_of(source).value}{tail}.", hint=mend, value=source
    )


def _too_large(what: str, source: str) -> StructureError:
    return StructureError(
        f"The structure is {what}.", hint="Check the part of interest on its own.", value=source
    )
