"""Reads molecular formulas as chemists type them."""

from __future__ import annotations

import re

from hoodside.errors import FormulaError
from hoodside.molecule import Structure
from hoodside.predict.formula.mend import suggestion
from hoodside.predict.formula.model import Formula
from hoodside.predict.formula.symbols import NAMED_NUCLIDES, known_elements, known_nuclides

MAX_CHARS = 200
MAX_COUNT = 5_000

_PLAIN = str.maketrans("₀₁₂₃₄₅₆₇₈₉₊₋⁺⁻⁰¹²³⁴⁵⁶⁷⁸⁹−–•∙⋅·*{}", "0123456789+-+-0123456789--.....[]")
_RAISED = re.compile("[⁰¹²³⁴⁵⁶⁷⁸⁹]+")  # a charge or a mass number
_TRAILING = " \t\r\n.,;"
_OPEN, _CLOSE = "([", ")]"
_LABEL = re.compile(r"\[(\d+)([A-Z][a-z]?)\]|\^(\d+)([A-Z][a-z]?)")
_SYMBOL = re.compile(r"[A-Z][a-z]?")
_COUNT = re.compile(r"\d+")
_BARE_LABEL = re.compile(r"\d+[A-Z][a-z]?")
_MULTIPLE = re.compile(r"\d+/\d+|\d*\.\d+|\d+")
_CHARGE = re.compile(r"(?:\^|(?<=\]))(\d*)([+-]+)$|\s(\d+)([+-])$|([+-]+)(\d*)$")
_LONE_ION = re.compile(r"([A-Z][a-z]?)(\d)([+-])$")


def parse_formula(text: str) -> Formula:
    """Read a formula: "C10H12O", "C6H5NH3+", "[C6H8N]+", "CuSO4.5H2O", "C5[13C]H6", "C6D6", "C₆H₆".

    Raises: FormulaError pointing at the character that cannot be read, with the mend where it is plain.
    """
    counts, charge = parse_composition(text)
    if broken := [s for s, n in counts.items() if n != int(n)]:
        raise FormulaError(
            f"{text!r} holds a fraction of an atom ({broken[0]} {counts[broken[0]]:g}).",
            hint="Give the formula of the compound without its solvate, or a whole multiple.",
            field="formula",
            value=text,
        )
    return Formula.of({symbol: int(n) for symbol, n in counts.items()}, charge)


def parse_composition(text: str) -> tuple[dict[str, float], int]:
    """Like ``parse_formula`` for what a combustion analysis needs: counts may be fractions ("·0.5H2O").

    Returns: nuclide symbol -> number of atoms, and the charge in e. Raises: FormulaError.
    """
    plain = _RAISED.sub(r"^\g<0>", text).translate(_PLAIN).rstrip(_TRAILING)
    if not plain.strip():
        raise FormulaError("The formula is empty.", hint='Write it like "C10H12O".', field="formula")
    if len(plain) > MAX_CHARS:
        raise FormulaError(
            f"The formula is {len(plain)} characters long; the limit is {MAX_CHARS}.",
            hint="Give one formula on its own.",
            field="formula",
            value=text,
        )
    body, charge = _split_charge(plain)
    counts: dict[str, float] = {}
    start = 0
    while start <= len(body):
        part = _Part(body, start, text)
        _add(counts, part.read())
        start = part.end + 1
    return counts, charge


def formula_of(structure: Structure) -> Formula:
    """The formula of a structure; labelled atoms keep their mass number (deuterium as "2H")."""
    counts: dict[str, int] = {}
    for atom in structure.atoms:
        symbol = f"{atom.isotope}{atom.symbol}" if atom.isotope else atom.symbol
        counts[symbol] = counts.get(symbol, 0) + 1
        if atom.hydrogens:
            counts["H"] = counts.get("H", 0) + atom.hydrogens
    return Formula.of(counts, structure.charge)


def _split_charge(plain: str) -> tuple[str, int]:
    """Body and charge. "Ca2+" is a lone ion; in "C6H8N2+" the 2 belongs to N."""
    if lone := _LONE_ION.fullmatch(plain.strip()):
        return lone[1], int(lone[2]) * (1 if lone[3] == "+" else -1)
    found = _CHARGE.search(plain)
    if found is None:
        return plain, 0
    signs = found[2] or found[4] or found[5]
    size = found[1] or found[3] or found[6]
    return plain[: found.start()], (int(size) if size else len(signs)) * (1 if signs[0] == "+" else -1)


