"""One leg by every method a second person may check it with, and what accounts for each difference from the plan's."""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.earth.figure import SPHERE
from navcore.earth.latitudes import meridian_distance_m, parallel_radius_m
from navcore.errors import NoAnswerError
from navcore.lines import great_circle
from navcore.sailings import great_circle_sphere, mercator, middle_latitude, parallel
from navcore.sailings.composite import composite
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

_ROUNDING = "rounding only"
_UNKNOWN = "not accounted for: look for the mistake"
_SHOWS_NMI = 0.05


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
        note: Why there is no working; "" where there is one.
    """

    name: str
    distance_nmi: float
    course_deg: float
    final_course_deg: float
    workings: tuple[Working, ...]
    rows: tuple[CheckRow, ...]
    note: str = ""


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
    sphere_m = float(great_circle.inverse(*leg.start, *leg.end, SPHERE).distance_m)
    rows = tuple(_sphere_row(working, line.distance_nmi, sphere_m, leg.figure) for working in workings)
    return CheckedLine(
        "great circle", line.distance_nmi, line.initial_course_deg, line.final_course_deg, workings, rows
    )


def check_composite(track: Composite) -> CheckedLine:
    """Return a composite worked by the formulas of the books; where they give none, with the reason in its place."""
    note = track.note or ""
    workings: tuple[Working, ...] = ()
    rows: tuple[CheckRow, ...] = ()
    distance_nmi = track.distance_m / METRES_PER_NAUTICAL_MILE
    if not track.is_great_circle:
        try:
            working = solve_composite(track.start, track.end, track.limit_deg)
        except NoAnswerError as error:
            note = f"On the sphere there is none to check it by: {error}"
        else:
            sphere_m = composite(track.start, track.end, track.limit_deg, SPHERE).distance_m
            workings = (working,)
            rows = (_sphere_row(working, distance_nmi, sphere_m, track.figure),)
    return CheckedLine(
        "composite", distance_nmi, track.initial_course_deg, track.final_course_deg, workings, rows, note
    )


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
        accounted_nmi = distance_nmi * (1.0 - mile_m / METRES_PER_NAUTICAL_MILE)
        causes.append(
            f"{words} {format_number(mile_m, 1)} m on {leg.figure.name}, not 1852 m: {_signed(accounted_nmi)}"
        )
    rest = "the mean latitude stands for the true middle one" if working.method == middle_latitude.METHOD else _UNKNOWN
    causes += _rest(difference_nmi - accounted_nmi, rest)
    return CheckRow(working.method, distance_nmi, course_deg, difference_nmi, tuple(causes) or (_ROUNDING,))


def _mile_m(leg: LegComparison, working: Working) -> tuple[float, str]:
    """Return what the working's mile is on the figure, and its words."""
    d_lat_min = difference_of_latitude_min(leg.start, leg.end)
    if working.method == parallel.METHOD and not is_at_pole(leg.start.lat_deg):
        departure_nmi = working.number("departure") or 1.0
        d_long_rad = math.radians(working.number("d.long") / 60.0)
        along_m = abs(d_long_rad) * float(parallel_radius_m(leg.start.lat_deg, leg.figure))
        return along_m / abs(departure_nmi), "1 NM of departure is"
    arc_m = np.diff(meridian_distance_m([leg.start.lat_deg, leg.end.lat_deg], leg.figure))
    return abs(float(arc_m[0]) / d_lat_min), "1' of latitude is on average"


def _sphere_row(working: Working, line_nmi: float, sphere_m: float, figure: Figure) -> CheckRow:
    """Return a working on the sphere beside the line, the sphere's part found from the line worked on the sphere."""
    distance_nmi, course_deg = working.value("distance"), working.value("initial course")
    if distance_nmi is None:
        return CheckRow(working.method, None, course_deg, None, (_ROUNDING,))
    sphere_nmi = sphere_m / METRES_PER_NAUTICAL_MILE
    causes = []
    if figure.flattening:
        causes.append(f"the sphere in place of {figure.name}: {_signed(sphere_nmi - line_nmi)}")
    causes += _rest(distance_nmi - (sphere_nmi if figure.flattening else line_nmi), _UNKNOWN)
    return CheckRow(working.method, distance_nmi, course_deg, distance_nmi - line_nmi, tuple(causes) or (_ROUNDING,))


def _rest(rest_nmi: float, cause: str) -> list[str]:
    """Return what is left of a difference and its cause, where it shows in the figures as printed."""
    return [f"{cause}: {_signed(rest_nmi)}"] if abs(rest_nmi) >= _SHOWS_NMI else []


def _signed(distance_nmi: float) -> str:
    figure = format_number(abs(distance_nmi), 1)
    sign = "" if figure == "0.0" else "-" if distance_nmi < 0.0 else "+"
    return f"{sign}{figure} NM"
