"""What engine this is."""

from __future__ import annotations

import sys
from typing import Any

import hoodside
from hoodside.molecule.kernel import kernel


def about() -> dict[str, Any]:
    """Versions of the engine, of Python and of the molecule kernel."""
    return {
        "version": hoodside.__version__,
        "kernel": kernel().name,
        "kernel_version": kernel().version(),
        "python": ".".join(map(str, sys.version_info[:3])),
    }
