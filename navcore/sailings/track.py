"""What is sailed of a leg, end to end: points on it, where it crosses, and how far off it a position lies."""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import cached_property
from typing import TYPE_CHECKING, NamedTuple

import numpy as np

from navcore.angles import difference_of_longitude, wrap_180
from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.errors import NoAnswerError
from navcore.lines import great_circle, rhumb_line
from navcore.lines.offset import distance_from_great_circle, distance_from_rhumb_line
from navcore.position import Position
from navcore.text.distance import format_distance

if TYPE_CHECKING:
    from collections.abc import Iterator

    from navcore.earth.figure import Figure
    from navcore.lines.leg import Crossing

MOST_POINTS = 400

_AT_JOINT_M = 1e-3


class PointOnTrack(NamedTuple):
    """A point of a track.

    Attributes:
        position: Where it is.
        distance_m: From the start, along the track.
        course_deg: The course there, [0, 360).
    """

    position: Position
    distance_m: float
    course_deg: float


class OffTrack(NamedTuple):
    """Where a position lies beside a track.

    Attributes:
        distance_m: Shortest distance to the track; to the nearer end where the foot is off it.
        along_m: From the start to the nearest point, along the track.
        side: +1 to starboard (right), -1 to port (left), 0 on it or straight ahead or astern of an end.
    """

    distance_m: float
    along_m: float
    side: int


class Piece(NamedTuple):
    """One line of a track.

    Attributes:
        start: Where it starts.
        end: Where it ends.
        is_great_circle: Whether it is a great circle; else a rhumb line, as a parallel is.
    """

    start: Position
    end: Position
    is_great_circle: bool


