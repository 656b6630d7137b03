"""The one door: JSON text in, JSON text out. Worker, command line, host and tests all come in here."""

from __future__ import annotations

import json
from collections.abc import Callable
from functools import cache
from importlib import import_module
from typing import Any

from hoodside.errors import HoodsideError, InvalidInputError
from hoodside.methods.signature import check_arguments

#: Method -> "module:function". Modules are loaded at the first call, so that the engine starts fast.
METHODS: dict[str, str] = {
    "about": "about:about",
    "warm": "warming:warm",
    "describe": "structures:describe",
    "draw": "structures:draw",
    "formula": "formulas:formula",
    "formulas": "formulas:formulas",
    "parse": "readings:parse",
    "jcamp": "readings:jcamp",
    "report": "readings:report",
    "solvents": "readings:solvents",
    "wet_tests": "readings:wet_tests",
    "check": "checking:check",
    "predict": "prediction:predict",
    "spins": "multiplets:spins",
    "fit": "multiplets:fit",
    "trace": "multiplets:trace",
    "multiplet": "multiplets:multiplet",
    "partners": "multiplets:partners",
    "ir_regions": "infrared:regions",
    "ir_lookup": "infrared:lookup",
    "names": "structures:names",
    "tiles": "editing:tiles",
    "canvas": "editing:canvas",
    "options": "editing:options",
    "edit": "editing:edit",
    "outcomes": "steps:outcomes",
    "reagents": "steps:reagents",
    "rivals": "rivals:rivals",
    "hunt": "hunting:hunt",
    "proposals": "proposals:proposals",
    "changes": "changes:changes",
    "amounts": "quantities:amounts",
    "amount_tables": "quantities:amount_tables",
}
_HOME = "hoodside.methods."


def handle(method: str, params: str) -> str:
    """Answer one call.

    Args:
        method: a key of ``METHODS``.
        params: JSON object with the arguments of the method.
    Returns: JSON text, ``{"result": ...}`` or ``{"error": {"code", "message", "hint", "field", "value"}}``.
        Raises nothing: what was not foreseen comes back as code "internal", a trapped kernel as
        "kernel_crash" (start the engine afresh and repeat the call once).
    """
    try:
        return json.dumps({"result": call(method, _arguments(params))}, allow_nan=False)
    except Exception as err:  # the door is where every error turns into an answer
        return json.dumps({"error": error_of(err)})


def call(method: str, arguments: dict[str, Any]) -> Any:
    """The result of a method, JSON-ready. Raises: what the method raises."""
    run = _method(method)
    check_arguments(method, run, arguments)
    return run(**arguments)


def error_of(err: BaseException) -> dict[str, object]:
    """The error part of an answer."""
    if isinstance(err, HoodsideError):
        return err.to_dict()
    # A plain RuntimeError comes from the molecule kernel alone; its subclasses are Python's own.
    trapped = type(err) is RuntimeError
    about = f"{type(err).__name__}: {err}".strip(": ")[:300]
    return {
        "code": "kernel_crash" if trapped else "internal",
        "message": "The molecule kernel stopped."
        if trapped
        else f"The engine failed at this input ({about}).",
        "hint": "Repeat the call once with a fresh engine."
        if trapped
        else "Nothing is lost. Change the last thing entered, and please report the message.",
        "field": "",
        "value": None,
    }


def _arguments(params: str) -> dict[str, Any]:
    try:
        arguments = json.loads(params)
    except json.JSONDecodeError as err:
        raise InvalidInputError(
            f"The parameters are no JSON: {err.msg} at line {err.lineno}, column {err.colno}.",
            hint="Send one JSON object.",
            field="params",
        ) from err
    except ValueError as err:  # a number of thousands of digits
        raise InvalidInputError(
            f"The parameters cannot be read: {err}.", hint="Shorten the longest number.", field="params"
        ) from err
    except RecursionError as err:
        raise InvalidInputError(
            "The parameters are nested too deeply.", hint="Send a flat object.", field="params"
        ) from err
    if not isinstance(arguments, dict):
        raise InvalidInputError(
            "The parameters are no JSON object.", hint='Send {"name": value, ...}.', field="params"
        )
    return arguments


@cache
def _method(name: str) -> Callable[..., Any]:
    if name not in METHODS:
        known = ", ".join(METHODS)
        raise InvalidInputError(
            f"The engine has no method {name!r}.", hint=f"Use one of: {known}.", field="method", value=name
        )
    module, function = METHODS[name].split(":")
    found: Callable[..., Any] = getattr(import_module(_HOME + module), function)
    return found
