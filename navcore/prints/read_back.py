"""The read-back sheet: for the second person who enters the plan into other equipment and checks what that shows.

Positions stand large and grouped, to be read aloud. Each leg stands by rhumb line and by great circle, because the
equipment may sail it by either; course and distance are both compared, since one alone hides a slip.
"""

from __future__ import annotations

from dataclasses import replace
from typing import TYPE_CHECKING

from navcore.plan.model import Line
from navcore.plan.quantities import QUANTITIES, rows_of
from navcore.plan.quantities import Row as PlanRow
from navcore.prints.grid import NUMBER_PT
from navcore.prints.ladder import HAIR_PT, HEAVY_PT, LADDER_PT, PLAIN_PT, centred, numbered
from navcore.prints.leg_table import make_leg_table
from navcore.prints.paper.fonts import width_pt
from navcore.prints.paper.head import ended, make_head, set_head
from navcore.prints.paper.page_layout import MARGIN_PT, Arrowhead, Block, Frame, Paper, Rule, Strip, Text, paginate
from navcore.prints.paper.pdf_canvas import write_pages
from navcore.prints.paper.typeset import SMALLEST_PT, fold
from navcore.prints.part_rows import part_rows
from navcore.prints.pdf import PrintableText, PrintedPdf, in_full, lacking_notice, notes, printable_table

if TYPE_CHECKING:
    from collections.abc import Iterator

    from navcore.plan.solve import Solution
    from navcore.prints.paper.page_layout import Group, Mark
    from navcore.prints.part_rows import PartRow

KIND = "Read-back sheet"

LEGEND = (
    "Agrees: course within 2° and distance within 2 NM of what the equipment shows, by one and the same line. Where a "
    "leg agrees by neither line, compare the two positions first, figure by figure."
)
SIGNATURES = (("Entered", ""), ("Read back", ""))
_TO_WRITE = (("Equipment", ""), ("Read back at, UTC", ""))

RHUMB_LINE = ("rhumb_line_course_deg",), "rhumb_line_nmi"
GREAT_CIRCLE = ("great_circle_course_deg", "great_circle_final_course_deg"), "great_circle_nmi"
AS_PLANNED = ("course_deg", "final_course_deg"), "distance_nmi"
"""Keys of the courses and of the distance, by each line that equipment may sail, and by a composite."""

_POSITION_PT = 15.0
_NAME_PT = 10.5
_PART_POSITION_PT = 13.0
_FIGURE_PT = 10.5
_WAYPOINT_PT = 30.0
_LEG_PT = 23.0
_NAME_LEADING_PT = 12.5
_BOX_PT = 12.0


class _Columns:
    """Where the columns stand on a sheet: edges from the left, in points."""

    def __init__(self, paper: Paper) -> None:
        self.ladder_pt = MARGIN_PT + LADDER_PT
        self.left_pt = MARGIN_PT + NUMBER_PT
        self.right_pt = MARGIN_PT + paper.room_pt
        room_pt = self.right_pt - self.left_pt
        self.course_pt = self.left_pt + 0.39 * room_pt
        self.distance_pt = self.left_pt + 0.515 * room_pt
        self.shown_course_pt = (self.left_pt + 0.55 * room_pt, self.left_pt + 0.68 * room_pt)
        self.shown_distance_pt = (self.left_pt + 0.71 * room_pt, self.left_pt + 0.86 * room_pt)
        self.box_pt = self.left_pt + 0.95 * room_pt
        self.latitude_pt = self.left_pt + 0.64 * room_pt
        self.longitude_pt = self.left_pt + 0.88 * room_pt
        self.name_room_pt = 0.40 * room_pt


def write_read_back(solution: Solution, paper: Paper | None = None) -> PrintedPdf:
    """Return the read-back sheet of a solved plan as a PDF; the same plan gives the same bytes.

    Args:
        solution: The plan, solved.
        paper: The sheet; A4 landscape unless given.

    Raises:
        NoAnswerError: A leg's line can't be worked; every such leg is named.
    """
    paper = paper or Paper()
    pages, title, lacking = lay_out_read_back(solution, paper)
    return PrintedPdf(write_pages(pages, paper, title), lacking)


