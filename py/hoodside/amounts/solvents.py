"""Molar masses and proton counts of common impurities, for solvent content (facts/impurities.csv)."""

from __future__ import annotations

from dataclasses import dataclass

from hoodside.facts import load_table


@dataclass(frozen=True, slots=True)
class ImpuritySignal:
    """One 1H signal of a common solvent or impurity in one NMR solvent."""

    compound: str
    smiles: str
    ppm: float
    protons: float
    mult: str
    source: str


def impurity_signals(solvent: str) -> tuple[ImpuritySignal, ...]:
    """All tabulated 1H signals with their proton counts in an NMR solvent, e.g. "CDCl3"."""
    column = solvent.replace("-", "_")
    found = []
    for row in load_table("impurities"):
        if row["nucleus"] == "1H" and row.get(column) and row["n_H"] and _is_number(row[column]):
            found.append(
                ImpuritySignal(
                    row["compound"],
                    row["smiles"],
                    float(row[column]),
                    float(row["n_H"]),
                    row["multiplicity"],
                    row["source"],
                )
            )
    return tuple(found)


def residues(solvent: str) -> dict[str, tuple[ImpuritySignal, ...]]:
    """What may be left in a product, with its signals in an NMR solvent; what stays most comes first."""
    found: dict[str, tuple[ImpuritySignal, ...]] = {
        row["compound"]: () for row in load_table("usual_residues")
    }
    for signal in impurity_signals(solvent):
        found[signal.compound] = (*found.get(signal.compound, ()), signal)
    return {compound: signals for compound, signals in found.items() if signals}


def _is_number(cell: str) -> bool:
    try:
        float(cell)
    except ValueError:
        return False
    return True
