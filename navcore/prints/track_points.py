"""Points of a leg's lines: at a distance along, on meridians and parallels, and how far a position lies beside them."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.prints.tracks import position_json
from navcore.text.direction import format_direction
from navcore.text.distance import format_distance
from navcore.text.position import format_latitude, format_longitude, format_position

if TYPE_CHECKING:
    from collections.abc import Iterator, Mapping

    from navcore.position import Position
    from navcore.prints.tracks import Json
    from navcore.sailings.track import OffTrack, PointOnTrack, Track

_SIDES = {1: "to starboard", -1: "to port", 0: "on it, or straight ahead or astern of an end"}


@dataclass(frozen=True, slots=True)
class PointsAsked:
    """What is asked of a leg's lines.

    Attributes:
        distances_m: Points at these distances from the start.
        meridians_deg: Crossings of these.
        parallels_deg: Crossings of these.
        every_deg: Latitudes at whole multiples of this, ready to lay off on a chart; None where not asked.
        beside: How far off these positions lie.
    """

    distances_m: tuple[float, ...] = ()
    meridians_deg: tuple[float, ...] = ()
    parallels_deg: tuple[float, ...] = ()
    every_deg: float | None = None
    beside: tuple[Position, ...] = ()

    @property
    def is_anything(self) -> bool:
        """Whether anything is asked."""
        return self != PointsAsked()

    def points_of(self, track: Track) -> Iterator[tuple[str, tuple[PointOnTrack, ...]]]:
        """Yield what each question is and the points that answer it.

        Raises:
            RangeError: A distance is outside the track.
        """
        for distance_m in self.distances_m:
            yield f"{format_distance(distance_m / METRES_PER_NAUTICAL_MILE)} along", (track.at(distance_m),)
        for lon_deg in self.meridians_deg:
            yield f"meridian {format_longitude(lon_deg)}", track.crossings_of_meridian(lon_deg)
        for lat_deg in self.parallels_deg:
            yield f"parallel {format_latitude(lat_deg)}", track.crossings_of_parallel(lat_deg)
        if self.every_deg is not None:
            yield f"every {self.every_deg:g}° of longitude", track.at_meridians(self.every_deg)


def track_points_text(tracks: Mapping[str, Track], asked: PointsAsked) -> Iterator[str]:
    """Yield the answers line by line, track by track."""
    for name, track in tracks.items():
        yield name
        for question, points in asked.points_of(track):
            yield f"  {question}" + ("" if points else ": not on the leg")
            for point in points:
                course, distance = format_direction(point.course_deg), _nmi(point.distance_m)
                yield f"    {format_position(point.position)}  {course}  after {distance}"
        for position in asked.beside:
            yield f"  {format_position(position)}: {_off_words(track.offset_of(position))}"


def track_points_json(tracks: Mapping[str, Track], asked: PointsAsked) -> list[Json]:
    """Return the answers in full precision, a record for each track."""
    return [
        {
            "line": name,
            "points": [_point_json(question, point) for question, points in asked.points_of(track) for point in points],
            "beside": [_off_json(position, track.offset_of(position)) for position in asked.beside],
        }
        for name, track in tracks.items()
    ]


def _point_json(question: str, point: PointOnTrack) -> dict[str, Json]:
    return {
        "asked": question,
        **position_json(point.position),
        "distance_nmi": point.distance_m / METRES_PER_NAUTICAL_MILE,
        "course_deg": point.course_deg,
    }


def _off_json(position: Position, off: OffTrack) -> dict[str, Json]:
    return {
        **position_json(position),
        "cross_track_nmi": off.distance_m / METRES_PER_NAUTICAL_MILE,
        "along_track_nmi": off.along_m / METRES_PER_NAUTICAL_MILE,
        "side": {1: "starboard", -1: "port", 0: None}[off.side],
    }


def _off_words(off: OffTrack) -> str:
    return f"{_nmi(off.distance_m)} off, {_SIDES[off.side]}, {_nmi(off.along_m)} along"


def _nmi(distance_m: float) -> str:
    return format_distance(distance_m / METRES_PER_NAUTICAL_MILE)
