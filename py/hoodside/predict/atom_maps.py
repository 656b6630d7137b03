"""Reads the atom-map numbers of tabulated SMILES, and turns a tabulated ring into an open pattern."""

from __future__ import annotations

import re

# In SMILES every atom is a bracket or one of the organic-subset symbols, in the order of atom indices.
_ATOM = re.compile(r"\[[^\]]*\]|Br|Cl|[BCNOPSFIbcnops]")
_MAP = re.compile(r":(\d+)\]$")


def atom_maps(smiles: str) -> list[str]:
    """The map number of each atom in order ("" where none)."""
    return [found.group(1) if (found := _MAP.search(a)) else "" for a in _ATOM.findall(smiles)]


def open_pattern(smiles: str) -> str:
    """A tabulated parent ring as SMARTS in the same atom order, its hydrogens open to substitution."""
    return _ATOM.sub(lambda m: _open_atom(m.group(0)), smiles)


def _open_atom(token: str) -> str:
    bare = re.sub(r":\d+", "", token)
    if bare in ("c", "[c]", "[cH]"):
        return "c"
    if bare == "[nH]":
        return "[nX3+0]"
    return "[nX2]" if bare == "n" else bare
