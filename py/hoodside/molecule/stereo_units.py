"""Stereogenic and prostereogenic units: whatever an exchange of atoms can turn over.

A unit lists four ligands whose order, up to even permutations, is its orientation. Three kinds share
this one rule: the tetrahedral atom, the allene-like axis (both turned over by a mirror) and the planar
double bond (left alone by a mirror). See G. P. Moss, Basic terminology of stereochemistry (IUPAC
Recommendations 1996), Pure Appl. Chem. 1996, 68, 2193.
"""

from __future__ import annotations

from dataclasses import dataclass

from hoodside.molecule.structure import Bond, Structure

_FOUR_LIGANDS = frozenset({5, 6, 7, 14, 15, 16, 32, 33, 34, 50})
_STABLE_PYRAMIDS = frozenset({15, 16, 33, 34})  # P, S, As, Se keep their shape; an amine does not
_CARBON_LIKE = frozenset({6, 14, 32})
#: Ends of a double bond, as (element, hydrogens), whose second ligand is their H or lone pair.
_ONE_MORE = frozenset({(6, 1), (7, 0)})
#: Largest ring whose double bonds can only be cis.
_CIS_RING = 7


@dataclass(frozen=True, slots=True)
class Unit:
    """One unit over points (atoms, then separate H of CH2 groups).

    Attributes:
        centres: the atom, or the two ends of the axis or double bond (ascending).
        ligands: four points; ``~atom`` stands for that atom's lone pair or only hydrogen.
        parity: 0 or 1 when the orientation is known, None when the source leaves it open.
        mirrored: True when a mirror turns the unit over.
    """

    centres: tuple[int, ...]
    ligands: tuple[int, ...]
    parity: int | None
    mirrored: bool

    @property
    def points(self) -> tuple[int, ...]:
        """Every true point the unit is made of."""
        return (*self.centres, *(p for p in self.ligands if p >= 0))


def twin_hydrogens(structure: Structure) -> dict[int, tuple[int, int]]:
    """CH2 carriers (sp3, and =CH2 ends) -> two points for their H, numbered on after the atoms."""
    carriers = [
        atom.index
        for atom in structure.atoms
        if atom.z in _CARBON_LIKE and atom.hydrogens == 2 and len(structure.neighbours[atom.index]) in (1, 2)
    ]
    first = len(structure.atoms)
    return {atom: (first + 2 * k, first + 2 * k + 1) for k, atom in enumerate(carriers)}


def stereo_units(structure: Structure, twins: dict[int, tuple[int, int]]) -> list[Unit]:
    """All units of a structure."""
    units = [_tetrahedron(structure, twins, i) for i in range(len(structure.atoms))]
    units += [_double_bond(structure, twins, bond) for bond in structure.bonds]
    return [unit for unit in units if unit is not None]


def _tetrahedron(structure: Structure, twins: dict[int, tuple[int, int]], centre: int) -> Unit | None:
    atom = structure.atoms[centre]
    ligands = structure.neighbours[centre]
    free = twins.get(centre, ())
    missing = 4 - len(ligands) - len(free)
    if missing not in (0, 1) or not _keeps_shape(structure, centre):
        return None
    parity = {"cw": 0, "ccw": 1}.get(atom.stereo, 0 if free else None)
    return Unit((centre,), (*ligands, *free, *([~centre] * missing)), parity, True)


def _keeps_shape(structure: Structure, centre: int) -> bool:
    atom = structure.atoms[centre]
    degree = len(structure.neighbours[centre])
    if degree + atom.hydrogens == 4:
        return (
            atom.z in _FOUR_LIGANDS
            and not (atom.z == 7 and atom.hydrogens)
            and not _is_acid(structure, centre)
        )
    if degree != 3 or atom.hydrogens:
        return False
    return atom.z in _STABLE_PYRAMIDS or (atom.z == 7 and _is_bridgehead(structure, centre))


def _is_acid(structure: Structure, centre: int) -> bool:
    """P(=O)OH: the proton hops between the oxygens faster than NMR sees."""
    if structure.atoms[centre].z != 15:
        return False
    oxygens = [structure.atoms[i] for i in structure.neighbours[centre] if structure.atoms[i].z == 8]
    return any(o.hydrogens for o in oxygens) and any(len(structure.bonds_of[o.index]) == 1 for o in oxygens)


