"""Infrared prediction: specificity, shifts, symmetry, pairs, phases, regions, and the tables themselves."""

from __future__ import annotations

import json
from itertools import pairwise
from pathlib import Path

import pytest
from rdkit import Chem

from hoodside.errors import InvalidInputError
from hoodside.molecule import read_structure
from hoodside.predict.infrared import (
    absence_bands,
    background_density,
    band_reliability,
    groups_for_band,
    ir_regions,
    predict_bands,
    region_of,
    seen_when_looked,
    weigh_bands,
    weigh_clear,
)
from hoodside.predict.infrared.table import band_rows, shift_rules
from hoodside.predict.model import IrExpectation


def _bands(smiles: str, mode: str, medium: str = "") -> list[IrExpectation]:
    return [band for band in predict_bands(read_structure(smiles), medium) if band.mode == mode]


def test_the_most_specific_row_wins_at_a_site() -> None:
    (band,) = _bands("CC(=O)C1CC1", "C=O stretch")
    assert band.group == "cyclopropyl ketone"
    (band,) = _bands("O=Cc1ccccc1O", "C=O stretch")
    assert band.group.startswith("salicylaldehyde")
    assert [b.group for b in _bands("O=[N+]([O-])c1ccc(Br)cc1", "C-H out-of-plane")] == [
        "arene para with nitro"
    ]


def test_two_carbonyls_of_different_kind_are_both_expected() -> None:
    groups = {band.group for band in _bands("CCOC(=O)CCC(=O)c1ccccc1", "C=O stretch")}
    assert groups == {"ester (saturated)", "aryl alkyl ketone"}


def test_every_carbonyl_of_the_published_structures_has_a_band() -> None:
    cases = json.loads((Path(__file__).parents[1] / "cases" / "published.json").read_text("utf-8"))
    for smiles in {s for case in cases[::4] for s in (case["smiles"], *case["rivals"])}:
        structure = read_structure(smiles)
        carbonyls = {match[0] for match in structure.matches("[#6;!$([#6]=*=*);!$([#6][O-])]=[OX1]")}
        expected = {a for b in predict_bands(structure) if "C=O" in b.mode for a in b.atoms}
        assert carbonyls <= expected, smiles


def test_no_carbonyl_without_one() -> None:
    for smiles in ("CCO", "COc1ccccc1", "CC#N", "C1CCOC1"):
        assert not _bands(smiles, "C=O stretch")


def test_shift_terms_sum_to_the_typical_value() -> None:
    for smiles in ("CN(C)c1ccc(C=O)cc1", "CC(=O)C(F)(F)F", "O=C1CCCC1=CC", "CC(=O)c1ccc(OC)cc1"):
        for band in _bands(smiles, "C=O stretch"):
            assert len(band.terms) > 1, smiles
            assert sum(term.value for term in band.terms) == pytest.approx(band.typical)
            assert all(term.source for term in band.terms)


def test_donor_lowers_and_halogen_raises_the_carbonyl() -> None:
    def at(smiles: str) -> float:
        return _bands(smiles, "C=O stretch")[0].typical

    assert at("CC(=O)c1ccc(N)cc1") < at("CC(=O)c1ccc(OC)cc1") < at("CC(=O)c1ccccc1")
    assert at("CC(=O)c1ccccc1") < at("CC(=O)c1ccc([N+](=O)[O-])cc1")
    assert at("CCC(=O)CCl") > at("CCC(=O)CC")


@pytest.mark.parametrize(
    ("smiles", "mode", "seen"),
    [
        ("CCCC#CCCC", "C#C stretch", False),
        ("CCCCC#CCC", "C#C stretch", True),
        ("c1ccccc1C#Cc1ccccc1", "C#C stretch", False),
        ("CCC/C=C/CCC", "C=C stretch", False),
        ("CCC/C=C\\CCC", "C=C stretch", True),
        ("CC(C)=C(C)C", "C=C stretch", False),
        ("c1ccccc1/N=N/c1ccccc1", "N=N stretch", False),
        ("Cc1ccc(cc1)/N=N/c1ccccc1", "N=N stretch", True),
        ("C1=CCCCC1", "C=C stretch", True),
    ],
)
def test_symmetry_silences_stretches(smiles: str, mode: str, seen: bool) -> None:
    """Mutual exclusion: a stretch on a centre of symmetry is not infrared active."""
    assert bool(_bands(smiles, mode)) is seen


def test_dialkyl_alkyne_is_faint_and_its_absence_does_not_count() -> None:
    (band,) = _bands("CCCCC#CCC", "C#C stretch")
    assert (band.strength, band.absence_counts) == ("weak", False)


def test_geometry_decides_the_wag() -> None:
    trans = {band.group for band in _bands("CCCC/C=C/CC", "=C-H out-of-plane")}
    cis = {band.group for band in _bands("CCCC/C=C\\CC", "=C-H out-of-plane")}
    ring = {band.group for band in _bands("C1=CCCCC1", "=C-H out-of-plane")}
    assert (trans, cis, ring) == ({"trans alkene wag"}, {"cis alkene wag"}, {"cis alkene wag"})
    unsaid = _bands("CCCCC=CCC", "=C-H out-of-plane")
    assert {band.group for band in unsaid} == {"trans alkene wag", "cis alkene wag"}
    assert not any(band.absence_counts for band in unsaid)


