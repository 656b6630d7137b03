"""Couplings between groups of equivalent hydrogens, gathered from those between single nuclei."""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Sequence
from dataclasses import dataclass

from hoodside.molecule import Structure
from hoodside.molecule.symmetry import hydrogen_members, hydrogen_sets
from hoodside.predict.coupling.model import BARE, Coupling, Site, SiteCoupling
from hoodside.predict.coupling.sites import site_couplings
from hoodside.predict.model import ProtonGroup

#: Solvents whose D replaces every exchangeable H.
EXCHANGING_SOLVENTS = frozenset({"CD3OD", "D2O"})
#: Solvents in which O-H and N-H exchange slowly enough to show their couplings.
SLOW_EXCHANGE = frozenset({"DMSO-d6", "DMF-d7", "acetone-d6"})
_AMIDE = "[$([NX3;H1,H2]-[#6,#16]=[O,S])]"
#: Values closer than this count as one between the same two groups, Hz.
_SAME = 0.05


@dataclass(frozen=True, slots=True)
class Network:
    """The nuclei of a structure by group, and the couplings between them that exchange leaves."""

    members: tuple[tuple[Site, ...], ...]  # per group of H
    couplings: tuple[SiteCoupling, ...]


def predict_couplings(
    structure: Structure, groups: Sequence[ProtonGroup], solvent: str = "CDCl3"
) -> tuple[Coupling, ...]:
    """Coupling constants between groups of H, and of groups to F and P, in Hz.

    Args:
        structure: the structure the groups were predicted for.
        groups: from ``predict_protons``, in any order.
        solvent: O-H and amine N-H couple only where they exchange slowly (DMSO-d6, acetone-d6); amide N-H
            couple unless the solvent exchanges them.
    Source: named in each coupling.
    """
    network = coupling_network(structure, groups, solvent)
    group_of = {site: g for g, sites in enumerate(network.members) for site in sites}
    pooled: dict[tuple[int, int, float, int], list[SiteCoupling]] = defaultdict(list)
    for c in network.couplings:
        a, b = group_of[c.a], group_of.get(c.b, -1)
        low, high = (a, b) if b < 0 or a <= b else (b, a)
        pooled[low, high, round(c.estimate.hz / _SAME), c.bonds].append(c)
    found = [_gathered(key, entries) for key, entries in pooled.items()]
    return tuple(sorted(found, key=lambda c: (c.a, c.b, -c.hz)))


def _gathered(key: tuple[int, int, float, int], entries: list[SiteCoupling]) -> Coupling:
    a, b, _, bonds = key
    estimate = entries[0].estimate
    return Coupling(
        a=a,
        b=b,
        hz=abs(estimate.hz),
        sd=estimate.sd,
        bonds=bonds,
        sign=-1 if estimate.hz < 0 else 1,
        label=estimate.label,
        source=estimate.source,
        pairs=len(entries),
        hetero=tuple(sorted({c.b[0] for c in entries})) if b < 0 else (),
    )


def coupling_network(structure: Structure, groups: Sequence[ProtonGroup], solvent: str = "CDCl3") -> Network:
    """The nuclei behind each group, and every coupling between nuclei that exchange leaves visible."""
    members = group_members(structure, groups)
    fast = {site for k, g in enumerate(groups) for site in members[k] if _exchanges(structure, g, solvent)}
    known = {site for sites in members for site in sites}
    kept = [
        c
        for c in site_couplings(structure)
        if c.a in known and (c.b in known or c.b[1] == BARE) and c.a not in fast and c.b not in fast
    ]
    return Network(members, tuple(kept))


def group_members(structure: Structure, groups: Sequence[ProtonGroup]) -> tuple[tuple[Site, ...], ...]:
    """The single H of each group, in the order of the groups."""
    waiting: dict[tuple[int, ...], list[tuple[Site, ...]]] = defaultdict(list)
    for hydrogens, sites in zip(hydrogen_sets(structure), hydrogen_members(structure), strict=True):
        waiting[hydrogens.atoms].append(sites)
    return tuple(_next(waiting, group) for group in groups)


def _next(waiting: dict[tuple[int, ...], list[tuple[Site, ...]]], group: ProtonGroup) -> tuple[Site, ...]:
    left = waiting.get(group.atoms)
    return left.pop(0) if left else tuple((atom, 0) for atom in group.atoms)


def _exchanges(structure: Structure, group: ProtonGroup, solvent: str) -> bool:
    """Whether exchange wipes out the couplings of a group."""
    if not group.exchangeable or solvent in SLOW_EXCHANGE:
        return False
    if solvent in EXCHANGING_SOLVENTS:
        return True
    amides = {match[0] for match in structure.matches(_AMIDE)}
    return group.atoms[0] not in amides
