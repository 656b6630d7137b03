"""The check: readings and candidates in, tallies, verdicts and advice out, all JSON-ready."""

from __future__ import annotations

from collections.abc import Sequence
from contextlib import suppress
from dataclasses import dataclass, replace
from itertools import count
from typing import TYPE_CHECKING, Any

from hoodside.advise.next import Standing, advise
from hoodside.errors import FormulaError, StructureError
from hoodside.molecule.structure import read_structure
from hoodside.predict.formula import parse_formula, unsaturation
from hoodside.predict.model import ProtonGroup
from hoodside.put_up import POOL, candidates_of, expected_of, put_up_of, rivals_of, stated_of
from hoodside.readings import Readings
from hoodside.readings.from_json import readings_from_json
from hoodside.weigh.finding import Leftover
from hoodside.weigh.sentence import name_of, sentence
from hoodside.weigh.structure import Tally, weigh_structure
from hoodside.weigh.verdict import CLASHES, Verdict, judge, shares
from hoodside.weigh.words import capital, listed

if TYPE_CHECKING:
    from hoodside.rivals import Rival


@dataclass(frozen=True, slots=True)
class Ranked:
    """One candidate with its place in the input, verdict and share."""

    index: int | None  # place among the candidates given; None for a rival
    name: str  # "structure A", "rival 2"
    tally: Tally
    verdict: Verdict
    share: float
    how: tuple[str, ...] = ()  # how a rival was reached, one entry per move


def check_case(case: dict[str, Any]) -> dict[str, Any]:
    """Weigh all readings of a check object against its candidates.

    The object and the answer are those of the command line's ``check``; per candidate the answer also holds
    ``formula``, ``ok_formula``, ``missing``, ``unexplained``, ``expected`` (1H groups), ``reason`` and
    ``sentence``. Raises: InvalidInputError or StructureError naming the field.
    """
    readings = readings_from_json(case)
    candidates = candidates_of(case)
    stay = (*stated_of(case), *put_up_of(case))
    ranked = rank(readings, candidates, rivals_of(case, readings, candidates), stay)
    formula = _formula(readings, ranked)
    warnings = [*readings.warnings, *_doubts(readings, ranked)]
    return {
        "id": readings.id,
        "formula": formula[0],
        "dbe": formula[1],
        "warnings": warnings,
        "candidates": [_candidate(i, ranked) for i in range(len(ranked))],
        "next": [entry.to_dict() for entry in advise(readings, _standing(ranked))],
    }


def _standing(ranked: Sequence[Ranked]) -> list[Standing]:
    return [
        Standing(place, r.name, r.share, r.tally.expected)
        for place, r in enumerate(ranked)
        if r.verdict.verdict != CLASHES
    ]


