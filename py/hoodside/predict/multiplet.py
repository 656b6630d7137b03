"""First-order multiplets: their names and J values as chemists print them, and their lines.

The n + 1 rule with ACS and IUPAC names, largest J first; "m" where strong coupling or the sheer number of
lines makes a first-order name untrue at the given field.
"""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Sequence
from dataclasses import dataclass, replace
from itertools import pairwise
from math import comb, fsum

from hoodside.errors import InvalidInputError
from hoodside.predict.coupling.model import Coupling
from hoodside.predict.model import ProtonGroup
from hoodside.readings.patterns import bare, couplings_named, normalise_pattern, partner_counts

#: Hz below which a coupling is not seen as a splitting.
RESOLVED = 1.6
#: Hz within which chemists read two couplings as one.
MERGED = 1.05
#: Shift difference over J below which two groups are too strongly coupled for a first-order name.
STRONG = 1.0
#: More lines than this are printed as "m".
MOST_LINES = 18
#: Hz: the coarsest reading of a pattern leaves out splittings up to the first and joins up to the second.
COARSEST = (2.6, 2.0)
#: Decimals of a printed J, Hz.
_DECIMALS = 1


@dataclass(frozen=True, slots=True)
class Splitting:
    """One letter of a pattern: J in Hz and the number of partners that share it."""

    hz: float
    count: int
    sd: float = 1.0  # Hz, standard deviation of the error expected


def apply_multiplets(
    groups: Sequence[ProtonGroup], couplings: Sequence[Coupling], mhz: float
) -> tuple[ProtonGroup, ...]:
    """The groups with ``mult`` and ``j`` set.

    Args:
        groups: from ``predict_protons``.
        couplings: from ``predict_couplings`` for the same groups.
        mhz: 1H observe frequency, MHz.
    Raises: InvalidInputError when ``mhz`` is not above zero.
    """
    if not mhz > 0:
        raise InvalidInputError(
            f"A field of {mhz!r} MHz is not possible.", hint="Give MHz.", field="mhz", value=mhz
        )
    return tuple(_with_pattern(k, groups, couplings, mhz) for k in range(len(groups)))


def _with_pattern(
    k: int, groups: Sequence[ProtonGroup], couplings: Sequence[Coupling], mhz: float
) -> ProtonGroup:
    found = splittings(k, groups, couplings)
    group = groups[k]
    if group.exchangeable and not found:
        return replace(group, mult="br s", j=())
    if _is_strong(k, groups, couplings, mhz) or _line_count(found) > MOST_LINES:
        return replace(group, mult="m", j=())
    return replace(group, mult=name_of(found), j=tuple(round(s.hz, _DECIMALS) for s in found))


def splittings(k: int, groups: Sequence[ProtonGroup], couplings: Sequence[Coupling]) -> tuple[Splitting, ...]:
    """What splits group ``k`` to first order, largest J first, like couplings merged."""
    return merged(_resolved({k}, groups, couplings))


def combined_pattern(
    members: Sequence[int],
    groups: Sequence[ProtonGroup],
    couplings: Sequence[Coupling],
    resolved: float = RESOLVED,
    within: float = MERGED,
) -> tuple[str, tuple[float, ...]]:
    """Name and J (Hz) of the one signal that some groups make when their shifts coincide.

    Couplings within the signal do not show; those to others average over its members. Splittings below
    ``resolved`` Hz are not seen, those ``within`` so many Hz of each other read as one.
    """
    parts = merged([s for s in _splittings(set(members), groups, couplings) if s.hz >= resolved], within)
    return name_of(parts), tuple(round(s.hz, _DECIMALS) for s in parts)


def readable_patterns(
    members: Sequence[int], groups: Sequence[ProtonGroup], couplings: Sequence[Coupling]
) -> frozenset[str]:
    """Every name a careful to a coarse reading gives the signal of some groups ("ddd", "td", "dd", "t").

    Readings differ in the smallest splitting seen and in how near two J must be to be taken as one.
    """
    return frozenset(map(name_of, readings_of(members, groups, couplings)))


def readings_of(
    members: Sequence[int], groups: Sequence[ProtonGroup], couplings: Sequence[Coupling]
) -> frozenset[tuple[Splitting, ...]]:
    """The splittings behind every reading of ``readable_patterns``, largest J first."""
    parts = sorted(_splittings(set(members), groups, couplings), key=lambda s: s.hz)
    least, joined = COARSEST
    cuts = [0.0, *[s.hz + 1e-9 for s in parts if s.hz <= least]]
    gaps = [0.0, *[b.hz - a.hz + 1e-9 for a, b in pairwise(parts) if b.hz - a.hz <= joined]]
    return frozenset(merged([s for s in parts if s.hz >= cut], gap) for cut in cuts for gap in gaps)


def _resolved(
    inside: set[int], groups: Sequence[ProtonGroup], couplings: Sequence[Coupling]
) -> list[Splitting]:
    """The splittings wide enough to be seen as such."""
    return [s for s in _splittings(inside, groups, couplings) if s.hz >= RESOLVED]


