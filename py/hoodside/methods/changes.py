"""What should have changed on the way from a start to a product."""

from __future__ import annotations

from dataclasses import asdict
from typing import Any

from hoodside.advise import changes as advice
from hoodside.methods.structures import structure_of
from hoodside.predict.whole import USUAL_MHZ, USUAL_SOLVENT
from hoodside.readings.fields import number
from hoodside.readings.solvents import solvent_asked
from hoodside.readings.spans import FIELD


def changes(start: str, product: str, solvent: str = USUAL_SOLVENT, mhz: float = USUAL_MHZ) -> dict[str, Any]:
    """Readings to look for, the most telling first."""
    found = advice.changes(
        structure_of(start, "start"),
        structure_of(product, "product"),
        solvent_asked(solvent, "solvent", USUAL_SOLVENT),
        number(mhz or USUAL_MHZ, "mhz", FIELD),
    )
    return {"changes": [{**asdict(change), "telling": round(change.telling, 1)} for change in found]}
