"""Which elements and isotope labels have a mass here: a structure of others has no formula to go by."""

from __future__ import annotations

from functools import cache

from hoodside.errors import StructureError
from hoodside.facts.table import load_table


@cache
def _known() -> frozenset[tuple[str, int]]:
    """(element, mass number) of every nuclide in the table, and (element, 0) of every element."""
    rows = load_table("isotopes")
    return frozenset((row["element"], number) for row in rows for number in (0, int(row["A"])))


def check_nuclide(symbol: str, label: int, source: str) -> None:
    """Refuse an open end, an element or a label without a mass (facts table isotopes).

    Args:
        label: mass number, 0 where none is written.
        source: the structure the atom is of.
    Raises: StructureError.
    """
    if (symbol, label) in _known():
        return
    if (symbol, 0) in _known():
        what, mend = f"{label}{symbol} has no mass here", "Leave the label off."
    elif symbol == "*":
        what, mend = "an open end (*) is no atom", "Put the atom or group there that is meant."
    else:
        what, mend = f"{symbol} has no mass here", "Leave that atom out, or take a stable element."
    raise StructureError(f"The structure cannot be worked with: {what}.", hint=mend, value=source)
