"""Great-circle sailing on the sphere: two formulas against each other and against vectors, and every edge."""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from navcore.position import Position
from navcore.sailings.great_circle_sphere import solve_by_cosines, solve_by_haversines

if TYPE_CHECKING:
    from collections.abc import Callable

    import numpy.typing as npt

    from navcore.sailings.working import Working

    Solve = Callable[[Position, Position], Working]

BY_BOTH_FORMULAS = pytest.mark.parametrize(
    "solve", [solve_by_cosines, solve_by_haversines], ids=["cosines", "haversines"]
)


def vector(place: Position) -> npt.NDArray[np.float64]:
    lat, lon = np.radians(place)
    return np.array([np.cos(lat) * np.cos(lon), np.cos(lat) * np.sin(lon), np.sin(lat)])


def axes(place: Position) -> npt.NDArray[np.float64]:
    """Return the directions east, north and up at a place, as rows."""
    lon = math.radians(place.lon_deg)
    east = np.array([-np.sin(lon), np.cos(lon), 0.0])
    return np.array([east, np.cross(vector(place), east), vector(place)])


def distance_and_course(start: Position, end: Position) -> tuple[float, float]:
    """Return NM and degrees by vectors."""
    east, north, up = axes(start) @ vector(end)
    return 60.0 * math.degrees(math.atan2(math.hypot(east, north), up)), math.degrees(math.atan2(east, north)) % 360.0


def place_at(start: Position, course_deg: float, distance_nmi: float) -> Position:
    arc, course = math.radians(distance_nmi / 60.0), math.radians(course_deg)
    along = np.array([math.sin(arc) * math.sin(course), math.sin(arc) * math.cos(course), math.cos(arc)])
    x, y, z = along @ axes(start)
    return Position(math.degrees(math.atan2(z, math.hypot(x, y))), math.degrees(math.atan2(y, x)))


def turn_deg(one_deg: float, other_deg: float) -> float:
    return abs((one_deg - other_deg + 180.0) % 360.0 - 180.0)


@BY_BOTH_FORMULAS
@pytest.mark.parametrize("distance_nmi", [1.0, 60.0, 3600.0, 7200.0, 10799.0])
@pytest.mark.parametrize("course_deg", [0.001, 30.0, 90.0, 135.0, 180.0001, 270.0, 300.0, 359.999])
def test_distance_courses_and_vertex_agree_with_vectors(solve: Solve, distance_nmi: float, course_deg: float) -> None:
    for lat_deg in (-89.0, -45.0, -10.0, 0.0, 33.3, 60.0, 89.0):
        start = Position(lat_deg, 170.0)
        end = place_at(start, course_deg, distance_nmi)
        working = solve(start, end)
        expected_nmi, initial_deg = distance_and_course(start, end)
        final_deg = distance_and_course(end, start)[1] + 180.0
        assert working.number("distance") == pytest.approx(expected_nmi, abs=1e-6)
        assert turn_deg(working.number("initial course"), initial_deg) < 0.01
        assert turn_deg(working.number("final course"), final_deg) < 0.01
        lat_v_deg = working.value("lat v")
        assert lat_v_deg is None or abs(lat_v_deg) == pytest.approx(
            math.degrees(math.acos(math.cos(math.radians(lat_deg)) * abs(math.sin(math.radians(initial_deg))))),
            abs=0.01,
        )


@pytest.mark.parametrize("distance_nmi", [1e-6, 0.01, 0.5])
def test_haversines_keep_the_digits_of_a_short_distance(distance_nmi: float) -> None:
    end = Position(45.0, distance_nmi / 60.0 / math.cos(math.radians(45.0)))
    found_nmi = solve_by_haversines(Position(45.0, 0.0), end).number("distance")
    assert found_nmi == pytest.approx(distance_nmi, rel=1e-8)


@BY_BOTH_FORMULAS
def test_the_vertex_lies_on_the_great_circle_at_its_highest_latitude(solve: Solve) -> None:
    start, end = Position(48.5, -(125 + 20 / 60)), Position(41 + 20 / 60, 143.0)
    working = solve(start, end)
    normal = np.cross(vector(start), vector(end))
    vertex = Position(working.number("lat v"), working.number("long v"))
    assert abs(float(normal @ vector(vertex))) < 1e-12
    tilt = math.acos(abs(float(normal[2])) / float(np.linalg.norm(normal)))
    assert vertex.lat_deg == pytest.approx(math.degrees(tilt), abs=1e-9)


