"""Published readings against the truth and its listed rivals: who comes first, verdicts, honesty of shares.

The shipped predictors have learned from these very spectra; ``bench_left_out`` and ``python
tests/bench/bench_ranking.py --held-out`` ask about compounds left out of the fits (some minutes).
"""

from __future__ import annotations

import random
import sys
from collections.abc import Callable, Sequence
from dataclasses import replace
from itertools import pairwise
from pathlib import Path

HERE = Path(__file__).resolve()
sys.path[:0] = [str(HERE.parents[2] / "py"), str(HERE.parents[1])]

from bench.ranking_cases import Case, Outcome, load_cases, outcomes, weigh_case  # noqa: E402
from bench.tables import Figure, print_figures  # noqa: E402
from hoodside.facts import load_table  # noqa: E402
from hoodside.readings import ProtonSignal, Readings  # noqa: E402
from hoodside.weigh.verdict import CLASHES, UNDECIDED  # noqa: E402

SEED = 20261201
BEHIND = 10.0
EDGES = (0.0, 0.01, 0.05, 0.2, 0.4, 0.6, 0.8, 0.95, 0.99, 1.0001)


def run() -> None:
    """Print all tables."""
    cases = load_cases()
    found = list(outcomes(cases))
    ranking_table(found)
    share_table(found)
    lost_table(found)
    fewer_readings_table(cases)
    robustness_table(cases)


def ranking_table(found: Sequence[Outcome]) -> None:
    """Truth first, verdicts on truths and on wrong structures."""
    wrong = [(o, i) for o in found for i in range(1, len(o.weights))]
    settled = [o.verdicts[i].verdict == CLASHES or o.weights[0] - o.weights[i] >= BEHIND for o, i in wrong]
    clashing = [o.case.id for o in found if o.verdicts[0].verdict == CLASHES]
    apart = [o.first(lambda i, o=o: i not in o.case.stereo) for o in found]
    spatial = [o.first(lambda i, o=o: i in o.case.stereo) for o in found if o.case.stereo]
    print_figures(
        [
            Figure(
                "truth first", share([o.first() for o in found]), "%", least=92, note=f"{len(found)} cases"
            ),
            Figure("  among constitutional rivals", share(apart), "%"),
            Figure("  among stereoisomers", share(spatial), "%", note=f"{len(spatial)} cases"),
            Figure(
                "truth called clashing",
                100 * len(clashing) / len(found),
                "%",
                most=1,
                note=" ".join(clashing),
            ),
            Figure(
                "wrong: clashes or 10 dB behind", share(settled), "%", least=85, note=f"{len(wrong)} in all"
            ),
        ]
    )


def share(flags: Sequence[bool]) -> float:
    """Per cent that hold."""
    return 100 * sum(flags) / max(len(flags), 1)


def share_table(found: Sequence[Outcome]) -> None:
    """Predicted share against observed frequency."""
    rows = [(p, i == 0) for o in found for i, p in enumerate(o.shares) if len(o.shares) > 1]
    print("  share given    structures  mean share  was right")
    for lo, hi in pairwise(EDGES):
        inside = [(p, right) for p, right in rows if lo <= p < hi]
        if inside:
            mean = 100 * sum(p for p, _ in inside) / len(inside)
            right = share([r for _, r in inside])
            print(f"  {lo:4.2f} to {min(hi, 1):4.2f}   {len(inside):8d} {mean:10.1f} %{right:9.1f} %")


def lost_table(found: Sequence[Outcome], most: int = 60) -> None:
    """Truths that did not come first, with the reading that should have decided and the one that misled."""
    rows = []
    for o in found:
        if not o.first():
            best = max(range(1, len(o.weights)), key=o.weights.__getitem__)
            kind = "in space" if best in o.case.stereo else "constitution"
            source = o.case.structures[best].structure.source
            rows.append((o.weights[0] - o.weights[best], o.case.id, kind, source, telling(o, best)))
    print(f"  not first: {len(rows)}")
    for gap, name, kind, smiles, (decides, misleads) in sorted(rows)[:most]:
        print(f"  {gap:6.1f} dB  {kind:12} {name}: {smiles}")
        print(f"             should have decided: {decides}; misled: {misleads}")


def telling(outcome: Outcome, rival: int) -> tuple[str, str]:
    """The readings that speak most for the truth and most for a rival, with the decibans between the two."""
    gaps: dict[str, float] = {}
    for sign, tally in ((1.0, outcome.tallies[0]), (-1.0, outcome.tallies[rival])):
        for finding in tally.findings:
            where = " ".join(finding.readings) or f"{finding.kind} (not seen)"
            gaps[where] = gaps.get(where, 0.0) + sign * finding.weight_db
    named = sorted((gap, where) for where, gap in gaps.items() if abs(gap) >= 0.1)
    best, worst = (named[-1], named[0]) if named else ((0.0, "nothing"), (0.0, "nothing"))
    return (
        f"{best[1]} ({best[0]:+.1f})" if best[0] > 0 else "no reading taken",
        f"{worst[1]} ({worst[0]:+.1f})" if worst[0] < 0 else "none",
    )


