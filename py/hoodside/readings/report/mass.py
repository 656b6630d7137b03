"""Reads mass spectra and accurate masses."""

from __future__ import annotations

import re

from hoodside.readings.model import HighResMass, MassPeak
from hoodside.readings.report.composition import FORMULA, counts_of, molecule_behind
from hoodside.readings.report.conditions import read_conditions
from hoodside.readings.report.model import Gathered
from hoodside.readings.report.plain import group_end, split_terms

LOWEST, HIGHEST = 1.0, 5000.0
_ADDUCT = re.compile(
    r"[\[(]\s?(?P<inner>\d?M(?:\s?[+-]\s?\d?[A-Za-z][A-Za-z0-9]*)*)\s?(?P<in>\d?[+-])?\s?[\])]\s?(?P<out>(?:\d?[+-]|[+-]\d?)?\s?[•·∙.]?[+-]?)"
    r"|(?<![A-Za-z])(?P<bare>M(?:H|Na|K|NH4|(?:\s?[+-]\s?(?:H|Na|K|NH4|Li|Cl))?)\s?[•·.]?[+-])(?![A-Za-z\d])"
)
_CALCULATED = re.compile(
    r"calc(?:ulate)?d?\b\.?|theor(?:etical|\.)?|requires?d?|\breq\.|expected", re.IGNORECASE
)
_FOUND = re.compile(r"found\b|obsd?\.?|observed|measured|exptl?\.?|experimental", re.IGNORECASE)
_ACCURATE = re.compile(r"(?<![\d.A-Za-z])\d{2,4}\.\d{3,6}(?!\d)")
_PEAK = re.compile(r"(?P<mz>\d{1,4}(?:\.\d{1,6})?)(?![\d.]*\d)(?!\s?(?:eV|%|°|V\b|mL|mg|MHz))")
_GAP = re.compile(r"[\s,;:.=]+|and\b|&|m\s?/\s?[zZe]\b|\(\s?%\s?\)|%|\(\s?rel[^()]{0,30}\)|\[\s?%\s?\]")
_REL = re.compile(r"(?<![A-Za-z\d.\[+-])(?P<rel>\d{1,3}(?:\.\d{1,2})?)\s?%?(?![\w.]*\w)")
_WORD = re.compile(r"[^\s,;()\[\]]+")
_LONG_WORD = re.compile(r"[A-Za-z]{3,}")
_NOTED = re.compile(r"\s?\(\s?[a-z]")
_SOFT = re.compile(r"ESI|APCI|MALDI|FAB|APPI|DART|electrospray|LC-?MS", re.IGNORECASE)
#: Ions that no fragmentation gives: they tell of soft ionisation wherever they are printed.
_SOFT_IONS = ("[M+H]+", "[M+Na]+", "[M+K]+", "[M+NH4]+", "[M-H]-")
_MOST_PROSE = 3
#: Window for the mass of an adduct at unit resolution, ppm.
_UNIT_RESOLUTION = 1000.0


def read_mass(plain: str, start: int, end: int, into: Gathered, head: str = "") -> None:
    """Read peaks, or an accurate mass where calculated and found values are printed."""
    if is_accurate(plain, start, end):
        read_high_res(plain, start, end, into)
        return
    said = read_conditions(plain, start, end)
    soft = bool(_SOFT.search(head) or _SOFT.search(said.text))
    if into.ms and not soft:
        into.missed(start, end, "A second list of masses; one case holds one.")
        return
    if said.end > start and said.text.strip(" :;,."):
        into.took(start, said.end, "mass spectrum" + (" with soft ionisation" if soft else ""))
    at, prose = said.end, 0
    while at < end:
        gap = _GAP.match(plain, at, end)
        if gap:
            at = gap.end()
            continue
        if prose > _MOST_PROSE:  # running text has begun
            into.missed(at, end, "It is no mass peak.")
            return
        stop = _read_peak(plain, at, end, into, soft)
        if stop > at:
            at, prose = stop, 0
            continue
        at, prose = _pass_over(plain, at, end, into), prose + 1


def _pass_over(plain: str, at: int, end: int, into: Gathered) -> int:
    label = _ADDUCT.match(plain, at, end)
    if label and label.end() > at:
        into.took(at, label.end(), f"ion {_adduct_name(label)}")
        return label.end()
    close = group_end(plain, at, end) if plain[at] in "([" else -1
    word = _WORD.match(plain, at, end)
    stop = close if close > 0 else word.end() if word else at + 1
    into.missed(at, stop, "It is no mass peak.")
    return stop


_BEHIND = re.compile(r"\s{0,2}(?=[(\[])")


def _read_peak(plain: str, at: int, end: int, into: Gathered, soft: bool) -> int:
    found = _PEAK.match(plain, at, end)
    if not found or (at and plain[at - 1].isalnum()):
        return at
    rel, adduct, stop = _said_after(plain, found.end(), end)
    mz = float(found["mz"])
    if not LOWEST <= mz <= HIGHEST:
        into.missed(at, stop, f"An m/z lies from {LOWEST:g} to {HIGHEST:g}.")
    elif adduct and (soft or adduct in _SOFT_IONS):
        _take_adduct(plain, at, stop, mz, adduct, into)
    elif soft:
        into.took(at, stop, f"m/z {mz:g}: an ion of soft ionisation without its adduct, not taken over")
    else:
        words = f"m/z {mz:g}" + (f", {rel:g} %" if rel is not None else "")
        into.add(into.ms, MassPeak(mz, rel), at, stop, words)
    return stop


