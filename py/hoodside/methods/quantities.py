"""Amounts from integrals and masses."""

from __future__ import annotations

from typing import TYPE_CHECKING, Any

if TYPE_CHECKING:
    from hoodside.amounts.standards import Standard


def amounts(**question: Any) -> dict[str, Any]:
    """Answer one question about amounts; see ``hoodside.amounts.question.answer``."""
    from hoodside.amounts.question import answer

    return answer(question)


def amount_tables(nmr_solvent: str = "CDCl3") -> dict[str, Any]:
    """Internal standards, and what may be left in a product with its signals in one NMR solvent."""
    from hoodside.amounts.solvents import residues
    from hoodside.amounts.standards import standards
    from hoodside.readings.solvents import solvent_asked

    asked = solvent_asked(nmr_solvent, "nmr_solvent", "CDCl3")
    return {
        "standards": [_standard(entry) for entry in standards()],
        "residues": [
            {"name": name, "signals": [{"ppm": s.ppm, "protons": s.protons, "mult": s.mult} for s in signals]}
            for name, signals in residues(asked).items()
        ],
    }


def _standard(entry: Standard) -> dict[str, Any]:
    return {
        "name": entry.name,
        "molar_mass": entry.molar_mass,
        "signals": [{"ppm": ppm, "protons": protons} for ppm, protons in entry.lines],
        "notes": entry.notes,
        "source": entry.source,
    }
