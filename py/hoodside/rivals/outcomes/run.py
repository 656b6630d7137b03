"""From a start and what was added to the list of outcomes."""

from __future__ import annotations

from collections.abc import Iterable, Iterator
from dataclasses import dataclass
from functools import cache

from hoodside.errors import InvalidInputError, StructureError
from hoodside.molecule import Structure, read_structure
from hoodside.rivals.outcomes.apply import Step, best_first, everywhere
from hoodside.rivals.outcomes.model import Outcome, Outcomes, Role
from hoodside.rivals.outcomes.nothing import why_nothing
from hoodside.rivals.outcomes.reagents import Reagents, is_weak, read_reagents, stages
from hoodside.rivals.outcomes.rules import Rule, called_for, of_kind, partner_roles, rules
from hoodside.rivals.outcomes.stereo import is_achiral, mirror_smiles, settled, stereo_words

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
_MOBILE_HYDROGEN = "[nH]"
#: Roles of what is poured in to quench, and of what is quenched by it.
_WORKUP = frozenset(
    {"acid", "hcl", "water", "quench", "solvent", "alcohol", "methanol", "ethanol", "cold", "drying"}
)
_QUENCHED = frozenset(
    {"organometal", "cuprate", "magnesium", "strong_base", "strong_hydride", "bulky_hydride"}
    | {"mild_hydride", "borohydride", "dibal"}
)
#: Steps of a partner that may be there as base or solvent only come so much later.
_WEAK_PENALTY = 20


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
    texts = stages(reagents)
    told = read_reagents(", ".join(texts))
    texts = _without_workup(texts)
    whole = read_reagents(", ".join(texts))
    now = settled(start)
    steps = [read_reagents(text) for text in texts]
    racemic = is_achiral(start)
    found = _of_step(now, whole, partner, kind, racemic)
    if len(steps) > 1 and not _spans(found, steps, partner):
        in_turn = _in_turn(now, steps, partner, kind, racemic)
        found = in_turn if _has_product(in_turn) or not _has_product(found) else found
    return Outcomes(
        (*found[:_MOST], _unchanged(start, known=bool(found))),
        told.names,
        told.unknown,
        "" if _has_product(found) else why_nothing(told, partner),
    )


def _has_product(found: Iterable[Outcome]) -> bool:
    return any(outcome.role == "product" for outcome in found)


def _without_workup(texts: list[str]) -> list[str]:
    """The steps that are more than the quench of an organometal or a hydride (H3O+, NH4Cl, dilute HCl)."""
    roles = [read_reagents(text).roles for text in texts]
    kept = [texts[0]] if texts else []
    for before, now, text in zip(roles, roles[1:], texts[1:], strict=False):
        if not (now and now <= _WORKUP and before & _QUENCHED):
            kept.append(text)
    return kept


def _spans(found: list[Outcome], steps: list[Reagents], partner: Structure | None) -> bool:
    """Whether the likeliest product needs reagents of several steps (borane, then peroxide)."""
    products = [outcome.rule for outcome in found if outcome.role == "product"]
    single = {
        rule.id
        for read in steps
        for mate in _mates(read, partner)
        for rule, _ in called_for(read.roles | partner_roles(mate.structure))
    }
    return bool(products) and products[0] not in single


def _in_turn(
    start: Structure, read: list[Reagents], partner: Structure | None, kind: str, racemic: bool
) -> list[Outcome]:
    """One step after the other, each upon the likeliest product of the one before."""
    now, found = start, list[Outcome]()
    for place, one in enumerate(read):
        last = place == len(read) - 1
        # A work-up that calls for nothing leaves what the step before gave.
        found = _of_step(now, one, partner, kind if last else "", racemic) or found
        products = [o for o in found if o.role == "product"]
        if not last and products:
            now = read_structure(products[0].smiles)
    return found


@dataclass(frozen=True, slots=True)
class _Mate:
    """An organic partner, and how much later its steps come for being perhaps only base or solvent."""

    structure: Structure | None
    penalty: float = 0.0


def _mates(read: Reagents, partner: Structure | None) -> list[_Mate]:
    """The partner given, else those the reagents carry; none at all is one too."""
    if partner is not None:
        return [_Mate(partner)]
    carried = [_Mate(_carried(f.brings), _WEAK_PENALTY * is_weak(f)) for f in read.partners()]
    return carried or [_Mate(None)]


@cache
def _carried(smiles: str) -> Structure:
    return read_structure(smiles)


