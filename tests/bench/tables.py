"""How a bench section prints what it measured."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

NAME_WIDTH = 40


@dataclass(frozen=True, slots=True)
class Figure:
    """One measured figure. ``most`` and ``least`` are its target, if it has one."""

    name: str
    value: float
    unit: str = ""
    most: float | None = None
    least: float | None = None
    note: str = ""

    @property
    def target(self) -> str:
        """The target as text, "" when there is none."""
        if self.most is not None:
            return f"<= {self.most:g}"
        return f">= {self.least:g}" if self.least is not None else ""

    @property
    def verdict(self) -> str:
        """ "met" or "missed", "" when there is no target."""
        if not self.target:
            return ""
        low = self.least is not None and self.value < self.least
        high = self.most is not None and self.value > self.most
        return "missed" if low or high else "met"


def print_figures(figures: Sequence[Figure]) -> None:
    """A table: figure, measured, unit, target, whether it was met."""
    width = max(NAME_WIDTH, *(len(figure.name) for figure in figures))
    print(f"  {'':{width}}  {'measured':>10} {'':8} {'target':>9}")
    for figure in figures:
        measured = f"{figure.value:10.4g} {figure.unit:8} {figure.target:>9} {figure.verdict:7}"
        print(f"  {figure.name:{width}}  {measured} {figure.note}".rstrip(), flush=True)
