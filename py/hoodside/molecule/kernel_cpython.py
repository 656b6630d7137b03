"""The kernel on CPython: PyPI's rdkit."""

from __future__ import annotations

import json
import logging
from collections import OrderedDict
from collections.abc import Iterator, Sequence
from contextlib import contextmanager
from functools import lru_cache
from typing import Any

from rdkit import Chem, rdBase
from rdkit.Chem import rdChemReactions, rdCIPLabeler, rdDepictor
from rdkit.Chem.Draw import rdMolDraw2D

from hoodside.molecule.kernel import Matches, bad_pattern, bad_reaction
from hoodside.molecule.source import Notation, check_size, notation_of, parse_failure

_MAX_HANDLES = 256
_MAX_MATCHES = 100_000
_CIP = "_CIPCode"


class CPythonKernel:
    """RDKit through its Python bindings; see ``Kernel`` for the meaning of each call."""

    name = "rdkit"

    def __init__(self) -> None:
        self._open: OrderedDict[str, Any] = OrderedDict()
        Chem.SetUseLegacyStereoPerception(True)  # the browser build starts so; both must agree
        Chem.SetAllowNontetrahedralChirality(False)
        _route_log()

    def version(self) -> str:
        return str(rdBase.rdkitVersion)

    def graph_json(self, source: str) -> str:
        return str(Chem.MolToJSON(self._mol(source)))

    def smiles(self, source: str) -> str:
        return str(Chem.MolToSmiles(self._named(source)))

    def inchi(self, source: str) -> str:
        return str(Chem.MolToInchi(self._named(source)))  # type: ignore[no-untyped-call]

    def inchikey(self, source: str) -> str:
        return str(Chem.InchiToInchiKey(self.inchi(source)) or "")  # type: ignore[no-untyped-call]

    def molblock(self, source: str) -> str:
        return str(Chem.MolToMolBlock(_laid_out(self._mol(source))))

    def coords(self, source: str) -> list[tuple[float, float]]:
        conformer = _laid_out(self._mol(source)).GetConformer()
        return [(p[0], p[1]) for p in conformer.GetPositions()]

    def raw_svg(self, source: str, options: str) -> str:
        mol = _laid_out(self._mol(source))
        given = json.loads(options)
        drawer = rdMolDraw2D.MolDraw2DSVG(given["width"], given["height"])
        rdMolDraw2D.UpdateDrawerParamsFromJSON(drawer, options)
        drawer.DrawMolecule(mol, highlightAtoms=list(range(mol.GetNumAtoms())), highlightBonds=[])
        drawer.FinishDrawing()
        return str(drawer.GetDrawingText())

    def stereo_labels(self, source: str) -> tuple[dict[int, str], dict[tuple[int, int], str]]:
        mol = Chem.Mol(self._mol(source))
        rdCIPLabeler.AssignCIPLabels(mol)
        atoms = {a.GetIdx(): a.GetProp(_CIP) for a in mol.GetAtoms() if a.HasProp(_CIP)}
        bonds = {_ends(b): b.GetProp(_CIP) for b in mol.GetBonds() if b.HasProp(_CIP)}
        return atoms, bonds

    def matches(self, source: str, smarts: Sequence[str], unique: bool = True) -> list[Matches]:
        mol = self._mol(source)
        return [
            tuple(mol.GetSubstructMatches(_query(s), uniquify=unique, maxMatches=_MAX_MATCHES))
            for s in smarts
        ]

    def react(self, reaction: str, sources: Sequence[str]) -> list[list[str]]:
        found: dict[tuple[str, ...], None] = {}
        for products in _reaction(reaction).RunReactants([self._mol(s) for s in sources]):
            # Products come unsanitised: reading their SMILES again checks valence and finds aromaticity.
            with _captured_log():
                cleaned = [Chem.MolFromSmiles(Chem.MolToSmiles(p)) for p in products]
            if None not in cleaned:
                found[tuple(Chem.MolToSmiles(p) for p in cleaned)] = None
        return [list(p) for p in found]

    def live_handles(self) -> int:
        return len(self._open)

    def close(self) -> None:
        self._open.clear()

    def _named(self, source: str) -> Any:
        """The molecule by way of SMILES, so that one molecule has one name whatever it was read from."""
        mol = self._mol(source)
        return self._mol(Chem.MolToSmiles(mol)) if notation_of(source) is Notation.JSON else mol

    def _mol(self, source: str) -> Any:
        mol = self._open.get(source)
        if mol is None:
            mol = self._open[source] = _parse(source)
            if len(self._open) > _MAX_HANDLES:
                self._open.popitem(last=False)
        else:
            self._open.move_to_end(source)
        return mol