def _of_step(
    start: Structure, read: Reagents, partner: Structure | None, kind: str, racemic: bool
) -> list[Outcome]:
    found: list[tuple[float, Outcome]] = []
    done: set[str] = set()
    mates = _mates(read, partner)
    for mate in mates:
        if mate.penalty and _has_product(o for _, o in found):
            continue  # what may be base or solvent alone is not looked for a part in something else
        step = _step(mate, read, racemic)
        ranked = [
            (_rank(rule, needs) + mate.penalty * rule.asks_partner, rule)
            for rule, needs in called_for(step.roles)
            if rule.id not in done
        ]
        here = _carry_out(ranked, start, step)
        found += here + _together(here, ranked, start, step)
        done |= {rule.id for _, rule in ranked if not rule.asks_partner}
    if kind and not _has_product(o for _, o in found):
        step = _step(mates[0], read, racemic)
        found += _carry_out([(rule.rank, rule) for rule in of_kind(kind)], start, step)
    found.sort(key=lambda pair: pair[0])
    return _distinct((o for _, o in found), start, racemic and all(is_achiral(m.structure) for m in mates))


def _step(mate: _Mate, read: Reagents, racemic: bool) -> Step:
    roles = frozenset(read.roles | partner_roles(mate.structure))
    return Step(mate.structure, roles, read, racemic and is_achiral(mate.structure))


def _rank(rule: Rule, needs: int) -> float:
    """Rules that ask for more, and for the partner at hand, come first."""
    asks_partner = any(choice.startswith("partner:") for choices in rule.needs for choice in choices)
    takes_one = rule.two_component and not rule.with_itself
    return rule.rank - _NEED_BONUS * needs - _PARTNER_BONUS * (asks_partner or takes_one)


def _carry_out(
    ranked: Iterable[tuple[float, Rule]], start: Structure, step: Step
) -> list[tuple[float, Outcome]]:
    found = []
    for rank, rule in ranked:
        for place, (products, role) in enumerate(_products(rule, start, step)):
            for part, product in enumerate(products):
                penalty = place + (0 if part == 0 or rule.role != "product" else 0.5)
                penalty += _BY_PRODUCT_RANK if role == "by-product" else 0
                penalty += _OVER_RANK if role == "over-reaction" else 0
                found.append((rank + penalty, _outcome(rule, product, role, start, step)))
    return found


def _together(
    found: list[tuple[float, Outcome]],
    ranked: Iterable[tuple[float, Rule]],
    start: Structure,
    step: Step,
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
    return [(complete[0][0] - 1, _outcome(complete[0][1], now, "product", start, step))]


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
    step = Step(None, frozenset(), read_reagents(""))
    kept = [p for p in products if len(p.atoms) > 2]
    return [(everywhere(_by_id("ald-acid"), p, step) or [p])[0] for p in kept]


def _by_id(name: str) -> Rule:
    return next(rule for rule in rules() if rule.id == name)


def _outcome(rule: Rule, product: Structure, role: Role, start: Structure, step: Step) -> Outcome:
    cautions = tuple(dict.fromkeys((*rule.cautions, *step.read.cautions)))
    return Outcome(
        product.smiles,
        role,
        rule.id,
        rule.name,
        rule.note,
        stereo_words(product, start, step.racemic, inverted=rule.inverts),
        cautions,
        rule.source,
    )


def _unchanged(start: Structure, known: bool) -> Outcome:
    return Outcome(
        start.smiles,
        "no reaction",
        "",
        "starting material",
        "Not everything reacts." if known else "The table knows no step of it, which proves nothing.",
        "",
        (),
        "common practice",
    )


def _distinct(outcomes: Iterable[Outcome], start: Structure, racemic: bool) -> list[Outcome]:
    """Each compound once: tautomers are one, mirror images too where nothing chiral went in."""
    kept: dict[str, Outcome] = {}
    mobile: set[str] = set()
    for outcome in outcomes:
        smiles = outcome.smiles
        if smiles == start.smiles or smiles in kept:
            continue
        if racemic and "@" in smiles and mirror_smiles(read_structure(smiles)) in kept:
            continue
        if _MOBILE_HYDROGEN in smiles:
            key = read_structure(smiles).inchikey  # the same for hydrogen on either nitrogen
            if key in mobile:
                continue
            mobile.add(key)
        kept[smiles] = outcome
    return list(kept.values())
