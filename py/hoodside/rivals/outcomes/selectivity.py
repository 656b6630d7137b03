"""Which of several like sites reacts first: one small rule per kind of step, larger score first."""

from __future__ import annotations

from collections.abc import Callable
from functools import cache

from hoodside.facts import load_table
from hoodside.molecule import Structure

Score = Callable[[Structure, dict[int, int]], float]  # structure, map number in the pattern -> atom

_PULLING = "[CX3]=[OX1],[CX2]#[NX1],[N+](=O)[O-],S(=O)=O,C(F)(F)F"
_SNAR_ORDER = {"F": 3.0, "Cl": 2.0, "N": 1.0}
_BEST_RING, _FIVE = 6, 5
#: What benzo-fusion takes from the place next to N or S of a five-ring.
_BENZO_ALPHA = 2.0
#: What a place next to the fusion of two benzene rings gains (Clayden, Greeves and Warren).
_NAPHTHALENE_ALPHA = 1.5
_HALIDE_ORDER = {"I": 3.0, "Br": 2.0, "Cl": 1.0, "F": 0.0}


def alkene(structure: Structure, site: dict[int, int]) -> float:
    """Electron-rich double bonds first: alkyl and donors raise, acceptors lower; no enol of an arene."""
    ends = (site[1], site[2])
    around = [n for end in ends for n in structure.neighbours[end] if n not in ends]
    score = float(len(around))
    for near in around:
        atom = structure.atoms[near]
        score += {"O": 1.0, "N": 2.0}.get(atom.symbol, 0.0) - (3.0 if _pulls(structure, near) else 0.0)
        score -= 0.5 if atom.symbol in ("F", "Cl", "Br") else 0.0
        score -= 0.4 if atom.aromatic else 0.0
    return score


def alcohol(structure: Structure, site: dict[int, int]) -> float:
    """Primary before secondary before tertiary; a phenol between primary and secondary."""
    carbon = site[1]
    if structure.atoms[carbon].aromatic:
        return 1.5
    return float(structure.atoms[carbon].hydrogens)


def phenol(structure: Structure, site: dict[int, int]) -> float:
    """The more acidic OH first: phenols before alcohols."""
    carbon = site[1]
    return 5.0 if structure.atoms[carbon].aromatic else float(structure.atoms[carbon].hydrogens)


def carbonyl(structure: Structure, site: dict[int, int]) -> float:
    """Aldehydes first, then ketones, conjugated ones last."""
    carbon = site[1]
    conjugated = any(
        structure.atoms[n].aromatic or _double_bonded(structure, n) for n in structure.neighbours[carbon]
    )
    return 2.0 * structure.atoms[carbon].hydrogens - 0.5 * conjugated


def zaitsev(structure: Structure, site: dict[int, int]) -> float:
    """The more substituted alkene."""
    return float(len(structure.neighbours[site[2]]) + len(structure.neighbours[site[1]]))


def alpha(structure: Structure, site: dict[int, int]) -> float:
    """The enol that forms best: the more substituted carbon, one next to an arene first."""
    carbon = site[3]
    benzylic = any(structure.atoms[n].aromatic for n in structure.neighbours[carbon])
    return 3.0 * benzylic - float(structure.atoms[carbon].hydrogens)


def least_hindered(structure: Structure, site: dict[int, int]) -> float:
    """Methyl before methylene, for condensations."""
    return float(structure.atoms[site[3]].hydrogens)


def allyl(structure: Structure, site: dict[int, int]) -> float:
    """Methylene before methyl."""
    return -float(structure.atoms[site[3]].hydrogens) + 0.5 * bool(structure.rings_of[site[3]])


def halide(structure: Structure, site: dict[int, int]) -> float:
    """Iodide before bromide before chloride."""
    return max(_HALIDE_ORDER.get(structure.atoms[n].symbol, -1.0) for n in structure.neighbours[site[1]])


def migrating(structure: Structure, site: dict[int, int]) -> float:
    """Migratory aptitude: tertiary, secondary, benzyl and aryl, primary, methyl; halogens hold back."""
    group = site[4]
    atom = structure.atoms[group]
    near = [n for n in structure.neighbours[group] if n != site[1]]
    if atom.aromatic:
        return 2.6
    benzylic = any(structure.atoms[n].aromatic for n in near)
    electron_poor = sum(structure.atoms[n].symbol in ("F", "Cl", "Br") for n in near)
    return float(len(near)) + 1.2 * benzylic - 2.5 * electron_poor


def aromatic(structure: Structure, site: dict[int, int]) -> float:
    """Directing effects of the groups on the ring (facts/directing_groups.csv) less crowding."""
    place = site[1]
    return sum(_ring_score(structure, ring, place) for ring in structure.rings if place in ring)


def _ring_score(structure: Structure, ring: tuple[int, ...], place: int) -> float:
    if not all(structure.atoms[a].aromatic for a in ring):
        return 0.0
    score = -_BENZO_ALPHA if _beside_benzo_hetero(structure, ring, place) else 0.0
    score += _NAPHTHALENE_ALPHA if _beside_fusion(structure, ring, place) else 0.0
    for member in ring:
        steps = abs(ring.index(member) - ring.index(place))
        steps = min(steps, len(ring) - steps)
        symbol = structure.atoms[member].symbol
        score += _HETERO_RING.get((len(ring), symbol, structure.atoms[member].charge, steps), 0.0)
        for near in structure.neighbours[member]:
            if near not in ring:
                score += _directing(structure, near, member, steps)
                score -= 0.4 if steps == 1 else 0.0
    return score


