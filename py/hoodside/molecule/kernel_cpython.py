"""The kernel on CPython: PyPI's rdkit."""

from __future__ import annotations

from collections import OrderedDict
from collections.abc import Sequence
from functools import lru_cache
from typing import Any

from rdkit import Chem, RDLogger, rdBase
from rdkit.Chem import AllChem, rdDepictor
from rdkit.Chem.Draw import rdMolDraw2D

from hoodside.errors import StructureError
from hoodside.molecule.kernel import Matches
from hoodside.molecule.source import Notation, check_size, notation_of, parse_failure

_MAX_HANDLES = 256
_MAX_MATCHES = 100_000


class CPythonKernel:
    """RDKit through its Python bindings; see ``Kernel`` for the meaning of each call."""

    name = "rdkit"

    def __init__(self) -> None:
        self._open: OrderedDict[str, Any] = OrderedDict()
        Chem.SetUseLegacyStereoPerception(True)  # the browser build starts so; both must agree
        RDLogger.DisableLog("rdApp.*")

    def version(self) -> str:
        return str(rdBase.rdkitVersion)

    def graph_json(self, source: str) -> str:
        return str(Chem.MolToJSON(self._mol(source)))

    def smiles(self, source: str) -> str:
        return str(Chem.MolToSmiles(self._mol(source)))

    def inchi(self, source: str) -> str:
        return str(Chem.MolToInchi(self._mol(source)))

    def inchikey(self, source: str) -> str:
        return str(Chem.InchiToInchiKey(self.inchi(source)) or "")

    def molblock(self, source: str) -> str:
        return str(Chem.MolToMolBlock(self._laid_out(source)))

    def coords(self, source: str) -> list[tuple[float, float]]:
        conformer = self._laid_out(source).GetConformer()
        return [(p[0], p[1]) for p in conformer.GetPositions()]

    def svg(
        self, source: str, width: int, height: int, atoms: Sequence[int] = (), bonds: Sequence[int] = ()
    ) -> str:
        drawer = rdMolDraw2D.MolDraw2DSVG(width, height)
        drawer.DrawMolecule(self._laid_out(source), highlightAtoms=list(atoms), highlightBonds=list(bonds))
        drawer.FinishDrawing()
        return str(drawer.GetDrawingText())

    def matches(self, source: str, smarts: Sequence[str], unique: bool = True) -> list[Matches]:
        mol = self._mol(source)
        return [
            tuple(mol.GetSubstructMatches(_query(s), uniquify=unique, maxMatches=_MAX_MATCHES))
            for s in smarts
        ]

    def react(self, reaction: str, sources: Sequence[str]) -> list[list[str]]:
        found: dict[tuple[str, ...], None] = {}
        for products in _reaction(reaction).RunReactants([self._mol(s) for s in sources]):
            try:
                for product in products:
                    Chem.SanitizeMol(product)
            except ValueError:
                continue
            found[tuple(Chem.MolToSmiles(p) for p in products)] = None
        return [list(p) for p in found]

    def live_handles(self) -> int:
        return len(self._open)

    def close(self) -> None:
        self._open.clear()

    def _laid_out(self, source: str) -> Any:
        mol = self._mol(source)
        if not mol.GetNumConformers():
            rdDepictor.Compute2DCoords(mol)
        return mol

    def _mol(self, source: str) -> Any:
        mol = self._open.get(source)
        if mol is None:
            mol = self._open[source] = _parse(source)
            if len(self._open) > _MAX_HANDLES:
                self._open.popitem(last=False)
        else:
            self._open.move_to_end(source)
        return mol


def _parse(source: str) -> Any:
    check_size(source)
    notation = notation_of(source)
    try:
        if notation is Notation.JSON:
            mol = Chem.JSONToMols(source)[0]
        elif notation is Notation.CTFILE:
            mol = Chem.MolFromMolBlock(source)
        else:
            mol = Chem.MolFromSmiles(source)
    except (RuntimeError, ValueError) as err:
        raise parse_failure(source, str(err)) from err
    if mol is None:
        raise parse_failure(source, "")
    return mol


@lru_cache(maxsize=8192)
def _query(smarts: str) -> Any:
    query = Chem.MolFromSmarts(smarts)
    if query is None:
        raise StructureError(
            f"{smarts!r} is no valid SMARTS pattern.", hint="Mend the pattern.", value=smarts
        )
    return query


@lru_cache(maxsize=1024)
def _reaction(smarts: str) -> Any:
    return AllChem.ReactionFromSmarts(smarts)
