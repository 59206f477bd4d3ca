"""Composites and legs in parts as they are sailed in a plan."""

from __future__ import annotations

from dataclasses import replace

import pytest

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.earth.figure import WGS_84
from navcore.plan.edit import set_leg, set_waypoint
from navcore.plan.leg_words import SPLIT_FIRST, track_of
from navcore.plan.model import Leg, Line, Plan, Waypoint
from navcore.plan.quantities import QUANTITIES
from navcore.plan.solve import solve
from navcore.position import Position
from navcore.sailings.composite import composite
from navcore.sailings.parts import parse_parts
from navcore.sailings.split import split_composite, split_great_circle

SALAL = Waypoint("Salal Roads", Position(48.5, -125.0 - 20.0 / 60.0))
KUROMATSU = Waypoint("Kuromatsu Bay", Position(41.0 + 20.0 / 60.0, 143.0))
NEAR = Waypoint("Near", Position(40.0, 140.0))
ONE_APART = parse_parts("1 NM apart")


def plan_of(*legs: Leg) -> Plan:
    return Plan((SALAL, KUROMATSU, NEAR)[: len(legs) + 1], legs, speed_kn=13.5)


def test_a_composite_is_sailed_as_it_is_worked() -> None:
    (leg,) = solve(plan_of(Leg(Line.COMPOSITE, 50.0))).legs
    track = composite(SALAL.position, KUROMATSU.position, 50.0, WGS_84)
    assert leg.composite == track
    assert (leg.course_deg, leg.end_course_deg) == (track.initial_course_deg, track.final_course_deg)
    assert leg.distance_m == track.distance_m
    assert leg.refusal is None


def test_a_composite_that_cannot_be_is_refused_and_leaves_the_total_open() -> None:
    solution = solve(plan_of(Leg(Line.COMPOSITE, 45.0), Leg()))
    leg = solution.legs[0]
    assert (leg.course_deg, leg.distance_m, leg.composite) == (None, None, None)
    assert "equatorward of an end" in (leg.refusal or "")
    assert solution.total_m is None
    assert track_of(solution, 0) is None


def test_parts_are_what_is_sailed_and_totalled() -> None:
    split = solve(plan_of(Leg(Line.GREAT_CIRCLE, parts=ONE_APART), Leg()))
    parts = split_great_circle(SALAL.position, KUROMATSU.position, WGS_84, ONE_APART)
    leg = split.legs[0]
    assert leg.parts == parts
    assert leg.distance_m == parts.distance_m > leg.worked.great_circle_distance_m
    assert (leg.course_deg, leg.end_course_deg) == (leg.worked.initial_course_deg, leg.worked.final_course_deg)
    assert (leg.first_course_deg, leg.last_course_deg) == (parts.courses_deg[0], parts.courses_deg[-1])
    assert split.total_m == pytest.approx(parts.distance_m + (split.legs[1].distance_m or 0.0))
    track = track_of(split, 0)
    assert track is not None
    assert track.length_m == pytest.approx(parts.distance_m, abs=1e-6)


def test_the_alteration_is_from_the_course_steered_last() -> None:
    split, whole = (
        solve(plan_of(Leg(Line.GREAT_CIRCLE, parts=parts), Leg())) for parts in (parse_parts("10° longitude"), None)
    )
    alteration = QUANTITIES["alteration_deg"].value
    before, after = alteration(whole, 1), alteration(split, 1)
    assert isinstance(before, float)
    assert isinstance(after, float)
    assert after - before == pytest.approx(229.04 - (split.legs[0].last_course_deg or 0.0), abs=0.01)


def test_parts_of_a_rhumb_line_are_the_rhumb_line() -> None:
    (leg,) = solve(plan_of(Leg(Line.RHUMB, parts=ONE_APART))).legs
    assert leg.parts is None
    assert QUANTITIES["steering"].value(solve(plan_of(Leg(Line.RHUMB, parts=ONE_APART))), 0) == ""


