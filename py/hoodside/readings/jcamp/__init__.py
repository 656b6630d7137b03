"""Reads JCAMP-DX files 4.24 and 5.0x: infrared, NMR and mass spectra, peak tables, several in one file."""

from hoodside.readings.jcamp.reader import JcampReport, read_jcamp
from hoodside.readings.jcamp.spectrum import Spectrum

__all__ = ["JcampReport", "Spectrum", "read_jcamp"]
