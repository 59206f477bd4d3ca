"""The columns of the page: a quantity of a waypoint above one of a leg, in order of need, as many as the width takes.

What has no room stands on the next leaf of columns. A figure is shown whole or, where even its own column is too narrow
for it, as a mark; only names and remarks are ever shortened.
"""

from __future__ import annotations

from dataclasses import dataclass, replace
from functools import cache
from itertools import chain, zip_longest
from typing import TYPE_CHECKING

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.plan.quantities import QUANTITIES, Row, typed_columns, typed_quantity
from navcore.text.kind import FORMATTERS, Kind
from navcore.text.plain import cell_width, fit, pad

if TYPE_CHECKING:
    from collections.abc import Iterator

    from navcore.plan.model import Trade
    from navcore.plan.quantities import Quantity
    from navcore.plan.solve import Solution

GAP = "  "
NO_ROOM = "…"
"""In the place of a figure that its column is too narrow for."""

_GENEROUS = 60
"""Cells from which the number has a wider gap after it."""

_NAME_LEAST = 8
_NAME_USUAL = 18
_NAME_MOST = 30
_TEXT_LEAST = 14
_TEXT_MOST = 60
_ARROW = " → "

NOTES = "notes"
"""In the place of a quantity's key: the officer's own columns, all in one."""


@dataclass(frozen=True, slots=True)
class Slot:
    """One column of the page: what it shows of a waypoint and, below that, of a leg.

    Attributes:
        waypoint: Keys of quantities, side by side.
        leg: Keys of quantities, joined by an arrow.
    """

    waypoint: tuple[str, ...]
    leg: tuple[str, ...]


NAMES = Slot(("name",), ("line",))
_FIRST = (
    Slot(("lat_deg", "lon_deg"), ("course_deg", "final_course_deg")),
    Slot(("to_go_nmi",), ("distance_nmi",)),
    Slot(("eta",), ("time_on_leg_s",)),
    Slot(("alteration_deg",), ("speed_kn",)),
    Slot(("run_nmi",), ("saving_nmi",)),
    Slot((), ("rhumb_line_nmi",)),
    Slot((), ("great_circle_nmi",)),
    Slot(("remarks",), (NOTES,)),
)
_FIXED = {
    Kind.LATITUDE: 9,
    Kind.LONGITUDE: 10,
    Kind.DIRECTION: 7,
    Kind.ALTERATION: 12,
    Kind.SPEED: 7,
    Kind.INSTANT: 16,
    Kind.PERCENT: 6,
    Kind.ANGLE: 7,
    Kind.MINUTES_OF_ARC: 10,
    Kind.METRES: 8,
    Kind.COUNT: 5,
}
"""Cells that the figures of a kind take at most, whatever the plan; texts take what there is."""

_LEFT = frozenset({Kind.TEXT, Kind.DIRECTION, Kind.LATITUDE})
"""Kinds that begin their column on the left."""

SAID_IN_MARGIN = ("steering", "composite_track", "crossings")
"""Quantities that are sentences: they stand in the margin in full, and in no column."""

_ELSEWHERE = frozenset({"number", *SAID_IN_MARGIN})


@cache
def slots() -> tuple[Slot, ...]:
    """Return every column but the names, in order of need; a quantity that has no pair yet comes last, in pairs."""
    placed = {*_ELSEWHERE, *chain(NAMES.waypoint, NAMES.leg), *chain(*(slot.waypoint + slot.leg for slot in _FIRST))}
    rest = [quantity for quantity in QUANTITIES.values() if quantity.key not in placed]
    points = [quantity.key for quantity in rest if quantity.row is Row.WAYPOINT]
    legs = [quantity.key for quantity in rest if quantity.row is Row.LEG]
    pairs = zip_longest(points, legs)
    return (*_FIRST, *(Slot((point,) if point else (), (leg,) if leg else ()) for point, leg in pairs))


@dataclass(frozen=True, slots=True)
class Column:
    """A slot that has found room.

    Attributes:
        slot: Which.
        cells: How wide it is.
    """

    slot: Slot
    cells: int


@dataclass(frozen=True, slots=True)
class Grid:
    """The columns of one width.

    Attributes:
        number_cells: Width of the waypoints' numbers.
        after_number: What parts them from the names.
        columns: The names, then what fits.
        leaf: Which leaf of columns it is, from 0.
        leaves: How many there are.
    """

    number_cells: int
    after_number: str
    columns: tuple[Column, ...]
    leaf: int
    leaves: int


def make_grid(solution: Solution, width: int, leaf: int = 0) -> Grid:
    """Return the columns that fit a width in cells, on one leaf of them."""
    number_cells = max(2, len(str(len(solution.plan.waypoints) + 1)))
    widths = _widths(solution)
    measured = [
        Column(slot, _measure(slot, solution.plan.trade, widths)) for slot in slots() if _is_used(slot, solution)
    ]
    # The mark of the cursor, the number, a gap; then the name.
    after_number = GAP if width >= _GENEROUS else " "
    room = width - 1 - number_cells - len(after_number)
    leaves = list(_leaves(measured, room))
    leaf = min(max(leaf, 0), len(leaves) - 1)
    kept = leaves[leaf]
    spare = room - sum(column.cells + len(GAP) for column in kept)
    if kept and kept[-1].slot.waypoint == ("remarks",):
        remarks = min(kept[-1].cells + max(spare - _NAME_USUAL, 0), _TEXT_MOST)
        spare -= remarks - kept[-1].cells
        kept = [*kept[:-1], replace(kept[-1], cells=remarks)]
    name = Column(NAMES, max(min(spare, _NAME_MOST), 1))
    return Grid(number_cells, after_number, (name, *kept), leaf, len(leaves))


