"""Which groups stand cis and which trans to a hydrogen across a double bond."""

from __future__ import annotations

from hoodside.molecule import Bond, Structure

#: Largest ring whose double bonds can only be cis.
_CIS_RING = 7


def across(structure: Structure, atom: int, far: int, slot: int) -> dict[int, str]:
    """Ligands of ``far`` -> "cis", "trans" or "" (not known) to the H on ``atom``.

    Of two H on ``atom``, slot 0 is cis to the first ligand of ``far`` (as in ``hydrogen_sets``).
    """
    ligands = [n for n in structure.neighbours[far] if n != atom]
    bond = structure.bond_between(atom, far)
    if bond is None or not ligands:
        return {}
    if structure.atoms[atom].hydrogens == 2:
        first = "trans" if slot else "cis"
        return dict(zip(ligands, (first, _other(first)), strict=False))
    return _by_mark(structure, bond, atom, ligands)


def _by_mark(structure: Structure, bond: Bond, atom: int, ligands: list[int]) -> dict[int, str]:
    own = [n for n in structure.neighbours[atom] if n not in (bond.a, bond.b)]
    marked = _cis_pair(structure, bond)
    if not own or not marked:
        return dict.fromkeys(ligands, "")
    near, far = marked if marked[0] in own else marked[::-1]
    # The H is on the other side of whatever else its carbon carries.
    side = "cis" if bond.stereo == "trans" else "trans"
    if near not in own:
        side = _other(side)
    return {n: side if n == far else _other(side) for n in ligands}


def _cis_pair(structure: Structure, bond: Bond) -> tuple[int, ...]:
    if bond.stereo:
        return bond.stereo_atoms
    for ring in structure.rings:
        if len(ring) <= _CIS_RING and bond.a in ring and bond.b in ring:
            near = next(n for n in structure.neighbours[bond.a] if n in ring and n != bond.b)
            return near, next(n for n in structure.neighbours[bond.b] if n in ring and n != bond.a)
    return ()


def _other(side: str) -> str:
    return "trans" if side == "cis" else "cis"