def fewer_readings_table(cases: Sequence[Case]) -> None:
    """Readings removed one kind at a time."""
    kinds: dict[str, Callable[[Readings], Readings]] = {
        "1H only": lambda r: stripped(r, h1=r.h1),
        "13C only": lambda r: stripped(r, c13=r.c13),
        "IR and formula only": lambda r: stripped(r, ir=r.ir, formula=r.formula),
        "no formula, no masses": lambda r: stripped(r, h1=r.h1, c13=r.c13, ir=r.ir),
    }
    print("  readings left           cases  truth first  winner wrong: undecided (target 80 %)")
    for name, strip in kinds.items():
        found = [weigh_case(c, strip(c.readings)) for c in cases if measured(strip(c.readings))]
        first = share([o.first() for o in found])
        wrong = [o for o in found if max(o.weights[1:], default=-1e9) > o.weights[0]]
        careful = share([o.verdicts[winner(o)].verdict == UNDECIDED for o in wrong])
        print(f"  {name:22} {len(found):6d} {first:10.1f} % {careful:10.1f} % of {len(wrong)}")


def stripped(readings: Readings, **kept: object) -> Readings:
    """Only the conditions and what is named."""
    bare = {"formula": "", "h1": (), "c13": (), "ir": (), "ms": (), "hrms": None, **kept}
    return replace(readings, **bare)  # type: ignore[arg-type]


def measured(readings: Readings) -> bool:
    return bool(readings.h1 or readings.c13 or readings.ir)


def winner(outcome: Outcome) -> int:
    return max(range(len(outcome.weights)), key=outcome.weights.__getitem__)


def robustness_table(cases: Sequence[Case]) -> None:
    """Readings spoilt one way at a time, for the cases won with the readings as printed."""
    won = [c for c in cases if len(c.readings.h1) > 2 and weigh_case(c).first()]
    print("  spoilt by                       cases  truth still first (target 90 %)  odd reading named")
    for name, spoil in SPOILERS.items():
        still, named, tried = [], [], 0
        for case in won:
            spoilt, odd = spoil(case.readings, random.Random(f"{SEED} {case.id}"))
            outcome = weigh_case(case, spoilt)
            tried += 1
            still.append(outcome.first())
            named.append(is_named(outcome, odd))
        print(f"  {name:30} {tried:6d} {share(still):14.1f} % {share(named):33.1f} %")


def is_named(outcome: Outcome, odd: set[str]) -> bool:
    """Whether each odd reading is left unexplained or spoken against, for the truth."""
    tally = outcome.tallies[0]
    left = {x.ref for x in tally.unexplained}
    against = {ref for f in tally.findings if f.weight_db < 0 for ref in f.readings}
    return odd <= left | against


def with_impurities(readings: Readings, chance: random.Random) -> tuple[Readings, set[str]]:
    column = (readings.solvent or "CDCl3").replace("-", "_")
    rows = [r for r in load_table("impurities") if r["nucleus"] == "1H" and r.get(column)]
    places = [(float(r[column]), r["multiplicity"]) for r in chance.sample(rows, min(3, len(rows)))]
    added = [ProtonSignal(ppm, ppm, mult, (), round(chance.uniform(0.1, 0.8), 1)) for ppm, mult in places]
    return replace(readings, h1=(*readings.h1, *added)), {
        f"h1:{len(readings.h1) + k}" for k in range(len(added))
    }


def with_wrong_integral(readings: Readings, chance: random.Random) -> tuple[Readings, set[str]]:
    k = max(range(len(readings.h1)), key=lambda i: (readings.h1[i].n or 0, chance.random()))
    signal = readings.h1[k]
    wrong = replace(signal, n=round((signal.n or 1) * chance.choice((0.7, 1.3)), 1))
    return replace(readings, h1=(*readings.h1[:k], wrong, *readings.h1[k + 1 :])), {f"h1:{k}"}


def with_misprint(readings: Readings, chance: random.Random) -> tuple[Readings, set[str]]:
    k = chance.randrange(len(readings.h1))
    signal, off = readings.h1[k], chance.choice((-1.0, 1.0))
    wrong = replace(signal, lo=signal.lo + off, hi=signal.hi + off)
    return replace(readings, h1=(*readings.h1[:k], wrong, *readings.h1[k + 1 :])), {f"h1:{k}"}


def with_merged(readings: Readings, chance: random.Random) -> tuple[Readings, set[str]]:
    order = sorted(range(len(readings.h1)), key=lambda i: readings.h1[i].ppm)
    at = min(range(len(order) - 1), key=lambda k: readings.h1[order[k + 1]].lo - readings.h1[order[k]].hi)
    a, b = readings.h1[order[at]], readings.h1[order[at + 1]]
    merged = ProtonSignal(min(a.lo, b.lo), max(a.hi, b.hi), "m", (), (a.n or 1) + (b.n or 1))
    rest = tuple(s for i, s in enumerate(readings.h1) if i not in (order[at], order[at + 1]))
    return replace(readings, h1=(*rest, merged)), set()


Spoiler = Callable[[Readings, random.Random], tuple[Readings, set[str]]]
SPOILERS: dict[str, Spoiler] = {
    "three impurity signals": with_impurities,
    "largest integral off by 30 %": with_wrong_integral,
    "one shift misprinted by 1 ppm": with_misprint,
    "two nearest signals merged": with_merged,
}


def held_out() -> None:
    """The first tables with predictors that never saw the compound or its stereoisomers."""
    from bench.held_out import folds

    found: list[Outcome] = []
    for cases in folds():
        found += outcomes(cases)
    ranking_table(found)
    share_table(found)
    lost_table(found)


if __name__ == "__main__":
    held_out() if "--held-out" in sys.argv else run()
