"""The great circle: the shortest line between two points, which on an ellipsoid is the geodesic.

Everything takes degrees and metres, in arrays that broadcast. Latitudes outside -90 to 90 and numbers that are not
finite raise RangeError. A leg that starts or ends at a pole runs along the other end's meridian.

The geodesic problem itself is solved in `geodesic_inverse` and `geodesic_direct`; vertices and crossings come from the
sphere of reduced latitudes, on which a geodesic is a great circle.

Source: C. F. F. Karney, Algorithms for geodesics, J. Geod. 87 (2013) 43-55 (K13).
"""

from __future__ import annotations

from typing import TYPE_CHECKING, NamedTuple

import numpy as np

from navcore.angles import wrap_180
from navcore.earth.latitudes import checked_latitude_deg, geographic_from_reduced_deg
from navcore.lines import geodesic_inverse
from navcore.lines.geodesic_direct import line
from navcore.lines.leg import Crossing, Ends, checked_ends, checked_finite
from navcore.trigonometry import sin_cos_deg

if TYPE_CHECKING:
    import numpy.typing as npt

    from navcore.earth.figure import Figure
    from navcore.lines.geodesic_direct import GeodesicPoint
    from navcore.lines.leg import BoolArray
    from navcore.trigonometry import FloatArray

AT_END_ARC_DEG = 1e-12
"""A vertex or crossing as near to an end as this (a tenth of a micrometre) is at the end."""


class GreatCircleInverse(NamedTuple):
    """Distance and courses.

    Attributes:
        distance_m: Along the great circle.
        initial_course_deg: Course at the start, [0, 360).
        final_course_deg: Course at the end, [0, 360), in the leg's own sense.
    """

    distance_m: FloatArray
    initial_course_deg: FloatArray
    final_course_deg: FloatArray


class GreatCirclePoint(NamedTuple):
    """A point on a great circle and the course there.

    Attributes:
        lat_deg: Latitude.
        lon_deg: Longitude, [-180, 180).
        course_deg: Course at the point, [0, 360).
    """

    lat_deg: FloatArray
    lon_deg: FloatArray
    course_deg: FloatArray


class Vertex(NamedTuple):
    """The point of a great circle that is nearest to a pole.

    Attributes:
        lat_deg: Latitude; NaN where every point or none is a vertex: the equator, and a leg of no length.
        lon_deg: Longitude, [-180, 180); NaN where the latitude is.
        on_leg: Whether it lies between the leg's ends, or at one.
    """

    lat_deg: FloatArray
    lon_deg: FloatArray
    on_leg: BoolArray


class _Leg(NamedTuple):
    """A great-circle leg as solved, every rule of this module applied; arrays of one shape."""

    ends: Ends
    distance_m: FloatArray
    arc_deg: FloatArray
    initial_course_deg: FloatArray
    final_course_deg: FloatArray


class _Sphere(NamedTuple):
    """Where a leg lies on the sphere of reduced latitudes (K13 eqs 10-13).

    Attributes:
        sin_node: Sine of the course at the equator, which is also the cosine of the vertex's reduced latitude.
        cos_node: Its cosine, >= 0: the sine of the vertex's reduced latitude.
        arc_deg: Arc from the northward crossing of the equator to the leg's start, (-180, 180].
    """

    sin_node: FloatArray
    cos_node: FloatArray
    arc_deg: FloatArray


def inverse(
    lat1_deg: npt.ArrayLike, lon1_deg: npt.ArrayLike, lat2_deg: npt.ArrayLike, lon2_deg: npt.ArrayLike, figure: Figure
) -> GreatCircleInverse:
    """Return the distance and courses of the shortest line between two points.

    Edges:
        Two equal shortest lines: the northern one; between opposite points, over the north pole, courses 000 and 180.
        A leg from or to a pole has the meridian's courses, 000 or 180. Equal points: 0 m, both courses 0.

    Accuracy:
        15 nm, and courses to 1e-7° or 10 nm sideways, whichever is larger; held by tests/published/test_line_table.py.
    """
    leg = _solved(checked_ends(lat1_deg, lon1_deg, lat2_deg, lon2_deg), figure)
    return GreatCircleInverse(leg.distance_m, leg.initial_course_deg, leg.final_course_deg)


