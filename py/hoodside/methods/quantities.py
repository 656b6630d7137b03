"""Amounts from integrals and masses."""

from __future__ import annotations

from typing import Any


def amounts(**question: Any) -> dict[str, Any]:
    """Answer one question about amounts; see ``hoodside.amounts.question.answer``."""
    from hoodside.amounts.question import answer

    return answer(question)