def test_split_first_is_said_only_where_a_line_is_not_split() -> None:
    said = QUANTITIES["steering"].value
    for line in (Line.GREAT_CIRCLE, Line.COMPOSITE):
        assert said(solve(plan_of(Leg(line, 50.0))), 0) == SPLIT_FIRST
        words = said(solve(plan_of(Leg(line, 50.0, ONE_APART))), 0)
        assert isinstance(words, str)
        assert "1 NM apart" in words
        assert "from the true line" in words


def test_a_rule_that_cannot_be_followed_refuses_the_leg() -> None:
    (leg,) = solve(plan_of(Leg(Line.COMPOSITE, 50.0, parse_parts("2 parts")))).legs
    assert "3 parts or more" in (leg.refusal or "")
    assert leg.distance_m is None


def test_a_leg_of_no_length_has_no_parts() -> None:
    for line in (Line.GREAT_CIRCLE, Line.COMPOSITE):
        plan = Plan((SALAL, SALAL), (Leg(line, 50.0, ONE_APART),))
        (leg,) = solve(plan).legs
        assert (leg.distance_m, leg.course_deg, leg.parts) == (0.0, None, None)


def test_split_legs_are_taken_over_until_what_decides_them_changes(monkeypatch: pytest.MonkeyPatch) -> None:
    plan = plan_of(Leg(Line.COMPOSITE, 50.0, ONE_APART), Leg())
    first = solve(plan)
    sailed: list[object] = []
    worker = split_composite

    def counting(*arguments: object) -> object:
        sailed.append(arguments)
        return worker(*arguments)  # type: ignore[arg-type]  # passed on as it came

    monkeypatch.setattr("navcore.plan.solve.split_composite", counting)
    other_end = set_waypoint(plan, 2, Waypoint("Elsewhere", Position(39.0, 141.0)))
    other_speed = set_leg(plan, 0, replace(plan.legs[0], speed_kn=11.0))
    for edited in (other_end, other_speed):
        again = solve(edited, first)
        assert sailed == []
        assert again.legs[0] is first.legs[0]
    for leg in (Leg(Line.COMPOSITE, 51.0, ONE_APART), Leg(Line.COMPOSITE, 50.0, parse_parts("12 parts"))):
        edited = set_leg(plan, 0, leg)
        assert solve(edited, first) == solve(edited)
    assert len(sailed) == 4


def test_crossings_of_the_equator_and_180_are_said_of_what_is_sailed() -> None:
    hawaii, auckland = Position(21.0 + 10.0 / 60.0, -(157.0 + 55.0 / 60.0)), Position(-36.0, 175.0 + 10.0 / 60.0)
    plan = Plan((Waypoint("A", hawaii), Waypoint("B", auckland)), (Leg(Line.RHUMB),))
    said = QUANTITIES["crossings"].value(solve(plan), 0)
    assert said == "crosses the equator in 167°35.1'W after 1386.0 NM; crosses 180° in 26°47.1'S after 3140.3 NM"
    back = Plan(plan.waypoints[::-1], plan.legs)
    words = QUANTITIES["crossings"].value(solve(back), 0)
    assert isinstance(words, str)
    assert words.startswith("crosses 180°")
    assert QUANTITIES["crossings"].value(solve(plan_of(Leg(), Leg())), 1) == ""


def test_a_split_composite_keeps_its_tangent_points() -> None:
    (leg,) = solve(plan_of(Leg(Line.COMPOSITE, 50.0, ONE_APART))).legs
    assert leg.composite is not None
    assert leg.parts is not None
    assert leg.parts == split_composite(leg.composite, ONE_APART)
    assert set(leg.composite.tangent_points) <= set(leg.parts.points)
    assert (leg.distance_m or 0.0) / METRES_PER_NAUTICAL_MILE == pytest.approx(3753.2, abs=0.2)