def _is_bridgehead(structure: Structure, atom: int) -> bool:
    """An atom whose rings share more than one bond there, so that it cannot invert."""
    rings = [set(ring) for ring in structure.rings if atom in ring]
    return any(len(a & b) > 2 for k, a in enumerate(rings) for b in rings[:k])


def _double_bond(structure: Structure, twins: dict[int, tuple[int, int]], bond: Bond) -> Unit | None:
    """The unit of a double bond or, once per run of cumulated ones, of the whole run."""
    if bond.order != 2 or bond.aromatic:
        return None
    run = _cumulated(structure, bond)
    if not run or min(run) != bond.index:
        return None
    left, right = _ends(structure, run)
    pairs = [_end_ligands(structure, twins, end, run) for end in (left, right)]
    if any(len(pair) != 2 for pair in pairs) or _is_amidine(structure, left, right):
        return None
    if len(run) % 2 == 0:
        known = 0 if left in twins or right in twins else None
        return Unit((left, right), (*pairs[0], *pairs[1]), known, True)
    marks = _cis_pair(structure, bond) if len(run) == 1 else ()
    return _planar(twins, bond, marks, (left, right), pairs)


def _planar(
    twins: dict[int, tuple[int, int]],
    bond: Bond,
    marks: tuple[int, ...],
    ends: tuple[int, int],
    pairs: list[list[int]],
) -> Unit:
    parity: int | None = 0 if any(end in twins for end in ends) else None
    if marks:
        near = marks[0] if marks[0] in pairs[0] else marks[1]
        far = marks[1] if near == marks[0] else marks[0]
        parity = (pairs[0][0] != near) ^ (pairs[1][0] != far) ^ (bond.stereo == "trans")
    return Unit(ends, (*pairs[0], *pairs[1]), parity, False)


def _cis_pair(structure: Structure, bond: Bond) -> tuple[int, ...]:
    """The neighbours that ``bond.stereo`` speaks of; in a small ring, the ring atoms (always cis)."""
    if bond.stereo:
        return bond.stereo_atoms
    for ring in structure.rings:
        if len(ring) <= _CIS_RING and bond.a in ring and bond.b in ring:
            near = next(i for i in structure.neighbours[bond.a] if i in ring and i != bond.b)
            return near, next(i for i in structure.neighbours[bond.b] if i in ring and i != bond.a)
    return ()


def _cumulated(structure: Structure, bond: Bond) -> list[int]:
    """Indices of the double bonds in the run that ``bond`` is part of (empty for a ring of them)."""
    run, queue = {bond.index}, [bond.a, bond.b]
    for atom in queue:
        doubles = [b for b in structure.bonds_of[atom] if b.order == 2 and not b.aromatic]
        if len(doubles) == 2 and len(structure.neighbours[atom]) == 2:
            for other in doubles:
                if other.index not in run:
                    run.add(other.index)
                    queue.append(other.other(atom))
    return sorted(run) if len(queue) == len(run) + 1 else []


def _ends(structure: Structure, run: list[int]) -> tuple[int, int]:
    seen: dict[int, int] = {}
    for index in run:
        for atom in (structure.bonds[index].a, structure.bonds[index].b):
            seen[atom] = seen.get(atom, 0) + 1
    left, right = sorted(atom for atom, count in seen.items() if count == 1)
    return left, right


def _end_ligands(
    structure: Structure, twins: dict[int, tuple[int, int]], end: int, run: list[int]
) -> list[int]:
    atom = structure.atoms[end]
    ligands = [b.other(end) for b in structure.bonds_of[end] if b.index not in run]
    if end in twins:
        ligands += twins[end]
    elif len(ligands) == 1 and (atom.z, atom.hydrogens) in _ONE_MORE:
        ligands.append(~end)
    return ligands


def _is_amidine(structure: Structure, left: int, right: int) -> bool:
    """N-C=N: amidines and guanidines turn over fast by rotation, inversion and proton exchange."""
    for carbon, nitrogen in ((left, right), (right, left)):
        if structure.atoms[carbon].z == 6 and structure.atoms[nitrogen].z == 7:
            return sum(structure.atoms[i].z == 7 for i in structure.neighbours[carbon]) > 1
    return False
