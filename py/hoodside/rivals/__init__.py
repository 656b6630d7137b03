"""Rivals: structures that might fit the readings as well as the intended one."""

from hoodside.rivals.model import Rival, RivalsFound
from hoodside.rivals.search import find_rivals, iterate_rivals

__all__ = ["Rival", "RivalsFound", "find_rivals", "iterate_rivals"]
