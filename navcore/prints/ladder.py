"""The leg table as strips of paper: a ladder of waypoints, and between each two the leg that joins them.

The waypoints' numbers stand at the left on a line that leads down from each to the next, so that no one can read a
course one row off. Space to write in is ruled.
"""

from __future__ import annotations

from itertools import zip_longest
from typing import TYPE_CHECKING

from navcore.plan.quantities import Row
from navcore.prints.grid import BOX_PITCH_PT, BOXES, GAP_PT, NUMBER_PT, heading_lines
from navcore.prints.paper.fonts import width_pt
from navcore.prints.paper.page_layout import Arrowhead, Block, Frame, Rule, Strip, Text, moved
from navcore.prints.paper.typeset import SMALLEST_PT, fold

if TYPE_CHECKING:
    from collections.abc import Iterable, Iterator, Sequence

    from navcore.prints.grid import Cell, Grid
    from navcore.prints.leg_table import LegTable, TableColumn, TableRow
    from navcore.prints.paper.page_layout import Group, Mark
    from navcore.prints.part_rows import PartRow

BOX_WORDS = ("entered", "circled", "ticked", "crossed")

HEAVY_PT = 1.2
PLAIN_PT = 0.7
HAIR_PT = 0.3

LADDER_PT = 12.0
"""From the margin to the line that leads down."""

_NUMBER_SIZE_PT = 12.0
_ROW_PT = {Row.WAYPOINT: 23.0, Row.LEG: 22.0}
_BASE_PT = {Row.WAYPOINT: 15.0, Row.LEG: 14.0}
_BELOW_PT = 4.0
_PART_PT = 18.0
_LEADING_PT = 12.5
_HEADING_LEADING_PT = 10.0
_BOX_PT = 11.0
_NAME = 1
_TO_WRITE_PT = 90.0
_NOTICE_BAR_PT = 3.0


def headings(table: LegTable, grid: Grid) -> Strip:
    """Return the headings of waypoint and leg rows, and of the boxes to tick."""
    marks: list[Mark] = [Rule(grid.left_pt - NUMBER_PT, 0.0, grid.right_pt, 0.0, HEAVY_PT)]
    words_pt = max(width_pt(word, SMALLEST_PT) for word in BOX_WORDS)
    y_pt = 0.0
    for row in grid.lanes:
        placed, deep_pt = _lane_headings(table.columns_of(row), grid, row)
        base_pt = max(deep_pt, words_pt) + 4.0 if row is Row.WAYPOINT else y_pt + deep_pt
        marks += [moved(mark, base_pt) for mark in placed]
        if row is Row.WAYPOINT:
            number = table.columns_of(row)[0].heading
            marks.append(centred(number, _ladder_pt(grid), base_pt, SMALLEST_PT, bold=True))
            marks += _box_headings(grid, base_pt)
        y_pt = base_pt + 3.0
    return Strip(y_pt + 2.0, tuple(marks))


def _lane_headings(columns: Sequence[TableColumn], grid: Grid, row: Row) -> tuple[list[Mark], float]:
    """Return the headings of one kind of row, the last line of each at 0, and how high they reach."""
    marks: list[Mark] = []
    deepest = 0
    for cell in grid.lanes[row].cells:
        lines = heading_lines(columns[cell.index], cell.width_pt)
        deepest = max(deepest, len(lines))
        for line, text in enumerate(lines, 1 - len(lines)):
            right = _is_right(columns[cell.index])
            y_pt = line * _HEADING_LEADING_PT
            marks.append(_aligned(text, cell, y_pt, SMALLEST_PT, right=right, bold=row is Row.WAYPOINT))
    return marks, deepest * _HEADING_LEADING_PT


def _box_headings(grid: Grid, base_pt: float) -> Iterator[Mark]:
    for box, word in enumerate(BOX_WORDS):
        x_pt = grid.boxes_pt + (box + 0.5) * BOX_PITCH_PT + 0.36 * SMALLEST_PT
        yield Text(x_pt, base_pt, word, SMALLEST_PT, upright=False)