def _ends(bond: Any) -> tuple[int, int]:
    a, b = bond.GetBeginAtomIdx(), bond.GetEndAtomIdx()
    return min(a, b), max(a, b)


def _laid_out(mol: Any) -> Any:
    """The molecule with flat coordinates: its own, or new ones on a copy."""
    if mol.GetNumConformers() and not mol.GetConformer().Is3D():
        return mol
    copy = Chem.Mol(mol)
    rdDepictor.Compute2DCoords(copy, canonOrient=False)  # as the wasm does it
    return copy


def _parse(source: str) -> Any:
    check_size(source)
    notation = notation_of(source)
    mol = None
    with _captured_log() as log:
        try:
            if notation is Notation.JSON:
                mol = _from_graph(source)
            elif notation is Notation.CTFILE:
                mol = Chem.MolFromMolBlock(source, strictParsing=False)
            else:
                mol = Chem.MolFromSmiles(source)
        except (RuntimeError, ValueError, IndexError) as err:
            log.append(str(err))
    if mol is None:
        raise parse_failure(source, "\n".join(log))
    _clear_inverting_nitrogen(mol)
    return mol


def _clear_inverting_nitrogen(mol: Any) -> None:
    """Nitrogen of an aziridine holds no configuration; the wasm forgets marks there, so both do."""
    unmarked = Chem.ChiralType.CHI_UNSPECIFIED
    marked = [a for a in mol.GetAtoms() if a.GetAtomicNum() == 7 and a.GetChiralTag() != unmarked]
    inverting = [a for a in marked if a.GetTotalDegree() == 3 and a.IsInRingSize(3)]
    for atom in inverting:
        atom.SetChiralTag(unmarked)
    if inverting:
        Chem.AssignStereochemistry(mol, cleanIt=True, force=True)


def _from_graph(source: str) -> Any:
    """Only the newer perception reads double-bond marks from a JSON graph (and drops outdated ones)."""
    Chem.SetUseLegacyStereoPerception(False)
    try:
        mol = Chem.JSONToMols(source)[0]
        Chem.SanitizeMol(mol)
        Chem.AssignStereochemistry(mol, cleanIt=True, force=True)
        rdCIPLabeler.AssignCIPLabels(mol)
    finally:
        Chem.SetUseLegacyStereoPerception(True)
    return mol


class _Collector(logging.Handler):
    """Keeps RDKit's messages while a parse listens, and drops them otherwise."""

    def __init__(self) -> None:
        super().__init__()
        self.lines: list[str] | None = None

    def emit(self, record: logging.LogRecord) -> None:
        if self.lines is not None:
            self.lines.append(record.getMessage())


_collector = _Collector()


def _route_log() -> None:
    rdBase.LogToPythonLogger()
    logger = logging.getLogger("rdkit")
    logger.handlers[:] = [_collector]
    logger.propagate = False
    for level in ("rdApp.warning", "rdApp.info", "rdApp.debug"):
        rdBase.DisableLog(level)


@contextmanager
def _captured_log() -> Iterator[list[str]]:
    lines: list[str] = []
    _collector.lines = lines
    try:
        yield lines
    finally:
        _collector.lines = None


@lru_cache(maxsize=8192)
def _query(smarts: str) -> Any:
    query = Chem.MolFromSmarts(smarts)
    if query is None:
        raise bad_pattern(smarts)
    return query


@lru_cache(maxsize=1024)
def _reaction(smarts: str) -> Any:
    try:
        reaction = rdChemReactions.ReactionFromSmarts(smarts)
    except ValueError as err:
        raise bad_reaction(smarts) from err
    return reaction
