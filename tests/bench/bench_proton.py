"""1H shifts against published spectra, each compound left out of the fit that predicts it."""

from __future__ import annotations

import sys
from collections.abc import Sequence
from pathlib import Path

import numpy as np

HERE = Path(__file__).resolve()
sys.path[:0] = [str(HERE.parents[2] / "py"), str(HERE.parents[1])]

from scipy.stats import t as student  # noqa: E402

from bench.fit_proton import Error, cross_validate, scale_table, stated_sd  # noqa: E402
from bench.proton_cases import assigned_rows, load_compounds  # noqa: E402
from hoodside.predict.proton.correction import DEGREES_OF_FREEDOM  # noqa: E402

#: Classes listed in the table, worst in total first.
LISTED = 20
CLOSE = 0.35  # ppm


def run() -> None:
    """Print error and calibration over published.json and reactions.json by cross-validation."""
    compounds = load_compounds()
    found = cross_validate(compounds, assigned_rows())
    report([e for e in found if e.origin == "published"], "1H, published.json")
    report([e for e in found if e.origin == "reactions"], "1H, reactions.json", 0)


def report(found: Sequence[Error], title: str, listed: int = LISTED) -> None:
    """Error overall and by class, and how often the stated 90 % interval holds."""
    middle = np.abs([e.error for e in found])
    beyond = np.array([e.beyond for e in found])
    print(f"{title}, cross-validated over compounds: {len(found)} groups of H")
    print(f"  mean absolute error {middle.mean():.3f} ppm (from a printed range {beyond.mean():.3f})")
    near, inside = np.mean(middle <= CLOSE), np.mean(beyond <= CLOSE)
    print(f"  within {CLOSE} ppm     {near:.1%} (of a printed range {inside:.1%})")
    print(f"  90 % interval holds {held(found):.1%}")
    by: dict[str, list[Error]] = {}
    for e in found:
        by.setdefault(e.environment, []).append(e)
    for name, members in sorted(by.items(), key=lambda kv: -sum(e.beyond for e in kv[1]))[:listed]:
        worst = max(members, key=lambda e: e.beyond)
        mean = np.mean([abs(e.error) for e in members])
        place = f"{worst.id} atoms {','.join(map(str, worst.atoms))}"
        print(f"    {name:36s} {len(members):5d} {mean:6.3f}  worst {worst.error:+.2f} {place}")


def held(found: Sequence[Error]) -> float:
    """Share of signals inside the central 90 % interval, scales fitted on the other half of the compounds."""
    ids = sorted({e.id for e in found})
    even = set(ids[::2])
    halves = [[e for e in found if e.id in even], [e for e in found if e.id not in even]]
    wide = student.ppf(0.95, DEGREES_OF_FREEDOM)
    inside = []
    for here, other in (halves, halves[::-1]):
        scales = scale_table(other)
        inside += [abs(e.error) <= wide * stated_sd(e, scales) for e in here]
    return float(np.mean(inside))


if __name__ == "__main__":
    run()
