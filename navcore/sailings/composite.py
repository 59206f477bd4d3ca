"""Composite sailing: a great circle up to a limiting latitude, along its parallel, and a great circle down again.

Both great circles have their vertex on the limit and so touch it: by Clairaut's relation the sine of their course at
the equator is the cosine of the limit's reduced latitude. That makes the track the shortest that keeps within the
limit. The parallel has its true radius. On the sphere these are the formulas of the books: cos d.long = tan lat cot
limit, cos distance = sin lat / sin limit.

Source: Bowditch, The American Practical Navigator (2002) art. 2411; carried to the ellipsoid by Clairaut's relation.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import TYPE_CHECKING

from navcore.angles import difference_of_longitude, wrap_180, wrap_360
from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.earth.latitudes import parallel_radius_m
from navcore.errors import NoAnswerError
from navcore.lines import great_circle
from navcore.lines.great_circle_path import arc_at_latitude_rad, path_with_vertex
from navcore.position import Position
from navcore.sailings.differences import check_position
from navcore.text.position import format_latitude

if TYPE_CHECKING:
    from navcore.earth.figure import Figure


@dataclass(frozen=True, slots=True)
class Composite:
    """A composite track, or the great circle that keeps within the limit of itself.

    Attributes:
        start: Where it starts.
        end: Where it ends.
        limit_deg: The limiting latitude, north positive.
        figure: The figure of the Earth.
        tangent_points: Where the limit is reached and where it is left; none where the great circle keeps within it.
        arcs_m: Great circle, parallel, great circle; one where the great circle keeps within the limit.
        initial_course_deg: Where it starts, [0, 360); 0 where it has no length.
        final_course_deg: Where it ends.
        great_circle_m: Length of the great circle between the ends.
        highest_lat_deg: The latitude on it that is nearest to the limit.
    """

    start: Position
    end: Position
    limit_deg: float
    figure: Figure
    tangent_points: tuple[Position, ...]
    arcs_m: tuple[float, ...]
    initial_course_deg: float
    final_course_deg: float
    great_circle_m: float
    highest_lat_deg: float

    @property
    def distance_m(self) -> float:
        """Its length."""
        return math.fsum(self.arcs_m)

    @property
    def extra_m(self) -> float:
        """How much longer than the great circle it is."""
        return self.distance_m - self.great_circle_m

    @property
    def is_great_circle(self) -> bool:
        """Whether the great circle keeps within the limit of itself."""
        return not self.tangent_points

    @property
    def note(self) -> str | None:
        """What must be said of it; None where it is composite indeed."""
        if not self.is_great_circle:
            return None
        limit, highest = format_latitude(self.limit_deg), format_latitude(self.highest_lat_deg)
        return f"the great circle keeps within {limit} of itself (its highest latitude is {highest}) and is taken whole"


def composite(start: Position, end: Position, limit_deg: float, figure: Figure) -> Composite:
    """Return the shortest track between two places that keeps within a limiting latitude.

    Raises:
        NoAnswerError: An end is beyond the limit; the limit is on the other side of the equator from both ends, or the
            equator itself.
        RangeError: A latitude or longitude that is none.

    Accuracy:
        1 µm in distance on every named figure, held by tests/sailings/test_composite.py.
    """
    check_position(start)
    check_position(end)
    check_position(Position(limit_deg, 0.0))
    _refuse(start, end, limit_deg)
    circle = great_circle.inverse(*start, *end, figure)
    highest_deg = _highest_deg(start, end, limit_deg, figure)
    if math.copysign(1.0, limit_deg) * highest_deg <= abs(limit_deg):
        courses = float(circle.initial_course_deg), float(circle.final_course_deg)
        length_m = float(circle.distance_m)
        return Composite(start, end, limit_deg, figure, (), (length_m,), *courses, length_m, highest_deg)
    return _with_tangents(start, end, limit_deg, figure, float(circle.distance_m))


def _refuse(start: Position, end: Position, limit_deg: float) -> None:
    limit = format_latitude(limit_deg)
    if limit_deg == 0.0:
        raise NoAnswerError("the equator is no limiting latitude; give one north or south of it, such as 50°N")
    side = math.copysign(1.0, limit_deg)
    farthest_deg = max(start.lat_deg * side, end.lat_deg * side)
    if farthest_deg > abs(limit_deg):
        least = format_latitude(side * farthest_deg)
        raise NoAnswerError(
            f"the limit {limit} is equatorward of an end of the leg, which lies in {least}: no track keeps within it; "
            f"give a limit of {least} or nearer the pole, or break the leg at a waypoint on the limit"
        )
    if farthest_deg < 0.0:
        mirrored = format_latitude(-limit_deg)
        raise NoAnswerError(
            f"the limit {limit} is on the other side of the equator from the whole leg and limits nothing; "
            f"did you mean {mirrored}? Else sail the great circle"
        )


def _highest_deg(start: Position, end: Position, limit_deg: float, figure: Figure) -> float:
    """Return the latitude on the great circle that lies farthest to the limit's side."""
    ends = start.lat_deg, end.lat_deg
    farthest_deg = max(ends) if limit_deg > 0.0 else min(ends)
    vertex = great_circle.vertex(*start, *end, figure)
    if bool(vertex.on_leg) and float(vertex.lat_deg) * limit_deg > 0.0:
        return float(vertex.lat_deg)
    return farthest_deg


