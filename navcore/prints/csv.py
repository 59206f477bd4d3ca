"""The leg table as CSV by RFC 4180: a row for each waypoint and each leg, figures as printed."""

from __future__ import annotations

import csv
import io
from typing import TYPE_CHECKING

from navcore.plan.quantities import Row

if TYPE_CHECKING:
    from navcore.prints.leg_table import LegTable, TableRow
    from navcore.prints.part_rows import PartRow

_FORMULA_SIGNS = ("=", "+", "-", "@", "\t", "\r")
"""What a spreadsheet takes for the start of a formula. Common practice: an apostrophe before it makes it text."""


def write_csv(table: LegTable) -> str:
    """Return the leg table as CSV, lines ended by CRLF; no cell can become a formula."""
    out = io.StringIO()
    writer = csv.writer(out, lineterminator="\r\n")
    headings = [f"{column.heading} {column.unit}".rstrip() for row in Row for column in table.columns_of(row)]
    writer.writerow(["row", *headings, "said of it"])
    for row in table.rows:
        writer.writerow([row.row.value, *(plain_cell(cell) for cell in _cells(table, row))])
        writer.writerows(["part", *part_cells(table, part)] for part in row.parts)
    return out.getvalue()


def plain_cell(text: str) -> str:
    """Return a cell that no spreadsheet reads as a formula."""
    return f"'{text}" if text.startswith(_FORMULA_SIGNS) else text


def part_cells(table: LegTable, part: PartRow) -> list[str]:
    """Return a steering part's figures, each in the column of its quantity."""
    columns = [column for kind in Row for column in table.columns_of(kind)]
    return [*(part.figures.get(column.key, "") for column in columns), ""]


def _cells(table: LegTable, row: TableRow) -> list[str]:
    cells = {kind: [""] * len(table.columns_of(kind)) for kind in Row}
    cells[row.row] = list(row.cells)
    return [*cells[Row.WAYPOINT], *cells[Row.LEG], "; ".join(row.under)]
