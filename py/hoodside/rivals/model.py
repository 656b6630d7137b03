"""What the search for rivals hands back."""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Rival:
    """A structure that might fit as well.

    Attributes:
        smiles: canonical SMILES; a lone stereocentre and mirror images are left unmarked.
        how: how it was reached, one entry per move, in a chemist's words.
        distance: number of moves from the intended structure (0: found by complete enumeration alone).
        plausibility: 0 to 1, for ranking only; no probability.
    """

    smiles: str
    how: tuple[str, ...]
    distance: int
    plausibility: float


@dataclass(frozen=True, slots=True)
class RivalsFound:
    """Rivals, most plausible first. ``complete``: every sensible isomer is among them."""

    rivals: tuple[Rival, ...]
    complete: bool
    note: str
