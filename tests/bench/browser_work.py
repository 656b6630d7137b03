"""Warm work of the engine on a page of the app: a hunt for rivals, a whole prediction, an editing step."""

from __future__ import annotations

import json
import statistics
from collections.abc import Callable, Sequence
from pathlib import Path
from typing import Any

from playwright.sync_api import Page

from bench.tables import Figure
from bench.thread_time import worker_ms
from hoodside.engine import call

RIVALS = 30
READINGS = 15
#: Hunted first, so that patterns are compiled: aromatic, ester, N, S, halogen.
WARMING = ["CCCC(=O)OCc1ccccc1", "O=C(Nc1ccc(Cl)cc1)c1cccs1"]
#: Made-up samples, none of them asked about before; readings from the predicted spectrum: only time counts.
HUNTED = [
    "CCOc1ccc(C(C)=O)cc1",
    "CC(C)COC(=O)c1ccccc1N",
    "OCC1CCN(C(=O)c2ccc(F)cc2)CC1",
    "CC1=CC(=O)CC(C)(C)C1CO",
]
#: Of 23 to 27 heavy atoms.
PREDICTED = [
    "CC(C)Cc1ccc(C(C)C(=O)OCCN2CCN(C)CC2)cc1",
    "COc1cc(C=CC(=O)NCCc2ccc(O)cc2)ccc1OCC",
    "CCOC(=O)C1=C(C)NC(C)=C(C(=O)OC)C1c1cccc(Cl)c1",
    "O=C(Nc1ccc(F)cc1)c1cnn(Cc2ccccc2)c1C1CCNC1",
    "CC1CCC2C(C1)OC(=O)C2Cc1ccc(OCC(=O)N(C)C)cc1",
    "CS(=O)(=O)c1ccc(C2CC(=O)N(CCc3ccncc3)C2)cc1",
    "COC(=O)C(Cc1ccccc1)NC(=O)C1CCCN1C(=O)CCl",
]
#: Steps that grow one structure from a ring, as the touch screen asks for them.
GROWN = "Cc1ccccc1"
STEPS = [
    ("attach", {"group": group, "order": 1})
    for group in ("C", "O", "N", "C", "OC", "C(=O)C", "Cl", "C", "C#N")
]

#: [[ms to the first weighed, ms to the last, how many weighed], ...], one per sample.
HUNTS = """async ([samples, limit]) => {
  const took = [];
  for (const [structure, readings] of samples) {
    const began = performance.now();
    let first = 0;
    let answer;
    do {
      answer = await window.engine.call('hunt', { structure, readings, limit });
      if (!first && answer.weighed) first = performance.now() - began;
    } while (!answer.done);
    took.push([first, performance.now() - began, answer.weighed]);
  }
  return took;
}"""

PREDICTIONS = """async (structures) => {
  const took = [];
  for (const smiles of structures) {
    const began = performance.now();
    await window.engine.call('predict', { smiles, solvent: 'CDCl3', mhz: 400 });
    took.push(performance.now() - began);
  }
  return took;
}"""

#: From the tap until the new drawing stands in the page.
EDITS = """async ([structure, steps, formula]) => {
  const stage = document.body.appendChild(document.createElement('div'));
  const frame = { width: 390, height: 420, formula };
  let drawn = await window.engine.call('canvas', { structure, ...frame });
  const took = [];
  for (const [step, given] of steps) {
    const atom = drawn.atoms.findIndex(({ hydrogens }, i) => hydrogens && i >= drawn.atoms.length - 3);
    const began = performance.now();
    const asked = { structure: drawn.source, step, arguments: { atom, ...given }, ...frame };
    drawn = await window.engine.call('edit', asked);
    stage.replaceChildren(new DOMParser().parseFromString(drawn.svg, 'image/svg+xml').documentElement);
    took.push(performance.now() - began);
  }
  stage.remove();
  return took;
}"""


#: [ms of the longest slice, ms of all] of making the engine ready.
WARM = """async () => {
  let longest = 0;
  let all = 0;
  for (let done = false; !done;) {
    const began = performance.now();
    done = (await window.engine.call('warm')).done;
    const took = performance.now() - began;
    longest = Math.max(longest, took);
    all += took;
  }
  return [longest, all];
}"""


def warm_up(page: Page) -> tuple[float, float]:
    """Make the engine of a page ready: ms of the longest slice, ms of all."""
    longest, whole = page.evaluate(WARM)
    return longest, whole


def warm_work(page: Page, profile: Path) -> list[Figure]:
    """Figures of warm work on a page whose engine answers; ``profile`` is that of its browser."""
    page.evaluate(HUNTS, [[sample(smiles) for smiles in WARMING], RIVALS])
    page.evaluate(PREDICTIONS, WARMING)
    page.evaluate(EDITS, [GROWN, STEPS[:2], ""])
    hunts, hunting = _timed(
        profile, len(HUNTED), lambda: page.evaluate(HUNTS, [list(map(sample, HUNTED)), RIVALS])
    )
    whole, predicting = _timed(profile, len(PREDICTED), lambda: page.evaluate(PREDICTIONS, PREDICTED))
    steps, editing = _timed(profile, len(STEPS), lambda: page.evaluate(EDITS, [GROWN, STEPS, "C15H20N2O3"]))
    memory = page.evaluate("() => window.engine.call('worker.memory')")
    weighed = ", ".join(str(count) for _, _, count in hunts)
    return [
        _median(
            f"{RIVALS} rivals, {READINGS} readings, warm, to the first weighed", [h[0] for h in hunts], 300
        ),
        _median("the same, to the last", [h[1] for h in hunts], 2_500, f"weighed {weighed}"),
        _processor("the same, processor time of the worker", hunting),
        _median("everything predicted for ~25 heavy atoms, warm", whole, 60),
        _processor("the same, processor time of the worker", predicting),
        _median("one editing step to the structure redrawn, warm", steps, 50),
        _processor("the same, processor time of the worker", editing),
        Figure("worker memory after all this", sum(memory.values()) / 1e6, "MB", note="both wasm heaps"),
    ]


def sample(smiles: str) -> tuple[str, dict[str, Any]]:
    """A structure and readings of its own predicted spectrum."""
    predicted = json.loads(json.dumps(call("predict", {"smiles": smiles})))
    h1 = [
        {"ppm": g["ppm"], "mult": g["mult"], "j": g["j"], "n": g["n"]}
        for g in predicted["h1"]
        if not g["exchangeable"]
    ][:7]
    ir = [{"cm1": band["typical"], "strength": band["strength"]} for band in predicted["ir"]][:2]
    c13 = [group["ppm"] for group in predicted["c13"]][: READINGS - len(h1) - len(ir)]
    return smiles, {
        "formula": predicted["formula"],
        "solvent": "CDCl3",
        "mhz": 400,
        "h1": h1,
        "c13": c13,
        "ir": ir,
    }


def _timed(profile: Path, times: int, work: Callable[[], Any]) -> tuple[Any, float | None]:
    """What the work gives, and the worker's processor time of it, ms for each of so many pieces."""
    before = worker_ms(profile)
    done = work()
    after = worker_ms(profile)
    return done, None if before is None or after is None else (after - before) / times


def _median(name: str, times: Sequence[float], most: float, note: str = "") -> Figure:
    spread = f"{min(times):.3g} to {max(times):.3g}, n = {len(times)}"
    return Figure(
        name, statistics.median(times), "ms", most=most, note=f"{spread}; {note}" if note else spread
    )


def _processor(name: str, each: float | None) -> Figure:
    return Figure(name, float("nan") if each is None else each, "ms", note="mean")
