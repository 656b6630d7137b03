"""The kernel in the browser: RDKit's wasm behind ``web/engine/kernel-bridge.js``.

Only text crosses the border. An answer that starts with "!" is RDKit's complaint; an exception from
the JavaScript side means that the wasm module has trapped.
"""

from __future__ import annotations

import json
from collections.abc import Sequence
from typing import Any

from hoodside.errors import KernelCrashError, StructureError
from hoodside.molecule.kernel import Matches, bad_pattern, bad_reaction
from hoodside.molecule.source import check_size, parse_failure

_COMPLAINT = "!"
_BAD_SMARTS = "!SMARTS "
_BAD_REACTION = "!REACTION "
#: Answer of the bridge when it no longer holds a list of patterns.
_NOT_KEPT = "?"
_MAX_LISTS = 64
#: RDKit's label for a centre whose configuration the source leaves open.
_OPEN = "(?)"


class BrowserKernel:
    """RDKit through the bridge; see ``Kernel`` for the meaning of each call.

    Args:
        bridge: the bridge object; by default the JavaScript module ``hoodside_kernel`` that the worker
            registers with Pyodide.
    """

    name = "rdkit-wasm"

    def __init__(self, bridge: Any = None) -> None:
        if bridge is None:
            import hoodside_kernel  # type: ignore[import-not-found]  # registered by the worker

            bridge = hoodside_kernel
        self._bridge = bridge
        self._lists: dict[tuple[str, ...], str] = {}
        self._crashed = False

    def version(self) -> str:
        return self._call("version")

    def graph_json(self, source: str) -> str:
        return self._ask("graph", source)

    def smiles(self, source: str) -> str:
        return self._ask("smiles", source)

    def inchi(self, source: str) -> str:
        return self._ask("inchi", source)

    def inchikey(self, source: str) -> str:
        return self._ask("inchikey", source)

    def molblock(self, source: str) -> str:
        return self._ask("molblock", source)

    def coords(self, source: str) -> list[tuple[float, float]]:
        return [(x, y) for x, y in json.loads(self._ask("coords", source))]

    def raw_svg(self, source: str, options: str) -> str:
        check_size(source)
        return self._answer(source, "svg", source, options)

    def stereo_labels(self, source: str) -> tuple[dict[int, str], dict[tuple[int, int], str]]:
        tags = json.loads(self._ask("stereo", source))
        atoms = {atom: label.strip("()") for atom, label in tags["CIP_atoms"] if label != _OPEN}
        bonds = {
            (min(a, b), max(a, b)): label.strip("()") for a, b, label in tags["CIP_bonds"] if label != _OPEN
        }
        return atoms, bonds

    def matches(self, source: str, smarts: Sequence[str], unique: bool = True) -> list[Matches]:
        check_size(source)
        patterns = tuple(smarts)
        found: list[Matches] = [()] * len(patterns)
        for index, matches in json.loads(self._match_all(source, patterns, unique)):
            found[index] = tuple([tuple(atoms) for atoms in matches])
        return found

    def react(self, reaction: str, sources: Sequence[str]) -> list[list[str]]:
        for source in sources:
            check_size(source)
        answer = self._call("react", reaction, json.dumps(list(sources)))
        if answer.startswith(_BAD_REACTION):
            raise bad_reaction(reaction)
        products: list[list[str]] = json.loads(self._accepted(answer, sources[0]))
        return products

    def live_handles(self) -> int:
        return int(self._call("liveHandles"))

    def close(self) -> None:
        self._lists.clear()
        self._call("close")

    def _ask(self, what: str, source: str) -> str:
        check_size(source)
        return self._answer(source, "ask", what, source)

    def _match_all(self, source: str, patterns: tuple[str, ...], unique: bool) -> str:
        name = self._lists.get(patterns)
        answer = self._call("matchAll", source, name, unique) if name else _NOT_KEPT
        if answer == _NOT_KEPT:
            answer = self._call("matchAll", source, self._keep(patterns), unique)
        if answer.startswith(_BAD_SMARTS):
            raise bad_pattern(answer.removeprefix(_BAD_SMARTS))
        return self._accepted(answer, source)

    def _keep(self, patterns: tuple[str, ...]) -> str:
        """Send a list of patterns over once; later calls name it."""
        if len(self._lists) >= _MAX_LISTS:
            self._lists.pop(next(iter(self._lists)))
        name = self._lists[patterns] = f"{len(patterns)}:{hash(patterns)}"
        self._call("keepPatterns", name, json.dumps(patterns))
        return name

    def _answer(self, source: str, call: str, *arguments: object) -> str:
        return self._accepted(self._call(call, *arguments), source)

    def _accepted(self, answer: str, source: str) -> str:
        if answer.startswith(_COMPLAINT):
            raise self._refusal(source, answer)
        return answer

    def _refusal(self, source: str, answer: str) -> StructureError:
        return parse_failure(source, answer.removeprefix(_COMPLAINT))

    def _call(self, call: str, *arguments: object) -> str:
        if self._crashed:
            raise _crash("it has trapped before")
        try:
            return str(getattr(self._bridge, call)(*arguments))
        except Exception as err:  # whatever JavaScript throws: the wasm heap cannot be trusted afterwards
            self._crashed = True
            raise _crash(str(err)) from err


def _crash(why: str) -> KernelCrashError:
    return KernelCrashError(
        f"The molecule kernel stopped: {why[:200]}.", hint="Start the engine afresh and repeat the call once."
    )
