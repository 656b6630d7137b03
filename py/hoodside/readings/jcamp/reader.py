"""Reads a JCAMP-DX file into spectra and readings."""

from __future__ import annotations

from dataclasses import dataclass, replace

from hoodside.errors import InvalidInputError
from hoodside.readings.jcamp.bands import pick_bands
from hoodside.readings.jcamp.lines import carbon_lines, proton_signals
from hoodside.readings.jcamp.records import read_blocks
from hoodside.readings.jcamp.spectrum import INFRARED, MASS, NMR, Spectrum, spectrum_of
from hoodside.readings.model import IrBand, MassPeak, Readings
from hoodside.readings.solvents import known_solvent

_LEAST_ABUNDANCE = 1.0  # per cent of the base peak
_MOST_PEAKS = 200


@dataclass(frozen=True, slots=True)
class JcampReport:
    """What a file held: its spectra, the readings taken from them, and what does not agree."""

    spectra: tuple[Spectrum, ...]
    readings: Readings
    warnings: tuple[str, ...]


def read_jcamp(text: str) -> JcampReport:
    """Read every spectrum of a JCAMP-DX file (4.24, 5.0x), several blocks among them.

    Bands are picked from infrared curves, signals and lines from NMR, peaks from mass spectra. A block that
    cannot be read is left out with a warning as long as another can.
    Raises: InvalidInputError when no block can be read.
    """
    spectra: list[Spectrum] = []
    troubles: list[InvalidInputError] = []
    for block in read_blocks(text):
        try:
            spectra.append(spectrum_of(block))
        except InvalidInputError as err:
            troubles.append(err)
    if not spectra:
        raise (
            troubles[0]
            if troubles
            else InvalidInputError("The file holds no spectrum.", hint="Export it again.", field="text")
        )
    readings = Readings()
    for spectrum in spectra:
        readings = _with(readings, spectrum)
    warnings = [f"{s.title}: {w}" for s in spectra for w in s.warnings] + [str(err) for err in troubles]
    return JcampReport(tuple(spectra), replace(readings, warnings=tuple(warnings)), tuple(warnings))


def _with(readings: Readings, spectrum: Spectrum) -> Readings:
    """The readings with those of one more spectrum; the first of a kind counts."""
    if spectrum.kind == INFRARED and not readings.ir:
        if spectrum.peaks:
            return replace(readings, ir=tuple(IrBand(round(p.x, 1)) for p in spectrum.peaks))
        bands, clear = pick_bands(spectrum)
        return replace(readings, ir=tuple(bands), ir_clear=tuple(clear))
    if spectrum.kind == MASS and not readings.ms:
        return replace(readings, ms=tuple(_mass_peaks(spectrum)))
    if spectrum.kind == NMR:
        return _with_nmr(readings, spectrum)
    return readings


def _with_nmr(readings: Readings, spectrum: Spectrum) -> Readings:
    readings = replace(readings, solvent=readings.solvent or known_solvent(spectrum.solvent))
    if spectrum.x_unit != "ppm":
        return readings
    if spectrum.nucleus in ("1H", "") and not readings.h1:
        signals, raw = proton_signals(spectrum)
        return replace(readings, h1=tuple(signals), mhz=spectrum.mhz, raw_integrals=raw)
    if spectrum.nucleus == "13C" and not readings.c13:
        return replace(readings, c13=tuple(carbon_lines(spectrum)))
    return readings


def _mass_peaks(spectrum: Spectrum) -> list[MassPeak]:
    pairs = [(p.x, p.y) for p in spectrum.peaks] or list(zip(spectrum.x, spectrum.y, strict=True))
    top = max((y for _, y in pairs), default=0.0)
    if top <= 0:
        return []
    found = [MassPeak(x, round(100 * y / top, 1)) for x, y in pairs if 100 * y / top >= _LEAST_ABUNDANCE]
    return sorted(sorted(found, key=lambda p: -(p.rel or 0))[:_MOST_PEAKS], key=lambda p: -p.mz)
