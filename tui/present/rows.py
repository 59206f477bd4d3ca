"""The rows of a plan as they stand under each other: a waypoint, the leg to the next, ..., and one row to add to."""

from __future__ import annotations

from enum import Enum, auto
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from navcore.plan.model import Plan


class RowKind(Enum):
    """What stands on a row."""

    WAYPOINT = auto()
    LEG = auto()
    END = auto()


def row_count(plan: Plan) -> int:
    """Return how many rows a plan has: a waypoint each, a leg between two, and the one at the end."""
    return max(2 * len(plan.waypoints), 1)


def kind_of(plan: Plan, row: int) -> RowKind:
    """Return what stands on a row."""
    if row == row_count(plan) - 1:
        return RowKind.END
    return RowKind.LEG if row % 2 else RowKind.WAYPOINT


def row_of_waypoint(index: int) -> int:
    """Return the row of a waypoint."""
    return 2 * index


def end_row(plan: Plan) -> int:
    """Return the row at the end, where a waypoint is added."""
    return row_count(plan) - 1


def waypoint_of(plan: Plan, row: int) -> int | None:
    """Return the index of the waypoint on a row; None on any other."""
    return row // 2 if kind_of(plan, row) is RowKind.WAYPOINT else None


def leg_of(plan: Plan, row: int) -> int | None:
    """Return the leg that a row shows the working of: its own, or the one that ends at its waypoint; None for none."""
    if not plan.legs:
        return None
    if kind_of(plan, row) is RowKind.LEG:
        return row // 2
    return min(max((row + 1) // 2 - 1, 0), len(plan.legs) - 1)


def place_below(plan: Plan, row: int) -> int:
    """Return the index that a waypoint gets which is added below a row."""
    return min((row + 2) // 2, len(plan.waypoints))


def place_above(plan: Plan, row: int) -> int:
    """Return the index that a waypoint gets which is added above a row."""
    return min((row + 1) // 2, len(plan.waypoints))


def waypoint_before(plan: Plan, row: int) -> int | None:
    """Return the waypoint of a row, or the last one above it; None in an empty plan."""
    return min(row // 2, len(plan.waypoints) - 1) if plan.waypoints else None
