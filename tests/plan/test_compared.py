"""A plan's legs by every line."""

from __future__ import annotations

import pytest

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.earth.figure import SPHERE
from navcore.plan.compared import compare_plan
from navcore.plan.model import Leg, Line, Plan, Waypoint
from navcore.plan.solve import solve
from navcore.position import Position
from navcore.sailings.parts import parse_parts

SALAL = Waypoint("Salal Roads", Position(48.5, -125.0 - 20.0 / 60.0))
KUROMATSU = Waypoint("Kuromatsu Bay", Position(41.0 + 20.0 / 60.0, 143.0))
HAWAII = Waypoint("A", Position(21.0 + 10.0 / 60.0, -(157.0 + 55.0 / 60.0)))
AUCKLAND = Waypoint("B", Position(-36.0, 175.0 + 10.0 / 60.0))


def nmi(distance_m: float | None) -> float:
    assert distance_m is not None
    return distance_m / METRES_PER_NAUTICAL_MILE


def test_the_north_pacific_by_every_line() -> None:
    plan = Plan((SALAL, KUROMATSU), (Leg(Line.COMPOSITE, 50.0),), speed_kn=13.5, figure=SPHERE)
    compared = compare_plan(solve(plan))
    (leg,) = compared.legs
    assert nmi(leg.rhumb_line.distance_m) == pytest.approx(3910.9, abs=0.06)
    assert nmi(leg.great_circle.distance_m) == pytest.approx(3678.2, abs=0.06)
    assert nmi(leg.sailed.distance_m) == pytest.approx(3740.0, abs=0.06)
    assert leg.composite == leg.sailed
    assert nmi(leg.saving_m) == pytest.approx(3910.9 - 3740.0, abs=0.1)
    assert leg.saving_hours == pytest.approx(170.9 / 13.5, abs=0.02)
    assert leg.rhumb_line.highest_lat_deg == 48.5
    assert leg.great_circle.highest_lat_deg == pytest.approx(55.0 + 27.6 / 60.0, abs=0.01)
    assert leg.sailed.highest_lat_deg == 50.0
    assert nmi(leg.greatest_separation_m) > 600.0
    assert compared.sailed == leg.sailed
    assert compared.saving_hours == leg.saving_hours


def test_the_sphere_and_wgs_84_differ_by_more_than_the_lines_across_the_equator() -> None:
    compared = compare_plan(solve(Plan((HAWAII, AUCKLAND), (Leg(Line.GREAT_CIRCLE),))))
    assert nmi(compared.sphere_less_wgs_84_m) == pytest.approx(3755.0 - 3743.8, abs=0.1)
    assert nmi(compared.rhumb_line.distance_m) - nmi(compared.great_circle.distance_m) == pytest.approx(1.3, abs=0.06)
    assert compared.legs[0].sailed.highest_lat_deg == -36.0
    assert compared.saving_hours is None


def test_the_difference_of_the_figures_is_the_same_whichever_the_plan_is_on() -> None:
    legs = (Leg(Line.GREAT_CIRCLE, parts=parse_parts("12 parts")),)
    on_sphere, on_wgs_84 = (
        compare_plan(solve(Plan((SALAL, KUROMATSU), legs, figure=figure))) for figure in (SPHERE, Plan().figure)
    )
    assert on_sphere.sphere_less_wgs_84_m == pytest.approx(on_wgs_84.sphere_less_wgs_84_m)
    assert nmi(on_sphere.sailed.distance_m) - nmi(on_wgs_84.sailed.distance_m) == pytest.approx(
        nmi(on_sphere.sphere_less_wgs_84_m)
    )


def test_totals_are_sums_and_the_highest_of_all() -> None:
    plan = Plan((SALAL, KUROMATSU, HAWAII, AUCKLAND), (Leg(Line.GREAT_CIRCLE), Leg(), Leg()), speed_kn=12.0)
    compared = compare_plan(solve(plan))
    for line in ("sailed", "rhumb_line", "great_circle"):
        total = sum(nmi(getattr(leg, line).distance_m) for leg in compared.legs)
        assert nmi(getattr(compared, line).distance_m) == pytest.approx(total)
    assert compared.sailed.highest_lat_deg == compared.legs[0].great_circle.highest_lat_deg
    assert compared.rhumb_line.highest_lat_deg == 48.5
    assert compared.greatest_separation_m == max(leg.greatest_separation_m for leg in compared.legs)
    assert compared.time is not None


def test_a_refused_leg_leaves_its_own_figures_and_the_totals_open() -> None:
    plan = Plan((SALAL, KUROMATSU, HAWAII), (Leg(Line.COMPOSITE, 45.0), Leg()), speed_kn=12.0)
    compared = compare_plan(solve(plan))
    assert compared.legs[0].sailed.distance_m is None
    assert compared.legs[0].saving_m is None
    assert compared.legs[1].sailed.distance_m is not None
    assert compared.sailed.distance_m is None
    assert compared.saving_hours is None
    assert compared.sphere_less_wgs_84_m is None


@pytest.mark.parametrize("waypoints", [(), (SALAL,)])
def test_a_plan_without_legs_compares_to_nothing(waypoints: tuple[Waypoint, ...]) -> None:
    compared = compare_plan(solve(Plan(waypoints)))
    assert compared.legs == ()
    assert compared.sailed.distance_m == 0.0
    assert compared.sailed.highest_lat_deg is None
