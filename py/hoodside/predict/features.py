"""What a learned correction may hang on: named features of the surroundings of one atom.

Names are stable short texts; a name's first letter is its family: ``e`` exact environment to a radius (the
radius follows), ``s`` kind of atom at a distance (counted), ``p`` substituent at a ring position (counted),
``o`` pair of ring positions both substituted.
"""

from __future__ import annotations

from hoodside.molecule import Atom, Structure
from hoodside.predict.environment import circular_codes

MAX_RADIUS = 5
_SHELLS = 4
_PLACES = ("i", "o", "m", "p")


def atom_features(structure: Structure, atom: int) -> dict[str, float]:
    """Features of the surroundings of a heavy atom: name -> count."""
    found: dict[str, float] = {}
    codes = circular_codes(structure, MAX_RADIUS)[atom]
    for radius in range(MAX_RADIUS + 1):
        found[f"e{radius}{codes[radius]}"] = 1.0
    own = _kind(structure, structure.atoms[atom])
    for other, distance in enumerate(structure.distances_from(atom)):
        if 0 < distance <= _SHELLS:
            _count(found, f"s{distance}{own}>{_kind(structure, structure.atoms[other])}")
    for near in structure.neighbours[atom]:
        hydrogens = structure.atoms[atom].hydrogens
        _count(found, f"n{hydrogens}{codes[0]}{circular_codes(structure, MAX_RADIUS)[near][1]}")
        for far in structure.neighbours[near]:
            if far != atom:
                _count(found, f"u{codes[0]}{circular_codes(structure, MAX_RADIUS)[far][1]}")
    if structure.atoms[atom].aromatic:
        _ring_features(structure, atom, found)
    return found


def _ring_features(structure: Structure, atom: int, found: dict[str, float]) -> None:
    codes = circular_codes(structure, MAX_RADIUS)
    for ring in structure.rings:
        if atom not in ring or not all(structure.atoms[a].aromatic for a in ring):
            continue
        here = ring.index(atom)
        held: list[str] = []
        for place, member in enumerate(ring):
            steps = abs(place - here)
            position = _PLACES[min(steps, len(ring) - steps, 3)]
            for near in structure.neighbours[member]:
                if near not in ring:
                    held.append(position)
                    _count(found, f"p{len(ring)}{position}{codes[near][1]}")
                    _count(found, f"q{len(ring)}{position}{_kind(structure, structure.atoms[near])}")
        if len(held) > 1:
            _count(found, f"o{len(ring)}{''.join(sorted(held))}")


def _kind(structure: Structure, atom: Atom) -> str:
    """Element with what tells its shielding: aromatic, unsaturated, hydrogens on heteroatoms."""
    bonds = structure.bonds_of[atom.index]
    if atom.aromatic:
        return atom.symbol.lower()
    mark = "#" if any(b.order == 3 for b in bonds) else "=" if any(b.order == 2 for b in bonds) else ""
    return f"{atom.symbol}{mark}{'h' if atom.hydrogens and atom.symbol != 'C' else ''}"


def _count(found: dict[str, float], name: str) -> None:
    found[name] = found.get(name, 0.0) + 1.0


def family(name: str) -> str:
    """Family of a feature: the letter, with the radius or distance where it has one."""
    return name[:2] if name[0] in "es" else name[0]
