"""The reaction table, and which of its rows a set of reagents calls for."""

from __future__ import annotations

import re
from collections.abc import Collection
from dataclasses import dataclass
from functools import cache

from hoodside.facts import load_table
from hoodside.molecule import Structure

#: What an organic partner can be, by SMARTS ("|" parts alternatives); a rule asks for one as "partner:<key>".
PARTNERS = {
    "alkyl_halide": "[CX4][Cl,Br,I]|[CX4]OS(=O)(=O)[#6]",
    "alkyl_sulfonate": "[CX4]OS(=O)(=O)[#6]",
    "aryl_halide": "[c,$([CX3]=C)][F,Cl,Br,I]|[c,$([CX3]=C)]OS(=O)(=O)C(F)(F)F",
    "acyl_halide": "[CX3](=O)[Cl,Br]",
    "anhydride": "[CX3](=O)[OX2][CX3]=O",
    "anhydride_open": "[CX3;!R](=O)[OX2;!R][CX3]=O",
    "anhydride_ring": "[CX3;R](=O)[OX2;R][CX3;R]=O",
    "carboxylic": "[CX3](=O)[OX2H]",
    "alcohol": "[CX4][OX2H]",
    "phenol": "c[OX2H]",
    "diol": "[OX2H][CX4][CX4][OX2H]|[OX2H][CX4][CX4][CX4][OX2H]",
    "thiol": "[#6][SX2H]",
    "dithiol": "[SX2H][CX4]~[CX4][SX2H]|[SX2H][CX4]~[CX4]~[CX4][SX2H]",
    "thione": "[#7]C(=S)[#7]|[#7]c(=S)[#7]",
    "amine": "[NX3;H1,H2,H3;!$(N[CX3]=[OX1]);!$(NS(=O)=O);!$(N[CX2]#N)]",
    "aryl_amine": "c[NX3;!$(N[CX3]=[OX1]);!$(N=O)]",
    "arylhydrazine": "c[NX3;H1][NX3;H2]",
    "azole": "[nH]",
    "allylsilane": "[Si][CX4][CX3]=[CX3]",
    "imide": "[CX3](=O)[NX3;H1][CX3]=O",
    "isocyanate": "[#6]N=C=O",
    "isothiocyanate": "[#6]N=C=S",
    "organic_azide": "[#6]N=[N+]=[N-]",
    "boronic": "[#6][BX3]|[#6][B-](F)(F)F",
    "stannane": "[#6][Sn]",
    "alkyne": "[CX2H]#[CX2]",
    "alkene": "[CH2X3]=[CHX3]",
    "aldehyde": "[CX3H1](=O)[#6]",
    "ketone": "[CX3](=O)([#6])[#6]",
    "carbonyl": "[CX3;H1,$(C([#6])[#6])]=[OX1]",
    "ketal_donor": "[CX4](O[CH3])(O[CH3])",
    "formaldehyde": "[CX3H2]=[OX1]",
    "enone": "[CX3]=[CX3][CX3]=[OX1]",
    "michael_acceptor": "[CX3]=[CX3][$([CX3]=[OX1]),$(C#N),$([N+](=O)[O-])]",
    "diene": "[C;!a]=[C;!a][C;!a]=[C;!a]",
    "dienophile": "[C;!a]=[C;!a][$([CX3]=[OX1]),$(C#N),$([N+](=O)[O-])]|C#C[CX3]=[OX1]",
    "nitroalkane": "[CX4;!H0][N+](=O)[O-]",
    "organometal": "[#6][Mg,Li,Zn]",
    "grignard": "[#6][Mg]",
    "lithium": "[#6][Li]",
    "zinc": "[#6][Zn]",
    "cuprate": "[#6][Cu]",
    "phosphonium": "[PX4+][CX4]",
    "phosphonium_plain": "[PX4+][CX4;H2][CX4]",
    "phosphonium_held": "[PX4+][CX4;H2][!$([CX4])]",
    "phosphonate": "[PX4](=O)[CX4;!H0][CX3]",
    "active_methylene": "[CX4;H2,H1]([$([CX3]=O),$(C#N)])[$([CX3]=O),$(C#N)]",
    "acyl_donor": "[CX3](=O)([OX2,$(C#N),Cl])[OX2]",
    "ester": "[CX4;H3,H2][CX3](=O)[OX2][CX4]",
    "oxalate": "[OX2][CX3](=O)[CX3](=O)[OX2]",
    "sulfonyl_chloride": "[SX4](=O)(=O)Cl",
    "boc2o": "CC(C)(C)OC(=O)OC(=O)OC(C)(C)C",
    "diene_anhydride": "C1C=CC=C1.O=C1C=CC(=O)O1",
}


