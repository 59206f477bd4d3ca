"""Grid courses of a plan's legs on a polar stereographic or Lambert sheet: as figures and as printed."""

from __future__ import annotations

from typing import TYPE_CHECKING, NamedTuple

from navcore.charts.grid import grid_courses, has_grid
from navcore.charts.lambert import Lambert
from navcore.charts.stereographic import Stereographic
from navcore.prints.projection_words import format_convergence
from navcore.prints.sheets.table import Table
from navcore.text.direction import format_direction

if TYPE_CHECKING:
    from navcore.charts.projection import Projection
    from navcore.plan.solve import Solution


class GridLeg(NamedTuple):
    """A leg's convergence and grid course at both ends.

    Attributes:
        leg: From 1.
        start_convergence_deg: Bearing of grid north from true north where it starts.
        start_grid_course_deg: [0, 360).
        end_convergence_deg: Likewise where it ends.
        end_grid_course_deg: [0, 360).
    """

    leg: int
    start_convergence_deg: float
    start_grid_course_deg: float
    end_convergence_deg: float
    end_grid_course_deg: float


def grid_legs(solution: Solution, projection: Projection) -> tuple[GridLeg, ...]:
    """Return the grid courses of the legs that have a course; none on a projection without a grid."""
    if not isinstance(projection, Lambert | Stereographic) or not has_grid(projection):
        return ()
    found = []
    points = [waypoint.position for waypoint in solution.plan.waypoints]
    for number, (leg, start, end) in enumerate(zip(solution.legs, points, points[1:], strict=False), 1):
        if leg.course_deg is None or leg.end_course_deg is None:
            continue
        # At a pole the longitude is that of the meridian the leg runs on there.
        start_lon_deg = end.lon_deg if abs(start.lat_deg) == 90.0 else start.lon_deg
        end_lon_deg = start.lon_deg if abs(end.lat_deg) == 90.0 else end.lon_deg
        grid = grid_courses(
            (start.lat_deg, start_lon_deg, leg.course_deg), (end.lat_deg, end_lon_deg, leg.end_course_deg), projection
        )
        found.append(GridLeg(number, *(float(value) for value in grid)))
    return tuple(found)


def grid_table(solution: Solution, projection: Projection) -> Table | None:
    """Return the grid courses as a table; None on a projection without a grid."""
    legs = grid_legs(solution, projection)
    if not legs:
        return None
    rows = tuple(
        (
            str(leg.leg),
            format_convergence(leg.start_convergence_deg),
            format_direction(leg.start_grid_course_deg, "G"),
            format_convergence(leg.end_convergence_deg),
            format_direction(leg.end_grid_course_deg, "G"),
        )
        for leg in legs
    )
    return Table(
        "Grid courses of the legs: grid = true − convergence (E +)",
        ("leg", "start: convergence", "course", "end: convergence", "course"),
        rows,
    )