def _is_written(column: TableColumn) -> bool:
    """Say whether an empty cell of a column is there to be written in: by hand, or one that the officer left open."""
    return column.to_write or column.wraps


def _is_right(column: TableColumn) -> bool:
    """Say whether a column is set to the right: every figure is, so that one kind of figure stands under another."""
    return not column.wraps and not column.to_write


def ladder(table: LegTable, grid: Grid) -> list[Group]:
    """Return the rows: each waypoint kept with the leg after it, then the parts that the leg is steered in."""
    groups: list[Group] = []
    for index, row in enumerate(table.rows):
        is_last = index == len(table.rows) - 1
        block = _block(table, grid, row, ends=row.row is Row.LEG and not row.parts)
        if row.row is Row.WAYPOINT:
            groups.append((block if is_last else _lined(block, grid, below_number=True),))
        else:
            groups[-1] = (*groups[-1], _lined(block, grid))
        groups += [(_lined(part, grid),) for part in _parts(table, grid, row)]
    return groups


def _block(table: LegTable, grid: Grid, row: TableRow, *, ends: bool) -> Block:
    columns = table.columns_of(row.row)
    strips = [*_first_lines(grid, row, columns), *_second_lines(grid, row, columns), *_under(grid, row)]
    return _pointed(strips, grid) if ends else Block(tuple(strips))


def _pointed(strips: Sequence[Strip], grid: Grid) -> Block:
    """Return a block that ends in the arrowhead at the next waypoint."""
    *before, last = strips
    head = Arrowhead(_ladder_pt(grid), last.height_pt - 2.0)
    return Block((*before, Strip(last.height_pt, (*last.marks, head))))


def _parts(table: LegTable, grid: Grid, row: TableRow) -> Iterator[Block]:
    """Yield each part that a leg is steered in: course and distance in their columns, then where it ends."""
    cells = {table.columns_of(Row.LEG)[cell.index].key: cell for cell in grid.lanes[Row.LEG].cells}
    for number, part in enumerate(row.parts, 1):
        strip = _part_strip(grid, cells, part)
        yield _pointed([strip], grid) if number == len(row.parts) else Block((strip,))


def _part_strip(grid: Grid, cells: dict[str, Cell], part: PartRow) -> Strip:
    base_pt = _BASE_PT[Row.LEG] - 2.0
    marks: list[Mark] = [Rule(grid.left_pt, 0.0, grid.right_pt, 0.0, HAIR_PT), *_boxes(grid, base_pt)]
    course, distance = cells.get("course_deg"), cells.get("distance_nmi")
    end = f"to {part.figures['lat_deg']} {part.figures['lon_deg']}"
    end_pt = distance.x_pt + distance.width_pt + 2.0 * GAP_PT if distance else grid.right_pt
    if not course or end_pt + width_pt(end, grid.size_pt) > grid.boxes_pt - GAP_PT:
        return Strip(_PART_PT, (*marks, Text(grid.left_pt, base_pt, " ".join(part.words.split()), grid.size_pt)))
    marks.append(Text(grid.left_pt, base_pt, f"part {part.figures['number']}", SMALLEST_PT))
    for key, cell in (("course_deg", course), ("distance_nmi", distance)):
        if cell:
            marks.append(_aligned(part.figures[key], cell, base_pt, grid.size_pt, right=True))
    return Strip(_PART_PT, (*marks, Text(end_pt, base_pt, end, grid.size_pt)))


def _lined(block: Block, grid: Grid, *, below_number: bool = False) -> Block:
    """Return the block with the line that leads down to the next waypoint."""
    strips = (_with_line(strip, grid, is_number=below_number and not at) for at, strip in enumerate(block.strips))
    return Block(tuple(strips))


