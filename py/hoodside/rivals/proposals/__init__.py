"""Proposals from readings alone: fragments, and structures put together from them."""

from hoodside.rivals.proposals.fragments import Fragment, find_fragments
from hoodside.rivals.proposals.propose import Proposal, Proposals, propose

__all__ = ["Fragment", "Proposal", "Proposals", "find_fragments", "propose"]
