"""How far a point lies from a leg, and a leg's rhumb line from its great circle: the shortest distance on the figure.

A leg is cut into cells. On the sphere of normals the distance to each cell's arc is nearly right, so the cells nearer
than both neighbours hold every place where the distance can be least; each is then settled on the figure itself: the
foot is where the shortest line to the point leaves the leg at a right angle, or an end.

Source: S. Baselga and J. C. Martínez-Llario, Intersection and point-to-line solutions for geodesics on the ellipsoid,
Stud. Geophys. Geod. 62 (2018) 353-363: the foot by steps that are right on the sphere. Carried over here to a line of
constant course by its curvature.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, NamedTuple

import numpy as np

from navcore.earth.latitudes import (
    checked_latitude_deg,
    geographic_from_isometric_deg,
    isometric_latitude_rad,
    meridian_distance_m,
)
from navcore.lines import great_circle, rhumb_line
from navcore.lines.leg import Ends, checked_ends, checked_finite
from navcore.trigonometry import sin_cos_deg

if TYPE_CHECKING:
    from collections.abc import Callable

    import numpy.typing as npt

    from navcore.earth.figure import Figure
    from navcore.lines.leg import BoolArray
    from navcore.trigonometry import FloatArray

    IntArray = npt.NDArray[np.int64]
    LegEnds = tuple[npt.ArrayLike, npt.ArrayLike, npt.ArrayLike, npt.ArrayLike]

CELLS = 32
FAR_RAD = 0.8
"""Beyond this angle the flattening can make several places nearly equally near: cells are measured on the figure."""

ON_LINE_M = 1e-6
FOOT_TOLERANCE_M = 3e-8
SEPARATION_TOLERANCE_M = 1e-4
NO_SEPARATION_RAD = 1e-11
"""Below this, 0.06 mm, the two lines are one."""

FIVE = np.arange(-2.0, 3.0)
FIVE_TO_QUARTIC = np.linalg.inv(np.vander(FIVE))


class Offset(NamedTuple):
    """Where a point lies beside a leg.

    Attributes:
        distance_m: Shortest distance to the leg; to the nearer end where the foot is off the leg.
        along_m: From the leg's start to the nearest point, along the leg.
        side: +1 to starboard (right) of the leg's course there, -1 to port (left), 0 on the line or straight ahead or
            astern of an end, within a micrometre.
    """

    distance_m: FloatArray
    along_m: FloatArray
    side: IntArray


@dataclass(frozen=True, slots=True)
class _Legs:
    """Legs of one kind, one a row, cut into cells: nodes_m is (legs, cells + 1), normals (legs, cells + 1, 3)."""

    lat1_deg: FloatArray
    lon1_deg: FloatArray
    course_deg: FloatArray
    nodes_m: FloatArray
    normals: FloatArray
    constant_course: bool
    figure: Figure

    def at(self, rows: IntArray, along_m: FloatArray) -> great_circle.GreatCirclePoint:
        """Return the points, and the courses there, at distances along the legs in these rows."""
        lat1, lon1, course = self.lat1_deg[rows], self.lon1_deg[rows], self.course_deg[rows]
        if self.constant_course:
            return great_circle.GreatCirclePoint(*rhumb_line.direct(lat1, lon1, course, along_m, self.figure), course)
        return great_circle.direct(lat1, lon1, course, along_m, self.figure)


def _normals(lat_deg: FloatArray, lon_deg: FloatArray) -> FloatArray:
    sin_lat, cos_lat = sin_cos_deg(lat_deg)
    sin_lon, cos_lon = sin_cos_deg(lon_deg)
    return np.stack(np.broadcast_arrays(cos_lat * cos_lon, cos_lat * sin_lon, sin_lat), axis=-1)


def _great_circles(ends: Ends, figure: Figure) -> _Legs:
    whole = great_circle.inverse(*ends, figure)
    nodes_m = whole.distance_m[:, np.newaxis] * np.linspace(0.0, 1.0, CELLS + 1)
    lon1 = ends.own_meridian_deg
    points = great_circle.direct(
        ends.lat1_deg[:, np.newaxis], lon1[:, np.newaxis], whole.initial_course_deg[:, np.newaxis], nodes_m, figure
    )
    normals = _normals(points.lat_deg, points.lon_deg)
    return _Legs(ends.lat1_deg, lon1, whole.initial_course_deg, nodes_m, normals, constant_course=False, figure=figure)


def _rhumb_lines(ends: Ends, figure: Figure) -> _Legs:
    whole = rhumb_line.inverse(*ends, figure)
    nodes_m = _rhumb_nodes_m(ends, whole.distance_m, figure)
    lon1 = ends.own_meridian_deg
    points = rhumb_line.direct(
        ends.lat1_deg[:, np.newaxis], lon1[:, np.newaxis], whole.course_deg[:, np.newaxis], nodes_m, figure
    )
    return _Legs(ends.lat1_deg, lon1, whole.course_deg, nodes_m, _normals(*points), constant_course=True, figure=figure)


def _rhumb_nodes_m(ends: Ends, length_m: FloatArray, figure: Figure) -> FloatArray:
    """Return distances at equal steps of distance and at equal steps of longitude, which close up towards a pole."""
    steps = np.linspace(0.0, 1.0, CELLS + 1)
    even = length_m[:, np.newaxis] * steps
    start, end = isometric_latitude_rad(ends.lat1_deg, figure), isometric_latitude_rad(ends.lat2_deg, figure)
    northing = meridian_distance_m(ends.lat2_deg, figure) - meridian_distance_m(ends.lat1_deg, figure)
    # Where the latitude hardly changes the two kinds of step are the same.
    plain = ends.at_pole | (np.abs(northing) < 1.0)
    start, end = np.where(plain, 0.0, start)[:, np.newaxis], np.where(plain, 0.0, end)[:, np.newaxis]
    latitude = geographic_from_isometric_deg(start + (end - start) * steps[1:-1], figure)
    risen = meridian_distance_m(latitude, figure) - meridian_distance_m(ends.lat1_deg, figure)[:, np.newaxis]
    by_longitude = risen * (length_m / np.where(plain, 1.0, northing))[:, np.newaxis]
    by_longitude = np.where(plain[:, np.newaxis], even[:, 1:-1], np.clip(by_longitude, 0.0, length_m[:, np.newaxis]))
    return np.sort(np.concatenate((even, by_longitude), axis=-1), axis=-1)


def distance_from_great_circle(lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike, leg: LegEnds, figure: Figure) -> Offset:
    """Return the shortest distance from points to great-circle legs.

    Args:
        lat_deg: Latitudes of the points; broadcast against the legs.
        lon_deg: Longitudes of the points.
        leg: lat1_deg, lon1_deg, lat2_deg, lon2_deg.
        figure: The figure of the Earth.

    Accuracy:
        1 µm; held by tests/lines/test_offset.py.
    """
    return _offset(lat_deg, lon_deg, _great_circles, checked_ends(*leg), figure)


def distance_from_rhumb_line(lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike, leg: LegEnds, figure: Figure) -> Offset:
    """Return the shortest distance from points to rhumb-line legs; arguments and accuracy as for great circles."""
    return _offset(lat_deg, lon_deg, _rhumb_lines, checked_ends(*leg), figure)


def _offset(
    lat_deg: npt.ArrayLike,
    lon_deg: npt.ArrayLike,
    cut: Callable[[Ends, Figure], _Legs],
    ends: Ends,
    figure: Figure,
) -> Offset:
    """Flatten points and legs to rows, and give the answer their common shape."""
    lat, lon = np.broadcast_arrays(checked_latitude_deg(lat_deg), checked_finite("lon_deg", lon_deg))
    shape = np.broadcast_shapes(lat.shape, ends.lat1_deg.shape)
    rows = np.broadcast_to(np.arange(ends.lat1_deg.size).reshape(ends.lat1_deg.shape), shape).ravel()
    legs = cut(Ends(*(end.ravel() for end in ends)), figure)
    points = np.broadcast_to(lat, shape).ravel(), np.broadcast_to(lon, shape).ravel()
    found = _nearest(legs, rows, points, FOOT_TOLERANCE_M)
    return Offset(found.distance_m.reshape(shape), found.along_m.reshape(shape), found.side.reshape(shape))


def _nearest(legs: _Legs, rows: IntArray, points: tuple[FloatArray, FloatArray], tolerance_m: float) -> Offset:
    """Return the offsets of points from the legs in these rows, one row a point."""
    if rows.size == 0:
        return Offset(np.empty(0), np.empty(0), np.empty(0, dtype=np.int64))
    cells_rad, parts = _distance_to_cells_rad(legs.normals[rows], _normals(*points)[:, np.newaxis, :])
    nodes_m = legs.nodes_m[rows]
    far = cells_rad.min(axis=-1) > FAR_RAD
    if np.any(far):
        cells_rad[far] = _measured_cells_rad(legs, rows[far], (points[0][far], points[1][far]))
        parts[far] = 0.5
    point, cell = np.nonzero(_lowest(cells_rad))
    first, last = _valleys(cells_rad)
    low_m, high_m = nodes_m[point, first[point, cell]], nodes_m[point, last[point, cell] + 1]
    begin_m, end_m = nodes_m[point, cell], nodes_m[point, cell + 1]
    start_m = begin_m + parts[point, cell] * (end_m - begin_m)
    found = _settle(legs, rows[point], (points[0][point], points[1][point]), (low_m, start_m, high_m), tolerance_m)
    order = np.lexsort((found.distance_m, point))
    nearest = order[np.unique(point[order], return_index=True)[1]]
    return Offset(found.distance_m[nearest], found.along_m[nearest], found.side[nearest])


def _lowest(values: FloatArray) -> BoolArray:
    """Return where a row's value is below the one before and not above the one after."""
    walls = np.full((values.shape[0], 1), np.inf)
    before, after = np.concatenate((walls, values[:, :-1]), axis=-1), np.concatenate((values[:, 1:], walls), axis=-1)
    lowest: BoolArray = (values < before) & (values <= after)
    return lowest