def direct(
    lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike, course_deg: npt.ArrayLike, distance_m: npt.ArrayLike, figure: Figure
) -> GreatCirclePoint:
    """Return the point reached from a start on an initial course, and the course there.

    At a pole the course is reckoned from the meridian that `lon_deg` names. A negative distance runs backwards.
    """
    latitude, longitude = checked_latitude_deg(lat_deg), checked_finite("lon_deg", lon_deg)
    course, distance = checked_finite("course_deg", course_deg), checked_finite("distance_m", distance_m)
    reached = line(latitude, longitude, course, figure).at_distance(distance)
    return GreatCirclePoint(reached.lat_deg, reached.lon_deg, reached.azimuth_deg)


def course_at(
    lat1_deg: npt.ArrayLike,
    lon1_deg: npt.ArrayLike,
    lat2_deg: npt.ArrayLike,
    lon2_deg: npt.ArrayLike,
    distance_m: npt.ArrayLike,
    figure: Figure,
) -> GreatCirclePoint:
    """Return the points at distances from the start of legs, and the courses there; distances broadcast."""
    leg = _solved(checked_ends(lat1_deg, lon1_deg, lat2_deg, lon2_deg), figure)
    return direct(leg.ends.lat1_deg, leg.ends.lon1_deg, leg.initial_course_deg, distance_m, figure)


def points_along(
    lat1_deg: npt.ArrayLike,
    lon1_deg: npt.ArrayLike,
    lat2_deg: npt.ArrayLike,
    lon2_deg: npt.ArrayLike,
    distance_m: npt.ArrayLike,
    figure: Figure,
) -> tuple[FloatArray, FloatArray]:
    """Return the latitudes and longitudes at distances from the start of legs; distances broadcast against the legs."""
    point = course_at(lat1_deg, lon1_deg, lat2_deg, lon2_deg, distance_m, figure)
    return point.lat_deg, point.lon_deg


def vertex(
    lat1_deg: npt.ArrayLike, lon1_deg: npt.ArrayLike, lat2_deg: npt.ArrayLike, lon2_deg: npt.ArrayLike, figure: Figure
) -> Vertex:
    """Return the vertex of each leg: the one on it, else the nearest in the hemisphere of the higher latitude.

    The two ends equally far from the equator, on either side of it: the north. A leg along a meridian has the pole as
    its vertex and its own meridian as the longitude.

    Source: Clairaut's relation, cos β of the vertex = sin α cos β.
    """
    leg = _solved(checked_ends(lat1_deg, lon1_deg, lat2_deg, lon2_deg), figure)
    sphere = _on_sphere(leg, figure)
    north_arc, north_off = _nearest_passage(90.0 - sphere.arc_deg, leg.arc_deg)
    south_arc, south_off = _nearest_passage(-90.0 - sphere.arc_deg, leg.arc_deg)
    on_north, on_south = north_off <= AT_END_ARC_DEG, south_off <= AT_END_ARC_DEG
    northern = np.where(on_north == on_south, leg.ends.lat1_deg + leg.ends.lat2_deg >= 0.0, on_north)
    reduced = np.degrees(np.arctan2(np.where(northern, 1.0, -1.0) * sphere.cos_node, np.abs(sphere.sin_node)))
    longitude = _at_arc(leg, np.where(northern, north_arc, south_arc), figure).lon_deg
    meridional = sphere.sin_node == 0.0
    none = (leg.distance_m == 0.0) | (sphere.cos_node == 0.0)
    return Vertex(
        np.where(none, np.nan, geographic_from_reduced_deg(reduced, figure)),
        np.where(none, np.nan, wrap_180(np.where(meridional, leg.ends.lon1_deg, longitude))),
        (on_north | on_south) & ~none,
    )


