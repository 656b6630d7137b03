"""The ``predict`` command."""

from __future__ import annotations

import argparse
from collections.abc import Callable, Iterator
from typing import Any

from hoodside.cli.answer import answer_one, columns, unsaturations
from hoodside.cli.files import read_text
from hoodside.weigh.words import carbon_words

_MOST_IONS = 12


def run(options: argparse.Namespace) -> int:
    """Predict for one structure."""
    smiles = read_text("-") if options.smiles == "-" else options.smiles
    asked = {"smiles": smiles, "solvent": options.solvent, "mhz": options.mhz}
    return answer_one("predict", {k: v for k, v in asked.items() if v}, options.json, _told(options.explain))


def _told(explain: bool) -> Callable[[dict[str, Any]], Iterator[str]]:
    return _explained if explain else _lines


def _explained(answer: dict[str, Any]) -> Iterator[str]:
    """Every shift and band with the terms that it is the sum of."""
    yield f"{answer['smiles']}  {answer['formula']}"
    for kind, unit, figure in (("h1", "ppm", _proton), ("c13", "ppm", _carbon), ("ir", "cm-1", _band)):
        for entry in answer[kind]:
            yield ""
            yield f"{kind}  {'  '.join(str(cell) for cell in figure(entry) if cell)}"
            for term in entry["terms"]:
                yield f"    {term['value']:+10.2f} {unit}  {term['label']}  [{term['source']}]"


def _lines(answer: dict[str, Any]) -> Iterator[str]:
    degree = unsaturations(answer["dbe"])
    yield f"{answer['smiles']}  {answer['formula']}  {answer['exact_mass']:.4f} u  {degree}".rstrip()
    yield ""
    yield f"1H, {answer['mhz']:g} MHz, {answer['solvent']}"
    yield from columns(map(_proton, sorted(answer["h1"], key=lambda g: -g["ppm"])), right=(0,))
    yield ""
    yield "13C"
    yield from columns(map(_carbon, sorted(answer["c13"], key=lambda g: -g["ppm"])), right=(0,))
    yield ""
    yield "IR, cm-1"
    bands = sorted(answer["ir"], key=lambda b: -b["typical"])
    yield from columns(map(_band, bands), right=(0,))
    ions = sorted(answer["ms"]["ions"], key=lambda i: -i["weight"])[:_MOST_IONS]
    if ions:
        yield ""
        yield "Electron ionisation, m/z"
        yield from columns(([f"{i['mz']:.4f}", f"{i['weight']:.2f}", i["label"]] for i in ions), right=(0,))


def _band(band: dict[str, Any]) -> list[object]:
    place = f"{band['hi']}-{band['lo']}"
    return [band["typical"], place, band["strength"], band["shape"], f"{band['group']}, {band['mode']}"]


def _proton(group: dict[str, Any]) -> list[object]:
    j = ", ".join(f"{value:g}" for value in group["j"])
    shift = f"{group['ppm']:.2f}"
    if group["exchangeable"] and group["lo"] is not None:
        spread = f"{group['lo']:g} to {group['hi']:g}, exchangeable"
    else:
        spread = f"± {group['sd']:.2f}"
    return [shift, spread, f"{group['n']} H", group["mult"], f"J {j} Hz" if j else "", group["environment"]]


def _carbon(group: dict[str, Any]) -> list[object]:
    return [
        f"{group['ppm']:.1f}",
        f"± {group['sd']:.1f}",
        f"{group['n']} C",
        carbon_words(group["kind"], group["environment"]),
    ]
