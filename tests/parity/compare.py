"""Running the same calls on both sides."""

from __future__ import annotations

import json
from collections.abc import Callable
from typing import Any

import calls as here

Runner = Callable[[list[list[Any]]], list[dict[str, Any]]]


def same(in_browser: Runner, calls: list[list[Any]]) -> list[dict[str, Any]]:
    """Run calls on both sides and compare; the answers."""
    mine = json.loads(here.answer_all(json.dumps(calls)))
    theirs = in_browser(calls)
    apart = [(c, m, t) for c, m, t in zip(calls, mine, theirs, strict=True) if m != t]
    assert not apart, f"{len(apart)} of {len(calls)} differ, first: {apart[0]}"
    return mine
