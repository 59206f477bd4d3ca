"""Great-circle sailing on the sphere, 1' of arc to 1 NM: by the cosine formulas, and by haversines as a second way.

The triangle is that of the two places and the north pole, south latitudes negative; A and B are its angles at place 1
and place 2.
"""

from __future__ import annotations

import math
from dataclasses import replace
from typing import TYPE_CHECKING, NamedTuple

from navcore.angles import wrap_180, wrap_360
from navcore.sailings.differences import (
    difference_of_latitude_min,
    difference_of_longitude_min,
    is_at_pole,
    sine_cosine,
)
from navcore.sailings.working import Step, StepKind, Working, given_positions

if TYPE_CHECKING:
    from navcore.position import Position

METHOD = "Great-circle sailing"
BASIS = "sphere; 1' of arc = 1 NM"
RESULTS = ("distance", "initial course", "final course", "lat v", "long v")

_Pair = tuple[float, float]

NOWHERE = "the two positions are one: no course"
OPPOSITE = "the two positions are opposite: every great circle from one leads to the other, over the poles among them"
ALONG_MERIDIAN = "the great circle is a meridian: its vertices are the poles, at no one longitude"
ALONG_EQUATOR = "the great circle is the equator: no vertex"


class _Triangle(NamedTuple):
    """What is known of the triangle; d_long_deg is unsigned, is_west says which way it goes."""

    start: Position
    end: Position
    d_long_deg: float
    is_west: bool

    @property
    def is_meridian(self) -> bool:
        """Whether the great circle passes over the poles."""
        return self.d_long_deg in {0.0, 180.0} or is_at_pole(self.start.lat_deg, self.end.lat_deg)


def solve_by_cosines(start: Position, end: Position) -> Working:
    """Work distance, courses and vertex by the cosine formulas.

    Returns:
        Lines "distance", "initial course", "final course", "lat v" and "long v". Courses have no value between a place
        and itself or its opposite; the vertex has none on the equator, and no longitude on a meridian. Of the two
        vertices it is the one on the leg, else the one in the hemisphere of the higher latitude, north for a tie.

    Raises:
        RangeError: A latitude or longitude that is none.

    Accuracy:
        1e-6 NM and 0.01° from 1 NM to 1 NM short of half round, held by tests/sailings/test_great_circle_sphere.py. A
        cosine tells little of a small angle: below 1 NM use haversines.
    """
    triangle = _triangle(start, end)
    (sin1, cos1), (sin2, cos2) = sine_cosine(start.lat_deg), sine_cosine(end.lat_deg)
    cos_d_long = sine_cosine(triangle.d_long_deg)[1]
    cos_distance = sin1 * sin2 + cos1 * cos2 * cos_d_long
    distance_deg = _arc_cosine_deg(cos_distance)
    sin_distance = sine_cosine(distance_deg)[0]
    angles = None
    if not triangle.is_meridian and sin_distance:
        angles = (
            _arc_cosine_deg((sin2 - sin1 * cos_distance) / (cos1 * sin_distance)),
            _arc_cosine_deg((sin1 - sin2 * cos_distance) / (cos2 * sin_distance)),
        )
    steps = (
        *_differences(triangle),
        Step("cos D", "sin lat 1 × sin lat 2 + cos lat 1 × cos lat 2 × cos d.long", cos_distance, StepKind.NUMBER),
        Step("D", "angle of cos D", distance_deg, StepKind.ANGLE),
        Step("distance", "D in minutes", distance_deg * 60.0, StepKind.DISTANCE_NMI),
    )
    words = (
        "cos A = (sin lat 2 − sin lat 1 × cos D) ÷ (cos lat 1 × sin D)",
        "cos B = (sin lat 1 − sin lat 2 × cos D) ÷ (cos lat 2 × sin D)",
    )
    return _finish(f"{METHOD} by cosines", triangle, steps, _course_steps(triangle, angles, words))


