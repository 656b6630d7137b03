"""From tallies to verdicts: fits, clashes or undecided, each with its reason; and to shares.

Two things decide. Absolute: whether the readings suit the structure as well as they suit right structures of
published compounds. Relative: how far it lies behind the best structure put up.
"""

from __future__ import annotations

from collections import defaultdict
from collections.abc import Sequence
from dataclasses import dataclass
from math import fsum

from hoodside.weigh.decibans import odds
from hoodside.weigh.finding import Finding
from hoodside.weigh.structure import Tally

FITS, CLASHES, UNDECIDED = "fits", "clashes", "undecided"

#: Structures nearer than this are not told apart by the readings, decibans (ten times as likely).
TELLS_APART = 10.0
#: The same while one kind of reading alone speaks, whose errors are shared.
ONE_KIND_APART = 13.0
#: This far behind the best one a structure clashes, decibans.
BEHIND = 20.0
#: One reading, or one expected and missing, that speaks this strongly against a structure rules it out.
RULES_OUT = -18.0
#: A structure whose readings, all together, suit some other compound better by this much clashes.
TOTAL_AGAINST = -6.0
_NOTHING_ALONE = "No reading rules it out by itself, but all together they suit another structure far better."
#: Less weight than this is no fit yet: too little has been measured.
ENOUGH = 10.0
#: Strain is what speaks against a structure beyond what one odd reading may, per reading, in decibans. Of the
#: right structures of published compounds (left out of the fits) 6 % are strained beyond the first figure,
#: 0.3 % beyond the second; of the best wrong ones 26 % and 7 %.
STRAINED, BROKEN = 0.42, 1.0
_FORGIVEN = 6.0
#: Findings below this say next to nothing, decibans.
_SPEAKS = 1.0
#: Findings on one reading this near to each other are about as bad, decibans.
_ABOUT_AS_BAD = 3.0
#: With fewer readings than this strain is an accident.
_FEW = 4


@dataclass(frozen=True, slots=True)
class Verdict:
    """A verdict on one structure, with the finding that decides where there is one."""

    verdict: str
    reason: str
    decisive: Finding | None = None


def judge(tallies: Sequence[Tally]) -> list[Verdict]:
    """A verdict per tally, in order."""
    best = max(range(len(tallies)), key=lambda i: tallies[i].weight_db, default=0)
    clashing = [_absolute_clash(tally) for tally in tallies]
    verdicts = []
    for i, tally in enumerate(tallies):
        against = clashing[i] or _relative_clash(tally, tallies[best])
        if against is not None:
            verdicts.append(Verdict(CLASHES, against.text, against))
        else:
            others = _others(tally, tallies)
            rest = [tallies[k] for k in others if clashing[k] is None]
            fallen = [tallies[k] for k in others if clashing[k] is not None]
            verdicts.append(_standing(tally, rest, fallen))
    return verdicts


def shares(tallies: Sequence[Tally]) -> list[float]:
    """Posterior probability of each structure among those put up, equal before any reading."""
    if not tallies:
        return []
    top = max(t.weight_db for t in tallies)
    ratios = [odds(t.weight_db - top) for t in tallies]
    return [ratio / fsum(ratios) for ratio in ratios]


def _others(tally: Tally, tallies: Sequence[Tally]) -> list[int]:
    """Places of the structures that are another compound."""
    identity = tally.expected.structure.inchikey
    return [k for k, t in enumerate(tallies) if t.expected.structure.inchikey != identity]


def _standing(tally: Tally, rest: Sequence[Tally], fallen: Sequence[Tally]) -> Verdict:
    """``rest``: the others not ruled out, ``fallen``: those ruled out."""
    ahead = max((t.weight_db - tally.weight_db for t in rest), default=-1e9)
    if tally.weight_db < ENOUGH:
        return Verdict(UNDECIDED, "The readings so far say too little for it.")
    if ahead > 0:
        return Verdict(UNDECIDED, f"Another structure is {ahead:.0f} ahead.")
    if ahead > (-TELLS_APART if _kinds_that_speak(tally) > 1 else -ONE_KIND_APART):
        return Verdict(UNDECIDED, f"Another structure is only {-ahead:.0f} behind.")
    if any(t.weight_db > tally.weight_db for t in fallen):
        # What rules the better one out may itself be wrong: a formula mistyped, a stray band.
        return Verdict(UNDECIDED, "A structure that is ruled out suits the readings better.")
    readings = _by_reading(tally.findings)
    if strain(readings) > STRAINED:
        worst = min(readings, key=lambda f: f.weight_db)
        return Verdict(UNDECIDED, f"Too much does not suit it, most of all: {worst.text}", worst)
    return Verdict(FITS, "The readings suit it, and no other structure put up comes near.")


def _kinds_that_speak(tally: Tally) -> int:
    return len({f.kind.split(".")[0] for f in tally.findings if abs(f.weight_db) >= _SPEAKS})


def strain(readings: Sequence[Finding]) -> float:
    """What speaks against a structure beyond one odd reading, per reading, in decibans.

    ``readings``: one finding per reading. A signal that has a name of its own is no strain.
    """
    against = fsum(-f.weight_db for f in readings if f.weight_db < 0 and not _is_named_stranger(f))
    return max(against - _FORGIVEN, 0.0) / max(len(readings), _FEW)


def _is_named_stranger(finding: Finding) -> bool:
    return finding.kind.endswith(".stray") and bool(finding.source)


def _absolute_clash(tally: Tally) -> Finding | None:
    readings = _by_reading(tally.findings)
    worst = min(readings, key=lambda f: f.weight_db, default=None)
    if worst is None:
        return None
    ruled_out = worst.weight_db <= RULES_OUT or tally.weight_db <= TOTAL_AGAINST
    return worst if ruled_out or strain(readings) > BROKEN else None


def _relative_clash(tally: Tally, best: Tally) -> Finding | None:
    """The finding that sets a structure back most against the best, when it is far behind."""
    if best.weight_db - tally.weight_db < BEHIND:
        return None
    theirs = {_key(f): f.weight_db for f in _by_reading(best.findings)}
    against = {_key(f) for f in tally.findings if f.weight_db < 0}
    # Only a reading that has something against the structure can be the reason given.
    mine = [f for f in _by_reading(tally.findings) if _key(f) in against]
    nothing = Finding("all", tally.weight_db - best.weight_db, _NOTHING_ALONE, (), ())
    return min(mine, key=lambda f: f.weight_db - max(theirs.get(_key(f), 0.0), 0.0), default=nothing)


def _key(finding: Finding) -> tuple[str, ...]:
    return finding.readings or (finding.text,)


def _by_reading(findings: Sequence[Finding]) -> list[Finding]:
    """Findings on one reading joined: their weights summed, the text of the one most against it."""
    joined: dict[tuple[str, ...], list[Finding]] = defaultdict(list)
    for finding in findings:
        joined[_key(finding)].append(finding)
    return [_joined(members) for members in joined.values()]


def _joined(members: list[Finding]) -> Finding:
    least = min(f.weight_db for f in members)
    # Of findings about as bad, a wrong place says more to a chemist than a wrong number of H.
    nearly = [f for f in members if f.weight_db <= min(least + _ABOUT_AS_BAD, 0.0)] or members
    worst = min(nearly, key=lambda f: (not f.kind.endswith(".shift"), f.weight_db))
    total = fsum(f.weight_db for f in members)
    return Finding(worst.kind, total, worst.text, worst.readings, worst.atoms, worst.source)
