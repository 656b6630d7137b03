"""Carries out one rule on one structure: at its best site, or at every site."""

from __future__ import annotations

import re
from collections.abc import Callable, Sequence
from dataclasses import dataclass

from hoodside.errors import StructureError
from hoodside.molecule import Structure
from hoodside.molecule.draft import Draft
from hoodside.molecule.kernel import kernel
from hoodside.molecule.structure import read_marked
from hoodside.molecule.symmetry import constitutional_classes
from hoodside.rivals.outcomes.addition import (
    add_across,
    bridge,
    open_epoxide,
    with_fused_ring_cis,
)
from hoodside.rivals.outcomes.cycloaddition import cycloadducts
from hoodside.rivals.outcomes.faces import both_faces
from hoodside.rivals.outcomes.nucleophiles import nucleophile_of
from hoodside.rivals.outcomes.reagents import Reagents
from hoodside.rivals.outcomes.rules import Rule
from hoodside.rivals.outcomes.selectivity import SCORES, positive

#: Mass numbers from here on label the atoms of a site, so that a reaction pattern meets it alone.
_LABEL = 900
_MOST_ROUNDS = 8
_MAP = re.compile(r":(\d+)\]$")


@dataclass(frozen=True, slots=True)
class Step:
    """What a rule is carried out with."""

    partner: Structure | None
    roles: frozenset[str]
    read: Reagents
    racemic: bool = False  # the start stands for both of its enantiomers


def best_first(rule: Rule, structure: Structure, step: Step) -> list[list[Structure]]:
    """Products of one turn of the rule at each inequivalent site, the site that reacts first leading."""
    sites = _sites(rule, structure)
    score = SCORES.get(rule.sites.removesuffix("-all"))
    if score is not None:
        sites.sort(key=lambda site: -score(structure, site))
    found = [_OPS[rule.op](rule, structure, site, step) for site in sites]
    return [products for group in found for products in group if products]


def everywhere(rule: Rule, structure: Structure, step: Step) -> list[Structure]:
    """The products when every site has reacted."""
    now, rest = structure, []
    rounds = 1 if rule.with_itself else int(rule.args.get("times", _MOST_ROUNDS))
    for _ in range(rounds):
        turns = best_first(rule, now, step)
        if not turns or turns[0][0].smiles == now.smiles:
            break
        now, *others = turns[0]
        rest += others
    return [now, *rest] if now is not structure else []


def _sites(rule: Rule, structure: Structure) -> list[dict[int, int]]:
    """Matches of the first component as map number -> atom, one per kind of site."""
    left = _first_component(rule.pattern)
    maps = _map_numbers(left)
    classes = constitutional_classes(structure)
    seen: dict[tuple[int, ...], dict[int, int]] = {}
    for match in structure.matches(left, unique=False):
        site = {m: atom for m, atom in zip(maps, match, strict=False) if m}
        seen.setdefault(tuple(classes[atom] for atom in match), site)
    return list(seen.values())


def _map_numbers(smarts: str) -> list[int]:
    """The map number of every atom of a pattern in order, 0 where it has none."""
    found, depth, opened = [], 0, 0
    for place, letter in enumerate(smarts):
        if letter == "[":
            opened = place if depth == 0 else opened
            depth += 1
        elif letter == "]":
            depth -= 1
            if depth == 0:
                number = _MAP.search(smarts[opened : place + 1])
                found.append(int(number.group(1)) if number else 0)
        elif depth == 0 and letter.isalpha() and smarts[place - 1 : place + 1] not in ("Cl", "Br"):
            found.append(0)
    return found


def _first_component(pattern: str) -> str:
    left = pattern.split(">>")[0]
    if left.startswith("("):
        depth = 0
        for place, letter in enumerate(left):
            depth += {"(": 1, ")": -1}.get(letter, 0)
            if depth == 0:
                return left[1:place]
    return left.split(".")[0]


def _react(rule: Rule, structure: Structure, site: dict[int, int], step: Step) -> list[list[Structure]]:
    if _ring_size(structure, site) < int(rule.args.get("least_ring", 0)):
        return []
    sources = [_labelled(structure, site, [site[n] for n in _numbers(rule, "flat")])]
    if rule.two_component:
        if (partner := _partner_for(rule, structure, step)) is None:
            return []
        sources.append(_attacked_from_behind(rule, partner).source)
    found = []
    for products in kernel().react(_site_specific(rule.pattern, site), sources):
        parts = [part for p in products for part in p.split(".")]
        if (keep := rule.args.get("keep")) is not None:
            parts = [part for part in parts if f"[{_LABEL + int(keep)}" in part]
        turned = [_LABEL + n for n in _numbers(rule, "invert")]
        made = [clean for part in parts if (clean := _unlabelled(part, turned)) is not None]
        if made:
            found.append(sorted(made, key=lambda p: -len(p.atoms)))
    return found


def _numbers(rule: Rule, key: str) -> list[int]:
    """Map numbers that an argument of the rule lists."""
    return [int(n) for n in rule.args.get(key, "").split(",") if n]


def _ring_size(structure: Structure, site: dict[int, int]) -> int:
    """Atoms of the ring that a bond between the first two mapped atoms closes."""
    return structure.distances_from(site[1])[site[2]] + 1 if {1, 2} <= site.keys() else 0


