"""Drawings in one ink: turns RDKit's coloured SVG into one that takes the colours of its surroundings.

Strokes and letters are ``currentColor`` on a clear ground. What is lit wears the class ``lit`` and the colour
``var(--accent)``: atoms a ring, bonds a band. Every part keeps its classes ``atom-3`` and ``bond-2``.
"""

from __future__ import annotations

import cmath
import json
import math
import re
from collections.abc import Sequence
from dataclasses import dataclass

from hoodside.molecule.kernel import kernel
from hoodside.molecule.source import Notation, notation_of
from hoodside.molecule.structure import Structure

_STROKE = 2.0
#: RDKit lays bonds out this long and counts its scale per unit of it.
_BOND_LENGTH = 1.5
_RING_STROKE = 3.0
_LEAST_RING = 9.0
_BAND_STROKE = 12.0
#: Room that a label takes beyond its atom, in bond lengths of 1.5.
_LABEL_ROOM = 1.0
#: Degrees between the usual directions of bonds.
_STEP = 30

_MARKS = re.compile(r"<ellipse cx='([-\d.]+)' cy='([-\d.]+)' rx='([-\d.]+)'[^>]*class='atom-(\d+)'[^>]*/>")
_PATHS = re.compile(r"<path(?: class='([^']*)')? d='([^']*)'(?: style='([^']*)')?(?: fill='([^']*)')?\s*/>")
_WIDTH = re.compile(r"stroke-width:([\d.]+)px")
_BOND = re.compile(r"bond-(\d+) atom-(\d+) atom-(\d+)")


@dataclass(frozen=True, slots=True)
class Drawing:
    """``svg``: a whole SVG element. ``coords``: x, y of every atom in its pixels."""

    svg: str
    coords: tuple[tuple[float, float], ...]


def draw(
    structure: Structure,
    width: int = 300,
    height: int = 200,
    atoms: Sequence[int] = (),
    bonds: Sequence[int] = (),
    longest_bond: float = 0.0,
) -> Drawing:
    """Draw a structure into ``width`` x ``height`` pixels with the given atoms and bonds lit.

    Small structures fill the frame unless ``longest_bond`` (pixels) keeps them to a size.
    """
    turn = _best_turn(structure, width / height)
    raw = kernel().raw_svg(structure.source, drawing_options(width, height, turn, longest_bond))
    return in_one_ink(raw, atoms, bonds)


def drawing_options(width: int, height: int, turn: float = 0.0, longest_bond: float = 0.0) -> str:
    """RDKit drawing options (JSON); ``turn`` in degrees. Kernels mark every atom, to tell where it is."""
    options = {
        "width": width,
        "height": height,
        "rotate": turn,
        "bonds": [],
        "clearBackground": False,
        "bondLineWidth": _STROKE,
        "padding": 0.07,
        "minFontSize": 9,
        "atomHighlightsAreCircles": True,
        "highlightRadius": 0.35,
        "fixedBondLength": longest_bond / _BOND_LENGTH if longest_bond else -1.0,
    }
    return json.dumps(options)


def in_one_ink(raw: str, atoms: Sequence[int] = (), bonds: Sequence[int] = ()) -> Drawing:
    """Recolour RDKit's SVG, in which every atom is marked, and light what is asked for."""
    marks = {int(m[4]): (float(m[1]), float(m[2]), float(m[3])) for m in _MARKS.finditer(raw)}
    coords = tuple(marks[i][:2] for i in sorted(marks))
    ends = {int(m[1]): (int(m[2]), int(m[3])) for m in _BOND.finditer(raw)}
    bands = [_band(i, coords[ends[i][0]], coords[ends[i][1]]) for i in bonds if i in ends]
    rings = [_ring(i, *marks[i]) for i in atoms if i in marks]
    ink = "".join(_inked(*m.groups("")) for m in _PATHS.finditer(raw))
    return Drawing(f"{_opening(raw)}{''.join(bands)}{ink}{''.join(rings)}</g></svg>", coords)


def _best_turn(structure: Structure, aspect: float) -> float:
    """Degrees by which a fresh layout fills the frame best; a CTfile keeps the layout it came with.

    Bonds come to lie in steps of 30 degrees; where two turns fill alike, heteroatoms go right and up.
    """
    if notation_of(structure.source) is Notation.CTFILE or len(structure.atoms) == 1:
        return 0.0
    points = [complex(x, y) for x, y in kernel().coords(structure.source)]
    hetero = [atom.z not in (1, 6) for atom in structure.atoms]

    def merit(turn: float) -> tuple[float, float]:
        turned = [p * cmath.exp(-1j * math.radians(turn)) for p in points]  # RDKit turns clockwise
        across, up = (_extent(axis) for axis in zip(*[(p.real, p.imag) for p in turned], strict=True))
        middle = sum(turned) / len(turned)
        leaning = [p - middle for p, is_hetero in zip(turned, hetero, strict=True) if is_hetero]
        lean = sum(p.real + p.imag / 2 for p in leaning)
        return round(-max(across, up * aspect), 1), round(lean, 1)

    slant = _slant([points[bond.b] - points[bond.a] for bond in structure.bonds])
    return max((slant + _STEP * k for k in range(360 // _STEP)), key=merit)


def _extent(values: Sequence[float]) -> float:
    return max(values) - min(values) + _LABEL_ROOM


def _slant(bonds: list[complex]) -> float:
    """Mean angle in degrees by which bonds stand off the grid of 30 degrees."""
    folds = 360 // _STEP
    pull = sum((b / abs(b)) ** folds for b in bonds if abs(b) > 0)
    return round(math.degrees(cmath.phase(pull)) / folds, 1) if abs(pull) > 0 else 0.0


def _opening(raw: str) -> str:
    size = re.search(r"width='(\d+)px' height='(\d+)px'", raw)
    width, height = size.groups() if size else ("300", "200")
    return (
        f'<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 {width} {height}" '
        f'width="{width}" height="{height}">'
        f'<g fill="none" stroke="currentColor" stroke-width="{_STROKE:g}" stroke-linecap="round" '
        'stroke-linejoin="round">'
    )


def _inked(classes: str, outline: str, style: str, fill: str) -> str:
    mark = f' class="{classes}"' if classes else ""
    path = " ".join(outline.split())
    if fill:
        paint = ' fill="currentColor" stroke="none"'
    elif "fill:none" in style:
        paint = _thinner(style)
    else:
        paint = f' fill="currentColor"{_thinner(style)}'
    return f'<path{mark} d="{path}"{paint}/>'


def _thinner(style: str) -> str:
    """The stroke width, where RDKit asks for another than the usual."""
    width = _WIDTH.search(style)
    return "" if width is None or float(width[1]) == _STROKE else f' stroke-width="{float(width[1]):g}"'


def _ring(atom: int, x: float, y: float, radius: float) -> str:
    size = max(radius, _LEAST_RING)
    return (
        f'<circle class="lit atom-{atom}" cx="{x:g}" cy="{y:g}" r="{size:g}" '
        f'stroke="var(--accent, currentColor)" stroke-width="{_RING_STROKE:g}"/>'
    )


def _band(bond: int, start: tuple[float, float], end: tuple[float, float]) -> str:
    return (
        f'<path class="lit bond-{bond}" d="M {start[0]:g},{start[1]:g} L {end[0]:g},{end[1]:g}" '
        f'stroke="var(--accent, currentColor)" stroke-opacity="0.35" stroke-width="{_BAND_STROKE:g}"/>'
    )
