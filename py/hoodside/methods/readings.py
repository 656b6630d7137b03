"""Readings: report lines, solvents, bench tests."""

from __future__ import annotations

from typing import Any

from hoodside.facts import load_table
from hoodside.methods.arguments import short_text
from hoodside.predict.wet import wet_tests as all_wet_tests
from hoodside.readings.from_json import readings_to_json
from hoodside.readings.solvents import solvent_names

#: Values that another row of the same solvent gives better.
_SUPERSEDED = "alternative value"


def parse(text: str) -> dict[str, Any]:
    """What a pasted report says, what could not be read, and what each stretch of it was taken for."""
    from hoodside.readings.report import MOST_CHARS, parse_report

    parsed = parse_report(short_text(text, "text", most=MOST_CHARS))
    return {
        "readings": readings_to_json(parsed.readings),
        "unread": [{"text": u.text, "start": u.start, "end": u.end, "why": u.why} for u in parsed.unread],
        "pieces": [{"text": p.text, "start": p.start, "end": p.end, "means": p.means} for p in parsed.pieces],
    }


def solvents() -> dict[str, Any]:
    """NMR solvents with the lines they show themselves, ppm."""
    rows = [row for row in load_table("residual_solvents") if _SUPERSEDED not in row["source"]]
    return {
        "solvents": [
            {
                "name": name,
                "h1": [
                    {"ppm": float(row["ppm"]), "what": row["what"], "mult": row["multiplicity"]}
                    for row in rows
                    if row["solvent"] == name and row["nucleus"] == "1H"
                ],
                "c13": [
                    {"ppm": float(row["ppm"]), "what": row["what"]}
                    for row in rows
                    if row["solvent"] == name and row["nucleus"] == "13C"
                ],
            }
            for name in solvent_names()
        ]
    }


def wet_tests() -> dict[str, Any]:
    """The bench tests, what they tell, how they mislead, and their hazards."""
    return {
        "tests": [
            {
                "test": entry.test,
                "aliases": list(entry.aliases),
                "tells": entry.tells,
                "observation": entry.observation,
                "false_results": entry.false_results,
                "hazards": entry.hazards,
                "source": entry.source,
            }
            for entry in all_wet_tests()
        ]
    }