def _with_line(strip: Strip, grid: Grid, *, is_number: bool) -> Strip:
    """Return the strip with the line that leads down to the next waypoint; it begins below a number."""
    x_pt = _ladder_pt(grid)
    top_pt = _BASE_PT[Row.WAYPOINT] + 3.5 if is_number else 0.0
    ends_in_arrow = any(isinstance(mark, Arrowhead) for mark in strip.marks)
    bottom_pt = strip.height_pt - (6.0 if ends_in_arrow else 0.0)
    return Strip(strip.height_pt, (Rule(x_pt, top_pt, x_pt, bottom_pt, PLAIN_PT), *strip.marks))


def _first_lines(grid: Grid, row: TableRow, columns: Sequence[TableColumn]) -> Iterator[Strip]:
    """Yield the row's first line, and one strip for each line that a text is folded into beneath it."""
    cells = grid.lanes[row.row].cells
    is_waypoint = row.row is Row.WAYPOINT
    base_pt, row_pt = _BASE_PT[row.row], _ROW_PT[row.row]
    head_pt = base_pt + _BELOW_PT
    folded = [_cell_lines(grid, cell, row, columns[cell.index]) for cell in cells]
    for line, texts in enumerate(zip_longest(*folded, fillvalue="")):
        marks = list(_first_marks(grid, row, columns)) if line == 0 else []
        y_pt = base_pt if line == 0 else _LEADING_PT - _BELOW_PT
        for cell, text in zip(cells, texts, strict=True):
            if text:
                bold = is_waypoint and cell.index == _NAME
                right = _is_right(columns[cell.index])
                marks.append(_aligned(text, cell, y_pt, grid.size_pt, right=right, bold=bold))
        yield Strip(head_pt if line == 0 else _LEADING_PT, tuple(marks))
    yield Strip(row_pt - head_pt)


def _cell_lines(grid: Grid, cell: Cell, row: TableRow, column: TableColumn) -> list[str]:
    text = row.cells[cell.index]
    if not column.wraps:
        return [text]
    bold = row.row is Row.WAYPOINT and cell.index == _NAME
    return fold(text, cell.width_pt, grid.size_pt, bold=bold) or [""]


def _first_marks(grid: Grid, row: TableRow, columns: Sequence[TableColumn]) -> Iterator[Mark]:
    """Yield what stands in the row's first line besides its figures: rules, space to write in, number, boxes."""
    base_pt = _BASE_PT[row.row]
    if row.row is Row.WAYPOINT:
        yield Rule(grid.left_pt - NUMBER_PT, 0.0, grid.right_pt, 0.0, PLAIN_PT)
        yield numbered(row.cells[0], _ladder_pt(grid), base_pt + 0.5)
        yield from _boxes(grid, base_pt)
    else:
        yield Rule(grid.left_pt, 0.0, grid.right_pt, 0.0, HAIR_PT)
    for cell in grid.lanes[row.row].cells:
        if not row.cells[cell.index] and _is_written(columns[cell.index]):
            y_pt = base_pt + 4.0
            yield Rule(cell.x_pt, y_pt, cell.x_pt + cell.width_pt, y_pt, HAIR_PT)


def _boxes(grid: Grid, base_pt: float) -> Iterator[Mark]:
    for box in range(BOXES):
        x_pt = grid.boxes_pt + (box + 0.5) * BOX_PITCH_PT - _BOX_PT / 2.0
        yield Frame(x_pt, base_pt - 9.5, _BOX_PT, _BOX_PT)


