"""Proposals from readings alone: fragments, and structures put together from them."""

from hoodside.advise.proposals.fragments import Fragment, find_fragments
from hoodside.advise.proposals.propose import Proposal, Proposals, propose

__all__ = ["Fragment", "Proposal", "Proposals", "find_fragments", "propose"]
