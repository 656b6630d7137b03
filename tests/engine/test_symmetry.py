"""Topicity against textbook cases.

Sources: MR = Mislow and Raban, Top. Stereochem. 1967, 1, 1; EW = Eliel and Wilen, Stereochemistry of Organic
Compounds, Wiley 1994, chapter 8; IUPAC = Moss, Basic terminology of stereochemistry, Pure Appl. Chem. 1996,
68, 2193; WN = Waugh and Fessenden as cited in EW section 8-4 (NMR anisochrony); SW = Silverstein and Webster,
Spectrometric Identification of Organic Compounds, 6th ed., chapter 4 (spin systems, Pople notation, stereo-
chemical equivalence). Section numbers from memory.
"""

from __future__ import annotations

import random

import pytest

from hoodside.molecule import read_structure
from hoodside.molecule.symmetry import atom_classes, constitutional_classes, hydrogen_sets


def sets_of(smiles: str) -> list[tuple[int, int, str]]:
    """(number of carriers, number of H, relation) of every set, sorted."""
    return sorted((len(s.atoms), s.n, s.relation) for s in hydrogen_sets(read_structure(smiles)))


def carbon_lines(smiles: str) -> int:
    structure = read_structure(smiles)
    classes = atom_classes(structure)
    return len({classes[atom.index] for atom in structure.atoms if atom.symbol == "C"})


# name, SMILES, atom index of the CH2 (or =CH2) asked about, relation of its two H, source
GEMINAL = [
    ("ethanol CH2", "CCO", 1, "enantiotopic", "MR; EW 8-3"),
    ("propane CH2", "CCC", 1, "homotopic", "MR"),
    ("dichloromethane", "ClCCl", 1, "homotopic", "MR"),
    ("chlorobromomethane", "ClCBr", 1, "enantiotopic", "MR"),
    ("propanoic acid CH2", "CCC(=O)O", 1, "enantiotopic", "EW 8-3"),
    ("citric acid", "OC(=O)CC(O)(CC(=O)O)C(=O)O", 3, "diastereotopic", "EW 8-3 (Ogston's case)"),
    ("1,2-dichloropropane", "CC(Cl)CCl", 3, "diastereotopic", "SW ch. 4"),
    ("2-butanol CH2", "CC[C@H](C)O", 1, "diastereotopic", "EW 8-3; SW"),
    ("2-butanol CH2, configuration left open", "CCC(C)O", 1, "diastereotopic", "EW 8-3; SW"),
    ("styrene =CH2", "C=Cc1ccccc1", 0, "diastereotopic", "EW 8-3"),
    ("propene =CH2", "CC=C", 2, "diastereotopic", "MR"),
    ("isobutene =CH2", "C=C(C)C", 0, "homotopic", "MR"),
    ("ethylene", "C=C", 0, "homotopic", "MR"),
    ("1,1-dichloroethene", "C=C(Cl)Cl", 0, "homotopic", "EW 8-3"),
    ("allene", "C=C=C", 0, "homotopic", "EW 8-3 (D2d)"),
    ("1,2-butadiene =CH2", "C=C=CC", 0, "enantiotopic", "EW 8-3"),
    ("glycerol", "OCC(O)CO", 1, "diastereotopic", "EW 8-3"),
    ("acetaldehyde diethyl acetal OCH2", "CC(OCC)OCC", 3, "diastereotopic", "EW 8-4; SW ch. 4"),
    ("diethyl sulfite OCH2", "CCOS(=O)OCC", 1, "diastereotopic", "WN"),
    ("diethyl sulfoxide", "CCS(=O)CC", 1, "diastereotopic", "EW 8-4"),
    ("diethyl sulfone", "CCS(=O)(=O)CC", 1, "enantiotopic", "EW 8-3"),
    ("barbital ethyl CH2", "CCC1(CC)C(=O)NC(=O)NC1=O", 1, "enantiotopic", "substitution test worked by hand"),
    ("meso-2,4-pentanediol CH2", "C[C@H](O)C[C@@H](C)O", 3, "diastereotopic", "EW 8-3"),
    ("rac-2,4-pentanediol CH2", "C[C@H](O)C[C@H](C)O", 3, "homotopic", "EW 8-3"),
    ("cyclopropane ring, cis-1,2-dichloro CH2", "Cl[C@H]1C[C@H]1Cl", 2, "diastereotopic", "EW 8-3"),
    ("trans-1,2-dichlorocyclopropane CH2", "Cl[C@H]1C[C@@H]1Cl", 2, "homotopic", "EW 8-3"),
    ("cyclobutanol C3", "OC1CCC1", 3, "diastereotopic", "EW 8-3"),
    ("cyclohexanone alpha", "O=C1CCCCC1", 2, "enantiotopic", "EW 8-3, flips averaged"),
    ("norbornane C7", "C1CC2CC1CC2", 3, "homotopic", "C2v"),
    ("norbornane C2 (exo, endo)", "C1CC2CC1CC2", 0, "diastereotopic", "C2v"),
    ("adamantane CH2", "C1C2CC3CC1CC(C2)C3", 0, "homotopic", "Td"),
    ("acetone oxime analogue: formaldoxime", "C=NO", 0, "diastereotopic", "EW 8-3"),
    ("isobutyl CH2 in isobutanol", "CC(C)CO", 3, "enantiotopic", "EW 8-3"),
    ("benzyl CH2 in N-benzyl-alanine ester", "COC(=O)[C@H](C)NCc1ccccc1", 7, "diastereotopic", "EW 8-4"),
    ("dimethylaminomethyl, N inverts", "CCN(C)Cc1ccccc1", 1, "enantiotopic", "EW 8-4, fast inversion"),
    ("julolidine NCH2", "C1Cc2cccc3CCCN(C1)c23", 11, "enantiotopic", "planar on average"),
    ("quinuclidine NCH2", "C1CN2CCC1CC2", 1, "enantiotopic", "C3v"),
    ("Troger's base ArCH2", "C1N2Cc3ccccc3N1Cc1ccccc21", 2, "diastereotopic", "EW 7-8"),
    ("Troger's base NCH2N", "C1N2Cc3ccccc3N1Cc1ccccc21", 0, "homotopic", "EW 7-8, C2"),
    ("(4-methylcyclohexylidene)acetic acid C2", "OC(=O)C=C1CCC(C)CC1", 5, "diastereotopic", "EW 14-4"),
]


