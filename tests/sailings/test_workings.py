"""The workings: each line follows from the lines above it, and a refusal says why and what to do."""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

import pytest

from navcore.earth.figure import FIGURES, SPHERE, WGS_84
from navcore.errors import NoAnswerError, RangeError
from navcore.position import Position
from navcore.sailings import great_circle_sphere, mercator, middle_latitude, parallel, plane

if TYPE_CHECKING:
    from navcore.sailings.working import Working

A = Position(50.25, -10.5)
B = Position(43.5, -30.75)
ON_PARALLEL = Position(50.25, -30.75)


def every_working() -> dict[str, Working]:
    return {
        "plane inverse": plane.solve_inverse(136.0, -203.0),
        "plane direct": plane.solve_direct(5.0, 188.0),
        "traverse": plane.solve_traverse([(10.0, 20.0), (100.0, 30.0), (275.0, 12.5)]),
        "parallel inverse": parallel.solve_inverse(A, ON_PARALLEL),
        "parallel direct": parallel.solve_direct(A, 90.0, 300.0),
        "middle-latitude inverse": middle_latitude.solve_inverse(A, B),
        "middle-latitude direct": middle_latitude.solve_direct(A, 235.0, 300.0),
        "mercator inverse": mercator.solve_inverse(A, B, WGS_84),
        "mercator direct": mercator.solve_direct(A, 235.0, 300.0, WGS_84),
        "cosines": great_circle_sphere.solve_by_cosines(A, B),
        "haversines": great_circle_sphere.solve_by_haversines(A, B),
    }


@pytest.mark.parametrize("name", every_working())
def test_every_line_has_its_own_symbol_words_and_value(name: str) -> None:
    working = every_working()[name]
    lines = (*working.given, *working.steps)
    assert len({line.symbol for line in lines}) == len(lines)
    assert all(line.words for line in lines)
    assert all(line.value is not None for line in lines)


@pytest.mark.parametrize("name", every_working())
def test_results_are_lines_of_the_steps(name: str) -> None:
    working = every_working()[name]
    assert working.results
    assert set(working.results) <= {step.symbol for step in working.steps}


def test_a_line_that_is_not_there_is_named() -> None:
    with pytest.raises(KeyError, match="DMP"):
        plane.solve_direct(5.0, 188.0).line("DMP")


def test_a_value_that_is_missing_says_why() -> None:
    working = mercator.solve_inverse(A, ON_PARALLEL, WGS_84)
    assert working.value("distance") is None
    with pytest.raises(NoAnswerError, match=r"no distance; d\.lat is 0.*parallel sailing"):
        working.number("distance")


def test_the_basis_names_the_figure_and_the_mile() -> None:
    assert mercator.solve_inverse(A, B, FIGURES["Clarke 1866"]).basis == (
        "meridional parts of Clarke 1866; 1' of latitude = 1 NM"
    )


def tangent_deg(working: Working) -> float:
    return math.degrees(math.atan(abs(working.number("tan C"))))


def test_mercator_lines_follow_from_each_other() -> None:
    working = mercator.solve_inverse(A, B, WGS_84)
    assert working.number("DMP") == pytest.approx(working.number("MP 2") - working.number("MP 1"), abs=1e-9)
    assert working.number("tan C") == pytest.approx(working.number("d.long") / working.number("DMP"))
    assert working.number("course") == pytest.approx(180.0 + tangent_deg(working))
    secant = 1.0 / math.cos(math.radians(tangent_deg(working)))
    assert working.number("distance") == pytest.approx(abs(working.number("d.lat")) * secant)


def test_mercator_lines_to_a_position_follow_from_each_other() -> None:
    working = mercator.solve_direct(A, 235.0, 300.0, WGS_84)
    assert working.number("d.lat") == pytest.approx(300.0 * math.cos(math.radians(235.0)))
    assert working.number("lat 2") == pytest.approx(A.lat_deg + working.number("d.lat") / 60.0)
    assert working.number("DMP") == pytest.approx(working.number("MP 2") - working.number("MP 1"), abs=1e-9)
    assert working.number("tan C") == pytest.approx(math.tan(math.radians(235.0)))
    assert working.number("d.long") == pytest.approx(working.number("DMP") * working.number("tan C"))
    assert working.number("long 2") == pytest.approx(A.lon_deg + working.number("d.long") / 60.0)


