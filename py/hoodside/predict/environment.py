"""Circular atom environments: what stands one, two, three ... bonds from an atom, as short stable codes.

The idea of ordering a structure in spheres round an atom to compare shifts is Bremser's (Anal. Chim. Acta
1978, 103, 355); the codes here are the project's own hashes of such spheres.
"""

from __future__ import annotations

from hashlib import blake2s

from hoodside.molecule import Atom, Structure

#: Hexadecimal digits kept of a code: 32 bits, so that few of 20,000 codes ever meet by chance.
_DIGITS = 8


def circular_codes(structure: Structure, radius: int) -> list[tuple[str, ...]]:
    """Codes of every atom at radius 0, 1, ... ``radius``.

    Two atoms share the code of radius r when all that lies within r bonds of them is alike: element,
    hydrogens, charge, aromaticity, smallest ring, bond orders (aromatic bonds delocalised).
    """
    key = f"circular_codes {radius}"
    if key not in structure.memo:
        structure.memo[key] = _grow(structure, radius)
    found: list[tuple[str, ...]] = structure.memo[key]
    return found


def atom_invariant(structure: Structure, atom: Atom) -> str:
    """What an atom is by itself: element, aromaticity, heavy neighbours, H, charge, smallest ring."""
    rings = structure.rings_of[atom.index]
    symbol = atom.symbol.lower() if atom.aromatic else atom.symbol
    degree = len(structure.neighbours[atom.index])
    return f"{symbol}{degree}H{atom.hydrogens}{atom.charge:+d}r{rings[0] if rings else 0}"


def _grow(structure: Structure, radius: int) -> list[tuple[str, ...]]:
    now = [short_code(atom_invariant(structure, atom)) for atom in structure.atoms]
    grown: list[tuple[str, ...]] = [(code,) for code in now]
    for _ in range(radius):
        now = [short_code(now[i] + _shell(structure, i, now)) for i in range(len(now))]
        grown = [(*codes, now[i]) for i, codes in enumerate(grown)]
    return grown


def _shell(structure: Structure, atom: int, codes: list[str]) -> str:
    return "".join(
        sorted(
            ("a" if bond.aromatic else str(bond.order)) + codes[bond.other(atom)]
            for bond in structure.bonds_of[atom]
        )
    )


def short_code(text: str) -> str:
    """A short stable hash of a text, the same in every run and on every machine."""
    return blake2s(text.encode()).hexdigest()[:_DIGITS]
