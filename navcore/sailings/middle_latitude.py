"""Middle-latitude sailing: plane sailing, with departure and d.long turned into each other at the mean latitude.

1' of latitude is 1 NM. Not worked across the equator, where the mean latitude says nothing of the parallels passed.
"""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

from navcore.errors import NoAnswerError
from navcore.sailings import parallel
from navcore.sailings.differences import (
    check_position,
    course_of,
    difference_of_latitude_min,
    difference_of_longitude_min,
    is_across_equator,
    is_at_pole,
    longitude_reached_deg,
    mean_latitude_deg,
    sine_cosine,
)
from navcore.sailings.plane import components, run_steps
from navcore.sailings.poles import POLE_RULE, latitude_reached_deg, meridian_course_deg
from navcore.sailings.working import Step, StepKind, Working, given_positions, given_run

if TYPE_CHECKING:
    from navcore.position import Position

METHOD = "Middle-latitude sailing"
BASIS = "mean latitude; 1' of latitude = 1 NM"


def solve_inverse(start: Position, end: Position) -> Working:
    """Work the course and distance between two places; on one parallel it is parallel sailing.

    Raises:
        NoAnswerError: The leg crosses the equator.
        RangeError: A latitude or longitude that is none.
    """
    d_lat_min = difference_of_latitude_min(start, end)
    if d_lat_min == 0.0:
        return parallel.solve_inverse(start, end)
    _refuse_across_equator(start.lat_deg, end.lat_deg)
    d_long_min = difference_of_longitude_min(start, end)
    mean_deg = mean_latitude_deg(start.lat_deg, end.lat_deg)
    cosine = sine_cosine(mean_deg)[1]
    departure_nmi = d_long_min * cosine
    along_meridian = is_at_pole(start.lat_deg, end.lat_deg)
    east_nmi = 0.0 if along_meridian else departure_nmi
    course_deg = meridian_course_deg(d_lat_min) if along_meridian else course_of(east_nmi, d_lat_min)
    steps = (
        Step("d.lat", "lat 2 − lat 1", d_lat_min, StepKind.NORTH_MIN),
        Step("d.long", "long 2 − long 1 by the short way", d_long_min, StepKind.EAST_MIN),
        Step("mean lat", "half of lat 1 + lat 2", mean_deg, StepKind.LATITUDE),
        Step("cos mean lat", "cosine of the mean latitude", cosine, StepKind.NUMBER),
        Step("departure", "d.long × cos mean lat", departure_nmi, StepKind.EAST_NMI),
        Step("tan C", "departure ÷ d.lat", east_nmi / d_lat_min, StepKind.NUMBER),
        Step("course", "angle C, from N or S towards E or W as d.lat and departure", course_deg, StepKind.COURSE),
        Step("distance", "d.lat × sec C", math.hypot(d_lat_min, east_nmi), StepKind.DISTANCE_NMI),
    )
    remarks = (POLE_RULE,) if along_meridian else ()
    return Working(METHOD, BASIS, given_positions(start, end), steps, ("course", "distance"), remarks)


def solve_direct(start: Position, course_deg: float, distance_nmi: float) -> Working:
    """Work the position reached; on 090 and 270 this is parallel sailing under another name.

    Raises:
        NoAnswerError: The run crosses the equator, goes past a pole, or goes east or west at one.
        RangeError: A latitude, longitude, course or distance that is none.
    """
    check_position(start)
    d_lat_min, departure_nmi = components(course_deg, distance_nmi)
    lat2_deg = latitude_reached_deg(start, d_lat_min)
    _refuse_across_equator(start.lat_deg, lat2_deg)
    mean_deg = mean_latitude_deg(start.lat_deg, lat2_deg)
    if departure_nmi and (is_at_pole(start.lat_deg) or is_at_pole(lat2_deg)):
        raise NoAnswerError("a pole is reached or left along a meridian only; use course 000 or 180")
    cosine = sine_cosine(mean_deg)[1]
    d_long_min = departure_nmi / cosine if departure_nmi else 0.0
    steps = (
        *run_steps(d_lat_min, departure_nmi),
        Step("lat 2", "lat 1 + d.lat", lat2_deg, StepKind.LATITUDE),
        Step("mean lat", "half of lat 1 + lat 2", mean_deg, StepKind.LATITUDE),
        Step("cos mean lat", "cosine of the mean latitude", cosine, StepKind.NUMBER),
        Step("d.long", "departure ÷ cos mean lat", d_long_min, StepKind.EAST_MIN),
        Step("long 2", "long 1 + d.long", longitude_reached_deg(start, d_long_min), StepKind.LONGITUDE),
    )
    return Working(METHOD, BASIS, given_run(start, course_deg, distance_nmi), steps, ("lat 2", "long 2"))


def _refuse_across_equator(lat1_deg: float, lat2_deg: float) -> None:
    if is_across_equator(lat1_deg, lat2_deg):
        raise NoAnswerError(
            "middle-latitude sailing is not worked across the equator, where one mean latitude stands for none of the "
            "parallels passed; split the leg where it meets the equator and work each side with its own mean latitude, "
            "or use Mercator sailing"
        )
