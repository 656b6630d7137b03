"""Structures, and the seam to the molecule kernel (RDKit on CPython or as wasm in the browser)."""

from hoodside.molecule.structure import Atom, Bond, Structure, read_structure

__all__ = ["Atom", "Bond", "Structure", "read_structure"]
