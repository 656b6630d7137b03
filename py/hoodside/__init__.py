"""Hoodside: do these readings fit this structure, what else would fit, and what to measure next."""

__version__ = "0.1.0"
