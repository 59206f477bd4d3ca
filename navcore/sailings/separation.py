"""How far a rhumb-line part lies from the stretch of great circle that it replaces, quickly enough to search with.

On the Mercator plane the part is a straight line; points of the great circle are set off from it there and the offset
is turned into metres by the plane's own scale. What is found is the greatest of those offsets: where the two lines are
farthest apart they are parallel, so that it is the greatest of the shortest distances too. Beyond `QUICK_M` the two
lines turn so much to each other that the shortest distances are worked out instead.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

import numpy as np

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.lines.offset import greatest_separation_m

if TYPE_CHECKING:
    from navcore.lines.great_circle_path import GreatCirclePath
    from navcore.trigonometry import FloatArray

QUICK_M = 20.0 * METRES_PER_NAUTICAL_MILE
_NODES = 14
_GRID = 200


def _interpolation() -> tuple[FloatArray, FloatArray]:
    """Return where a part is sampled, 0 to 1, and the matrix that takes samples to values on a fine even grid."""
    cosines = -np.cos(np.pi * np.arange(_NODES + 1) / _NODES)
    orders = np.arange(_NODES + 1)
    on_nodes = np.cos(np.outer(np.arccos(cosines), orders))
    on_grid = np.cos(np.outer(np.arccos(np.linspace(-1.0, 1.0, _GRID + 1)), orders))
    return 0.5 * (cosines + 1.0), np.ascontiguousarray((on_grid @ np.linalg.inv(on_nodes)).T)


_FRACTIONS, _TO_GRID = _interpolation()


def separations_m(path: GreatCirclePath, joints_rad: FloatArray) -> FloatArray:
    """Return the greatest separation of each part between successive arcs.

    Accuracy:
        1 part in 10⁴ up to 20 NM, 1 mm beyond; held by tests/sailings/test_separation.py.
    """
    quick_m = quick_separations_m(path, joints_rad)
    wide = quick_m > QUICK_M
    if np.any(wide):
        lat_deg = path.latitude_deg(joints_rad)
        lon_deg = np.degrees(path.longitude_rad(joints_rad))
        begin, end = np.append(wide, [False]), np.append([False], wide)
        quick_m[wide] = greatest_separation_m(lat_deg[begin], lon_deg[begin], lat_deg[end], lon_deg[end], path.figure)
    return quick_m


def quick_separations_m(path: GreatCirclePath, joints_rad: FloatArray) -> FloatArray:
    """Return the greatest offset on the Mercator plane of each part, good for parts that lie close."""
    begin = joints_rad[:-1, np.newaxis]
    arcs = begin + (joints_rad[1:, np.newaxis] - begin) * _FRACTIONS
    point = path.on_mercator(arcs)
    east, north = point.east_rad - point.east_rad[:, :1], point.north_rad - point.north_rad[:, :1]
    chord = np.hypot(east[:, -1:], north[:, -1:])
    chord = np.where(chord == 0.0, 1.0, chord)
    unit_east, unit_north = east[:, -1:] / chord, north[:, -1:] / chord
    offset = north * unit_east - east * unit_north
    # The scale half way between the lines: a parallel's radius falls by its sine of latitude along the plane's north.
    apart_m = offset * point.radius_m * np.exp((0.5 * unit_east) * offset * point.sin_lat)
    return _peaks(np.abs(apart_m @ _TO_GRID))


def _peaks(heights: FloatArray) -> FloatArray:
    """Return the top of each row: of the parabola through the highest value and its neighbours."""
    row = np.arange(heights.shape[0])
    best = heights[:, 1:-1].argmax(axis=-1) + 1
    before, top, after = heights[row, best - 1], heights[row, best], heights[row, best + 1]
    bend = 2.0 * top - before - after
    rise = 0.125 * (after - before) ** 2 / np.where(bend > 0.0, bend, np.inf)
    peak: FloatArray = top + rise
    return peak
