"""What stands at the head and the foot of every sheet of paper: which plan, how it was worked, who answers for it."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from navcore.plan.model import Trade
from navcore.plan.revision import fingerprint
from navcore.prints.paper.fonts import width_pt
from navcore.prints.paper.page_layout import MARGIN_PT, Furniture, Rule, Strip, Text
from navcore.prints.paper.typeset import SMALLEST_PT, fold, fold_at_most
from navcore.text.clock import format_instant
from navcore.text.kind import FORMATTERS, Kind

if TYPE_CHECKING:
    from collections.abc import Sequence

    from navcore.plan.model import Plan
    from navcore.prints.leg_table import LegTable
    from navcore.prints.paper.page_layout import Mark, Paper

TITLE_SIZES_PT = (16.0, 13.0, 11.0)
VALUE_PT = 10.0

_TITLE_LINES = 2
_VALUE_LINES = 3
_METHOD_LINES = 4
_NAME_LINES = 2
_SHARES = (0.97, 0.83, 1.0, 1.0, 1.2)
"""Of the particulars in a row: the last one holds a date and time."""

_PAD_PT = 5.0
_SMALL_LEADING_PT = 10.5
_LEADING_PT = 12.0
_THICK_PT = 2.0
_THIN_PT = 0.3
_SIGN_PT = 34.0


@dataclass(frozen=True, slots=True)
class Head:
    """What is said on every page.

    Attributes:
        kind: What sort of sheet it is.
        title: What the passage is called.
        particulars: Labels and values; "" is space to write in.
        method: How the figures are got.
        legend: What the boxes are for.
        signatures: Role and name.
        caution: The caution.
    """

    kind: str
    title: str
    particulars: tuple[tuple[str, str], ...]
    method: str
    legend: str
    signatures: tuple[tuple[str, str], ...]
    caution: str


@dataclass(frozen=True, slots=True)
class SetHead:
    """A head and foot laid out.

    Attributes:
        furniture: The strips of every page.
        in_full: Labels and whole texts of what had to be cut at the head or foot.
    """

    furniture: Furniture
    in_full: tuple[tuple[str, str], ...]


def make_head(plan: Plan, table: LegTable, kind: str, legend: str) -> Head:
    """Return the head of a plan's sheet; its title, method, signatures and caution are the leg table's."""
    return Head(kind, table.title, _particulars(plan), table.method, legend, table.signatures, table.caution)


def _particulars(plan: Plan) -> tuple[tuple[str, str], ...]:
    ends = [point.name or f"waypoint {number}" for number, point in enumerate(plan.waypoints, 1)]
    journey = (
        ("From", ends[0] if ends else ""),
        ("To", ends[-1] if ends else ""),
        ("Departure", format_instant(plan.departure) if plan.departure else ""),
    )
    basis = (
        ("Figure of the Earth", plan.figure.name),
        ("Datum of the positions", plan.datum),
        ("Revision", f"{plan.revision}, plan {fingerprint(plan)}"),
    )
    if plan.trade is Trade.AVIATION:
        craft = (("Aircraft", plan.craft.name), ("Flight", plan.voyage))
        return (*craft, *journey, ("Alternate", ""), ("Fuel: kg or lb", ""), *basis)
    draught = "" if plan.craft.draught_m is None else f"{FORMATTERS[Kind.METRES](plan.craft.draught_m)} m"
    craft = (("Ship", plan.craft.name), ("Voyage", plan.voyage))
    return (*craft, *journey, ("Deepest draught", draught), ("Draught fwd, aft", ""), *basis)


def set_head(head: Head, paper: Paper, last: Strip | None = None) -> SetHead:
    """Return a printable head laid out for a sheet of paper.

    Args:
        head: What is said.
        paper: The sheet.
        last: What stands below the head on every page, such as the headings of a table.
    """
    in_full: list[tuple[str, str]] = []
    title = _title(head, paper, in_full)
    below = [*_boxes(head, paper, in_full), *_method(head, paper, in_full), *([last] if last else [])]
    foot = [*_legend(head, paper), *_signatures(head, paper, in_full), *_caution(head, paper)]

    def strips(page: int, pages: int) -> Sequence[Strip]:
        return [_numbered(title, head, paper, page, pages), *below]

    return SetHead(Furniture(strips, foot), tuple(in_full))


def _title(head: Head, paper: Paper, in_full: list[tuple[str, str]]) -> Strip:
    room_pt = paper.room_pt - 130.0
    size_pt = next(
        (size for size in TITLE_SIZES_PT if len(fold(head.title, room_pt, size, bold=True)) == 1), TITLE_SIZES_PT[-1]
    )
    lines, cut = fold_at_most(head.title, room_pt, size_pt, _TITLE_LINES, bold=True)
    if cut:
        in_full.append(("Title", head.title))
    marks: list[Mark] = [Rule(MARGIN_PT, 0.0, MARGIN_PT + paper.room_pt, 0.0, _THICK_PT)]
    marks += [Text(MARGIN_PT, 20.0 + 14.0 * line, text, size_pt, bold=True) for line, text in enumerate(lines)]
    return Strip(max(34.0, 26.0 + 14.0 * (len(lines) - 1)), tuple(marks))


def _numbered(title: Strip, head: Head, paper: Paper, page: int, pages: int) -> Strip:
    right_pt = MARGIN_PT + paper.room_pt
    count = f"page {page} of {pages}"
    return Strip(
        title.height_pt,
        (
            *title.marks,
            ended(head.kind, right_pt, 15.0, 11.0, bold=True),
            ended(count, right_pt, 28.0, VALUE_PT),
        ),
    )


def _boxes(head: Head, paper: Paper, in_full: list[tuple[str, str]]) -> list[Strip]:
    strips = []
    starts_pt = [MARGIN_PT + paper.room_pt * sum(_SHARES[:box]) / sum(_SHARES) for box in range(len(_SHARES) + 1)]
    for start in range(0, len(head.particulars), len(_SHARES)):
        marks: list[Mark] = [Rule(MARGIN_PT, 0.0, MARGIN_PT + paper.room_pt, 0.0, _THIN_PT)]
        deepest = 1
        row = head.particulars[start : start + len(_SHARES)]
        for box, (label, value) in enumerate(row):
            x_pt = starts_pt[box] + (_PAD_PT if box else 0.0)
            room_pt = starts_pt[box + 1] - _PAD_PT - x_pt
            lines, cut = fold_at_most(value, room_pt, VALUE_PT, _VALUE_LINES, bold=True)
            if cut:
                in_full.append((label, value))
            marks.append(Text(x_pt, 10.0, label, SMALLEST_PT))
            marks += [Text(x_pt, 22.0 + _LEADING_PT * at, line, VALUE_PT, bold=True) for at, line in enumerate(lines)]
            deepest = max(deepest, len(lines))
        height_pt = 28.0 + _LEADING_PT * (deepest - 1)
        marks += [Rule(x_pt, 3.0, x_pt, height_pt - 3.0, _THIN_PT) for x_pt in starts_pt[1 : len(row)]]
        strips.append(Strip(height_pt, tuple(marks)))
    return strips


def _method(head: Head, paper: Paper, in_full: list[tuple[str, str]]) -> list[Strip]:
    lines, cut = fold_at_most(head.method, paper.room_pt, SMALLEST_PT, _METHOD_LINES)
    if cut:
        in_full.append(("Method", head.method))
    rule = Rule(MARGIN_PT, 0.0, MARGIN_PT + paper.room_pt, 0.0, _THIN_PT)
    return [Strip(2.0, (rule,)), *_small(lines), Strip(6.0)]


def _legend(head: Head, paper: Paper) -> list[Strip]:
    return [Strip(5.0), *_small(fold(head.legend, paper.room_pt, SMALLEST_PT))] if head.legend else [Strip(5.0)]


def _signatures(head: Head, paper: Paper, in_full: list[tuple[str, str]]) -> list[Strip]:
    """Return a line to sign for each role, with its name, and room for the date."""
    width_of_box_pt = paper.room_pt / len(head.signatures)
    marks: list[Mark] = []
    deepest = 1
    for box, (role, name) in enumerate(head.signatures):
        x_pt = MARGIN_PT + box * width_of_box_pt
        end_pt = x_pt + width_of_box_pt - (0.0 if box == len(head.signatures) - 1 else 14.0)
        lines, cut = fold_at_most(name, end_pt - x_pt - 55.0, VALUE_PT, _NAME_LINES, bold=True)
        if cut:
            in_full.append((role, name))
        marks.append(Text(x_pt, 12.0, role, SMALLEST_PT))
        marks += [
            Text(x_pt + 50.0, 12.0 + _LEADING_PT * at, text, VALUE_PT, bold=True) for at, text in enumerate(lines)
        ]
        deepest = max(deepest, len(lines))
    height_pt = _SIGN_PT + _LEADING_PT * (deepest - 1)
    for box in range(len(head.signatures)):
        x_pt = MARGIN_PT + box * width_of_box_pt
        end_pt = x_pt + width_of_box_pt - (0.0 if box == len(head.signatures) - 1 else 14.0)
        date_pt = end_pt - 62.0
        marks.append(Rule(x_pt, height_pt, date_pt - 8.0, height_pt, _THIN_PT))
        marks.append(Rule(date_pt, height_pt, end_pt, height_pt, _THIN_PT))
        marks.append(Text(x_pt, height_pt - 3.0, "signed", SMALLEST_PT))
        marks.append(Text(date_pt, height_pt - 3.0, "date", SMALLEST_PT))
    return [Strip(height_pt, tuple(marks)), Strip(5.0)]


def _caution(head: Head, paper: Paper) -> list[Strip]:
    return _small(fold(head.caution, paper.room_pt, SMALLEST_PT))


def _small(lines: Sequence[str]) -> list[Strip]:
    return [Strip(_SMALL_LEADING_PT, (Text(MARGIN_PT, 8.5, line, SMALLEST_PT),)) for line in lines]


def ended(text: str, right_pt: float, y_pt: float, size_pt: float, *, bold: bool = False) -> Text:
    """Return a printable text that ends at a right edge."""
    return Text(right_pt - width_pt(text, size_pt, bold=bold), y_pt, text, size_pt, bold)
