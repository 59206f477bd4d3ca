"""Grid courses, which hold nearly still along a great circle where the true course turns.

The sign rule: grid course = true course - convergence. On a north polar stereographic sheet whose grid is parallel to
the meridian of Greenwich the convergence is the longitude, east positive, so grid = true + west longitude or true -
east longitude; in the south it is the other way round. On a Lambert sheet longitude is counted from the central
meridian and multiplied by the constant of the cone.

Source: AFPAM 11-216, Air Navigation, paragraph 14.7, and FAA-H-8083-18, Flight Navigator Handbook, chapter 14.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, NamedTuple

from navcore.angles import wrap_360
from navcore.charts.lambert import Lambert
from navcore.errors import RangeError
from navcore.lines.leg import checked_finite

if TYPE_CHECKING:
    import numpy.typing as npt

    from navcore.charts.stereographic import Stereographic
    from navcore.trigonometry import FloatArray


class GridCourses(NamedTuple):
    """Convergence and grid course at both ends of legs.

    Attributes:
        start_convergence_deg: Bearing of grid north from true north where the leg starts, (-180, 180].
        start_course_deg: Grid course there, [0, 360).
        end_convergence_deg: Likewise where it ends.
        end_course_deg: Likewise.
    """

    start_convergence_deg: FloatArray
    start_course_deg: FloatArray
    end_convergence_deg: FloatArray
    end_course_deg: FloatArray


def grid_course_deg(
    true_course_deg: npt.ArrayLike, lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike, projection: Lambert | Stereographic
) -> FloatArray:
    """Return the grid course, [0, 360), of a true course at a place.

    Raises:
        RangeError: The projection is an oblique stereographic, which has no sign rule for a grid.
    """
    _refuse_oblique(projection)
    return wrap_360(checked_finite("true_course_deg", true_course_deg) - projection.convergence_deg(lat_deg, lon_deg))


def true_course_deg(
    grid_course_deg: npt.ArrayLike, lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike, projection: Lambert | Stereographic
) -> FloatArray:
    """Return the true course, [0, 360), of a grid course at a place.

    Raises:
        RangeError: The projection is an oblique stereographic, which has no sign rule for a grid.
    """
    _refuse_oblique(projection)
    return wrap_360(checked_finite("grid_course_deg", grid_course_deg) + projection.convergence_deg(lat_deg, lon_deg))


def grid_courses(
    start: tuple[npt.ArrayLike, npt.ArrayLike, npt.ArrayLike],
    end: tuple[npt.ArrayLike, npt.ArrayLike, npt.ArrayLike],
    projection: Lambert | Stereographic,
) -> GridCourses:
    """Return convergence and grid course at both ends of legs.

    Args:
        start: Latitude, longitude and true course where the legs start.
        end: The same where they end.
        projection: Whose grid.
    """
    (lat1_deg, lon1_deg, course1_deg), (lat2_deg, lon2_deg, course2_deg) = start, end
    return GridCourses(
        projection.convergence_deg(lat1_deg, lon1_deg),
        grid_course_deg(course1_deg, lat1_deg, lon1_deg, projection),
        projection.convergence_deg(lat2_deg, lon2_deg),
        grid_course_deg(course2_deg, lat2_deg, lon2_deg, projection),
    )


def sign_rule(projection: Lambert | Stereographic) -> str:
    """Return how a grid course is got from a true one on this sheet, in one sentence."""
    _refuse_oblique(projection)
    north = projection.cone > 0.0 if isinstance(projection, Lambert) else projection.centre_lat_deg > 0.0
    factor = f"{abs(projection.cone):.6f} × " if isinstance(projection, Lambert) else ""
    meridian = f"{abs(projection.central_lon_deg):g}°{'W' if projection.central_lon_deg < 0.0 else 'E'}"
    west, east = ("+", "−") if north else ("−", "+")
    return (
        f"Grid course = true course {west} {factor}longitude west of {meridian}, {east} {factor}longitude east of it "
        f"({'northern' if north else 'southern'} sheet; grid north is parallel to that meridian)"
    )


def has_grid(projection: Lambert | Stereographic) -> bool:
    """Return whether a projection's convergence follows the sign rule: a Lambert, or a stereographic of a pole."""
    return isinstance(projection, Lambert) or projection.is_polar


def _refuse_oblique(projection: Lambert | Stereographic) -> None:
    if not isinstance(projection, Lambert) and not projection.is_polar:
        raise RangeError(
            "centre_lat_deg", projection.centre_lat_deg, "90 or -90: a grid is on a polar sheet or a Lambert"
        )
