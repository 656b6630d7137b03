"""What a step may have given: products, by-products, over-reaction, and the starting material itself."""

from hoodside.rivals.outcomes.model import Outcome, Outcomes
from hoodside.rivals.outcomes.run import find_outcomes

__all__ = ["Outcome", "Outcomes", "find_outcomes"]
