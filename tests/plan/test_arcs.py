"""A leg as lines to be laid off."""

from __future__ import annotations

from navcore.charts.track import Arc
from navcore.plan.arcs import arcs_of
from navcore.plan.model import Leg, Line, Plan, Waypoint
from navcore.plan.solve import solve
from navcore.position import Position

START, END = Position(48.5, -125.0), Position(41.0, 143.0)


def arcs(leg: Leg) -> tuple[Arc, ...]:
    return arcs_of(solve(Plan((Waypoint("", START), Waypoint("", END)), (leg,))), 0)


def test_a_rhumb_line_and_a_great_circle_are_one_arc_each() -> None:
    assert arcs(Leg()) == (Arc(START, END, great_circle=False),)
    assert arcs(Leg(Line.GREAT_CIRCLE)) == (Arc(START, END, great_circle=True),)


def test_a_composite_is_two_great_circles_and_the_parallel_between() -> None:
    first, along, last = arcs(Leg(Line.COMPOSITE, limit_deg=50.0))
    assert [arc.great_circle for arc in (first, along, last)] == [True, False, True]
    assert (first.start, last.end) == (START, END)
    assert along.start.lat_deg == along.end.lat_deg == 50.0
    assert (first.end, along.end) == (along.start, last.start)


def test_a_composite_that_its_limit_does_not_touch_is_the_great_circle() -> None:
    assert arcs(Leg(Line.COMPOSITE, limit_deg=80.0)) == (Arc(START, END, great_circle=True),)
