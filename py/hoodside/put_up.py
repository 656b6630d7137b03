"""Who is put up in a check: the candidates given, and rivals asked for, stated by a step, or found before."""

from __future__ import annotations

from collections.abc import Sequence
from typing import TYPE_CHECKING, Any

from hoodside.errors import InvalidInputError, StructureError
from hoodside.readings import Readings
from hoodside.readings.fields import record, rows, text
from hoodside.weigh.expectations import Expectations, expectations

if TYPE_CHECKING:
    from hoodside.rivals import Rival  # only who asks for rivals pays for loading the search

#: More candidates than this are not weighed at once.
MOST_CANDIDATES = 200
#: So many rivals are weighed for each one asked for; the best are kept.
POOL = 2
MOST_RIVALS = 200
#: More rivals than this are not put up by name.
_MOST_PUT_UP = 20


def candidates_of(case: dict[str, Any]) -> list[str]:
    """The candidates of a check object as SMILES. Raises: InvalidInputError, StructureError."""
    given = case.get("candidates") or []
    if not isinstance(given, list | tuple):
        raise InvalidInputError(
            "candidates is no list.", hint="Give a list of SMILES.", field="candidates", value=given
        )
    if len(given) > MOST_CANDIDATES:
        raise InvalidInputError(
            f"{len(given)} candidates are too many.",
            hint=f"Give at most {MOST_CANDIDATES}.",
            field="candidates",
            value=len(given),
        )
    return [_smiles(entry, f"candidates[{i}]") for i, entry in enumerate(given)]


def _smiles(entry: object, field: str) -> str:
    if not isinstance(entry, str) or not entry.strip():
        raise InvalidInputError("A candidate is no text.", hint="Give a SMILES.", field=field, value=entry)
    text = entry.strip("\r") if "\n" in entry.strip() else entry.strip()
    if "\n" not in text:
        return text
    try:  # atoms are numbered by what the answer shows
        return expectations(text, Readings()).structure.smiles
    except StructureError as err:
        raise StructureError(str(err), hint=err.hint, field=field, value=entry) from err


def rivals_of(case: dict[str, Any], readings: Readings, candidates: Sequence[str]) -> tuple[Rival, ...]:
    """Look-alikes of the intended structure, ``POOL`` times as many as the check object asks for.

    Raises: InvalidInputError for a number that is none or too large.
    """
    wanted = case.get("rivals") or 0
    if not isinstance(wanted, int) or isinstance(wanted, bool) or not 0 <= wanted <= MOST_RIVALS:
        raise InvalidInputError(
            f"rivals is {wanted!r}.", hint=f"Ask for 0 to {MOST_RIVALS}.", field="rivals", value=wanted
        )
    if not wanted or not candidates:
        return ()
    from hoodside.rivals import find_rivals  # only who asks for rivals pays for loading the search

    intended = case.get("intended")
    at = intended if isinstance(intended, int) and 0 <= intended < len(candidates) else 0
    structure = expected_of(candidates[at], readings, f"candidates[{at}]").structure
    known = bool(readings.formula or readings.hrms or readings.analysis)
    found = find_rivals(structure, formula_known=known, readings=readings, limit=POOL * wanted)
    return found.rivals


def stated_of(case: dict[str, Any]) -> tuple[tuple[str, Rival], ...]:
    """What the step of a check object may have left, each with its name. Raises: as ``step_from_json``."""
    if case.get("step") is None:
        return ()
    from hoodside.rivals.stated import stated_rivals, step_from_json

    step = step_from_json(case["step"])
    return stated_rivals(step) if step else ()


def put_up_of(case: dict[str, Any]) -> tuple[tuple[str, Rival], ...]:
    """Rivals a hunt has found before, ``put_up: [{smiles, how}]``, to be named by their numbers.

    Raises: InvalidInputError for what is no list of such, or too long.
    """
    found = rows(case.get("put_up"), "put_up", _put_up)
    if len(found) > _MOST_PUT_UP:
        raise InvalidInputError(
            f"{len(found)} rivals are too many.", hint=f"Put up at most {_MOST_PUT_UP}.", field="put_up"
        )
    return tuple(("", rival) for rival in found)


def _put_up(entry: object, field: str) -> Rival:
    from hoodside.rivals import Rival

    given = record(entry, field, 'Give {"smiles": ..., "how": [...]}.')
    how = rows(given.get("how"), f"{field}.how", text)
    smiles = _smiles(given.get("smiles"), f"{field}.smiles")
    expected_of(smiles, Readings(), f"{field}.smiles")
    return Rival(smiles, how, len(how), 0.0)


def expected_of(source: str, readings: Readings, field: str) -> Expectations:
    """Expectations of a structure. Raises: StructureError naming the field."""
    try:
        return expectations(source, readings)
    except StructureError as err:
        raise StructureError(str(err), hint=err.hint, field=field, value=source) from err