def _second_lines(grid: Grid, row: TableRow, columns: Sequence[TableColumn]) -> Iterator[Strip]:
    """Yield ruled lines of the columns that found no slot, each with its heading beside it."""
    x_pt = grid.left_pt
    marks: list[Mark] = []
    base_pt = _BASE_PT[Row.LEG]
    height_pt = _ROW_PT[Row.LEG]
    for index in (index for index in grid.lanes[row.row].second if row.cells[index] or _is_written(columns[index])):
        label, value = _labelled(columns[index], row.cells[index])
        label_pt = width_pt(f"{label}  ", SMALLEST_PT, bold=True) if label else 0.0
        item_pt = label_pt + (width_pt(value, grid.size_pt) if value else _TO_WRITE_PT)
        if marks and x_pt + item_pt > grid.right_pt:
            yield _ruled(height_pt, marks, grid)
            marks, x_pt = [], grid.left_pt
        if x_pt + item_pt > grid.right_pt:
            yield from _folded_item(label, value, grid)
            continue
        marks.append(Text(x_pt, base_pt, label, SMALLEST_PT, bold=True))
        if value:
            marks.append(Text(x_pt + label_pt, base_pt, value, grid.size_pt))
        else:
            marks.append(Rule(x_pt + label_pt, base_pt + 4.0, x_pt + item_pt, base_pt + 4.0, HAIR_PT))
        x_pt += item_pt + 18.0
    if marks:
        yield _ruled(height_pt, marks, grid)


def _labelled(column: TableColumn, figure: str) -> tuple[str, str]:
    return column.heading, f"{figure} {column.unit}".rstrip() if figure else ""


def _ruled(height_pt: float, marks: Iterable[Mark], grid: Grid) -> Strip:
    return Strip(height_pt, (Rule(grid.left_pt, 0.0, grid.right_pt, 0.0, HAIR_PT), *marks))


def _folded_item(label: str, value: str, grid: Grid) -> Iterator[Strip]:
    """Yield a text that is wider than the row: its heading, then line upon line."""
    room_pt = grid.right_pt - grid.left_pt
    lines = [
        *((text, SMALLEST_PT, True) for text in fold(label, room_pt, SMALLEST_PT, bold=True)),
        *((text, grid.size_pt, False) for text in fold(value, room_pt, grid.size_pt)),
    ]
    for line, (text, size_pt, bold) in enumerate(lines):
        mark = Text(grid.left_pt, 10.0, text, size_pt, bold)
        yield _ruled(_LEADING_PT + 1.0, [mark], grid) if not line else Strip(_LEADING_PT, (mark,))
    yield Strip(4.0)


def _under(grid: Grid, row: TableRow) -> Iterator[Strip]:
    """Yield what is said beneath a row; what is said of a leg is to be noticed, and has a bar beside it."""
    is_notice = row.row is Row.LEG
    for text in row.under:
        for line in fold(text, grid.right_pt - grid.left_pt, grid.size_pt, bold=is_notice):
            marks: list[Mark] = [Text(grid.left_pt, 9.0, line, grid.size_pt, is_notice)]
            if is_notice:
                x_pt = grid.left_pt - _NOTICE_BAR_PT - 3.0
                marks.append(Rule(x_pt, 0.0, x_pt, _LEADING_PT, _NOTICE_BAR_PT))
            yield Strip(_LEADING_PT, tuple(marks))
        yield Strip(4.0)


def numbered(number: str, x_pt: float, y_pt: float) -> Text:
    """Return a waypoint's number on the ladder, smaller where it has four figures."""
    size_pt = min(_NUMBER_SIZE_PT, 2.0 * LADDER_PT / width_pt(number, 1.0, bold=True))
    return centred(number, x_pt, y_pt, max(SMALLEST_PT, size_pt), bold=True)


def _ladder_pt(grid: Grid) -> float:
    return grid.left_pt - NUMBER_PT + LADDER_PT


def _aligned(text: str, cell: Cell, y_pt: float, size_pt: float, *, right: bool, bold: bool = False) -> Text:
    x_pt = cell.x_pt + cell.width_pt - width_pt(text, size_pt, bold=bold) if right else cell.x_pt
    return Text(x_pt, y_pt, text, size_pt, bold)


def centred(text: str, x_pt: float, y_pt: float, size_pt: float, *, bold: bool = False) -> Text:
    """Return a printable text about a middle."""
    return Text(x_pt - width_pt(text, size_pt, bold=bold) / 2.0, y_pt, text, size_pt, bold)
