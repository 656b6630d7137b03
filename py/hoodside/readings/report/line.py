"""Reads a pasted report: finds its lists, has each read, says what was not understood."""

from __future__ import annotations

from hoodside.readings.report.analysis import read_analysis
from hoodside.readings.report.carbon import read_carbons
from hoodside.readings.report.guess import guess_kind
from hoodside.readings.report.infrared import read_infrared
from hoodside.readings.report.mass import read_high_res, read_mass
from hoodside.readings.report.model import Gathered, ParsedReport
from hoodside.readings.report.plain import plain_text
from hoodside.readings.report.proton import read_protons
from hoodside.readings.report.sections import (
    ANALYSIS,
    ASIDE,
    CARBON,
    HIGH_RES,
    INFRARED,
    MASS,
    PROTON,
    Section,
    find_sections,
)

#: Longer texts are read up to here. Ten thousand lines of a report are well within.
MOST_CHARS = 1_000_000
_READERS = {
    PROTON: read_protons,
    CARBON: read_carbons,
    INFRARED: read_infrared,
    HIGH_RES: read_high_res,
    ANALYSIS: read_analysis,
}
_NAMES = {
    PROTON: "1H list",
    CARBON: "13C list",
    INFRARED: "IR list",
    MASS: "list of masses",
    HIGH_RES: "accurate mass",
    ANALYSIS: "combustion analysis",
}


def parse_report(text: str) -> ParsedReport:
    """Read report lines as chemists write them: 1H, 13C, IR, mass, accurate mass, combustion, in any order.

    Args:
        text: anything; what lies beyond ``MOST_CHARS`` is left unread and said so.
    Returns: the readings; each stretch of the text with what it was taken for; each stretch that could not
        be read, with the reason. Offsets count characters of ``text``. Raises nothing.
    Source: ACS Style Guide and journal author guidelines (ACS, RSC, Wiley); variants are common practice.
    """
    plain = plain_text(text[:MOST_CHARS])
    gathered = Gathered(text)
    sections = find_sections(plain)
    _read_untitled(plain, sections[0].start if sections else len(plain), gathered)
    for section in sections:
        _read_section(plain, section, gathered)
    if len(text) > MOST_CHARS:
        gathered.missed(MOST_CHARS, len(text), f"Only the first {MOST_CHARS} characters are read.")
    return gathered.finished()


def _read_untitled(plain: str, end: int, into: Gathered) -> None:
    """Text before the first heading: a list of its own, or the title of what follows."""
    kind = guess_kind(plain, 0, end)
    if kind:
        _run(kind, plain, 0, end, into)
    elif end < len(plain):
        into.took(0, end, "title or text, not a reading")
    else:
        into.missed(0, end, "It has no heading such as 1H NMR, 13C NMR, IR or MS, and looks like no list.")


def _read_section(plain: str, section: Section, into: Gathered) -> None:
    if section.kind == ASIDE:
        into.took(section.start, section.end, f"{section.head.strip()}: recognised, not used")
        return
    kind = section.kind
    if section.head.strip() == "NMR":  # the nucleus is not named: the numbers tell
        kind = guess_kind(plain, section.body, section.end) or kind
    if _has_already(kind, into):
        into.missed(section.start, section.end, f"A second {_NAMES[kind]}; one case holds one.")
        return
    # In these the heading can be a word of the line itself: "Found: C, 81.0".
    whole = kind in (ANALYSIS, HIGH_RES)
    if not whole:
        into.took(section.start, section.body, _NAMES[kind])
    _run(kind, plain, section.start if whole else section.body, section.end, into, section.head)


def _run(kind: str, plain: str, start: int, end: int, into: Gathered, head: str = "") -> None:
    if kind == MASS:
        read_mass(plain, start, end, into, head)
    else:
        _READERS[kind](plain, start, end, into)


def _has_already(kind: str, into: Gathered) -> bool:
    """Whether a list of this kind was read before (of masses, ``read_mass`` decides by the ionisation)."""
    held = {PROTON: into.h1, CARBON: into.c13, INFRARED: into.ir, ANALYSIS: into.analysis}
    return bool(held.get(kind)) or (kind == HIGH_RES and into.hrms is not None and into.hrms.calc is not None)
