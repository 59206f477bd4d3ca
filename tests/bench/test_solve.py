"""A plan of 1,000 legs: solved from nothing, and after one edit, beside geographiclib's scalar inverse in one run."""

from __future__ import annotations

from typing import TYPE_CHECKING

from geographiclib.geodesic import Geodesic

from navcore.plan.edit import set_waypoint
from navcore.plan.model import Leg, Line, Plan, Waypoint
from navcore.plan.solve import solve
from navcore.position import Position
from tests.support import best_of

if TYPE_CHECKING:
    import pytest

LEGS = 1000


def plan_of_many() -> Plan:
    waypoints = tuple(
        Waypoint(f"W{index}", Position(-60.0 + 0.12 * index, -170.0 + 0.31 * index)) for index in range(LEGS + 1)
    )
    return Plan(waypoints, tuple(Leg(Line.GREAT_CIRCLE if index % 2 else None) for index in range(LEGS)), speed_kn=12.0)


def test_solve(capsys: pytest.CaptureFixture[str]) -> None:
    plan = plan_of_many()
    first = solve(plan)
    middle = plan.waypoints[LEGS // 2]
    moved = Waypoint(middle.name, Position(middle.position.lat_deg + 0.1, middle.position.lon_deg))
    edited = set_waypoint(plan, LEGS // 2, moved)
    pairs = [(*a.position, *b.position) for a, b in zip(plan.waypoints, plan.waypoints[1:], strict=False)]
    scalar_s = best_of(lambda: [Geodesic.WGS84.Inverse(*pair) for pair in pairs])
    nothing_s = best_of(lambda: solve(plan))
    edit_s = best_of(lambda: solve(edited, first))
    with capsys.disabled():
        print(f"\n{LEGS} legs solved from nothing: {nothing_s * 1e3:.1f} ms, {nothing_s / scalar_s:.2f} times as many")
        print(f"scalar geographiclib inverses; after one edit: {edit_s * 1e3:.1f} ms, {edit_s / scalar_s:.3f} times")