@dataclass(frozen=True, slots=True)
class Rule:
    """One row of facts/reactions.csv."""

    id: str
    name: str
    needs: tuple[tuple[str, ...], ...]  # all of these, each one of several; "!x" forbids
    op: str
    pattern: str
    args: dict[str, str]
    sites: str
    rank: int
    role: str
    kinds: tuple[str, ...]
    note: str
    cautions: tuple[str, ...]
    source: str

    @property
    def two_component(self) -> bool:
        """Whether the pattern takes a second molecule."""
        return "." in _left(self.pattern)

    @property
    def with_itself(self) -> bool:
        """Whether the second molecule is another one of the start."""
        return "self" in self.args

    @property
    def inverts(self) -> bool:
        """Whether a carbon is attacked from behind."""
        return "invert" in self.args or "invert_partner" in self.args

    @property
    def asks_partner(self) -> bool:
        """Whether another organic partner gives another answer."""
        named = any(choice.startswith("partner:") for choices in self.needs for choice in choices)
        return named or self.op == "open" or (self.two_component and not self.with_itself)


def called_for(roles: Collection[str]) -> list[tuple[Rule, int]]:
    """Rules whose needs are all met, with how many needs each had."""
    return [(rule, _asked(rule)) for rule in rules() if rule.needs and _met(rule, set(roles))]


def of_kind(kind: str) -> list[Rule]:
    """Rules for a kind of reaction named in words, best match first."""
    asked = _words(kind)
    scored = [(max((_overlap(asked, _words(k)) for k in r.kinds), default=0.0), r) for r in rules()]
    best = max((score for score, _ in scored), default=0.0)
    return [rule for score, rule in scored if score > 0 and score >= best - 1e-9] if best >= 0.5 else []


def partner_roles(partner: Structure | None) -> set[str]:
    """What the partner can act as, as "partner:<key>"."""
    if partner is None:
        return set()
    asked = [(key, pattern) for key, patterns in PARTNERS.items() for pattern in patterns.split("|")]
    found = partner.match_all([pattern for _, pattern in asked])
    return {f"partner:{key}" for (key, _), matches in zip(asked, found, strict=True) if matches}


def _met(rule: Rule, roles: set[str]) -> bool:
    for choices in rule.needs:
        forbidden = [c[1:] for c in choices if c.startswith("!")]
        wanted = [c for c in choices if not c.startswith("!")]
        if any(f in roles for f in forbidden) or (wanted and not roles & set(wanted)):
            return False
    return True


def _asked(rule: Rule) -> int:
    return sum(not choices[0].startswith("!") for choices in rule.needs)


def _words(text: str) -> frozenset[str]:
    return frozenset(re.findall(r"[a-z]+", text.lower())) - {"to", "of", "the", "and", "via", "kept", "type"}


def _overlap(asked: frozenset[str], offered: frozenset[str]) -> float:
    return len(asked & offered) / len(asked | offered) if offered else 0.0


def _left(pattern: str) -> str:
    return re.sub(r"^\([^>]*?\)(?=\.|$)", "X", pattern.split(">>")[0])


@cache
def rules() -> tuple[Rule, ...]:
    """All rules, in table order."""
    return tuple(_rule(row) for row in load_table("reactions"))


def _rule(row: dict[str, str]) -> Rule:
    needs = () if row["needs"] == "-" else tuple(tuple(n.split("/")) for n in row["needs"].split())
    return Rule(
        id=row["id"],
        name=row["name"],
        needs=needs,
        op=row["op"],
        pattern=row["pattern"],
        args=dict(pair.split("=", 1) for pair in row["args"].split(";") if pair),
        sites=row["sites"],
        rank=int(row["rank"]),
        role=row["role"],
        kinds=tuple(k for k in row["kinds"].split(";") if k),
        note=row["note"],
        cautions=tuple(c for c in row["cautions"].split(";") if c),
        source=row["source"],
    )
