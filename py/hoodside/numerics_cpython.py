"""The numerics seam on CPython: numpy on views of the caller's arrays."""

from __future__ import annotations

from array import array

import numpy as np


class NumpySolver:
    """See ``numerics.Solver``."""

    def eigh(self, n: int, matrix: array[float], values: array[float], vectors: array[float]) -> None:
        w, v = np.linalg.eigh(np.frombuffer(matrix).reshape(n, n))
        np.frombuffer(values)[:] = w
        np.frombuffer(vectors).reshape(n, n)[:] = v

    def product(
        self, n: int, k: int, m: int, a: array[float], b: array[float], out: array[float], turned: bool
    ) -> None:
        left = np.frombuffer(a).reshape(k, n).T if turned else np.frombuffer(a).reshape(n, k)
        np.matmul(left, np.frombuffer(b).reshape(k, m), out=np.frombuffer(out).reshape(n, m))

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
        first = np.frombuffer(amplitudes[0])
        places = np.flatnonzero(np.abs(first) > least)
        count = len(places)
        below, here = np.frombuffer(energies[0]), np.frombuffer(energies[1])
        np.frombuffer(hz)[:count] = here[places % m] - below[places // m]
        np.frombuffer(intensity)[:count] = first[places] * np.frombuffer(amplitudes[1])[places] * scale
        return count

    def merge(
        self, count: int, hz: array[float], intensity: array[float], within: float, least: float
    ) -> int:
        order = np.argsort(np.frombuffer(hz))
        at, size = np.frombuffer(hz)[order], np.frombuffer(intensity)[order]
        starts = np.flatnonzero(np.diff(at, prepend=-np.inf) > within)
        total = np.add.reduceat(size, starts)
        # The centre is taken from the first line, so that nothing is lost where the total is near zero.
        away = at - np.repeat(at[starts], np.diff(starts, append=count))
        moment = np.add.reduceat(away * size, starts)
        kept = np.abs(total) > least * np.abs(total).max()
        left = int(kept.sum())
        np.frombuffer(hz)[:left] = at[starts][kept] + moment[kept] / total[kept]
        np.frombuffer(intensity)[:left] = total[kept]
        return left
