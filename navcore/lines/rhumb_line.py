"""The rhumb line: one course from end to end, on any figure of the Earth.

A right-angled triangle carries it: the northing Δm, which is the meridian's length between the two parallels, and the
departure Δλ·Δm/Δψ, where Δλ is the difference of longitude and Δψ that of isometric latitude. Δm/Δψ is the radius of a
parallel between the two. No formula here takes the tangent or secant of a course, so one near 90° loses nothing.

Everything takes degrees and metres, in arrays that broadcast. Latitudes outside -90 to 90 and numbers that are not
finite raise RangeError.

Source: C. F. F. Karney, The area of rhumb polygons, Stud. Geophys. Geod. 68 (2024) 99-120: the divided differences,
here in closed form for Δψ and as a Fourier series for Δm.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, NamedTuple

import numpy as np

from navcore.angles import difference_of_longitude, wrap_180
from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.earth.latitudes import (
    checked_latitude_deg,
    geographic_from_isometric_deg,
    isometric_difference_rad,
    isometric_latitude_rad,
    latitude_difference_deg,
    latitude_pair,
    meridian_difference_m,
    parallel_radius_m,
)
from navcore.errors import NoAnswerError
from navcore.lines.leg import Crossing, checked_ends, checked_finite, first_index
from navcore.trigonometry import direction_deg, sin_cos_deg

if TYPE_CHECKING:
    import numpy.typing as npt

    from navcore.earth.figure import Figure
    from navcore.lines.leg import BoolArray, Ends
    from navcore.trigonometry import FloatArray

AT_POLE_M = 1e-6
"""An end as near to a pole as this is the pole."""


class RhumbInverse(NamedTuple):
    """Course and distance.

    Attributes:
        course_deg: [0, 360).
        distance_m: Along the rhumb line.
    """

    course_deg: FloatArray
    distance_m: FloatArray


class _Rise(NamedTuple):
    """From one parallel to another.

    Attributes:
        northing_m: Along a meridian.
        isometric_rad: Difference of isometric latitude; infinite to or from a pole.
        radius_m: northing / isometric, the parallel's own radius where both are 0; 0 to or from a pole.
    """

    northing_m: FloatArray
    isometric_rad: FloatArray
    radius_m: FloatArray


def _rise(lat1_deg: FloatArray, lat2_deg: FloatArray, difference_deg: FloatArray, figure: Figure) -> _Rise:
    pair = latitude_pair(lat1_deg, lat2_deg, difference_deg)
    isometric, northing = isometric_difference_rad(pair, figure), meridian_difference_m(pair, figure)
    level = isometric == 0.0
    if not np.any(level):
        return _Rise(northing, isometric, northing / isometric)
    quotient = northing / np.where(level, 1.0, isometric)
    return _Rise(northing, isometric, np.where(level, parallel_radius_m(lat1_deg, figure), quotient))


def inverse(
    lat1_deg: npt.ArrayLike, lon1_deg: npt.ArrayLike, lat2_deg: npt.ArrayLike, lon2_deg: npt.ArrayLike, figure: Figure
) -> RhumbInverse:
    """Return the course and distance of the shortest rhumb line between two points.

    Edges:
        Exactly 180° of longitude goes the way the signs as typed say, else east. A line from or to a pole runs along
        the other end's meridian: course 000 or 180. Equal points: course 0, 0 m.

    Accuracy:
        1 µm, and courses to 1e-7° or 10 nm sideways, whichever is larger; held by tests/published/test_line_table.py,
        lines that end within 10 m of a pole aside.
    """
    ends = checked_ends(lat1_deg, lon1_deg, lat2_deg, lon2_deg)
    rise = _rise(ends.lat1_deg, ends.lat2_deg, ends.lat2_deg - ends.lat1_deg, figure)
    departure_m = rise.radius_m * np.radians(difference_of_longitude(ends.lon1_deg, ends.lon2_deg))
    return RhumbInverse(direction_deg(departure_m, rise.northing_m), np.hypot(departure_m, rise.northing_m))


def direct(
    lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike, course_deg: npt.ArrayLike, distance_m: npt.ArrayLike, figure: Figure
) -> tuple[FloatArray, FloatArray]:
    """Return the latitude and longitude reached on a course; a negative distance runs backwards.

    Edges:
        A line that ends within a micrometre of a pole ends at the pole, on the start's longitude. From a pole the only
        rhumb lines are the meridians.

    Returns:
        lat_deg, and lon_deg in [-180, 180).

    Raises:
        NoAnswerError: The pole is nearer than the distance, or a line leaves a pole otherwise than along a meridian.
    """
    latitude, longitude = checked_latitude_deg(lat_deg), checked_finite("lon_deg", lon_deg)
    distance = checked_finite("distance_m", distance_m)
    sin_course, cos_course = sin_cos_deg(checked_finite("course_deg", course_deg))
    northing, easting = distance * cos_course, distance * sin_course
    pole = np.copysign(90.0, northing)
    to_pole = np.abs(meridian_difference_m(latitude_pair(latitude, pole, pole - latitude), figure))
    _refuse_past_pole(to_pole, northing, distance)
    _refuse_oblique_from_pole(latitude, easting)
    difference = latitude_difference_deg(latitude, northing, figure)
    arrives = (to_pole - np.abs(northing) <= AT_POLE_M) & (northing != 0.0)
    reached = np.where(arrives, pole, np.clip(latitude + difference, -90.0, 90.0))
    radius = _rise(latitude, reached, difference, figure).radius_m
    # A radius of 0 is a line from or to a pole.
    d_long_rad = np.where(radius > 0.0, easting / np.where(radius > 0.0, radius, 1.0), 0.0)
    return reached, wrap_180(longitude + np.degrees(d_long_rad))


def _refuse_past_pole(to_pole_m: FloatArray, northing_m: FloatArray, distance_m: FloatArray) -> None:
    beyond = np.abs(northing_m) - to_pole_m > AT_POLE_M
    if not np.any(beyond):
        return
    index, where = first_index(beyond)
    along_m = np.broadcast_to(np.abs(distance_m) * to_pole_m / np.maximum(np.abs(northing_m), AT_POLE_M), beyond.shape)
    raise NoAnswerError(
        f"on this course{where} the pole is {along_m[index] / METRES_PER_NAUTICAL_MILE:.1f} NM off and the rhumb line "
        "ends there; give a shorter distance or another course"
    )


def _refuse_oblique_from_pole(lat_deg: FloatArray, easting_m: FloatArray) -> None:
    oblique = (np.abs(lat_deg) == 90.0) & (np.abs(easting_m) > AT_POLE_M)
    if np.any(oblique):
        raise NoAnswerError(
            f"every rhumb line from a pole{first_index(oblique)[1]} runs along a meridian; "
            "give course 180 from the north pole, 000 from the south"
        )


def points_along(
    lat1_deg: npt.ArrayLike,
    lon1_deg: npt.ArrayLike,
    lat2_deg: npt.ArrayLike,
    lon2_deg: npt.ArrayLike,
    distance_m: npt.ArrayLike,
    figure: Figure,
) -> tuple[FloatArray, FloatArray]:
    """Return the latitudes and longitudes at distances from the start of legs; distances broadcast against the legs."""
    ends = checked_ends(lat1_deg, lon1_deg, lat2_deg, lon2_deg)
    return direct(ends.lat1_deg, ends.own_meridian_deg, inverse(*ends, figure).course_deg, distance_m, figure)


def crossing_of_meridian(
    lat1_deg: npt.ArrayLike,
    lon1_deg: npt.ArrayLike,
    lat2_deg: npt.ArrayLike,
    lon2_deg: npt.ArrayLike,
    meridian_deg: npt.ArrayLike,
    figure: Figure,
) -> Crossing:
    """Return where legs cross meridians, ends included; NaN where not on the leg, or the leg runs along a meridian."""
    ends, meridian = checked_ends(lat1_deg, lon1_deg, lat2_deg, lon2_deg), checked_finite("meridian_deg", meridian_deg)
    d_long = _d_long_deg(ends)
    # Counted from the start in the leg's own sense, 0 to 360.
    ahead = np.mod(np.copysign(1.0, d_long) * (meridian - ends.lon1_deg), 360.0)
    crossed = (d_long != 0.0) & (ahead <= np.abs(d_long))
    fraction = np.where(crossed, ahead / np.where(d_long == 0.0, 1.0, np.abs(d_long)), 0.0)
    whole = _rise(ends.lat1_deg, ends.lat2_deg, ends.lat2_deg - ends.lat1_deg, figure)
    isometric = np.where(d_long == 0.0, 0.0, whole.isometric_rad) * fraction + isometric_latitude_rad(
        ends.lat1_deg, figure
    )
    latitude = np.where(fraction == 1.0, ends.lat2_deg, geographic_from_isometric_deg(isometric, figure))
    return _crossing(crossed, ends, latitude, fraction * d_long, figure)


def crossing_of_parallel(
    lat1_deg: npt.ArrayLike,
    lon1_deg: npt.ArrayLike,
    lat2_deg: npt.ArrayLike,
    lon2_deg: npt.ArrayLike,
    parallel_deg: npt.ArrayLike,
    figure: Figure,
) -> Crossing:
    """Return where legs cross parallels, ends included; NaN where not on the leg, or the leg runs along a parallel."""
    ends, parallel = checked_ends(lat1_deg, lon1_deg, lat2_deg, lon2_deg), checked_latitude_deg(parallel_deg)
    d_long = _d_long_deg(ends)
    below, above = np.minimum(ends.lat1_deg, ends.lat2_deg), np.maximum(ends.lat1_deg, ends.lat2_deg)
    crossed = (below < above) & (below <= parallel) & (parallel <= above)
    latitude = np.where(crossed, parallel, ends.lat1_deg)
    whole = _rise(ends.lat1_deg, ends.lat2_deg, ends.lat2_deg - ends.lat1_deg, figure).isometric_rad
    part = _rise(ends.lat1_deg, latitude, latitude - ends.lat1_deg, figure).isometric_rad
    oblique = (whole != 0.0) & np.isfinite(whole)
    fraction = np.where(oblique, part, 0.0) / np.where(oblique, whole, 1.0)
    return _crossing(crossed, ends, latitude, fraction * d_long, figure)


def _d_long_deg(ends: Ends) -> FloatArray:
    """Return the difference of longitude along the line: none where an end is a pole."""
    return np.where(ends.at_pole, 0.0, difference_of_longitude(ends.lon1_deg, ends.lon2_deg))


def _crossing(crossed: BoolArray, ends: Ends, lat_deg: FloatArray, d_long_deg: FloatArray, figure: Figure) -> Crossing:
    """Return the point at a latitude and a difference of longitude from the start, NaN where it is not crossed."""
    rise = _rise(ends.lat1_deg, lat_deg, lat_deg - ends.lat1_deg, figure)
    distance_m = np.hypot(rise.northing_m, rise.radius_m * np.radians(d_long_deg))
    longitude_deg = wrap_180(ends.own_meridian_deg + d_long_deg)
    return Crossing(*(np.where(crossed, value, np.nan) for value in (lat_deg, longitude_deg, distance_m)))
