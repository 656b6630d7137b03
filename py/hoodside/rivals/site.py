"""A structure laid open for isomer moves: its graph, its distances, its pattern matches."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property

from hoodside.molecule.kernel import Matches, kernel
from hoodside.molecule.structure import Structure, read_structure
from hoodside.molecule.symmetry import constitutional_classes
from hoodside.rivals.graph import Graph, graph_of

#: Two molecules of a salt or a mixture lie this far apart.
APART = 99


@dataclass
class Site:
    """What the moves ask of the structure they start from."""

    structure: Structure

    @cached_property
    def graph(self) -> Graph:
        """The structure as a bare graph."""
        return graph_of(self.structure)

    @cached_property
    def distances(self) -> list[list[int]]:
        """Bonds between any two atoms."""
        size = range(len(self.structure.atoms))
        return [[d if d >= 0 else APART for d in self.structure.distances_from(i)] for i in size]

    @cached_property
    def aromatic_systems(self) -> list[int]:
        """Per atom, a number shared by the atoms of one fused aromatic system; -1 elsewhere."""
        atoms = self.structure.atoms
        found = [-1] * len(atoms)
        rings = [set(ring) for ring in self.structure.rings if all(atoms[i].aromatic for i in ring)]
        while rings:
            system = rings.pop(0)
            while joined := [ring for ring in rings if ring & system]:
                system = system.union(*joined)
                rings = [ring for ring in rings if ring not in joined]
            for atom in system:
                found[atom] = min(system)
        return found

    @cached_property
    def aromatic_bonds(self) -> frozenset[frozenset[int]]:
        """Ends of the bonds of aromatic rings."""
        return frozenset(frozenset((b.a, b.b)) for b in self.structure.bonds if b.aromatic)

    def match_all(self, patterns: tuple[str, ...]) -> dict[str, Matches]:
        """Every match of every pattern, both ways round."""
        found = kernel().matches(self.structure.source, patterns, unique=False)
        return dict(zip(patterns, found, strict=True))

    def piece(self, group: int, old: int) -> frozenset[int]:
        """Atoms that go with ``group`` when its bond to ``old`` is cut (empty in a ring)."""
        key = (group, old)
        if key not in self._pieces:
            found = self.graph.piece(group, old)
            # A second way round to ``old`` means that the bond closes a ring.
            rejoined = any(near in found for near in self.graph.bonds[old] if near != group)
            self._pieces[key] = frozenset() if rejoined else frozenset(found)
        return self._pieces[key]

    @cached_property
    def _pieces(self) -> dict[tuple[int, int], frozenset[int]]:
        return {}

    def kind_of(self, atoms: tuple[int, ...]) -> tuple[int, ...]:
        """What atoms look like: their classes and mutual distances, alike for atoms alike by symmetry."""
        classes, distances = self._classes, self.distances
        if len(set(classes)) == len(classes):
            return atoms
        apart = [distances[a][b] for i, a in enumerate(atoms) for b in atoms[:i] if a >= 0 and b >= 0]
        return (*(classes[a] if a >= 0 else -1 for a in atoms), *apart)

    @cached_property
    def _classes(self) -> tuple[int, ...]:
        return constitutional_classes(self.structure)

    def distance(self, some: tuple[int, ...], others: tuple[int, ...]) -> int:
        """Least number of bonds between two sets of atoms."""
        return min(self.distances[a][b] for a in some for b in others)


def site_of(smiles: str) -> Site:
    """The site of a structure given as SMILES."""
    return Site(read_structure(smiles))
