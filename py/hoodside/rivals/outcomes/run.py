"""From a start and what was added to the list of outcomes."""

from __future__ import annotations

from collections.abc import Iterable, Iterator

from hoodside.errors import InvalidInputError, StructureError
from hoodside.molecule import Structure, read_structure
from hoodside.names import exact_name
from hoodside.rivals.outcomes.apply import Step, best_first, everywhere
from hoodside.rivals.outcomes.model import Outcome, Outcomes, Role
from hoodside.rivals.outcomes.reagents import Reagents, read_reagents, stages
from hoodside.rivals.outcomes.rules import Rule, called_for, of_kind, partner_roles, rules
from hoodside.rivals.outcomes.stereo import settled, stereo_words

_BY_PRODUCT_RANK = 40
_OVER_RANK = 60
_ROLES: dict[str, Role] = {
    "product": "product",
    "by-product": "by-product",
    "over-reaction": "over-reaction",
}
#: Rules that bridge several reagent needs beat more general ones by this much rank each.
_NEED_BONUS = 3
_PARTNER_BONUS = 15
_MOST = 24
#: Kinds of named compounds that stand by rather than react.
_NO_PARTNERS = ("solvent",)


def find_outcomes(
    start: Structure, reagents: str = "", partner: Structure | None = None, kind: str = ""
) -> Outcomes:
    """Products, by-products and over-reaction of one step, likeliest first; the start itself comes last.

    Args:
        start: the starting structure.
        reagents: names and abbreviations in any order ("OsO4, NMO"); "1) ... 2) ..." are done in turn.
        partner: the organic partner, where there is one.
        kind: the kind of reaction in words, used where the reagents call for nothing.

    Raises: InvalidInputError when neither reagents nor kind were given.
    """
    if not reagents.strip() and not kind.strip():
        raise InvalidInputError(
            "No reagent was given.", hint="Name what was added, or the kind of reaction.", field="with"
        )
    by_name = None if partner else _named_partner(reagents)
    if by_name:
        partner = read_structure(by_name[1])
    read = _in_turn(reagents, partner)
    now = settled(start)
    found: list[Outcome] = []
    for place, one in enumerate(read):
        last = place == len(read) - 1
        # A work-up that calls for nothing leaves what the step before gave.
        found = _of_step(now, one, partner, kind if last else "") or found
        products = [o for o in found if o.role == "product"]
        if not last and products:
            now = read_structure(products[0].smiles)
    return Outcomes(
        (*found[:_MOST], _unchanged(start)),
        tuple(name for one in read for name in one.names),
        tuple(piece for one in read for piece in one.unknown if not by_name or piece != by_name[0]),
    )


def _named_partner(reagents: str) -> tuple[str, str] | None:
    """Name and SMILES of an organic partner named among the reagents, where the reagent table has none."""
    for piece in read_reagents(" ".join(stages(reagents))).unknown:
        named = exact_name(piece)
        if named is not None and named.kind not in _NO_PARTNERS:
            return piece, named.smiles
    return None


def _in_turn(reagents: str, partner: Structure | None) -> list[Reagents]:
    """The reagents step by step; steps that one rule needs together (borane, then peroxide) are one."""
    whole = read_reagents(" ".join(stages(reagents)))
    steps = [read_reagents(text) for text in stages(reagents)]
    if len(steps) < 2:
        return [whole]
    roles = partner_roles(partner)
    single = {rule.id for one in steps for rule, _ in called_for(one.roles | roles)}
    spanning = any(
        rule.id not in single and rule.role == "product" for rule, _ in called_for(whole.roles | roles)
    )
    return [whole] if spanning else steps


def _of_step(start: Structure, read: Reagents, partner: Structure | None, kind: str) -> list[Outcome]:
    roles = frozenset(read.roles | partner_roles(partner))
    step = Step(partner, roles, read.names)
    ranked = [(_rank(rule, needs), rule) for rule, needs in called_for(roles)]
    found = _carry_out(ranked, start, step, read)
    if not any(o.role == "product" for _, o in found) and kind:
        found = _carry_out([(rule.rank, rule) for rule in of_kind(kind)], start, step, read)
    found += _together(found, ranked, start, step, read)
    found.sort(key=lambda pair: pair[0])
    return _distinct((o for _, o in found), start)


