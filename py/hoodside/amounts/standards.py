"""Internal standards for purity: where their lines lie and what they do not go with (qnmr_standards.csv)."""

from __future__ import annotations

import re

from hoodside.facts import load_table

_SHORT_NAME = re.compile(r"\s*\([A-Z].*\)$")


def standard_notes(name: str) -> str:
    """What is on record about a standard of that name, with its source; "" for one not in the table."""
    wanted = _plain(name)
    rows = (row for row in load_table("qnmr_standards") if wanted and _plain(row["compound"]) == wanted)
    return next((f"{row['compound']}: {row['solvent_notes']} ({row['source']})." for row in rows), "")


def _plain(name: str) -> str:
    """The name without the abbreviation that may follow it, in small letters."""
    return _SHORT_NAME.sub("", name).strip().lower()
