"""The account of a case: readings as report lines."""

from hoodside.record.report import report_lines

__all__ = ["report_lines"]