def _rank(rule: Rule, needs: int) -> float:
    """Rules that ask for more, and for the partner at hand, come first."""
    asks_partner = any(choice.startswith("partner:") for choices in rule.needs for choice in choices)
    return rule.rank - _NEED_BONUS * needs - _PARTNER_BONUS * (asks_partner or rule.two_component)


def _carry_out(
    ranked: Iterable[tuple[float, Rule]], start: Structure, step: Step, read: Reagents
) -> list[tuple[float, Outcome]]:
    found = []
    for rank, rule in ranked:
        for place, (products, role) in enumerate(_products(rule, start, step)):
            for part, product in enumerate(products):
                penalty = place + (0 if part == 0 or rule.role != "product" else 0.5)
                penalty += _BY_PRODUCT_RANK if role == "by-product" else 0
                penalty += _OVER_RANK if role == "over-reaction" else 0
                found.append((rank + penalty, _outcome(rule, product, role, start, read)))
    return found


def _together(
    found: list[tuple[float, Outcome]],
    ranked: Iterable[tuple[float, Rule]],
    start: Structure,
    step: Step,
    read: Reagents,
) -> list[tuple[float, Outcome]]:
    """What stands when every rule that goes to completion has done so (H2: alkene and benzyl)."""
    product_rules = {o.rule for _, o in found if o.role == "product"}
    complete = [
        (rank, r)
        for rank, r in sorted(ranked, key=lambda p: p[0])
        if r.id in product_rules and "together" in r.args
    ]
    now = start
    for _, rule in complete:
        try:
            now = (everywhere(rule, now, step) or [now])[0]
        except StructureError:
            continue
    if len(complete) < 2 or now is start:
        return []
    return [(complete[0][0] - 1, _outcome(complete[0][1], now, "product", start, read))]


def _goes_on(rule: Rule) -> bool:
    return rule.sites == "all" or rule.sites.startswith("all-") or rule.sites.endswith("-all")


def _products(rule: Rule, start: Structure, step: Step) -> Iterator[tuple[list[Structure], Role]]:
    """Product sets of a rule with their roles: the likeliest as the rule says, other sites as by-products."""
    try:
        if rule.op == "seq":
            yield from _sequence(rule, start, step)
            return
        role = _ROLES[rule.role]
        once = best_first(rule, start, step)
        if not once:
            return
        every = everywhere(rule, start, step)
        exhaustive = _goes_on(rule) or "excess" in step.roles or ("twice",) in rule.needs
        first = every if exhaustive and every else once[0]
        yield _finished(rule, first), role
        for other in once if exhaustive else once[1:]:
            if other[0].smiles != first[0].smiles:
                yield _finished(rule, other), "by-product"
        if not exhaustive and every and every[0].smiles != first[0].smiles:
            yield _finished(rule, every), "over-reaction"
    except StructureError:
        return


def _sequence(rule: Rule, start: Structure, step: Step) -> Iterator[tuple[list[Structure], Role]]:
    now = start
    for name in rule.pattern.split(","):
        turns = best_first(_by_id(name), now, step)
        if not turns:
            return
        now = turns[0][0]
    yield [now], _ROLES[rule.role]


def _finished(rule: Rule, products: list[Structure]) -> list[Structure]:
    """Carry aldehydes on to acids where the rule says so; formaldehyde is lost."""
    if rule.args.get("oxidise") != "yes":
        return products
    step = Step(None, frozenset(), ())
    kept = [p for p in products if len(p.atoms) > 2]
    return [(everywhere(_by_id("ald-acid"), p, step) or [p])[0] for p in kept]


def _by_id(name: str) -> Rule:
    return next(rule for rule in rules() if rule.id == name)


def _outcome(rule: Rule, product: Structure, role: Role, start: Structure, read: Reagents) -> Outcome:
    cautions = tuple(dict.fromkeys((*rule.cautions, *read.cautions)))
    return Outcome(
        product.smiles,
        role,
        rule.id,
        rule.name,
        rule.note,
        stereo_words(product, start),
        cautions,
        rule.source,
    )


def _unchanged(start: Structure) -> Outcome:
    return Outcome(
        start.smiles,
        "no reaction",
        "",
        "starting material",
        "Not everything reacts.",
        "",
        (),
        "common practice",
    )


def _distinct(outcomes: Iterable[Outcome], start: Structure) -> list[Outcome]:
    kept: dict[str, Outcome] = {}
    for outcome in outcomes:
        if outcome.smiles != start.smiles:
            kept.setdefault(outcome.smiles, outcome)
    return list(kept.values())
