"""Infrared: regions of the sweep, and what a band may be."""

from __future__ import annotations

from typing import Any

from hoodside.methods.arguments import short_text
from hoodside.predict.infrared import groups_for_band, ir_regions
from hoodside.readings.fields import number
from hoodside.readings.infrared_words import strength_and_shape
from hoodside.readings.spans import WAVENUMBER


def regions() -> dict[str, Any]:
    """The sweep from 4000 to 500 cm-1 in diagnostic regions, highest first, without gaps."""
    return {
        "regions": [
            {
                "id": region.key,
                "lo": region.lo,
                "hi": region.hi,
                "name": region.name,
                "holds": [sentence.rstrip(".") for sentence in region.lives_there.split(". ") if sentence],
                "absence": region.clear_means,
                "source": region.source,
            }
            for region in ir_regions()
        ]
    }


def lookup(cm1: float, strength: str = "", shape: str = "") -> dict[str, Any]:
    """Groups that a band at ``cm1`` (cm-1) may come from, likeliest first."""
    words = strength_and_shape(short_text(strength, "strength"), short_text(shape, "shape"), "band")
    return {
        "groups": [
            {
                "group": entry.group,
                "mode": entry.mode,
                "lo": entry.lo,
                "hi": entry.hi,
                "strength": entry.strength,
                "shape": entry.shape,
                "note": entry.note,
                "artefact": entry.artefact,
                "source": entry.source,
                "closeness": round(entry.score, 4),
            }
            for entry in groups_for_band(number(cm1, "cm1", WAVENUMBER), *words)
        ]
    }
