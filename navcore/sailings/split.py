"""A great circle or composite split into rhumb-line parts that can be steered. Every joint lies on the true line."""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import TYPE_CHECKING, NamedTuple

import numpy as np

from navcore.angles import difference_of_longitude, wrap_180
from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.errors import NoAnswerError
from navcore.lines import great_circle, rhumb_line
from navcore.lines.great_circle_path import path_leaving
from navcore.position import Position
from navcore.sailings.fewest import MOST_PARTS, fewest_joints_rad
from navcore.sailings.parts import Parts, PartsRule
from navcore.sailings.separation import separations_m

if TYPE_CHECKING:
    from navcore.earth.figure import Figure
    from navcore.lines.great_circle_path import GreatCirclePath
    from navcore.sailings.composite import Composite
    from navcore.trigonometry import FloatArray

_AT_JOINT_M = 0.001
"""A joint as near to another as this is the same."""
_AT_POLE_RAD = 1e-10


@dataclass(frozen=True, slots=True)
class SteeringParts:
    """A line split into rhumb-line parts.

    Attributes:
        rule: How it was split.
        points: Where the parts begin and end, both ends of the leg included.
        courses_deg: Of each part, [0, 360).
        distances_m: Of each part.
        line_m: Length of the line that they replace.
        greatest_separation_m: The farthest that any part lies from it.
    """

    rule: Parts
    points: tuple[Position, ...]
    courses_deg: tuple[float, ...]
    distances_m: tuple[float, ...]
    line_m: float
    greatest_separation_m: float

    @property
    def distance_m(self) -> float:
        """Length of what is steered."""
        return math.fsum(self.distances_m)

    @property
    def added_m(self) -> float:
        """How much longer than the line that is."""
        return self.distance_m - self.line_m


class _Arc(NamedTuple):
    """One arc of the line: a stretch of great circle, or of a parallel where it has no path."""

    start: Position
    end: Position
    length_m: float
    path: GreatCirclePath | None
    start_rad: float
    end_rad: float
    figure: Figure

    def rad_at(self, distance_m: FloatArray) -> FloatArray:
        """Return the arcs at distances from the start."""
        if self.path is None:
            return distance_m
        return self.path.arc_at_rad(self.path.distance_m(self.start_rad) + distance_m)

    def positions_at(self, along_m: list[float]) -> list[Position]:
        """Return the points at distances from the start."""
        distance_m = np.array(along_m, dtype=np.float64)
        if self.path is None:
            d_long_deg = difference_of_longitude(self.start.lon_deg, self.end.lon_deg)
            lat_deg = np.full_like(distance_m, self.start.lat_deg)
            lon_deg = self.start.lon_deg + distance_m / self.length_m * d_long_deg
        else:
            here_rad = self.rad_at(distance_m)
            lat_deg = self.path.latitude_deg(here_rad)
            if self.path.sin_node == 0.0:
                own_deg = self.end.lon_deg if abs(self.start.lat_deg) == 90.0 else self.start.lon_deg
                lon_deg = np.full_like(lat_deg, own_deg)
            else:
                made_rad = self.path.longitude_rad(here_rad) - self.path.longitude_rad(self.start_rad)
                lon_deg = self.start.lon_deg + np.degrees(made_rad)
        return [Position(*place) for place in zip(lat_deg.tolist(), wrap_180(lon_deg).tolist(), strict=True)]


def split_great_circle(start: Position, end: Position, figure: Figure, rule: Parts) -> SteeringParts:
    """Split the great circle between two places; one over a pole has a joint there whatever the rule.

    Raises:
        NoAnswerError: The rule asks for more than MOST_PARTS parts, or for fewer than the line has arcs; or the leg has
            no length.
    """
    if start == end:
        raise NoAnswerError("the leg has no length, so that there is nothing to split")
    return _split(_great_circle_arcs(start, end, figure), rule)


def split_composite(track: Composite, rule: Parts) -> SteeringParts:
    """Split a composite; its tangent points are joints whatever the rule.

    Raises:
        NoAnswerError: As for a great circle.
    """
    if track.is_great_circle:
        return split_great_circle(track.start, track.end, track.figure, rule)
    reached, left = track.tangent_points
    along = _Arc(reached, left, track.arcs_m[1], None, 0.0, track.arcs_m[1], track.figure)
    arcs = [
        *_great_circle_arcs(track.start, reached, track.figure),
        along,
        *_great_circle_arcs(left, track.end, track.figure),
    ]
    return _split([arc for arc in arcs if arc.length_m > _AT_JOINT_M] or arcs[:1], rule)


def _great_circle_arcs(start: Position, end: Position, figure: Figure) -> list[_Arc]:
    whole = great_circle.inverse(*start, *end, figure)
    length_m, course_deg = float(whole.distance_m), float(whole.initial_course_deg)
    path, start_rad = path_leaving(start.lat_deg, course_deg, figure)
    end_rad = float(path.arc_at_rad(path.distance_m(start_rad) + length_m))
    arc = _Arc(start, end, length_m, path, start_rad, end_rad, figure)
    poles_rad = (turns * math.pi for turns in (-0.5, 0.5, 1.5))
    over_pole = path.sin_node == 0.0 and any(
        start_rad + _AT_POLE_RAD < pole < end_rad - _AT_POLE_RAD for pole in poles_rad
    )
    return _over_pole(arc) if over_pole else [arc]


