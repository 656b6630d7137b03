"""Spin systems: exact line lists, clusters for large systems, traces, and whole structures."""

from hoodside.predict.spins.clusters import cluster_lines, simulate
from hoodside.predict.spins.contract import fit_from_json, spins_from_json
from hoodside.predict.spins.envelope import Trace, envelope
from hoodside.predict.spins.exact import exact_lines
from hoodside.predict.spins.model import Line, LineList, Nuclei, SpinSystem
from hoodside.predict.spins.molecule import SystemSpectrum, predict_spectrum, simulate_groups

__all__ = [
    "Line",
    "LineList",
    "Nuclei",
    "SpinSystem",
    "SystemSpectrum",
    "Trace",
    "cluster_lines",
    "envelope",
    "exact_lines",
    "fit_from_json",
    "predict_spectrum",
    "simulate",
    "simulate_groups",
    "spins_from_json",
]
