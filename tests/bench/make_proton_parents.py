"""Turns the atom-mapped ring tables into patterns with open hydrogens and writes facts/proton_parents.csv.

Run it before fit_proton.py, after any change to facts/proton_rings.csv or to
tests/cases/training/proton_heteroaromatic.csv.
The patterns are made beforehand because reading two hundred rings would delay the first answer in a browser.
"""

from __future__ import annotations

import csv
import re
import sys
from pathlib import Path

HERE = Path(__file__).resolve()
sys.path[:0] = [str(HERE.parents[2] / "py")]

from bench.training import read_rows  # noqa: E402
from hoodside.facts import Row, load_table  # noqa: E402
from hoodside.molecule import Atom, Structure, read_structure  # noqa: E402
from hoodside.predict.atom_maps import atom_maps  # noqa: E402
from hoodside.predict.proton.parents import ring_kinds  # noqa: E402

TABLE = HERE.parents[2] / "py" / "hoodside" / "facts" / "proton_parents.csv"
_TOKEN = re.compile(r"\[[^\]]*\]|Br|Cl|[BCNOPSFIbcnops]")
_AMINE = "[NX3;!$(N[CX3]=[O,S]);!$(N-c);!$(NS=O)]"


def parent_rows() -> list[Row]:
    """One row per tabulated parent, largest first."""
    grouped: dict[tuple[str, str], list[Row]] = {}
    for row in read_rows("proton_heteroaromatic"):
        if row["row_type"] == "parent":
            grouped.setdefault((row["ring"], row["smiles_with_atom_map"]), []).append(row)
    for row in load_table("proton_rings"):
        if not row["conformer"]:
            grouped.setdefault((row["name"], row["smiles_with_atom_map"]), []).append(row)
    found = [_parent(name, smiles, rows) for (name, smiles), rows in grouped.items()]
    return sorted(found, key=lambda row: -len(row["hydrogens"].split()))


def _parent(name: str, smiles: str, rows: list[Row]) -> Row:
    plain = read_structure(smiles)
    values = {row["atom_map"]: float(row["ppm"]) for row in rows}
    opened = iter([_open_atom(plain, atom) for atom in plain.atoms])
    places = [(i, values[m]) for i, m in enumerate(atom_maps(smiles)) if m in values]
    return {
        "name": name,
        "smarts": _TOKEN.sub(lambda _: next(opened), smiles),
        "shifts": " ".join(f"{i}:{ppm:.2f}" for i, ppm in places),
        "hydrogens": " ".join(str(atom.hydrogens) for atom in plain.atoms),
        "in_ring": " ".join("1" if plain.rings_of[atom.index] else "0" for atom in plain.atoms),
        "rings": " ".join(sorted(".".join(ring) for ring in ring_kinds(plain))),
        "source": rows[0]["source"],
        "origin": rows[0]["origin"],
    }


def _open_atom(plain: Structure, atom: Atom) -> str:
    """SMARTS for one atom of a parent: what it must be, with its hydrogens free to be replaced."""
    if atom.charge:
        return f"[{atom.symbol.lower() if atom.aromatic else atom.symbol}{atom.charge:+d}]"
    if atom.aromatic:
        return _open_aromatic(plain, atom)
    if atom.symbol == "C":
        return _open_carbon(plain, atom)
    if atom.symbol == "N" and plain.rings_of[atom.index]:
        return "[NX3]" if _is_acylated(plain, atom) or len(plain.neighbours[atom.index]) > 2 else _AMINE
    if (
        atom.symbol == "O"
        and atom.hydrogens
        and any(_is_carbonyl(plain, n) for n in plain.neighbours[atom.index])
    ):
        return "[#7,#8]"
    hydroxyl = atom.symbol == "O" and atom.hydrogens
    return "[OX2H1]" if hydroxyl else f"[{atom.symbol};D{len(plain.neighbours[atom.index])}]"


def _open_aromatic(plain: Structure, atom: Atom) -> str:
    if atom.symbol != "N":
        return f"[{atom.symbol.lower()}]"
    return f"[nX{len(plain.neighbours[atom.index]) + atom.hydrogens};+0]"


def _open_carbon(plain: Structure, atom: Atom) -> str:
    orders = sorted(bond.order for bond in plain.bonds_of[atom.index])
    if plain.rings_of[atom.index]:
        return "[CX4;R]" if orders[-1] == 1 else "[CX3;R]"
    acyl_end = any(_is_carbonyl(plain, n) for n in plain.neighbours[atom.index])
    return (
        "[#6,#7,#8]" if acyl_end else "[CX4]" if orders[-1] == 1 else "[CX3]" if orders[-1] == 2 else "[CX2]"
    )


def _is_acylated(plain: Structure, atom: Atom) -> bool:
    return any(_is_carbonyl(plain, n) or plain.atoms[n].aromatic for n in plain.neighbours[atom.index])


def _is_carbonyl(plain: Structure, atom: int) -> bool:
    return any(b.order == 2 and plain.atoms[b.other(atom)].symbol == "O" for b in plain.bonds_of[atom])


def main() -> None:
    """Write the table."""
    rows = parent_rows()
    with TABLE.open("w", newline="", encoding="utf-8") as file:
        out = csv.DictWriter(file, list(rows[0]), lineterminator="\n")
        out.writeheader()
        out.writerows(rows)


if __name__ == "__main__":
    main()
