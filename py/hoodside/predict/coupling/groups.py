"""Kinds of substituent as couplings feel them (facts/coupling_groups.csv)."""

from __future__ import annotations

from dataclasses import dataclass
from functools import cache

from hoodside.facts import load_table
from hoodside.molecule import Structure


@dataclass(frozen=True, slots=True)
class GroupKind:
    """One row of the table."""

    key: str
    smarts: str
    electronegativity: float  # Altona's lambda, H = 0
    a_value: float  # kcal/mol
    bulk: str  # class in gauche_energies.csv
    ortho_23: float  # Hz, J of the benzene H next to the substituent with the next one
    ortho_34: float  # Hz, J further away
    meta_24: float  # Hz
    meta_26: float  # Hz, across the substituent
    source: str


@cache
def group_kinds() -> tuple[GroupKind, ...]:
    """All kinds, general ones first."""
    return tuple(
        GroupKind(
            row["key"],
            f"[$({row['smarts']})]",
            float(row["lambda"]),
            float(row["a_kcal"]),
            row["bulk"],
            float(row["ortho_23"]),
            float(row["ortho_34"]),
            float(row["meta_24"]),
            float(row["meta_26"]),
            row["source"],
        )
        for row in load_table("coupling_groups")
    )


def kinds_of_atoms(structure: Structure) -> dict[int, GroupKind]:
    """The kind of group that begins at each atom (the last row of the table that fits)."""
    found: dict[int, GroupKind] = {}
    kinds = group_kinds()
    for kind, matches in zip(kinds, structure.match_all([k.smarts for k in kinds]), strict=True):
        for match in matches:
            found[match[0]] = kind
    return found


@cache
def gauche_energy(a: str, b: str) -> float:
    """Cost in kcal/mol of two groups standing gauche; 0 with hydrogen."""
    return _gauche_table().get((a, b), 0.0)


@cache
def _gauche_table() -> dict[tuple[str, str], float]:
    table: dict[tuple[str, str], float] = {}
    for row in load_table("gauche_energies"):
        table[row["a"], row["b"]] = table[row["b"], row["a"]] = float(row["kcal"])
    return table
