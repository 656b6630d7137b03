"""Vicinal couplings across a bond between two saturated carbons."""

from __future__ import annotations

from math import fsum

from hoodside.molecule import Structure
from hoodside.predict.coupling import karplus
from hoodside.predict.coupling.conformers import BondShape, Conformers
from hoodside.predict.coupling.groups import GroupKind
from hoodside.predict.coupling.model import Estimate, Site
from hoodside.predict.coupling.shape import Point, Shapes

#: Standard deviations in Hz: rotation-averaged CH3, free chain, ring, configuration left open.
_SD_METHYL, _SD_CHAIN, _SD_RING, _SD_OPEN = 0.3, 1.0, 1.5, 2.5


class SaturatedBonds:
    """Works out 3J(HH) over C-C single bonds by conformer averaging."""

    def __init__(self, structure: Structure, shapes: Shapes) -> None:
        self.structure = structure
        self.shapes = shapes
        self.conformers = Conformers(structure, shapes)
        self._seen: dict[tuple[int, int, bool], BondShape | None] = {}

    def estimate(self, a: Site, b: Site) -> Estimate | None:
        """3J of two H on neighbouring saturated carbons; None when their shape is not known."""
        for methyl, other in ((a[0], b[0]), (b[0], a[0])):
            if self.structure.atoms[methyl].hydrogens == 3:
                return self._methyl(methyl, other)
        first = self._over_bond(a, b, mirrored=False)
        if first is None or not self._is_open(a[0], b[0]):
            return first
        second = self._over_bond(a, b, mirrored=True)
        if second is None:
            return first
        return Estimate((first.hz + second.hz) / 2, _SD_OPEN, first.label, first.source)

    def _is_open(self, a: int, b: int) -> bool:
        return all(x not in self.shapes.twins for x in (a, b)) and (
            self.shapes.is_open(a) or self.shapes.is_open(b)
        )

    def _methyl(self, methyl: int, carbon: int) -> Estimate:
        others = [n for n in self.structure.neighbours[carbon] if n != methyl]
        first, second, *_ = [*map(self._electronegativity, others), 0.0, 0.0]
        source = karplus.relation("rotation-averaged CH3").source
        return Estimate(karplus.methyl(first, second), _SD_METHYL, "CH3, rotation averaged", source)

    def _electronegativity(self, atom: Point) -> float:
        kind: GroupKind | None = self.conformers.kinds.get(atom)
        return kind.electronegativity if kind else 0.0

    def _shape(self, a: int, b: int, mirrored: bool) -> BondShape | None:
        key = (a, b, mirrored)
        if key not in self._seen:
            self._seen[key] = self.conformers.bond(a, b, mirrored)
        return self._seen[key]

    def _over_bond(self, a: Site, b: Site, mirrored: bool) -> Estimate | None:
        shape = self._shape(a[0], b[0], mirrored)
        if shape is None:
            return None
        here, there = self.shapes.point(a), self.shapes.point(b)
        substituents = [
            *self._signed(shape.front, here, 1),
            *self._signed(shape.rear, there, -1),
        ]
        between = shape.rear[there] - shape.front[here]
        hz = fsum(t.weight * karplus.vicinal(t.degrees + between, substituents) for t in shape.torsions)
        label = f"vicinal, {shape.ring}-membered ring" if shape.ring else "vicinal, staggered rotamers"
        return Estimate(hz, _SD_RING if shape.ring else _SD_CHAIN, label, karplus.SOURCE)

    def _signed(self, angles: dict[Point, float], hydrogen: Point, view: int) -> list[tuple[float, int]]:
        zero = angles[hydrogen]
        found = []
        for point, angle in angles.items():
            strength = self._electronegativity(point)
            if point != hydrogen and strength:
                clockwise = (angle - zero) % 360.0 < 180.0
                found.append((strength, view if clockwise else -view))
        return found
