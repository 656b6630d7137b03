"""Saturated carbons: base + increments by distance + branching corrections.

The additive scheme of Clerc and Pretsch for substituted alkanes (Pretsch, Buhlmann and Badertscher, Structure
Determination of Organic Compounds), after Grant and Paul, J. Am. Chem. Soc. 1964, 86, 2984.
"""

from __future__ import annotations

from functools import cache
from itertools import combinations

from hoodside.facts import Row, load_table
from hoodside.molecule import Structure
from hoodside.predict.carbon.scheme import Estimate
from hoodside.predict.carbon.substituents import Found, Pattern, Substituents, patterns_of, substituents_in
from hoodside.predict.model import Term

_SET = "Pretsch"
_REACH = ("alpha", "beta", "gamma", "delta")
_ARYL = "phenyl"
#: Neighbours whose branches the steric corrections count.
_BRANCHING = ("C", "N")
_MULTIPLE = ("N", "O", "S", "P", "F", "Cl", "Br", "I")


def estimate_sp3(structure: Structure, atom: int) -> Estimate:
    """The additive estimate for a saturated carbon, in ppm from TMS."""
    base = _base()
    terms = [Term("methane", float(base["delta_ppm"]), base["source"])]
    terms += _increments(structure, atom)
    terms += _branching(structure, atom)
    terms += _geminal(structure, atom)
    return Estimate(_class_of(structure, atom), tuple(terms))


def _increments(structure: Structure, atom: int) -> list[Term]:
    """A functional group counts once, at the distance where it begins.

    What stands behind an atom without increments of its own (silicon, phosphorus, boron) does not count:
    nobody knows how it reaches through.
    """
    groups = substituents_in(structure, "carbon_alkane", _patterns())
    distances = structure.distances_from(atom)
    seen, screened = {atom}, set[int]()
    terms: list[Term] = []
    for here in sorted(range(len(distances)), key=distances.__getitem__):
        if here in seen or not 0 < distances[here] <= len(_REACH):
            continue
        nearer = {n for n in structure.neighbours[here] if distances[n] < distances[here]}
        if nearer <= screened:
            screened.add(here)
            continue
        name, members = _group_at(structure, groups, here, {atom, *nearer})
        seen |= members
        if not name and structure.atoms[here].symbol != "C":
            screened.add(here)
        if (term := _term(name, _REACH[distances[here] - 1])) is not None:
            terms.append(term)
    return terms


def _group_at(
    structure: Structure, groups: Substituents, here: int, outside: set[int]
) -> tuple[str, set[int]]:
    """Name of the group that begins here and the atoms it takes up; any aryl counts as phenyl."""
    found = groups.at(here, outside)
    if found is not None:
        return found.pattern.row["substituent"], {here} | _absorbed(structure, found, here)
    if structure.atoms[here].aromatic:
        ring = next(r for r in structure.rings if here in r)
        return _ARYL, {here, *ring} - outside
    return "", {here}


def _absorbed(structure: Structure, found: Found, anchor: int) -> set[int]:
    """Atoms that belong to the group itself: its heteroatoms and unsaturated carbons, not alkyl on it."""
    return {
        a
        for a in found.atoms
        if a == anchor or structure.atoms[a].symbol in _MULTIPLE or _unsaturated(structure, a)
    }


def _unsaturated(structure: Structure, atom: int) -> bool:
    return any(bond.order > 1 or bond.aromatic for bond in structure.bonds_of[atom])


def _term(name: str, reach: str) -> Term | None:
    row = _by_name().get((name, reach))
    return None if row is None else Term(f"{reach} {name}", float(row["delta_ppm"]), row["source"])


def _branching(structure: Structure, atom: int) -> list[Term]:
    own = len(structure.neighbours[atom])
    terms = []
    for near in structure.neighbours[atom]:
        other = min(_crowding(structure, near), 4)
        if own == 1 and structure.atoms[near].symbol == "N":
            continue  # trimethylamine at 47.6 and DMF at 36.5 and 31.5 ppm show no crowding (Fulmer 2010)
        if (row := _steric().get((own, other))) is not None and float(row["delta_ppm"]):
            terms.append(Term(f"branching {own}({other})", float(row["delta_ppm"]), row["source"]))
    return terms


def _crowding(structure: Structure, near: int) -> int:
    """Branches of a neighbour as the corrections count them, 0 where its increment holds them already.

    As in the worked examples of the scheme (from memory) nitrogen counts and the carboxyl family does not. An
    aromatic ring turns its face and crowds like a CH2 (ethylbenzene, cumene, tert-butylbenzene: 28.9, 34.1,
    34.6 ppm, from memory).
    """
    atom = structure.atoms[near]
    if atom.symbol not in _BRANCHING or _carboxylic(structure, near) or _linear(structure, near):
        return 0
    return 2 if atom.aromatic else len(structure.neighbours[near])


def _carboxylic(structure: Structure, atom: int) -> bool:
    hetero = [n for n in structure.neighbours[atom] if structure.atoms[n].symbol in _MULTIPLE]
    return structure.atoms[atom].symbol == "C" and _unsaturated(structure, atom) and len(hetero) > 1


def _linear(structure: Structure, atom: int) -> bool:
    return any(bond.order > 2 for bond in structure.bonds_of[atom])


def _geminal(structure: Structure, atom: int) -> list[Term]:
    """Two heteroatoms on one carbon pull less than the sum of both."""
    near = sorted(s for n in structure.neighbours[atom] if (s := structure.atoms[n].symbol) != "C")
    found = []
    for pair in combinations(near, 2):
        if (row := _geminal_rows().get(" ".join(pair))) is not None:
            found.append(Term(f"geminal {' and '.join(pair)}", float(row["delta_ppm"]), row["source"]))
    return found


def _class_of(structure: Structure, atom: int) -> str:
    near = [structure.atoms[n] for n in structure.neighbours[atom]]
    hetero = sorted({n.symbol for n in near if n.symbol != "C"})
    rings = structure.rings_of[atom]
    place = f"ring{min(rings)}" if rings and min(rings) < 6 else "ring" if rings else "chain"
    return f"sp3 {place} {''.join(hetero) or 'C'}"


@cache
def _rows() -> tuple[Row, ...]:
    return tuple(row for row in load_table("carbon_alkane") if row["set"] == _SET)


@cache
def _patterns() -> tuple[Pattern, ...]:
    return patterns_of([row for row in _rows() if row["position"] == "alpha"])


@cache
def _by_name() -> dict[tuple[str, str], Row]:
    return {(row["substituent"], row["position"]): row for row in _rows()}


@cache
def _geminal_rows() -> dict[str, Row]:
    return {row["substituent"]: row for row in _rows() if row["position"] == "geminal"}


@cache
def _steric() -> dict[tuple[int, int], Row]:
    rows = [row for row in _rows() if row["position"] == "steric"]
    return {(int(row["primary_of"]), int(row["neighbour"])): row for row in rows}


@cache
def _base() -> Row:
    return next(row for row in _rows() if row["position"] == "base")
