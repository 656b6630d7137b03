"""Published 1H spectra and atom-mapped table rows as training material for the learned correction."""

from __future__ import annotations

import json
from dataclasses import dataclass
from pathlib import Path

import numpy as np

from bench.proton_matching import Expected, Signal, read_signals
from bench.training import read_rows, recalled
from hoodside.facts import load_table
from hoodside.molecule import read_structure
from hoodside.molecule.symmetry import hydrogen_sets
from hoodside.predict.atom_maps import atom_maps
from hoodside.predict.proton.predict import Site, sites

#: Column of facts/impurities.csv -> solvent.
SOLVENTS = {
    "CDCl3": "CDCl3", "acetone_d6": "acetone-d6", "DMSO_d6": "DMSO-d6", "C6D6": "C6D6", "CD3CN": "CD3CN",
    "CD3OD": "CD3OD", "D2O": "D2O", "CD2Cl2": "CD2Cl2", "THF_d8": "THF-d8", "toluene_d8": "toluene-d8",
}  # fmt: skip
CASES = Path(__file__).resolve().parents[1] / "cases"


@dataclass
class Compound:
    """One compound: its groups of H with scheme value and features, and the signals printed for it."""

    id: str
    key: str  # connectivity, so that stereoisomers and repeats stay together
    smiles: str
    solvent: str
    sites: list[Site]
    signals: list[Signal]
    origin: str  # file of tests/cases

    @property
    def scheme(self) -> np.ndarray:
        return np.array([s.estimate.ppm for s in self.sites])

    def expected(self, ppm: np.ndarray) -> list[Expected]:
        """The groups as the matching sees them, with the shifts now predicted."""
        return [
            Expected(s.exchange.term.value, s.hydrogens.n, True, s.exchange.lo, s.exchange.hi)
            if s.exchange is not None
            else Expected(float(p), s.hydrogens.n, False, float(p), float(p))
            for s, p in zip(self.sites, ppm, strict=True)
        ]


@dataclass
class Row:
    """One assigned hydrogen of a table: the features, the scheme's residual in ppm, its environment."""

    features: dict[str, float]
    residual: float
    environment: str


def load_compounds() -> list[Compound]:
    """Compounds of published.json, products of reactions.json, and those of the facts tables."""
    found = recalled_compounds() + solvent_compounds()
    for name, prefix in (("published", ""), ("reactions", "product_")):
        for case in json.loads((CASES / f"{name}.json").read_text("utf-8")):
            if case.get(f"{prefix}h1"):
                solvent = case.get("solvent") or "CDCl3"
                found.append(
                    compound(case["id"], case[f"{prefix}smiles"], solvent, case[f"{prefix}h1"], name)
                )
    return found


def recalled_compounds() -> list[Compound]:
    """Compounds of tests/cases/training that no reference test checks."""
    return [compound(r.name, r.smiles, r.solvent, list(r.h1), "recalled") for r in recalled() if r.h1]


def solvent_compounds() -> list[Compound]:
    """Common impurities in ten solvents; every third compound is kept back for the reference tests."""
    grouped: dict[tuple[str, str], list[dict[str, str]]] = {}
    for row in load_table("impurities"):
        if row["nucleus"] == "1H" and row["n_H"]:
            grouped.setdefault((row["compound"], row["smiles"]), []).append(row)
    found = []
    for index, ((name, smiles), rows) in enumerate(sorted(grouped.items())):
        if index % 3:
            for column, solvent in SOLVENTS.items():
                printed = [{"ppm": float(r[column]), "n": float(r["n_H"])} for r in rows if r[column]]
                if printed and "[H][H]" not in smiles:
                    found.append(compound(f"{name} in {solvent}", smiles, solvent, printed, "impurities"))
    return found


def compound(name: str, smiles: str, solvent: str, printed: list, origin: str) -> Compound:  # type: ignore[type-arg]
    structure = read_structure(smiles)
    found = sites(structure, solvent)
    return Compound(
        name, structure.inchikey.split("-")[0], smiles, solvent, found, read_signals(printed), origin
    )


def assigned_rows() -> list[Row]:
    """Atom-mapped rows of the ring tables."""
    found = []
    for table in (load_table("proton_rings"), read_rows("proton_heteroaromatic")):
        by_smiles: dict[str, list[dict[str, str]]] = {}
        for row in table:
            if not row.get("conformer"):
                by_smiles.setdefault(row["smiles_with_atom_map"], []).append(row)
        for smiles, rows in by_smiles.items():
            found += _rows_of(smiles, rows)
    return found


def _rows_of(smiles: str, rows: list[dict[str, str]]) -> list[Row]:
    structure = read_structure(smiles)
    maps = atom_maps(smiles)
    by_atom: dict[int, Site] = {}
    solvent = rows[0].get("solvent") or "CDCl3"
    for site in sites(structure, solvent):
        for atom in site.hydrogens.atoms:
            by_atom.setdefault(atom, site)
    found = {}
    for row in rows:
        site = by_atom[maps.index(row["atom_map"])]
        if site.exchange is None:
            residual = float(row["ppm"]) - site.estimate.ppm
            found[id(site)] = Row(site.features, residual, site.estimate.environment)
    return list(found.values())


__all__ = ["Compound", "Row", "assigned_rows", "hydrogen_sets", "load_compounds"]
