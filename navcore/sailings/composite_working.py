"""Composite sailing as worked by the books, on the sphere: every step as data, to check the track on the figure by."""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

from navcore.angles import wrap_180, wrap_360
from navcore.earth.figure import SPHERE
from navcore.errors import NoAnswerError
from navcore.sailings.composite import composite
from navcore.sailings.differences import difference_of_longitude_min, sine_cosine
from navcore.sailings.working import Step, StepKind, Working, given_positions

if TYPE_CHECKING:
    from navcore.position import Position

METHOD = "Composite sailing"
BASIS = "sphere; 1' of arc = 1 NM; latitudes and limit without their names on one side of the equator"
WHY_THE_PARALLEL = (
    "the parallel is longer than the great circle between the tangent points, but that great circle would leave the "
    "limit; of all tracks that keep within it this is the shortest"
)
RESULTS = ("distance", "initial course", "final course", "long t1", "long t2")


def solve_composite(start: Position, end: Position, limit_deg: float) -> Working:
    """Work the tangent points, the arcs and the courses by the formulas of the books.

    Raises:
        NoAnswerError: As `composite` does; and where the great circle keeps within the limit of itself on the sphere.
        RangeError: A latitude or longitude that is none.
    """
    track = composite(start, end, limit_deg, SPHERE)
    if track.note is not None:
        raise NoAnswerError(track.note)
    side = math.copysign(1.0, limit_deg)
    d_long_min = difference_of_longitude_min(start, end)
    ends = [_from_end(place.lat_deg * side, abs(limit_deg)) for place in (start, end)]
    (turn1_deg, run1_deg, angle1_deg), (turn2_deg, run2_deg, angle2_deg) = ends
    along_min = abs(d_long_min) - (turn1_deg + turn2_deg) * 60.0
    along_nmi = along_min * sine_cosine(limit_deg)[1]
    onward = math.copysign(1.0, d_long_min)
    initial_deg, final_deg = (_course_deg(angle, side, onward) for angle in (angle1_deg, 180.0 - angle2_deg))
    given = (*given_positions(start, end), Step("limit", "given", limit_deg, StepKind.LATITUDE))
    steps = (
        Step("d.long", "long 2 − long 1 by the short way", d_long_min, StepKind.EAST_MIN),
        Step("P1", "cos P1 = tan lat 1 ÷ tan limit", turn1_deg, StepKind.ANGLE),
        Step("P2", "cos P2 = tan lat 2 ÷ tan limit", turn2_deg, StepKind.ANGLE),
        Step("long t1", "long 1 + P1 onward", wrap_180(start.lon_deg + onward * turn1_deg), StepKind.LONGITUDE),
        Step("long t2", "long 2 − P2, back", wrap_180(end.lon_deg - onward * turn2_deg), StepKind.LONGITUDE),
        Step("D1", "cos D1 = sin lat 1 ÷ sin limit, in minutes", run1_deg * 60.0, StepKind.DISTANCE_NMI),
        Step("D2", "cos D2 = sin lat 2 ÷ sin limit, in minutes", run2_deg * 60.0, StepKind.DISTANCE_NMI),
        Step("d.long t", "d.long − P1 − P2, in minutes", onward * along_min, StepKind.EAST_MIN),
        Step("Dp", "d.long t × cos limit", along_nmi, StepKind.DISTANCE_NMI),
        Step("distance", "D1 + Dp + D2", (run1_deg + run2_deg) * 60.0 + along_nmi, StepKind.DISTANCE_NMI),
        Step("A", "sin A = cos limit ÷ cos lat 1", angle1_deg, StepKind.ANGLE),
        Step(
            "initial course",
            "A, from the limit's pole towards E or W as d.long",
            initial_deg,
            StepKind.COURSE,
        ),
        Step("B", "sin B = cos limit ÷ cos lat 2", angle2_deg, StepKind.ANGLE),
        Step("final course", "180° − B, likewise", final_deg, StepKind.COURSE),
    )
    return Working(METHOD, BASIS, given, steps, RESULTS, (WHY_THE_PARALLEL,))


def _course_deg(angle_deg: float, side: float, onward: float) -> float:
    """Return the course at an angle from the limit's pole, 1 for the north one, towards the east (1) or west (-1)."""
    from_north_deg = angle_deg if side > 0.0 else 180.0 - angle_deg
    return float(wrap_360(onward * from_north_deg))


def _from_end(lat_deg: float, limit_deg: float) -> tuple[float, float, float]:
    """Return the angle at the pole, the arc to the tangent point and the angle at the end, in degrees."""
    (sin_lat, cos_lat), (sin_limit, cos_limit) = sine_cosine(lat_deg), sine_cosine(limit_deg)
    turn = math.acos(max(-1.0, min(1.0, sin_lat * cos_limit / (cos_lat * sin_limit))))
    run = math.acos(max(-1.0, min(1.0, sin_lat / sin_limit)))
    angle = math.asin(min(1.0, cos_limit / cos_lat))
    return math.degrees(turn), math.degrees(run), math.degrees(angle)