def _valleys(values: FloatArray) -> tuple[IntArray, IntArray]:
    """Return, for each value in a row, the places of the nearest peaks, or ends of the row, before and after it."""
    place, peak = np.arange(values.shape[-1]), _lowest(-values)
    before = np.maximum.accumulate(np.where(peak, place, 0), axis=-1)
    after = np.minimum.accumulate(np.where(peak, place, place[-1])[:, ::-1], axis=-1)[:, ::-1]
    return before, after


def _distance_to_cells_rad(nodes: FloatArray, point: FloatArray) -> tuple[FloatArray, FloatArray]:
    """Return the angle from a point to each cell's arc on the unit sphere, and where in the cell the foot lies, 0-1."""
    begin, end = nodes[..., :-1, :], nodes[..., 1:, :]
    pole = np.cross(begin, end)
    sine = np.linalg.norm(pole, axis=-1)
    pole = pole / np.where(sine == 0.0, 1.0, sine)[..., np.newaxis]
    ahead = np.sum(np.cross(pole, begin) * point, axis=-1)
    to_begin = np.sum(begin * point, axis=-1)
    width = np.arctan2(sine, np.sum(begin * end, axis=-1))
    part = np.where(width > 0.0, np.arctan2(ahead, to_begin) / np.where(width > 0.0, width, 1.0), 0.0)
    across = np.arcsin(np.clip(np.abs(np.sum(pole * point, axis=-1)), 0.0, 1.0))
    half_chord = 0.5 * np.linalg.norm(point - nodes, axis=-1)
    to_nodes = 2.0 * np.arcsin(np.minimum(half_chord, 1.0))
    inside = (part > 0.0) & (part < 1.0)
    nearer_end = np.minimum(to_nodes[..., :-1], to_nodes[..., 1:])
    return np.where(inside, across, nearer_end), np.clip(part, 0.0, 1.0)