@pytest.mark.parametrize(
    ("smiles", "pair"),
    [
        ("O=[N+]([O-])c1ccccc1", "nitro arene"),
        ("CC(=O)OC(C)=O", "anhydride acyclic"),
        ("Nc1ccccc1", "primary aryl amine NH2"),
        ("CCCC=O", "aldehyde C-H"),
        ("Cc1ccccc1", "arene mono"),
        ("CCCCC=C", "vinyl wag"),
    ],
)
def test_paired_bands_come_in_twos(smiles: str, pair: str) -> None:
    found = [band for band in predict_bands(read_structure(smiles)) if band.pair.startswith(pair)]
    assert len(found) == 2
    assert found[0].pair == found[1].pair


@pytest.mark.parametrize(
    ("smiles", "groups"),
    [
        ("Cc1ccccc1", {"arene mono (750)"}),
        ("Cc1ccccc1C", {"arene ortho"}),
        ("Cc1cccc(C)c1", {"arene meta (3 adjacent)", "arene meta (isolated H)"}),
        ("Cc1ccc(C)cc1", {"arene para"}),
        ("Cc1cc(C)cc(C)c1", {"arene 1,3,5-trisubstituted (isolated H)"}),
        ("c1ccc2ccccc2c1", set()),
    ],
)
def test_ring_patterns_tell_substitution(smiles: str, groups: set[str]) -> None:
    found = {band.group for band in _bands(smiles, "C-H out-of-plane")}
    assert found == groups


def test_phase() -> None:
    """Free O-H and solution amide I in CCl4; only the bonded ones in a solid or neat liquid."""
    assert {b.group for b in _bands("CCCCO", "O-H stretch")} == {"alcohol OH (hydrogen-bonded)"}
    assert "alcohol OH (free)" in {b.group for b in _bands("CCCCO", "O-H stretch", "CCl4")}
    solid = {b.group for b in _bands("CCC(=O)NCC", "C=O stretch", "KBr")}
    assert solid == {"amide I (secondary, solid)"}


def test_absences_are_a_subset_and_name_the_carbonyl() -> None:
    bands = predict_bands(read_structure("CCOC(C)=O"))
    counted = absence_bands(bands)
    assert set(counted) < set(bands)
    assert "C=O stretch" in {band.mode for band in counted}


def test_bands_are_sorted_and_carry_atoms() -> None:
    structure = read_structure("COC(=O)c1ccc(C#N)cc1")
    bands = predict_bands(structure)
    assert [b.typical for b in bands] == sorted((b.typical for b in bands), reverse=True)
    assert all(b.atoms and max(b.atoms) < len(structure.atoms) for b in bands)
    assert all(b.lo <= b.typical <= b.hi and b.sd > 0 for b in bands)


def test_lookup_refuses_what_is_no_wavenumber() -> None:
    for cm1 in (0, -1700, 17000):
        with pytest.raises(InvalidInputError):
            groups_for_band(cm1)


def test_lookup_flags_artefacts() -> None:
    assert any(meaning.artefact for meaning in groups_for_band(2350))


def test_regions_follow_without_gap() -> None:
    regions = ir_regions()
    assert (regions[0].hi, regions[-1].lo) == (4000, 500)
    assert all(above.lo == below.hi for above, below in pairwise(regions))
    assert all(region.name and region.lives_there and region.clear_means for region in regions)
    assert region_of(1702) is region_of(1710)
    assert region_of(4500) is None


def test_reliabilities_are_probabilities_and_favour_the_strong() -> None:
    assert 0 < band_reliability("C-H stretch", "weak") < band_reliability("C=O stretch", "strong") < 1
    short, long = (band_reliability("C-H stretch", "strong", printed=n) for n in (2, 12))
    assert short < long
    assert 0 < band_reliability("no such mode", "strong") < 1
    assert seen_when_looked("strong") > seen_when_looked("weak")


def test_background_is_a_density() -> None:
    total = sum(background_density(cm1) for cm1 in range(400, 4000))
    assert total == pytest.approx(1, abs=0.02)


def test_evidence_prefers_the_carbonyl_that_fits() -> None:
    ketone = predict_bands(read_structure("CCCCC(C)=O"))
    ester = predict_bands(read_structure("CCCC(=O)OC"))
    for cm1, right, wrong in ((1716, ketone, ester), (1741, ester, ketone)):
        (for_it, against) = (weigh_bands([cm1], bands)[0].weight_db for bands in (right, wrong))
        assert for_it > against + 3
        assert for_it > 0


def test_evidence_names_the_band_and_the_missing_ones() -> None:
    bands = predict_bands(read_structure("N#Cc1ccc(C=O)cc1"))
    evidence = weigh_bands([2230, 2000, 1600], bands)
    assert evidence[0].expected is not None
    assert evidence[0].expected.mode == "C#N stretch"
    missing = {e.expected.group for e in evidence if e.reading == -1 and e.expected}
    assert "aldehyde (aryl)" in missing
    assert all(e.weight_db < 0 for e in evidence if e.reading == -1)


def test_a_clear_region_speaks_against_what_lives_there() -> None:
    alcohol = predict_bands(read_structure("CCCCO"))
    ether = predict_bands(read_structure("CCOCC"))
    against = weigh_clear([(3120, 3600)], alcohol)
    assert sum(e.weight_db for e in against) < -8
    assert not weigh_clear([(3120, 3600)], ether)


def test_every_row_is_sound() -> None:
    for row in band_rows():
        pattern = Chem.MolFromSmarts(row.smarts)
        assert pattern is not None, row.group
        assert row.lo <= row.typical <= row.hi, row.group
        assert row.lo >= 400, row.group
        assert row.hi <= 4000, row.group
        assert all(site < pattern.GetNumAtoms() for site in row.sites), row.group
        assert bool(row.family) == bool(row.sites), row.group
    for rule in shift_rules():
        assert Chem.MolFromSmarts(rule.smarts) is not None, rule.label
        assert rule.deltas, rule.label
