"""The lines of the passage page: headings and rows, each a line of pieces as wide as the page."""

from __future__ import annotations

from typing import TYPE_CHECKING

from navcore.plan.quantities import Row
from navcore.text.plain import fit, pad
from tui.present.grid import GAP, Grid, cells, headings
from tui.present.rows import RowKind, kind_of
from tui.present.tone import Piece, Tone, line

if TYPE_CHECKING:
    from navcore.plan.solve import Solution
    from tui.present.tone import Line

MARK = "►"
RAIL = "│"
_INVITATION = "type a position: 48°30.0'N 125°20.0'W"
_SHORT_INVITATION = "type a position"


def heading_lines(grid: Grid, solution: Solution) -> list[Line]:
    """Return the two lines of headings; where there are more columns, the first says which leaf this is."""
    first, second = headings(grid, solution)
    if grid.leaves > 1:
        mark = f"{grid.leaf + 1}/{grid.leaves}"
        first = mark + first[len(mark) :] if first.startswith(" " * len(mark)) else first
    return [line(Piece(first, Tone.HEAD)), line(Piece(second, Tone.QUIET))]


def row_line(grid: Grid, solution: Solution, row: int, *, is_cursor: bool) -> Line:
    """Return one row of the page."""
    plan = solution.plan
    mark = MARK if is_cursor else " "
    kind = kind_of(plan, row)
    if kind is RowKind.END:
        number = str(len(plan.waypoints) + 1)
        return line(
            Piece(mark + pad(number, grid.number_cells, "right") + grid.after_number + _invitation(grid), Tone.QUIET)
        )
    index = row // 2
    if kind is RowKind.WAYPOINT:
        name, *figures = cells(grid, solution, Row.WAYPOINT, index)
        start = f"{mark}{index + 1:>{grid.number_cells}}{grid.after_number}"
        return line(start, Piece(name, Tone.STRONG), GAP + GAP.join(figures))
    leg_line, *figures = cells(grid, solution, Row.LEG, index)
    start = f"{mark}{RAIL:>{grid.number_cells}}{grid.after_number}"
    leg = solution.legs[index]
    if leg.refusal is not None:
        return line(
            Piece(start, Tone.QUIET), Piece(f"{leg_line}{GAP}", Tone.ALERT), Piece(f"! {leg.refusal}", Tone.ALERT)
        )
    return line(Piece(start + leg_line, Tone.QUIET), Piece(GAP + GAP.join(figures), Tone.QUIET))


def width_of(grid: Grid) -> int:
    """Return the cells that a row takes."""
    columns = sum(column.cells for column in grid.columns) + len(GAP) * (len(grid.columns) - 1)
    return 1 + grid.number_cells + len(grid.after_number) + columns


def _invitation(grid: Grid) -> str:
    room = width_of(grid) - 1 - grid.number_cells - len(grid.after_number)
    return _INVITATION if len(_INVITATION) <= room else fit(_SHORT_INVITATION, room)