def lay_out_read_back(solution: Solution, paper: Paper) -> tuple[list[list[Mark]], str, frozenset[str]]:
    """Return the pages of the read-back sheet, its title, and the characters that the font lacks."""
    text = PrintableText()
    table = printable_table(make_leg_table(solution), text)
    head = make_head(solution.plan, table, KIND, LEGEND)
    *journey, _, _, figure, datum, revision = text.pairs(head.particulars)
    head = replace(head, particulars=(*journey, *_TO_WRITE, figure, datum, revision), signatures=SIGNATURES)
    columns = _Columns(paper)
    set_up = set_head(head, paper, _headings(solution, columns))
    indexes = rows_of(PlanRow.WAYPOINT, solution)
    groups = [group for index in indexes for group in _groups(solution, columns, index, text)]
    end = [_count(solution, columns), *lacking_notice(text.lacking, paper), *in_full(set_up.in_full, paper)]
    pages = paginate([*groups, *end], set_up.furniture, paper, lambda left_pt: notes(left_pt, paper))
    return pages, table.title, frozenset(text.lacking)


def _headings(solution: Solution, columns: _Columns) -> Strip:
    trade = solution.plan.trade
    course, distance = (QUANTITIES[key].heading(trade) for key in ("course_deg", "distance_nmi"))
    waypoint, latitude, longitude = (QUANTITIES[key].heading(trade) for key in ("name", "lat_deg", "lon_deg"))
    marks: list[Mark] = [
        Rule(MARGIN_PT, 0.0, columns.right_pt, 0.0, HEAVY_PT),
        Text(columns.left_pt, 13.0, waypoint, SMALLEST_PT, bold=True),
        ended(latitude, columns.latitude_pt, 13.0, SMALLEST_PT, bold=True),
        ended(longitude, columns.longitude_pt, 13.0, SMALLEST_PT, bold=True),
        centred("agrees", columns.box_pt, 13.0, SMALLEST_PT, bold=True),
        Text(columns.left_pt, 26.0, "By", SMALLEST_PT),
        ended(course, columns.course_pt, 26.0, SMALLEST_PT),
        ended(f"{distance} NM", columns.distance_pt, 26.0, SMALLEST_PT),
        Text(columns.shown_course_pt[0], 26.0, f"shown: {course.lower()}", SMALLEST_PT),
        Text(columns.shown_distance_pt[0], 26.0, f"shown: {distance.lower()}", SMALLEST_PT),
    ]
    return Strip(31.0, tuple(marks))


def _groups(solution: Solution, columns: _Columns, index: int, text: PrintableText) -> Iterator[Group]:
    """Yield a waypoint with the leg after it, then each part that the leg is steered in."""
    waypoint = _waypoint(solution, columns, index, text)
    if index == len(solution.legs):
        yield (Block(tuple(waypoint)),)
        return
    parts = [_part(columns, part) for part in _part_rows(solution, index)]
    if parts:
        parts[-1] = parts[-1][:1]  # it ends at the next waypoint, which follows
    strips = [waypoint, _leg(solution, columns, index), *parts]
    strips[-1][-1] = _pointed(strips[-1][-1], columns)
    lined = [[_with_line(strip, columns, 0.0) for strip in block] for block in strips]
    lined[0][0] = _with_line(waypoint[0], columns, waypoint[0].height_pt)
    yield (Block((*lined[0], *lined[1])),)
    yield from ((Block(tuple(part)),) for part in lined[2:])


def _part_rows(solution: Solution, index: int) -> Iterator[PartRow]:
    parts = solution.legs[index].parts
    yield from part_rows(parts, index + 1) if parts else ()


def _part(columns: _Columns, part: PartRow) -> list[Strip]:
    """Return a part's course and distance, and then the position where it ends."""
    number, figures = part.figures["number"], part.figures
    base_pt = 16.0
    marks: list[Mark] = [
        Rule(columns.left_pt, 0.0, columns.right_pt, 0.0, HAIR_PT),
        Text(columns.left_pt, base_pt, f"end of part {number}", SMALLEST_PT, bold=True),
        ended(grouped(figures["lat_deg"]), columns.latitude_pt, base_pt, _PART_POSITION_PT, bold=True),
        ended(grouped(figures["lon_deg"]), columns.longitude_pt, base_pt, _PART_POSITION_PT, bold=True),
        _box(columns, base_pt),
    ]
    run = _leg_marks(columns, f"part {number}", figures["course_deg"], figures["distance_nmi"], bold=False)
    return [Strip(_LEG_PT, tuple(run)), Strip(_LEG_PT, tuple(marks))]


