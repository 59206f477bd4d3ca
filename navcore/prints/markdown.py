"""The leg table as a Markdown table, a row for each waypoint and each leg, figures as printed."""

from __future__ import annotations

import re
from typing import TYPE_CHECKING

from navcore.plan.quantities import Row
from navcore.prints.csv import part_cells

if TYPE_CHECKING:
    from collections.abc import Iterable

    from navcore.prints.leg_table import LegTable, TableRow

_TO_SIGN = r"\_" * 20
_SIGNS = re.compile(r"([\\`*_{}\[\]<>#|~!&])")


def write_markdown(table: LegTable) -> str:
    """Return the leg table as Markdown; what was typed is shown and never obeyed."""
    columns = [column for row in Row for column in table.columns_of(row)]
    lines = [f"# {_plain(table.title)}", ""]
    lines += [f"- {label}: {_plain(value)}" for label, value in table.particulars]
    lines += ["", _plain(table.method), ""]
    lines.append(_line([f"{column.heading} {column.unit}".rstrip() for column in columns] + ["said of it"]))
    lines.append(_line(["---:" if column.right else "---" for column in columns] + ["---"]))
    for row in table.rows:
        lines.append(_line(_cells(table, row)))
        lines += [_line(map(_plain, part_cells(table, part))) for part in row.parts]
    lines += ["", *(f"- {label}: {_plain(value)}" for label, value in table.totals)]
    lines += [f"- {said}" for said in table.said]
    lines += [f"- {role}: {_plain(name) or _TO_SIGN}" for role, name in table.signatures]
    return "\n".join([*lines, "", _plain(table.caution), ""])


def _cells(table: LegTable, row: TableRow) -> list[str]:
    cells = {kind: [""] * len(table.columns_of(kind)) for kind in Row}
    cells[row.row] = [_plain(cell) for cell in row.cells]
    return [*cells[Row.WAYPOINT], *cells[Row.LEG], "; ".join(map(_plain, row.under))]


def _line(cells: Iterable[str]) -> str:
    return f"| {' | '.join(cells)} |"


def _plain(text: str) -> str:
    return _SIGNS.sub(r"\\\1", text)