def _attacked_from_behind(rule: Rule, partner: Structure) -> Structure:
    """The partner with the centre inverted at which the start will replace a ligand."""
    turned = _numbers(rule, "invert_partner")
    if not turned or not any(atom.stereo for atom in partner.atoms):
        return partner
    right = rule.pattern.split(">>")[0].removeprefix(_first_component(rule.pattern)).removeprefix(".")
    draft = Draft(partner)
    for match in partner.matches(right)[:1]:
        for number, atom in zip(_map_numbers(right), match, strict=False):
            if number in turned:
                draft.turn_over(atom)
    return draft.keep_order()


def _partner_for(rule: Rule, structure: Structure, step: Step) -> Structure | None:
    """The organic partner, another molecule of the start, or an alcohol among the reagents."""
    if rule.with_itself:
        return structure
    if step.partner is not None:
        return step.partner
    named = nucleophile_of(rule.args.get("partner", ""), None, step.read, step.roles)
    return named[0] if named else None


def _site_specific(pattern: str, site: dict[int, int]) -> str:
    """The pattern bound to labelled atoms, its products kept as one piece so that rings may open."""
    left, right = pattern.split(">>")
    for number in site:
        left = left.replace(f":{number}]", f";{_LABEL + number}*:{number}]", 1)
    return f"{left}>>{right if right.startswith('(') else f'({right})'}"


def _labelled(structure: Structure, site: dict[int, int], flat: Sequence[int]) -> str:
    """The structure with every atom of the site marked by its own mass number.

    As a CTfile: there, unlike in SMILES, a labelled atom still takes up hydrogens freely.
    """
    draft = Draft(structure)
    for atom in flat:  # centres that the step makes planar
        draft.set_mark(atom, "")
    for number, atom in site.items():
        draft.set_isotope(atom, _LABEL + number)
    return kernel().molblock(draft.source())


def _unlabelled(smiles: str, turned: Sequence[int] = ()) -> Structure | None:
    """A product without its labels, centres with a label in ``turned`` inverted."""
    try:
        made = read_marked(smiles)
        draft = Draft(made)
        for atom in made.atoms:
            if atom.isotope in turned:
                draft.turn_over(atom.index)
            if atom.isotope > _LABEL:
                draft.set_isotope(atom.index, 0)
        return draft.finish()
    except StructureError:
        return None


def _add(rule: Rule, structure: Structure, site: dict[int, int], step: Step) -> list[list[Structure]]:
    a, b = site[1], site[2]
    regio = rule.args.get("regio") or ("markovnikov" if rule.args["x"] != rule.args["y"] else "")
    if regio:  # y goes to the carbon that bears charge better, or to the other
        cation_at_a = positive(structure, a) > positive(structure, b)
        if cation_at_a == (regio == "markovnikov"):
            a, b = b, a
    made = add_across(structure, a, b, rule.args["x"], rule.args["y"], rule.args["mode"])
    return [[face] for face in both_faces(structure, made, a, b)]


def _open(rule: Rule, structure: Structure, site: dict[int, int], step: Step) -> list[list[Structure]]:
    entering = nucleophile_of(rule.args["nu"], step.partner, step.read, step.roles)
    if entering is None:
        return []
    nucleophile, at = entering
    a, b, oxygen = site[1], site[2], site[3]
    structure = with_fused_ring_cis(structure, a, b, oxygen)
    key = positive if rule.args["at"] == "more" else _openness
    if key(structure, b) > key(structure, a):
        a, b = b, a
    made = [open_epoxide(structure, end, oxygen, nucleophile, at) for end in (a, b)]
    return [[made[0]], [made[1]]] if made[0].smiles != made[1].smiles else [[made[0]]]


def _openness(structure: Structure, atom: int) -> float:
    return -float(len(structure.neighbours[atom]))


def _bridge(rule: Rule, structure: Structure, site: dict[int, int], step: Step) -> list[list[Structure]]:
    made = bridge(structure, site[1], site[2], rule.args.get("bridge", "O"))
    return [[face] for face in both_faces(structure, made, site[1], site[2])]


def _cycloadd(rule: Rule, structure: Structure, site: dict[int, int], step: Step) -> list[list[Structure]]:
    if step.partner is None:
        return []
    pair = (structure, step.partner) if rule.args["start"] == "diene" else (step.partner, structure)
    return [[made] for made in cycloadducts(*pair)]


def _lactone(rule: Rule, structure: Structure, site: dict[int, int], step: Step) -> list[list[Structure]]:
    """Close the acid oxygen on the inner alkene carbon (ring of five, else six); iodine on the outer."""
    found = []
    for a, b in structure.matches("[C;!a]=[C;!a]", unique=False):
        inner = structure.distances_from(site[3])[a] + 1
        if inner in (5, 6) and structure.distances_from(site[3])[b] == inner:
            draft = Draft(structure)
            draft.set_order(a, b, 1)
            iodine = draft.add_atom("I", hydrogens=1)
            draft.change_hydrogens(site[3], 0)
            draft.add_bond(a, site[3])
            draft.add_bond(b, iodine)
            found.append((inner, draft.finish()))
    return [[made] for _, made in sorted(found, key=lambda f: f[0])]


_OPS: dict[str, Callable[[Rule, Structure, dict[int, int], Step], list[list[Structure]]]] = {
    "rxn": _react,
    "add": _add,
    "open": _open,
    "epoxidise": _bridge,
    "cycloadd": _cycloadd,
    "lactone": _lactone,
}
