"""Internal standards for purity: where their lines lie and what they do not go with (qnmr_standards.csv)."""

from __future__ import annotations

import re
from dataclasses import dataclass

from hoodside.facts import load_table

_SHORT_NAME = re.compile(r"\s*\([A-Z].*\)$")


@dataclass(frozen=True, slots=True)
class Standard:
    """One internal standard: molar mass in g/mol, lines as (ppm, protons), notes on solvents and T1."""

    name: str
    smiles: str
    molar_mass: float
    lines: tuple[tuple[float, int], ...]
    notes: str
    source: str


def standards() -> tuple[Standard, ...]:
    """All standards on record, reference materials first (facts/qnmr_standards.csv)."""
    return tuple(
        Standard(
            _SHORT_NAME.sub("", row["compound"]),
            row["smiles"],
            float(row["molar_mass"]),
            tuple(_line(entry) for entry in row["signals"].split(";")),
            row["solvent_notes"],
            row["source"],
        )
        for row in load_table("qnmr_standards")
    )


def _line(entry: str) -> tuple[float, int]:
    ppm, _, protons = entry.partition(":")
    return float(ppm), int(protons)


def standard_notes(name: str) -> str:
    """What is on record about a standard of that name, with its source; "" for one not in the table."""
    wanted = _plain(name)
    rows = (row for row in load_table("qnmr_standards") if wanted and _plain(row["compound"]) == wanted)
    return next((f"{row['compound']}: {row['solvent_notes']} ({row['source']})." for row in rows), "")


def _plain(name: str) -> str:
    """The name without the abbreviation that may follow it, in small letters."""
    return _SHORT_NAME.sub("", name).strip().lower()