def rank(
    readings: Readings,
    candidates: Sequence[str],
    rivals: Sequence[Rival] = (),
    stated: Sequence[tuple[str, Rival]] = (),
) -> list[Ranked]:
    """Candidates and rivals weighed and judged, best first. Raises: StructureError naming the candidate.

    Of ``rivals`` the best are kept; those with what they are called, ``stated`` ("" for no name), all stay.
    """
    tallies = [_tally(source, readings, f"candidates[{i}]") for i, source in enumerate(candidates)]
    mine = {t.expected.structure.inchikey for t in tallies}
    if rivals or stated:
        mine |= _as_rivals(tallies)
    left = _once(_others([rival for _, rival in stated], readings, mine))
    mine |= {tally.expected.structure.inchikey for _, tally in left}
    found = sorted(_others(rivals, readings, mine), key=lambda entry: -entry[1].weight_db)
    put_up = [*left, *found[: len(rivals) // POOL]]
    tallies += [t for _, t in put_up]
    called = {rival.smiles: name for name, rival in reversed(stated)}
    numbers = count(1)
    names = [called.get(r.smiles) or f"rival {next(numbers)}" for r, _ in put_up]
    verdicts, parts = judge(tallies), shares(tallies)
    ranked = []
    for i, tally in enumerate(tallies):
        at = i - len(candidates)
        name, how = (name_of(i), ()) if at < 0 else (names[at], put_up[at][0].how)
        ranked.append(Ranked(i if at < 0 else None, name, tally, verdicts[i], parts[i], how))
    return sorted(ranked, key=lambda r: -r.tally.weight_db)


def _others(rivals: Sequence[Rival], readings: Readings, known: set[str]) -> list[tuple[Rival, Tally]]:
    """Rivals weighed, without those whose InChIKey is known already or that nothing can be predicted for."""
    found = []
    for rival in rivals:
        with suppress(StructureError):
            found.append((rival, _tally(rival.smiles, readings, "rivals")))
    return [(rival, tally) for rival, tally in found if tally.expected.structure.inchikey not in known]


def _as_rivals(tallies: Sequence[Tally]) -> set[str]:
    """InChIKeys of candidates in the form of a rival: mirror images as one, a lone centre unmarked."""
    from hoodside.rivals.names import name_of

    return {read_structure(name_of(t.expected.structure.smiles)).inchikey for t in tallies}


def _once(weighed: Sequence[tuple[Rival, Tally]]) -> list[tuple[Rival, Tally]]:
    """The first of each compound."""
    found: dict[str, tuple[Rival, Tally]] = {}
    for rival, tally in weighed:
        found.setdefault(tally.expected.structure.inchikey, (rival, tally))
    return list(found.values())


def _tally(source: str, readings: Readings, field: str) -> Tally:
    return weigh_structure(expected_of(source, readings, field), readings)


def _formula(readings: Readings, ranked: Sequence[Ranked]) -> tuple[str, float | None]:
    """The formula of the case and its unsaturation: as given, else that all candidates share."""
    if readings.formula:
        try:
            formula = parse_formula(readings.formula)
        except FormulaError as err:
            raise FormulaError(str(err), hint=err.hint, field="formula", value=readings.formula) from err
        return formula.text, unsaturation(formula)
    found = {r.tally.expected.formula for r in ranked}
    if len(found) != 1:
        return "", None
    formula = found.pop()
    return formula.text, unsaturation(formula)


def _doubts(readings: Readings, ranked: Sequence[Ranked]) -> list[str]:
    doubts = []
    if not ranked:
        doubts.append("No structure was given; put one up to have the readings weighed.")
    if not _measured(readings):
        doubts.append("Nothing has been measured yet, so no structure is preferred.")
    seen: dict[str, Ranked] = {}
    for r in sorted(ranked, key=lambda r: -1 if r.index is None else r.index):
        key = r.tally.expected.structure.inchikey
        if key in seen:
            doubts.append(f"S{r.name[1:]} is the same compound as {seen[key].name}.")
        seen.setdefault(key, r)
    return doubts


def _measured(readings: Readings) -> bool:
    kinds = (readings.h1, readings.c13, readings.ir, readings.ir_clear, readings.ms, readings.wet)
    return any(kinds) or bool(readings.hrms or readings.analysis)


def _candidate(at: int, ranked: Sequence[Ranked]) -> dict[str, Any]:
    mine = ranked[at]
    tally = mine.tally
    return {
        "smiles": tally.expected.structure.source,
        "origin": "given" if mine.index is not None else "rival",
        "index": mine.index,
        "name": mine.name,
        "formula": tally.expected.formula.text,
        "ok_formula": tally.ok_formula,
        "verdict": mine.verdict.verdict,
        "reason": mine.verdict.reason,
        "sentence": sentence(at, [(r.name, r.tally, r.verdict) for r in ranked]),
        "how": list(mine.how),
        "weight_db": round(tally.weight_db, 1) + 0.0,
        "share": round(mine.share, 4),
        "findings": [f.to_dict() for f in tally.findings],
        "assignment": [link.to_dict() for link in tally.links],
        "missing": [left.to_dict() for left in tally.missing],
        "unexplained": [_with_bearers(left, at, ranked).to_dict() for left in tally.unexplained],
        "expected": [_group(group) for group in tally.expected.h1],
    }


#: A reading suits another structure when its place speaks for it by this much, decibans.
_BEARS = 5.0


def _with_bearers(left: Leftover, at: int, ranked: Sequence[Ranked]) -> Leftover:
    """What a standing structure leaves unexplained, with the others that would show it: a mixture has two."""
    if left.name or ranked[at].verdict.verdict == CLASHES:
        return left
    bearers = [r.name for i, r in enumerate(ranked) if i != at and _bears(r.tally, left.ref)]
    if not bearers:
        return left
    verb = "has" if len(bearers) == 1 else "have"
    return replace(
        left, text=f"{left.text} {capital(listed(bearers))} {verb} a signal there: is it a mixture?"
    )


def _bears(tally: Tally, reading: str) -> bool:
    places = (f for f in tally.findings if f.kind.endswith(".shift") and f.readings == (reading,))
    return any(f.weight_db >= _BEARS for f in places)


def _group(group: ProtonGroup) -> dict[str, Any]:
    return {
        "ppm": round(group.ppm, 3),
        "sd": round(group.sd, 3),
        "mult": group.mult,
        "j": [round(j, 2) for j in group.j],
        "n": group.n,
        "atoms": list(group.atoms),
        "exchangeable": group.exchangeable,
        "environment": group.environment,
        "lo": group.lo,
        "hi": group.hi,
    }