def _measured_cells_rad(legs: _Legs, rows: IntArray, points: tuple[FloatArray, FloatArray]) -> FloatArray:
    """Return the true distance from each point to the middle of each cell, as an angle."""
    middles_m = 0.5 * (legs.nodes_m[rows, :-1] + legs.nodes_m[rows, 1:])
    reached = legs.at(rows[:, np.newaxis], middles_m)
    lat, lon = points[0][:, np.newaxis], points[1][:, np.newaxis]
    line = great_circle.inverse(reached.lat_deg, reached.lon_deg, lat, lon, legs.figure)
    return line.distance_m / legs.figure.equatorial_radius_m


class _Sight(NamedTuple):
    """From points of legs to other points: the distance, and its part ahead and to starboard as sine and cosine."""

    distance_m: FloatArray
    cos_bearing: FloatArray
    sin_bearing: FloatArray
    turning_rad_m: FloatArray


def _sight(legs: _Legs, rows: IntArray, along_m: FloatArray, points: tuple[FloatArray, FloatArray]) -> _Sight:
    here = legs.at(rows, along_m)
    line = great_circle.inverse(here.lat_deg, here.lon_deg, *points, legs.figure)
    # At a pole the bearing is reckoned from the leg's own meridian, as the course is.
    from_pole = np.where(here.lat_deg > 0.0, 180.0 + here.lon_deg - points[1], points[1] - here.lon_deg)
    azimuth = np.where(np.abs(here.lat_deg) == 90.0, from_pole, line.initial_course_deg)
    sine, cosine = sin_cos_deg(azimuth - here.course_deg)
    return _Sight(line.distance_m, cosine, sine, _turning_rad_m(legs, here))


