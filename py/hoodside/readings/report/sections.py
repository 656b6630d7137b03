"""Cuts a report into its lists: 1H, 13C, IR, mass, accurate mass, combustion, and what is no reading."""

from __future__ import annotations

import re
from dataclasses import dataclass

PROTON, CARBON, INFRARED, MASS, HIGH_RES, ANALYSIS, ASIDE = (
    "proton",
    "carbon",
    "infrared",
    "mass",
    "high_res",
    "analysis",
    "aside",
)


#: No paste holds more lists; what follows belongs to the last.
MOST_SECTIONS = 300


@dataclass(frozen=True, slots=True)
class Section:
    """One list: its head runs from ``start`` to ``body``, its content from there to ``end``."""

    kind: str
    head: str
    start: int
    body: int
    end: int


_G = r"\s{0,9}"  # taken-out markup leaves gaps
_DECOUPLED = rf"(?:{_G}[{{(\[]\s?1?{_G}H\s?[}})\]])?"
_SOFT = r"(?:ESI|EI|CI|FAB|APCI|APPI|MALDI|DART|Q-?TOF|TOF|FD|FI)"
_HYPHEN = r"[\s-]{0,9}"
#: Headings of each kind of list; the first alternative that fits counts.
_HEADINGS = {
    "nucleus": (
        rf"(?:19{_G}F|31{_G}P|11{_G}B|29{_G}Si|15{_G}N|77{_G}Se|119{_G}Sn|195{_G}Pt|27{_G}Al|7{_G}Li|2{_G}H)"
        rf"{_DECOUPLED}{_HYPHEN}NMR",
        r"DEPT[\s-]?\d{0,3}|HSQC|HMBC|COSY|NOESY|APT|2D\s?NMR",
    ),
    CARBON: (
        rf"13{_G}C{_DECOUPLED}[\s,-]{{0,9}}(?:DEPT[-Q\s]?\d{{0,3}}|APT|CPD)?{_HYPHEN}(?:NMR|APT|MAS)",
        rf"13{_G}C(?=\s{{0,3}}[(:])",
        r"C-?\s?NMR|CMR",
        rf"NMR[\s-]{{0,3}}\(?13{_G}C\)?",
        r"[δd]_?C(?=\s{0,4}[=:(/]|\s+\d|\d{2})",
        r"δ\s{1,9}C(?=[\s=:(/])",
    ),
    PROTON: (
        rf"1{_G}H{_HYPHEN}NMR",
        rf"1{_G}H(?=\s{{0,3}}\(\d{{2,3}}\s?MHz)",
        r"H-?\s?NMR|PMR",
        rf"NMR[\s-]{{0,3}}\(?1{_G}H\)?",
        r"[δd]_?H(?=\s{0,4}[=:(/]|\s+-?\d|\d)",
        r"δ\s{1,9}H(?=[\s=:(/])",
        r"NMR(?=\s{0,3}\()",
    ),
    HIGH_RES: (
        rf"HR[-\s]?{_SOFT}?[-\s]?(?:TOF)?[-\s]?MS(?![a-z])",
        rf"(?:{_SOFT}[-\s/]HR[-\s]?|LC[-/\s]?HR)MS(?![a-z])",
        r"(?i:accurate\smass|exact\smass|high[-\s]resolution\s(?:mass(?:\sspectr\w*)?|MS))",
        r"(?i:found)\s?:?\s*(?=[\[(]?M[\s+\-\]H])",
    ),
    MASS: (
        rf"(?:(?:LR|GC|LC|HPLC|UPLC|UPLC-ESI|LC-ESI|GC-EI|{_SOFT})[-\s/]?)?MS(?:-{_SOFT})?(?![A-Za-z])",
        r"(?i:mass\s(?:spectrum|spectrometry|spec\.?))",
        r"[mM]\s?/\s?[zZe](?![A-Za-z])",
    ),
    INFRARED: (
        r"(?:FT|ATR|FT-ATR|ATR-FT)?[-\s]?IR(?![A-Za-z])",
        r"(?i:infrared)",
        rf"[νv]_?{_G}max|[νv]~?(?=\s?[=:(/])",
    ),
    ANALYSIS: (
        r"(?i:(?:elem(?:ental|\.)\s{0,2})?anal(?:ysis|yses|\.)?(?=[\s,:(]))",
        r"(?i:microanal\w*)|EA(?=[\s:(])",
        r"(?i:calc(?:d|ulated)?\.?)\s*(?:\(%\)\s*)?(?:%\s*)?(?:for|:)\s"
        r"(?=[^;]{3,60}?C[,:\s]\s?\d\d[.,]\d{1,2}\D{1,4}H)",
        r"(?i:found)\s?(?:\(%\))?:?\s*(?=C[,:\s]\s?\d{2})",
    ),
    ASIDE: (
        r"(?i:[mb]\.?\s?p\.?(?=\s?[:=]?\s?[\d(<>])|melting\spoint|boiling\spoint)",
        r"R\s?_?f(?=\s?[\s=:(\d])|\[\s?[αa]\s?\]|n\s?_?D\d*(?=[\s=])",
        r"UV(?:[-/\s]?[Vv]is)?(?=[\s:(,])|λ\s?_?max",
        r"(?i:yield)(?=\s?[:=(\d\s])|(?:TLC|HPLC)(?=[\s:(])",
        r"(?i:colou?rless|white|yellow|pale|off-white|orange)\s(?=\w)",
    ),
}
_HEAD = re.compile(
    r"(?<![A-Za-z0-9\\-])(?:"
    + "|".join(f"(?P<{kind}>{'|'.join(forms)})" for kind, forms in _HEADINGS.items())
    + ")"
)
#: Headings that, inside a list of these kinds, belong to the list.
_INNER = (
    (re.compile(r"[δd]\s*_?[HC]|NMR"), (PROTON, CARBON)),
    (re.compile(r"[νv].*"), (INFRARED,)),
    (re.compile(r"[mM]\s?/\s?[zZe]"), (MASS, HIGH_RES)),
    (re.compile(r"(?i:exact mass|accurate mass|found)\W*"), (HIGH_RES, MASS)),
    (re.compile(r"(?i:found|calc).*", re.DOTALL), (ANALYSIS,)),
)
#: What may stand before a heading that is no NMR list.
_BEFORE = ".,;:)]|>"
_ALWAYS = (PROTON, CARBON)


