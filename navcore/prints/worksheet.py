"""The hand-check worksheet: a leg worked step by step, so that a second person with a calculator gets the same figures.

Steps are shown with more figures than results, so that what is worked from the printed lines agrees with the printed
results; results are rounded as everywhere else.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import TYPE_CHECKING

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.plan.leg_words import track_of
from navcore.plan.model import Line
from navcore.plan.revision import fingerprint
from navcore.prints.caution import CAUTION
from navcore.prints.leg_table import leg_name, method_line, refuse_unworked
from navcore.prints.part_rows import part_rows
from navcore.prints.step_figures import RESULT_DECIMALS, step_figure
from navcore.prints.tracks import NO_VALUE, parts_words
from navcore.sailings.checked import check_composite, check_great_circle, check_rhumb_line
from navcore.sailings.comparison import compare_lines
from navcore.sailings.working import Step, StepKind, given_positions
from navcore.text.direction import format_direction
from navcore.text.distance import format_distance
from navcore.text.number import format_number
from navcore.text.plain import visible
from navcore.text.position import format_latitude, format_longitude

if TYPE_CHECKING:
    from collections.abc import Iterator

    from navcore.earth.figure import Figure
    from navcore.plan.model import Plan
    from navcore.plan.solve import SailedLeg, Solution
    from navcore.sailings.checked import CheckedLine
    from navcore.sailings.comparison import LegComparison
    from navcore.sailings.track import PointOnTrack
    from navcore.sailings.working import Working

LAST_FIGURE = (
    "Every line is worked from the unrounded lines above it; worked from the printed ones, a step may differ in its "
    "last figure, a result should not."
)

BY_TANGENT = "so near east or west, take sec C = √(1 + tan² C): the secant of a rounded angle is coarse"


@dataclass(frozen=True, slots=True)
class SheetLine:
    """One line: what it is called, how it is got, and its figure, all as printed."""

    symbol: str
    words: str
    figure: str


@dataclass(frozen=True, slots=True)
class Section:
    """One working, as printed.

    Attributes:
        title: What is worked, and on what basis.
        lines: Its lines in textbook order.
        remarks: What must be said of it.
    """

    title: str
    lines: tuple[SheetLine, ...]
    remarks: tuple[str, ...] = ()


@dataclass(frozen=True, slots=True)
class Result:
    """One method's result beside the plan's, as printed."""

    method: str
    distance: str
    course: str
    difference: str
    because: str


@dataclass(frozen=True, slots=True)
class LegSheet:
    """The worksheet of one leg.

    Attributes:
        index: Of the leg, from 0.
        heading: What leg of what plan.
        sailed: How it is sailed, and what that gives.
        sections: The workings.
        results: Every method beside the figure's own line.
        checked: The workings unrounded, for files.
        notes: What holds for the whole page.
    """

    index: int
    heading: str
    sailed: tuple[str, ...]
    sections: tuple[Section, ...]
    results: tuple[Result, ...]
    checked: tuple[CheckedLine, ...]
    notes: tuple[str, ...]


def make_worksheet(solution: Solution, indexes: tuple[int, ...] | None = None) -> tuple[LegSheet, ...]:
    """Return the worksheets of legs, all of them unless some are named by index.

    Raises:
        NoAnswerError: A leg's line can't be worked; every such leg is named.
    """
    refuse_unworked(solution)
    return tuple(_leg_sheet(solution, index) for index in (indexes or range(len(solution.legs))))


def _leg_sheet(solution: Solution, index: int) -> LegSheet:
    plan, leg = solution.plan, solution.legs[index]
    start, end = (waypoint.position for waypoint in plan.waypoints[index : index + 2])
    compared = compare_lines(start, end, plan.figure)
    checked = [check_rhumb_line(compared), check_great_circle(compared)]
    if leg.composite is not None:
        checked.append(check_composite(leg.composite))
    steps = given_positions(start, end)
    if leg.composite is not None:
        steps = (*steps, Step("limit", "given", leg.composite.limit_deg, StepKind.LATITUDE))
    given = Section("Given", tuple(map(_line, steps)))
    workings = [_section(working, compared) for line in checked for working in line.workings]
    workings += [Section(f"{line.name.capitalize()}: no working", (), (line.note,)) for line in checked if line.note]
    return LegSheet(
        index=index,
        heading=f"Leg {index + 1} → {index + 2}: {visible(leg_name(plan, index))}",
        sailed=tuple(_sailed(plan, leg)),
        sections=(given, *workings, *_of_points(solution, index), *_of_parts(leg, index)),
        results=tuple(_results(checked, plan.figure)),
        checked=tuple(checked),
        notes=(*_meridional_parts(plan.figure, checked), LAST_FIGURE, method_line(plan), CAUTION),
    )


def _sailed(plan: Plan, leg: SailedLeg) -> Iterator[str]:
    yield f"{visible(plan.title) or 'Passage plan'}, revision {plan.revision}, plan {fingerprint(plan)}"
    courses = [
        format_direction(course_deg) for course_deg in (leg.course_deg, leg.end_course_deg) if course_deg is not None
    ]
    course = " → ".join(dict.fromkeys(courses)) or NO_VALUE
    distance = format_distance((leg.distance_m or 0.0) / METRES_PER_NAUTICAL_MILE)
    yield f"sailed by {leg.line.value} on {plan.figure.name}: course {course}, distance {distance}"
    if leg.parts is not None:
        yield f"in {parts_words(leg.parts)}"


def _section(working: Working, leg: LegComparison) -> Section:
    near_east_west = abs(math.cos(math.radians(leg.rhumb_line.course_deg))) < 0.1
    lines = tuple(_line(step, fine_course=near_east_west) for step in working.steps)
    rounded = tuple(_result_line(working, symbol) for symbol in working.results)
    remarks = working.remarks
    if near_east_west and any("sec C" in step.words for step in working.steps):
        remarks = (*remarks, BY_TANGENT)
    return Section(f"{working.method} ({working.basis})", (*lines, *rounded), remarks)


def _line(step: Step, *, fine_course: bool = False) -> SheetLine:
    return SheetLine(step.symbol, step.words, step_figure(step, fine_course=fine_course))


def _result_line(working: Working, symbol: str) -> SheetLine:
    step = working.line(symbol)
    return SheetLine("", f"{symbol}, rounded", step_figure(step, decimals=RESULT_DECIMALS))


def _of_points(solution: Solution, index: int) -> Iterator[Section]:
    """Yield where a great circle or composite lies, ready to transfer to a chart."""
    leg, track = solution.legs[index], track_of(solution, index)
    if leg.line is Line.RHUMB or leg.parts is not None or track is None:
        return
    points = track.at_meridians(5.0 if track.length_m < 1500.0 * METRES_PER_NAUTICAL_MILE else 10.0)
    lines = tuple(_point_line(point) for point in points)
    if lines:
        yield Section(f"Latitudes at meridians (on {solution.plan.figure.name})", lines)


def _point_line(point: PointOnTrack) -> SheetLine:
    run = format_distance(point.distance_m / METRES_PER_NAUTICAL_MILE)
    position, course = point.position, format_direction(point.course_deg)
    return SheetLine(format_longitude(position.lon_deg), f"after {run}, {course}", format_latitude(position.lat_deg))


def _of_parts(leg: SailedLeg, index: int) -> Iterator[Section]:
    if leg.parts is None:
        return
    rows = part_rows(leg.parts, index + 1)
    lines = tuple(
        SheetLine(
            row.figures["number"],
            f"{row.figures['course_deg']}  {row.figures['distance_nmi']} NM  to",
            f"{row.figures['lat_deg']} {row.figures['lon_deg']}",
        )
        for row in rows
    )
    yield Section(f"Steering parts: {parts_words(leg.parts)}", lines)


def _results(checked: list[CheckedLine], figure: Figure) -> Iterator[Result]:
    for line in checked:
        courses = dict.fromkeys(format_direction(course) for course in (line.course_deg, line.final_course_deg))
        distance = format_distance(line.distance_nmi)
        yield Result(f"{line.name} on {figure.name}", distance, " → ".join(courses), "", "what the plan's figures are")
        for row in line.rows:
            yield Result(
                row.method,
                NO_VALUE if row.distance_nmi is None else format_distance(row.distance_nmi),
                NO_VALUE if row.course_deg is None else format_direction(row.course_deg),
                NO_VALUE if row.difference_nmi is None else format_distance(row.difference_nmi),
                "; ".join(row.causes),
            )


def _meridional_parts(figure: Figure, checked: list[CheckedLine]) -> Iterator[str]:
    """Yield the formula of the meridional parts, where they are used."""
    if not any(working.method == "Mercator sailing" for line in checked for working in line.workings):
        return
    formula = "7915.70446790 × log tan(45° + lat ÷ 2)"
    if figure.flattening:
        formula += f" − 3437.74677078 × e × artanh(e × sin lat), e = {format_number(figure.eccentricity, 10)}"
        formula += ", artanh x = ½ ln((1 + x) ÷ (1 − x))"
    yield f"MP of {figure.name} = {formula}; S latitudes negative"