def _splittings(
    inside: set[int], groups: Sequence[ProtonGroup], couplings: Sequence[Coupling]
) -> list[Splitting]:
    """Couplings of the groups ``inside`` one signal to everything else, per nucleus of the signal."""
    n = sum(groups[k].n for k in inside)
    blocks: dict[tuple[int, int, tuple[int, ...]], list[Coupling]] = defaultdict(list)
    for c in couplings:
        if (c.a in inside) != (c.b in inside):
            blocks[c.b if c.a in inside else c.a, c.bonds, c.hetero].append(c)
    parts = [s for block in blocks.values() for s in _of_block(block, n)]
    return [s for s in parts if s.count > 0]


def _of_block(block: list[Coupling], n: int) -> list[Splitting]:
    """Couplings to one partner group. Where a nucleus does not see whole numbers, they average."""
    if all(c.pairs % n == 0 for c in block) and len({c.label for c in block}) == len(block):
        return [Splitting(c.hz, c.pairs // n, c.sd) for c in block]
    total = sum(c.pairs for c in block)
    mean = fsum(c.hz * c.sign * c.pairs for c in block) / total
    return [Splitting(abs(mean), round(total / n), max(c.sd for c in block))]


def merged(parts: Sequence[Splitting], within: float = MERGED) -> tuple[Splitting, ...]:
    """Splittings whose J lie ``within`` Hz of each other read as one, largest first."""
    groups: list[list[Splitting]] = []
    for part in sorted(parts, key=lambda s: -s.hz):
        if groups and _mean(groups[-1]) - part.hz <= within:
            groups[-1].append(part)
        else:
            groups.append([part])
    return tuple(Splitting(_mean(g), sum(s.count for s in g), max(s.sd for s in g)) for g in groups)


def _mean(parts: list[Splitting]) -> float:
    return fsum(s.hz * s.count for s in parts) / sum(s.count for s in parts)


def name_of(parts: Sequence[Splitting]) -> str:
    """ACS name of a first-order pattern ("s" for none, "m" when a letter has no name)."""
    letters = {count: name for name, count in partner_counts().items()}
    if any(s.count not in letters for s in parts):
        return "m"
    return "".join(letters[s.count] for s in parts) or "s"


def _line_count(parts: Sequence[Splitting]) -> int:
    lines = 1
    for part in parts:
        lines *= part.count + 1
    return lines


def _is_strong(k: int, groups: Sequence[ProtonGroup], couplings: Sequence[Coupling], mhz: float) -> bool:
    for c in couplings:
        if k not in (c.a, c.b) or c.a == c.b or c.b < 0 or c.hz < RESOLVED:
            continue
        other = groups[c.b if c.a == k else c.a]
        if abs(other.ppm - groups[k].ppm) * mhz < STRONG * c.hz:
            return True
    return False


def normalise(name: str) -> str:
    """The canonical name of a pattern; see ``readings.patterns.normalise_pattern``."""
    return normalise_pattern(name)


def lines(name: str, j: Sequence[float]) -> list[tuple[float, float]]:
    """Lines of a first-order pattern: (offset from the centre in Hz, ascending; share of the intensity).

    Args:
        name: any name ``normalise`` reads, but "m".
        j: Hz, one per letter group, in the order of the letters.
    Raises: InvalidInputError for "m", or when the number of J does not fit the name.
    Source: product of binomial patterns (facts/multiplets.csv).
    """
    pattern = normalise_pattern(name)
    counts = couplings_named(pattern)
    if bare(pattern) == "m" or len(counts) != len(j):
        raise InvalidInputError(
            f"{name!r} takes {len(counts)} couplings, not {len(j)}.",
            hint="Give one J per letter, in the order of the letters.",
            field="j",
            value=list(j),
        )
    found = [(0.0, 1.0)]
    for count, hz in zip(counts, j, strict=True):
        found = [
            (at + hz * (m - count / 2), share * comb(count, m) / 2**count)
            for at, share in found
            for m in range(count + 1)
        ]
    return _coincident(sorted(found))


def splitting_tree(parts: Sequence[Splitting]) -> list[list[tuple[float, float]]]:
    """The tree of a first-order multiplet, from the unsplit line down, largest J first.

    Each level is (offset from the centre in Hz, share of the intensity), coinciding lines joined.
    """
    ordered = sorted(parts, key=lambda s: -s.hz)
    return [
        lines(name_of(ordered[:k]), [s.hz for s in ordered[:k]]) if k else [(0.0, 1.0)]
        for k in range(len(ordered) + 1)
    ]


def _coincident(found: list[tuple[float, float]]) -> list[tuple[float, float]]:
    joined: list[tuple[float, float]] = []
    for at, share in found:
        if joined and at - joined[-1][0] < 1e-6:
            joined[-1] = (joined[-1][0], joined[-1][1] + share)
        else:
            joined.append((at, share))
    return joined