@BY_BOTH_FORMULAS
@pytest.mark.parametrize(
    ("start", "end", "lat_deg", "lon_deg"),
    [
        (Position(45.0, -30.0), Position(45.0, 30.0), math.degrees(math.atan(2.0 / math.sqrt(3.0))), 0.0),
        (Position(-45.0, -30.0), Position(-45.0, 30.0), -math.degrees(math.atan(2.0 / math.sqrt(3.0))), 0.0),
        (Position(-45.0, 30.0), Position(-45.0, -30.0), -math.degrees(math.atan(2.0 / math.sqrt(3.0))), 0.0),
        (Position(0.0, 10.0), Position(30.0, 100.0), 30.0, 100.0),
        (Position(0.0, 10.0), Position(-30.0, 100.0), -30.0, 100.0),
        (Position(-10.0, 0.0), Position(10.0, 1.0), None, None),
    ],
)
def test_the_vertex_on_the_leg_else_in_the_higher_hemisphere(
    solve: Solve, start: Position, end: Position, lat_deg: float | None, lon_deg: float | None
) -> None:
    working = solve(start, end)
    if lat_deg is None:
        assert working.number("lat v") > 0.0
    else:
        assert working.number("lat v") == pytest.approx(lat_deg, abs=1e-6)
        assert working.number("long v") == pytest.approx(lon_deg, abs=1e-6)


@BY_BOTH_FORMULAS
@pytest.mark.parametrize(
    ("start", "end", "distance_nmi", "courses_deg", "lat_v_deg"),
    [
        (Position(10.0, 20.0), Position(50.0, 20.0), 2400.0, (0.0, 0.0), 90.0),
        (Position(10.0, 20.0), Position(-50.0, 20.0), 3600.0, (180.0, 180.0), -90.0),
        (Position(60.0, 20.0), Position(70.0, -160.0), 3000.0, (0.0, 180.0), 90.0),
        (Position(-60.0, 20.0), Position(-70.0, -160.0), 3000.0, (180.0, 0.0), -90.0),
        (Position(60.0, 20.0), Position(90.0, 111.0), 1800.0, (0.0, 0.0), 90.0),
        (Position(90.0, 111.0), Position(60.0, 20.0), 1800.0, (180.0, 180.0), 90.0),
        (Position(-90.0, 111.0), Position(60.0, 20.0), 9000.0, (0.0, 0.0), -90.0),
    ],
)
def test_along_a_meridian_courses_are_000_or_180_and_the_vertex_a_pole(
    solve: Solve,
    start: Position,
    end: Position,
    distance_nmi: float,
    courses_deg: tuple[float, float],
    lat_v_deg: float,
) -> None:
    working = solve(start, end)
    assert working.number("distance") == pytest.approx(distance_nmi, abs=1e-9)
    assert (working.number("initial course"), working.number("final course")) == courses_deg
    assert working.number("lat v") == lat_v_deg
    assert working.value("long v") is None
    assert "meridian" in working.remarks[0]


@BY_BOTH_FORMULAS
def test_the_equator_has_no_vertex(solve: Solve) -> None:
    working = solve(Position(0.0, 10.0), Position(0.0, 40.0))
    assert working.number("initial course") == pytest.approx(90.0, abs=1e-9)
    assert working.value("lat v") is None
    assert "equator" in working.remarks[0]


@BY_BOTH_FORMULAS
@pytest.mark.parametrize(
    ("start", "end", "distance_nmi", "word"),
    [
        (Position(45.0, 7.0), Position(45.0, 7.0), 0.0, "one"),
        (Position(90.0, 7.0), Position(90.0, 50.0), 0.0, "one"),
        (Position(0.0, 0.0), Position(0.0, 180.0), 10800.0, "opposite"),
        (Position(30.0, 10.0), Position(-30.0, -170.0), 10800.0, "opposite"),
        (Position(90.0, 0.0), Position(-90.0, 0.0), 10800.0, "opposite"),
    ],
)
def test_one_place_and_opposite_places_have_no_course_and_say_so(
    solve: Solve, start: Position, end: Position, distance_nmi: float, word: str
) -> None:
    working = solve(start, end)
    assert working.number("distance") == pytest.approx(distance_nmi, abs=1e-4)
    assert [working.value(symbol) for symbol in working.results[1:]] == [None] * 4
    assert word in working.remarks[0]


@given(st.floats(-90.0, 90.0), st.floats(-180.0, 180.0), st.floats(-1e-7, 1e-7), st.floats(-1e-7, 1e-7))
@settings(deadline=None, max_examples=100)
def test_no_leg_however_short_or_near_half_round_breaks_the_working(
    lat_deg: float, lon_deg: float, d_lat_deg: float, d_long_deg: float
) -> None:
    start = Position(lat_deg, lon_deg)
    near = Position(max(-90.0, min(90.0, lat_deg + d_lat_deg)), lon_deg + d_long_deg)
    opposite = Position(-near.lat_deg, near.lon_deg + 180.0)
    for end in (near, opposite):
        for solve in (solve_by_cosines, solve_by_haversines):
            values = [step.value for step in solve(start, end).steps]
            assert all(value is None or math.isfinite(value) for value in values)
