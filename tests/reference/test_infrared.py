"""Infrared assignments against handbook and spectral-library values.

Sources: NIST = NIST Chemistry WebBook condensed-phase spectra; SWK = Silverstein, Webster & Kiemle,
Spectrometric Identification of Organic Compounds, 7th ed. 2005, chapter 2; WF = Williams & Fleming,
Spectroscopic Methods in Organic Chemistry, 6th ed. 2008; PBB = Pretsch, Buehlmann & Badertscher, Structure
Determination of Organic Compounds, 4th ed. 2009. Values from memory.
"""

from __future__ import annotations

import pytest

from hoodside.molecule import read_structure
from hoodside.predict.infrared import groups_for_band, predict_bands

#: An expected range must hold the published value within this, cm-1.
SLACK = 6.0

# name, SMILES, mode, published cm-1, source
ASSIGNMENTS = [
    ("acetone", "CC(C)=O", "C=O stretch", 1715, "SWK"),
    ("cyclohexanone", "O=C1CCCCC1", "C=O stretch", 1715, "SWK"),
    ("cyclopentanone", "O=C1CCCC1", "C=O stretch", 1744, "SWK"),
    ("cyclobutanone", "O=C1CCC1", "C=O stretch", 1783, "SWK"),
    ("cyclooctanone", "O=C1CCCCCCC1", "C=O stretch", 1702, "NIST"),
    ("camphor", "CC1(C)C2CCC1(C)C(=O)C2", "C=O stretch", 1741, "NIST"),
    ("acetophenone", "CC(=O)c1ccccc1", "C=O stretch", 1686, "SWK"),
    ("4'-methoxyacetophenone", "CC(=O)c1ccc(OC)cc1", "C=O stretch", 1677, "WF"),
    ("benzophenone", "O=C(c1ccccc1)c1ccccc1", "C=O stretch", 1660, "SWK"),
    ("1-tetralone", "O=C1CCCc2ccccc12", "C=O stretch", 1686, "NIST"),
    ("1-indanone", "O=C1CCc2ccccc12", "C=O stretch", 1712, "NIST"),
    ("fluorenone", "O=C1c2ccccc2-c2ccccc12", "C=O stretch", 1715, "NIST"),
    ("chalcone", "O=C(/C=C/c1ccccc1)c1ccccc1", "C=O stretch", 1664, "NIST"),
    ("mesityl oxide", "CC(=O)C=C(C)C", "C=O stretch", 1690, "SWK"),
    ("cyclohex-2-enone", "O=C1CCCC=C1", "C=O stretch", 1680, "NIST"),
    ("cyclopent-2-enone", "O=C1CCC=C1", "C=O stretch", 1710, "NIST"),
    ("1,4-benzoquinone", "O=C1C=CC(=O)C=C1", "C=O stretch", 1667, "SWK"),
    ("2'-hydroxyacetophenone", "CC(=O)c1ccccc1O", "C=O stretch", 1641, "NIST"),
    ("2-acetylfuran", "CC(=O)c1ccco1", "C=O stretch", 1675, "NIST"),
    ("1,1,1-trifluoroacetone", "CC(=O)C(F)(F)F", "C=O stretch", 1762, "PBB"),
    ("benzil", "O=C(C(=O)c1ccccc1)c1ccccc1", "C=O stretch", 1675, "NIST"),
    ("butanal", "CCCC=O", "C=O stretch", 1727, "NIST"),
    ("benzaldehyde", "O=Cc1ccccc1", "C=O stretch", 1703, "SWK"),
    ("crotonaldehyde", "C/C=C/C=O", "C=O stretch", 1691, "NIST"),
    ("salicylaldehyde", "O=Cc1ccccc1O", "C=O stretch", 1665, "WF"),
    ("furfural", "O=Cc1ccco1", "C=O stretch", 1675, "NIST"),
    ("4-(dimethylamino)benzaldehyde", "CN(C)c1ccc(C=O)cc1", "C=O stretch", 1663, "NIST"),
    ("ethyl acetate", "CCOC(C)=O", "C=O stretch", 1743, "SWK"),
    ("methyl benzoate", "COC(=O)c1ccccc1", "C=O stretch", 1724, "SWK"),
    ("ethyl acrylate", "CCOC(=O)C=C", "C=O stretch", 1727, "NIST"),
    ("phenyl acetate", "CC(=O)Oc1ccccc1", "C=O stretch", 1767, "SWK"),
    ("vinyl acetate", "CC(=O)OC=C", "C=O stretch", 1762, "SWK"),
    ("methyl salicylate", "COC(=O)c1ccccc1O", "C=O stretch", 1680, "SWK"),
    ("ethyl trifluoroacetate", "CCOC(=O)C(F)(F)F", "C=O stretch", 1786, "PBB"),
    ("gamma-butyrolactone", "O=C1CCCO1", "C=O stretch", 1770, "SWK"),
    ("delta-valerolactone", "O=C1CCCCO1", "C=O stretch", 1735, "SWK"),
    ("beta-propiolactone", "O=C1CCO1", "C=O stretch", 1828, "SWK"),
    ("phthalide", "O=C1OCc2ccccc12", "C=O stretch", 1763, "NIST"),
    ("coumarin", "O=c1ccc2ccccc2o1", "C=O stretch", 1710, "NIST"),
    ("acetic anhydride, high", "CC(=O)OC(C)=O", "C=O stretch", 1827, "SWK"),
    ("acetic anhydride, low", "CC(=O)OC(C)=O", "C=O stretch", 1766, "SWK"),
    ("succinic anhydride, low", "O=C1CCC(=O)O1", "C=O stretch", 1782, "SWK"),
    ("acetyl chloride", "CC(=O)Cl", "C=O stretch", 1806, "SWK"),
    ("benzoyl chloride", "O=C(Cl)c1ccccc1", "C=O stretch", 1774, "SWK"),
    ("diethyl carbonate", "CCOC(=O)OCC", "C=O stretch", 1746, "NIST"),
    ("ethylene carbonate", "O=C1OCCO1", "C=O stretch", 1805, "NIST"),
    ("acetic acid", "CC(=O)O", "C=O stretch", 1714, "SWK"),
    ("benzoic acid", "O=C(O)c1ccccc1", "C=O stretch", 1688, "NIST"),
    ("N-methylacetamide", "CNC(C)=O", "C=O stretch", 1655, "WF"),
    ("N,N-dimethylacetamide", "CN(C)C(C)=O", "C=O stretch", 1647, "NIST"),
    ("2-pyrrolidinone", "O=C1CCCN1", "C=O stretch", 1690, "SWK"),
    ("caprolactam", "O=C1CCCCCN1", "C=O stretch", 1660, "NIST"),
    ("phthalimide, low", "O=C1NC(=O)c2ccccc12", "C=O stretch", 1745, "NIST"),
    ("oxazolidin-2-one", "O=C1NCCO1", "C=O stretch", 1740, "NIST"),
    ("acetonitrile", "CC#N", "C#N stretch", 2253, "SWK"),
    ("benzonitrile", "N#Cc1ccccc1", "C#N stretch", 2229, "SWK"),
    ("phenyl isocyanate", "O=C=Nc1ccccc1", "N=C=O stretch", 2268, "NIST"),
    ("phenyl azide", "[N-]=[N+]=Nc1ccccc1", "N3 stretch", 2125, "PBB"),
    ("1-hexyne", "CCCCC#C", "C#C stretch", 2119, "SWK"),
    ("1-hexyne, CH", "CCCCC#C", "C-H stretch", 3310, "SWK"),
    ("phenylacetylene, CH", "C#Cc1ccccc1", "C-H stretch", 3291, "NIST"),
    ("1-hexene", "CCCCC=C", "C=C stretch", 1641, "SWK"),
    ("1-hexene, wag", "CCCCC=C", "=C-H out-of-plane", 993, "SWK"),
    ("1-hexene, =CH2 wag", "CCCCC=C", "=C-H out-of-plane", 910, "SWK"),
    ("2-methylpent-1-ene, wag", "CCCC(C)=C", "=C-H out-of-plane", 888, "SWK"),
    ("(E)-oct-3-ene, wag", "CCCC/C=C/CC", "=C-H out-of-plane", 967, "SWK"),
    ("cyclohexene", "C1=CCCCC1", "C=C stretch", 1653, "NIST"),
    ("styrene", "C=Cc1ccccc1", "C=C stretch", 1630, "NIST"),
    ("ethyl vinyl ether", "CCOC=C", "C=C stretch", 1612, "SWK"),
    ("toluene, ring H", "Cc1ccccc1", "C-H out-of-plane", 729, "SWK"),
    ("toluene, ring bend", "Cc1ccccc1", "ring bend out-of-plane", 694, "SWK"),
    ("o-xylene", "Cc1ccccc1C", "C-H out-of-plane", 742, "SWK"),
    ("m-xylene", "Cc1cccc(C)c1", "C-H out-of-plane", 769, "NIST"),
    ("p-xylene", "Cc1ccc(C)cc1", "C-H out-of-plane", 795, "NIST"),
    ("mesitylene", "Cc1cc(C)cc(C)c1", "C-H out-of-plane", 836, "NIST"),
    ("4-nitrotoluene", "Cc1ccc(cc1)[N+](=O)[O-]", "NO2 stretch", 1514, "NIST"),
    ("nitrobenzene", "O=[N+]([O-])c1ccccc1", "NO2 stretch", 1523, "SWK"),
    ("nitrobenzene, sym", "O=[N+]([O-])c1ccccc1", "NO2 stretch", 1347, "SWK"),
    ("nitroethane", "CC[N+](=O)[O-]", "NO2 stretch", 1553, "SWK"),
    ("aniline, asym", "Nc1ccccc1", "N-H stretch", 3429, "SWK"),
    ("aniline, sym", "Nc1ccccc1", "N-H stretch", 3354, "SWK"),
    ("acetanilide", "CC(=O)Nc1ccccc1", "N-H stretch", 3294, "NIST"),
    ("ethanol", "CCO", "O-H stretch", 3330, "SWK"),
    ("phenol, C-O", "Oc1ccccc1", "C-O stretch", 1224, "SWK"),
    ("tert-butyl alcohol, C-O", "CC(C)(C)O", "C-O stretch", 1202, "NIST"),
    ("1-butanol, C-O", "CCCCO", "C-O stretch", 1073, "NIST"),
    ("dibutyl ether", "CCCCOCCCC", "C-O-C stretch", 1121, "NIST"),
    ("tetrahydrofuran", "C1CCOC1", "C-O-C stretch", 1068, "NIST"),
    ("anisole, aryl C-O", "COc1ccccc1", "=C-O-C asym stretch", 1247, "SWK"),
    ("anisole, alkyl C-O", "COc1ccccc1", "=C-O-C sym stretch", 1040, "SWK"),
    ("dimethyl sulfoxide", "CS(C)=O", "S=O stretch", 1050, "SWK"),
    ("dimethyl sulfone, sym", "CS(C)(=O)=O", "SO2 stretch", 1135, "PBB"),
    ("p-toluenesulfonamide", "Cc1ccc(cc1)S(N)(=O)=O", "SO2 stretch", 1160, "NIST"),
    ("thiophenol", "Sc1ccccc1", "S-H stretch", 2567, "NIST"),
    ("triethylsilane", "CC[SiH](CC)CC", "Si-H stretch", 2105, "NIST"),
    ("triphenylphosphine oxide", "O=P(c1ccccc1)(c1ccccc1)c1ccccc1", "P=O stretch", 1190, "NIST"),
]