def solve_by_haversines(start: Position, end: Position) -> Working:
    """Work distance, courses and vertex by haversines; lines and edges as by cosines.

    Raises:
        RangeError: A latitude or longitude that is none.

    Accuracy:
        As by cosines, and the distance below 1 NM to 1 in 10⁸, held by the same tests.
    """
    triangle = _triangle(start, end)
    lat1, lat2 = math.radians(start.lat_deg), math.radians(end.lat_deg)
    cos1, cos2 = sine_cosine(start.lat_deg)[1], sine_cosine(end.lat_deg)[1]
    hav_d_long = _haversine(math.radians(triangle.d_long_deg))
    hav_distance = min(1.0, hav_d_long * cos1 * cos2 + _haversine(lat2 - lat1))
    distance = _arc_haversine(hav_distance)
    angles = None
    if not triangle.is_meridian and 0.0 < distance < math.pi:
        co_lat1, co_lat2 = 0.5 * math.pi - lat1, 0.5 * math.pi - lat2
        angles = (
            math.degrees(_arc_haversine(_haversine_of_angle(co_lat2, distance, co_lat1))),
            math.degrees(_arc_haversine(_haversine_of_angle(co_lat1, distance, co_lat2))),
        )
    steps = (
        *_differences(triangle),
        Step("hav D", "hav d.long × cos lat 1 × cos lat 2 + hav d.lat", hav_distance, StepKind.NUMBER),
        Step("D", "angle of hav D", math.degrees(distance), StepKind.ANGLE),
        Step("distance", "D in minutes", math.degrees(distance) * 60.0, StepKind.DISTANCE_NMI),
    )
    words = (
        "hav A = (hav co-lat 2 − hav (D ~ co-lat 1)) ÷ (sin D × sin co-lat 1), co-lat = 90° − lat",
        "hav B = (hav co-lat 1 − hav (D ~ co-lat 2)) ÷ (sin D × sin co-lat 2)",
    )
    return _finish(f"{METHOD} by haversines", triangle, steps, _course_steps(triangle, angles, words))


def _triangle(start: Position, end: Position) -> _Triangle:
    difference_of_latitude_min(start, end)
    d_long_deg = difference_of_longitude_min(start, end) / 60.0
    return _Triangle(start, end, abs(d_long_deg), d_long_deg < 0.0)


def _arc_cosine_deg(cosine: float) -> float:
    """Return an angle in degrees; a cosine that rounding has put past 1 is 1."""
    return math.degrees(math.acos(max(-1.0, min(1.0, cosine))))


def _haversine(angle: float) -> float:
    return math.sin(0.5 * angle) ** 2


def _arc_haversine(haversine: float) -> float:
    return 2.0 * math.asin(math.sqrt(max(0.0, min(1.0, haversine))))


def _haversine_of_angle(opposite: float, side: float, other_side: float) -> float:
    """Return the haversine of the angle between two sides, (hav a - hav(b ~ c)) / (sin b sin c), all in radians."""
    # The difference of two haversines as a product of sines: nothing cancels where the triangle is flat.
    difference = math.sin(0.5 * (opposite + side - other_side)) * math.sin(0.5 * (opposite - side + other_side))
    return difference / (math.sin(side) * math.sin(other_side))


def _differences(triangle: _Triangle) -> tuple[Step, Step]:
    start, end = triangle.start, triangle.end
    return (
        Step("d.lat", "lat 2 − lat 1", difference_of_latitude_min(start, end), StepKind.NORTH_MIN),
        Step("d.long", "long 2 − long 1 by the short way", difference_of_longitude_min(start, end), StepKind.EAST_MIN),
    )


def _course_steps(triangle: _Triangle, angles: _Pair | None, words: tuple[str, str]) -> tuple[Step, ...]:
    """Return the angles at the two places in degrees, and the courses named from them."""
    if triangle.is_meridian:
        courses = _meridian_courses(triangle)
    elif angles is None:
        courses = None
    else:
        courses = _named(triangle, angles[0]), _named(triangle, 180.0 - angles[1])
    at_start, at_end = angles or (None, None)
    initial_deg, final_deg = courses or (None, None)
    return (
        Step("A", words[0], at_start, StepKind.ANGLE),
        Step("initial course", "A, from N towards E or W as d.long", initial_deg, StepKind.COURSE),
        Step("B", words[1], at_end, StepKind.ANGLE),
        Step("final course", "180° − B, from N towards E or W as d.long", final_deg, StepKind.COURSE),
    )