def _turning_rad_m(legs: _Legs, here: great_circle.GreatCirclePoint) -> FloatArray:
    """Return how fast legs turn to starboard of the great circle on their course: 0 unless the course is constant."""
    if not legs.constant_course:
        return np.zeros_like(here.lat_deg)
    sin_course, _ = sin_cos_deg(here.course_deg)
    sine, cosine = sin_cos_deg(here.lat_deg)
    tangent = sine / np.maximum(cosine, 1e-12)
    return -sin_course * tangent / legs.figure.equatorial_radius_m


def _settle(
    legs: _Legs,
    rows: IntArray,
    points: tuple[FloatArray, FloatArray],
    bracket_m: tuple[FloatArray, FloatArray, FloatArray],
    tolerance_m: float,
) -> Offset:
    """Return the nearest points within brackets of low, start and high along the legs, one a row."""
    low, along, high = (bound.copy() for bound in bracket_m)
    distance, side = np.empty_like(along), np.zeros(along.shape, dtype=np.int64)
    last_step = np.full_like(along, np.inf)
    active = np.arange(along.size)
    for _ in range(100):
        here = along[active]
        sight = _sight(legs, rows[active], here, (points[0][active], points[1][active]))
        distance[active] = sight.distance_m
        across = sight.distance_m * sight.sin_bearing
        side[active] = np.where(np.abs(across) <= ON_LINE_M, 0, np.sign(across)).astype(np.int64)
        ahead = sight.cos_bearing > 0.0
        low[active], high[active] = np.where(ahead, here, low[active]), np.where(ahead, high[active], here)
        target = np.clip(here + _step_m(sight, legs.figure), low[active], high[active])
        # A step that does not halve the one before is no progress: halve the bracket instead.
        slow = np.abs(target - here) > 0.5 * last_step[active]
        target = np.where(slow, 0.5 * (low[active] + high[active]), target)
        last_step[active] = np.abs(target - here)
        unsettled = np.abs(target - here) > tolerance_m
        active = active[unsettled]
        if active.size == 0:
            break
        along[active] = target[unsettled]
    return Offset(distance, along, side)


def _step_m(sight: _Sight, figure: Figure) -> FloatArray:
    """Return how far ahead the foot lies: right on the sphere for a great circle, in the plane for a circular arc."""
    radius_m = figure.equatorial_radius_m
    angle = sight.distance_m / radius_m
    ahead = radius_m * np.arctan2(np.sin(angle) * sight.cos_bearing, np.cos(angle))
    across = radius_m * np.tan(np.minimum(angle, 1.5)) * sight.sin_bearing
    turning = sight.turning_rad_m
    curved = np.arctan2(turning * ahead, 1.0 - turning * across) / np.where(turning == 0.0, 1.0, turning)
    return np.where(turning == 0.0, ahead, curved)


