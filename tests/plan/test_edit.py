"""Edits of a plan."""

from __future__ import annotations

import math
from dataclasses import replace
from datetime import UTC, datetime, timedelta
from typing import TYPE_CHECKING

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from navcore.errors import EditError
from navcore.plan import edit
from navcore.plan.model import Craft, Leg, Line, Plan, PlanText, Waypoint
from navcore.position import Position
from navcore.sailings.parts import Parts, PartsRule
from tests.strategies import legs, plans, waypoints

if TYPE_CHECKING:
    from collections.abc import Callable

SOME_PLANS = plans(max_size=5)
MANY = settings(max_examples=40, deadline=None)


NO_TEXT = PlanText()


def named(names: str, speeds_kn: tuple[float, ...], text: PlanText = NO_TEXT) -> Plan:
    points = tuple(Waypoint(name, Position(0.0, float(number)), block=name) for number, name in enumerate(names))
    return Plan(points, tuple(Leg(speed_kn=speed_kn) for speed_kn in speeds_kn), text=text)


def shape(plan: Plan) -> tuple[str, list[float | None]]:
    return "".join(point.name for point in plan.waypoints), [leg.speed_kn for leg in plan.legs]


X = Waypoint("X", Position(1.0, 2.0))


@pytest.mark.parametrize(
    ("index", "expected"),
    [
        (0, ("XABC", [None, 1.0, 2.0])),
        (1, ("AXBC", [1.0, 1.0, 2.0])),
        (2, ("ABXC", [1.0, 2.0, 2.0])),
        (3, ("ABCX", [1.0, 2.0, None])),
    ],
)
def test_an_inserted_waypoint_parts_a_leg_in_two_with_its_choices(
    index: int, expected: tuple[str, list[float | None]]
) -> None:
    assert shape(edit.insert_waypoint(named("ABC", (1.0, 2.0)), index, X)) == expected


@pytest.mark.parametrize(("index", "expected"), [(0, ("BC", [2.0])), (1, ("AC", [2.0])), (2, ("AB", [1.0]))])
def test_of_the_legs_beside_a_deleted_waypoint_the_later_ones_choices_stay(
    index: int, expected: tuple[str, list[float | None]]
) -> None:
    assert shape(edit.delete_waypoint(named("ABC", (1.0, 2.0)), index)) == expected


@pytest.mark.parametrize(
    ("index", "to_index", "expected"),
    [
        (1, 2, ("ACBD", [2.0, 1.0, 3.0])),
        (3, 1, ("ADBC", [3.0, 1.0, 2.0])),
        (2, 0, ("CABD", [2.0, 1.0, 3.0])),
        (0, 2, ("BCAD", [2.0, 1.0, 3.0])),
        (0, 3, ("BCDA", [2.0, 3.0, 1.0])),
        (2, 2, ("ABCD", [1.0, 2.0, 3.0])),
    ],
)
def test_a_moved_waypoint_takes_the_leg_that_ends_at_it_along(
    index: int, to_index: int, expected: tuple[str, list[float | None]]
) -> None:
    assert shape(edit.move_waypoint(named("ABCD", (1.0, 2.0, 3.0)), index, to_index)) == expected


def test_a_duplicate_stands_after_the_original_with_a_leg_of_no_choices() -> None:
    doubled = edit.duplicate_waypoint(named("ABC", (1.0, 2.0)), 1)
    assert shape(doubled) == ("ABBC", [1.0, None, 2.0])
    assert [point.block for point in doubled.waypoints] == ["A", "B", "", "C"]


@pytest.mark.parametrize("index", [0, 1, 2])
def test_a_duplicate_of_any_waypoint_can_be_deleted_again(index: int) -> None:
    plan = named("ABC", (1.0, 2.0))
    assert edit.delete_waypoint(edit.duplicate_waypoint(plan, index), index + 1) == plan


def test_a_waypoint_that_is_set_keeps_the_block_of_its_file() -> None:
    changed = edit.set_waypoint(named("ABC", (1.0, 2.0)), 1, X)
    assert shape(changed) == ("AXC", [1.0, 2.0])
    assert changed.waypoints[1].block == "B"


def test_blocks_that_are_no_waypoints_keep_their_place() -> None:
    text = PlanText(between=((1, "one"), (3, "end")))
    plan = named("ABC", (1.0, 2.0), text)
    assert edit.insert_waypoint(plan, 0, X).text.between == ((2, "one"), (4, "end"))
    assert edit.insert_waypoint(plan, 1, X).text.between == ((1, "one"), (4, "end"))
    assert edit.insert_waypoint(plan, 3, X).text.between == ((1, "one"), (4, "end"))
    assert edit.delete_waypoint(plan, 0).text.between == ((0, "one"), (2, "end"))
    assert edit.delete_waypoint(plan, 2).text.between == ((1, "one"), (2, "end"))
    for index in range(4):
        assert edit.delete_waypoint(edit.insert_waypoint(plan, index, X), index).text == text


