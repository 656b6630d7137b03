"""Readings: report lines, solvents, bench tests."""

from __future__ import annotations

from typing import Any

from hoodside.facts import load_table
from hoodside.methods.arguments import short_text
from hoodside.predict.wet import wet_tests as all_wet_tests
from hoodside.readings.from_json import readings_from_json, readings_to_json
from hoodside.readings.jcamp.curve import thinned
from hoodside.readings.jcamp.records import MOST_CHARS as MOST_JCAMP_CHARS
from hoodside.readings.jcamp.spectrum import Spectrum
from hoodside.readings.solvents import solvent_names

#: Values that another row of the same solvent gives better.
_SUPERSEDED = "alternative value"
_SHOWN_POINTS = 2_000


def parse(text: str) -> dict[str, Any]:
    """What a pasted report says, what could not be read, and what each stretch of it was taken for."""
    from hoodside.readings.report import MOST_CHARS, parse_report

    parsed = parse_report(short_text(text, "text", most=MOST_CHARS))
    return {
        "readings": readings_to_json(parsed.readings),
        "unread": [{"text": u.text, "start": u.start, "end": u.end, "why": u.why} for u in parsed.unread],
        "pieces": [{"text": p.text, "start": p.start, "end": p.end, "means": p.means} for p in parsed.pieces],
    }


def jcamp(text: str) -> dict[str, Any]:
    """The spectra of a JCAMP-DX file, thinned for display, and the readings taken from them."""
    from hoodside.readings.jcamp import read_jcamp

    found = read_jcamp(short_text(text, "text", most=MOST_JCAMP_CHARS))
    spectra = [_spectrum(spectrum) for spectrum in found.spectra]
    return {
        **spectra[0],
        "readings": readings_to_json(found.readings),
        "warnings": list(found.warnings),
        "spectra": spectra,
    }


def _spectrum(spectrum: Spectrum) -> dict[str, Any]:
    x, y = thinned(spectrum.x, spectrum.y, _SHOWN_POINTS)
    return {
        "kind": spectrum.kind,
        "title": spectrum.title,
        "x": [round(value, 4) for value in x],
        "y": [float(f"{value:.5g}") for value in y],
        "x_unit": spectrum.x_unit,
        "y_unit": spectrum.y_unit,
        "points": len(spectrum.x),
        "peaks": [{"x": p.x, "y": p.y, "note": p.note} for p in spectrum.peaks],
        "nucleus": spectrum.nucleus,
        "mhz": spectrum.mhz,
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


def report(**case: Any) -> dict[str, Any]:
    """The readings of a check object as report lines, in the style of the ACS guidelines."""
    from hoodside.record import report_lines

    return {"lines": list(report_lines(readings_from_json(case)))}
