"""Every ``bench_*.py`` beside this file is a section: its docstring is the title, ``run()`` prints its table.

usage: python -m bench [NAME ...]      NAME is what stands after ``bench_``; all sections when none is named
"""

from __future__ import annotations

import importlib
import sys
import time
import traceback
from pathlib import Path

HERE = Path(__file__).parent


def main(wanted: list[str]) -> int:
    """Run the sections in the order of their names; 1 when one of them could not be run."""
    names = sorted(path.stem.removeprefix("bench_") for path in HERE.glob("bench_*.py"))
    unknown = sorted(set(wanted) - set(names))
    if unknown:
        print(f"No such section: {', '.join(unknown)}. There are: {', '.join(names)}.", file=sys.stderr)
        return 2
    failed = [name for name in wanted or names if not _runs(name)]
    if failed:
        print(f"\nCould not be run: {', '.join(failed)}.", file=sys.stderr)
    return 1 if failed else 0


def _runs(name: str) -> bool:
    began = time.perf_counter()
    try:
        module = importlib.import_module(f"bench.bench_{name}")
        print(f"\n=== {name}: {(module.__doc__ or '').strip().splitlines()[0]}", flush=True)
        module.run()
    except Exception:
        traceback.print_exc()
        return False
    print(f"({time.perf_counter() - began:.0f} s)", flush=True)
    return True


if __name__ == "__main__":
    sys.exit(main(sys.argv[1:]))
