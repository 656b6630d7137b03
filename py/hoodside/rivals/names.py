"""One name per rival: canonical SMILES, mirror images as one, since NMR cannot tell them."""

from __future__ import annotations

import re

from hoodside.molecule.kernel import kernel

_CENTRE = re.compile(r"@+")
_MOBILE = re.compile(r"\[nH\]|=N|N=")
_MARKED_ATOM = re.compile(r"\[C@{1,2}(H?)\]")


def name_of(smiles: str) -> str:
    """The name of a structure. Raises: StructureError when it is impossible."""
    found = kernel().smiles(smiles)
    centres = len(_CENTRE.findall(found))
    if not centres:
        return found
    if centres == 1:  # a lone centre has only a mirror image to be told from
        return kernel().smiles(unmarked(found))
    return min(found, kernel().smiles(mirrored(found)))


def tautomer_key(name: str) -> str:
    """The same text for forms that differ in the place of a mobile hydrogen; "" where there is none to move.

    Mobile hydrogens as standard InChI takes them (IUPAC InChI Trust, technical manual).
    """
    return kernel().inchikey(name) if _MOBILE.search(name) else ""


def mirrored(smiles: str) -> str:
    """Every tetrahedral mark turned over."""
    return _CENTRE.sub(lambda found: "@" if found.group() == "@@" else "@@", smiles)


def unmarked(smiles: str) -> str:
    """Without tetrahedral marks; double-bond marks stay."""
    return _CENTRE.sub("", _MARKED_ATOM.sub("C", smiles))


def flat(smiles: str) -> str:
    """The constitution alone, as canonical SMILES."""
    return kernel().smiles(re.sub(r"[/\\]", "", unmarked(smiles)))
