"""Which table rows can apply to a structure at all, told from simple features before any matching."""

from __future__ import annotations

import re
from functools import cache

from hoodside.molecule import Structure

#: Feature -> text that a path must contain to ask for it (conditions in brackets left out).
_IN_PATH = {
    "double": re.compile(r"=|\[CX3"),
    "alkene": re.compile(r"=\[CX[23]|\[CX3[^\]]*\]=\[CX"),
    "triple": re.compile(r"#(?!\d)"),
    "aromatic": re.compile(r"(?<![A-Za-z,])[cn](?![a-z])|(?<!,):"),
    "F": re.compile(r"-F"),
    "N": re.compile(r"\[NX|#7"),
    "S": re.compile(r"\[SX"),
    "P": re.compile(r"\[PX|#15"),
    "r3": re.compile(r";r3"),
    "r4": re.compile(r";r4"),
    "r5": re.compile(r";r5"),
    "r6": re.compile(r";r6"),
}
#: An aromatic ring written out as condition of an atom, and the hetero atoms that may stand in it.
_RING = re.compile(r"\$\(\[?cH?\]?1([^$]*?)\)")
_HETERO = {"n": "aromatic N", "o": "aromatic O", "s": "aromatic S"}


@cache
def needs(smarts: str) -> frozenset[str]:
    """Features without which a pattern cannot match."""
    path = without_conditions(smarts)
    found = {name for name, pattern in _IN_PATH.items() if pattern.search(path)}
    for ring in _RING.findall(smarts):
        found.add("aromatic")
        if "2" in ring:
            found.add("fused aromatic")
        found |= {feature for letter, feature in _HETERO.items() if letter in ring}
    return frozenset(found)


def without_conditions(smarts: str) -> str:
    """A pattern with every $(...) left out."""
    kept, k = [], 0
    while k < len(smarts):
        if smarts.startswith("$(", k):
            k = _closing(smarts, k + 1)
        else:
            kept.append(smarts[k])
        k += 1
    return "".join(kept)


def _closing(text: str, opening: int) -> int:
    """Place of the bracket that closes the one at ``opening``."""
    depth = 0
    for k in range(opening, len(text)):
        depth += (text[k] == "(") - (text[k] == ")")
        if not depth:
            return k
    return len(text) - 1


def features(structure: Structure) -> frozenset[str]:
    """The features of a structure."""
    atoms = structure.atoms
    found = set()
    for bond in structure.bonds:
        if bond.order == 2 and not bond.aromatic:
            carbons = atoms[bond.a].symbol == atoms[bond.b].symbol == "C"
            found |= {"double", "alkene"} if carbons else {"double"}
    found |= {"triple" for b in structure.bonds if b.order == 3}
    found |= {f"r{len(ring)}" for ring in structure.rings}
    for atom in atoms:
        found.add(atom.symbol)
        if atom.aromatic:
            found |= {"aromatic", f"aromatic {atom.symbol}"}
            if sum(bond.aromatic for bond in structure.bonds_of[atom.index]) == 3:
                found.add("fused aromatic")
    return frozenset(found)
