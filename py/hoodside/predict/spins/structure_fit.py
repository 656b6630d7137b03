"""Fitting the predicted spin system of a structure to the lines of a printout."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass, replace

from hoodside.errors import InvalidInputError
from hoodside.molecule import Structure
from hoodside.predict.coupling import coupling_network
from hoodside.predict.model import ProtonGroup
from hoodside.predict.spins.fit import MOST_FREE, Fit, Tied, fit_system
from hoodside.predict.spins.model import SpinSystem
from hoodside.predict.spins.molecule import check_field, spin_systems

#: How far outside the observed lines a predicted shift may lie and still belong to them, ppm: where the
#: number of H is not given, and at all.
_AT, _NEAR = 0.15, 0.7
#: J closer than this count as one value where symmetry makes their nuclei alike, Hz.
_SAME = 0.05
#: J too small to be read from lines of usual width, Hz: they stay as predicted, or out where they lead away.
_SMALL = 1.0
#: Difference over J from which a group away from the lines only splits them (common practice).
_FAR = 10.0


@dataclass(frozen=True, slots=True)
class FittedShift:
    """A shift in ppm before and after the fit, and its standard error in Hz."""

    group: int
    predicted: float
    ppm: float
    uncertain_hz: float


@dataclass(frozen=True, slots=True)
class FittedCoupling:
    """A J in Hz before and after the fit, between nuclei of two groups (of one where both are the same)."""

    groups: tuple[int, int]
    predicted: float
    hz: float
    uncertain_hz: float


@dataclass(frozen=True, slots=True)
class StructureFit:
    """A fitted spin system of a structure.

    Attributes:
        groups: indices of the groups of H that were fitted.
        shifts, couplings: what was free to move.
        fit: the system, its lines, and how well they meet the observed ones.
    """

    groups: tuple[int, ...]
    shifts: tuple[FittedShift, ...]
    couplings: tuple[FittedCoupling, ...]
    fit: Fit


def fit_structure(
    structure: Structure,
    groups: Sequence[ProtonGroup],
    solvent: str,
    mhz: float,
    lines: Sequence[tuple[float, float]],
    hydrogens: int | None = None,
) -> StructureFit:
    """Fit the groups of a structure that lie where the lines are.

    Other groups of their spin system stay as predicted. What the symmetry of the structure makes alike moves
    as one, so that an AA'BB' system stays one. Every shift moves, and of the J the largest, one for every two
    lines more than shifts: lines that coincide or lie under others say less than their number.

    Args:
        groups: the predicted groups of H.
        mhz: 1H observe frequency, 20 to 2000 MHz.
        lines: (Hz from the reference, height in any unit) of each observed line.
        hydrogens: how many H the lines belong to, when known.
    Raises: InvalidInputError when no coupled group lies near the lines, or there are fewer lines than shifts.
    """
    check_field(mhz)
    place = _Place(min(hz for hz, _ in lines) / mhz, max(hz for hz, _ in lines) / mhz, hydrogens)
    systems = spin_systems(groups, coupling_network(structure, groups, solvent), mhz)
    system, seen = _chosen([s for _, s in systems if s.couplings], place, mhz)
    system, seen = _cut(system, seen)
    shifts, couplings = _free(system, seen, len(lines))
    hz, heights = [x for x, _ in lines], [h for _, h in lines]
    found = fit_system(_moved(system, seen, lines), hz, heights, shifts, couplings)
    return _told(system, found, shifts, couplings, mhz)


@dataclass(frozen=True, slots=True)
class _Place:
    """Where the lines are, ppm, and how many H they belong to."""

    lo: float
    hi: float
    hydrogens: int | None

    def away(self, ppm: float) -> float:
        return max(self.lo - ppm, ppm - self.hi, 0.0)


def _chosen(systems: Sequence[SpinSystem], place: _Place, mhz: float) -> tuple[SpinSystem, list[int]]:
    """The system with most H where the lines are, and its groups there."""
    found = [(system, _seen(system, place, mhz)) for system in systems]
    best = max(found, key=lambda f: _count(f[0], f[1]), default=None)
    if best is None or not best[1]:
        raise InvalidInputError(
            f"The structure has no coupled H near {place.hi:.2f} to {place.lo:.2f} ppm.",
            hint=f"Fit lines that lie within {_NEAR:g} ppm of where the structure should have them.",
            field="lines",
        )
    return best


def _seen(system: SpinSystem, place: _Place, mhz: float) -> list[int]:
    """Groups that the lines belong to: nearest first until the H are enough, alike ones as one."""
    away = {k: place.away(n.hz / mhz) for k, n in enumerate(system.groups) if n.observed}
    if place.hydrogens is None:
        return [k for k, ppm in away.items() if ppm <= _AT]
    found: list[int] = []
    for k in sorted(away, key=lambda k: away[k]):
        if k in found or away[k] > _NEAR:
            continue
        if _count(system, found) >= place.hydrogens:
            break
        found += [m for m in away if system.groups[m].label == system.groups[k].label]
    return sorted(found)


def _count(system: SpinSystem, seen: Sequence[int]) -> int:
    return sum(system.groups[k].count for k in seen)


def _cut(system: SpinSystem, seen: Sequence[int]) -> tuple[SpinSystem, list[int]]:
    """The seen groups and what splits them; far groups act like heteronuclei."""
    partners = {
        x: hz for a, b, hz in system.couplings for x, y in ((a, b), (b, a)) if y in seen and abs(hz) >= _SMALL
    }
    kept = [k for k in range(len(system.groups)) if k in seen or k in partners]
    place = {k: at for at, k in enumerate(kept)}

    def far(k: int) -> bool:
        gap = min(abs(system.groups[k].hz - system.groups[s].hz) for s in seen)
        return k not in seen and gap >= _FAR * abs(partners[k])

    nuclei = tuple(replace(system.groups[k], observed=False) if far(k) else system.groups[k] for k in kept)
    pairs = tuple((place[a], place[b], hz) for a, b, hz in system.couplings if a in place and b in place)
    return SpinSystem(nuclei, pairs), [place[k] for k in seen]


def _free(system: SpinSystem, seen: Sequence[int], lines: int) -> tuple[list[Tied], list[Tied]]:
    """Shifts and J that move, those of alike nuclei as one: J between groups before J within one, by size."""
    by_label: dict[str, list[int]] = {}
    for k in seen:
        by_label.setdefault(system.groups[k].label, []).append(k)
    alike: dict[tuple[str, str, int], list[int]] = {}
    for c, (a, b, hz) in enumerate(system.couplings):
        if (a in seen or b in seen) and abs(hz) >= _SMALL:
            first, second = sorted((system.groups[a].label, system.groups[b].label))
            alike.setdefault((first, second, round(hz / _SAME)), []).append(c)
    ranked = sorted(alike.items(), key=lambda e: (e[0][0] == e[0][1], -abs(e[0][2])))
    left = max(0, min((lines - len(by_label) + 1) // 2, MOST_FREE - len(by_label)))
    return [tuple(tied) for tied in by_label.values()], [tuple(tied) for _, tied in ranked[:left]]


def _moved(system: SpinSystem, seen: Sequence[int], lines: Sequence[tuple[float, float]]) -> SpinSystem:
    """The system with the seen groups moved together to the middle of the lines."""
    observed = sum(hz * h for hz, h in lines) / sum(h for _, h in lines)
    predicted = sum(system.groups[k].hz * system.groups[k].count for k in seen) / _count(system, seen)
    nuclei = [
        replace(n, hz=n.hz + observed - predicted) if k in seen else n for k, n in enumerate(system.groups)
    ]
    return SpinSystem(tuple(nuclei), system.couplings)


def _told(
    system: SpinSystem,
    found: Fit,
    shifts: Sequence[Tied],
    couplings: Sequence[Tied],
    mhz: float,
) -> StructureFit:
    def group(k: int) -> int:
        label = system.groups[k].label
        return int(label[3:]) if label.startswith("h1:") else -1

    errors = found.uncertain_hz
    moved = tuple(
        FittedShift(group(k), system.groups[k].hz / mhz, found.system.groups[k].hz / mhz, error)
        for (k, *_), error in zip(shifts, errors, strict=False)
    )
    split = tuple(
        FittedCoupling(
            (group(system.couplings[c][0]), group(system.couplings[c][1])),
            system.couplings[c][2],
            found.system.couplings[c][2],
            error,
        )
        for (c, *_), error in zip(couplings, errors[len(shifts) :], strict=True)
    )
    return StructureFit(tuple(sorted({s.group for s in moved})), moved, split, found)