def _over_pole(arc: _Arc) -> list[_Arc]:
    """Return the two meridians of a great circle over a pole."""
    sum_deg = arc.start.lat_deg + arc.end.lat_deg
    pole = Position(90.0 if sum_deg >= 0.0 else -90.0, arc.start.lon_deg)
    return [
        *_great_circle_arcs(arc.start, pole, arc.figure),
        *_great_circle_arcs(pole._replace(lon_deg=arc.end.lon_deg), arc.end, arc.figure),
    ]


def _split(arcs: list[_Arc], rule: Parts) -> SteeringParts:
    joints_m = _JOINTS[rule.rule](arcs, rule.amount)
    if sum(len(along) + 1 for along in joints_m) > MOST_PARTS:
        raise NoAnswerError(f"the leg would be more than {MOST_PARTS} parts; split it less finely")
    points = [arcs[0].start]
    for arc, along in zip(arcs, joints_m, strict=True):
        points += [*arc.positions_at(along), arc.end]
    lats_deg, lons_deg = np.array(points).T
    rhumbs = rhumb_line.inverse(lats_deg[:-1], lons_deg[:-1], lats_deg[1:], lons_deg[1:], arcs[0].figure)
    separation_m = max(_separation_m(arc, along) for arc, along in zip(arcs, joints_m, strict=True))
    return SteeringParts(
        rule=rule,
        points=tuple(points),
        courses_deg=tuple(rhumbs.course_deg.tolist()),
        distances_m=tuple(rhumbs.distance_m.tolist()),
        line_m=math.fsum(arc.length_m for arc in arcs),
        greatest_separation_m=separation_m,
    )


def _separation_m(arc: _Arc, along_m: list[float]) -> float:
    if arc.path is None or arc.path.sin_node == 0.0 or arc.path.cos_node == 0.0:
        return 0.0
    inner = arc.rad_at(np.array(along_m))
    return float(separations_m(arc.path, np.concatenate(([arc.start_rad], inner, [arc.end_rad]))).max())


def _by_longitude(arcs: list[_Arc], amount_deg: float) -> list[list[float]]:
    return [_meridians_m(arc, amount_deg) for arc in arcs]


def _meridians_m(arc: _Arc, amount_deg: float) -> list[float]:
    """Return how far along an arc it crosses the whole multiples of an amount of longitude."""
    d_long_deg = difference_of_longitude(arc.start.lon_deg, arc.end.lon_deg)
    if arc.path is not None and (arc.path.sin_node == 0.0 or abs(arc.start.lat_deg) == 90.0):
        return []
    low_deg, high_deg = sorted((arc.start.lon_deg, arc.start.lon_deg + d_long_deg))
    if high_deg - low_deg > MOST_PARTS * amount_deg:
        raise NoAnswerError(f"the leg would be more than {MOST_PARTS} parts; split it less finely")
    first, last = math.ceil(low_deg / amount_deg), math.floor(high_deg / amount_deg)
    meridians_deg = np.arange(first, last + 1) * amount_deg
    if arc.path is None:
        along_m = (meridians_deg - arc.start.lon_deg) / d_long_deg * arc.length_m
    else:
        along_m = great_circle.crossing_of_meridian(*arc.start, *arc.end, meridians_deg, arc.figure).distance_m
    return _inside(arc, sorted(along_m[np.isfinite(along_m)].tolist()))


def _by_distance(arcs: list[_Arc], amount_nmi: float) -> list[list[float]]:
    step_m = amount_nmi * METRES_PER_NAUTICAL_MILE
    if sum(arc.length_m for arc in arcs) > MOST_PARTS * step_m:
        raise NoAnswerError(f"the leg would be more than {MOST_PARTS} parts; split it less finely")
    joints, begun_m = [], 0.0
    for arc in arcs:
        ended_m = begun_m + arc.length_m
        numbers = range(math.floor(begun_m / step_m), math.floor(ended_m / step_m) + 1)
        joints.append(_inside(arc, [number * step_m - begun_m for number in numbers]))
        begun_m = ended_m
    return joints


def _by_number(arcs: list[_Arc], amount: float) -> list[list[float]]:
    """Share the parts out so that the longest is as short as can be; those of one arc are equal."""
    if amount < len(arcs):
        raise NoAnswerError(
            f"the line is {len(arcs)} arcs, and where they meet is a joint; ask for {len(arcs)} parts or more"
        )
    counts = [1] * len(arcs)
    for _ in range(int(amount) - len(arcs)):
        longest = max(range(len(arcs)), key=lambda index: arcs[index].length_m / counts[index])
        counts[longest] += 1
    return [[arc.length_m * part / count for part in range(1, count)] for arc, count in zip(arcs, counts, strict=True)]


def _by_separation(arcs: list[_Arc], amount_nmi: float) -> list[list[float]]:
    limit_m = amount_nmi * METRES_PER_NAUTICAL_MILE
    joints: list[list[float]] = []
    for arc in arcs:
        if arc.path is None:
            joints.append([])
            continue
        inner = fewest_joints_rad(arc.path, arc.start_rad, arc.end_rad, limit_m)[1:-1]
        joints.append((arc.path.distance_m(inner) - arc.path.distance_m(arc.start_rad)).tolist())
    return joints


def _inside(arc: _Arc, along_m: list[float]) -> list[float]:
    return [distance_m for distance_m in along_m if _AT_JOINT_M < distance_m < arc.length_m - _AT_JOINT_M]


_JOINTS = {
    PartsRule.LONGITUDE: _by_longitude,
    PartsRule.DISTANCE: _by_distance,
    PartsRule.NUMBER: _by_number,
    PartsRule.SEPARATION: _by_separation,
}
