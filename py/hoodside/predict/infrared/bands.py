"""Structure to expected bands: rows by substructure, the most specific one per site, shifts applied."""

from __future__ import annotations

from collections import Counter, defaultdict
from collections.abc import Iterable
from dataclasses import dataclass, replace

from hoodside.molecule import Structure
from hoodside.predict.infrared.reliability import band_spread
from hoodside.predict.infrared.silence import silenced, weakened
from hoodside.predict.infrared.table import (
    SOLUTION_MEDIA,
    BandRow,
    ShiftRule,
    predicting_rows,
    shift_rules,
)
from hoodside.predict.model import IrExpectation, Term

_SMALLEST_TRANS_RING = 8
_NO_CLAIM = -9  # below any rank


@dataclass(frozen=True, slots=True)
class _Hit:
    """One place where a row applies."""

    row: BandRow
    atoms: tuple[int, ...]  # in pattern order

    @property
    def sites(self) -> tuple[int, ...]:
        return tuple(self.atoms[i] for i in self.row.sites)

    @property
    def claim(self) -> tuple[int, int]:
        return self.row.rank, len(self.atoms)


def predict_bands(structure: Structure, medium: str = "") -> tuple[IrExpectation, ...]:
    """The bands a structure should show, highest wavenumber first.

    Args:
        medium: how the sample was measured ("film", "KBr", "ATR", "CCl4", ...); "" is taken as condensed.
    Rows come from facts/ir_bands.csv by substructure. Where several rows of one family claim the same
    atoms the most specific wins; then the shifts of facts/ir_shifts.csv that apply are added. Bands that
    symmetry forbids are left out. Equal expectations at several places are joined.
    """
    rows = [row for row in _rows_for(medium) if row.needs <= structure.element_counts.keys()]
    found = structure.match_all([row.smarts for row in rows])
    hits = [_Hit(row, atoms) for row, matches in zip(rows, found, strict=True) for atoms in matches]
    hits = [
        hit for hit in hits if _geometry_fits(structure, hit) and not silenced(structure, hit.atoms, hit.row)
    ]
    shifts = _shifts_by_site(structure)
    expected = [_expect(structure, hit, shifts) for hit in _winners(hits)]
    return tuple(sorted(_joined(expected), key=lambda band: (-band.typical, band.group)))


def absence_bands(expected: Iterable[IrExpectation]) -> tuple[IrExpectation, ...]:
    """Those whose absence from a complete spectrum speaks against the structure."""
    return tuple(band for band in expected if band.absence_counts)


def _rows_for(medium: str) -> list[BandRow]:
    """Rows that apply in the medium. In solution both free and hydrogen-bonded bands may be seen."""
    in_solution = medium.lower().split("(")[0].strip() in SOLUTION_MEDIA
    return [row for row in predicting_rows() if in_solution or not row.solution]


def _winners(hits: list[_Hit]) -> list[_Hit]:
    """Drop hits outranked at every site they claim."""
    best: dict[tuple[str, int], tuple[int, int]] = defaultdict(lambda: (_NO_CLAIM, 0))
    for hit in hits:
        for site in hit.sites:
            best[hit.row.family, site] = max(best[hit.row.family, site], hit.claim)
    return [hit for hit in hits if not hit.row.family or _wins(hit, best)]


def _wins(hit: _Hit, best: dict[tuple[str, int], tuple[int, int]]) -> bool:
    # Rows for another phase of the same group stand beside it, so size settles ties within a phase only.
    return any(best[hit.row.family, site] <= (hit.row.rank, len(hit.atoms)) for site in hit.sites)


def _geometry_fits(structure: Structure, hit: _Hit) -> bool:
    """Whether the double bond between pattern atoms 1 and 2 has the geometry the row asks for."""
    if not hit.row.geometry:
        return True
    start, a, b, end = hit.atoms[:4]
    bond = structure.bond_between(a, b)
    if bond is None:
        return False
    common = [ring for ring in structure.rings if a in ring and b in ring]
    if common and min(map(len, common)) < _SMALLEST_TRANS_RING:
        return hit.row.geometry == "cis"
    if not bond.stereo:
        return True
    swaps = (start not in bond.stereo_atoms) + (end not in bond.stereo_atoms)
    actual = bond.stereo if swaps % 2 == 0 else {"cis": "trans", "trans": "cis"}[bond.stereo]
    return hit.row.geometry == actual


def _shifts_by_site(structure: Structure) -> dict[int, list[tuple[ShiftRule, int]]]:
    """Per atom, the rules that apply there and how many times."""
    rules = [rule for rule in shift_rules() if rule.needs <= structure.element_counts.keys()]
    by_site: dict[int, list[tuple[ShiftRule, int]]] = defaultdict(list)
    for rule, matches in zip(rules, structure.match_all([rule.smarts for rule in rules]), strict=True):
        for site, times in Counter(match[0] for match in matches).items():
            by_site[site].append((rule, times))
    return by_site


def _shifts_on(hit: _Hit, shifts: dict[int, list[tuple[ShiftRule, int]]]) -> list[tuple[ShiftRule, float]]:
    """Rules that apply to a hit, one entry per delta."""
    row = hit.row
    if not row.shifts:
        return []
    return [
        (rule, delta)
        for rule, times in shifts.get(hit.sites[0], ())
        if row.family.startswith(rule.family) and (rule.kind == "fine" or row.shifts == "all")
        for delta in rule.deltas[:times]
    ]


def _expect(structure: Structure, hit: _Hit, shifts: dict[int, list[tuple[ShiftRule, int]]]) -> IrExpectation:
    row, applied = hit.row, _shifts_on(hit, shifts)
    moved = sum(delta for _, delta in applied)
    faint = weakened(structure, hit.atoms, row)
    return IrExpectation(
        lo=row.lo + sum(d for rule, d in applied if d < 0 or not rule.one_sided),
        hi=row.hi + sum(d for rule, d in applied if d > 0 or not rule.one_sided),
        typical=row.typical + moved,
        mode=row.mode,
        group=row.group,
        strength="weak" if faint else row.strength,
        shape=row.shape,
        absence_counts=row.absence_counts and not faint and _stereo_known(structure, hit),
        atoms=tuple(sorted(hit.atoms)),
        source=row.source,
        sd=band_spread(row.mode, row.lo, row.hi),
        pair=f"{row.pair}:{min(hit.sites or hit.atoms)}" if row.pair else "",
        terms=(
            Term(row.group, row.typical, row.source),
            *(Term(rule.label, delta, rule.source) for rule, delta in applied),
        ),
    )


def _stereo_known(structure: Structure, hit: _Hit) -> bool:
    if not hit.row.geometry:
        return True
    bond = structure.bond_between(hit.atoms[1], hit.atoms[2])
    return bond is not None and bool(bond.stereo)


def _joined(expected: list[IrExpectation]) -> list[IrExpectation]:
    """One expectation per group and position, with the atoms of all places where it holds."""
    joined: dict[tuple[str, float, str], IrExpectation] = {}
    for band in expected:
        key = (band.group, band.typical, band.strength)
        if key in joined:
            first = joined[key]
            atoms = tuple(sorted({*first.atoms, *band.atoms}))
            joined[key] = _with_atoms(first, atoms)
        else:
            joined[key] = band
    return list(joined.values())


def _with_atoms(band: IrExpectation, atoms: tuple[int, ...]) -> IrExpectation:
    return replace(band, atoms=atoms)
