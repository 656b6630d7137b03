"""Reads report lines as chemists write them."""

from hoodside.readings.report.line import MOST_CHARS, parse_report
from hoodside.readings.report.model import ParsedReport, Piece, Unread

__all__ = ["MOST_CHARS", "ParsedReport", "Piece", "Unread", "parse_report"]
