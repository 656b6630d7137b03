"""Loads the facts tables: CSV in a checkout, a compact form in the browser bundle."""

from __future__ import annotations

import marshal
import pkgutil
from collections.abc import Iterator
from dataclasses import dataclass
from functools import cache

from hoodside.errors import DataFileError

Row = dict[str, str]

#: Columns that no table may lack: where a row was read, and whether from a page or from memory.
PROVENANCE = ("source", "origin")


@dataclass(frozen=True, slots=True)
class Table:
    """One published table. ``rows`` map column name to the text of the cell."""

    name: str
    rows: tuple[Row, ...]

    def __iter__(self) -> Iterator[Row]:
        return iter(self.rows)

    def __len__(self) -> int:
        return len(self.rows)


@cache
def load_table(name: str) -> Table:
    """Read a facts table by its file name without ending.

    Raises: DataFileError when there is no such table, or a row lacks its source.
    """
    compact = _data(f"{name}.table")
    rows = _from_csv(name) if compact is None else _from_compact(compact)
    return Table(name, rows)


def pack_rows(rows: tuple[Row, ...]) -> bytes:
    """The compact form of a table: column names once, then the cells (read back by ``load_table``)."""
    columns = tuple(rows[0])
    return marshal.dumps((columns, [tuple(row[c] for c in columns) for row in rows]))


def _data(file_name: str) -> bytes | None:
    # Not importlib.resources: it reads the directory of the browser's archive anew for every file.
    try:
        return pkgutil.get_data("hoodside.facts", file_name)
    except OSError:
        return None


def _from_compact(data: bytes) -> tuple[Row, ...]:
    columns, cells = marshal.loads(data)
    return tuple(dict(zip(columns, row, strict=True)) for row in cells)


def _from_csv(name: str) -> tuple[Row, ...]:
    import csv  # never needed in the browser

    data = _data(f"{name}.csv")
    if data is None:
        raise DataFileError(f"There is no facts table {name!r}.", hint="See py/hoodside/facts/.", value=name)
    rows = tuple(csv.DictReader(data.decode("utf-8").splitlines()))
    for number, row in enumerate(rows, start=2):
        if None in row or None in row.values():
            raise DataFileError(f"{name}.csv line {number} has the wrong number of cells.", hint="Mend it.")
        if any(not row.get(column) for column in PROVENANCE):
            raise DataFileError(f"{name}.csv line {number} names no source.", hint="Fill source and origin.")
    return rows