@given(SOME_PLANS, waypoints, st.data())
@MANY
def test_delete_after_insert_gives_the_plan(plan: Plan, waypoint: Waypoint, data: st.DataObject) -> None:
    index = data.draw(st.integers(0, len(plan.waypoints)))
    longer = edit.insert_waypoint(plan, index, waypoint)
    assert longer.waypoints[index] == waypoint
    assert len(longer.legs) == len(longer.waypoints) - 1
    assert edit.delete_waypoint(longer, index) == plan


@given(plans(min_size=1, max_size=5), st.data())
@MANY
def test_moving_there_and_back_gives_the_plan(plan: Plan, data: st.DataObject) -> None:
    index, to_index = data.draw(st.tuples(*[st.integers(0, len(plan.waypoints) - 1)] * 2))
    moved = edit.move_waypoint(plan, index, to_index)
    assert moved.waypoints[to_index] == plan.waypoints[index]
    assert edit.move_waypoint(moved, to_index, index) == plan


@given(SOME_PLANS)
@MANY
def test_reversing_twice_gives_the_plan(plan: Plan) -> None:
    turned = edit.reverse(plan)
    assert turned.waypoints == plan.waypoints[::-1]
    assert edit.reverse(turned) == plan


@given(plans(min_size=2, max_size=4), legs())
@MANY
def test_a_leg_is_set_and_set_back(plan: Plan, leg: Leg) -> None:
    changed = edit.set_leg(plan, 0, leg)
    assert changed.legs[0] == leg
    assert edit.set_leg(changed, 0, plan.legs[0]) == plan


def test_an_edit_leaves_the_plan_before_as_it_was() -> None:
    plan = named("ABC", (1.0, 2.0))
    edit.set_plan(edit.reverse(edit.delete_waypoint(plan, 0)), title="other")
    assert plan == named("ABC", (1.0, 2.0))


@pytest.mark.parametrize("index", [-1, 3, 99])
@pytest.mark.parametrize(
    "change",
    [
        edit.delete_waypoint,
        lambda plan, index: edit.move_waypoint(plan, index, 0),
        lambda plan, index: edit.move_waypoint(plan, 0, index),
        edit.duplicate_waypoint,
        lambda plan, index: edit.set_waypoint(plan, index, X),
    ],
)
def test_an_index_that_is_not_in_the_plan_is_refused_with_those_that_are(
    index: int, change: Callable[[Plan, int], Plan]
) -> None:
    with pytest.raises(EditError, match="allowed: 0 to 2"):
        change(named("ABC", (1.0, 2.0)), index)


def test_the_places_for_a_new_waypoint_and_for_a_leg_are_named_too() -> None:
    plan = named("ABC", (1.0, 2.0))
    with pytest.raises(EditError, match="allowed: 0 to 3"):
        edit.insert_waypoint(plan, 4, X)
    with pytest.raises(EditError, match="allowed: 0 to 1"):
        edit.set_leg(plan, 2, Leg())
    with pytest.raises(EditError, match="the plan has none"):
        edit.delete_waypoint(Plan(), 0)


@pytest.mark.parametrize(
    "leg",
    [
        Leg(line=Line.COMPOSITE),
        Leg(limit_deg=90.5),
        Leg(limit_deg=math.nan),
        Leg(speed_kn=0.0),
        Leg(speed_kn=math.nan),
        Leg(speed_kn=math.inf),
        Leg(parts=Parts(PartsRule.NUMBER, 2.5)),
        Leg(parts=Parts(PartsRule.LONGITUDE, 0.0)),
        Leg(parts=Parts(PartsRule.DISTANCE, math.inf)),
    ],
)
def test_a_leg_that_a_plan_file_could_not_say_is_refused(leg: Leg) -> None:
    with pytest.raises(EditError):
        edit.set_leg(named("ABC", (1.0, 2.0)), 0, leg)


@pytest.mark.parametrize(
    "waypoint",
    [
        replace(X, position=Position(90.1, 0.0)),
        replace(X, position=Position(math.nan, 0.0)),
        replace(X, position=Position(0.0, 181.0)),
        replace(X, stay=timedelta(hours=-1)),
        replace(X, stay=timedelta(days=10000)),
    ],
)
def test_a_waypoint_that_a_plan_file_could_not_say_is_refused(waypoint: Waypoint) -> None:
    plan = named("ABC", (1.0, 2.0))
    with pytest.raises(EditError):
        edit.set_waypoint(plan, 0, waypoint)
    with pytest.raises(EditError):
        edit.insert_waypoint(plan, 0, waypoint)


def test_what_is_said_of_the_whole_is_set_or_refused() -> None:
    plan = edit.set_plan(named("AB", (1.0,)), title="T", speed_kn=12.0)
    assert (plan.title, plan.speed_kn) == ("T", 12.0)
    with pytest.raises(EditError, match="zone"):
        edit.set_plan(plan, departure=datetime(2027, 3, 4, 14, tzinfo=UTC).replace(tzinfo=None))
    with pytest.raises(EditError, match="revision"):
        edit.set_plan(plan, revision=0)
    with pytest.raises(EditError, match="speed"):
        edit.set_plan(plan, speed_kn=-1.0)
    with pytest.raises(EditError, match="column"):
        edit.set_plan(plan, columns=("a", "a"))
    with pytest.raises(EditError, match="draught"):
        edit.set_plan(plan, craft=Craft(draught_m=math.nan))
