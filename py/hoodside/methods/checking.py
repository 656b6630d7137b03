"""The check of readings against structures."""

from __future__ import annotations

from typing import Any

from hoodside.errors import HoodsideError


def check(**case: Any) -> dict[str, Any]:
    """Weigh the readings of one sample against its candidates (the check object of the command line)."""
    try:
        from hoodside.weigh.check import check_case
    except ModuleNotFoundError as err:
        raise HoodsideError("This build cannot weigh structures.", hint="Use a complete build.") from err
    answer: dict[str, Any] = check_case(case)
    return answer
