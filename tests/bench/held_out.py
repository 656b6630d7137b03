"""Published cases with predictions by tables fitted without them: what unseen compounds may expect."""

from __future__ import annotations

from collections.abc import Iterator

from bench import left_out
from bench.ranking_cases import Case, load_cases, published
from hoodside.weigh import expectations


def folds() -> Iterator[list[Case]]:
    """The cases of each fifth, their expectations made by tables that never saw them."""
    for fold in left_out.folds(published()):
        _forget()
        with left_out.predicting(fold):
            cases = load_cases(fold.cases)
            for case in cases:
                for expected in case.structures:
                    _ = expected.h1, expected.patterns, expected.c13
        _forget()
        yield cases


def _forget() -> None:
    expectations._kept.cache_clear()
    expectations._structure.cache_clear()
