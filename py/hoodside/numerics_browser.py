"""The numerics seam in the browser: the JavaScript module ``hoodside_numerics`` on views of our memory.

See web/engine/numerics-bridge.js. Arrays cross as buffers; JavaScript reads and writes them in place.
"""

from __future__ import annotations

from array import array
from typing import Any


class BrowserSolver:
    """See ``numerics.Solver``."""

    def __init__(self) -> None:
        import hoodside_numerics  # type: ignore[import-not-found]  # registered by the worker

        self._js: Any = hoodside_numerics

    def eigh(self, n: int, matrix: array[float], values: array[float], vectors: array[float]) -> None:
        self._js.eigh(n, matrix, values, vectors)

    def product(
        self, n: int, k: int, m: int, a: array[float], b: array[float], out: array[float], turned: bool
    ) -> None:
        self._js.product(n, k, m, a, b, out, turned)

    def transitions(
        self,
        n: int,
        m: int,
        energies: tuple[array[float], array[float]],
        amplitudes: tuple[array[float], array[float]],
        scale: float,
        least: float,
        hz: array[float],
        intensity: array[float],
    ) -> int:
        return int(self._js.transitions(n, m, *energies, *amplitudes, scale, least, hz, intensity))

    def merge(
        self, count: int, hz: array[float], intensity: array[float], within: float, least: float
    ) -> int:
        return int(self._js.merge(count, hz, intensity, within, least))