@pytest.mark.parametrize(("name", "smiles", "atom", "relation", "source"), GEMINAL, ids=lambda v: str(v)[:40])
def test_geminal_hydrogens(name: str, smiles: str, atom: int, relation: str, source: str) -> None:
    mine = [s for s in hydrogen_sets(read_structure(smiles)) if atom in s.atoms]
    if relation == "diastereotopic":
        assert [(s.relation, s.slot) for s in mine] == [("diastereotopic", 0), ("diastereotopic", 1)], source
        return
    assert len(mine) == 1, source
    # Within a larger set, mirror-related pairs make the whole set enantiotopic.
    assert mine[0].relation == relation, source


# name, SMILES, number of 13C lines, source
LINES = [
    ("benzene", "c1ccccc1", 1, "D6h"),
    ("toluene", "Cc1ccccc1", 5, "SW ch. 5"),
    ("o-xylene", "Cc1ccccc1C", 4, "SW ch. 5"),
    ("m-xylene", "Cc1cccc(C)c1", 5, "SW ch. 5"),
    ("p-xylene", "Cc1ccc(C)cc1", 3, "SW ch. 5"),
    ("mesitylene", "Cc1cc(C)cc(C)c1", 3, "SW ch. 5"),
    ("ethylbenzene", "CCc1ccccc1", 6, "SW ch. 5"),
    ("naphthalene", "c1ccc2ccccc2c1", 3, "D2h"),
    ("azulene", "c1ccc2cccc2cc1", 6, "C2v"),
    ("biphenyl", "c1ccccc1-c1ccccc1", 4, "D2, rotation averaged"),
    ("2,2'-dimethylbiphenyl", "Cc1ccccc1-c1ccccc1C", 7, "C2"),
    ("cubane", "C12C3C4C1C5C2C3C45", 1, "Eaton 1964: one line"),
    ("adamantane", "C1C2CC3CC1CC(C2)C3", 2, "SW ch. 5"),
    ("norbornane", "C1CC2CC1CC2", 3, "C2v"),
    ("bicyclo[2.2.2]octane", "C1CC2CCC1CC2", 2, "D3h"),
    ("prismane", "C12C3C1C1C2C31", 1, "D3h"),
    ("twistane", "C1CC2CC3CCC2CC13", 3, "D2: CH, CH2CH2, CH2"),
    ("isopropyl on a stereocentre: 3-methylbutan-2-ol", "CC(C)[C@H](C)O", 5, "EW 8-4; SW ch. 5"),
    ("menthol", "CC(C)[C@@H]1CC[C@@H](C)C[C@H]1O", 10, "EW 8-4: ten lines"),
    ("isobutanol", "CC(C)CO", 3, "SW ch. 5"),
    ("camphor", "CC1(C)C2CCC1(C)C(=O)C2", 10, "ten lines"),
    ("meso-2,3-dibromobutane", "C[C@H](Br)[C@H](C)Br", 2, "EW 8-3"),
    ("cis-1,2-dimethylcyclohexane", "C[C@H]1CCCC[C@H]1C", 4, "flips averaged"),
    ("cis-1,4-dimethylcyclohexane", "C[C@H]1CC[C@@H](C)CC1", 3, "flips averaged"),
    ("4-tert-butylcyclohexanol", "CC(C)(C)C1CCC(O)CC1", 6, "mirror plane"),
    ("tert-butylbenzene", "CC(C)(C)c1ccccc1", 6, "SW ch. 5"),
    ("mesityl oxide", "CC(C)=CC(C)=O", 6, "E and Z methyls apart; SW"),
    ("acetone oxime", "CC(C)=NO", 3, "syn and anti methyls apart; Karabatsos 1963"),
    ("DMF", "CN(C)C=O", 2, "rotamers are no matter of topicity: EW 8-4 d"),
    ("acetylacetonate anion", "CC(=O)[CH-]C(C)=O", 3, "constitution as drawn has two like halves"),
    ("1,3-dimethylimidazolium", "C[n+]1ccn(C)c1", 3, "C2v: the charge is spread"),
    ("nitrobenzene", "O=[N+]([O-])c1ccccc1", 4, "C2v"),
    ("cyclopentadienide", "c1cc[cH-]c1", 1, "D5h"),
    ("p-quinone", "O=C1C=CC(=O)C=C1", 2, "D2h"),
    ("E,Z-2,4-hexadiene", "C/C=C/C=C\\C", 6, "no operation"),
    ("E,E-2,4-hexadiene", "C/C=C/C=C/C", 3, "C2h"),
    ("dodecahedrane", "C12C3C4C5C1C6C7C2C8C3C9C4C1C5C6C2C7C8C9C12", 1, "Paquette 1983: one line"),
    ("tetraphenylmethane", "c1ccccc1C(c1ccccc1)(c1ccccc1)c1ccccc1", 5, "all phenyls equal"),
    ("triphenylphosphine", "c1ccccc1P(c1ccccc1)c1ccccc1", 4, "C3"),
    ("sucrose", "OC[C@H]1O[C@H](O[C@]2(CO)O[C@H](CO)[C@@H](O)[C@@H]2O)[C@H](O)[C@@H](O)[C@@H]1O", 12, "SW"),
]


