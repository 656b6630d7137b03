"""Conformer populations: ring templates and staggered rotamers, with the torsion about each bond.

Ring shapes are ideal templates (chair, half-chair, envelope, pseudorotation of five-membered rings after
Altona and Sundaralingam, J. Am. Chem. Soc. 1972, 94, 8205), weighted by axial and gauche energies.
"""

from __future__ import annotations

from dataclasses import dataclass
from functools import cache
from math import cos, exp, fsum, radians

from hoodside.molecule import Structure
from hoodside.predict.coupling.groups import GroupKind, gauche_energy, kinds_of_atoms
from hoodside.predict.coupling.shape import Point, Shapes

#: RT at 298 K, kcal/mol.
_RT = 0.593
#: Pseudorotation amplitude of a saturated five-membered ring, degrees, and number of phases sampled.
_PUCKER, _PHASES = 38.0, 10
#: Ring torsions in degrees from the first planar bond on, one of two mirror forms.
_TEMPLATES: dict[tuple[int, tuple[int, ...]], tuple[float, ...]] = {
    (3, ()): (0, 0, 0),
    (4, ()): (20, -20, 20, -20),
    (4, (0,)): (0, 0, 0, 0),
    (5, (0,)): (0, 15, -24, 24, -15),
    (5, (0, 1)): (0, 0, 10, -15, 10),
    (5, (0, 2)): (0, 5, 0, -8, 8),
    (6, ()): (56, -56, 56, -56, 56, -56),
    (6, (0,)): (0, -15, 45, -62, 45, -15),
    (6, (0, 1)): (0, 0, -25, 50, -50, 25),
    (6, (0, 2)): (0, 12, 0, -30, 45, -30),
    (6, (0, 3)): (0, 15, -15, 0, 15, -15),
    (7, ()): (75, -40, -40, 75, -70, 60, -70),
    (7, (0,)): (0, 65, -80, 60, -60, 80, -65),
    (8, ()): (65, -100, 65, 45, -65, 100, -65, -45),
}
#: kcal/mol: two groups syn-diaxial; axial O next to the ring oxygen; an impossible ring fusion.
_SYN_DIAXIAL, _ANOMERIC, _IMPOSSIBLE = 1.9, -1.4, 20.0
#: Degrees of ring torsion above which axial and equatorial differ.
_PUCKERED = 30.0
#: Degrees within which two groups count as gauche.
_GAUCHE = 90.0
#: Largest ring a pair of trans-diaxial bonds cannot close.
_FUSED = 8


@dataclass(frozen=True, slots=True)
class Torsion:
    """One conformer of a bond: population and dihedral angle of the reference ligands, degrees."""

    weight: float
    degrees: float


@dataclass(frozen=True, slots=True)
class BondShape:
    """A bond seen along its length: angle of each ligand in front and behind (same view), torsions."""

    front: dict[Point, float]
    rear: dict[Point, float]
    torsions: tuple[Torsion, ...]
    ring: int  # size of the ring that fixes it, 0 for a free rotor