def _with_tangents(
    start: Position, end: Position, limit_deg: float, figure: Figure, great_circle_m: float
) -> Composite:
    d_long_deg = difference_of_longitude(start.lon_deg, end.lon_deg)
    east = math.copysign(1.0, d_long_deg)
    up, down = _to_limit(start.lat_deg, limit_deg, figure), _to_limit(end.lat_deg, limit_deg, figure)
    along_deg = abs(d_long_deg) - up.d_long_deg - down.d_long_deg
    if along_deg < 0.0:
        raise NoAnswerError(
            f"no two great circles from the ends touch {format_latitude(limit_deg)} one after the other, so near to "
            "opposite are the ends; break the leg at a waypoint on the limit"
        )
    tangent_points = (
        Position(limit_deg, wrap_180(start.lon_deg + east * up.d_long_deg)),
        Position(limit_deg, wrap_180(end.lon_deg - east * down.d_long_deg)),
    )
    along_m = math.radians(along_deg) * float(parallel_radius_m(limit_deg, figure))
    north_deg = up.course_deg if limit_deg > 0.0 else 180.0 - up.course_deg
    from_north_deg = 180.0 - down.course_deg if limit_deg > 0.0 else down.course_deg
    return Composite(
        start=start,
        end=end,
        limit_deg=limit_deg,
        figure=figure,
        tangent_points=tangent_points,
        arcs_m=(up.distance_m, along_m, down.distance_m),
        initial_course_deg=wrap_360(east * north_deg),
        final_course_deg=wrap_360(east * from_north_deg),
        great_circle_m=great_circle_m,
        highest_lat_deg=limit_deg,
    )


@dataclass(frozen=True, slots=True)
class _Rise:
    """From a latitude to the tangent point, worked eastward in north latitude."""

    d_long_deg: float
    distance_m: float
    course_deg: float


def _to_limit(lat_deg: float, limit_deg: float, figure: Figure) -> _Rise:
    path = path_with_vertex(abs(limit_deg), figure)
    arc_rad = arc_at_latitude_rad(path, lat_deg * math.copysign(1.0, limit_deg))
    vertex_rad = 0.5 * math.pi
    return _Rise(
        d_long_deg=math.degrees(float(path.longitude_rad(vertex_rad) - path.longitude_rad(arc_rad))),
        distance_m=float(path.distance_m(vertex_rad) - path.distance_m(arc_rad)),
        course_deg=float(path.course_deg(arc_rad)),
    )


@dataclass(frozen=True, slots=True)
class LimitRow:
    """One limit of several, side by side.

    Attributes:
        limit_deg: The limiting latitude, north positive.
        track: The composite; None where it is refused.
        refusal: Why; None where it is not.
    """

    limit_deg: float
    track: Composite | None
    refusal: str | None

    def extra_hours(self, speed_kn: float) -> float | None:
        """Return how much longer than the great circle it takes at a speed; None where it is refused."""
        return None if self.track is None else self.track.extra_m / METRES_PER_NAUTICAL_MILE / speed_kn


def limits_table(start: Position, end: Position, limits_deg: tuple[float, ...], figure: Figure) -> tuple[LimitRow, ...]:
    """Return a composite for each of several limits, in the order given."""
    return tuple(_limit_row(start, end, limit_deg, figure) for limit_deg in limits_deg)


def _limit_row(start: Position, end: Position, limit_deg: float, figure: Figure) -> LimitRow:
    try:
        return LimitRow(limit_deg, composite(start, end, limit_deg, figure), None)
    except NoAnswerError as error:
        return LimitRow(limit_deg, None, str(error))
