"""Where the ligands of a saturated atom point when one looks along one of its bonds.

Angles are those of a Newman projection in degrees, clockwise. The four ligands of an atom come from
``stereo_units``; a carbon the source leaves open is read as one of its two configurations.
"""

from __future__ import annotations

from hoodside.molecule import Structure
from hoodside.molecule.stereo_units import Unit, stereo_units, twin_hydrogens
from hoodside.predict.coupling.model import Site

#: A ligand: an atom, a twin hydrogen (numbered on after the atoms) or ``~atom`` for an only hydrogen.
Point = int


class Shapes:
    """The tetrahedral atoms of a structure."""

    def __init__(self, structure: Structure) -> None:
        self.structure = structure
        self.twins = twin_hydrogens(structure)
        units = stereo_units(structure, self.twins)
        self._units: dict[int, Unit] = {u.centres[0]: u for u in units if len(u.centres) == 1}

    def is_open(self, atom: int) -> bool:
        """Whether the configuration of an atom with one hydrogen is left open (or it has none)."""
        return self._units[atom].parity is None if atom in self._units else False

    def point(self, site: Site) -> Point:
        """The ligand that a hydrogen is."""
        atom, place = site
        return self.twins[atom][place] if atom in self.twins else ~atom

    def angles(self, atom: int, partner: int, mirrored: bool = False) -> dict[Point, float]:
        """Angle of each ligand of ``atom`` but ``partner``, seen from outside, ``partner`` behind.

        ``mirrored`` turns an open centre into its other configuration. Three-fold rotors (CH3) and atoms
        without a shape give {}.
        """
        unit = self._units.get(atom)
        if unit is None or partner not in unit.ligands:
            return {}
        ligands = list(unit.ligands)
        odd = (unit.parity or 0) ^ mirrored
        place = ligands.index(partner)
        first, second, third = [p for p in ligands if p != partner]
        # Moving the partner to the front is an odd permutation from places 1 and 3.
        turned = odd ^ (place % 2)
        # Seen from the partner an even order runs clockwise, so from outside anticlockwise.
        step = 120.0 if turned else -120.0
        return {first: 0.0, second: step, third: -step}

    def faces(self, ring: tuple[int, ...]) -> dict[Point, int]:
        """+1 or -1 per ligand outside a ring: which face of the ring it is on."""
        found: dict[Point, int] = {}
        for k, atom in enumerate(ring):
            unit = self._units.get(atom)
            before, after = ring[k - 1], ring[(k + 1) % len(ring)]
            if unit is None or not {before, after} <= set(unit.ligands):
                continue
            outside = [p for p in unit.ligands if p not in (before, after)]
            odd = (unit.parity or 0) ^ _parity(unit.ligands, (before, after, *outside))
            found[outside[0]], found[outside[1]] = (-1, 1) if odd else (1, -1)
        return found


def _parity(a: tuple[int, ...], b: tuple[int, ...]) -> int:
    """0 when ``b`` is an even permutation of ``a``."""
    order = [a.index(x) for x in b]
    return sum(order[i] > order[k] for i in range(4) for k in range(i + 1, 4)) % 2
