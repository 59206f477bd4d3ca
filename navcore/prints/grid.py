"""Where each column of the leg table stands on paper.

Waypoint rows and leg rows share one set of slots, so that their figures stand in line; the last waypoint slot holds the
boxes to tick. What finds no slot goes to a second ruled line of its row. Nothing leaves the page.
"""

from __future__ import annotations

from dataclasses import dataclass
from itertools import zip_longest
from typing import TYPE_CHECKING, NamedTuple

from navcore.plan.quantities import Row
from navcore.prints.paper.fonts import width_pt
from navcore.prints.paper.typeset import SMALLEST_PT, fold, widest_word_pt

if TYPE_CHECKING:
    from collections.abc import Sequence

    from navcore.prints.leg_table import LegTable, TableColumn

SIZES_PT = (10.0, 9.5, 9.0, SMALLEST_PT)
"""Of the figures: the largest at which every column of first need fits in one line."""

NUMBER_PT = 30.0
"""Width of the ladder at the left: the waypoint's number, and the line down to the next."""

BOXES = 4
BOX_PITCH_PT = 15.0
GAP_PT = 8.0

_NUMBER = 0
_NAME = 1
_NAME_PT = (60.0, 100.0, 190.0)
_TEXT_PT = (30.0, 62.0, 150.0)
_TO_WRITE_PT = 46.0
_HEADING_MOST_PT = 66.0
_HEADING_MOST_LINES = 3


class Width(NamedTuple):
    """What a column takes: at least, and where nothing has to be folded."""

    least_pt: float
    natural_pt: float


@dataclass(frozen=True, slots=True)
class Cell:
    """A column's place.

    Attributes:
        index: Which of its row's columns.
        x_pt: Where it begins.
        width_pt: Its width.
    """

    index: int
    x_pt: float
    width_pt: float


@dataclass(frozen=True, slots=True)
class Lane:
    """The columns of waypoint rows, or of leg rows.

    Attributes:
        cells: Those in the first line.
        second: Indexes of those in the second line.
    """

    cells: tuple[Cell, ...]
    second: tuple[int, ...]


@dataclass(frozen=True, slots=True)
class Grid:
    """The table's slots.

    Attributes:
        size_pt: Of the figures.
        left_pt: Where the rows begin, right of the ladder.
        right_pt: Where they end.
        boxes_pt: Where the boxes to tick begin.
        lanes: One for each kind of row.
    """

    size_pt: float
    left_pt: float
    right_pt: float
    boxes_pt: float
    lanes: dict[Row, Lane]


_Kept = dict[Row, list[int]]


def make_grid(table: LegTable, left_pt: float, right_pt: float) -> Grid:
    """Return the slots of a printable table between two edges."""
    room_pt = right_pt - left_pt - NUMBER_PT
    first_need = {row: _indexes(table, row, 1) for row in Row}
    size_pt = next((size for size in SIZES_PT if _fits(table, first_need, size, room_pt)), SIZES_PT[-1])
    widths = {row: _widths(table, row, size_pt) for row in Row}
    kept = {row: _headed(table, row, widths[row]) for row in Row}
    while _taken_pt(kept, widths) > room_pt and (least := _least_needed(kept, widths, table)):
        row, index = least
        kept[row].remove(index)
    return _place(table, kept, widths, size_pt, (left_pt + NUMBER_PT, right_pt))


def heading_lines(column: TableColumn, room_pt: float) -> list[str]:
    """Return a heading with its unit, folded to the width of its slot."""
    return fold(f"{column.heading} {column.unit}".rstrip(), room_pt, SMALLEST_PT, bold=True) or [""]


def _fits(table: LegTable, kept: _Kept, size_pt: float, room_pt: float) -> bool:
    return _taken_pt(kept, {row: _widths(table, row, size_pt) for row in Row}) <= room_pt


def _indexes(table: LegTable, row: Row, most_need: int | None = None) -> list[int]:
    columns = enumerate(table.columns_of(row))
    first = _NAME if row is Row.WAYPOINT else 0
    return [index for index, column in columns if index >= first and (most_need is None or column.need <= most_need)]


def _headed(table: LegTable, row: Row, widths: Sequence[Width]) -> list[int]:
    """Return the columns whose heading has room above them; the officer's own may be of any length."""
    columns = table.columns_of(row)
    return [
        index
        for index in _indexes(table, row)
        if len(heading_lines(columns[index], widths[index].least_pt)) <= _HEADING_MOST_LINES
    ]