def find_sections(plain: str) -> list[Section]:
    """The lists of a report in their order. Text before the first heading is in none of them."""
    heads: list[tuple[str, str, int, int]] = []
    for found in _HEAD.finditer(plain):
        kind = _kind(found)
        head = found[0]
        if not _may_stand(plain, found.start(), kind) or (heads and _within(heads[-1][0], kind, head)):
            continue
        heads.append((kind, head, found.start(), found.end()))
        if len(heads) == MOST_SECTIONS:
            break
    starts = [start for _, _, start, _ in heads[1:]]
    return [Section(*head, end) for head, end in zip(heads, [*starts, len(plain)], strict=False)]


def _kind(found: re.Match[str]) -> str:
    name = found.lastgroup or ASIDE
    return ASIDE if name == "nucleus" else name


def _may_stand(plain: str, start: int, kind: str) -> bool:
    """Whether a heading may begin here: NMR headings anywhere, others only where a sentence may."""
    if kind in _ALWAYS:
        return True
    at = start - 1
    while at >= 0 and plain[at] == " ":
        at -= 1
    if at < 0 or plain[at] == "\n" or plain[at] in _BEFORE:
        return True
    return plain[at] == "(" and kind in (ANALYSIS, HIGH_RES)


def _within(open_kind: str, kind: str, head: str) -> bool:
    """Whether a heading belongs to the list that is open already."""
    if kind == ASIDE and open_kind == ASIDE:
        return True
    same = kind == open_kind or {kind, open_kind} <= {MASS, HIGH_RES}
    return same and any(open_kind in kinds and rule.fullmatch(head.strip()) for rule, kinds in _INNER)