def greatest_separation_m(
    lat1_deg: npt.ArrayLike, lon1_deg: npt.ArrayLike, lat2_deg: npt.ArrayLike, lon2_deg: npt.ArrayLike, figure: Figure
) -> FloatArray:
    """Return the farthest that any point of each leg's rhumb line lies from the great circle between the same ends.

    Accuracy:
        1 mm; held by tests/lines/test_offset.py.
    """
    ends = checked_ends(lat1_deg, lon1_deg, lat2_deg, lon2_deg)
    shape = ends.lat1_deg.shape
    flat = Ends(*(end.ravel() for end in ends))
    circles, rhumbs = _great_circles(flat, figure), _rhumb_lines(flat, figure)
    nodes = range(rhumbs.normals.shape[1])
    apart_rad = np.stack(
        [_distance_to_cells_rad(circles.normals, rhumbs.normals[:, [node]])[0].min(axis=-1) for node in nodes], axis=-1
    )
    widest_rad = apart_rad.max(axis=-1, keepdims=True)
    # Every hump that might turn out the highest on the figure.
    humps = _lowest(-apart_rad) & (apart_rad >= 0.9 * widest_rad) & (apart_rad > NO_SEPARATION_RAD)
    leg, node = np.nonzero(humps)
    found_m = _highest_m(circles, rhumbs, leg, node)
    greatest_m = np.zeros(flat.lat1_deg.shape)
    np.maximum.at(greatest_m, leg, found_m)
    return greatest_m.reshape(shape)


def _highest_m(circles: _Legs, rhumbs: _Legs, leg: IntArray, node: IntArray) -> FloatArray:
    """Return the greatest separation near each node: a quartic through five points, until it foretells its own peak.

    Where the nearest point jumps from one part of the great circle to another the separation has an edge and no quartic
    fits; then the points close in on it by halves.
    """
    nodes_m = rhumbs.nodes_m[leg]
    length_m, row = nodes_m[:, -1], np.arange(leg.size)
    middle_m = nodes_m[row, node]
    half_m = np.maximum(
        nodes_m[row, np.minimum(node + 1, nodes_m.shape[1] - 1)] - middle_m, middle_m - nodes_m[row, node - 1]
    )
    highest_m, active = np.zeros(leg.size), row
    for _ in range(60):
        half, length = half_m[active], length_m[active]
        middle = np.clip(middle_m[active], half, np.maximum(length - half, half))
        along = np.clip(middle[:, np.newaxis] + half[:, np.newaxis] * 0.5 * FIVE, 0.0, length[:, np.newaxis])
        apart = _separations_m(circles, rhumbs, leg[active], along)
        best = apart.argmax(axis=-1)
        peak, foretold = _quartic_peak(apart, best)
        at_peak = np.clip(middle + 0.5 * half * peak, 0.0, length)
        measured = _separations_m(circles, rhumbs, leg[active], at_peak[:, np.newaxis])[:, 0]
        tallest = apart.max(axis=-1)
        highest_m[active] = np.maximum(highest_m[active], np.maximum(tallest, measured))
        inner = (best > 0) & (best < 4)
        middle_m[active] = np.where(measured > tallest, at_peak, along[np.arange(active.size), best])
        half_m[active] = np.where(inner, 0.5 * half, half)
        active = active[~inner | (np.abs(measured - foretold) > SEPARATION_TOLERANCE_M)]
        if active.size == 0:
            break
    return highest_m


def _separations_m(circles: _Legs, rhumbs: _Legs, leg: IntArray, along_m: FloatArray) -> FloatArray:
    """Return the distances of points of rhumb lines, several a row, from the great circles of the same legs."""
    rows = np.broadcast_to(leg[:, np.newaxis], along_m.shape).ravel()
    points = rhumbs.at(rows, along_m.ravel())
    offset = _nearest(circles, rows, (points.lat_deg, points.lon_deg), SEPARATION_TOLERANCE_M)
    return offset.distance_m.reshape(along_m.shape)


def _quartic_peak(heights: FloatArray, best: IntArray) -> tuple[FloatArray, FloatArray]:
    """Return the place, -2 to 2, and height of the peak nearest the best of five points at -2, -1, 0, 1, 2."""
    fourth, third, second, first, level = FIVE_TO_QUARTIC @ heights.T
    place: FloatArray = FIVE[best]
    for _ in range(8):
        slope = ((4.0 * fourth * place + 3.0 * third) * place + 2.0 * second) * place + first
        bend = (12.0 * fourth * place + 6.0 * third) * place + 2.0 * second
        place = np.clip(place - slope / np.where(bend < 0.0, bend, np.inf), -2.0, 2.0)
    return place, (((fourth * place + third) * place + second) * place + first) * place + level
