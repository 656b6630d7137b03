"""Labelled data records of a JCAMP-DX file, block by block.

Source: McDonald & Wilks, Appl. Spectrosc. 1988, 42, 151 (4.24); Davies & Lampen, Appl. Spectrosc. 1993, 47,
1093 (5.0, NMR); Lampen et al., Appl. Spectrosc. 1994, 48, 1545 (mass spectra).
"""

from __future__ import annotations

import re
from dataclasses import dataclass, field

from hoodside.errors import InvalidInputError

MOST_CHARS = 30_000_000
MOST_BLOCKS = 64
_LABEL = re.compile(r"^[ \t]*##([^=\n]*)=", re.MULTILINE)
_COMMENT = re.compile(r"\$\$[^\n]*")
_IGNORED = re.compile(r"[\s\-/_]+")


@dataclass(slots=True)
class Block:
    """One block: labels (capitals, without spaces, hyphens, slashes, underlines) and their values."""

    values: dict[str, str] = field(default_factory=dict)
    pages: list[dict[str, str]] = field(default_factory=list)  # of NTUPLES

    def get(self, *labels: str) -> str:
        """The value of the first label that is there, or ""."""
        return next((self.values[label].strip() for label in labels if label in self.values), "")

    def number(self, *labels: str) -> float | None:
        """The value of a label as a number; None when it is missing or none."""
        found = re.match(r"\s*[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?", self.get(*labels))
        return float(found[0]) if found else None


def read_blocks(text: str) -> list[Block]:
    """Every block that is no mere link, in the order of the file.

    Raises: InvalidInputError when the text is no JCAMP-DX file, or too large.
    """
    if len(text) > MOST_CHARS:
        hint = f"Give at most {MOST_CHARS // 1_000_000} million characters."
        raise InvalidInputError("The file is too large.", hint=hint, field="text")
    clean = _COMMENT.sub("", text.replace("\r\n", "\n").replace("\r", "\n"))
    found = list(_LABEL.finditer(clean))
    labels = {_plain(mark[1]) for mark in found}
    if not {"TITLE", "JCAMPDX"} <= labels:
        raise InvalidInputError(
            "This is no JCAMP-DX file: ##TITLE= and ##JCAMP-DX= are missing.",
            hint="Export the spectrum as JCAMP-DX (.jdx, .dx), or paste the report line instead.",
            field="text",
        )
    stack: list[Block] = []
    done: list[Block] = []
    for k, mark in enumerate(found):
        end = found[k + 1].start() if k + 1 < len(found) else len(clean)
        _take(_plain(mark[1]), clean[mark.end() : end].rstrip("\n"), stack, done)
    done.extend(reversed(stack))
    return [block for block in done if not block.get("DATATYPE").upper().startswith("LINK")][:MOST_BLOCKS]


def _take(label: str, value: str, stack: list[Block], done: list[Block]) -> None:
    if label == "TITLE":
        stack.append(Block())
    if not stack:
        return
    if label == "END":
        done.append(stack.pop())
    elif label == "PAGE":
        stack[-1].pages.append({"PAGE": value})
    elif label and stack[-1].pages and label in ("DATATABLE", "NPOINTS", "FIRST", "LAST"):
        stack[-1].pages[-1][label] = value
    elif label:
        stack[-1].values.setdefault(label, value)


def _plain(label: str) -> str:
    return _IGNORED.sub("", label).upper()
