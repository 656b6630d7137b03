"""The seam to RDKit: one protocol, two kernels (``kernel_cpython``, ``kernel_browser``).

A *source* is the text of a molecule in one of three notations: SMILES, CTfile (V2000 or V3000) or
RDKit's JSON graph. Kernels keep a bounded cache of open handles by source, so callers never hold, and
never have to free, a handle. Atom indices are those of the source, hydrogens folded into their atoms.
"""

from __future__ import annotations

import sys
from collections.abc import Sequence
from typing import Protocol

from hoodside.errors import StructureError

Matches = tuple[tuple[int, ...], ...]


class Kernel(Protocol):
    """What the engine asks of a molecule toolkit. Every method may raise StructureError."""

    name: str

    def version(self) -> str:
        """Toolkit version."""
        ...

    def graph_json(self, source: str) -> str:
        """The molecule as RDKit's JSON graph, version 12 (kekulised, with aromatic flags, rings, CIP)."""
        ...

    def smiles(self, source: str) -> str:
        """Canonical isomeric SMILES."""
        ...

    def inchi(self, source: str) -> str:
        """Standard InChI (empty when InChI cannot express the structure)."""
        ...

    def inchikey(self, source: str) -> str:
        """Standard InChIKey: the identity of a structure across kernels and versions."""
        ...

    def molblock(self, source: str) -> str:
        """CTfile V2000 with 2D coordinates."""
        ...

    def coords(self, source: str) -> list[tuple[float, float]]:
        """2D coordinates per atom, in units where a bond is about 1.5 long, y upward."""
        ...

    def raw_svg(self, source: str, options: str) -> str:
        """RDKit's own SVG, every atom marked by an ellipse, for ``drawing.in_one_ink`` to finish.

        ``options``: JSON of RDKit drawing options with width and height in pixels.
        """
        ...

    def stereo_labels(self, source: str) -> tuple[dict[int, str], dict[tuple[int, int], str]]:
        """CIP labels: atom -> "R", "S", "r" or "s"; (atom, atom), lower first -> "E" or "Z"."""
        ...

    def matches(self, source: str, smarts: Sequence[str], unique: bool = True) -> list[Matches]:
        """All matches of each pattern, in order. ``unique``: one match per set of atoms."""
        ...

    def react(self, reaction: str, sources: Sequence[str]) -> list[list[str]]:
        """Product sets (canonical SMILES each) of a reaction SMARTS, duplicates removed."""
        ...

    def live_handles(self) -> int:
        """Number of toolkit objects held open (bounded; for leak tests)."""
        ...

    def close(self) -> None:
        """Free every cached handle."""
        ...


def bad_pattern(smarts: str) -> StructureError:
    """The error for a SMARTS that does not parse."""
    return StructureError(f"{smarts!r} is no valid SMARTS pattern.", hint="Mend the pattern.", value=smarts)


def bad_reaction(smarts: str) -> StructureError:
    """The error for a reaction SMARTS that does not parse."""
    return StructureError(
        f"{smarts!r} is no valid reaction SMARTS.", hint="Write reactants>>products.", value=smarts
    )


_kernel: Kernel | None = None


def kernel() -> Kernel:
    """The kernel of this interpreter, opened on first use."""
    global _kernel
    if _kernel is None:
        _kernel = _open_default()
    return _kernel


def _open_default() -> Kernel:
    if sys.platform == "emscripten":
        from hoodside.molecule.kernel_browser import BrowserKernel

        return BrowserKernel()
    from hoodside.molecule.kernel_cpython import CPythonKernel

    return CPythonKernel()