@dataclass(frozen=True)
class Track:
    """Lines end to end.

    Attributes:
        pieces: At least one.
        figure: The figure of the Earth.
    """

    pieces: tuple[Piece, ...]
    figure: Figure

    @cached_property
    def begins_m(self) -> tuple[float, ...]:
        """How far from the start each piece begins, and the length of the whole."""
        begins = [0.0]
        for piece in self.pieces:
            line = great_circle if piece.is_great_circle else rhumb_line
            begins.append(begins[-1] + float(line.inverse(*piece.start, *piece.end, self.figure).distance_m))
        return tuple(begins)

    @property
    def length_m(self) -> float:
        """Length of the whole."""
        return self.begins_m[-1]

    def at(self, distance_m: float) -> PointOnTrack:
        """Return the point at a distance from the start.

        Raises:
            NoAnswerError: The track is shorter, or the distance is below 0.
        """
        if not 0.0 <= distance_m <= self.length_m:
            asked, length = (
                format_distance(metres / METRES_PER_NAUTICAL_MILE) for metres in (distance_m, self.length_m)
            )
            raise NoAnswerError(f"{asked} is not on the line, which is {length} long")
        index = max(0, int(np.searchsorted(self.begins_m, distance_m, side="left")) - 1)
        return self._at(index, distance_m - self.begins_m[index])

    def _at(self, index: int, along_m: float) -> PointOnTrack:
        piece, distance_m = self.pieces[index], self.begins_m[index] + along_m
        if piece.is_great_circle:
            point = great_circle.course_at(*piece.start, *piece.end, along_m, self.figure)
            return PointOnTrack(_position(point.lat_deg, point.lon_deg), distance_m, float(point.course_deg))
        lat_deg, lon_deg = rhumb_line.points_along(*piece.start, *piece.end, along_m, self.figure)
        course_deg = float(rhumb_line.inverse(*piece.start, *piece.end, self.figure).course_deg)
        return PointOnTrack(_position(lat_deg, lon_deg), distance_m, course_deg)

    def crossings_of_meridian(self, lon_deg: float) -> tuple[PointOnTrack, ...]:
        """Return where the track crosses a meridian, ends included, in order; none where it runs along it."""
        return self._crossings(
            (great_circle if piece.is_great_circle else rhumb_line).crossing_of_meridian(
                *piece.start, *piece.end, lon_deg, self.figure
            )
            for piece in self.pieces
        )

    def runs_along_meridian(self, lon_deg: float) -> bool:
        """Say whether a piece of the track lies on a meridian."""
        ends = [{wrap_180(place.lon_deg - lon_deg) for place in (piece.start, piece.end)} for piece in self._long]
        return {0.0} in ends

    def crossings_of_parallel(self, lat_deg: float) -> tuple[PointOnTrack, ...]:
        """Return where the track crosses or touches a parallel, ends included, in order; none where it runs along."""
        return self._crossings(
            great_circle.crossings_of_parallel(*piece.start, *piece.end, lat_deg, self.figure)
            if piece.is_great_circle
            else rhumb_line.crossing_of_parallel(*piece.start, *piece.end, lat_deg, self.figure)
            for piece in self.pieces
        )

    def runs_along_parallel(self, lat_deg: float) -> bool:
        """Say whether a piece of the track lies on a parallel; of great circles only one on the equator does."""
        rhumb_lines = (piece for piece in self._long if not piece.is_great_circle)
        if any(piece.start.lat_deg == piece.end.lat_deg == lat_deg for piece in rhumb_lines):
            return True
        circles = (piece for piece in self._long if piece.is_great_circle)
        on_equator = (piece for piece in circles if piece.start.lat_deg == piece.end.lat_deg == lat_deg == 0.0)
        return any(float(great_circle.inverse(*p.start, *p.end, self.figure)[1]) in {90.0, 270.0} for p in on_equator)

    @property
    def _long(self) -> Iterator[Piece]:
        return (piece for piece in self.pieces if piece.start != piece.end)

    def _crossings(self, found: Iterator[Crossing]) -> tuple[PointOnTrack, ...]:
        points: list[PointOnTrack] = []
        for index, crossing in enumerate(found):
            rows = np.stack([np.atleast_1d(column) for column in crossing], axis=-1)
            for lat_deg, lon_deg, along_m in rows[np.isfinite(rows[:, 0])].tolist():
                point = self._at(index, along_m)._replace(position=Position(lat_deg, lon_deg))
                # A joint is the end of one piece and the start of the next.
                if not points or point.distance_m - points[-1].distance_m > _AT_JOINT_M:
                    points.append(point)
        return tuple(points)

    def at_meridians(self, step_deg: float) -> tuple[PointOnTrack, ...]:
        """Return where the track crosses the whole multiples of an amount of longitude, ready to lay off on a chart.

        Raises:
            NoAnswerError: There would be more than MOST_POINTS.
        """
        points: list[PointOnTrack] = []
        for piece in self.pieces:
            d_long_deg = difference_of_longitude(piece.start.lon_deg, piece.end.lon_deg)
            low_deg, high_deg = sorted((piece.start.lon_deg, piece.start.lon_deg + d_long_deg))
            if high_deg - low_deg > MOST_POINTS * step_deg:
                raise NoAnswerError(f"the leg crosses more than {MOST_POINTS} of them; ask for meridians farther apart")
            for number in range(math.ceil(low_deg / step_deg), math.floor(high_deg / step_deg) + 1):
                points.extend(self.crossings_of_meridian(number * step_deg))
        points.sort(key=lambda point: point.distance_m)
        return tuple(
            point
            for index, point in enumerate(points)
            if not index or point.distance_m - points[index - 1].distance_m > _AT_JOINT_M
        )

    def offset_of(self, position: Position) -> OffTrack:
        """Return how far off the track a position lies, where along it, and on which side."""
        offs = []
        for piece, begin_m in zip(self.pieces, self.begins_m, strict=False):
            measure = distance_from_great_circle if piece.is_great_circle else distance_from_rhumb_line
            found = measure(*position, (*piece.start, *piece.end), self.figure)
            offs.append(OffTrack(float(found.distance_m), begin_m + float(found.along_m), int(found.side)))
        return min(offs, key=lambda off: off.distance_m)


def _position(lat_deg: object, lon_deg: object) -> Position:
    return Position(float(np.asarray(lat_deg)), float(np.asarray(lon_deg)))
