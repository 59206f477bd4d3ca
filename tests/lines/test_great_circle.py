"""The great circle's conventions, vertices and crossings; its agreement with other programs is in tests/published."""

from __future__ import annotations

import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from navcore.angles import wrap_180
from navcore.earth.figure import FIGURES, SPHERE, WGS_84, Figure
from navcore.earth.latitudes import meridian_distance_m, reduced_latitude_deg
from navcore.errors import RangeError
from navcore.lines import great_circle

Four = tuple[float, float, float, float]

NAN = math.nan
latitudes = st.floats(-89.0, 89.0)
longitudes = st.floats(-180.0, 180.0)
FIGURES_TRIED = [WGS_84, SPHERE]


@pytest.mark.parametrize("figure", FIGURES_TRIED, ids=lambda figure: figure.name)
@pytest.mark.parametrize(
    ("leg", "initial_deg", "final_deg"),
    [
        ((90.0, 0.0, 45.0, 60.0), 180.0, 180.0),
        ((45.0, 60.0, 90.0, 0.0), 0.0, 0.0),
        ((-90.0, 0.0, 45.0, 60.0), 0.0, 0.0),
        ((45.0, 60.0, -90.0, 0.0), 180.0, 180.0),
        ((90.0, 0.0, -90.0, 60.0), 180.0, 180.0),
        ((-90.0, 0.0, 90.0, 60.0), 0.0, 0.0),
        ((90.0, 0.0, 90.0, 60.0), 0.0, 0.0),
        ((30.0, 0.0, -30.0, 180.0), 0.0, 180.0),
        ((-30.0, 0.0, 30.0, -180.0), 0.0, 180.0),
        ((0.0, 10.0, 0.0, -170.0), 0.0, 180.0),
        ((-45.0, 0.0, -45.0, 180.0), 180.0, 0.0),
        ((50.0, 0.0, 60.0, 180.0), 0.0, 180.0),
        ((5.0, 5.0, 5.0, 5.0), 0.0, 0.0),
        ((5.0, 180.0, 5.0, -180.0), 0.0, 0.0),
        ((0.0, 170.0, 0.0, -170.0), 90.0, 90.0),
        ((-0.0, -170.0, 0.0, 170.0), 270.0, 270.0),
        ((10.0, 7.0, -10.0, 7.0), 180.0, 180.0),
    ],
)
def test_courses_where_convention_decides(figure: Figure, leg: Four, initial_deg: float, final_deg: float) -> None:
    line = great_circle.inverse(*leg, figure)
    assert (float(line.initial_course_deg), float(line.final_course_deg)) == (initial_deg, final_deg)


@pytest.mark.parametrize(
    "leg",
    [
        (0.0, 0.0, 0.0, 179.9),
        (30.0, 0.0, -30.0, 179.9),
        (-30.0, 0.0, 30.0, 179.9),
        (-30.0, 0.0, 30.0, -179.9),
        (75.0, 0.0, -75.0, 179.99),
    ],
)
def test_of_two_equal_lines_the_northern_is_taken(leg: Four) -> None:
    line = great_circle.inverse(*leg, WGS_84)
    assert math.cos(math.radians(line.initial_course_deg)) > 0.0
    southern = great_circle.inverse(-leg[0], leg[1], -leg[2], leg[3], WGS_84)
    assert southern.distance_m == pytest.approx(line.distance_m, abs=15e-9)
    # Both really lead there.
    for start, course in ((leg, line.initial_course_deg), (leg, line.final_course_deg)):
        reached = great_circle.direct(start[0], start[1], course, line.distance_m, WGS_84)
        assert great_circle.inverse(reached.lat_deg, reached.lon_deg, leg[2], leg[3], WGS_84).distance_m < 1e-6


