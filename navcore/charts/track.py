"""Lines of a passage laid off on a projection, as polylines that stay close to the true curve, and cut at a frame."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

from navcore.lines import great_circle, rhumb_line

if TYPE_CHECKING:
    from collections.abc import Callable

    from navcore.earth.figure import Figure
    from navcore.position import Position
    from navcore.trigonometry import FloatArray

    Window = tuple[float, float, float, float]
    ToPaper = Callable[[FloatArray, FloatArray], FloatArray]

TOLERANCE_MM = 0.02
"""The farthest that a polyline may be from its curve at the points looked at; tests/charts/test_track.py holds 0.05."""

_FIRST_NODES = 17
_SHORTEST_PART = 1e-9
_LONG_CHORD_MM = 1.0


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


def points_on(arc: Arc, fraction: FloatArray, figure: Figure) -> tuple[FloatArray, FloatArray]:
    """Return the latitudes and longitudes at fractions, 0 to 1, of an arc's length; the ends are the very ends."""
    ends = (*arc.start, *arc.end)
    lines = great_circle if arc.great_circle else rhumb_line
    length_m = lines.inverse(*ends, figure).distance_m
    lat_deg, lon_deg = lines.points_along(*ends, fraction * length_m, figure)
    at_start, at_end = fraction == 0.0, fraction == 1.0
    lat_deg = np.where(at_start, arc.start.lat_deg, np.where(at_end, arc.end.lat_deg, lat_deg))
    return lat_deg, np.where(at_start, arc.start.lon_deg, np.where(at_end, arc.end.lon_deg, lon_deg))


def lay_off(arc: Arc, figure: Figure, to_mm: ToPaper, window_mm: Window) -> list[FloatArray]:
    """Return an arc on paper as polylines, broken where the map is cut or ends.

    Args:
        arc: The line.
        figure: The figure it runs on.
        to_mm: From latitudes and longitudes to paper, shape (n, 2); NaN where a point can't be shown.
        window_mm: Left, bottom, right, top of what will be looked at; outside it the line may be coarse.
    """

    def at(fraction: FloatArray) -> FloatArray:
        return to_mm(*points_on(arc, fraction, figure))

    node = np.linspace(0.0, 1.0, _FIRST_NODES)
    place = at(node)
    torn = np.zeros(node.size, dtype=bool)
    active = np.arange(node.size - 1)
    while active.size:
        width = node[active + 1] - node[active]
        probes = node[active, np.newaxis] + width[:, np.newaxis] * np.array([0.25, 0.5, 0.75])
        seen = at(probes.ravel()).reshape(-1, 3, 2)
        bent = _bent(place[active], place[active + 1], seen) & _in_sight(
            place[active], place[active + 1], seen, window_mm
        )
        finest = width < _SHORTEST_PART
        torn[active[bent & finest]] = True
        split = bent & ~finest
        where = np.repeat(active[split] + 1, 3)
        node = np.insert(node, where, probes[split].ravel())
        torn = np.insert(torn, where, values=False)
        place = np.insert(place, where, seen[split].reshape(-1, 2), axis=0)
        # Each interval that was split is now four, all still to be looked at.
        first = active[split] + 3 * np.arange(np.count_nonzero(split))
        active = (first[:, np.newaxis] + np.arange(4)).ravel()
    return _unbroken(place, torn)


def _bent(start_mm: FloatArray, end_mm: FloatArray, seen_mm: FloatArray) -> np.ndarray[tuple[int], np.dtype[np.bool_]]:
    """Return which chords are too far from what is seen between their ends; a point not shown counts as far."""
    chord = end_mm - start_mm
    length = np.hypot(chord[:, 0], chord[:, 1])
    off = seen_mm - start_mm[:, np.newaxis]
    safe = np.where(length > 0.0, length, 1.0)
    along = (off @ chord[:, :, np.newaxis])[:, :, 0] / safe[:, np.newaxis]
    nearest = np.clip(along, 0.0, length[:, np.newaxis])
    from_chord = off - nearest[:, :, np.newaxis] * (chord / safe[:, np.newaxis])[:, np.newaxis]
    far = np.hypot(from_chord[:, :, 0], from_chord[:, :, 1]) > TOLERANCE_MM
    # Where the map is cut, all that is seen lies at the two ends of a long chord: on it, but not along it.
    uneven = np.abs(along - np.array([0.25, 0.5, 0.75]) * length[:, np.newaxis]) > 0.25 * length[:, np.newaxis]
    far |= uneven & (length[:, np.newaxis] > _LONG_CHORD_MM)
    shown = np.isfinite(start_mm[:, 0]) & np.isfinite(end_mm[:, 0])
    hidden = np.isnan(start_mm[:, 0]) & np.isnan(end_mm[:, 0]) & np.all(np.isnan(seen_mm[:, :, 0]), axis=1)
    return np.asarray(np.where(shown, np.any(far | np.isnan(seen_mm[:, :, 0]), axis=1), ~hidden))


def _in_sight(
    start_mm: FloatArray, end_mm: FloatArray, seen_mm: FloatArray, window_mm: Window
) -> np.ndarray[tuple[int], np.dtype[np.bool_]]:
    """Return which intervals may come into the window: their points' box, grown by its own size, meets it."""
    points = np.concatenate((start_mm[:, np.newaxis], seen_mm, end_mm[:, np.newaxis]), axis=1)
    low = np.min(np.where(np.isnan(points), np.inf, points), axis=1)
    high = np.max(np.where(np.isnan(points), -np.inf, points), axis=1)
    grown = np.where(np.isfinite(low) & np.isfinite(high), high, 0.0) - np.where(np.isfinite(low), low, 0.0)
    left, bottom, right, top = window_mm
    meets = (low - grown <= [right, top]) & (high + grown >= [left, bottom])
    return np.asarray(np.all(meets, axis=1))


def _unbroken(place: FloatArray, torn: np.ndarray[tuple[int], np.dtype[np.bool_]]) -> list[FloatArray]:
    pieces = np.split(place, np.flatnonzero(torn) + 1)
    shown = [run for piece in pieces for run in _finite_runs(piece)]
    return [run for run in shown if len(run) > 1]


def _finite_runs(piece: FloatArray) -> list[FloatArray]:
    finite = np.isfinite(piece[:, 0])
    edges = np.flatnonzero(np.diff(finite.astype(np.int8))) + 1
    return [run for run in np.split(piece, edges) if run.size and np.isfinite(run[0, 0])]


def cut_at(polyline_mm: FloatArray, window_mm: Window) -> list[FloatArray]:
    """Return what of a polyline, shape (n, 2), lies inside a window, as polylines that end on its edge.

    Source: Y.-D. Liang and B. A. Barsky, A new concept and method for line clipping, ACM Trans. Graph. 3 (1984) 1-22.
    """
    left, bottom, right, top = window_mm
    start, step = polyline_mm[:-1], np.diff(polyline_mm, axis=0)
    enter, leave = np.zeros(len(start)), np.ones(len(start))
    for axis, low, high in ((0, left, right), (1, bottom, top)):
        still = step[:, axis] == 0.0
        pace = np.where(still, 1.0, step[:, axis])
        ends = np.sort(np.stack(((low - start[:, axis]) / pace, (high - start[:, axis]) / pace)), axis=0)
        out = still & ((start[:, axis] < low) | (start[:, axis] > high))
        enter = np.where(out, 2.0, np.where(still, enter, np.maximum(enter, ends[0])))
        leave = np.where(still, leave, np.minimum(leave, ends[1]))
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
