"""The shoreline laid off on a plane: cut where the map is cut, and thinned to what can be seen."""

from __future__ import annotations

import math
from typing import TYPE_CHECKING, NamedTuple

import numpy as np

from navcore.angles import difference_of_longitude

if TYPE_CHECKING:
    from navcore.charts.coast import ShoreLines
    from navcore.charts.track import BoolArray, ToPlane, Window
    from navcore.trigonometry import FloatArray

_RUN = 32
"""Segments that are found together."""


def lay_off_shore(lines: ShoreLines, to_plane: ToPlane, central_lon_deg: float, longest: float) -> FloatArray:
    """Return lines of the shore on a plane, one after the other, shape (n, 2), with a NaN between.

    Args:
        lines: The lines.
        to_plane: From latitudes and longitudes to the plane, shape (n, 2); NaN where a point can't be shown.
        central_lon_deg: The plane's central meridian; opposite it the map may be cut.
        longest: A step over that meridian which is longer than this, in the plane's unit, is where it is.
    """
    if lines.starts.size == 0:
        return np.empty((0, 2))
    place = to_plane(lines.lat_deg, lines.lon_deg)
    steps = np.diff(place, axis=0)
    relative = difference_of_longitude(np.asarray(central_lon_deg), lines.lon_deg)
    is_cut = (np.abs(np.diff(relative)) > 180.0) & (np.hypot(steps[:, 0], steps[:, 1]) > longest)
    return np.insert(place, np.union1d(lines.starts[1:], np.flatnonzero(is_cut) + 1), np.nan, axis=0)


def thinned(place: FloatArray, step: float) -> FloatArray:
    """Return polylines without the points that `is_apart` passes over."""
    left: FloatArray = place[is_apart(place, step)]
    return left


def is_apart(place: FloatArray, step: float) -> BoolArray:
    """Return which points of polylines fall in another square of a size than the one before; their ends do, always."""
    square = np.floor(place / step)
    kept = np.ones(len(place), dtype=bool)
    kept[1:] = np.any(square[1:] != square[:-1], axis=1)
    # A gap differs from everything, itself included, so the point before it has still to be kept.
    kept[:-1] |= np.isnan(place[1:, 0])
    return kept


def _without_twins(place: FloatArray, step: float) -> FloatArray:
    """Return thinned polylines, of islets that lie whole in one square of the step only one."""
    is_gap = np.isnan(place[:, 0])
    line = np.cumsum(is_gap) - is_gap
    size = np.bincount(line[~is_gap], minlength=line[-1] + 1 if line.size else 0)
    first = np.searchsorted(line, np.arange(size.size))
    last = first + np.maximum(size, 1) - 1
    square = np.floor(place[first] / step)
    is_islet = np.all(square == np.floor(place[last] / step), axis=1) & (size <= 2)
    islets = np.flatnonzero(is_islet)
    _, once = np.unique(square[islets], axis=0, return_index=True)
    kept = ~is_islet
    kept[islets[once]] = True
    left: FloatArray = place[kept[line]]
    return left


class _Runs(NamedTuple):
    """Polylines in runs of points that follow each other, a NaN at the end of each; a run's last begins the next.

    Attributes:
        place: Shape (runs, _RUN + 2, 2).
        low: Left and bottom of each run, shape (runs, 2).
        high: Right and top of it.
    """

    place: FloatArray
    low: FloatArray
    high: FloatArray


class LaidShore:
    """The shoreline on a plane, to be looked at through windows of any size: no more of it is given than is seen."""

    def __init__(self, place: FloatArray) -> None:
        """Take lines as `lay_off_shore` returns them."""
        self._whole = place
        self._thinned: dict[int, _Runs] = {}

    def inside(self, window: Window, step: float) -> FloatArray:
        """Return what of the shore may come into a window, shape (n, 2), with a NaN between lines.

        Args:
            window: Left, bottom, right and top.
            step: Points closer to each other than this may be left out.
        """
        power = math.floor(math.log2(step))
        if power not in self._thinned:
            self._thinned[power] = _in_runs(_without_twins(thinned(self._whole, 2.0**power), 2.0**power))
        runs = self._thinned[power]
        left, bottom, right, top = window
        meets = np.all((runs.low <= (right, top)) & (runs.high >= (left, bottom)), axis=1)
        return runs.place[meets].reshape(-1, 2)


def _in_runs(place: FloatArray) -> _Runs:
    count = -(-len(place) // _RUN)
    padded = np.full((count * _RUN + 1, 2), np.nan)
    padded[: len(place)] = place
    run = np.full((count, _RUN + 2, 2), np.nan)
    run[:, :-2] = padded[:-1].reshape(count, _RUN, 2)
    run[:, -2] = padded[_RUN::_RUN]
    return _Runs(run, np.fmin.reduce(run, axis=1), np.fmax.reduce(run, axis=1))
