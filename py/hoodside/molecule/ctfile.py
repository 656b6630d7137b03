"""First look at a CTfile: the faults that kernels survive badly or report in differing ways.

Layout after Dalby et al., J. Chem. Inf. Comput. Sci. 1992, 32, 244 (V2000 fixed columns, V3000 tagged lines).
"""

from __future__ import annotations

import re
from dataclasses import dataclass

from hoodside.molecule.elements import SYMBOLS

#: The counts line is the fourth; V2000 gives atoms and bonds three columns each.
_COUNTS_LINE = 3
_FIRST_ATOM = 4
_SYMBOL_COLUMNS = slice(31, 34)
#: Symbols beside the elements: isotopes of hydrogen, and atoms left open.
_OTHER_SYMBOLS = frozenset({"D", "T", "A", "Q", "L", "LP", "R", "R#", "*", "X", "M", ""})
_V3000_COUNTS = re.compile(r"^M  V30 COUNTS\s+(\d+)\s+(\d+)", re.MULTILINE)


@dataclass(frozen=True, slots=True)
class Counts:
    """Numbers of atoms and bonds that the file announces."""

    atoms: int
    bonds: int


def read_counts(text: str) -> Counts | None:
    """The counts line, or None when there is no readable one."""
    lines = text.splitlines()
    if len(lines) <= _COUNTS_LINE:
        return None
    line = lines[_COUNTS_LINE]
    if "V3000" in line:
        tagged = _V3000_COUNTS.search(text)
        return Counts(int(tagged[1]), int(tagged[2])) if tagged else None
    try:
        return Counts(int(line[:3]), int(line[3:6]))
    except ValueError:
        return None


def fault_of(text: str, counts: Counts) -> str:
    """What is wrong with the atom and bond lines of a V2000 file, else empty (V3000: left to the kernel)."""
    lines = text.splitlines()
    if "V3000" in lines[_COUNTS_LINE]:
        return ""
    atoms = lines[_FIRST_ATOM : _FIRST_ATOM + counts.atoms]
    bonds = lines[_FIRST_ATOM + counts.atoms : _FIRST_ATOM + counts.atoms + counts.bonds]
    if len(bonds) < counts.bonds or any(line.startswith("M  ") for line in atoms + bonds):
        return f"it announces {counts.atoms} atoms and {counts.bonds} bonds but holds fewer lines"
    for number, line in enumerate(atoms, start=1):
        symbol = line[_SYMBOL_COLUMNS].strip()
        if symbol not in SYMBOLS and symbol not in _OTHER_SYMBOLS:
            return f"atom {number}: {symbol!r} is no element"
    for number, line in enumerate(bonds, start=1):
        if not _joins_atoms(line, counts.atoms):
            return f"bond {number} ({line.strip()!r}) does not join two of the {counts.atoms} atoms"
    return ""


def _joins_atoms(line: str, atoms: int) -> bool:
    try:
        a, b = int(line[:3]), int(line[3:6])
    except ValueError:
        return False
    return a != b and 1 <= a <= atoms and 1 <= b <= atoms
