"""Names of the classes of hydrogen that the error model tells apart."""

from __future__ import annotations

from hoodside.predict.proton.view import View

_KINDS = {1: "CH", 2: "CH2", 3: "CH3", 4: "CH4"}
#: Kinds of group in the order in which they name a class, and the word used.
_WORDS = {
    "oxygen": "O",
    "halogen": "halogen",
    "nitrogen": "N",
    "sulfur": "S",
    "aryl": "aryl",
    "acceptor": "C=O or CN",
    "pi": "C=C",
    "metalloid": "Si, P or B",
}


def sp3_environment(view: View, atom: int) -> str:
    """Class of the H of a saturated carbon: how many H, in a ring or not, the two strongest groups on it."""
    kinds = [view.substituent(atom, n).kind for n in view.structure.neighbours[atom]]
    groups = [word for kind, word in _WORDS.items() for _ in range(kinds.count(kind))]
    count = _KINDS[view.structure.atoms[atom].hydrogens]
    where = "ring " if view.structure.rings_of[atom] else ""
    if count == "CH3":
        return f"CH3 on {groups[0] if groups else 'C'}"
    return f"{where}{count} on {' and '.join(groups[:2]) or 'C'}"


def alkene_environment(view: View, atom: int) -> str:
    """Class of the H of a C=C bond."""
    if view.structure.rings_of[atom]:
        return "alkene CH in a ring"
    return "alkene =CH2" if view.structure.atoms[atom].hydrogens == 2 else "alkene CH"


def aromatic_environment(view: View, atom: int) -> str:
    """Class of the H of an aromatic carbon by the ring system it is part of."""
    system = _system(view, atom)
    mixed = any(view.structure.atoms[a].symbol != "C" for ring in system for a in ring)
    own = next(r for r in view.structure.rings if atom in r)
    if len(system) > 1:
        return "aromatic CH, fused hetero" if mixed else "aromatic CH, fused"
    if not mixed:
        return "aromatic CH, benzenoid"
    return f"aromatic CH, {len(own)}-ring hetero"


def _system(view: View, atom: int) -> list[tuple[int, ...]]:
    """Aromatic rings fused to the one that holds the atom."""
    rings = [r for r in view.structure.rings if all(view.structure.atoms[a].aromatic for a in r)]
    system = [r for r in rings if atom in r]
    for ring in system:
        system += [r for r in rings if r not in system and len(set(r) & set(ring)) > 1]
    return system
