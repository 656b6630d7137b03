"""Whether a further measurement gives what the advice expects of it, over published spectra.

For the truth of every published case and its rivals of the same formula: the weight expected of a 1H, 13C or
IR spectrum, worked out from predictions alone, against the weight that the published spectrum really gives.
Shares realised by compounds left out of the fits (``held_out.folds``: 1H 0.55, 13C 0.73) stand in the column
``realised`` of facts/measurements.csv. Published IR lists hold a few bands and no clear regions: an IR
strip gone through region by region tells more than they do.
"""

from __future__ import annotations

import sys
from collections.abc import Callable
from pathlib import Path

HERE = Path(__file__).resolve()
sys.path[:0] = [str(HERE.parents[2] / "py"), str(HERE.parents[1])]

from bench.ranking_cases import Case, load_cases  # noqa: E402
from hoodside.advise.imagined import Weigher, by_bands, by_carbons, by_protons, only, total  # noqa: E402
from hoodside.advise.infrared import infrared_measurements  # noqa: E402
from hoodside.advise.magnetic import nmr_measurements  # noqa: E402
from hoodside.advise.model import Measurement, Pair  # noqa: E402
from hoodside.readings import Readings  # noqa: E402

#: Rivals asked about per case.
RIVALS = 3
BINS = ((0.0, 3.0), (3.0, 8.0), (8.0, 15.0), (15.0, 30.0), (30.0, 60.0), (60.0, 1e9))
KINDS: dict[str, tuple[Weigher, Callable[[Readings], list[Measurement]]]] = {
    "h1": (by_protons, nmr_measurements),
    "c13": (by_carbons, nmr_measurements),
    "ir": (by_bands, infrared_measurements),
}


def run() -> None:
    """Print expected against realised weight by kind of measurement and by size."""
    cases = load_cases()
    for kind in KINDS:
        pairs = [pair for case in cases if getattr(case.readings, kind) for pair in weights(case, kind)]
        expected, realised = sum(e for e, _ in pairs), sum(r for _, r in pairs)
        print(f"{kind}: {len(pairs)} pairs, expected {expected / len(pairs):.1f} dB in the mean,", end=" ")
        print(f"realised {realised / len(pairs):.1f}, share {realised / expected:.2f}")
        for lo, hi in BINS:
            inside = [(e, r) for e, r in pairs if lo <= e < hi]
            if inside:
                mean = [sum(column) / len(inside) for column in zip(*inside, strict=True)]
                print(f"  {len(inside):5d} pairs   expected {mean[0]:6.1f}   realised {mean[1]:6.1f}")


def weights(case: Case, kind: str) -> list[tuple[float, float]]:
    """(expected, realised) decibans between the truth and some rivals."""
    weigh, offers = KINDS[kind]
    bare = only(case.readings)
    offer = next(o for o in offers(bare) if o.key == kind)
    seen = only(case.readings, **{kind: getattr(case.readings, kind)})
    truth = case.structures[0]
    rivals = [e for e in case.structures[1:] if e.formula == truth.formula]
    return [
        (
            offer.gain(Pair(truth, rival, ("truth", "rival"))).expected_db,
            total(weigh(truth, seen)) - total(weigh(rival, seen)),
        )
        for rival in rivals[:RIVALS]
    ]


if __name__ == "__main__":
    run()
