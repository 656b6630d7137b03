"""The search for rivals of a structure."""

from __future__ import annotations

import time
from collections.abc import Callable, Iterator

from hoodside.molecule.structure import Structure
from hoodside.readings.model import Readings
from hoodside.rivals.growth import Growth
from hoodside.rivals.model import Rival, RivalsFound

#: Structures looked at before the search gives up filling its list.
STEPS = 4000


def find_rivals(
    structure: Structure,
    *,
    formula_known: bool = True,
    readings: Readings | None = None,
    limit: int = 200,
    budget_s: float | None = None,
    steps: int = STEPS,
    on_progress: Callable[[list[Rival]], bool | None] | None = None,
) -> RivalsFound:
    """Look-alikes of a structure, most plausible first.

    Args:
        formula_known: when False, isoelectronic analogues of other formula are put up too.
        readings: rivals that these rule out beyond doubt are left out.
        limit: how many to keep.
        budget_s: seconds after which the search stops with what it has (None: no limit in time).
        steps: how many structures to look at in all.
        on_progress: called with every slice found; a true answer stops the search.
    """
    began = time.monotonic()
    growth = Growth(structure, limit, steps, lambda smiles: True)
    stopped = False
    for batch in growth.run():
        asked = bool(on_progress and on_progress(batch))
        late = budget_s is not None and time.monotonic() - began > budget_s
        if asked or late:
            stopped = True
            break
    return RivalsFound(tuple(growth.best()), False, "Stopped early." if stopped else "")


def iterate_rivals(structure: Structure, *, limit: int = 200, steps: int = STEPS) -> Iterator[list[Rival]]:
    """Slices of rivals as they are found, for a caller that shows progress and may stop at any slice."""
    yield from Growth(structure, limit, steps, lambda smiles: True).run()