def _named(triangle: _Triangle, angle_deg: float) -> float:
    return wrap_360(-angle_deg if triangle.is_west else angle_deg)


def _meridian_courses(triangle: _Triangle) -> _Pair | None:
    """Return the courses along a meridian; None for a place and itself or its opposite."""
    lat1_deg, lat2_deg = triangle.start.lat_deg, triangle.end.lat_deg
    over_a_pole = triangle.d_long_deg == 180.0 and not is_at_pole(lat1_deg, lat2_deg)
    if abs(lat1_deg) == abs(lat2_deg) == 90.0 or lat1_deg == (-lat2_deg if over_a_pole else lat2_deg):
        return None
    if over_a_pole:
        return (0.0, 180.0) if lat1_deg + lat2_deg > 0.0 else (180.0, 0.0)
    return (0.0, 0.0) if lat2_deg > lat1_deg else (180.0, 180.0)


def _vertex_steps(triangle: _Triangle, at_start_deg: float | None) -> tuple[tuple[Step, ...], tuple[str, ...]]:
    """Return latitude, angle at the pole and longitude of the vertex, and why any has no value."""
    lat_deg: float | None = None
    polar_deg: float | None = None
    remarks: tuple[str, ...] = ()
    if triangle.is_meridian:
        lat_deg, remarks = math.copysign(90.0, _higher_deg(triangle)), (ALONG_MERIDIAN,)
    elif triangle.start.lat_deg == triangle.end.lat_deg == 0.0:
        remarks = (ALONG_EQUATOR,)
    elif at_start_deg is not None:
        lat_deg, polar_deg = _vertex(triangle, at_start_deg)
    lon_deg = None
    if polar_deg is not None:
        lon_deg = wrap_180(triangle.start.lon_deg + (-polar_deg if triangle.is_west else polar_deg))
    steps = (
        Step("lat v", "cos lat v = cos lat 1 × sin A", lat_deg, StepKind.LATITUDE),
        Step("P", "tan P = cot A ÷ sin lat 1, onward from place 1", polar_deg, StepKind.ANGLE),
        Step("long v", "long 1 + P onward", lon_deg, StepKind.LONGITUDE),
    )
    return steps, remarks


def _higher_deg(triangle: _Triangle) -> float:
    """Return the latitude farther from the equator, the north one of two as far."""
    return max(triangle.start.lat_deg, triangle.end.lat_deg, key=lambda lat_deg: (abs(lat_deg), lat_deg))


def _vertex(triangle: _Triangle, at_start_deg: float) -> _Pair:
    """Return the vertex's latitude and its angle at the pole from place 1, positive onward, in degrees."""
    sin_a, cos_a = sine_cosine(at_start_deg)
    sin1, cos1 = sine_cosine(triangle.start.lat_deg)
    lat_deg = _arc_cosine_deg(cos1 * sin_a)
    north_deg = math.degrees(math.atan2(cos_a, sin1 * sin_a))
    south_deg = north_deg - 180.0 if north_deg > 0.0 else north_deg + 180.0
    on_leg_north = 0.0 <= north_deg <= triangle.d_long_deg
    on_leg_south = 0.0 <= south_deg <= triangle.d_long_deg
    if on_leg_north or (not on_leg_south and _higher_deg(triangle) >= 0.0):
        return lat_deg, north_deg
    return -lat_deg, south_deg


def _finish(
    method: str, triangle: _Triangle, distance_steps: tuple[Step, ...], course_steps: tuple[Step, ...]
) -> Working:
    """Add the vertex, found in the same way whichever formula gave the courses."""
    vertex_steps, remarks = _vertex_steps(triangle, course_steps[0].value)
    if course_steps[1].value is None:
        half_round = (distance_steps[-1].value or 0.0) > 5400.0
        vertex_steps = tuple(replace(step, value=None) for step in vertex_steps)
        remarks = (OPPOSITE if half_round else NOWHERE,)
    steps = (*distance_steps, *course_steps, *vertex_steps)
    return Working(method, BASIS, given_positions(triangle.start, triangle.end), steps, RESULTS, remarks)
