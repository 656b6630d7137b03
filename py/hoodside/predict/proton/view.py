"""One structure with what every scheme needs to know of it, worked out once."""

from __future__ import annotations

from functools import cached_property

from hoodside.molecule import Structure
from hoodside.predict.proton.parents import Place, find_places
from hoodside.predict.proton.substituents import Substituent, SubstituentFinder


class View:
    """A structure seen by the schemes: its substituents, tabulated rings and kinds of atom."""

    def __init__(self, structure: Structure) -> None:
        self.structure = structure

    @cached_property
    def places(self) -> dict[int, Place]:
        """Per atom, its position in a tabulated ring."""
        return find_places(self.structure)

    @cached_property
    def finder(self) -> SubstituentFinder:
        """Substituents by carrier and anchor."""
        return SubstituentFinder(self.structure)

    def substituent(self, carrier: int, anchor: int) -> Substituent:
        """The substituent at ``anchor`` as seen from ``carrier``."""
        return self.finder.at(carrier, anchor)

    def is_saturated(self, atom: int) -> bool:
        """Whether an atom is a carbon with single bonds only."""
        return self.structure.atoms[atom].symbol == "C" and all(
            bond.order == 1 and not bond.aromatic for bond in self.structure.bonds_of[atom]
        )

    def alkene_partner(self, atom: int) -> int | None:
        """The other carbon of a C=C bond that is not aromatic."""
        for bond in self.structure.bonds_of[atom]:
            far = bond.other(atom)
            if bond.order == 2 and not bond.aromatic and self.structure.atoms[far].symbol == "C":
                return far
        return None

    def share_ring(self, a: int, b: int) -> bool:
        """Whether two atoms are members of one ring."""
        return any(a in ring and b in ring for ring in self.structure.rings)