#: (ring size, element, charge, bonds away) -> how much the ring atom helps: five-rings react next to the
#: heteroatom, pyridines meta to it, N-oxides para.
_HETERO_RING = {
    (5, "S", 0, 1): 3.0, (5, "O", 0, 1): 3.0, (5, "N", 0, 1): 3.0,
    (5, "S", 0, 2): 1.5, (5, "O", 0, 2): 1.5, (5, "N", 0, 2): 2.0,
    (6, "N", 0, 1): -3.0, (6, "N", 0, 2): -1.0, (6, "N", 0, 3): -3.0,
    (6, "N", 1, 1): 0.0, (6, "N", 1, 2): -1.0, (6, "N", 1, 3): 1.0,
}  # fmt: skip


def _beside_benzo_hetero(structure: Structure, ring: tuple[int, ...], place: int) -> bool:
    """Position 2 of indole or benzothiophene; 3 leads there (Joule and Mills, Heterocyclic Chemistry)."""
    fused = any(other != ring and len(set(other) & set(ring)) > 1 for other in structure.rings)
    return (
        fused
        and len(ring) == _FIVE
        and any(structure.atoms[n].symbol in "NS" for n in structure.neighbours[place] if n in ring)
    )


def _beside_fusion(structure: Structure, ring: tuple[int, ...], place: int) -> bool:
    """Position 1 of naphthalene and its like."""
    fused = {atom for other in structure.rings if other != ring for atom in set(other) & set(ring)}
    carbons = all(structure.atoms[atom].symbol == "C" for atom in ring)
    return carbons and len(fused) > 1 and any(n in fused for n in structure.neighbours[place])


def _directing(structure: Structure, near: int, member: int, steps: int) -> float:
    for row, pattern in _directors():
        for match in structure.matches(pattern, unique=False):
            if match[0] == near and member not in match[1:]:
                return float(row[("ortho", "meta", "para")[min(steps, 3) - 1]]) if steps else 0.0
    return 0.0


@cache
def _directors() -> tuple[tuple[dict[str, str], str], ...]:
    return tuple((row, row["smarts"]) for row in load_table("directing_groups"))


def _pulls(structure: Structure, atom: int) -> bool:
    return any(m[0] == atom for p in _PULLING.split(",") for m in structure.matches(p, unique=False))


def _double_bonded(structure: Structure, atom: int) -> bool:
    return any(bond.order == 2 for bond in structure.bonds_of[atom])


def positive(structure: Structure, atom: int) -> float:
    """How well a carbon bears positive charge: substitution, arene, allyl, O or N; acceptors lower it."""
    score = 0.0
    for near in structure.neighbours[atom]:
        here = structure.atoms[near]
        score += 1.0
        score += 1.5 if here.aromatic or _double_bonded(structure, near) else 0.0
        score += {"O": 3.0, "N": 4.0, "S": 2.0}.get(here.symbol, 0.0)
        score -= 4.0 if _pulls(structure, near) else 0.0
    return score


def cation(structure: Structure, site: dict[int, int]) -> float:
    """The end that bears positive charge better takes the nucleophile."""
    return positive(structure, site[1])


def diol(structure: Structure, site: dict[int, int]) -> float:
    """1,2-diols close to five-rings before 1,3-diols to six."""
    gap = structure.distances_from(site[2])[site[3]]
    return -float(gap) if 0 < gap <= 2 else -10.0


def diol_six(structure: Structure, site: dict[int, int]) -> float:
    """1,3-diols close to six-rings first (aldehyde acetals), then 1,2-diols."""
    gap = structure.distances_from(site[2])[site[3]]
    return float(gap) if 0 < gap <= 2 else -10.0


def snar(structure: Structure, site: dict[int, int]) -> float:
    """Fluoride leaves before chloride, nitro last (addition is slow, leaving is fast)."""
    leaving = [n for n in structure.neighbours[site[1]] if not structure.atoms[n].aromatic]
    return max((_SNAR_ORDER.get(structure.atoms[n].symbol, 0.0) for n in leaving), default=0.0)


def ring(structure: Structure, site: dict[int, int]) -> float:
    """Rings near six close best; ``site`` holds the atoms that become bonded as 1 and 2."""
    return -abs(structure.distances_from(site[1])[site[2]] + 1 - _BEST_RING)


def less_hindered(structure: Structure, site: dict[int, int]) -> float:
    """The carbon with fewer neighbours is attacked; it is the one mapped 2."""
    return -float(len(structure.neighbours[site[2]]))


SCORES: dict[str, Score] = {
    "snar": snar,
    "less": less_hindered,
    "ring": ring,
    "cation": cation,
    "diol": diol,
    "diol6": diol_six,
    "alkene": alkene,
    "alcohol": alcohol,
    "phenol": phenol,
    "carbonyl": carbonyl,
    "zaitsev": zaitsev,
    "alpha": alpha,
    "ketone": least_hindered,
    "allyl": allyl,
    "halide": halide,
    "bv": migrating,
    "eas": aromatic,
}