def _nearest_passage(arc_deg: FloatArray, leg_arc_deg: FloatArray) -> tuple[FloatArray, FloatArray]:
    """Return which of an arc and the same a turn later lies nearest to the leg, 0 to leg_arc, and how far off it is."""
    later = arc_deg + np.where(arc_deg < 0.0, 360.0, -360.0)
    off = np.maximum(np.maximum(-arc_deg, arc_deg - leg_arc_deg), 0.0)
    off_later = np.maximum(np.maximum(-later, later - leg_arc_deg), 0.0)
    return np.where(off_later < off, later, arc_deg), np.minimum(off, off_later)


def crossing_of_meridian(
    lat1_deg: npt.ArrayLike,
    lon1_deg: npt.ArrayLike,
    lat2_deg: npt.ArrayLike,
    lon2_deg: npt.ArrayLike,
    meridian_deg: npt.ArrayLike,
    figure: Figure,
) -> Crossing:
    """Return where legs cross meridians, ends included; NaN where not on the leg, or the leg runs along a meridian."""
    meridian = checked_finite("meridian_deg", meridian_deg)
    leg = _solved(checked_ends(lat1_deg, lon1_deg, lat2_deg, lon2_deg), figure)
    sphere = _on_sphere(leg, figure)
    sense = np.where(sphere.sin_node < 0.0, -1.0, 1.0)
    # Counted from the start in the leg's own sense, 0 to 360.
    span = np.mod(sense * (leg.ends.lon2_deg - leg.ends.lon1_deg), 360.0)
    ahead = np.mod(sense * (meridian - leg.ends.lon1_deg), 360.0)
    crossed = (sphere.sin_node != 0.0) & (leg.distance_m > 0.0) & (ahead <= span)
    arc = _arc_to_meridian_deg(leg, sphere, np.where(crossed, ahead, 0.0), figure)
    arc = np.where(ahead == span, leg.arc_deg, np.where(ahead == 0.0, 0.0, arc))
    point = _at_arc(leg, arc, figure)
    found = (point.lat_deg, wrap_180(meridian), point.distance_m)
    return Crossing(*(np.where(crossed, value, np.nan) for value in found))


def _arc_to_meridian_deg(leg: _Leg, sphere: _Sphere, ahead_deg: FloatArray, figure: Figure) -> FloatArray:
    """Return the arc from the start in which a leg makes this much longitude, by iteration on the sphere's longitude.

    The longitude on the sphere differs from the true one by a part of the flattening, so that each round gains more
    than two figures.
    """
    sin_node = np.where(sphere.sin_node == 0.0, 1.0, np.abs(sphere.sin_node))
    sense = np.where(sphere.sin_node < 0.0, -1.0, 1.0)
    sine, cosine = sin_cos_deg(sphere.arc_deg)
    spherical = np.degrees(np.arctan2(sin_node * sine, cosine)) + ahead_deg
    arc = np.zeros_like(spherical)
    for _ in range(8):
        sine, cosine = sin_cos_deg(spherical)
        # A leg spans half a turn at most: what looks like nearly a whole one is a hair before the start.
        arc = np.mod(np.degrees(np.arctan2(sine, sin_node * cosine)) - sphere.arc_deg + 90.0, 360.0) - 90.0
        made = sense * (_at_arc(leg, arc, figure).lon_deg - leg.ends.lon1_deg)
        spherical = spherical + ahead_deg - (np.mod(made + 90.0, 360.0) - 90.0)
    return arc


def crossings_of_parallel(
    lat1_deg: npt.ArrayLike,
    lon1_deg: npt.ArrayLike,
    lat2_deg: npt.ArrayLike,
    lon2_deg: npt.ArrayLike,
    parallel_deg: npt.ArrayLike,
    figure: Figure,
) -> Crossing:
    """Return where legs cross parallels, ends included, in a last axis of two: in order along the leg, then NaN.

    A leg that touches the parallel at its vertex crosses it once; one along the equator does not cross it.
    """
    parallel = checked_latitude_deg(parallel_deg)
    leg = _solved(checked_ends(lat1_deg, lon1_deg, lat2_deg, lon2_deg), figure)
    leg = _Leg(Ends(*(end[..., np.newaxis] for end in leg.ends)), *(value[..., np.newaxis] for value in leg[1:]))
    sphere = _on_sphere(leg, figure)
    arcs = np.sort(_arcs_at_parallel_deg(leg, sphere, parallel[..., np.newaxis], figure), axis=-1)
    arcs[..., 1] = np.where(arcs[..., 1] == arcs[..., 0], np.nan, arcs[..., 1])
    missed = np.isnan(arcs)
    point = _at_arc(leg, np.where(missed, 0.0, arcs), figure)
    found = (point.lat_deg, point.lon_deg, point.distance_m)
    return Crossing(*(np.where(missed, np.nan, value) for value in found))


