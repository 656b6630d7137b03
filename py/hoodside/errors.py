"""Errors a chemist can act on: each names the field, the value and the mend."""

from __future__ import annotations


class HoodsideError(Exception):
    """Root of every error the engine raises on purpose.

    Args:
        message: what is wrong, with the value that is wrong in it.
        hint: the mend, as an instruction.
        field: dotted path of the input field ("h1[2].ppm"), empty when no single field is at fault.
        value: the offending value as it was given.
    """

    code = "hoodside_error"

    def __init__(self, message: str, *, hint: str, field: str = "", value: object = None) -> None:
        super().__init__(message)
        self.hint = hint
        self.field = field
        self.value = value

    def one_line(self) -> str:
        """The error on one line: field, what is wrong, mend."""
        where = f"{self.field}: " if self.field else ""
        return " ".join(f"{where}{self} {self.hint}".split())

    def to_dict(self) -> dict[str, object]:
        """The error as JSON-ready fields (``value`` shortened to 200 characters)."""
        shown = None if self.value is None else str(self.value)[:200]
        return {
            "code": self.code,
            "message": str(self),
            "hint": self.hint,
            "field": self.field,
            "value": shown,
        }


class InvalidInputError(HoodsideError, ValueError):
    """Something the user gave cannot be right."""

    code = "invalid_input"


class StructureError(InvalidInputError):
    """A SMILES or CTfile that is no possible molecule, or too large to handle."""

    code = "invalid_structure"


class FormulaError(InvalidInputError):
    """A molecular formula that cannot be read."""

    code = "invalid_formula"


class DataFileError(HoodsideError):
    """A facts table is missing, or breaks its own rules."""

    code = "data_file"


class KernelCrashError(HoodsideError):
    """The molecule kernel trapped and must be started afresh before any further call."""

    code = "kernel_crash"
