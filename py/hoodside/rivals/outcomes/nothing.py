"""Why a step is not among the rows of the table: a silent table must not read as "no reaction"."""

from __future__ import annotations

from hoodside.molecule import Structure, read_structure
from hoodside.reagent_names import ReagentName
from hoodside.rivals.outcomes.reagents import Reagents
from hoodside.rivals.outcomes.rules import Rule, partner_roles, rules

#: Roles that help a step along but call for none themselves.
_BYSTANDERS = frozenset(
    {"solvent", "quench", "drying", "hot", "cold", "water", "excess", "twice", "ligand", "weak", "partner"}
    | {"base", "acid", "alcohol", "dmf", "acetone", "chloroform", "tert_butanol", "methanol", "ethanol"}
    | {"butanol", "strong_base", "bulky_base"}
)
_PARTNER = frozenset({"partner"})
_NAMED, _LISTED = 3, 6


def why_nothing(read: Reagents, partner: Structure | None) -> str:
    """What the table lacks, in a sentence or two, and what it knows of the reagents at hand."""
    told = []
    if read.unknown:
        told.append(f"The table does not know {_and(read.unknown)}.")
    active = [f for f in read.found if f.roles - _BYSTANDERS or f.roles >= _PARTNER] or list(read.found)
    names = list(dict.fromkeys(f.name for f in active))[:_NAMED]
    if partner is not None:
        names.append("this partner")
    if names:
        told.append(f"{'It' if told else 'The table'} holds no step for {_and(names)} on this structure.")
    known = [_known_for(f.name, _roles(f)) for f in active[:_NAMED]]
    if partner is not None:
        known.append(_known_for("this partner", frozenset(partner_roles(partner))))
    told += dict.fromkeys(filter(None, known))
    told.append("That is not to say that nothing happens.")
    return " ".join(told)


def _roles(found: ReagentName) -> frozenset[str]:
    own = found.roles - _BYSTANDERS or found.roles
    return own | _partner_roles(found.brings) if found.brings else own


def _partner_roles(smiles: str) -> frozenset[str]:
    return frozenset(partner_roles(read_structure(smiles)))


def _known_for(name: str, roles: frozenset[str]) -> str:
    """ "Known for NaN3: azide substitution, epoxide opening by azide." """
    fitting = [rule for rule in rules() if rule.role == "product" and _wants(rule, roles)]
    fitting.sort(key=_familiar)
    steps = list(dict.fromkeys(rule.name for rule in fitting))
    if not steps:
        return ""
    more = f"; and {len(steps) - _LISTED} more" if len(steps) > _LISTED else ""
    return f"Known for {name}: {'; '.join(steps[:_LISTED])}{more}."


def _familiar(rule: Rule) -> tuple[int, bool, int]:
    """What asks for little else comes first, and what has a name of its own in the trade."""
    asked = sum(not choices[0].startswith("!") for choices in rule.needs)
    return asked, not rule.kinds, rule.rank


def _wants(rule: Rule, roles: frozenset[str]) -> bool:
    return any(choice in roles for choices in rule.needs for choice in choices)


def _and(words: list[str] | tuple[str, ...]) -> str:
    return " and ".join(filter(None, (", ".join(words[:-1]), words[-1])))