def test_middle_latitude_lines_follow_from_each_other() -> None:
    working = middle_latitude.solve_inverse(A, B)
    assert working.number("mean lat") == 46.875
    assert working.number("cos mean lat") == pytest.approx(math.cos(math.radians(46.875)))
    assert working.number("departure") == pytest.approx(working.number("d.long") * working.number("cos mean lat"))
    assert working.number("tan C") == pytest.approx(working.number("departure") / working.number("d.lat"))
    assert working.number("course") == pytest.approx(180.0 + tangent_deg(working))


def test_parallel_lines_follow_from_each_other() -> None:
    working = parallel.solve_inverse(A, ON_PARALLEL)
    assert working.number("departure") == pytest.approx(-20.25 * 60.0 * math.cos(math.radians(50.25)))
    assert working.number("course") == 270.0
    assert working.number("distance") == -working.number("departure")


def test_traverse_sums_its_lines() -> None:
    working = plane.solve_traverse([(10.0, 20.0), (100.0, 30.0), (275.0, 12.5)])
    for symbol in ("d.lat", "departure"):
        total = sum(working.number(f"{symbol} {number}") for number in (1, 2, 3))
        assert working.number(symbol) == pytest.approx(total)


def test_a_middle_latitude_run_comes_back_from_where_it_went() -> None:
    there = middle_latitude.solve_inverse(A, B)
    reached = middle_latitude.solve_direct(A, there.number("course"), there.number("distance")).position
    assert reached == pytest.approx(B, abs=1e-10)


def test_a_long_parallel_run_goes_round_and_keeps_its_d_long() -> None:
    working = parallel.solve_direct(Position(60.0, 170.0), 90.0, 12000.0)
    assert working.number("d.long") == pytest.approx(24000.0)
    assert working.position.lon_deg == pytest.approx(-150.0)


def test_middle_latitude_on_a_parallel_is_parallel_sailing() -> None:
    assert middle_latitude.solve_inverse(A, ON_PARALLEL) == parallel.solve_inverse(A, ON_PARALLEL)


def test_middle_latitude_across_the_equator_is_refused_with_the_split() -> None:
    with pytest.raises(NoAnswerError, match="split the leg where it meets the equator"):
        middle_latitude.solve_inverse(Position(10.0, 0.0), Position(-5.0, 3.0))
    with pytest.raises(NoAnswerError, match="split the leg where it meets the equator"):
        middle_latitude.solve_direct(Position(10.0, 0.0), 170.0, 900.0)


def test_parallel_sailing_refuses_what_is_not_on_a_parallel() -> None:
    with pytest.raises(NoAnswerError, match="the latitudes differ"):
        parallel.solve_inverse(A, B)
    with pytest.raises(NoAnswerError, match="090 or 270"):
        parallel.solve_direct(A, 91.0, 100.0)
    with pytest.raises(NoAnswerError, match="a pole has no parallel"):
        parallel.solve_direct(Position(90.0, 0.0), 90.0, 100.0)


def test_mercator_sailing_refuses_090_and_the_poles() -> None:
    with pytest.raises(NoAnswerError, match="use parallel sailing"):
        mercator.solve_direct(A, 90.0, 100.0, WGS_84)
    with pytest.raises(NoAnswerError, match="past a pole"):
        mercator.solve_direct(Position(89.0, 0.0), 0.0, 100.0, WGS_84)
    with pytest.raises(NoAnswerError, match="along a meridian only"):
        mercator.solve_direct(Position(90.0, 0.0), 170.0, 100.0, WGS_84)


def test_a_leg_to_a_pole_says_whose_course_it_takes() -> None:
    for working in (
        mercator.solve_inverse(A, Position(90.0, 0.0), WGS_84),
        middle_latitude.solve_inverse(A, Position(90.0, 0.0)),
    ):
        assert working.number("course") == 0.0
        assert "along the meridian" in working.remarks[0]


def test_a_distance_below_0_is_refused_with_what_to_do() -> None:
    with pytest.raises(RangeError, match="reciprocal course"):
        plane.solve_direct(5.0, -1.0)


def test_middle_latitude_agrees_with_mercator_on_the_sphere_where_the_leg_is_short() -> None:
    """A leg of 60 NM in 45°: the two methods differ by less than 0.01 NM and 0.01°."""
    end = Position(45.7, 1.0)
    by_mercator = mercator.solve_inverse(Position(45.0, 0.0), end, SPHERE)
    by_middle = middle_latitude.solve_inverse(Position(45.0, 0.0), end)
    assert by_middle.number("distance") == pytest.approx(by_mercator.number("distance"), abs=0.01)
    assert by_middle.number("course") == pytest.approx(by_mercator.number("course"), abs=0.01)
