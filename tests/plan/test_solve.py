from __future__ import annotations

from datetime import UTC, datetime, timedelta

import pytest

from navcore.earth.figure import SPHERE, WGS_84
from navcore.lines import great_circle, rhumb_line
from navcore.plan import solve as solve_module
from navcore.plan.edit import delete_waypoint, insert_waypoint, move_waypoint, set_leg
from navcore.plan.model import Leg, Line, Plan, Trade, Waypoint
from navcore.plan.solve import solve
from navcore.position import Position

SALAL = Waypoint("Salal Roads", Position(48.5, -125.0 - 20.0 / 60.0))
PARALLEL = Waypoint("Join the parallel", Position(50.0, -143.815))
KUROMATSU = Waypoint("Kuromatsu Bay", Position(41.0 + 20.0 / 60.0, 143.0))
DEPARTURE = datetime(2027, 3, 4, 14, 0, tzinfo=UTC)


def plan_of(*waypoints: Waypoint, line: Line | None = None) -> Plan:
    return Plan(waypoints, tuple(Leg(line) for _ in waypoints[1:]), departure=DEPARTURE, speed_kn=13.5)


def test_a_leg_is_worked_by_both_lines_whichever_is_sailed() -> None:
    (leg,) = solve(plan_of(SALAL, KUROMATSU)).legs
    rhumb = rhumb_line.inverse(*SALAL.position, *KUROMATSU.position, WGS_84)
    circle = great_circle.inverse(*SALAL.position, *KUROMATSU.position, WGS_84)
    assert leg.worked.rhumb_course_deg == rhumb.course_deg
    assert leg.worked.rhumb_distance_m == rhumb.distance_m
    assert leg.worked.initial_course_deg == circle.initial_course_deg
    assert leg.worked.final_course_deg == circle.final_course_deg
    assert leg.worked.great_circle_distance_m == circle.distance_m


@pytest.mark.parametrize(("trade", "line"), [(Trade.MARINE, Line.RHUMB), (Trade.AVIATION, Line.GREAT_CIRCLE)])
def test_a_leg_that_names_no_line_is_sailed_by_the_trades_usual_one(trade: Trade, line: Line) -> None:
    plan = Plan((SALAL, KUROMATSU), (Leg(),), trade=trade)
    assert solve(plan).legs[0].line is line


def test_a_leg_of_no_length_has_no_course() -> None:
    for line in (Line.RHUMB, Line.GREAT_CIRCLE):
        (leg,) = solve(plan_of(SALAL, SALAL, line=line)).legs
        assert leg.distance_m == 0.0
        assert leg.course_deg is None
        assert leg.end_course_deg is None


def test_runs_add_up_to_the_total() -> None:
    solution = solve(plan_of(SALAL, PARALLEL, KUROMATSU))
    distances = [leg.distance_m for leg in solution.legs]
    assert None not in distances
    assert solution.run_m == (0.0, distances[0], solution.total_m)


@pytest.mark.parametrize("count", [0, 1])
def test_a_plan_without_a_leg_has_no_distance(count: int) -> None:
    solution = solve(plan_of(*(SALAL,) * count))
    assert solution.legs == ()
    assert solution.total_m == 0.0


class _Counter:
    """Counts how many legs are worked anew."""

    def __init__(self, monkeypatch: pytest.MonkeyPatch) -> None:
        self.legs = 0
        worker = solve_module._work

        def counting(ends: list[solve_module._Ends], figure: object) -> list[solve_module.WorkedLeg]:
            self.legs += len(ends)
            return worker(ends, figure)  # type: ignore[arg-type]  # passed on as it came

        monkeypatch.setattr(solve_module, "_work", counting)


def test_unchanged_legs_are_taken_over_and_equal_a_fresh_solution(monkeypatch: pytest.MonkeyPatch) -> None:
    waypoints = [Waypoint(str(index), Position(index / 10.0, index / 7.0)) for index in range(60)]
    plan = plan_of(*waypoints)
    first = solve(plan)
    counter = _Counter(monkeypatch)
    for edited, worked in (
        (insert_waypoint(plan, 30, SALAL), 2),
        (delete_waypoint(plan, 30), 1),
        (move_waypoint(plan, 10, 40), 3),
        (set_leg(plan, 5, Leg(Line.GREAT_CIRCLE)), 0),
    ):
        counter.legs = 0
        again = solve(edited, first)
        assert counter.legs == worked
        assert again == solve(edited)


def test_another_figure_of_the_earth_works_every_leg_again() -> None:
    first = solve(plan_of(SALAL, KUROMATSU))
    on_sphere = Plan((SALAL, KUROMATSU), (Leg(),), figure=SPHERE)
    again = solve(on_sphere, first)
    assert again.legs[0].distance_m == pytest.approx(3910.9 * 1852.0, abs=0.05 * 1852.0)
    assert again.legs[0].distance_m != first.legs[0].distance_m


def test_times_follow_from_distance_speed_and_stay() -> None:
    north = Waypoint("60' north", Position(1.0, 0.0), stay=timedelta(hours=6))
    plan = Plan(
        (Waypoint("start", Position(0.0, 0.0)), north, Waypoint("120' north", Position(2.0, 0.0))),
        (Leg(), Leg(speed_kn=6.0)),
        figure=SPHERE,
        departure=DEPARTURE,
        speed_kn=12.0,
    )
    schedule = solve(plan).schedule
    assert schedule.arrival[0] == DEPARTURE
    assert _minutes(schedule.time_on_leg) == [300, 600]
    assert schedule.arrival[1] == pytest.approx(DEPARTURE + timedelta(hours=5), abs=timedelta(seconds=1))
    assert schedule.leaving[1] == pytest.approx(DEPARTURE + timedelta(hours=11), abs=timedelta(seconds=1))
    assert schedule.arrival[2] == pytest.approx(DEPARTURE + timedelta(hours=21), abs=timedelta(seconds=1))


def _minutes(durations: tuple[timedelta | None, ...]) -> list[int]:
    return [round(duration.total_seconds() / 60.0) for duration in durations if duration is not None]


def test_a_leg_without_a_speed_leaves_later_times_open() -> None:
    plan = Plan((SALAL, PARALLEL, KUROMATSU), (Leg(speed_kn=12.0), Leg()), departure=DEPARTURE)
    schedule = solve(plan).schedule
    assert schedule.arrival[1] is not None
    assert schedule.time_on_leg[1] is None
    assert schedule.arrival[2] is None


def test_the_calendar_ending_leaves_times_open() -> None:
    plan = Plan((SALAL, KUROMATSU), (Leg(speed_kn=1e-9),), departure=DEPARTURE)
    assert solve(plan).schedule.arrival[1] is None
    slow = Plan((SALAL, KUROMATSU), (Leg(speed_kn=1e-3),), departure=datetime(9999, 12, 31, tzinfo=UTC))
    schedule = solve(slow).schedule
    assert schedule.time_on_leg[0] is not None
    assert schedule.arrival[1] is None
