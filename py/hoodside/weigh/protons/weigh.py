"""1H signals against one structure: findings, links, and what is left over on either side."""

from __future__ import annotations

from collections.abc import Iterator, Sequence

from hoodside.predict.model import ProtonGroup
from hoodside.readings import Readings
from hoodside.weigh.finding import Finding, Leftover, Link, Weighed
from hoodside.weigh.protons.assign import NOWHERE
from hoodside.weigh.protons.pattern import Patterns, is_pair
from hoodside.weigh.protons.score import SEEMS_COMPLETE, Terms, is_trace
from hoodside.weigh.protons.signals import prepare
from hoodside.weigh.protons.solve import Solution, solve
from hoodside.weigh.trust import trust
from hoodside.weigh.words import amount, atoms_of, capital, group_name, listed, plural_h, printed

_COUNTED = "counted over published spectra (facts/multiplicity_confusion.csv)"
_STRAY_SOURCE = "Gottlieb et al. 1997; Fulmer et al. 2010 (facts/impurities.csv)"
_COMMON = "common practice"
#: Few lists of signals that are weighed lack a quarter of the H or more, decibans.
_UNFINISHED = -12.0
#: Sets of H named one by one in a sentence.
_NAMED = 3
#: Further than this many deviations from a signal its sets of H are off it rather than in it.
_OFF = 1.5


def weigh_protons(groups: Sequence[ProtonGroup], patterns: Patterns, readings: Readings) -> Weighed:
    """All 1H signals of the readings against the predicted groups of a structure."""
    if not readings.h1:
        return Weighed()
    solution = solve(groups, patterns, prepare(readings), readings.raw_integrals)
    findings: list[Finding] = []
    for k in range(len(solution.signals)):
        findings += _of_signal(solution, readings, k)
    findings += _missing_findings(solution)
    return Weighed(
        tuple(findings),
        tuple(_links(solution)),
        tuple(_missing(solution)),
        tuple(_strays(solution, readings)),
    )


def _of_signal(solution: Solution, readings: Readings, k: int) -> Iterator[Finding]:
    members = solution.members(k)
    if not members:
        yield _stray_finding(solution, readings, k)
        return
    terms = solution.scorer.terms(k, members)
    held = [solution.groups[m] for m in members]
    ref, atoms = (f"h1:{k}",), atoms_of(held)
    signal = readings.h1[k]
    yield Finding(
        "h1.shift", trust("h1.shift") * terms.place, _place_text(solution, k, held), ref, atoms, _source(held)
    )
    yield Finding("h1.count", trust("h1.count") * terms.count, _count_text(solution, k, held), ref, atoms)
    if signal.mult:
        text = _pattern_text(solution, k, members)
        yield Finding("h1.pattern", trust("h1.pattern") * terms.pattern, text, ref, atoms, _COUNTED)
    if terms.coupling:
        text = _coupling_text(solution, k, members, terms)
        yield Finding(
            "h1.coupling", trust("h1.coupling") * terms.coupling, text, ref, atoms, "facts/couplings_hh.csv"
        )


def _source(held: list[ProtonGroup]) -> str:
    return "; ".join(dict.fromkeys(term.source for group in held for term in group.terms))


def _place_text(solution: Solution, k: int, held: list[ProtonGroup]) -> str:
    signal = solution.signals[k]
    if len(held) == 1 or is_pair(held):
        group = held[0]
        if group.exchangeable and group.lo is not None and group.hi is not None:
            where = _against_range(signal.ppm, group.lo, group.hi)
            return (
                f"δ {printed(signal)}: {where} the {group.lo:g} to {group.hi:g} ppm usual for "
                f"{group_name(group)}."
            )
        off = signal.ppm - group.ppm
        how = f"{abs(off):.2f} ppm {'higher' if off > 0 else 'lower'}" if abs(off) >= 0.1 else "as expected"
        return (
            f"δ {printed(signal)}: {group_name(group)} expected at {group.ppm:.2f} ± {group.sd:.2f}; {how}."
        )
    named = listed([f"{group_name(g)} at {g.ppm:.2f} ± {g.sd:.2f}" for g in held[:_NAMED]])
    more = f", {len(held) - _NAMED} more sets of H" if len(held) > _NAMED else ""
    if all(max(signal.lo - g.ppm, g.ppm - signal.hi) > _OFF * g.sd for g in held):
        return f"δ {printed(signal)}: no H is expected just here; nearest are {named}{more}."
    return f"δ {printed(signal)}: {len(held)} sets of H would overlap here: {named}{more}."


def _against_range(ppm: float, lo: float, hi: float) -> str:
    if lo <= ppm <= hi:
        return "within"
    return f"{lo - ppm:.2f} ppm below" if ppm < lo else f"{ppm - hi:.2f} ppm above"