class Conformers:
    """Shapes of the single bonds of one structure."""

    def __init__(self, structure: Structure, shapes: Shapes) -> None:
        self.structure = structure
        self.shapes = shapes
        self.kinds = kinds_of_atoms(structure)
        self._rings: dict[int, tuple[tuple[float, tuple[float, ...]], ...]] = {}

    def bond(self, a: int, b: int, mirrored: bool = False) -> BondShape | None:
        """The bond from ``a`` (front) to ``b``; None when an end has no tetrahedral shape.

        ``mirrored`` reads ``b`` in its other configuration.
        """
        front = self.shapes.angles(a, b)
        rear = {p: -angle for p, angle in self.shapes.angles(b, a, mirrored).items()}
        if not front or not rear:
            return None
        ring = self._smallest_ring(a, b)
        if ring is None:
            return BondShape(front, rear, self._rotor(front, rear), 0)
        return self._in_ring(front, rear, ring, a, b)

    def _smallest_ring(self, a: int, b: int) -> int | None:
        rings = self.structure.rings
        found = [k for k, ring in enumerate(rings) if a in ring and b in ring and len(ring) <= _FUSED]
        return min(found, key=lambda k: len(rings[k]), default=None)

    def _rotor(self, front: dict[Point, float], rear: dict[Point, float]) -> tuple[Torsion, ...]:
        energies = [self._gauche(front, rear, degrees) for degrees in (60.0, 180.0, 300.0)]
        weights = _boltzmann(energies)
        return tuple(Torsion(w, d) for w, d in zip(weights, (60.0, 180.0, 300.0), strict=True))

    def _gauche(self, front: dict[Point, float], rear: dict[Point, float], degrees: float) -> float:
        return fsum(
            gauche_energy(self.kinds[p].bulk, self.kinds[q].bulk)
            for p, at in front.items()
            for q, behind in rear.items()
            if p in self.kinds and q in self.kinds and abs(_wrapped(degrees + behind - at)) < _GAUCHE
        )

    def _in_ring(
        self, front: dict[Point, float], rear: dict[Point, float], index: int, a: int, b: int
    ) -> BondShape:
        ring = self.structure.rings[index]
        k, m = ring.index(a), ring.index(b)
        step = 1 if ring[(k + 1) % len(ring)] == b else -1
        before, after = ring[(k - step) % len(ring)], ring[(m + step) % len(ring)]
        bond = k if step == 1 else m
        torsions = tuple(Torsion(w, angles[bond]) for w, angles in self._ring(index))
        return BondShape(_from(front, before), _from(rear, after), torsions, len(ring))

    def _ring(self, index: int) -> tuple[tuple[float, tuple[float, ...]], ...]:
        """(population, torsion about the bond after each ring atom) of every conformer of a ring."""
        if index not in self._rings:
            ring = self.structure.rings[index]
            candidates = ring_torsions(len(ring), self._planar_bonds(ring))
            weights = _boltzmann([self._strain(ring, angles) for angles in candidates])
            self._rings[index] = tuple(zip(weights, candidates, strict=True))
        return self._rings[index]

    def _planar_bonds(self, ring: tuple[int, ...]) -> tuple[int, ...]:
        pairs = [(ring[k], ring[(k + 1) % len(ring)]) for k in range(len(ring))]
        return tuple(k for k, (a, b) in enumerate(pairs) if self._is_planar(a, b, len(ring)))

    def _is_planar(self, a: int, b: int, size: int) -> bool:
        bond = self.structure.bond_between(a, b)
        if bond is None:
            return False
        if bond.order == 2 or bond.aromatic:
            return True
        if size > 3 and any(len(r) == 3 and a in r and b in r for r in self.structure.rings):
            return True
        return self._is_amide(a, b) or self._is_amide(b, a)

    def _is_amide(self, carbon: int, hetero: int) -> bool:
        atoms = self.structure.atoms
        if atoms[carbon].symbol != "C" or atoms[hetero].symbol not in ("N", "O"):
            return False
        return any(
            b.order == 2 and atoms[b.other(carbon)].symbol == "O" for b in self.structure.bonds_of[carbon]
        )

    def _strain(self, ring: tuple[int, ...], angles: tuple[float, ...]) -> float:
        if len(ring) != 6:
            return 0.0
        axial: list[list[tuple[Point, float]]] = []
        total = 0.0
        for k, atom in enumerate(ring):
            here = self._axial_groups(ring, k, angles)
            axial.append(here)
            total += fsum(self._axial_cost(ring, atom, point) for point, _ in here)
        for k in range(len(ring)):
            total += _SYN_DIAXIAL * sum(
                1 for _, s in axial[k] for _, t in axial[(k + 2) % len(ring)] if s * t > 0
            )
            total += self._fusion(axial[k], axial[(k + 1) % len(ring)])
            total += self._neighbours(ring, k, angles[k])
        return total

    def _axial_groups(
        self, ring: tuple[int, ...], k: int, angles: tuple[float, ...]
    ) -> list[tuple[Point, float]]:
        """Groups on ring atom ``k`` that stand axial, with the sign of their side."""
        after = ring[(k + 1) % len(ring)]
        if min(abs(angles[k]), abs(angles[k - 1])) < _PUCKERED:
            return []
        seen = _from(self.shapes.angles(ring[k], after), ring[k - 1])
        return [
            (p, 1.0 if angle > 0 else -1.0)
            for p, angle in seen.items()
            if p in self.kinds and p != ring[k - 1] and abs(_wrapped(angles[k] - angle)) < _GAUCHE
        ]

    def _axial_cost(self, ring: tuple[int, ...], atom: int, point: Point) -> float:
        kind: GroupKind = self.kinds[point]
        atoms = self.structure.atoms
        beside = [n for n in self.structure.neighbours[atom] if n in ring]
        if kind.bulk in ("O", "X") and any(atoms[n].symbol == "O" for n in beside):
            return kind.a_value + _ANOMERIC
        return kind.a_value

    def _fusion(self, here: list[tuple[Point, float]], there: list[tuple[Point, float]]) -> float:
        for p, _ in here:
            for q, _ in there:
                if any(p in r and q in r and len(r) <= _FUSED for r in self.structure.rings) or p == q:
                    return _IMPOSSIBLE
        return 0.0

    def _neighbours(self, ring: tuple[int, ...], k: int, degrees: float) -> float:
        a, b = ring[k], ring[(k + 1) % len(ring)]
        front = _from(self.shapes.angles(a, b), ring[k - 1])
        rear = {p: -t for p, t in _from(self.shapes.angles(b, a), ring[(k + 2) % len(ring)]).items()}
        front.pop(ring[k - 1], None)
        rear.pop(ring[(k + 2) % len(ring)], None)
        return self._gauche(front, rear, degrees)


def _from(angles: dict[Point, float], reference: Point) -> dict[Point, float]:
    zero = angles.get(reference, 0.0)
    return {p: _wrapped(angle - zero) for p, angle in angles.items()}


def _wrapped(angle: float) -> float:
    """The same angle between -180 and 180 degrees."""
    return (angle + 180.0) % 360.0 - 180.0


def _boltzmann(energies: list[float]) -> list[float]:
    low = min(energies)
    weights = [exp(-(e - low) / _RT) for e in energies]
    total = fsum(weights)
    return [w / total for w in weights]


@cache
def ring_torsions(size: int, planar: tuple[int, ...]) -> tuple[tuple[float, ...], ...]:
    """Ring torsions in degrees of every template conformer, in the order of the ring's bonds.

    ``planar``: places of the bonds that keep their torsion near zero.
    """
    if size == 5 and not planar:
        phases = [360.0 * k / _PHASES for k in range(_PHASES)]
        return tuple(tuple(_PUCKER * cos(radians(p + 144.0 * k)) for k in range(5)) for p in phases)
    for start in planar or (0,):
        turned = tuple(sorted((p - start) % size for p in planar))
        template = _TEMPLATES.get((size, turned))
        if template is not None:
            places = [(k - start) % size for k in range(size)]
            one = tuple(template[p] for p in places)
            return one, tuple(-t for t in one)
    flat = tuple(0.0 if k in planar else 15.0 * (-1) ** k for k in range(size))
    return flat, tuple(-t for t in flat)
