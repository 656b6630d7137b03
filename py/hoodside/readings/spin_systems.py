"""Names of spin systems (Pople notation) printed in the place of a pattern: "AA'BB'", "A2B2", "ABX"."""

from __future__ import annotations

import re

_SYSTEM = re.compile(
    r"(?:(?:half|1/2|part|portion) (?:of )?(?:an )?)?"
    r"(?:[ABMXYK](?:\d|['’′`]{1,3})?){2,6}(?:[ -]?(?:system|m|part|type|pattern))?",
)


def names_spin_system(text: str) -> bool:
    """Whether a text names a spin system: such a signal is a multiplet, its lines are not first order."""
    return len(text) < 40 and _SYSTEM.fullmatch(text.strip()) is not None