def _waypoint(solution: Solution, columns: _Columns, index: int, text: PrintableText) -> list[Strip]:
    number, name, latitude, longitude = (
        QUANTITIES[key].shown(solution, index) for key in ("number", "name", "lat_deg", "lon_deg")
    )
    base_pt = 20.0
    lines = fold(text(name), columns.name_room_pt, _NAME_PT, bold=True) or [""]
    marks: list[Mark] = [
        Rule(MARGIN_PT, 0.0, columns.right_pt, 0.0, PLAIN_PT),
        numbered(number, columns.ladder_pt, base_pt - 0.5),
        Text(columns.left_pt, base_pt - 1.0, lines[0], _NAME_PT, bold=True),
        ended(grouped(latitude), columns.latitude_pt, base_pt, _POSITION_PT, bold=True),
        ended(grouped(longitude), columns.longitude_pt, base_pt, _POSITION_PT, bold=True),
        _box(columns, base_pt),
    ]
    more = [Strip(_NAME_LEADING_PT, (Text(columns.left_pt, 8.5, line, _NAME_PT, bold=True),)) for line in lines[1:]]
    return [Strip(base_pt + 3.0, tuple(marks)), *more, Strip(_WAYPOINT_PT - base_pt - 3.0)]


def _leg(solution: Solution, columns: _Columns, index: int) -> list[Strip]:
    strips = []
    planned = solution.legs[index].line
    ways = {Line.RHUMB: RHUMB_LINE, Line.GREAT_CIRCLE: GREAT_CIRCLE} | {planned: AS_PLANNED}
    for line, (course_keys, distance_key) in ways.items():
        courses = [QUANTITIES[key].shown(solution, index) for key in course_keys]
        words, is_sailed = line.value, line is planned
        marks = _leg_marks(
            columns,
            f"{words}, planned" if is_sailed else words,
            " → ".join(course for course in courses if course),
            QUANTITIES[distance_key].shown(solution, index),
            bold=is_sailed,
        )
        strips.append(Strip(_LEG_PT, tuple(marks)))
    return strips


def _leg_marks(columns: _Columns, words: str, course: str, distance: str, *, bold: bool) -> list[Mark]:
    base_pt = 15.0
    rules = [
        Rule(start_pt, base_pt + 3.5, end_pt, base_pt + 3.5, HAIR_PT)
        for start_pt, end_pt in (columns.shown_course_pt, columns.shown_distance_pt)
    ]
    return [
        Rule(columns.left_pt, 0.0, columns.right_pt, 0.0, HAIR_PT),
        Text(columns.left_pt, base_pt, words, SMALLEST_PT, bold),
        ended(course, columns.course_pt, base_pt, _FIGURE_PT, bold=bold),
        ended(distance, columns.distance_pt, base_pt, _FIGURE_PT, bold=bold),
        *rules,
        _box(columns, base_pt),
    ]


def _count(solution: Solution, columns: _Columns) -> Group:
    """Return how many waypoints there are: one left out is not seen in the figures of the others."""
    between = sum(len(leg.parts.distances_m) - 1 for leg in solution.legs if leg.parts)
    parts = f" and {between} ends of parts between them" if between else ""
    shown = f"{len(solution.plan.waypoints)} waypoints{parts}. In the equipment:"
    end_pt = columns.left_pt + width_pt(shown, _FIGURE_PT, bold=True) + 8.0
    return (
        Block(
            (
                Strip(
                    24.0,
                    (
                        Rule(MARGIN_PT, 0.0, columns.right_pt, 0.0, HEAVY_PT),
                        Text(columns.left_pt, 16.0, shown, _FIGURE_PT, bold=True),
                        Rule(end_pt, 19.0, end_pt + 50.0, 19.0, HAIR_PT),
                    ),
                ),
            )
        ),
    )


def grouped(figure: str) -> str:
    """Return a latitude or longitude with a space between its degrees, minutes and letter."""
    return figure.replace("°", "° ").replace("'", "' ")


def _with_line(strip: Strip, columns: _Columns, top_pt: float) -> Strip:
    """Return a strip with the line that leads down to the next waypoint, from top_pt on, and to an arrowhead."""
    x_pt = columns.ladder_pt
    bottom_pt = strip.height_pt - (6.0 if any(isinstance(mark, Arrowhead) for mark in strip.marks) else 0.0)
    return Strip(strip.height_pt, (*strip.marks, Rule(x_pt, top_pt, x_pt, bottom_pt, PLAIN_PT)))


def _pointed(strip: Strip, columns: _Columns) -> Strip:
    return Strip(strip.height_pt, (*strip.marks, Arrowhead(columns.ladder_pt, strip.height_pt - 2.0)))


def _box(columns: _Columns, base_pt: float) -> Frame:
    return Frame(columns.box_pt - _BOX_PT / 2.0, base_pt - 10.0, _BOX_PT, _BOX_PT)
