"""One leg by every method a second person may check it with, and what accounts for each difference from the plan's."""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import TYPE_CHECKING

from navcore.earth.latitudes import parallel_radius_m
from navcore.errors import NoAnswerError
from navcore.sailings import great_circle_sphere, mercator, middle_latitude, parallel
from navcore.sailings.composite_working import solve_composite
from navcore.sailings.differences import difference_of_latitude_min, is_across_equator, is_at_pole
from navcore.text.number import format_number

if TYPE_CHECKING:
    from navcore.earth.figure import Figure
    from navcore.position import Position
    from navcore.sailings.comparison import LegComparison
    from navcore.sailings.composite import Composite
    from navcore.sailings.working import Working

SMALL_D_LAT_MIN = 60.0
"""Below this difference of latitude middle-latitude sailing comes first, as DMP is then a small difference of large
figures. Common practice."""


@dataclass(frozen=True, slots=True)
class CheckRow:
    """One method beside the line on the plan's figure that it checks.

    Attributes:
        method: Its name.
        distance_nmi: What it gives; None where it gives none.
        course_deg: What it gives: the initial course of a great circle or composite.
        difference_nmi: What it gives less the line's; None where it gives none.
        causes: What accounts for the difference, with figures.
    """

    method: str
    distance_nmi: float | None
    course_deg: float | None
    difference_nmi: float | None
    causes: tuple[str, ...] = ()


@dataclass(frozen=True, slots=True)
class CheckedLine:
    """A line of the leg on the plan's figure, and the workings that check it.

    Attributes:
        name: "rhumb line", "great circle" or "composite".
        distance_nmi: On the plan's figure.
        course_deg: On the plan's figure, where it starts.
        final_course_deg: Where it ends.
        workings: First the usual method, then a second, independent one.
        rows: One for each working.
    """

    name: str
    distance_nmi: float
    course_deg: float
    final_course_deg: float
    workings: tuple[Working, ...]
    rows: tuple[CheckRow, ...]


def check_rhumb_line(leg: LegComparison) -> CheckedLine:
    """Return the rhumb line worked by Mercator, middle-latitude or parallel sailing, as suits the leg."""
    workings = _rhumb_workings(leg.start, leg.end, leg.figure)
    line = leg.rhumb_line
    rows = tuple(_rhumb_row(leg, working) for working in workings)
    return CheckedLine("rhumb line", line.distance_nmi, line.course_deg, line.course_deg, workings, rows)


def check_great_circle(leg: LegComparison) -> CheckedLine:
    """Return the great circle worked by cosines and by haversines."""
    workings = tuple(
        solve(leg.start, leg.end)
        for solve in (great_circle_sphere.solve_by_cosines, great_circle_sphere.solve_by_haversines)
    )
    line = leg.great_circle
    rows = tuple(_sphere_row(working, line.distance_nmi, leg.figure) for working in workings)
    return CheckedLine(
        "great circle", line.distance_nmi, line.initial_course_deg, line.final_course_deg, workings, rows
    )


def check_composite(track: Composite) -> CheckedLine | None:
    """Return a composite worked by the formulas of the books; None where it is the great circle."""
    try:
        working = solve_composite(track.start, track.end, track.limit_deg)
    except NoAnswerError:
        return None
    distance_nmi = track.distance_m / 1852.0
    rows = (_sphere_row(working, distance_nmi, track.figure),)
    return CheckedLine("composite", distance_nmi, track.initial_course_deg, track.final_course_deg, (working,), rows)


def _rhumb_workings(start: Position, end: Position, figure: Figure) -> tuple[Working, ...]:
    d_lat_min = difference_of_latitude_min(start, end)
    if d_lat_min == 0.0:
        return (parallel.solve_inverse(start, end),)
    by_mercator = mercator.solve_inverse(start, end, figure)
    if is_across_equator(start.lat_deg, end.lat_deg):
        return (by_mercator,)
    by_middle = middle_latitude.solve_inverse(start, end)
    first = abs(d_lat_min) < SMALL_D_LAT_MIN
    return (by_middle, by_mercator) if first else (by_mercator, by_middle)


def _rhumb_row(leg: LegComparison, working: Working) -> CheckRow:
    line = leg.rhumb_line
    distance_nmi, course_deg = working.value("distance"), working.value("course")
    if distance_nmi is None or not line.distance_nmi:
        return CheckRow(working.method, distance_nmi, course_deg, None)
    difference_nmi = distance_nmi - line.distance_nmi
    causes: list[str] = []
    accounted_nmi = 0.0
    if leg.figure.flattening:
        mile_m, words = _mile_m(leg, working)
        accounted_nmi = distance_nmi * (1.0 - mile_m / 1852.0)
        causes.append(
            f"{words} {format_number(mile_m, 1)} m on {leg.figure.name}, not 1852 m: {_signed(accounted_nmi)}"
        )
    rest_nmi = difference_nmi - accounted_nmi
    if abs(rest_nmi) >= 0.05:
        cause = "the mean latitude stands for the true middle one" if "Middle" in working.method else "rounding"
        causes.append(f"{cause}: {_signed(rest_nmi)}")
    return CheckRow(working.method, distance_nmi, course_deg, difference_nmi, tuple(causes) or ("rounding only",))


def _mile_m(leg: LegComparison, working: Working) -> tuple[float, str]:
    """Return what the working's mile is on the figure, and its words."""
    d_lat_min = difference_of_latitude_min(leg.start, leg.end)
    if working.method == parallel.METHOD and not is_at_pole(leg.start.lat_deg):
        departure_nmi = working.number("departure") or 1.0
        d_long_rad = math.radians(working.number("d.long") / 60.0)
        along_m = abs(d_long_rad) * float(parallel_radius_m(leg.start.lat_deg, leg.figure))
        return along_m / abs(departure_nmi), "1 NM of departure is"
    run_m = leg.rhumb_line.distance_nmi * 1852.0
    by_mercator = mercator.solve_inverse(leg.start, leg.end, leg.figure).value("distance")
    return run_m / by_mercator if by_mercator else run_m / abs(d_lat_min), "1' of latitude is on average"


def _sphere_row(working: Working, line_nmi: float, figure: Figure) -> CheckRow:
    distance_nmi, course_deg = working.value("distance"), working.value("initial course")
    difference_nmi = None if distance_nmi is None else distance_nmi - line_nmi
    cause = "rounding only"
    if figure.flattening and difference_nmi is not None:
        cause = f"the sphere in place of {figure.name}: {_signed(difference_nmi)}"
    return CheckRow(working.method, distance_nmi, course_deg, difference_nmi, (cause,))


def _signed(distance_nmi: float) -> str:
    figure = format_number(abs(distance_nmi), 1)
    sign = "" if figure == "0.0" else "−" if distance_nmi < 0.0 else "+"
    return f"{sign}{figure} NM"