@pytest.mark.parametrize(
    ("name", "smiles", "mode", "cm1", "source"), ASSIGNMENTS, ids=[a[0] for a in ASSIGNMENTS]
)
def test_assignment(name: str, smiles: str, mode: str, cm1: float, source: str) -> None:
    bands = [band for band in predict_bands(read_structure(smiles)) if band.mode == mode]
    ranges = [(band.lo, band.hi) for band in bands]
    assert any(lo - SLACK <= cm1 <= hi + SLACK for lo, hi in ranges), (
        f"{name}: {cm1} not in {ranges} ({source})"
    )


def test_carbonyl_positions_are_near_on_the_whole() -> None:
    """Mean absolute error of the typical value over the carbonyl compounds above."""
    errors = []
    for _, smiles, mode, cm1, _ in ASSIGNMENTS:
        if mode == "C=O stretch":
            typical = [b.typical for b in predict_bands(read_structure(smiles)) if b.mode == mode]
            errors.append(min(abs(cm1 - value) for value in typical))
    assert len(errors) > 45
    assert sum(errors) / len(errors) < 6


# What the textbook reads from a band at once: SWK chapter 2, chart of characteristic absorptions.
READ_OFF = [
    (2250, "medium", "sharp", "nitrile"),
    (2100, "strong", "sharp", "azide"),
    (3300, "strong", "sharp", "terminal alkyne"),
    (1820, "strong", "", "anhydride"),
    (1525, "strong", "sharp", "nitro arene"),
    (2720, "weak", "", "aldehyde"),
    (967, "strong", "sharp", "trans alkene"),
    (2270, "strong", "broad", "isocyanate"),
    (1745, "strong", "sharp", "cyclopentanone"),
    (3350, "strong", "broad", "alcohol"),
]


@pytest.mark.parametrize(("cm1", "strength", "shape", "group"), READ_OFF)
def test_band_to_group(cm1: float, strength: str, shape: str, group: str) -> None:
    leading = [meaning.group for meaning in groups_for_band(cm1, strength, shape)[:8]]
    assert any(name.startswith(group) for name in leading), leading
