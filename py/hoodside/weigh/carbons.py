"""13C lines against one structure: a pairing in the order of shifts, and what it says.

For a pairing: log of the product over predicted groups of the chance to lie where their line is, over the
spread of lines of published compounds. Two groups may share a line (accidental equivalence) at the price of
the chance to lie just there; quaternary carbons may be too faint to be listed.
"""

from __future__ import annotations

from collections.abc import Iterator, Sequence
from dataclasses import dataclass
from functools import lru_cache
from math import hypot

from hoodside.predict.model import CarbonGroup
from hoodside.readings import CarbonLine, Readings
from hoodside.weigh.background import spread
from hoodside.weigh.decibans import decibans, odds, t_between
from hoodside.weigh.finding import Finding, Leftover, Link, Weighed
from hoodside.weigh.impurities import Stray, carbon_stray
from hoodside.weigh.trust import trust
from hoodside.weigh.words import capital, carbon_name

#: A printed line stands for places this far to either side, ppm (rounding and reference).
_HALF = 0.15
#: Lines this near are often seen as one, ppm.
_COINCIDE = 0.4
#: Share of predictions or lines that are wrong outright.
_WRONG = 0.03
#: Added in quadrature to the stated deviation of a shift, ppm; see the note in ``protons.score``.
_ADDED = 1.2
#: A group whose line is not listed, decibans: with and without H of its own (common practice).
_MISSING_WITH_H, _MISSING_QUATERNARY = -14.0, -11.0
#: Share of kinds of carbon (DEPT) that are misread.
_KIND_WRONG = 0.03
_KINDS = 4
#: A line too many where fluorine, or slow rotation, may give two lines for one carbon, decibans.
_DOUBLED = -6.0
SPLIT_BY_FLUORINE, SECOND_ROTAMER = "a line split by fluorine", "a line of a second rotamer"
#: Chance of a gap in a list that seems complete, and the share of lines that may lack before it does not.
_SURELY_LISTED, _FORGIVEN = 0.002, 0.25
_FEW_SOURCE = "Gottlieb et al. 1997; Fulmer et al. 2010 (facts/impurities.csv)"


@dataclass(frozen=True, slots=True)
class _Line:
    given: CarbonLine
    anyhow_db: float
    stray: Stray


def weigh_carbons(groups: Sequence[CarbonGroup], readings: Readings, doubled: str = "") -> Weighed:
    """All 13C lines of the readings against the predicted groups of a structure.

    ``doubled``: what a line too many would be in this structure, "" where every line counts.
    """
    if not readings.c13:
        return Weighed()
    lines = _all_prepared(readings.c13, readings.solvent, doubled)
    given = pair_lines(groups, lines)
    listed = share_listed(groups, lines)
    findings = [*_line_findings(groups, lines, given), *_missing_findings(groups, given, listed)]
    return Weighed(
        tuple(findings),
        tuple(Link(f"c13:{k}", f"c13:{g}", groups[g].atoms) for g, k in enumerate(given) if k >= 0),
        tuple(
            Leftover(f"c13:{g}", _missing_text(groups[g]), carbon_name(groups[g]), groups[g].atoms)
            for g, k in enumerate(given)
            if k < 0
        ),
        tuple(
            Leftover(f"c13:{k}", _stray_text(line), line.stray.name)
            for k, line in enumerate(lines)
            if k not in given
        ),
    )


@lru_cache(maxsize=8)
def _all_prepared(lines: tuple[CarbonLine, ...], solvent: str, doubled: str) -> list[_Line]:
    return [_prepared(line, solvent, doubled) for line in lines]


def _prepared(line: CarbonLine, solvent: str, doubled: str) -> _Line:
    share = spread("c13_background").between(line.ppm - _HALF, line.ppm + _HALF)
    stray = carbon_stray(line, solvent)
    if doubled and stray.weight_db < _DOUBLED:
        stray = Stray(_DOUBLED, doubled)
    return _Line(line, decibans(share), stray)


def pair_lines(groups: Sequence[CarbonGroup], lines: Sequence[_Line]) -> list[int]:
    """The line of each group, -1 where none is left, by dynamic programming over both orders of shift."""
    order = sorted(range(len(groups)), key=lambda g: -groups[g].ppm)
    places = sorted(range(len(lines)), key=lambda k: -lines[k].given.ppm)
    suits = [[place_weight(groups[g], lines[k].given, lines[k].anyhow_db) for k in places] for g in order]
    listed = share_listed(groups, lines)
    gaps = [missing_weight(groups[g], listed) for g in order]
    strays = [lines[k].stray.weight_db for k in places]
    shared = [lines[k].anyhow_db for k in places]
    back = _fill(suits, gaps, strays, shared)
    given, i, j, fresh = [-1] * len(groups), len(order), len(places), True
    while i or j:
        step = back[i][j][0 if fresh else 1]
        if step in ("take", "share"):
            given[order[i - 1]] = places[j - 1]
            i -= 1
            if step == "take":
                j -= 1
            fresh = step == "take"
        elif step == "gap":
            i -= 1
        else:
            j -= 1
    return given


_LOST = -1e9