def _take_adduct(plain: str, at: int, stop: int, mz: float, adduct: str, into: Gathered) -> None:
    """An adduct at unit resolution counts as an accurate mass with a wide window."""
    decimals = len(plain[at:stop].split(".")[1].split()[0]) if "." in plain[at : at + 6] else 0
    window = 5.0 if decimals > 3 else _UNIT_RESOLUTION
    if into.hrms is None or into.hrms.ppm > window:
        into.hrms = HighResMass(mz, adduct, None, window)
        into.took(at, stop, f"m/z {mz:g}, {adduct}, to {window:g} ppm")
    else:
        into.took(at, stop, f"m/z {mz:g}, {adduct}: another ion is used instead")


def _said_after(plain: str, at: int, end: int) -> tuple[float | None, str, int]:
    """Height in per cent, adduct, and the offset behind the notes of a peak."""
    rel, adduct, stop = None, "", at
    for _ in range(3):
        bare = _ADDUCT.match(plain, stop + (plain[stop : stop + 1] == " "), end)
        if bare:
            adduct = adduct or _adduct_name(bare)
            stop = bare.end()
            continue
        opening = _BEHIND.match(plain, stop, end)
        close = group_end(plain, opening.end(), end) if opening else -1
        if not opening or close < 0:
            break
        for begin, finish in split_terms(plain, opening.end() + 1, close - 1):
            height = _REL.fullmatch(plain[begin:finish].strip())
            label = _ADDUCT.search(plain, begin, finish)
            rel = float(height["rel"]) if height and rel is None else rel
            adduct = adduct or (_adduct_name(label) if label else "")
        stop = close
    return rel, adduct, stop


def is_accurate(plain: str, start: int, end: int) -> bool:
    """Whether a stretch prints a measured accurate mass beside a calculated one."""
    told = _CALCULATED.search(plain, start, end) or _FOUND.search(plain, start, end)
    return bool(told and _ACCURATE.search(plain, start, end))


def read_high_res(plain: str, start: int, end: int, into: Gathered) -> None:
    """Read "calcd for C10H13O 149.0961, found 149.0963" in any of the usual orders."""
    masses = list(_ACCURATE.finditer(plain, start, min(end, start + 2_000)))
    if not masses:
        into.missed(start, end, "There is no accurate mass with three or more decimals.")
        return
    found, calc = _roles(plain, start, masses)
    label = _ADDUCT.search(plain, start, masses[-1].end() + 40 if masses[-1].end() + 40 < end else end)
    adduct = _adduct_name(label) if label else ""
    formula = _formula(plain, start, masses[-1].end(), end)
    if formula and calc is not None:
        molecule, adduct = molecule_behind(formula, calc, adduct)
        into.formula = into.formula or molecule
    if found is None:
        into.missed(start, masses[-1].end(), "It gives a calculated mass but none that was found.")
        return
    into.hrms = HighResMass(found, adduct or "[M+H]+", calc)
    words = f"accurate mass: found {found:.4f} as {into.hrms.adduct}" + (
        f", calculated {calc:.4f}" if calc else ""
    )
    last = max(masses[-1].end(), label.end() if label else 0)
    into.took(start, last, words + (f", {into.formula}" if into.formula else ""))
    tail = plain[last:end].strip(" .,;:)]\n")
    if len(_LONG_WORD.findall(tail)) > _MOST_PROSE:
        into.missed(last, end, "It says nothing of an accurate mass.")


def _roles(plain: str, start: int, masses: list[re.Match[str]]) -> tuple[float | None, float | None]:
    """(found, calculated) by the word before each mass; a mass alone was found."""
    found = calc = None
    begin = start
    for mass in masses:
        said = plain[begin : mass.start()]
        calculated = max((m.start() for m in _CALCULATED.finditer(said)), default=-1)
        measured = max((m.start() for m in _FOUND.finditer(said)), default=-1)
        behind = plain[mass.end() : mass.end() + 14]
        if calculated == measured == -1 and _NOTED.match(behind):
            calculated = 0 if _CALCULATED.search(behind) else -1
        if calculated > measured:
            calc = float(mass[0]) if calc is None else calc
        elif found is None:
            found = float(mass[0])
        begin = mass.end()
    return found, calc


def _formula(plain: str, start: int, last: int, end: int) -> str:
    for match in FORMULA.finditer(plain, start, min(end, last + 40)):
        if "H" in counts_of(match["formula"]) and re.search(r"\d", match["formula"]):
            return match["formula"].replace(" ", "")
    return ""


def _adduct_name(label: re.Match[str]) -> str:
    """The usual name of a printed adduct: "(M+H)+" and "MH+" are "[M+H]+"."""
    text = (label["bare"] or label["inner"]).replace(" ", "")
    tail = (label["in"] or "") + (label["out"] or "") if not label["bare"] else ""
    core = re.sub(r"^M(H|Na|K|NH4)(?=[+-]?$)", r"M+\1", text.rstrip("+-•·.") if label["bare"] else text)
    sign = "-" if (tail + text[len(core) :]).strip().endswith("-") or core.endswith("-H") else "+"
    return "[M]+." if core == "M" and sign == "+" else f"[{core}]{_charge(tail)}{sign}"


def _charge(tail: str) -> str:
    number = re.search(r"\d", tail)
    return number[0] if number and number[0] != "1" else ""
