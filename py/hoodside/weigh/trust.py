"""How far each kind of evidence is believed: readings of one kind share errors, so their weights are scaled.

A factor of 1 would hold if every reading of the kind were independent of the others given the structure, and
the error model exact. The factors are fitted by tests/bench/fit_trust.py: those that make the truths of the
published cases likeliest among their rivals, cross-validated over compounds.
"""

from __future__ import annotations

TRUST: dict[str, float] = {
    "h1.shift": 0.85,
    "h1.count": 0.35,
    "h1.pattern": 0.3,
    "h1.coupling": 0.75,
    "h1.stray": 0.35,
    "h1.missing": 0.35,
    "c13.shift": 0.42,
    "c13.kind": 0.8,
    "c13.stray": 0.65,
    "c13.missing": 0.65,
    "ir.band": 0.4,
    "ir.missing": 0.4,
    "ir.clear": 0.9,
    "ms.ion": 0.4,
    "ms.molecule": 0.8,
    "ms.isotopes": 0.8,
    "hrms": 1.0,
    "analysis": 1.0,
    "formula": 1.0,
    "wet": 0.9,
}
