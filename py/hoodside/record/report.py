"""Readings as report lines in the style of the ACS guidelines; ``readings.report`` reads them back."""

from __future__ import annotations

from collections.abc import Iterator

from hoodside.readings import CarbonLine, HighResMass, IrBand, MassPeak, ProtonSignal, Readings

_STRENGTHS = {"strong": "s", "medium": "m", "weak": "w"}
_SHAPES = {"broad": "br", "sharp": "sharp"}


def report_lines(readings: Readings) -> tuple[str, ...]:
    """One line per kind of reading that a journal prints; highest shift and wavenumber first.

    Shifts in ppm, J in Hz, bands in cm-1. Raw integrals are left out: they count no H.
    Source: ACS Style Guide, from memory.
    """
    return tuple(_lines(readings))


def _lines(readings: Readings) -> Iterator[str]:
    if readings.ir:
        medium = f" ({readings.ir_medium})" if readings.ir_medium else ""
        bands = sorted(readings.ir, key=lambda band: -band.cm1)
        yield f"IR{medium} ν {', '.join(map(_band, bands))} cm–1."
    if readings.h1:
        field = f"{readings.mhz:g} MHz" if readings.mhz else ""
        told = ", ".join(part for part in (field, readings.solvent) if part)
        signals = sorted(readings.h1, key=lambda signal: -signal.hi)
        shown = ", ".join(_proton(signal, readings.raw_integrals) for signal in signals)
        yield f"1H NMR{f' ({told})' if told else ''} δ {shown}."
    if readings.c13:
        solvent = f" ({readings.solvent})" if readings.solvent else ""
        lines = sorted(readings.c13, key=lambda line: -line.ppm)
        yield f"13C{{1H}} NMR{solvent} δ {', '.join(map(_carbon, lines))}."
    if readings.ms:
        peaks = sorted(readings.ms, key=lambda peak: -peak.mz)
        yield f"MS (EI) m/z (%) {', '.join(map(_peak, peaks))}."
    if readings.hrms:
        yield _accurate(readings.hrms)
    if readings.analysis:
        found = "; ".join(f"{element}, {percent:g}" for element, percent in readings.analysis.found.items())
        yield f"Anal.{f' for {readings.formula}' if readings.formula else ''}. Found: {found}."


def _proton(signal: ProtonSignal, raw: bool) -> str:
    shift = _shift(signal.hi) if signal.lo == signal.hi else f"{_shift(signal.hi)}–{_shift(signal.lo)}"
    told = [signal.mult, f"J = {', '.join(_shortest(j, 1) for j in signal.j)} Hz" if signal.j else ""]
    told.append(f"{signal.n:g}H" if signal.n is not None and not raw else "")
    told = [part for part in told if part]
    return f"{shift} ({', '.join(told)})" if told else shift


def _shift(ppm: float) -> str:
    return _shortest(ppm, 2)


def _shortest(value: float, decimals: int) -> str:
    """A number with at least so many decimals, and at most three."""
    text = f"{value:.3f}".rstrip("0")
    return text if len(text.partition(".")[2]) > decimals else f"{value:.{decimals}f}"


def _carbon(line: CarbonLine) -> str:
    told = [f"{line.n}C" if line.n > 1 else "", line.kind]
    told.insert(0, f"J = {', '.join(_shortest(j, 1) for j in line.j_cf)} Hz" if line.j_cf else "")
    told = [part for part in told if part]
    return _shortest(line.ppm, 1) + (f" ({', '.join(told)})" if told else "")


def _band(band: IrBand) -> str:
    told = [word for word in (_SHAPES.get(band.shape), _STRENGTHS.get(band.strength)) if word]
    return f"{band.cm1:g}" + (f" ({', '.join(told)})" if told else "")


def _peak(peak: MassPeak) -> str:
    return f"{peak.mz:g}" + (f" ({peak.rel:g})" if peak.rel is not None else "")


def _accurate(mass: HighResMass) -> str:
    calculated = f" calcd {mass.calc:.4f}," if mass.calc is not None else ""
    return f"HRMS m/z: {mass.adduct}{calculated} found {mass.found:.4f}."
