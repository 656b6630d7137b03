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
    hamiltonian = sum(hz * _operator({k: _Z}, n) for k, hz in enumerate(shifts))
    for a, b, j in couplings:
        hamiltonian = hamiltonian + j * _operator({a: _Z, b: _Z}, n)
        hamiltonian += j / 2 * _operator({a: _RAISE, b: _RAISE.T}, n)
        hamiltonian += j / 2 * _operator({a: _RAISE.T, b: _RAISE}, n)
    return _transitions(hamiltonian, sum(_operator({k: _RAISE}, n) for k in range(n)), n)


def _operator(factors: dict[int, np.ndarray], n: int) -> np.ndarray:
    found = np.eye(1)
    for k in range(n):
        found = np.kron(found, factors.get(k, np.eye(2)))
    return found


def _transitions(hamiltonian: np.ndarray, raising: np.ndarray, n: int) -> tuple[np.ndarray, np.ndarray]:
    energies, vectors = np.linalg.eigh(hamiltonian)
    amplitudes = vectors.T @ raising @ vectors
    intensities = amplitudes**2 / 2 ** (n - 1)
    upper, lower = np.nonzero(intensities > 1e-14)
    return energies[upper] - energies[lower], intensities[upper, lower]


def tuned_dense_lines(
    shifts: Sequence[float], couplings: Sequence[tuple[int, int, float]]
) -> tuple[np.ndarray, np.ndarray]:
    """The same, with the matrices filled element by element: as fast as full matrices can be."""
    n = len(shifts)
    states = np.arange(2**n)
    # m of every spin in every product state: +1/2 where its bit is set.
    m = np.array([(states >> k & 1) - 0.5 for k in range(n)])
    hamiltonian = np.diag(m.T @ np.asarray(shifts, dtype=float))
    for a, b, j in couplings:
        hamiltonian[states, states] += j * m[a] * m[b]
        unlike = states[m[a] != m[b]]
        hamiltonian[unlike, unlike ^ (1 << a | 1 << b)] += j / 2
    raising = np.zeros((2**n, 2**n))
    for k in range(n):
        down = states[m[k] < 0]
        raising[down | 1 << k, down] = 1.0
    return _transitions(hamiltonian, raising, n)


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
