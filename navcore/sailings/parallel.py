"""Parallel sailing: along one parallel of latitude, departure = d.long × cos latitude. 1' of latitude is 1 NM."""

from __future__ import annotations

from typing import TYPE_CHECKING

from navcore.errors import NoAnswerError
from navcore.sailings.differences import (
    check_position,
    course_of,
    difference_of_latitude_min,
    difference_of_longitude_min,
    is_at_pole,
    longitude_reached_deg,
    sine_cosine,
)
from navcore.sailings.plane import components
from navcore.sailings.working import Step, StepKind, Working, given_positions, given_run

if TYPE_CHECKING:
    from navcore.position import Position

METHOD = "Parallel sailing"
BASIS = "sphere; 1' of latitude = 1 NM"
NOWHERE = "the two positions are one: no course"


def solve_inverse(start: Position, end: Position) -> Working:
    """Work the course, 090 or 270, and the distance between two places on one parallel.

    Raises:
        NoAnswerError: The places are not on one parallel.
        RangeError: A latitude or longitude that is none.
    """
    if difference_of_latitude_min(start, end) != 0.0:
        raise NoAnswerError(
            "parallel sailing is along one parallel, and the latitudes differ; "
            "use Mercator or middle-latitude sailing, or make the latitudes equal"
        )
    d_long_min = difference_of_longitude_min(start, end)
    cosine = sine_cosine(start.lat_deg)[1]
    departure_nmi = d_long_min * cosine + 0.0
    course_deg = course_of(departure_nmi, 0.0) if departure_nmi else None
    steps = (
        Step("d.long", "long 2 − long 1 by the short way", d_long_min, StepKind.EAST_MIN),
        Step("cos lat", "cosine of the latitude", cosine, StepKind.NUMBER),
        Step("departure", "d.long × cos lat", departure_nmi, StepKind.EAST_NMI),
        Step("course", "090 where d.long is E, 270 where it is W", course_deg, StepKind.COURSE),
        Step("distance", "departure without its name", abs(departure_nmi), StepKind.DISTANCE_NMI),
    )
    remarks = (NOWHERE,) if course_deg is None else ()
    return Working(METHOD, BASIS, given_positions(start, end), steps, ("course", "distance"), remarks)


def solve_direct(start: Position, course_deg: float, distance_nmi: float) -> Working:
    """Work the position reached along a parallel.

    Raises:
        NoAnswerError: The course is neither 090 nor 270, or the parallel is a pole.
        RangeError: A latitude, longitude, course or distance that is none.
    """
    check_position(start)
    d_lat_min, departure_nmi = components(course_deg, distance_nmi)
    if d_lat_min != 0.0:
        raise NoAnswerError(
            "parallel sailing runs 090 or 270; use Mercator or middle-latitude sailing on another course"
        )
    if is_at_pole(start.lat_deg) and departure_nmi:
        raise NoAnswerError("a pole has no parallel to sail along; start from another latitude")
    cosine = sine_cosine(start.lat_deg)[1]
    d_long_min = departure_nmi / cosine if departure_nmi else 0.0
    steps = (
        Step("departure", "distance, E on 090 and W on 270", departure_nmi, StepKind.EAST_NMI),
        Step("cos lat", "cosine of the latitude", cosine, StepKind.NUMBER),
        Step("d.long", "departure ÷ cos lat", d_long_min, StepKind.EAST_MIN),
        Step("lat 2", "lat 1", start.lat_deg, StepKind.LATITUDE),
        Step("long 2", "long 1 + d.long", longitude_reached_deg(start, d_long_min), StepKind.LONGITUDE),
    )
    return Working(METHOD, BASIS, given_run(start, course_deg, distance_nmi), steps, ("lat 2", "long 2"))
