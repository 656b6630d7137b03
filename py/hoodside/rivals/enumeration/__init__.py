"""Complete enumeration of isomers of small formulas."""

from hoodside.rivals.enumeration.isomers import Enumeration, enumerate_isomers

__all__ = ["Enumeration", "enumerate_isomers"]
