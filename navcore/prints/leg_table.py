"""The leg table as a document: every word and figure as printed, for any medium to lay out."""

from __future__ import annotations

from dataclasses import dataclass
from datetime import timedelta
from decimal import Decimal
from typing import TYPE_CHECKING

from navcore.errors import NoAnswerError
from navcore.plan.model import Line, Trade
from navcore.plan.quantities import QUANTITIES, Row, quantity_of, rows_of, typed_columns, typed_quantity
from navcore.plan.revision import fingerprint
from navcore.prints.caution import CAUTION
from navcore.prints.columns import LEG_TABLE, UNDER_THE_ROW, Column
from navcore.prints.part_rows import PartRow, part_rows
from navcore.text.clock import parse_duration
from navcore.text.kind import FORMATTERS, Kind
from navcore.text.plain import visible

if TYPE_CHECKING:
    from collections.abc import Sequence

    from navcore.plan.model import Plan
    from navcore.plan.quantities import Quantity
    from navcore.plan.solve import Solution

ROWS_ROUNDED = "rows rounded: totals are of the unrounded distances and times"

_LEFT = frozenset({Kind.TEXT, Kind.INSTANT, Kind.DIRECTION})
"""Kinds that are read from the left: a great circle's two courses begin where a rhumb line's one does."""


@dataclass(frozen=True, slots=True)
class TableColumn:
    """A column with its heading in the trade's words.

    Attributes:
        row: Whether it stands on waypoints or on legs.
        heading: Its words.
        unit: The unit of its figures; "" where each carries its own.
        need: 1 is never left out; the highest goes first.
        right: Whether its figures are set to the right.
        wraps: Whether its cells may be folded: texts are, figures never.
        to_write: Whether it is space to write in.
        key: Of the quantity that gives the heading; "" where it is space to write in.
    """

    row: Row
    heading: str
    unit: str
    need: int
    right: bool
    wraps: bool = False
    to_write: bool = False
    key: str = ""


@dataclass(frozen=True, slots=True)
class TableRow:
    """A waypoint's or a leg's row.

    Attributes:
        row: Which.
        cells: One for each column of its row, as printed.
        under: What is said beneath the row.
        parts: The steering parts of a leg, beneath that.
    """

    row: Row
    cells: tuple[str, ...]
    under: tuple[str, ...]
    parts: tuple[PartRow, ...] = ()


@dataclass(frozen=True, slots=True)
class LegTable:
    """The leg table, ready to be laid out.

    Attributes:
        title: What the passage is called.
        particulars: Labels and values of the head.
        method: How the figures are got.
        columns: Waypoint columns and leg columns, in order.
        rows: Waypoint, leg, waypoint, ...
        totals: Labels and values under the rows.
        said: What must be said of the table as a whole.
        signatures: Role and name; an empty name is a line to sign.
        caution: The caution.
    """

    title: str
    particulars: tuple[tuple[str, str], ...]
    method: str
    columns: tuple[TableColumn, ...]
    rows: tuple[TableRow, ...]
    totals: tuple[tuple[str, str], ...]
    said: tuple[str, ...]
    signatures: tuple[tuple[str, str], ...]
    caution: str

    def columns_of(self, row: Row) -> tuple[TableColumn, ...]:
        """Return the columns that stand on waypoints, or those that stand on legs."""
        return tuple(column for column in self.columns if column.row is row)


def make_leg_table(solution: Solution, columns: tuple[Column, ...] = LEG_TABLE) -> LegTable:
    """Return the leg table of a solved plan.

    Args:
        solution: The plan, solved.
        columns: What is shown, waypoint columns and leg columns each in order.

    Raises:
        NoAnswerError: A leg's line can't be worked; every such leg is named.
    """
    refuse_unworked(solution)
    plan = solution.plan
    return LegTable(
        title=_title(plan),
        particulars=_particulars(plan),
        method=method_line(plan),
        columns=tuple(_table_column(column, plan.trade) for column in columns),
        rows=_rows(solution, columns),
        totals=_totals(solution),
        said=(ROWS_ROUNDED,) if _rows_are_rounded(solution) else (),
        signatures=_signatures(plan),
        caution=CAUTION,
    )


def method_line(plan: Plan) -> str:
    """Return how a plan's figures are got, in one sentence."""
    circle = "great circles" if plan.figure.flattening == 0.0 else "great circles (geodesics)"
    word = QUANTITIES["course_deg"].heading(plan.trade).lower()
    composite = any(plan.line_of(leg) is Line.COMPOSITE for leg in plan.legs)
    in_parts = any(leg.parts is not None and plan.line_of(leg) is not Line.RHUMB for leg in plan.legs)
    return (
        f"Rhumb lines and {circle} on the figure {plan.figure.name}; 1 NM = 1852 m; {word}s true, a great circle's "
        "initial → final. "
        + (
            "Composites: great circles that touch the limiting parallel, and the parallel between. "
            if composite
            else ""
        )
        + ("Parts: rhumb lines between points of the line; totals are of what is steered. " if in_parts else "")
        + f"Positions: datum {visible(plan.datum)}. Times UTC."
    )


def refuse_unworked(solution: Solution) -> None:
    """Refuse a plan with a leg whose line can't be worked: no other line is ever put in its place.

    Raises:
        NoAnswerError: Every such leg, by number and name, with the reason.
    """
    refused = [
        f"leg {index + 1}, {leg_name(solution.plan, index)}: {leg.refusal}"
        for index, leg in enumerate(solution.legs)
        if leg.refusal is not None
    ]
    if refused:
        raise NoAnswerError("; ".join(refused))


def leg_name(plan: Plan, index: int) -> str:
    """Return a leg's two ends in words; a waypoint without a name goes by its number."""
    ends = (visible(plan.waypoints[end].name) or f"waypoint {end + 1}" for end in (index, index + 1))
    return " to ".join(ends)


