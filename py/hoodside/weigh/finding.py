"""What weighing gives: findings, and which reading was given to which prediction."""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Finding:
    """One piece of evidence for (above 0) or against (below 0) one structure."""

    kind: str  # "h1.shift", "c13.lines", "ir.band", ...
    weight_db: float
    text: str  # the reason, in a chemist's words
    readings: tuple[str, ...] = ()  # "h1:2", "ir_clear:0"; empty for what was expected and not seen
    atoms: tuple[int, ...] = ()
    source: str = ""

    def to_dict(self) -> dict[str, object]:
        """JSON-ready form, the weight to a tenth of a deciban."""
        return {
            "kind": self.kind,
            "weight_db": round(self.weight_db, 1) + 0.0,
            "text": self.text,
            "readings": list(self.readings),
            "atoms": list(self.atoms),
            "source": self.source,
        }


@dataclass(frozen=True, slots=True)
class Link:
    """A reading and the prediction it was given to."""

    reading: str  # "h1:0"
    predicted: str  # "h1:1"
    atoms: tuple[int, ...]

    def to_dict(self) -> dict[str, object]:
        """JSON-ready form."""
        return {"reading": self.reading, "predicted": self.predicted, "atoms": list(self.atoms)}


@dataclass(frozen=True, slots=True)
class Leftover:
    """Something on one side that has no partner on the other."""

    ref: str  # a reading ("h1:3") or a prediction ("h1:2")
    text: str
    name: str = ""  # what it probably is: "water", "ethyl acetate"
    atoms: tuple[int, ...] = ()

    def to_dict(self) -> dict[str, object]:
        """JSON-ready form."""
        return {"ref": self.ref, "text": self.text, "name": self.name, "atoms": list(self.atoms)}


@dataclass(frozen=True, slots=True)
class Weighed:
    """What one kind of reading says about one structure."""

    findings: tuple[Finding, ...] = ()
    links: tuple[Link, ...] = ()
    missing: tuple[Leftover, ...] = ()
    unexplained: tuple[Leftover, ...] = ()
