"""Spin-spin couplings of a structure: typical values, Karplus relations, ring and rotor populations."""

from hoodside.predict.coupling.model import BARE, Coupling, Estimate, Site, SiteCoupling
from hoodside.predict.coupling.predict import Network, coupling_network, group_members, predict_couplings
from hoodside.predict.coupling.sites import site_couplings

__all__ = [
    "BARE",
    "Coupling",
    "Estimate",
    "Network",
    "Site",
    "SiteCoupling",
    "coupling_network",
    "group_members",
    "predict_couplings",
    "site_couplings",
]
