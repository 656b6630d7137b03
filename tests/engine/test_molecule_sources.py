"""Sources of structures: what is read, what is refused, and in which words."""

from __future__ import annotations

from typing import Any

import pytest
from rdkit import Chem
from rdkit.Chem import AllChem

from hoodside.errors import KernelCrashError, StructureError
from hoodside.molecule import read_structure, structure
from hoodside.molecule.kernel import kernel
from hoodside.molecule.kernel_browser import BrowserKernel
from hoodside.molecule.source import MAX_ATOMS


class Untouchable:
    """Stands in for the kernel where nothing may reach it."""

    def __getattr__(self, name: str) -> Any:
        raise AssertionError(f"reached the kernel: {name}")


COUNTS = "\nname\n\n{:>3}{:>3}  0  0  0  0  0  0  0  0999 V2000\n"
V3000_COUNTS = (
    "\nname\n\n  0  0  0     0  0            999 V3000\nM  V30 BEGIN CTAB\nM  V30 COUNTS {} 0 0 0 0\n"
)
TOO_LARGE = [
    "C" * 1000,
    "[CH2]" * 301,
    "c1ccccc1" * 60,
    "CBrCl" * 500,
    COUNTS.format(301, 0),
    COUNTS.format(999, 999),
    V3000_COUNTS.format(5000),
    "x\n" * 60_000,
    '{"rdkitjson":{"version":12},"molecules":[{"atoms":[' + "{}," * 1200 + "{}]}]}",
]


@pytest.mark.parametrize("source", TOO_LARGE, ids=lambda s: s[:20])
def test_what_a_kernel_cannot_survive_never_reaches_it(source: str, monkeypatch: pytest.MonkeyPatch) -> None:
    """RDKit's wasm traps for good near 1,000 atoms (measured), so size is counted beforehand."""
    monkeypatch.setattr(structure, "kernel", Untouchable)
    with pytest.raises(StructureError, match=r"The structure is (of|.* characters)"):
        read_structure(source)


def test_two_hundred_atoms_are_answered() -> None:
    assert len(read_structure("C" * 200).atoms) == 200
    assert len(read_structure("C" * MAX_ATOMS).atoms) == MAX_ATOMS


# What is wrong with a SMILES (OpenSMILES specification) -> words the message must hold.
FAULTS = [
    ("CC(C)(C)(C)C", "atom 2 (C) has 5 bonds"),
    ("F(C)C", "atom 1 (F) has 2 bonds"),
    ("C1CC", "ring closure 1 is opened but never closed"),
    ("C1CC2CC1", "ring closure 2 is opened"),
    ("C11", "joins an atom to itself"),
    ("C(C", "'(' is never closed"),
    ("C)C", "')' closes nothing"),
    ("[Xx]C", "'Xx' is no element"),
    ("CCQ", "character 3 ('Q')"),
    ("C==C", "character 3 ('=')"),
    ("c1cccc1", "aromatic ring of atoms 1, 2, 3, 4, 5"),
    ("Cc", "atom 2 is written as aromatic but is in no ring"),
    ("benzene ring", "holds a blank"),
    ("   ", "empty"),
    ("{}", "rdkitjson"),
    ("\nname\n\nnonsense\n", "fourth line"),
    (COUNTS.format(2, 1) + "    0.0       0.0       0.0    C   0  0\n", "fewer lines"),
    (COUNTS.format(1, 0) + "    0.0000    0.0000    0.0000 Xx  0  0\nM  END\n", "'Xx' is no element"),
    (COUNTS.format(1, 1) + "    0.0000    0.0000    0.0000 C   0  0\n  1  2  1  0\nM  END\n", "bond 1"),
]


@pytest.mark.parametrize(("source", "words"), FAULTS, ids=lambda s: s[:24])
def test_faults_are_named_in_plain_words(source: str, words: str) -> None:
    with pytest.raises(StructureError) as caught:
        read_structure(source)
    assert words in str(caught.value)
    assert caught.value.hint


@pytest.mark.parametrize(
    "smiles", ["C[C@H](O)/C=C/c1cccc(N)c1", "CC(C)[C@@H]1CC[C@@H](C)C[C@H]1O", "[Na+].CC(=O)[O-]"]
)
@pytest.mark.parametrize("version", ["V2000", "V3000"])
@pytest.mark.parametrize("flat", [True, False])
def test_ctfiles_of_both_versions_are_read(smiles: str, version: str, flat: bool) -> None:
    """Files written by RDKit's own writer, flat with wedges or in space, with explicit H or without."""
    mol = Chem.MolFromSmiles(smiles)
    if flat:
        AllChem.Compute2DCoords(mol)
    else:
        mol = Chem.AddHs(mol)
        AllChem.EmbedMolecule(mol, randomSeed=1)
    text = Chem.MolToMolBlock(mol, forceV3000=version == "V3000")
    assert read_structure(text).smiles == Chem.CanonSmiles(smiles)


def test_explicit_hydrogens_are_folded_in() -> None:
    methane = read_structure("[H]C([H])([H])[H]")
    assert [(atom.symbol, atom.hydrogens) for atom in methane.atoms] == [("C", 4)]


def test_patterns_and_reactions_that_do_not_parse_are_named() -> None:
    with pytest.raises(StructureError, match="SMARTS"):
        kernel().matches("C", ["[C"])
    with pytest.raises(StructureError, match="reaction"):
        kernel().react("C>>>", ["C"])


class TrappedBridge:
    """A bridge whose wasm traps, as RDKit's does on input that is too large."""

    def ask(self, what: str, source: str) -> str:
        raise RuntimeError("memory access out of bounds")


def test_a_trap_is_fatal_and_stays_so() -> None:
    """After a trap nothing more is asked of the module: its heap cannot be trusted."""
    trapped = BrowserKernel(TrappedBridge())
    with pytest.raises(KernelCrashError, match="memory access out of bounds"):
        trapped.smiles("C")
    with pytest.raises(KernelCrashError, match="before"):
        trapped.version()


class ForgetfulBridge:
    """A bridge that has dropped every list of patterns it was given before."""

    def __init__(self) -> None:
        self.kept: dict[str, str] = {}
        self.sent = 0

    def keepPatterns(self, name: str, patterns: str) -> str:  # noqa: N802  # the bridge speaks JavaScript
        self.sent += 1
        self.kept = {name: patterns}
        return ""

    def matchAll(self, source: str, name: str, unique: bool) -> str:  # noqa: N802
        return "[[1, [[0, 1]]]]" if name in self.kept else "?"


def test_pattern_lists_cross_once_and_are_sent_again_when_dropped() -> None:
    bridge = ForgetfulBridge()
    browser = BrowserKernel(bridge)
    for _ in range(3):
        assert browser.matches("CC", ["O", "CC", "N"]) == [(), ((0, 1),), ()]
    assert bridge.sent == 1
    bridge.kept.clear()
    assert browser.matches("CC", ["O", "CC", "N"]) == [(), ((0, 1),), ()]
    assert bridge.sent == 2