def _title(plan: Plan) -> str:
    if plan.title or not plan.waypoints:
        return visible(plan.title) or "Passage plan"
    ends = (plan.waypoints[0].name or "first waypoint", plan.waypoints[-1].name or "last waypoint")
    return visible(" to ".join(ends))


def _particulars(plan: Plan) -> tuple[tuple[str, str], ...]:
    aviation = plan.trade is Trade.AVIATION
    draught = "" if plan.craft.draught_m is None else f"{FORMATTERS[Kind.METRES](plan.craft.draught_m)} m"
    pairs = (
        ("Aircraft" if aviation else "Ship", plan.craft.name),
        ("Flight" if aviation else "Voyage", plan.voyage),
        ("Draught", draught),
        ("Departure", f"{FORMATTERS[Kind.INSTANT](plan.departure)} UTC" if plan.departure else ""),
        ("Revision", f"{plan.revision}, plan {fingerprint(plan)}"),
    )
    return tuple((label, visible(value)) for label, value in pairs if value)


def _table_column(column: Column, trade: Trade) -> TableColumn:
    blank = column.to_write
    if blank:
        return TableColumn(blank.row, blank.heading, blank.unit, column.need, right=False, to_write=True)
    first = column.first
    heading = visible(first.heading(trade))
    wraps = first.kind is Kind.TEXT
    right = first.kind not in _LEFT
    return TableColumn(column.row, heading, first.unit(trade), column.need, right, wraps, key=first.key)


def _rows(solution: Solution, columns: tuple[Column, ...]) -> tuple[TableRow, ...]:
    rows: list[TableRow] = []
    shown = {key for column in columns for key in column.keys}
    beneath = [QUANTITIES[key] for key in UNDER_THE_ROW if key not in shown]
    typed = [typed_quantity(column) for column in typed_columns(solution)]
    typed = [quantity for quantity in typed if quantity.key not in shown]
    for index in rows_of(Row.WAYPOINT, solution):
        rows.append(_row(Row.WAYPOINT, solution, index, columns, beneath, []))
        if index < len(solution.legs):
            rows.append(_row(Row.LEG, solution, index, columns, beneath, typed))
    return tuple(rows)


def _row(
    row: Row,
    solution: Solution,
    index: int,
    columns: tuple[Column, ...],
    beneath: Sequence[Quantity],
    typed: Sequence[Quantity],
) -> TableRow:
    cells = tuple(_cell(column, solution, index) for column in columns if column.row is row)
    under = [_said(quantity, solution, index) for quantity in beneath if quantity.row is row]
    own = ((quantity.marine, quantity.shown(solution, index)) for quantity in typed)
    under.append(" · ".join(f"{visible(column)}: {text}" for column, text in own if text))
    parts = solution.legs[index].parts if row is Row.LEG else None
    rows = () if parts is None else tuple(part_rows(parts, index + 1))
    return TableRow(row, cells, tuple(text for text in under if text), rows)


def _said(quantity: Quantity, solution: Solution, index: int) -> str:
    """Return what is said beneath a row; a figure says what it is, words say it themselves."""
    shown = quantity.shown(solution, index)
    speaks = quantity.kind is Kind.TEXT or not shown
    return shown if speaks else f"{quantity.heading(solution.plan.trade).lower()} {shown}"


def _cell(column: Column, solution: Solution, index: int) -> str:
    figures = (quantity_of(key).shown(solution, index) for key in column.keys)
    return " → ".join(figure for figure in figures if figure)


def _totals(solution: Solution) -> tuple[tuple[str, str], ...]:
    total = _total_shown(solution)
    distance = QUANTITIES["distance_nmi"]
    times = solution.schedule.time_so_far
    duration = FORMATTERS[Kind.DURATION](times[-1]) if times and solution.legs else ""
    pairs = (
        ("Total distance", f"{total} {distance.unit(solution.plan.trade)}" if total else ""),
        ("Total time", duration),
    )
    return tuple((label, value) for label, value in pairs if value)


def _total_shown(solution: Solution) -> str:
    to_go: Quantity = QUANTITIES["to_go_nmi"]
    return to_go.shown(solution, 0) if solution.legs else ""


def _rows_are_rounded(solution: Solution) -> bool:
    """Say whether distances, times or a leg's parts as printed don't add up to what is printed for the whole."""
    if not solution.legs:
        return False
    distances = [QUANTITIES["distance_nmi"].shown(solution, index) for index in rows_of(Row.LEG, solution)]
    if not _add_up(distances, _total_shown(solution)) or _times_are_rounded(solution):
        return True
    return any(
        leg.parts is not None
        and not _add_up([part.figures["distance_nmi"] for part in part_rows(leg.parts, 1)], distance)
        for leg, distance in zip(solution.legs, distances, strict=True)
    )


def _add_up(rows: Sequence[str], total: str) -> bool:
    return sum(map(Decimal, rows)) == Decimal(total)


def _times_are_rounded(solution: Solution) -> bool:
    total = solution.schedule.time_so_far[-1]
    stays = [waypoint.stay for waypoint in solution.plan.waypoints[1:-1]]
    pieces = [*solution.schedule.time_on_leg, *stays]
    if total is None:
        return False
    printed = (parse_duration(FORMATTERS[Kind.DURATION](piece)) for piece in pieces)
    return sum(printed, timedelta()) != parse_duration(FORMATTERS[Kind.DURATION](total))


def _signatures(plan: Plan) -> tuple[tuple[str, str], ...]:
    signed = (("Prepared", plan.prepared), ("Checked", plan.checked), ("Approved", plan.approved))
    return tuple((role, visible(name)) for role, name in signed)
