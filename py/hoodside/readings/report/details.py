"""What is printed with a 1H signal: pattern, couplings, number of H, assignment, in any order."""

from __future__ import annotations

import re
from dataclasses import dataclass, field

from hoodside.readings.patterns import is_pattern, normalise_pattern
from hoodside.readings.report.plain import split_terms
from hoodside.readings.spin_systems import names_spin_system

NUMBER = r"\d{1,4}(?:\.\d{1,6})?"
COUNT = re.compile(
    rf"(?P<n>{NUMBER})\s*(?:H(?:'?s)?|protons?)(?![a-z0-9(]|\s?-\s?[A-Z])(?:\s*\(?(?P<each>each)\)?)?(?:\s+in\s+all)?"
    rf"|(?P<each2>each)\s+(?P<n2>{NUMBER})\s*H(?![a-z0-9])"
)
GROUPS = re.compile(r"(?P<times>\d)\s*x\s*(?:[A-Z][A-Za-z]*-?)?(?P<group>CH3|CH2|CH|Me|NH2|NH|OH)\b")
_HELD = {"CH3": 3, "Me": 3, "CH2": 2, "NH2": 2, "CH": 1, "NH": 1, "OH": 1}
_SUBSCRIPT = (
    r"(?:\s?[_^]?\s?(?:\([^()]{1,24}\)|\{[^{}]{1,24}\}|\[[^\[\]]{1,24}\]"
    r"|\d{1,2}[a-z]?'*(?=\s*[=:~])|\d{1,2}[a-z]?'*\s?[,\-/]\s?\d{1,2}[a-z]?'*(?=\s*[=:~])|\d{1,2}[a-z]?'*[,\-/]\d{1,2}[a-z]?'*(?=\s+\d)"
    r"|H?\d{0,2}[HCFPD][\s,\-]{0,2}\d{0,2}[HCFPD]\d{0,2}(?![a-z])|[A-Z]{2}(?![a-z])"
    r"|(?:gem|vic|cis|trans|ortho|meta|para|o|m|p|ax|eq|aa|ae|ee)\b(?:[,\-](?:ax|eq))?))?"
)
J_HEAD = re.compile(
    rf"(?:(?P<times>\d)\s*x\s*)?(?:\d\s?)?J(?:'?s)?{_SUBSCRIPT}\s*(?:values?|[=:~≈]|of|is|ca\.?|\s){{0,4}}\s*"
)
# A whole number may also be a locant ("2,6-H") and is then no J.
_J_VALUE = re.compile(
    r"(?:(?P<times>\d)\s*x\s*)?[-+~<>]?\s?"
    r"(?P<j>\d{1,4}\.\d{1,6}|\d{1,4}(?!\.?\d|'*(?:,\s?\d{1,2}'*){0,4}-[A-Z]))(?!\d)"
    rf"(?:\s?-\s?(?P<to>{NUMBER})(?!\d))?(?!\s*H(?!z)|\s*x\s*[A-Z]|\s*x\s*\d\s*H|\s?%)"
    r"(?:\s?\(?\s?x\s?(?P<times2>\d)(?!\s?H)\)?|\s?\((?P<times3>\d)\s?x\))?\s*(?P<hz>Hz|hz|HZ|cps|c/s)?\.?"
)
J_WITH_UNIT = re.compile(rf"-?{NUMBER}(?:\s?-\s?{NUMBER})?\s*(?:Hz|cps)")
_J_NEXT = re.compile(r"\s*(?:,|;|and|&|/|or)\s*(?=[-+~]?\s?\d)")
_REPEAT = re.compile(r"(?P<times>[2-6])\s*(?:x\s*)?(?=(?:br\.?\s*|app\.?\s*)?[sdtqm]{1,4}(?:\b|'))")
_SPACE = re.compile(r"[\s.,;:]+")
_WORDS = re.compile(r"[A-Za-z][A-Za-z'.]*(?:[\s\-]+[A-Za-z][A-Za-z'.]*){0,4}")
_UPPER_PATTERN = re.compile(r"(?:[SDTQM]|DD|DT|TD|ABq|AB ?q|BS|BR)\.?|A[ A-Za-z'\d]*")
_LARGEST_J = 100.0


@dataclass(slots=True)
class Details:
    """What was said of one signal."""

    mult: str = ""
    j: list[float] = field(default_factory=list)
    n: float | None = None
    each: bool = False
    repeat: int = 1  # "2 x s": so many patterns of the kind
    notes: list[str] = field(default_factory=list)
    broad: bool = False
    system: str = ""  # the spin system named in place of a pattern
    unclear: list[tuple[int, int]] = field(default_factory=list)
    bare: bool = False  # printed without brackets, so that a comma may end it
    j_open: bool = False  # a list of J has begun and no unit closed it

    @property
    def empty(self) -> bool:
        """Whether nothing was said."""
        return not (self.mult or self.j or self.n or self.notes or self.broad)

    @property
    def is_ab(self) -> bool:
        """Whether it is an AB pattern: two doublets that may have been printed as one signal."""
        return self.mult == "ABq" or (self.system == "AB" and len(self.j) == 1)

    @property
    def pattern(self) -> str:
        """The canonical pattern with what was said of its breadth."""
        if self.broad and not self.mult.startswith("br"):
            return f"br {self.mult or 's'}"
        return self.mult


def read_group(plain: str, start: int, end: int, into: Details) -> None:
    """Read the content of a bracket behind a shift."""
    for begin, stop in split_terms(plain, start, end):
        _read_term(plain, begin, stop, into)