def _arcs_at_parallel_deg(leg: _Leg, sphere: _Sphere, parallel_deg: FloatArray, figure: Figure) -> FloatArray:
    """Return the two arcs from the start at which the great circle meets a parallel, NaN where that is off the leg."""
    sine, cosine = _reduced_sin_cos(parallel_deg, figure)
    # sin² of the vertex less sin² of the parallel, from the smaller pair of the two.
    by_sines = (sphere.cos_node - sine) * (sphere.cos_node + sine)
    by_cosines = (cosine - np.abs(sphere.sin_node)) * (cosine + np.abs(sphere.sin_node))
    height = np.where(np.abs(sine) < cosine, by_sines, by_cosines)
    met = (height > -1e-15) & (sphere.cos_node > 0.0) & (leg.distance_m > 0.0)
    rising = np.degrees(np.arctan2(sine, np.sqrt(np.maximum(height, 0.0))))
    # An end that lies on the parallel is met exactly there.
    rising = np.where(parallel_deg == leg.ends.lat2_deg, sphere.arc_deg + leg.arc_deg, rising)
    rising = np.where(parallel_deg == leg.ends.lat1_deg, sphere.arc_deg, rising)
    arcs = np.concatenate(np.broadcast_arrays(rising, 180.0 - rising), axis=-1) - sphere.arc_deg
    arcs = np.mod(arcs + 90.0, 360.0) - 90.0
    on_leg = met & (arcs >= -AT_END_ARC_DEG) & (arcs <= leg.arc_deg + AT_END_ARC_DEG)
    return np.where(on_leg, np.clip(arcs, 0.0, leg.arc_deg), np.nan)


def _reduced_sin_cos(lat_deg: FloatArray, figure: Figure) -> tuple[FloatArray, FloatArray]:
    """Return the sine and cosine of the reduced latitude."""
    sine, cosine = sin_cos_deg(lat_deg)
    shortened = (1.0 - figure.flattening) * sine
    length = np.hypot(shortened, cosine)
    return shortened / length, cosine / length


def _on_sphere(leg: _Leg, figure: Figure) -> _Sphere:
    sine, cosine = _reduced_sin_cos(leg.ends.lat1_deg, figure)
    sin_course, cos_course = sin_cos_deg(leg.initial_course_deg)
    arc_deg: FloatArray = np.degrees(np.arctan2(sine, cos_course * cosine))
    return _Sphere(sin_course * cosine, np.hypot(cos_course, sin_course * sine), arc_deg)


def _solved(ends: Ends, figure: Figure) -> _Leg:
    """Solve legs, with a pole on the other end's meridian."""
    lon1 = ends.own_meridian_deg
    ends = Ends(ends.lat1_deg, lon1, ends.lat2_deg, np.where(np.abs(ends.lat2_deg) == 90.0, lon1, ends.lon2_deg))
    distance_m, initial_deg, final_deg, arc_deg = geodesic_inverse.inverse(*ends, figure)
    return _Leg(ends, distance_m, arc_deg, initial_deg, final_deg)


def _at_arc(leg: _Leg, arc_deg: FloatArray, figure: Figure) -> GeodesicPoint:
    """Return the point at an arc from the start of legs, on the sphere of reduced latitudes."""
    return line(leg.ends.lat1_deg, leg.ends.lon1_deg, leg.initial_course_deg, figure).at_arc(arc_deg)
