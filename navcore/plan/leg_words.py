"""What must be said of a leg in words: how it is steered, its composite, and where it crosses 180° and the equator."""

from __future__ import annotations

from typing import TYPE_CHECKING

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.plan.model import Line
from navcore.sailings.parts import format_parts
from navcore.sailings.track import Piece, Track
from navcore.text.direction import format_direction
from navcore.text.distance import format_distance
from navcore.text.position import format_latitude, format_longitude, format_position

if TYPE_CHECKING:
    from navcore.plan.solve import SailedLeg, Solution

SPLIT_FIRST = "not to be steered whole: split first"
"""Said of a great circle or composite that is not in parts: its course changes all the way."""


def track_of(solution: Solution, index: int) -> Track | None:
    """Return what is sailed of a leg, as one line; None where it is refused."""
    leg, plan = solution.legs[index], solution.plan
    start, end = plan.waypoints[index].position, plan.waypoints[index + 1].position
    if leg.distance_m is None:
        return None
    if leg.parts is not None:
        pieces = zip(leg.parts.points, leg.parts.points[1:], strict=False)
        return Track(tuple(Piece(one, other, is_great_circle=False) for one, other in pieces), plan.figure)
    if leg.composite is not None and not leg.composite.is_great_circle:
        points = (start, *leg.composite.tangent_points, end)
        kinds = (True, False, True)
        pieces_of_composite = zip(points, points[1:], kinds, strict=False)
        return Track(tuple(Piece(*piece) for piece in pieces_of_composite), plan.figure)
    return Track((Piece(start, end, is_great_circle=leg.line is not Line.RHUMB),), plan.figure)


def steering_words(leg: SailedLeg) -> str:
    """Return whether a leg is in parts, and what those change."""
    if leg.line is Line.RHUMB or leg.course_deg is None:
        return ""
    if leg.parts is None:
        return "" if is_one_course(leg) else SPLIT_FIRST
    apart = format_distance(leg.parts.greatest_separation_m / METRES_PER_NAUTICAL_MILE, 2)
    count = len(leg.parts.distances_m)
    number = "1 part" if count == 1 else f"{count} parts"
    rule = format_parts(leg.parts.rule)
    return f"in {number} ({rule}): {_nmi(leg.parts.added_m)} added, at most {apart} from the true line"


def is_one_course(leg: SailedLeg) -> bool:
    """Say whether a great circle keeps one course as printed: along a meridian or the equator, or over a short way."""
    worked = leg.worked
    courses = (worked.rhumb_course_deg, worked.initial_course_deg, worked.final_course_deg)
    return leg.line is Line.GREAT_CIRCLE and len({format_direction(course) for course in courses}) == 1


def composite_words(leg: SailedLeg) -> str:
    """Return a composite's limit, tangent points and arcs."""
    track = leg.composite
    if track is None:
        return ""
    if track.note is not None:
        return track.note
    points = " and ".join(format_position(point) for point in track.tangent_points)
    arcs = " + ".join(_nmi(arc_m) for arc_m in track.arcs_m)
    limit = format_latitude(track.limit_deg)
    return f"limit {limit}, tangent points {points}; arcs {arcs}, {_nmi(track.extra_m)} over the great circle"


def crossing_words(solution: Solution, index: int) -> str:
    """Return where a leg crosses the equator and the 180th meridian, and how far along."""
    one, other = (solution.plan.waypoints[end].position for end in (index, index + 1))
    over_equator = one.lat_deg * other.lat_deg < 0.0
    over_180 = abs(one.lon_deg - other.lon_deg) > 180.0 and not {abs(one.lon_deg), abs(other.lon_deg)} & {180.0}
    track = track_of(solution, index) if over_equator or over_180 else None
    if track is None:
        return ""
    said: list[tuple[float, str]] = []
    if over_equator:
        said += [
            (point.distance_m, f"the equator in {format_longitude(point.position.lon_deg)}")
            for point in track.crossings_of_parallel(0.0)
        ]
    if over_180:
        said += [
            (point.distance_m, f"180° in {format_latitude(point.position.lat_deg)}")
            for point in track.crossings_of_meridian(180.0)
        ]
    return "; ".join(f"crosses {where} after {_nmi(distance_m)}" for distance_m, where in sorted(said))


def _nmi(distance_m: float) -> str:
    return format_distance(distance_m / METRES_PER_NAUTICAL_MILE)
