"""Points of a leg's lines: at a distance along, on meridians and parallels, and how far a position lies beside them."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, NamedTuple

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.errors import NoAnswerError
from navcore.prints.tracks import position_json
from navcore.text.direction import format_direction
from navcore.text.distance import format_distance
from navcore.text.position import format_latitude, format_longitude, format_position

if TYPE_CHECKING:
    from collections.abc import Iterator, Mapping

    from navcore.position import Position
    from navcore.prints.tracks import Json
    from navcore.sailings.track import OffTrack, PointOnTrack, Track

_SIDES = {1: "to starboard", -1: "to port"}
_ON_IT_M = 0.05 * METRES_PER_NAUTICAL_MILE


_ALONG = "the line runs along it"
_NOT_CROSSED = "the line does not cross it"


class Answer(NamedTuple):
    """What was asked of a line, and the points that answer it.

    Attributes:
        question: In words.
        points: In order; none where there is none.
        why_none: Then the reason.
    """

    question: str
    points: tuple[PointOnTrack, ...]
    why_none: str = ""


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

    def answers_of(self, track: Track) -> Iterator[Answer]:
        """Yield the answer to each question in turn.

        Raises:
            NoAnswerError: There would be too many points.
        """
        for distance_m in self.distances_m:
            question = f"{format_distance(distance_m / METRES_PER_NAUTICAL_MILE)} along"
            try:
                yield Answer(question, (track.at(distance_m),))
            except NoAnswerError as error:
                yield Answer(question, (), str(error))
        for lon_deg in self.meridians_deg:
            points = track.crossings_of_meridian(lon_deg)
            along = track.runs_along_meridian(lon_deg)
            yield Answer(f"meridian {format_longitude(lon_deg)}", points, _ALONG if along else _NOT_CROSSED)
        for lat_deg in self.parallels_deg:
            points = track.crossings_of_parallel(lat_deg)
            along = track.runs_along_parallel(lat_deg)
            yield Answer(f"parallel {format_latitude(lat_deg)}", points, _ALONG if along else _NOT_CROSSED)
        if self.every_deg is not None:
            yield Answer(
                f"every {self.every_deg:g}° of longitude", track.at_meridians(self.every_deg), "none is crossed"
            )


def track_points_text(tracks: Mapping[str, Track], asked: PointsAsked) -> Iterator[str]:
    """Yield the answers line by line, track by track."""
    for name, track in tracks.items():
        yield name
        for answer in asked.answers_of(track):
            yield f"  {answer.question}" + ("" if answer.points else f": {answer.why_none}")
            for point in answer.points:
                course, distance = format_direction(point.course_deg), _nmi(point.distance_m)
                yield f"    {format_position(point.position)}  {course}  after {distance}"
        for position in asked.beside:
            yield f"  {format_position(position)}: {_off_words(track.offset_of(position))}"


def track_points_json(tracks: Mapping[str, Track], asked: PointsAsked) -> list[Json]:
    """Return the answers in full precision, a record for each track."""
    return [_track_json(name, track, asked) for name, track in tracks.items()]


def _track_json(name: str, track: Track, asked: PointsAsked) -> dict[str, Json]:
    answers = list(asked.answers_of(track))
    return {
        "line": name,
        "points": [_point_json(answer.question, point) for answer in answers for point in answer.points],
        "none": [{"asked": answer.question, "why": answer.why_none} for answer in answers if not answer.points],
        "beside": [_off_json(position, track.offset_of(position)) for position in asked.beside],
    }


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
    side = _SIDES.get(off.side, "on it" if off.distance_m < _ON_IT_M else "straight ahead or astern of an end")
    return f"{_nmi(off.distance_m)} off, {side}, {_nmi(off.along_m)} along"


def _nmi(distance_m: float) -> str:
    return format_distance(distance_m / METRES_PER_NAUTICAL_MILE)