def test_a_leg_to_a_pole_is_as_long_as_the_meridian() -> None:
    for name, figure in FIGURES.items():
        for lat_deg in (-60.0, 0.0, 45.0, 89.99):
            meridian = meridian_distance_m(90.0, figure) - meridian_distance_m(lat_deg, figure)
            line = great_circle.inverse(lat_deg, 12.0, 90.0, -100.0, figure)
            assert line.distance_m == pytest.approx(meridian, abs=15e-9), name


@given(latitudes, longitudes, latitudes, longitudes)
def test_there_leads_to_the_end_and_the_way_back_is_as_long(lat1: float, lon1: float, lat2: float, lon2: float) -> None:
    there = great_circle.inverse(lat1, lon1, lat2, lon2, WGS_84)
    back = great_circle.inverse(lat2, lon2, lat1, lon1, WGS_84)
    assert back.distance_m == pytest.approx(there.distance_m, abs=15e-9)
    end = great_circle.direct(lat1, lon1, there.initial_course_deg, there.distance_m, WGS_84)
    assert great_circle.inverse(end.lat_deg, end.lon_deg, lat2, lon2, WGS_84).distance_m < 1e-6
    if 10.0 < there.distance_m < 1.99e7:
        assert wrap_180(end.course_deg - there.final_course_deg) == pytest.approx(0.0, abs=1e-7)


def test_points_along_are_where_their_distances_say() -> None:
    leg = (48.5, -125.0 - 1.0 / 3.0, 41.0 + 1.0 / 3.0, 143.0)
    whole = great_circle.inverse(*leg, WGS_84)
    distances = np.linspace(0.0, float(whole.distance_m), 7)
    point = great_circle.course_at(*leg, distances, WGS_84)
    lat_deg, lon_deg = great_circle.points_along(*leg, distances, WGS_84)
    assert lat_deg.tolist() == point.lat_deg.tolist()
    assert lon_deg.tolist() == point.lon_deg.tolist()
    from_start = great_circle.inverse(leg[0], leg[1], lat_deg[1:], lon_deg[1:], WGS_84)
    assert from_start.distance_m == pytest.approx(distances[1:], abs=30e-9)
    assert from_start.final_course_deg == pytest.approx(point.course_deg[1:], abs=1e-11)
    assert point.course_deg[0] == pytest.approx(whole.initial_course_deg)
    assert point.course_deg[-1] == pytest.approx(whole.final_course_deg, abs=1e-11)


@pytest.mark.parametrize("figure", FIGURES_TRIED, ids=lambda figure: figure.name)
@pytest.mark.parametrize(
    ("leg", "lat_deg", "lon_deg", "on_leg"),
    [
        ((10.0, 20.0, 60.0, 20.0), 90.0, 20.0, False),
        ((-60.0, 20.0, 10.0, 20.0), -90.0, 20.0, False),
        ((60.0, 0.0, 50.0, 180.0), 90.0, 0.0, True),
        ((-60.0, 10.0, -50.0, -170.0), -90.0, 10.0, True),
        ((90.0, 0.0, 45.0, 60.0), 90.0, 60.0, True),
        ((45.0, 60.0, 90.0, 0.0), 90.0, 60.0, True),
        ((-90.0, 0.0, 45.0, 60.0), -90.0, 60.0, True),
        ((10.0, 20.0, -10.0, 20.0), 90.0, 20.0, False),
        ((30.0, 0.0, -30.0, 180.0), 90.0, 0.0, True),
        ((0.0, 0.0, 0.0, 50.0), NAN, NAN, False),
        ((12.0, 5.0, 12.0, 5.0), NAN, NAN, False),
        ((90.0, 0.0, 90.0, 50.0), NAN, NAN, False),
    ],
)
def test_vertices_where_convention_decides(
    figure: Figure, leg: Four, lat_deg: float, lon_deg: float, on_leg: bool
) -> None:
    vertex = great_circle.vertex(*leg, figure)
    assert (float(vertex.lat_deg), float(vertex.lon_deg)) == pytest.approx((lat_deg, lon_deg), nan_ok=True)
    assert bool(vertex.on_leg) is on_leg


