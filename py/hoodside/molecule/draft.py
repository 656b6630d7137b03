"""A structure opened for change: atoms and bonds that can be added, removed and turned over.

Stereo marks follow RDKit's rule: "cw" or "ccw" for the bonds of an atom in the order listed, a hydrogen
folded into the atom coming last. Operations that swap a ligand keep its place in that order, so that marks
keep their meaning.
"""

from __future__ import annotations

import json
from typing import Any, Literal

from hoodside.errors import StructureError
from hoodside.molecule.elements import SYMBOLS
from hoodside.molecule.kernel import kernel
from hoodside.molecule.structure import Structure, read_structure

Mark = Literal["", "cw", "ccw"]
_DEFAULTS = {
    "atom": {"z": 6, "impHs": 0, "chg": 0, "nRad": 0, "isotope": 0, "stereo": "unspecified"},
    "bond": {"bo": 1, "stereo": "unspecified"},
}


class Draft:
    """Mutable copy of a structure's graph. Atom numbers stay valid until ``finish``."""

    def __init__(self, structure: Structure) -> None:
        self._atoms: dict[int, dict[str, Any]] = {
            a.index: {
                "z": a.z,
                "impHs": a.hydrogens,
                "chg": a.charge,
                "nRad": a.radicals,
                "isotope": a.isotope,
                "stereo": a.stereo or "unspecified",
            }
            for a in structure.atoms
        }
        self._bonds: list[dict[str, Any]] = [
            {"a": b.a, "b": b.b, "bo": b.order, "stereo": b.stereo, "stereoAtoms": list(b.stereo_atoms)}
            for b in structure.bonds
        ]

    def add_atom(self, symbol: str, hydrogens: int = 0, charge: int = 0) -> int:
        """A new atom, not yet bonded; its number."""
        number = max(self._atoms, default=-1) + 1
        self._atoms[number] = {
            **_DEFAULTS["atom"],
            "z": SYMBOLS.index(symbol),
            "impHs": hydrogens,
            "chg": charge,
        }
        return number

    def add_copy(self, structure: Structure) -> dict[int, int]:
        """Put a whole other structure in; its atom numbers -> the new ones."""
        first = max(self._atoms, default=-1) + 1
        other = Draft(structure)
        renumbered = {old: first + old for old in other._atoms}
        self._atoms |= {renumbered[i]: atom for i, atom in other._atoms.items()}
        for bond in other._bonds:
            places = [renumbered[i] for i in bond["stereoAtoms"]]
            self._bonds.append(
                {**bond, "a": renumbered[bond["a"]], "b": renumbered[bond["b"]], "stereoAtoms": places}
            )
        return renumbered

    def add_bond(self, a: int, b: int, order: int = 1) -> None:
        """Join two atoms; each gives up ``order`` of its hydrogens.

        Raises: StructureError when an atom has not that many hydrogens to give.
        """
        for atom in (a, b):
            self.change_hydrogens(atom, -order)
        self._bonds.append({"a": a, "b": b, "bo": order, "stereo": "", "stereoAtoms": []})

    def cut_bond(self, a: int, b: int, fill: bool = True) -> None:
        """Part two atoms; the freed valences are filled with hydrogen unless ``fill`` is off."""
        bond = self._bond(a, b)
        for centre, lost in ((a, b), (b, a)):
            self._move_last(centre, lost)
        self._bonds.remove(bond)
        self._forget_stereo_at(a, b)
        if fill:
            for atom in (a, b):
                self.change_hydrogens(atom, bond["bo"])

    def set_order(self, a: int, b: int, order: int) -> None:
        """Change a bond's order; hydrogens make up the difference. The bond loses its E/Z mark."""
        bond = self._bond(a, b)
        change = bond["bo"] - order
        bond.update(bo=order, stereo="", stereoAtoms=[])
        for atom in (a, b):
            self.change_hydrogens(atom, change)

    def swap_ligand(self, centre: int, old: int, new: int, invert: bool = False) -> None:
        """Put ``new`` (an unbonded valence of it) where ``old`` stood on ``centre``; ``old`` gains an H."""
        bond = self._bond(centre, old)
        order = bond["bo"]
        bond["a" if bond["a"] == old else "b"] = new
        self.change_hydrogens(old, order)
        self.change_hydrogens(new, -order)
        if invert:
            self.turn_over(centre)

    def change_hydrogens(self, atom: int, by: int) -> None:
        """Add or take hydrogens. Raises: StructureError when there are too few."""
        have = self._atoms[atom]["impHs"] + by
        if have < 0:
            symbol = SYMBOLS[self._atoms[atom]["z"]]
            raise StructureError(
                f"{symbol} (atom {atom}) has no hydrogen left to replace.",
                hint="Free a valence first.",
                value=atom,
            )
        self._atoms[atom]["impHs"] = have

    def set_element(self, atom: int, symbol: str, hydrogens: int) -> None:
        """Make an atom another element, uncharged and without isotope label."""
        self._atoms[atom].update(z=SYMBOLS.index(symbol), impHs=hydrogens, chg=0, nRad=0, isotope=0)

    def set_double_bond_mark(self, a: int, b: int, mark: str, beside: tuple[int, int]) -> None:
        """Mark a double bond "cis" or "trans" ("" to leave it open) for one neighbour of each end."""
        self._bond(a, b).update(stereo=mark, stereoAtoms=list(beside) if mark else [])

    def set_charge(self, atom: int, charge: int) -> None:
        """Set the formal charge; hydrogens are left as they are."""
        self._atoms[atom]["chg"] = charge

    def set_isotope(self, atom: int, mass: int) -> None:
        """Set the mass number (0: natural)."""
        self._atoms[atom]["isotope"] = mass

    def mark(self, atom: int) -> Mark:
        """The stereo mark of an atom."""
        stereo = self._atoms[atom]["stereo"]
        return "" if stereo == "unspecified" else stereo

    def set_mark(self, atom: int, mark: Mark) -> None:
        """Set or clear ("") the stereo mark of an atom, by the present order of its bonds."""
        self._atoms[atom]["stereo"] = mark or "unspecified"

    def turn_over(self, atom: int) -> None:
        """Invert a stereocentre; an unmarked one stays unmarked."""
        turned: dict[Mark, Mark] = {"cw": "ccw", "ccw": "cw", "": ""}
        self.set_mark(atom, turned[self.mark(atom)])

    def ligands(self, atom: int) -> list[int]:
        """Neighbours in the order of their bonds."""
        return [b["b"] if b["a"] == atom else b["a"] for b in self._bonds if atom in (b["a"], b["b"])]

    def hydrogens(self, atom: int) -> int:
        """Hydrogens folded into an atom."""
        return int(self._atoms[atom]["impHs"])

    def remove_atom(self, atom: int) -> None:
        """Take an atom out; its neighbours gain hydrogens."""
        for near in self.ligands(atom):
            self.cut_bond(atom, near)
        del self._atoms[atom]

    def source(self) -> str:
        """The draft as an RDKit JSON graph."""
        place = {number: i for i, number in enumerate(self._atoms)}
        bonds = []
        for bond in self._bonds:
            entry: dict[str, Any] = {"bo": bond["bo"], "atoms": [place[bond["a"]], place[bond["b"]]]}
            if bond["stereo"]:
                entry |= {"stereo": bond["stereo"], "stereoAtoms": [place[i] for i in bond["stereoAtoms"]]}
            bonds.append(entry)
        molecule = {"atoms": list(self._atoms.values()), "bonds": bonds}
        return json.dumps({"rdkitjson": {"version": 12}, "defaults": _DEFAULTS, "molecules": [molecule]})

    def finish(self) -> Structure:
        """The structure drafted, freshly perceived. Raises: StructureError when it is impossible."""
        return read_structure(kernel().smiles(self.source()))

    def keep_order(self) -> Structure:
        """The structure drafted, its atoms numbered as in the draft. Raises: StructureError as ``finish``.

        By way of a CTfile, which keeps the order and has aromaticity perceived afresh.
        """
        return read_structure(kernel().molblock(self.source()))

    def _bond(self, a: int, b: int) -> dict[str, Any]:
        for bond in self._bonds:
            if {bond["a"], bond["b"]} == {a, b}:
                return bond
        raise StructureError(
            f"Atoms {a} and {b} are not bonded.", hint="Name two bonded atoms.", value=(a, b)
        )

    def _move_last(self, centre: int, ligand: int) -> None:
        """Re-express a mark for the ligand, or whatever takes its place, standing last."""
        order = self.ligands(centre)
        if (len(order) - 1 - order.index(ligand)) % 2:
            self.turn_over(centre)

    def _forget_stereo_at(self, a: int, b: int) -> None:
        for bond in self._bonds:
            ends = {bond["a"], bond["b"]}
            if ends & {a, b} and set(bond["stereoAtoms"]) & {a, b}:
                bond.update(stereo="", stereoAtoms=[])
