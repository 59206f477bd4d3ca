"""The leg table as text for a terminal or a plain page; columns align whatever script a name is in."""

from __future__ import annotations

from dataclasses import dataclass, replace
from typing import TYPE_CHECKING, Literal

from navcore.plan.quantities import Row
from navcore.text.plain import cell_width, pad
from navcore.text.wrap import wrap

if TYPE_CHECKING:
    from collections.abc import Iterable, Iterator, Sequence

    from navcore.prints.leg_table import LegTable, TableColumn, TableRow

NARROWEST = 80
"""The width in cells that the columns of first need are laid out for."""

_GAP = "  "
_NAME_NARROWEST = 12
_NAME_USUAL = 20
"""Columns that are not of first need yield before the name gets narrower than this, where a name needs it."""
_NAME_WIDEST = 40
_NAME = 1
"""Index of the name among the waypoint columns: the one that wraps."""


@dataclass(frozen=True, slots=True)
class _Slot:
    """A column that has found room: which of its row's cells, its heading, its width, and to which side."""

    index: int
    heading: str
    cells: int
    right: bool


def write_text(table: LegTable, width: int = NARROWEST) -> str:
    """Return the leg table as text, as many columns as fit, at least those of first need."""
    width = max(width, NARROWEST)
    slots = _slots(table, width)
    indent = " " * (slots[Row.WAYPOINT][0].cells + len(_GAP))
    rule = "─" * width
    lines = [*wrap(table.title, width), *_particulars(table, width), *wrap(table.method, width), rule]
    lines += _headings(slots, indent)
    lines.append(rule)
    for row in table.rows:
        lines += _row(row, slots[row.row], indent, width)
    lines.append(rule)
    lines += [f"{label}: {value}" for label, value in table.totals]
    lines += table.said
    lines += ["", *_signatures(table), "", *wrap(table.caution, width)]
    return "\n".join(line.rstrip() for line in lines) + "\n"


def _slots(table: LegTable, width: int) -> dict[Row, list[_Slot]]:
    """Return the columns that fit, dropping those of least need, the name taking what is left."""
    number_cells = _measure(table, Row.WAYPOINT)[0].cells
    rows = {Row.WAYPOINT: width, Row.LEG: width - number_cells - len(_GAP)}
    return {row: _fitting(table, row, room) for row, room in rows.items()}


def _fitting(table: LegTable, row: Row, room: int) -> list[_Slot]:
    columns = table.columns_of(row)
    measured = _measure(table, row)
    names = (cell_width(line.cells[_NAME]) for line in table.rows if line.row is row is Row.WAYPOINT)
    wanted = max(0, min(max(names, default=0), _NAME_USUAL) - _NAME_NARROWEST)
    for most in sorted({column.need for column in columns}, reverse=True):
        kept = [slot for slot in measured if columns[slot.index].need <= most]
        spare = room - sum(slot.cells for slot in kept) - len(_GAP) * (len(kept) - 1)
        if spare >= wanted or most == 1:
            return [_stretched(slot, spare) if row is Row.WAYPOINT and slot.index == _NAME else slot for slot in kept]
    return measured


def _measure(table: LegTable, row: Row) -> list[_Slot]:
    """Return every column as wide as its widest cell; the name as narrow as it may be, an empty column left out."""
    rows = [line.cells for line in table.rows if line.row is row]
    slots = []
    for index, column in enumerate(table.columns_of(row)):
        heading = _heading(column)
        widest = max((cell_width(cells[index]) for cells in rows), default=0)
        if row is Row.WAYPOINT and index == _NAME:
            slots.append(_Slot(index, heading, _NAME_NARROWEST, right=False))
        elif widest or column.need == 1:
            slots.append(_Slot(index, heading, max(widest, cell_width(heading)), column.right))
    return slots


def _stretched(slot: _Slot, spare: int) -> _Slot:
    return replace(slot, cells=min(max(slot.cells + spare, _NAME_NARROWEST), _NAME_WIDEST))


def _heading(column: TableColumn) -> str:
    return f"{column.heading} {column.unit}".rstrip()


def _headings(slots: dict[Row, list[_Slot]], indent: str) -> Iterator[str]:
    for row, before in ((Row.WAYPOINT, ""), (Row.LEG, indent)):
        yield before + _GAP.join(pad(slot.heading, slot.cells, _side(slot)) for slot in slots[row])


def _row(row: TableRow, slots: Sequence[_Slot], indent: str, width: int) -> Iterator[str]:
    before = indent if row.row is Row.LEG else ""
    wrapped = [wrap(row.cells[slot.index], slot.cells) or [""] for slot in slots]
    for line in range(max(map(len, wrapped), default=0)):
        parts = (lines[line] if line < len(lines) else "" for lines in wrapped)
        yield before + _GAP.join(pad(part, slot.cells, _side(slot)) for part, slot in zip(parts, slots, strict=True))
    beneath = indent + _GAP if row.row is Row.LEG else indent
    for text in (*row.under, *(part.words for part in row.parts)):
        yield from (beneath + part for part in wrap(text, width - len(beneath)))


def _side(slot: _Slot) -> Literal["left", "right"]:
    return "right" if slot.right else "left"


def _particulars(table: LegTable, width: int) -> Iterable[str]:
    return _flow([f"{label}: {value}" for label, value in table.particulars], width, "   ")


def _flow(pieces: Iterable[str], width: int, between: str) -> Iterator[str]:
    """Yield lines of whole pieces, folding a piece only where it is wider than a line."""
    line = ""
    for piece in pieces:
        longer = f"{line}{between}{piece}" if line else piece
        if line and cell_width(longer) > width:
            yield from wrap(line, width)
            longer = piece
        line = longer
    yield from wrap(line, width)


def _signatures(table: LegTable) -> Iterator[str]:
    widest = max(len(role) for role, _ in table.signatures)
    for role, name in table.signatures:
        yield f"{role:<{widest}}  {name or '.' * 40}"
