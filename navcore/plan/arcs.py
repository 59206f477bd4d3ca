"""A leg as lines that can be laid off on a chart."""

from __future__ import annotations

from typing import TYPE_CHECKING

from navcore.charts.track import Arc
from navcore.plan.model import Line

if TYPE_CHECKING:
    from navcore.plan.solve import Solution


def arcs_of(solution: Solution, index: int) -> tuple[Arc, ...]:
    """Return the lines of a leg as it really runs: one, or the three of a composite; its parts are not looked at."""
    leg = solution.legs[index]
    start, end = (waypoint.position for waypoint in solution.plan.waypoints[index : index + 2])
    if leg.composite is not None and leg.composite.tangent_points:
        reached, left = leg.composite.tangent_points
        pieces = (
            Arc(start, reached, great_circle=True),
            Arc(reached, left, great_circle=False),
            Arc(left, end, great_circle=True),
        )
        return tuple(arc for arc in pieces if arc.start != arc.end)
    return (Arc(start, end, great_circle=leg.line is not Line.RHUMB),)