def _widths(table: LegTable, row: Row, size_pt: float) -> list[Width]:
    columns = table.columns_of(row)
    rows = [line.cells for line in table.rows if line.row is row]
    return [
        _width(column, [cells[index] for cells in rows], size_pt, is_name=row is Row.WAYPOINT and index == _NAME)
        for index, column in enumerate(columns)
    ]


def _width(column: TableColumn, texts: Sequence[str], size_pt: float, *, is_name: bool) -> Width:
    unit_pt = width_pt(column.unit, SMALLEST_PT, bold=True)
    whole_pt = min(_HEADING_MOST_PT, width_pt(f"{column.heading} {column.unit}".rstrip(), SMALLEST_PT, bold=True))
    heading_pt = min(_HEADING_MOST_PT, max(widest_word_pt(column.heading, SMALLEST_PT, bold=True), unit_pt))
    if column.to_write:
        return Width(max(heading_pt, _TO_WRITE_PT), max(whole_pt, _TO_WRITE_PT))
    different = set(texts)
    full_pt = max((width_pt(text, size_pt, bold=is_name) for text in different), default=0.0)
    if not column.wraps:
        return Width(max(heading_pt, full_pt), max(whole_pt, full_pt))
    lowest_pt, most_pt, natural_pt = _NAME_PT if is_name else _TEXT_PT
    word_pt = max((widest_word_pt(text, size_pt, bold=is_name) for text in different), default=0.0)
    least_pt = max(heading_pt, lowest_pt, min(word_pt, most_pt))
    return Width(least_pt, max(least_pt, whole_pt, min(full_pt, natural_pt)))


def _slots(kept: _Kept, widths: dict[Row, list[Width]]) -> list[list[Width]]:
    """Return the widths that share each slot; the boxes stand in the last one."""
    lanes = [[widths[row][index] for index in indexes] for row, indexes in kept.items()]
    slots = [[width for width in slot if width is not None] for slot in zip_longest(*lanes)]
    boxes_pt = BOXES * BOX_PITCH_PT
    if len(kept[Row.WAYPOINT]) >= len(slots):
        slots.append([])
    slots[-1].append(Width(boxes_pt, boxes_pt))
    return slots


def _taken_pt(kept: _Kept, widths: dict[Row, list[Width]]) -> float:
    slots = _slots(kept, widths)
    return sum(max(width.least_pt for width in slot) for slot in slots) + GAP_PT * (len(slots) - 1)


def _least_needed(kept: _Kept, widths: dict[Row, list[Width]], table: LegTable) -> tuple[Row, int] | None:
    """Return the column that goes to the second line next: of the highest need, whichever makes the most room."""
    movable = [
        (row, index) for row, indexes in kept.items() for index in indexes if (row, index) != (Row.WAYPOINT, _NAME)
    ]
    if not movable:
        return None
    most_need = max(table.columns_of(row)[index].need for row, index in movable)
    candidates = [
        (_taken_pt({**kept, row: [kept_index for kept_index in kept[row] if kept_index != index]}, widths), -index, row)
        for row, index in movable
        if table.columns_of(row)[index].need == most_need
    ]
    _, index, row = min(candidates)
    return row, -index


def _place(
    table: LegTable, kept: _Kept, widths: dict[Row, list[Width]], size_pt: float, edges_pt: tuple[float, float]
) -> Grid:
    left_pt, right_pt = edges_pt
    slots = _slots(kept, widths)
    stretched_pt = _stretched(slots, right_pt - left_pt - GAP_PT * (len(slots) - 1))
    starts_pt = [left_pt + sum(stretched_pt[:slot]) + GAP_PT * slot for slot in range(len(slots))]
    lanes = {
        row: Lane(
            tuple(Cell(index, starts_pt[slot], stretched_pt[slot]) for slot, index in enumerate(indexes)),
            tuple(index for index in _indexes(table, row) if index not in indexes),
        )
        for row, indexes in kept.items()
    }
    return Grid(size_pt, left_pt, right_pt, right_pt - BOXES * BOX_PITCH_PT, lanes)


def _stretched(slots: list[list[Width]], room_pt: float) -> list[float]:
    """Return the width of each slot: what its texts would like first, then even shares of the rest."""
    least_pt = [max(width.least_pt for width in slot) for slot in slots]
    wished_pt = [
        max(0.0, max(width.natural_pt for width in slot) - least) for slot, least in zip(slots, least_pt, strict=True)
    ]
    spare_pt = max(0.0, room_pt - sum(least_pt))
    given = min(1.0, spare_pt / sum(wished_pt)) if sum(wished_pt) else 0.0
    share_pt = max(0.0, spare_pt - sum(wished_pt)) / len(slots)
    return [least + wished * given + share_pt for least, wished in zip(least_pt, wished_pt, strict=True)]
