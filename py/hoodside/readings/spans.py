"""What the numbers of readings may be."""

from __future__ import annotations

from hoodside.readings.fields import Span

# Wide: strained, metal-bound and hydrogen-bonded H lie far out (common practice).
PROTON_SHIFT = Span("1H shift", -5, 25, "ppm")
CARBON_SHIFT = Span("13C shift", -60, 320, "ppm")
WAVENUMBER = Span("wavenumber", 200, 4500, "cm-1")
MZ = Span("m/z", 1, 5000)
FIELD = Span("1H frequency", 20, 2000, "MHz")
COUPLING = Span("coupling", 0, 300, "Hz")
CF_COUPLING = Span("C-F coupling", 0, 500, "Hz")
INTEGRAL = Span("number of H", 0.01, 1000)
RAW_INTEGRAL = Span("integral", 1e-9, 1e12)
PERCENT = Span("percentage", 0, 100, "%")
REL = Span("height", 0, 1000, "%")
TOLERANCE = Span("tolerance", 0.01, 1000, "ppm")
CARBONS = Span("number of carbons", 1, 100)
