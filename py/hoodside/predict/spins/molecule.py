"""The 1H spectrum of a whole structure: its nuclei cut into spin systems and simulated one by one."""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Sequence
from dataclasses import dataclass

from hoodside.errors import InvalidInputError
from hoodside.molecule import Structure
from hoodside.predict.coupling import BARE, Network, Site, coupling_network, predict_couplings
from hoodside.predict.model import ProtonGroup
from hoodside.predict.multiplet import apply_multiplets
from hoodside.predict.proton import predict_protons
from hoodside.predict.spins.basis import largest_block
from hoodside.predict.spins.clusters import EXACT_STATES, simulate
from hoodside.predict.spins.model import LineList, Nuclei, SpinSystem

#: Nuclei that act as one composite spin.
_Class = tuple[Site, ...]
#: Fields answered for, MHz.
FIELDS = (20.0, 2000.0)
#: J closer than this count as equal when nuclei are tested for magnetic equivalence, Hz.
_SAME = 0.05
#: J smaller than this is left out, Hz.
_NO_COUPLING = 0.15


@dataclass(frozen=True, slots=True)
class SystemSpectrum:
    """The lines of one spin system of a structure.

    Attributes:
        groups: indices of the groups of H in it.
        lines: Hz from the reference.
        broad: True for exchangeable H, which give no sharp lines.
    """

    groups: tuple[int, ...]
    lines: LineList
    broad: bool


def predict_spectrum(
    structure: Structure, solvent: str = "CDCl3", mhz: float = 400.0
) -> tuple[tuple[ProtonGroup, ...], tuple[SystemSpectrum, ...]]:
    """Groups of H with their patterns, and the simulated lines of every spin system of a structure.

    Args:
        solvent: a name from facts/residual_solvents.csv.
        mhz: 1H observe frequency, 20 to 2000 MHz.
    Raises: InvalidInputError for an impossible field.
    """
    check_field(mhz)
    groups = predict_protons(structure, solvent)
    groups = apply_multiplets(groups, predict_couplings(structure, groups, solvent), mhz)
    return groups, simulate_groups(structure, groups, solvent, mhz)


def simulate_groups(
    structure: Structure, groups: Sequence[ProtonGroup], solvent: str, mhz: float
) -> tuple[SystemSpectrum, ...]:
    """The simulated lines of every spin system, from groups already predicted."""
    check_field(mhz)
    network = coupling_network(structure, groups, solvent)
    return tuple(
        SystemSpectrum(
            tuple(sorted(g for g in members if g >= 0)),
            simulate(system),
            all(groups[g].exchangeable for g in members if g >= 0),
        )
        for members, system in spin_systems(groups, network, mhz)
    )


def check_field(mhz: float) -> None:
    """Raises: InvalidInputError unless a field (1H MHz) is one an instrument can have."""
    if not FIELDS[0] <= mhz <= FIELDS[1]:
        raise InvalidInputError(
            f"A field of {mhz!r} MHz is not possible.",
            hint=f"Give the 1H frequency, {FIELDS[0]:g} to {FIELDS[1]:g} MHz.",
            field="mhz",
            value=mhz,
        )


def spin_systems(
    groups: Sequence[ProtonGroup], network: Network, mhz: float
) -> list[tuple[set[int], SpinSystem]]:
    """Independent spin systems: (groups of H in it, the system), by first group.

    Nuclei of one group are put together only when they are magnetically equivalent.
    """
    group_of = {site: g for g, sites in enumerate(network.members) for site in sites}
    j = _couplings(network)
    found = []
    for part in _connected(_equivalent(network, j), j):
        if largest_block([len(c) for c in part if c[0][1] != BARE]) > EXACT_STATES:
            part = _paired(part, group_of)
        members = {group_of[c[0]] for c in part if c[0] in group_of}
        found.append((members, _system(part, j, groups, group_of, mhz)))
    return found


def _couplings(network: Network) -> dict[Site, dict[Site, float]]:
    j: dict[Site, dict[Site, float]] = defaultdict(dict)
    for c in network.couplings:
        if abs(c.estimate.hz) >= _NO_COUPLING:
            j[c.a][c.b] = j[c.b][c.a] = c.estimate.hz
    return j


def _equivalent(network: Network, j: dict[Site, dict[Site, float]]) -> list[_Class]:
    """Sets of nuclei with one shift and one coupling each to every nucleus outside the set."""
    found: list[_Class] = []
    for sites in network.members:
        by_couplings: dict[tuple[tuple[Site, int], ...], list[Site]] = defaultdict(list)
        inside = set(sites)
        for site in sites:
            outside = ((s, round(hz / _SAME)) for s, hz in j[site].items() if s not in inside)
            by_couplings[tuple(sorted(outside))].append(site)
        found += [tuple(members) for members in by_couplings.values()]
    return found + [(site,) for site in sorted({s for s in j if s[1] == BARE})]


def _paired(part: list[_Class], group_of: dict[Site, int]) -> list[_Class]:
    """The classes of a system too large for all its nuclei: the two H of a CH2 with one shift put together.

    Their couplings then average; what AA'XX' patterns show beyond that is lost in a large system.
    """
    pairs: dict[tuple[int, int], list[Site]] = defaultdict(list)
    for sites in part:
        group = group_of.get(sites[0], ~sites[0][0])
        pairs[group, sites[0][0]] += sites
    return [tuple(sites) for sites in pairs.values()]


def _connected(classes: list[_Class], j: dict[Site, dict[Site, float]]) -> list[list[_Class]]:
    """Classes that couplings between nuclei connect. A lone hetero nucleus is left out."""
    class_of = {site: k for k, sites in enumerate(classes) for site in sites}
    near = [{class_of[s] for s in j[sites[0]] if s in class_of} - {k} for k, sites in enumerate(classes)]
    left, parts = set(range(len(classes))), []
    for start in range(len(classes)):
        queue = [start] if start in left else []
        left.discard(start)
        for k in queue:
            fresh = near[k] & left
            left -= fresh
            queue += sorted(fresh)
        if any(classes[k][0][1] != BARE for k in queue):
            parts.append([classes[k] for k in sorted(queue)])
    return parts


def _system(
    part: list[_Class],
    j: dict[Site, dict[Site, float]],
    groups: Sequence[ProtonGroup],
    group_of: dict[Site, int],
    mhz: float,
) -> SpinSystem:
    nuclei = []
    for sites in part:
        group = group_of.get(sites[0])
        shift = groups[group].ppm * mhz if group is not None else 0.0
        label = f"h1:{group}" if group is not None else str(sites[0][0])
        nuclei.append(Nuclei(shift, len(sites), group is not None, label))
    pairs = [
        (a, b, hz)
        for a in range(len(part))
        for b in range(a + 1, len(part))
        if (hz := _mean_coupling(part[a], part[b], j))
    ]
    return SpinSystem(tuple(nuclei), tuple(pairs))


def _mean_coupling(a: _Class, b: _Class, j: dict[Site, dict[Site, float]]) -> float:
    return sum(j[x].get(y, 0.0) for x in a for y in b) / (len(a) * len(b))