@pytest.mark.parametrize(("name", "smiles", "lines", "source"), LINES, ids=lambda v: str(v)[:40])
def test_number_of_carbon_lines(name: str, smiles: str, lines: int, source: str) -> None:
    assert carbon_lines(smiles) == lines, source


def test_ethylbenzene_sets() -> None:
    """Ortho and meta pairs of a monosubstituted benzene are homotopic by rotation (EW 8-3)."""
    assert sets_of("CCc1ccccc1") == [
        (1, 1, "single"),
        (1, 2, "enantiotopic"),
        (1, 3, "homotopic"),
        (2, 2, "homotopic"),
        (2, 2, "homotopic"),
    ]


def test_cis_and_trans_arms_of_one_molecule_stay_apart() -> None:
    """Diastereomeric arms, alike in connectivity, are different environments (IUPAC: diastereomorphic)."""
    structure = read_structure("C[C@H]1CC[C@@H](CC1)OC(=O)O[C@H]1CC[C@@H](C)CC1")
    methyls = [i for i, atom in enumerate(structure.atoms) if atom.hydrogens == 3]
    first, second = methyls
    assert constitutional_classes(structure)[first] == constitutional_classes(structure)[second]
    assert atom_classes(structure)[first] != atom_classes(structure)[second]


def test_enantiomeric_arms_are_equivalent() -> None:
    """A meso diester: (R)- and (S)-2-butyl arms are enantiotopic, hence isochronous (EW 8-4)."""
    assert carbon_lines("CC[C@H](C)OC(=O)O[C@@H](C)CC") == 5


def test_salts_are_judged_part_by_part() -> None:
    """An achiral cation beside a chiral anion, and two like ions."""
    assert carbon_lines("CCO.C[C@H](O)CC") == 2 + 4
    assert carbon_lines("CC(=O)[O-].CC(=O)[O-].[Ca+2]") == 2


def test_every_hydrogen_is_in_one_set() -> None:
    """Sets partition the hydrogens."""
    for _, smiles, *_ in LINES:
        structure = read_structure(smiles)
        assert sum(s.n for s in hydrogen_sets(structure)) == structure.element_counts.get("H", 0)


def test_answers_do_not_depend_on_atom_order() -> None:
    """Renumbering must change nothing (property of any molecular invariant)."""
    from rdkit import Chem

    shuffle = random.Random(7)
    for smiles in [row[1] for row in LINES] + [row[1] for row in GEMINAL]:
        mol = Chem.MolFromSmiles(smiles)
        order = list(range(mol.GetNumAtoms()))
        expected = sets_of(smiles)
        for _ in range(3):
            shuffle.shuffle(order)
            again = Chem.MolToJSON(Chem.RenumberAtoms(mol, order))
            assert sets_of(again) == expected, smiles
