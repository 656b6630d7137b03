"""The check of readings against structures."""

from __future__ import annotations

from typing import Any

from hoodside.check import check_case


def check(**case: Any) -> dict[str, Any]:
    """Weigh the readings of one sample against its candidates (the check object of the command line)."""
    return check_case(case)
