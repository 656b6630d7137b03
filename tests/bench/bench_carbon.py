"""13C prediction over the published compounds, by cross-validation over compounds."""

from __future__ import annotations


def run() -> None:
    """Print mean absolute error, spread and the worst classes (refitted per fold)."""
    from bench.fit_carbon import assigned_rows, cross_validate, load_compounds, report

    print("target: mean absolute error at most 1.7 ppm")
    report(cross_validate(load_compounds(), assigned_rows()))
