"""Published tables, one CSV each, every row with its source; see ``table.py`` for the loader."""

from hoodside.facts.table import Row, Table, load_table

__all__ = ["Row", "Table", "load_table"]
