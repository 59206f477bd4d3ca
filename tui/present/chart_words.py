"""What is said below the chart: the place under the cross, where it lies from the waypoint, and what chart it is."""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.lines import great_circle, rhumb_line
from navcore.prints.projection_words import format_convergence, true_scale_words
from navcore.text.direction import format_direction
from navcore.text.distance import format_distance
from navcore.text.number import format_number
from navcore.text.plain import cell_width, fit, visible
from navcore.text.position import format_position
from tui.present.rows import waypoint_before
from tui.present.tone import Piece, Tone, line

if TYPE_CHECKING:
    from collections.abc import Iterator

    from navcore.plan.solve import Solution
    from navcore.position import Position
    from tui.present.chart_view import View
    from tui.present.tone import Line

NOT_FOR_NAVIGATION = "shore: not for navigation"

_HERE_M = 0.05 * METRES_PER_NAUTICAL_MILE
"""Nearer than this a distance is printed as 0.0 NM."""
_SHORTEST_NAME = 8


def readout(solution: Solution, view: View, row: int, cells: int) -> list[Line]:
    """Return the three lines below the chart, each as full as it has room for.

    Args:
        solution: The plan.
        view: What is seen; its cross is what is read.
        row: The row of the shared cursor, whose waypoint the bearing is from.
        cells: How wide a line may be.
    """
    position = view.position
    return [
        line(Piece(_first_that_fits(_of_place(view, position), cells), Tone.STRONG)),
        line(_first_that_fits(_from_waypoint(solution, row, position, cells), cells)),
        line(Piece(_first_that_fits(_of_projection(view), cells), Tone.QUIET)),
    ]


def _first_that_fits(texts: Iterator[str], cells: int) -> str:
    """Return the first text that has room; the last, cut, where none has."""
    text = ""
    for text in texts:
        if cell_width(text) <= cells:
            return text
    return fit(text, cells)


def _of_place(view: View, position: Position | None) -> Iterator[str]:
    if position is None:
        yield "nothing of the Earth is shown here"
        return
    place = format_position(position)
    factor = float(view.projection.scale_factor(*position))
    if not view.projection.conformal:
        yield f"{place}   angles and distances can't be measured on this chart"
    elif math.isfinite(factor):
        convergence = format_convergence(float(view.projection.convergence_deg(*position)))
        yield f"{place}   scale factor {format_number(factor, 4)}   convergence {convergence}"
    else:
        yield f"{place}   the chart has no scale here"
    yield place


def _from_waypoint(solution: Solution, row: int, position: Position | None, cells: int) -> Iterator[str]:
    plan = solution.plan
    index = waypoint_before(plan, row)
    if index is None:
        yield "a adds the first waypoint at the cross"
        return
    waypoint = plan.waypoints[index]
    called = f"{index + 1} {visible(waypoint.name)}".strip()
    if position is None:
        yield f"from {called}: none"
        return
    ends = (*waypoint.position, *position)
    circle, rhumb = great_circle.inverse(*ends, plan.figure), rhumb_line.inverse(*ends, plan.figure)
    if float(circle.distance_m) < _HERE_M:
        yield f"on waypoint {called}"
        return
    by_rhumb = _course_and_distance(float(rhumb.course_deg), float(rhumb.distance_m))
    by_circle = _course_and_distance(float(circle.initial_course_deg), float(circle.distance_m))
    yield f"from {called}: rhumb line {by_rhumb}, great circle {by_circle}"
    both = f"RL {by_rhumb}  GC {by_circle}"
    room = cells - cell_width(both) - cell_width("from : ")
    if room >= _SHORTEST_NAME:
        yield f"from {fit(called, room)}: {both}"
    yield f"{index + 1}: {both}"
    yield f"{index + 1}: RL {by_rhumb}"
    yield f"RL {by_rhumb}"


def _course_and_distance(course_deg: float, distance_m: float) -> str:
    return f"{format_direction(course_deg)} {format_distance(distance_m / METRES_PER_NAUTICAL_MILE)}"


def _of_projection(view: View) -> Iterator[str]:
    projection = view.projection
    true_at = f"{projection.name}, true at {true_scale_words(projection)}"
    for name in (true_at, projection.name):
        for drawn in ("rhumb lines whole, great circles broken", "RL whole, GC broken"):
            yield f"{name} · {drawn} · {NOT_FOR_NAVIGATION}"
    yield f"{projection.name} · {NOT_FOR_NAVIGATION}"
    yield NOT_FOR_NAVIGATION