def _leaves(columns: list[Column], room: int) -> Iterator[list[Column]]:
    """Yield leaves of columns, each as full as it can be; one that never fits is left to stand alone."""
    rest = columns
    first = True
    while rest or first:
        free = room - (_NAME_USUAL if room > 2 * _NAME_USUAL + 30 else _NAME_LEAST)
        leaf: list[Column] = []
        while rest and (free >= rest[0].cells + len(GAP) or not leaf):
            free -= rest[0].cells + len(GAP)
            leaf.append(rest[0])
            rest = rest[1:]
        first = False
        yield leaf


def headings(grid: Grid, solution: Solution) -> tuple[str, str]:
    """Return the two lines above the rows: what the columns say of a waypoint, and of a leg."""
    trade = solution.plan.trade
    indent = " " * (1 + grid.number_cells) + grid.after_number
    lines = []
    for row in Row:
        parts = (_cell(_heads(column.slot, row, trade, solution), column, row) for column in grid.columns)
        lines.append(indent + GAP.join(parts))
    return lines[0], lines[1]


def cells(grid: Grid, solution: Solution, row: Row, index: int) -> list[str]:
    """Return what stands in each column of a row, as wide as the column."""
    return [_cell(_shown(column.slot, row, solution, index), column, row) for column in grid.columns]


def _keys(slot: Slot, row: Row) -> tuple[str, ...]:
    return slot.waypoint if row is Row.WAYPOINT else slot.leg


def _is_used(slot: Slot, solution: Solution) -> bool:
    """Say whether a column that much can be said in, or nothing, has anything in this plan."""
    if slot.leg == (NOTES,):
        return bool(typed_columns(solution)) or any(waypoint.remarks for waypoint in solution.plan.waypoints)
    if slot.leg == ("time_on_leg_s",):
        return solution.plan.departure is not None or any(solution.schedule.time_on_leg)
    return True


def _shown(slot: Slot, row: Row, solution: Solution, index: int) -> list[str]:
    if slot.leg == (NOTES,) and row is Row.LEG:
        texts = ((column, typed_quantity(column).shown(solution, index)) for column in typed_columns(solution))
        return [" · ".join(f"{FORMATTERS[Kind.TEXT](column)}: {text}" for column, text in texts if text)]
    return [QUANTITIES[key].shown(solution, index) for key in _keys(slot, row)]


def _heads(slot: Slot, row: Row, trade: Trade, solution: Solution) -> list[str]:
    if slot.leg == (NOTES,) and row is Row.LEG:
        return [" · ".join(FORMATTERS[Kind.TEXT](column) for column in typed_columns(solution))]
    heads = [f"{QUANTITIES[key].heading(trade)} {QUANTITIES[key].unit(trade)}".rstrip() for key in _keys(slot, row)]
    return heads if row is Row.WAYPOINT else heads[:1]


def _cell(texts: list[str], column: Column, row: Row) -> str:
    """Return the texts of one cell, set to the side of their kind and exactly as wide as the column."""
    if row is Row.WAYPOINT and len(texts) > 1:
        widths = (_FIXED[QUANTITIES[key].kind] for key in column.slot.waypoint)
        text = GAP.join(pad(text, width, "right") for text, width in zip(texts, widths, strict=True))
    else:
        text = _ARROW.join(text for text in texts if text)
    kinds = [QUANTITIES[key].kind for key in _keys(column.slot, row) if key in QUANTITIES]
    if cell_width(text) > column.cells:
        text = fit(text, column.cells) if Kind.TEXT in kinds or not kinds else NO_ROOM
    return pad(text, column.cells, "left" if not kinds or kinds[0] in _LEFT else "right")


def _measure(slot: Slot, trade: Trade, widths: dict[Kind, int]) -> int:
    """Return how wide a column must be for the widest figures and its headings."""
    most = 0
    for row in Row:
        quantities = [QUANTITIES[key] for key in _keys(slot, row) if key in QUANTITIES]
        if quantities:
            between = len(GAP) if row is Row.WAYPOINT else len(_ARROW)
            figures = sum(_width(quantity, widths) for quantity in quantities) + between * (len(quantities) - 1)
            head = f"{quantities[0].heading(trade)} {quantities[0].unit(trade)}".rstrip()
            most = max(most, figures, cell_width(head))
    return most


def _width(quantity: Quantity, widths: dict[Kind, int]) -> int:
    return widths.get(quantity.kind, _TEXT_LEAST)


def _widths(solution: Solution) -> dict[Kind, int]:
    """Return how wide the figures of each kind can get in a plan: no leg is longer than all of them together."""
    runs_m = [run_m for run_m in solution.run_m if run_m is not None]
    longest = FORMATTERS[Kind.DISTANCE]((runs_m[-1] if runs_m else 0.0) / METRES_PER_NAUTICAL_MILE)
    times = [time for time in solution.schedule.time_so_far if time is not None]
    slowest = FORMATTERS[Kind.DURATION](times[-1]) if times else ""
    return {**_FIXED, Kind.DISTANCE: max(8, len(longest)), Kind.DURATION: max(16, len(slowest))}