def _fill(
    suits: list[list[float]], gaps: list[float], strays: list[float], shared: list[float]
) -> list[list[tuple[str, str]]]:
    """Steps back from every (groups, lines) cell.

    State 0: all so far is settled. State 1: the last line is still open to be shared, and has been counted.
    """
    n, m = len(gaps), len(strays)
    best = [[0.0] * (m + 1) for _ in range(n + 1)]
    open_ = [[_LOST] * (m + 1) for _ in range(n + 1)]
    back = [[("", "")] * (m + 1) for _ in range(n + 1)]
    for i in range(n + 1):
        for j in range(m + 1):
            if i == 0 and j == 0:
                continue
            options, sharing = [], []
            if i:
                options.append((best[i - 1][j] + gaps[i - 1], "gap"))
            if j:
                options.append((best[i][j - 1] + strays[j - 1], "stray"))
            if i and j:
                own = suits[i - 1][j - 1]
                options.append((best[i - 1][j - 1] + own, "take"))
                # One more group in the same line: its chance to be there, without a line of its own.
                more = own + shared[j - 1] + decibans(_COINCIDE / _HALF)
                options.append((open_[i - 1][j] + more, "share"))
                sharing += [(best[i - 1][j - 1] + own, "take"), (open_[i - 1][j] + more, "share")]
                if i > 1:
                    sharing.append((open_[i - 1][j] + gaps[i - 1], "gap"))
            best[i][j], first = max(options)
            open_[i][j], second = max(sharing, default=(_LOST, ""))
            back[i][j] = (first, second)
    return back


def place_weight(group: CarbonGroup, line: CarbonLine, anyhow_db: float) -> float:
    """Weight of a line at its place, and of its kind where told, for a group."""
    lo, hi = line.ppm - _HALF, line.ppm + _HALF
    inside = t_between(lo, hi, group.ppm, hypot(group.sd, _ADDED))
    weight = decibans((1 - _WRONG) * inside + _WRONG * odds(anyhow_db)) - anyhow_db
    return weight + _kind_weight(group, line)


def _kind_weight(group: CarbonGroup, line: CarbonLine) -> float:
    if not line.kind:
        return 0.0
    chance = 1 - _KIND_WRONG if line.kind == group.kind else _KIND_WRONG / (_KINDS - 1)
    return decibans(chance * _KINDS)


def missing_weight(group: CarbonGroup, listed: float) -> float:
    """Weight of a group without a line, decibans; ``listed``: lines over groups, at most 1.

    While a list is still being typed, a carbon without line is most likely one not typed yet.
    """
    usual = _MISSING_QUATERNARY if group.kind == "C" else _MISSING_WITH_H
    return max(usual, decibans(max(1 - listed, _SURELY_LISTED)))


def share_listed(groups: Sequence[CarbonGroup], lines: Sequence[_Line]) -> float:
    """Lines over groups, at most 1. A few lines short is accidental equivalence, half of them a stub."""
    return min(_FORGIVEN + len(lines) / max(len(groups), 1), 1.0)


def _line_findings(groups: Sequence[CarbonGroup], lines: list[_Line], given: list[int]) -> Iterator[Finding]:
    for k, line in enumerate(lines):
        held = [g for g, place in enumerate(given) if place == k]
        ref = (f"c13:{k}",)
        if not held:
            text, source = _stray_text(line), _stray_source(line.stray)
            yield Finding("c13.stray", trust("c13.stray") * line.stray.weight_db, text, ref, (), source)
            continue
        weight = line.anyhow_db * (len(held) - 1) + decibans(_COINCIDE / _HALF) * (len(held) - 1)
        kinds = 0.0
        for g in held:
            kinds += _kind_weight(groups[g], line.given)
            weight += place_weight(groups[g], line.given, line.anyhow_db) - _kind_weight(
                groups[g], line.given
            )
        atoms = tuple(sorted({a for g in held for a in groups[g].atoms}))
        first = groups[held[0]]
        source = first.terms[0].source if first.terms else ""
        yield Finding(
            "c13.shift",
            trust("c13.shift") * weight,
            _line_text(line, [groups[g] for g in held]),
            ref,
            atoms,
            source,
        )
        if kinds:
            yield Finding(
                "c13.kind", trust("c13.kind") * kinds, _kind_text(line, first), ref, atoms, "DEPT or HSQC"
            )


def _missing_findings(groups: Sequence[CarbonGroup], given: list[int], listed: float) -> Iterator[Finding]:
    for group, k in zip(groups, given, strict=True):
        if k < 0:
            weight = trust("c13.missing") * missing_weight(group, listed)
            yield Finding("c13.missing", weight, _missing_text(group), (), group.atoms)


def _line_text(line: _Line, held: list[CarbonGroup]) -> str:
    ppm = line.given.ppm
    if len(held) > 1:
        named = ", ".join(f"{carbon_name(g)} at {g.ppm:.1f} ± {g.sd:.1f}" for g in held)
        return f"δ {ppm:.1f}: {len(held)} carbons would coincide here: {named}."
    group = held[0]
    off = ppm - group.ppm
    how = f"{abs(off):.1f} ppm {'higher' if off > 0 else 'lower'}" if abs(off) > group.sd else "as expected"
    return f"δ {ppm:.1f}: {carbon_name(group)} expected at {group.ppm:.1f} ± {group.sd:.1f}; {how}."


def _kind_text(line: _Line, group: CarbonGroup) -> str:
    return f"Seen as {line.given.kind}; the structure has {group.kind} there."


def _stray_source(stray: Stray) -> str:
    if stray.name in (SPLIT_BY_FLUORINE, SECOND_ROTAMER):
        return "common practice"
    return _FEW_SOURCE if stray.name else ""


def _stray_text(line: _Line) -> str:
    if line.stray.name:
        return f"δ {line.given.ppm:.1f}: {line.stray.likely}."
    return f"δ {line.given.ppm:.1f}: no carbon of the structure explains it."


def _missing_text(group: CarbonGroup) -> str:
    tail = "; carbons without H are often too faint" if group.kind == "C" else ""
    return f"{capital(carbon_name(group))} expected near δ {group.ppm:.1f}, not listed{tail}."