def _read_term(plain: str, start: int, end: int, into: Details) -> None:
    at = start
    while at < end:
        space = _SPACE.match(plain, at, end)
        if space:
            at = space.end()
            continue
        step = read_token(plain, at, end, into)
        if step == at:
            _note(plain, at, end, into)
            return
        at = step


def read_token(plain: str, at: int, end: int, into: Details) -> int:
    """Read one thing at an offset; answers the offset behind it, or the same when it is nothing known."""
    for read in (_read_count, _read_couplings, _read_loose_j, _read_repeat, _read_pattern):
        step = read(plain, at, end, into)
        if step > at:
            return step
    return at


def _read_count(plain: str, at: int, end: int, into: Details) -> int:
    found = COUNT.match(plain, at, end)
    if not found:
        return at
    into.n = float(found["n"] or found["n2"]) if into.n is None else into.n
    into.each = into.each or bool(found["each"] or found["each2"])
    into.j_open = False
    return found.end()


def _read_couplings(plain: str, at: int, end: int, into: Details) -> int:
    if plain[at] != "J" and not plain[at].isdigit():
        return at
    head = J_HEAD.match(plain, at, end)
    if not head:
        return at
    stop = _read_values(plain, head.end(), end, into, int(head["times"] or 1))
    return stop if stop > head.end() else at


def _read_values(plain: str, at: int, end: int, into: Details, times: int = 1) -> int:
    """Read a list of J values; answers the offset behind the last one."""
    done = at
    while True:
        value = _J_VALUE.match(plain, at, end)
        if not value:
            return done
        j = _mean(value["j"], value["to"])
        if j > _LARGEST_J:
            return done
        repeat = times * int(value["times"] or value["times2"] or value["times3"] or 1)
        into.j.extend([j] * repeat)
        into.j_open = not value["hz"]
        done = value.end()
        more = _J_NEXT.match(plain, done, end)
        if not more or (into.bare and not J_WITH_UNIT.match(plain, more.end(), end)):
            return done
        at = more.end()


def _mean(low: str, high: str | None) -> float:
    return (float(low) + float(high)) / 2 if high else float(low)


def _read_loose_j(plain: str, at: int, end: int, into: Details) -> int:
    """A value in Hz without its J, or the next of a list of J that a comma cut off."""
    value = _J_VALUE.match(plain, at, end)
    if not value or float(value["j"]) > _LARGEST_J:
        return at
    decimal = "." in value["j"]
    if value["hz"] or into.j_open or (decimal and into.mult and not into.j):
        return _read_values(plain, at, end, into)
    return at


def _read_repeat(plain: str, at: int, end: int, into: Details) -> int:
    groups = GROUPS.match(plain, at, end)
    if groups:
        into.notes.append(groups[0])
        return groups.end()
    found = _REPEAT.match(plain, at, end)
    if not found or into.mult:
        return at
    into.repeat = int(found["times"])
    return found.end()


def _read_pattern(plain: str, at: int, end: int, into: Details) -> int:
    words = _WORDS.match(plain, at, end)
    if not words:
        return at
    system = re.match(
        r"[ABMXYK\d'\s]{2,14}(?:system|m\b|part\b|pattern\b|type\b)?(?![A-Za-z])", plain[at:end]
    )
    if system and not into.mult and names_spin_system(system[0].strip()):
        into.mult, into.system = "m", system[0].split()[0]
        return at + system.end()
    # The longest run of words that names a pattern: "br s" before "br".
    ends = [m.end() for m in re.finditer(r"[A-Za-z'.]+", words[0])]
    for length in reversed(ends):
        name = words[0][:length]
        if names_pattern(name) and not _GOES_ON.match(plain, at + length):
            return _take_pattern(name, at + length, into)
    return at


_GOES_ON = re.compile(r"\w|-\s?[A-Z]")  # "p-H" is an assignment, not a quintet


def names_pattern(name: str) -> bool:
    """Whether words stand for a pattern: in small letters, or in capitals that are no atom."""
    lower = name == name.lower() or (name[1:] == name[1:].lower() and len(name) > 3)
    return (lower or _UPPER_PATTERN.fullmatch(name) is not None) and is_pattern(name)


def _take_pattern(name: str, stop: int, into: Details) -> int:
    pattern = normalise_pattern(name)
    broad_only = pattern == "br s" and not re.search(r"s(?:inglet)?\b|bs", name.replace("br.", "br"))
    if broad_only:
        into.broad = True
    elif into.mult:
        # A second pattern with the first ("s and m", "dd (app t)"): lines overlap or are named twice.
        into.mult = into.mult if pattern.startswith("app") else "m"
    else:
        into.mult = pattern
    return stop


_NOISE = re.compile(
    r"(?:and|each|overlapp?(?:ing|ed)?|obscured|partially|including|incl|ppm|of|at|with|hz|the)\b", re.I
)
_LONGEST_NOTE = 60


def _note(plain: str, start: int, end: int, into: Details) -> None:
    text = " ".join(plain[start:end].split())
    if _NOISE.fullmatch(text):
        into.each = into.each or text == "each"
        return
    if re.search(r"[A-Za-z]", text) and len(text) <= _LONGEST_NOTE:
        into.notes.append(text)
        into.j_open = False
    elif text:
        into.unclear.append((start, end))


def hydrogens_noted(notes: list[str]) -> float | None:
    """Number of H told by a note such as "2 x CH3"; None when no note tells it."""
    for note in notes:
        found = GROUPS.fullmatch(note)
        if found:
            return float(int(found["times"]) * _HELD[found["group"]])
    return None
