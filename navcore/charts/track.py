"""Lines of a passage laid off on a projection, as polylines that stay close to the true curve, and cut at a frame."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, NamedTuple

import numpy as np

from navcore.lines import great_circle, rhumb_line

if TYPE_CHECKING:
    from collections.abc import Callable, Sequence

    import numpy.typing as npt

    from navcore.earth.figure import Figure
    from navcore.position import Position
    from navcore.trigonometry import FloatArray

    BoolArray = npt.NDArray[np.bool_]
    IntArray = npt.NDArray[np.int64]
    Window = tuple[float, float, float, float]
    ToPlane = Callable[[FloatArray, FloatArray], FloatArray]

TOLERANCE_MM = 0.02
"""The farthest that a polyline on paper may be from its curve at the points looked at; tests/charts/test_track.py holds
0.05."""

_FIRST_PARTS = 16
_SHORTEST_PART = 1e-9
_LONG_CHORD = 50.0
_PROBES = np.array([0.25, 0.5, 0.75])


@dataclass(frozen=True, slots=True)
class Arc:
    """A line between two points.

    Attributes:
        start: Where it starts.
        end: Where it ends.
        great_circle: Whether it is a great circle; else a rhumb line.
    """

    start: Position
    end: Position
    great_circle: bool


@dataclass(frozen=True, slots=True)
class TrackLeg:
    """A leg of a passage.

    Attributes:
        arcs: What it consists of: one line, or the three of a composite track.
        words: What is written along it.
        marks: Where its parts meet.
    """

    arcs: tuple[Arc, ...]
    words: str = ""
    marks: tuple[Position, ...] = ()

    @property
    def great_circle(self) -> bool:
        """Whether any of it is a great circle."""
        return any(arc.great_circle for arc in self.arcs)


class _Ends(NamedTuple):
    """The ends of arcs, one row each, shape (n, 1)."""

    lat1_deg: FloatArray
    lon1_deg: FloatArray
    lat2_deg: FloatArray
    lon2_deg: FloatArray


def points_on(arcs: Sequence[Arc], fraction: FloatArray, figure: Figure) -> tuple[FloatArray, FloatArray]:
    """Return latitudes and longitudes, shape (arcs, fractions), at fractions, 0 to 1, of each arc's length.

    The ends are the very ends.
    """
    return _points(*_of_arcs(arcs), np.broadcast_to(fraction, (len(arcs), fraction.shape[-1])), figure)


def _of_arcs(arcs: Sequence[Arc]) -> tuple[_Ends, BoolArray]:
    ends = np.array([(*arc.start, *arc.end) for arc in arcs], dtype=np.float64).reshape(-1, 4)
    return _Ends(*(ends[:, [column]] for column in range(4))), np.array([arc.great_circle for arc in arcs], dtype=bool)


def _points(
    ends: _Ends, is_great_circle: BoolArray, fraction: FloatArray, figure: Figure
) -> tuple[FloatArray, FloatArray]:
    lat_deg, lon_deg = np.empty(fraction.shape), np.empty(fraction.shape)
    for lines, kind in ((great_circle, True), (rhumb_line, False)):
        rows = np.flatnonzero(is_great_circle == kind)
        own = _Ends(*(column[rows] for column in ends))
        length_m = lines.inverse(*own, figure).distance_m
        lat_deg[rows], lon_deg[rows] = lines.points_along(*own, fraction[rows] * length_m, figure)
    at_start, at_end = fraction == 0.0, fraction == 1.0
    lat_deg = np.where(at_start, ends.lat1_deg, np.where(at_end, ends.lat2_deg, lat_deg))
    return lat_deg, np.where(at_start, ends.lon1_deg, np.where(at_end, ends.lon2_deg, lon_deg))


class _Nodes(NamedTuple):
    """Nodes of polylines, one arc after the other; each but an arc's last has an interval that follows it.

    Attributes:
        arc: Whose node it is.
        fraction: Of the arc's length.
        place: On the plane, shape (n, 2); NaN where it can't be shown.
        width: Of the interval, as a fraction; 0 where none follows.
        seen: Points of the interval at _PROBES of it, shape (n, 3, 2).
        bend: How far the curve is from the interval's chord: 0 where there is nothing to see, infinite at an edge.
        low: Left and bottom of what the interval may touch, shape (n, 2).
        high: Right and top of it.
    """

    arc: IntArray
    fraction: FloatArray
    place: FloatArray
    width: FloatArray
    seen: FloatArray
    bend: FloatArray
    low: FloatArray
    high: FloatArray


class LaidArcs:
    """Arcs laid off on a plane: coarse at first, and finer wherever they have been looked at closely."""

    def __init__(self, arcs: Sequence[Arc], figure: Figure, to_plane: ToPlane) -> None:
        """Lay arcs off.

        Args:
            arcs: The lines; one of no length is a point, of which nothing is drawn.
            figure: The figure they run on.
            to_plane: From latitudes and longitudes to the plane, shape (..., 2); NaN where a point can't be shown.
        """
        self._ends, self._is_great_circle = _of_arcs(arcs)
        self._figure = figure
        self._to_plane = to_plane
        self._count = count = len(arcs)
        fraction = np.broadcast_to(np.linspace(0.0, 1.0, 4 * _FIRST_PARTS + 1), (count, 4 * _FIRST_PARTS + 1))
        place = self._at(np.arange(count), fraction)
        nodes = place[:, ::4].reshape(-1, 2)
        seen = np.full((count, _FIRST_PARTS + 1, 3, 2), np.nan)
        seen[:, :-1] = place[:, :-1].reshape(count, _FIRST_PARTS, 4, 2)[:, :, 1:]
        width = np.where(fraction[:, ::4] < 1.0, 1.0 / _FIRST_PARTS, 0.0)
        self._nodes = _measured(
            np.repeat(np.arange(count), _FIRST_PARTS + 1),
            fraction[:, ::4].ravel(),
            nodes,
            width.ravel(),
            seen.reshape(-1, 3, 2),
            np.concatenate((nodes[1:], nodes[-1:])),
        )

    def _at(self, arc: IntArray, fraction: FloatArray) -> FloatArray:
        ends = _Ends(*(column[arc] for column in self._ends))
        return self._to_plane(*_points(ends, self._is_great_circle[arc], fraction, self._figure))

    def look_at(self, window: Window, tolerance: float) -> None:
        """Lay off what may come into a window, within a tolerance of its curve; both in the unit of the plane."""
        while True:
            nodes = self._nodes
            left, bottom, right, top = window
            meets = np.all((nodes.low <= (right, top)) & (nodes.high >= (left, bottom)), axis=1)
            split = np.flatnonzero((nodes.bend > tolerance) & meets & (nodes.width > _SHORTEST_PART))
            if not split.size:
                return
            self._split(split)

    def _split(self, split: IntArray) -> None:
        """Make three nodes of what is seen inside each interval; each of the four new ones is looked at in its turn."""
        nodes = self._nodes
        quarter = 0.25 * nodes.width[split]
        inside = nodes.fraction[split, np.newaxis] + quarter[:, np.newaxis] * np.arange(4)
        probes = inside[:, :, np.newaxis] + quarter[:, np.newaxis, np.newaxis] * _PROBES
        seen = self._at(nodes.arc[split], probes.reshape(-1, 12)).reshape(-1, 3, 2)
        places = np.concatenate((nodes.place[split, np.newaxis], nodes.seen[split]), axis=1)
        following = np.concatenate((places[:, 1:], nodes.place[split + 1, np.newaxis]), axis=1)
        arc, width = np.repeat(nodes.arc[split], 4), np.repeat(quarter, 4)
        new = _measured(arc, inside.ravel(), places.reshape(-1, 2), width, seen, following.reshape(-1, 2))
        kept = np.ones(nodes.arc.size, dtype=bool)
        kept[split] = False
        order = np.argsort(np.concatenate((np.flatnonzero(kept), np.repeat(split, 4))), kind="stable")
        joined = (np.concatenate((old[kept], added))[order] for old, added in zip(nodes, new, strict=True))
        self._nodes = _Nodes(*joined)

    def joined(self, tolerance: float) -> tuple[FloatArray, IntArray]:
        """Return every polyline one after the other, shape (n, 2), with a NaN between, and whose each point is.

        Args:
            tolerance: As it was looked at; where the map is cut, and nowhere else, a chord is farther off than that.
        """
        nodes = self._nodes
        torn = (nodes.width == 0.0) | ((nodes.width <= _SHORTEST_PART) & (nodes.bend > tolerance))
        after = np.flatnonzero(torn) + 1
        return np.insert(nodes.place, after, np.nan, axis=0), np.insert(nodes.arc, after, nodes.arc[after - 1])

    def polylines(self, tolerance: float) -> list[list[FloatArray]]:
        """Return for each arc its polylines, each of shape (n, 2); of more than one where the map is cut or ends."""
        place, arc = self.joined(tolerance)
        found: list[list[FloatArray]] = [[] for _ in range(self._count)]
        finite = np.isfinite(place[:, 0])
        edges = np.flatnonzero(np.diff(finite.astype(np.int8))) + 1
        for first, run in zip((0, *edges.tolist()), np.split(place, edges), strict=True):
            if len(run) > 1 and finite[first] and np.any(run != run[0]):
                found[arc[first]].append(run)
        return found


def _measured(
    arc: IntArray, fraction: FloatArray, place: FloatArray, width: FloatArray, seen: FloatArray, following: FloatArray
) -> _Nodes:
    """Return nodes with what their intervals are like."""
    bend = np.where(width > 0.0, _bend(place, following, seen), 0.0)
    points = np.concatenate((place[:, np.newaxis], seen, following[:, np.newaxis]), axis=1)
    hidden = np.isnan(points)
    low = np.min(np.where(hidden, np.inf, points), axis=1)
    high = np.max(np.where(hidden, -np.inf, points), axis=1)
    # What lies between the points that were looked at may reach out of their box by about its own size.
    grown = np.where(low <= high, high - low, 0.0)
    return _Nodes(arc, fraction, place, width, seen, bend, low - grown, high + grown)


def _bend(start: FloatArray, end: FloatArray, seen: FloatArray) -> FloatArray:
    """Return how far chords are from what is seen between their ends; where only part can be shown, infinity."""
    chord = end - start
    length = np.hypot(chord[:, 0], chord[:, 1])
    off = seen - start[:, np.newaxis]
    safe = np.where(length > 0.0, length, 1.0)
    along = (off @ chord[:, :, np.newaxis])[:, :, 0] / safe[:, np.newaxis]
    nearest = np.clip(along, 0.0, length[:, np.newaxis])
    from_chord = off - nearest[:, :, np.newaxis] * (chord / safe[:, np.newaxis])[:, np.newaxis]
    farthest = np.max(np.hypot(from_chord[:, :, 0], from_chord[:, :, 1]), axis=1)
    # Where the map is cut, all that is seen lies at the two ends of a long chord: on it, but not along it.
    uneven = np.any(np.abs(along - _PROBES * length[:, np.newaxis]) > 0.25 * length[:, np.newaxis], axis=1)
    farthest = np.where(uneven, np.maximum(farthest, length / _LONG_CHORD), farthest)
    hidden = np.isnan(start[:, 0]) & np.isnan(end[:, 0]) & np.all(np.isnan(seen[:, :, 0]), axis=1)
    return np.where(hidden, 0.0, np.where(np.isnan(farthest), np.inf, farthest))


def clip(start: FloatArray, step: FloatArray, window: Window) -> tuple[FloatArray, FloatArray]:
    """Return the parts of segments, from 0 to 1, where each enters a window and leaves it; enter < leave where it does.

    A segment with an end that can't be shown does not come into it.

    Args:
        start: Where each starts, shape (n, 2).
        step: From there to its end.
        window: Left, bottom, right and top.

    Source: Y.-D. Liang and B. A. Barsky, A new concept and method for line clipping, ACM Trans. Graph. 3 (1984) 1-22.
    """
    left, bottom, right, top = window
    enter, leave = np.zeros(len(start)), np.ones(len(start))
    for axis, low, high in ((0, left, right), (1, bottom, top)):
        still = step[:, axis] == 0.0
        pace = np.where(still, 1.0, step[:, axis])
        to_low, to_high = (low - start[:, axis]) / pace, (high - start[:, axis]) / pace
        out = still & ((start[:, axis] < low) | (start[:, axis] > high))
        enter = np.where(out, 2.0, np.where(still, enter, np.maximum(enter, np.minimum(to_low, to_high))))
        leave = np.where(still, leave, np.minimum(leave, np.maximum(to_low, to_high)))
    return enter, leave


def cut_at(polyline: FloatArray, window: Window) -> list[FloatArray]:
    """Return what of a polyline, shape (n, 2), lies inside a window, as polylines that end on its edge."""
    start, step = polyline[:-1], np.diff(polyline, axis=0)
    enter, leave = clip(start, step, window)
    kept = np.flatnonzero(enter < leave)
    if kept.size == 0:
        return []
    first = start[kept] + enter[kept, np.newaxis] * step[kept]
    last = start[kept] + leave[kept, np.newaxis] * step[kept]
    # A segment goes on from the one before where neither is cut at their common point.
    goes_on = np.zeros(kept.size, dtype=bool)
    goes_on[1:] = (np.diff(kept) == 1) & (enter[kept[1:]] == 0.0) & (leave[kept[:-1]] == 1.0)
    return [
        np.vstack((first[run[0]], last[run])) for run in np.split(np.arange(kept.size), np.flatnonzero(~goes_on)[1:])
    ]