@given(latitudes, longitudes, latitudes, longitudes)
def test_a_vertex_on_the_leg_is_its_highest_point_and_runs_east_or_west(
    lat1: float, lon1: float, lat2: float, lon2: float
) -> None:
    vertex = great_circle.vertex(lat1, lon1, lat2, lon2, WGS_84)
    if math.isnan(vertex.lat_deg):
        return
    whole = great_circle.inverse(lat1, lon1, lat2, lon2, WGS_84)
    lat_deg, _ = great_circle.points_along(lat1, lon1, lat2, lon2, whole.distance_m * np.linspace(0, 1, 33), WGS_84)
    assert np.all(np.abs(lat_deg) <= abs(vertex.lat_deg) + 1e-12)
    clairaut = abs(math.sin(math.radians(whole.initial_course_deg)))
    clairaut *= math.cos(math.radians(reduced_latitude_deg(lat1, WGS_84)))
    assert math.cos(math.radians(reduced_latitude_deg(vertex.lat_deg, WGS_84))) == pytest.approx(clairaut, abs=1e-14)
    if not vertex.on_leg:
        assert vertex.lat_deg * (lat1 + lat2) >= 0.0
        assert lat_deg.tolist() in (sorted(lat_deg.tolist()), sorted(lat_deg.tolist(), reverse=True))


def test_the_vertex_is_where_the_course_is_90() -> None:
    leg = (48.5, -125.0 - 1.0 / 3.0, 41.0 + 1.0 / 3.0, 143.0)
    vertex = great_circle.vertex(*leg, WGS_84)
    to_vertex = great_circle.inverse(leg[0], leg[1], vertex.lat_deg, vertex.lon_deg, WGS_84)
    assert vertex.on_leg
    assert to_vertex.final_course_deg == pytest.approx(270.0, abs=1e-8)


def test_an_off_leg_vertex_lies_on_the_same_line_beyond_the_end_with_the_higher_latitude() -> None:
    vertex = great_circle.vertex(-20.0, 0.0, 10.0, 30.0, WGS_84)
    leg = great_circle.inverse(-20.0, 0.0, 10.0, 30.0, WGS_84)
    from_vertex = great_circle.inverse(vertex.lat_deg, vertex.lon_deg, -20.0, 0.0, WGS_84)
    assert not vertex.on_leg
    assert vertex.lat_deg < -20.0
    assert from_vertex.initial_course_deg == pytest.approx(90.0, abs=1e-9)
    assert from_vertex.final_course_deg == pytest.approx(float(leg.initial_course_deg), abs=1e-9)
    reversed_leg = great_circle.vertex(10.0, 30.0, -20.0, 0.0, WGS_84)
    assert reversed_leg.lat_deg == pytest.approx(float(vertex.lat_deg), abs=1e-12)
    assert reversed_leg.lon_deg == pytest.approx(float(vertex.lon_deg), abs=1e-9)


@given(latitudes, longitudes, latitudes, longitudes, st.floats(0.01, 0.99))
def test_a_crossing_lies_on_the_leg(lat1: float, lon1: float, lat2: float, lon2: float, part: float) -> None:
    whole = great_circle.inverse(lat1, lon1, lat2, lon2, WGS_84)
    if whole.distance_m < 1.0 or abs(math.sin(math.radians(whole.initial_course_deg))) < 1e-6:
        return
    point = great_circle.course_at(lat1, lon1, lat2, lon2, part * whole.distance_m, WGS_84)
    by_meridian = great_circle.crossing_of_meridian(lat1, lon1, lat2, lon2, point.lon_deg, WGS_84)
    across = great_circle.points_along(lat1, lon1, lat2, lon2, by_meridian.distance_m, WGS_84)
    found = great_circle.inverse(by_meridian.lat_deg, by_meridian.lon_deg, *across, WGS_84)
    assert found.distance_m < 1e-6
    # Near the vertex the line runs along the parallel, and the last digit of the latitude moves the crossing by metres.
    slope = abs(math.cos(math.radians(point.course_deg)))
    if slope > 1e-6:
        by_parallel = great_circle.crossings_of_parallel(lat1, lon1, lat2, lon2, point.lat_deg, WGS_84)
        assert np.nanmin(np.abs(by_parallel.distance_m - part * whole.distance_m)) < 1e-7 / slope


