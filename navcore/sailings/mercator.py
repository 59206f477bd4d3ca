"""Mercator sailing: the rhumb line by the difference of meridional parts (DMP) of the chosen figure.

As the books work it, 1' of latitude is 1 NM beside meridional parts of an ellipsoid, so that distances differ from the
true rhumb line on that ellipsoid by up to 0.7 %; courses do not.
"""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

from navcore.errors import NoAnswerError
from navcore.sailings.differences import (
    check_position,
    course_of,
    difference_of_latitude_min,
    difference_of_longitude_min,
    difference_of_parts_min,
    longitude_reached_deg,
    parts_min,
)
from navcore.sailings.plane import components
from navcore.sailings.poles import POLE_RULE, latitude_reached_deg, meridian_course_deg
from navcore.sailings.working import Step, StepKind, Working, given_positions, given_run

if TYPE_CHECKING:
    from navcore.earth.figure import Figure
    from navcore.position import Position

METHOD = "Mercator sailing"
ON_A_PARALLEL = "d.lat is 0, so d.lat × sec C gives no distance: use parallel sailing"
NOWHERE = "the two positions are one: no course"


def basis(figure: Figure) -> str:
    """Return what the figures rest on."""
    return f"meridional parts of {figure.name}; 1' of latitude = 1 NM"


def solve_inverse(start: Position, end: Position, figure: Figure) -> Working:
    """Work the course and distance between two places.

    Returns:
        The distance has no value where d.lat is 0, nor has the course where d.long is 0 as well. At a pole MP and DMP
        have no value; course and distance are then the meridian's.

    Raises:
        RangeError: A latitude or longitude that is none.
    """
    d_lat_min, d_long_min = difference_of_latitude_min(start, end), difference_of_longitude_min(start, end)
    dmp_min = difference_of_parts_min(start.lat_deg, end.lat_deg, d_lat_min, figure)
    tangent, course_deg, distance_nmi, remarks = _course_and_distance(d_lat_min, d_long_min, dmp_min)
    steps = (
        Step("d.lat", "lat 2 − lat 1", d_lat_min, StepKind.NORTH_MIN),
        Step("d.long", "long 2 − long 1 by the short way", d_long_min, StepKind.EAST_MIN),
        Step("MP 1", "meridional parts of lat 1", parts_min(start.lat_deg, figure), StepKind.NORTH_MIN),
        Step("MP 2", "meridional parts of lat 2", parts_min(end.lat_deg, figure), StepKind.NORTH_MIN),
        Step("DMP", "MP 2 − MP 1", dmp_min, StepKind.NORTH_MIN),
        Step("tan C", "d.long ÷ DMP", tangent, StepKind.NUMBER),
        Step("course", "angle C, from N or S towards E or W as DMP and d.long", course_deg, StepKind.COURSE),
        Step("distance", "d.lat × sec C", distance_nmi, StepKind.DISTANCE_NMI),
    )
    return Working(METHOD, basis(figure), given_positions(start, end), steps, ("course", "distance"), remarks)


def solve_direct(start: Position, course_deg: float, distance_nmi: float, figure: Figure) -> Working:
    """Work the position reached.

    Raises:
        NoAnswerError: d.lat is 0, which is parallel sailing's; or the run goes past a pole, or to or from one on
            another course than the meridian's.
        RangeError: A latitude, longitude, course or distance that is none.
    """
    check_position(start)
    d_lat_min, departure_nmi = components(course_deg, distance_nmi)
    if not d_lat_min:
        raise NoAnswerError("d.lat is 0, so DMP × tan C gives no d.long; use parallel sailing")
    lat2_deg = latitude_reached_deg(start, d_lat_min)
    dmp_min = difference_of_parts_min(start.lat_deg, lat2_deg, d_lat_min, figure)
    tangent = departure_nmi / d_lat_min
    if dmp_min is None and tangent:
        raise NoAnswerError("a pole is reached or left along a meridian only; use course 000 or 180")
    d_long_min = 0.0 if dmp_min is None else dmp_min * tangent
    steps = (
        Step("d.lat", "distance × cos course", d_lat_min, StepKind.NORTH_MIN),
        Step("lat 2", "lat 1 + d.lat", lat2_deg, StepKind.LATITUDE),
        Step("MP 1", "meridional parts of lat 1", parts_min(start.lat_deg, figure), StepKind.NORTH_MIN),
        Step("MP 2", "meridional parts of lat 2", parts_min(lat2_deg, figure), StepKind.NORTH_MIN),
        Step("DMP", "MP 2 − MP 1", dmp_min, StepKind.NORTH_MIN),
        Step("tan C", "tangent of the course", tangent, StepKind.NUMBER),
        Step("d.long", "DMP × tan C", d_long_min, StepKind.EAST_MIN),
        Step("long 2", "long 1 + d.long", longitude_reached_deg(start, d_long_min), StepKind.LONGITUDE),
    )
    remarks = (POLE_RULE,) if dmp_min is None else ()
    return Working(
        METHOD, basis(figure), given_run(start, course_deg, distance_nmi), steps, ("lat 2", "long 2"), remarks
    )


def _course_and_distance(
    d_lat_min: float, d_long_min: float, dmp_min: float | None
) -> tuple[float | None, float | None, float | None, tuple[str, ...]]:
    if dmp_min is None:
        return None, meridian_course_deg(d_lat_min), abs(d_lat_min) or None, (POLE_RULE,)
    if d_lat_min:
        distance_nmi = abs(d_lat_min / dmp_min) * math.hypot(dmp_min, d_long_min)
        return d_long_min / dmp_min, course_of(d_long_min, dmp_min), distance_nmi, ()
    if d_long_min:
        return None, course_of(d_long_min, 0.0), None, (ON_A_PARALLEL,)
    return None, None, None, (NOWHERE,)
