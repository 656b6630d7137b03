"""A plain dense spin Hamiltonian in the full product space: slow, and shares nothing with the engine."""

from __future__ import annotations

from collections.abc import Sequence

import numpy as np

_RAISE = np.array([[0.0, 1.0], [0.0, 0.0]])
_Z = np.diag([0.5, -0.5])


def dense_lines(
    shifts: Sequence[float], couplings: Sequence[tuple[int, int, float]]
) -> tuple[np.ndarray, np.ndarray]:
    """Frequencies (Hz) and intensities of all transitions; intensities add up to the number of spins."""
    n = len(shifts)
    z = [_operator(_Z, k, n) for k in range(n)]
    up = [_operator(_RAISE, k, n) for k in range(n)]
    hamiltonian = sum(hz * z[k] for k, hz in enumerate(shifts))
    for a, b, j in couplings:
        hamiltonian = hamiltonian + j * (z[a] @ z[b] + (up[a] @ up[b].T + up[a].T @ up[b]) / 2)
    energies, states = np.linalg.eigh(hamiltonian)
    amplitudes = states.T @ sum(up) @ states
    intensities = amplitudes**2 / 2 ** (n - 1)
    upper, lower = np.nonzero(intensities > 1e-14)
    return energies[upper] - energies[lower], intensities[upper, lower]


def _operator(single: np.ndarray, place: int, n: int) -> np.ndarray:
    left, right = np.eye(2**place), np.eye(2 ** (n - place - 1))
    return np.kron(np.kron(left, single), right)


def expanded(
    counts: Sequence[int], shifts: Sequence[float], couplings: Sequence[tuple[int, int, float]]
) -> tuple[list[float], list[tuple[int, int, float]]]:
    """Groups of equivalent spins written out one by one (with a J inside groups, which must not matter)."""
    members, at = [], 0
    for n in counts:
        members.append(list(range(at, at + n)))
        at += n
    single = [hz for hz, n in zip(shifts, counts, strict=True) for _ in range(n)]
    pairs = [(i, k, j) for a, b, j in couplings for i in members[a] for k in members[b]]
    pairs += [(g[i], g[k], -12.7) for g in members for i in range(len(g)) for k in range(i)]
    return single, pairs
