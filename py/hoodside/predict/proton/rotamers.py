"""Groups that slow rotation keeps apart at room temperature though constitution makes them alike."""

from __future__ import annotations

from dataclasses import replace

from hoodside.molecule import Structure
from hoodside.molecule.symmetry import HydrogenSet

#: N,N-dimethyl amides and thioamides (barrier near 80 kJ/mol); carbamates and ureas turn fast.
_DIMETHYL_AMIDE = "[CH3][NX3;+0]([CH3])[CX3;!$(C(=O)[O,N;!$(N([CH3])[CH3])]);!$(C(N)(=O)N)]=[O,S]"


def split_rotamers(
    structure: Structure, sets: tuple[HydrogenSet, ...]
) -> list[tuple[HydrogenSet, int | None]]:
    """The sets, each pair of methyls of a dimethyl amide as two; with 0 or 1 for the two halves, else None.

    Source: Gottlieb, Kotlyar & Nudelman, J. Org. Chem. 1997, 62, 7512 (two methyl signals of DMF and DMA).
    """
    pairs = [(match[0], match[2]) for match in structure.matches(_DIMETHYL_AMIDE)]
    first, second = {a for a, _ in pairs}, {b for _, b in pairs}
    found: list[tuple[HydrogenSet, int | None]] = []
    for one in sets:
        here = [tuple(a for a in one.atoms if a in side) for side in (first, second)]
        if here[0] and len(here[0]) == len(here[1]) and len(here[0]) * 2 == len(one.atoms):
            found += [(replace(one, atoms=atoms, n=one.n // 2), k) for k, atoms in enumerate(here)]
        else:
            found.append((one, None))
    return found