def _add(total: dict[str, float], more: dict[str, float], times: float = 1) -> None:
    for symbol, count in more.items():
        total[symbol] = total.get(symbol, 0) + count * times


class _Part:
    """Reads one part of a salt or hydrate, left to right, a stack level per open bracket."""

    def __init__(self, body: str, start: int, typed: str) -> None:
        self.body = body
        self.typed = typed
        self.at = self.end = start
        self.opened: list[tuple[int, str]] = []

    def read(self) -> dict[str, float]:
        times = self._multiple()
        # Past its multiple, which may hold a decimal point, a part ends at the next dot.
        self.end = self.body.find(".", self.at) % (len(self.body) + 1)
        levels: list[dict[str, float]] = [{}]
        while self._skip_space() < self.end:
            if (label := _LABEL.match(self.body, self.at, self.end)) is not None:
                _add(levels[-1], self._nuclide(label))
            elif (letter := self.body[self.at]) in _OPEN:
                self.opened.append((self.at, letter))
                levels.append({})
                self.at += 1
            elif letter in _CLOSE:
                self._close(letter)
                _add(levels[-2], levels.pop(), self._count())
            else:
                _add(levels[-1], self._element())
        if self.opened:
            self._fail(self.opened[-1][0], "is never closed", "Close the bracket.")
        if not levels[0]:
            self._fail(min(self.at, len(self.body)), "stands where a formula should", "Remove the stray dot.")
        return {symbol: n * times for symbol, n in levels[0].items()}

    def _multiple(self) -> float:
        start, self.end = self.at, len(self.body)
        found = _MULTIPLE.match(self.body, self._skip_space())
        if found is None:
            return 1
        self.at = found.end()
        label = _BARE_LABEL.match(self.body, found.start())
        if start == 0 and label and label[0] in known_nuclides():
            self._fail(
                found.start(), "starts a mass number without brackets", f"Write [{label[0]}] for a label."
            )
        top, _, bottom = found[0].partition("/")
        if float(bottom or 1) == 0 or not 0 < float(top) <= MAX_COUNT:
            self._fail(found.start(), "starts a multiple that cannot be", "Check the number.")
        return float(top) / float(bottom or 1)

    def _skip_space(self) -> int:
        while self.at < self.end and self.body[self.at].isspace():
            self.at += 1
        return self.at

    def _nuclide(self, label: re.Match[str]) -> dict[str, float]:
        key = (label[1] or label[3]) + (label[2] or label[4])
        if key not in known_nuclides():
            self._fail(label.start(), f"starts {label[0]!r}, no known nuclide", "Check the mass number.")
        self.at = label.end()
        return {key: self._count()}

    def _element(self) -> dict[str, float]:
        found = _SYMBOL.match(self.body, self.at, self.end)
        symbol = found[0] if found else ""
        if symbol not in known_elements() and symbol not in NAMED_NUCLIDES:
            symbol = symbol[:1]  # "Cn" may be C then a stray n: let the n be what is pointed at
        if symbol not in known_elements() and symbol not in NAMED_NUCLIDES:
            self._fail(self.at, "is no element symbol", "")
        self.at += len(symbol)
        return {NAMED_NUCLIDES.get(symbol, symbol): self._count()}

    def _close(self, letter: str) -> None:
        if not self.opened or _OPEN.index(self.opened[-1][1]) != _CLOSE.index(letter):
            self._fail(self.at, "closes a bracket that was not opened", "Pair the brackets.")
        self.opened.pop()
        self.at += 1

    def _count(self) -> int:
        found = _COUNT.match(self.body, self._skip_space(), self.end)
        if found is None:
            return 1
        if found[0][0] == "0":
            self._fail(self.at, "starts a count", "Write the letter O for oxygen; leave out zero counts.")
        if len(found[0]) > 4 or int(found[0]) > MAX_COUNT:
            self._fail(self.at, f"starts a count above {MAX_COUNT}", "Check the number.")
        self.at = found.end()
        return int(found[0])

    def _fail(self, at: int, what: str, hint: str) -> None:
        mark = self.body[at] if at < len(self.body) else "end"
        if not hint:
            better = suggestion(self.typed.translate(_PLAIN))
            hint = f"Did you mean {better}?" if better else "Use element symbols and counts, as in C10H12O."
        raise FormulaError(
            f"{mark!r} at character {at + 1} of {self.typed!r} {what}.",
            hint=hint,
            field="formula",
            value=self.typed,
        )