def test_crossings_off_the_leg_are_not_a_number() -> None:
    leg = (48.5, -125.0, 41.0, 143.0)
    meridians = great_circle.crossing_of_meridian(*leg, [-125.0, 180.0, 143.0, -124.0, 0.0], WGS_84)
    assert np.isnan(meridians.distance_m).tolist() == [False, False, False, True, True]
    assert meridians.distance_m[0] == 0.0
    assert meridians.lat_deg[2] == pytest.approx(41.0, abs=1e-13)
    parallels = great_circle.crossings_of_parallel(*leg, [50.0, 48.5, 45.0, 41.0, 70.0, 10.0, -50.0], WGS_84)
    assert (~np.isnan(parallels.distance_m)).sum(axis=-1).tolist() == [2, 2, 1, 1, 0, 0, 0]
    assert parallels.distance_m[0, 0] < parallels.distance_m[0, 1]
    assert parallels.distance_m[1, 0] == 0.0
    assert parallels.distance_m[3, 0] == pytest.approx(great_circle.inverse(*leg, WGS_84).distance_m, abs=1e-8)


def test_a_parallel_touched_at_the_vertex_is_crossed_once() -> None:
    leg = (50.0, -30.0, 50.0, 30.0)
    vertex = great_circle.vertex(*leg, SPHERE)
    touched = great_circle.crossings_of_parallel(*leg, vertex.lat_deg, SPHERE)
    assert touched.lon_deg[0] == pytest.approx(0.0, abs=1e-5)
    assert np.isnan(great_circle.crossings_of_parallel(*leg, vertex.lat_deg + 1e-9, SPHERE).lat_deg).all()


def test_lines_along_the_equator_and_meridians_cross_neither() -> None:
    assert np.isnan(great_circle.crossings_of_parallel(0.0, 0.0, 0.0, 50.0, 0.0, WGS_84).lat_deg).all()
    assert math.isnan(great_circle.crossing_of_meridian(10.0, 5.0, 20.0, 5.0, 5.0, WGS_84).lat_deg)
    over_pole = great_circle.crossings_of_parallel(60.0, 0.0, 50.0, 180.0, [80.0, 55.0, 90.0], WGS_84)
    assert over_pole.lon_deg.tolist() == [
        [pytest.approx(0.0), pytest.approx(-180.0)],
        [pytest.approx(-180.0), pytest.approx(NAN, nan_ok=True)],
        [pytest.approx(over_pole.lon_deg[2, 0]), pytest.approx(NAN, nan_ok=True)],
    ]


def test_shapes_broadcast_and_scalars_stay_scalar() -> None:
    assert great_circle.inverse([[1.0], [2.0]], 0.0, [3.0, 4.0, 5.0], 6.0, WGS_84).distance_m.shape == (2, 3)
    assert great_circle.inverse(1.0, 0.0, 3.0, 6.0, WGS_84).distance_m.shape == ()
    assert great_circle.crossings_of_parallel(1.0, 0.0, 3.0, [6.0, 7.0], 2.0, WGS_84).lat_deg.shape == (2, 2)


def test_what_is_not_finite_is_refused() -> None:
    with pytest.raises(RangeError, match="lat_deg"):
        great_circle.inverse(91.0, 0.0, 0.0, 0.0, WGS_84)
    with pytest.raises(RangeError, match="course_deg"):
        great_circle.direct(0.0, 0.0, NAN, 1.0, WGS_84)
