"""How long a plan of split legs takes to solve."""

from __future__ import annotations

from functools import partial

import numpy as np

from navcore.plan.model import Leg, Line, Plan, Waypoint
from navcore.plan.solve import solve
from navcore.position import Position
from navcore.sailings.parts import parse_parts
from tests.support import best_of


def test_a_hundred_legs_in_parts() -> None:
    random = np.random.default_rng(1)
    waypoints = tuple(
        Waypoint(str(number), Position(random.uniform(-60.0, 60.0), random.uniform(-180.0, 180.0)))
        for number in range(101)
    )
    for rule in ("1 NM apart", "10° longitude", "300 NM", "12 parts"):
        plan = Plan(waypoints, (Leg(Line.GREAT_CIRCLE, parts=parse_parts(rule)),) * 100)
        seconds = best_of(partial(solve, plan), 2)
        print(f"\n100 legs in parts, {rule}: {seconds:.2f} s")
