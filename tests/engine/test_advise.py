"""What to measure next: what tells structures apart is on the list, what is unsafe or done is not."""

from __future__ import annotations

import pytest

from hoodside.advise.next import Standing, advise
from hoodside.advise.stereo import differ_in_space_only, mirror_images
from hoodside.check import check_case
from hoodside.molecule import read_structure
from hoodside.readings.from_json import readings_from_json
from hoodside.weigh.expectations import expectations


def advice(*structures, **case):
    readings = readings_from_json(case)
    standing = [
        Standing(i, f"structure {'ABCD'[i]}", 1 / len(structures), expectations(s, readings))
        for i, s in enumerate(structures)
    ]
    return advise(readings, standing)


def kinds(found):
    return {a.key for a in found}


def test_every_entry_is_complete_and_worth_its_time():
    found = advice("OC1CCCCC1", "CC1(O)CCCC1")
    assert found
    for entry in found:
        shown = entry.to_dict()
        assert shown["measure"]
        assert shown["why"]
        assert shown["effort"]
        assert shown["expected_db"] > 0
        assert shown["separates"] == [[0, 1]]


def test_a_tertiary_and_a_secondary_alcohol_are_told_by_chromic_acid():
    # Shriner et al., Systematic Identification of Organic Compounds: 3° alcohols do not respond.
    found = {a.test: a for a in advice("OC1CCCCC1", "CC1(O)CCCC1", h1=[{"ppm": 3.6, "n": 1}], c13=[70.0])}
    jones = found["chromic acid (Jones)"]
    assert any("structure A" in line for line in jones.if_then)
    assert any("Cr(VI)" in line for line in jones.cautions)
    assert any("Local rules" in line for line in jones.cautions)


def test_what_was_measured_is_not_asked_for_again():
    done = advice(
        "OC1CCCCC1",
        "CC1(O)CCCC1",
        h1=[{"ppm": 3.6, "n": 1}],
        c13=[70.0],
        hrms={"adduct": "[M+H]+", "found": 101.0961},
        wet=[{"test": "chromic acid (Jones)", "result": "positive"}],
    )
    assert not kinds(done) & {"h1", "c13", "hrms"}
    assert all(a.test != "chromic acid (Jones)" for a in done)


def test_isomers_are_not_told_by_an_accurate_mass_but_analogues_are():
    assert "hrms" not in kinds(advice("COc1ccccc1", "Cc1ccccc1O"))
    found = {a.key: a for a in advice("COc1ccc(C)cc1", "CSc1ccc(C)cc1", h1=[{"ppm": 2.3, "n": 3}])}
    assert found["hrms"].expected_db > 15


def test_bromine_shows_in_the_isotope_pattern():
    assert "isotopes" in kinds(advice("Brc1ccc(C)cc1", "Clc1ccc(C)cc1", h1=[{"ppm": 2.3, "n": 3}]))


def test_no_sodium_fusion_on_a_nitro_compound():
    # Bretherick: hot sodium with nitro compounds can explode.
    found = advice("Cc1ccc([N+](=O)[O-])cc1", "Cc1ccc(Cl)cc1", h1=[{"ppm": 2.3, "n": 3}], c13=[21.0])
    assert not any("sodium fusion" in a.test for a in found)


def test_a_hydroxyl_is_sought_by_ir_or_a_shake():
    found = kinds(advice("OCc1ccccc1", "COc1ccccc1", h1=[{"lo": 7.2, "hi": 7.4, "n": 5}], c13=[128.0]))
    assert found & {"ir", "d2o"}


def test_alkene_isomers_are_told_by_an_noe():
    found = {a.key: a for a in advice("C/C=C/c1ccccc1", "C/C=C\\c1ccccc1", h1=[{"ppm": 1.9, "n": 3}])}
    assert "noe" in found


def test_mirror_images_are_said_to_be_such():
    found = advice("C[C@H](O)CC", "C[C@@H](O)CC", formula="C4H10O", h1=[{"ppm": 1.2, "n": 3}])
    assert kinds(found) == {"chiral"}


@pytest.mark.parametrize(
    ("one", "other", "mirrored", "in_space"),
    [
        ("C[C@H](O)CC", "C[C@@H](O)CC", True, False),
        ("O[C@H]1CCCC[C@@H]1O", "O[C@H]1CCCC[C@H]1O", False, True),
        ("C/C=C/C", "C/C=C\\C", False, True),
        ("CCCO", "CC(C)O", False, False),
    ],
)
def test_kinds_of_stereoisomers(one, other, mirrored, in_space):
    first, second = read_structure(one), read_structure(other)
    assert mirror_images(first, second) is mirrored
    assert differ_in_space_only(first, second) is in_space


def test_one_structure_alone_needs_nothing_to_tell_it_apart():
    case = {"candidates": ["CCO"], "formula": "C2H6O", "h1": [{"ppm": 1.2, "mult": "t", "n": 3}]}
    assert check_case(case)["next"] == []


def expected_of(key, *structures, **case):
    return next((a.expected_db for a in advice(*structures, **case) if a.key == key), 0.0)


def test_a_shake_tells_more_the_more_exchangeable_h_differ():
    h1 = [{"ppm": 3.6, "n": 1}]
    none_or_two = expected_of("d2o", "COCCOC", "OCCCCO", h1=h1)
    none_or_one = expected_of("d2o", "COCCOC", "COCCCO", h1=h1)
    one_or_two = expected_of("d2o", "COCCCO", "OCCCCO", h1=h1)
    assert none_or_two > none_or_one > one_or_two >= 0


def test_bromine_shows_in_the_isotope_pattern_more_than_chlorine():
    # M+2 over M: Br 97 %, Cl 32 %, IUPAC isotopic abundances.
    h1 = [{"ppm": 7.3, "n": 4}]
    bromine = expected_of("isotopes", "Cc1ccc(Br)cc1", "Cc1ccc(F)cc1", h1=h1)
    chlorine = expected_of("isotopes", "Cc1ccc(Cl)cc1", "Cc1ccc(F)cc1", h1=h1)
    assert bromine > chlorine > 3


def test_an_noe_is_worth_less_than_certainty():
    # NOEs between close H are now and then missed, and false ones come from exchange: common practice.
    apart = expected_of("noe", r"C/C=C(/C)c1ccccc1", r"C/C=C(\C)c1ccccc1", h1=[{"ppm": 5.9, "n": 1}])
    assert 3 < apart < 10