def _count_text(solution: Solution, k: int, held: list[ProtonGroup]) -> str:
    due, signal = sum(g.n for g in held), solution.signals[k]
    where, names = f"δ {printed(signal)}", listed([group_name(g) for g in held][:_NAMED])
    if signal.n is None:
        return f"{where}: no number of H given; {plural_h(due)} placed here."
    if abs(signal.n - due) < 0.5:
        return f"{where}: {plural_h(due)} expected and found."
    return f"{where}: {amount(signal.n)} H found where the structure has {due} H ({names})."


def _pattern_text(solution: Solution, k: int, members: tuple[int, ...]) -> str:
    awaited = solution.scorer.patterns.awaited(members)
    signal, held = solution.signals[k], [solution.groups[m] for m in members]
    where = f"δ {printed(signal)}: printed {signal.pattern}"
    if awaited.kind == "several":
        return f"{where}; {len(members)} different sets of H of this structure overlap here."
    if awaited.kind == "exchangeable":
        return f"{where}; exchangeable H usually come as one line, often broad."
    note = " from the neighbours of this CH₂" if is_pair(held) else ""
    return f"{where}; expected {awaited.as_read(signal.pattern)}{note}."


def _coupling_text(solution: Solution, k: int, members: tuple[int, ...], terms: Terms) -> str:
    signal = solution.signals[k]
    verb = "agrees with" if terms.coupling > 0 else "does not suit"
    expected = solution.scorer.patterns.awaited(members).as_read(signal.pattern)
    return (
        f"δ {printed(signal)}: J = {', '.join(f'{j:g}' for j in signal.j)} Hz {verb} the expected {expected}."
    )


def _stray_finding(solution: Solution, readings: Readings, k: int) -> Finding:
    signal = solution.signals[k]
    return Finding(
        "h1.stray",
        trust("h1.stray") * signal.stray.weight_db,
        f"{_stray_text(solution, k)}",
        (f"h1:{k}",),
        (),
        _STRAY_SOURCE if signal.stray.name else "",
    )


def _stray_text(solution: Solution, k: int) -> str:
    signal = solution.signals[k]
    stray, size = signal.stray, f", {amount(signal.n)} H" if signal.n else ""
    if is_trace(signal):
        return f"δ {printed(signal)}: {stray.likely}."
    tail = f"; {stray.name} would come here, but hardly so much of it" if stray.usual else ""
    return f"δ {printed(signal)}{size}: nothing in the structure explains it{tail}."


def _missing_findings(solution: Solution) -> Iterator[Finding]:
    if solution.scorer.listed < 1:
        yield from _unfinished(solution)
    for g, (group, s) in enumerate(zip(solution.groups, solution.given, strict=True)):
        if s == NOWHERE:
            text = _missing_text(group)
            yield Finding(
                "h1.missing",
                trust("h1.missing") * solution.scorer.missing(g),
                text,
                (),
                group.atoms,
                _source([group]),
            )


def _unfinished(solution: Solution) -> Iterator[Finding]:
    """What it costs a structure to take the list for unfinished: most lists that are weighed are whole."""
    fixed = [(g.n, s) for g, s in zip(solution.groups, solution.given, strict=True) if not g.exchangeable]
    due, found = sum(n for n, _ in fixed), sum(n for n, s in fixed if s != NOWHERE)
    if 0 < found < SEEMS_COMPLETE * due:
        text = f"Only {found} of the {due} H on carbon have a signal: the list would be unfinished."
        yield Finding("h1.missing", trust("h1.missing") * _UNFINISHED, text, (), (), _COMMON)


def _missing_text(group: ProtonGroup) -> str:
    if group.exchangeable:
        name = capital(group_name(group))
        return f"{name} not seen: it may hide under another signal, be broad, or have exchanged."
    return f"{plural_h(group.n)}, {group_name(group)}, expected near δ {group.ppm:.2f}, not seen."


def _missing(solution: Solution) -> Iterator[Leftover]:
    for g, (group, s) in enumerate(zip(solution.groups, solution.given, strict=True)):
        if s == NOWHERE:
            yield Leftover(f"h1:{g}", _missing_text(group), group_name(group), group.atoms)


def _strays(solution: Solution, readings: Readings) -> Iterator[Leftover]:
    for k in range(len(readings.h1)):
        if not solution.members(k):
            yield Leftover(f"h1:{k}", _stray_text(solution, k), solution.signals[k].stray.name)


def _links(solution: Solution) -> Iterator[Link]:
    for g, (group, s) in enumerate(zip(solution.groups, solution.given, strict=True)):
        if s != NOWHERE:
            yield Link(f"h1:{s}", f"h1:{g}", group.atoms)
