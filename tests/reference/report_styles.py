"""House styles in which the published cases are printed out again, to be read back.

Styles follow the author guidelines as recalled: ACS ("δ 7.81 (d, J = 8.2 Hz, 2H)"), RSC ("δH (400 MHz; CDCl3)
7.81 (2 H, d, J 8.2)"), Wiley ("δ = 7.81 (d, 3J(H,H) = 8.2 Hz, 2 H)"); the others are common practice.
"""

from __future__ import annotations

from collections.abc import Callable, Iterator
from dataclasses import dataclass

from hoodside.readings.model import CarbonLine, IrBand, ProtonSignal, Readings


@dataclass(frozen=True)
class Style:
    """How one house prints lists."""

    name: str
    proton_head: Callable[[Readings], str]
    proton: Callable[[ProtonSignal], str]
    between: str
    carbon_head: str
    carbon: Callable[[CarbonLine], str]
    infrared: Callable[[tuple[IrBand, ...]], str]


def printed(style: Style, readings: Readings) -> Iterator[str]:
    """The lists of one sample, one text each."""
    if readings.h1:
        yield style.proton_head(readings) + style.between.join(style.proton(s) for s in readings.h1) + "."
    if readings.c13:
        yield style.carbon_head + style.between.join(style.carbon(c) for c in readings.c13) + "."
    if readings.ir:
        yield style.infrared(readings.ir)


def _shift(signal: ProtonSignal, dash: str = "–") -> str:
    low, high = f"{signal.lo:.2f}", f"{signal.hi:.2f}"
    return low if low == high else f"{high}{dash}{low}"


def _field(readings: Readings) -> list[str]:
    return [f"{readings.mhz:g} MHz"] if readings.mhz else []


def _conditions(readings: Readings, solvent_first: bool = False, between: str = ", ") -> str:
    parts = _field(readings) + ([readings.solvent] if readings.solvent else [])
    return between.join(reversed(parts) if solvent_first else parts)


def _in_brackets(text: str) -> str:
    return f"({text})" if text else ""


def _js(signal: ProtonSignal, between: str = ", ") -> str:
    return between.join(f"{j:.1f}" for j in signal.j)


def _acs(signal: ProtonSignal) -> str:
    j = [f"J = {_js(signal)} Hz"] if signal.j else []
    return f"{_shift(signal)} ({', '.join([signal.mult or 'm', *j, f'{signal.n:g}H'])})"


def _rsc(signal: ProtonSignal) -> str:
    j = [f"J {_js(signal, ' and ' if len(signal.j) == 2 else ', ')}"] if signal.j else []
    return f"{_shift(signal, '-')} ({', '.join([f'{signal.n:g} H', signal.mult or 'm', *j])})"


def _wiley(signal: ProtonSignal) -> str:
    j = [f"³J(H,H) = {value:.1f} Hz" for value in signal.j]
    return f"{_shift(signal)} ({', '.join([signal.mult or 'm', *j, f'{signal.n:g} H'])}; CH)"


def _continental(signal: ProtonSignal) -> str:
    return _acs(signal).replace(".", ",")


def _bare(signal: ProtonSignal) -> str:
    j = [f"J = {_js(signal)} Hz"] if signal.j else []
    return f"{_shift(signal, '-')}, {', '.join([signal.mult or 'm', *j, f'{signal.n:g}H'])}"


def _carbon(line: CarbonLine) -> str:
    parts = ([f"{line.n}C"] if line.n > 1 else []) + ([line.kind] if line.kind else [])
    return f"{line.ppm:.1f}" + _in_brackets(", ".join(parts))


def _carbon_spaced(line: CarbonLine) -> str:
    return _carbon(line).replace("(", " (")


_STRENGTH = {"strong": "s", "medium": "m", "weak": "w", "": ""}
_SHAPE = {"broad": "br", "sharp": "", "": ""}


def _band(band: IrBand) -> str:
    words = ", ".join(w for w in (_SHAPE[band.shape], _STRENGTH[band.strength]) if w)
    return f"{band.cm1:.0f}" + (f" ({words})" if words else "")


def _band_glued(band: IrBand) -> str:
    return f"{band.cm1:.0f}{_STRENGTH[band.strength]}{_SHAPE[band.shape]}"


STYLES = (
    Style(
        "ACS",
        lambda r: f"1H NMR {_in_brackets(_conditions(r))} δ ",
        _acs,
        ", ",
        "13C{1H} NMR (101 MHz, CDCl3) δ ",
        _carbon_spaced,
        lambda bands: f"IR (film) ν {', '.join(map(_band, bands))} cm–1.",
    ),
    Style(
        "RSC",
        lambda r: f"δH {_in_brackets(_conditions(r, between='; '))} ",
        _rsc,
        ", ",
        "δC (101 MHz; CDCl3) ",
        _carbon_spaced,
        lambda bands: f"νmax(film)/cm−1 {', '.join(map(_band_glued, bands))};",
    ),
    Style(
        "Wiley",
        lambda r: f"¹H NMR {_in_brackets(_conditions(r))}: δ = ",
        _wiley,
        ", ",
        "¹³C NMR (101 MHz, CDCl₃): δ = ",
        _carbon,
        lambda bands: f"IR (KBr): ν̃ = {', '.join(map(_band, bands))} cm⁻¹.",
    ),
    Style(
        "continental, decimal commas",
        lambda r: f"1H-NMR {_in_brackets(_conditions(r, solvent_first=True, between='; '))}: δ [ppm] = ",
        _continental,
        "; ",
        "13C-NMR (CDCl3): δ [ppm] = ",
        lambda line: _carbon_spaced(line).replace(".", ","),
        lambda bands: f"FT-IR (ATR): {', '.join(map(_band, bands))} cm^-1",
    ),
    Style(
        "without brackets",
        lambda r: f"1H NMR {_in_brackets(_conditions(r))} delta ",
        _bare,
        "; ",
        "13C NMR: ",
        _carbon,
        lambda bands: f"IR: {'; '.join(map(_band, bands))}",
    ),
    Style(
        "broken over lines, raised figures as markup",
        lambda r: f"<sup>1</sup>H NMR {_in_brackets(_conditions(r))}\nδ: ",
        lambda s: _acs(s).replace(", ", ",\n"),
        ",\n",
        "<sup>13</sup>C NMR\n(101 MHz, CDCl<sub>3</sub>)\nδ ",
        _carbon_spaced,
        lambda bands: f"IR\n(neat)\n{','.join(map(_band, bands))}\ncm<sup>-1</sup>",
    ),
)
