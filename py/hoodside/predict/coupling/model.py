"""Couplings as data."""

from __future__ import annotations

from dataclasses import dataclass

#: A magnetic nucleus: (atom, place). Hydrogens of one carrier have places 0, 1, 2; F and P have ``BARE``.
Site = tuple[int, int]

#: Place of a nucleus that is a heavy atom itself.
BARE = -1


@dataclass(frozen=True, slots=True)
class Estimate:
    """A coupling constant as a rule gives it."""

    hz: float  # signed
    sd: float  # Hz
    label: str
    source: str


@dataclass(frozen=True, slots=True)
class SiteCoupling:
    """The coupling between two single nuclei."""

    a: Site
    b: Site
    bonds: int
    estimate: Estimate


@dataclass(frozen=True, slots=True)
class Coupling:
    """One coupling constant between two groups of equivalent H, or a group and F or P.

    A pair of groups has two or more of these when its nuclei are not magnetically equivalent (AA'BB').
    """

    a: int  # index of the group
    b: int  # index of the partner group (equal to ``a`` within a group), -1 for F or P
    hz: float  # magnitude, Hz
    sd: float  # Hz, standard deviation of the error expected
    bonds: int
    sign: int  # +1 or -1
    label: str
    source: str
    pairs: int = 1  # pairs of nuclei coupled by this J
    hetero: tuple[int, ...] = ()  # the F or P atoms when ``b`` is -1
