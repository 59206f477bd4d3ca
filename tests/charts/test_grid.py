"""Grid courses: the printed rule, a polar flight, both hemispheres."""

from __future__ import annotations

import numpy as np
import pytest

from navcore.charts.grid import grid_course_deg, grid_courses, sign_rule, true_course_deg
from navcore.charts.lambert import Lambert
from navcore.charts.stereographic import Stereographic
from navcore.earth.figure import SPHERE, WGS_84
from navcore.errors import RangeError
from navcore.lines import great_circle
from navcore.trigonometry import FloatArray

End = tuple[FloatArray, FloatArray, FloatArray]

NORTH, SOUTH = Stereographic.polar(WGS_84, 90.0), Stereographic.polar(WGS_84, -90.0)

FLIGHT = np.array(
    [
        (61 + 10 / 60, -150.0),
        (72.0, -140.0),
        (80.0, -125.0),
        (86.0, -90.0),
        (88.0, -10.0),
        (82.0, 12.0),
        (72.0, 14.0),
        (60.2, 11 + 5 / 60),
    ]
)
TRUE_INITIAL_DEG = [15.6, 17.2, 18.9, 28.4, 151.1, 176.4, 187.1]
TRUE_FINAL_DEG = [24.8, 31.8, 53.7, 108.3, 173.0, 178.4, 184.4]
GRID_START_DEG = [165.6, 157.2, 143.9, 118.4, 161.1, 164.4, 173.1]
GRID_END_DEG = [164.8, 156.8, 143.7, 118.3, 161.0, 164.4, 173.3]


def flight_courses(mirror: float) -> tuple[End, End]:
    lat_deg, lon_deg = mirror * FLIGHT[:, 0], FLIGHT[:, 1]
    legs = great_circle.inverse(lat_deg[:-1], lon_deg[:-1], lat_deg[1:], lon_deg[1:], SPHERE)
    return (lat_deg[:-1], lon_deg[:-1], legs.initial_course_deg), (lat_deg[1:], lon_deg[1:], legs.final_course_deg)


def test_a_flight_over_the_ice_keeps_its_grid_course_while_the_true_one_turns() -> None:
    # Worked beforehand for this project on the sphere, to a tenth of a degree; no printed source.
    start, end = flight_courses(1.0)
    np.testing.assert_allclose(start[2], TRUE_INITIAL_DEG, atol=0.051)
    np.testing.assert_allclose(end[2], TRUE_FINAL_DEG, atol=0.051)
    grid = grid_courses(start, end, NORTH)
    np.testing.assert_allclose(grid.start_course_deg, GRID_START_DEG, atol=0.051)
    np.testing.assert_allclose(grid.end_course_deg, GRID_END_DEG, atol=0.051)


def test_the_same_flight_mirrored_to_the_south_has_the_mirrored_grid_courses() -> None:
    north = grid_courses(*flight_courses(1.0), NORTH)
    south = grid_courses(*flight_courses(-1.0), SOUTH)
    np.testing.assert_allclose(south.start_convergence_deg, -north.start_convergence_deg, atol=1e-9)
    np.testing.assert_allclose(south.start_course_deg, (180.0 - north.start_course_deg) % 360.0, atol=1e-9)
    np.testing.assert_allclose(south.end_course_deg, (180.0 - north.end_course_deg) % 360.0, atol=1e-9)


@pytest.mark.parametrize(("lon_deg", "grid_north_deg"), [(-30.0, 30.0), (-60.0, 60.0), (130.0, -130.0)])
def test_true_north_bears_by_the_grid_as_the_handbook_prints(lon_deg: float, grid_north_deg: float) -> None:
    # AFPAM 11-216 paragraph 14.7.1 and FAA-H-8083-18 chapter 14, convergence factor 1, northern hemisphere: grid north
    # bears 30 W from true north at 30 W, 60 W at 60 W, 130 E at 130 E; reversed in the south.
    assert NORTH.convergence_deg(75.0, lon_deg) == pytest.approx(lon_deg)
    assert grid_course_deg(0.0, 75.0, lon_deg, NORTH) == pytest.approx(grid_north_deg % 360.0)
    assert grid_course_deg(0.0, -75.0, lon_deg, SOUTH) == pytest.approx(-grid_north_deg % 360.0)


def test_a_grid_parallel_to_another_meridian() -> None:
    # Common practice, computed: grid parallel to 54 W, true course 330 at 80 N 140 E.
    assert grid_course_deg(330.0, 80.0, 140.0, Stereographic.polar(WGS_84, 90.0, -54.0)) == pytest.approx(136.0)


@pytest.mark.parametrize("sign", [1.0, -1.0])
def test_lambert_multiplies_the_longitude_by_the_constant_of_the_cone(sign: float) -> None:
    lambert = Lambert(WGS_84, -40.0, (sign * 40.0, sign * 60.0), sign * 50.0)
    expected = (100.0 - lambert.cone * -25.0) % 360.0
    assert grid_course_deg(100.0, sign * 55.0, -65.0, lambert) == pytest.approx(expected)
    assert np.sign(lambert.cone) == sign


def test_grid_and_true_are_each_other_undone() -> None:
    course_deg = np.arange(0.0, 360.0, 7.0)
    for projection in (NORTH, SOUTH, Lambert(WGS_84, 20.0, (50.0,), 50.0)):
        grid_deg = grid_course_deg(course_deg, 70.0, -123.0, projection)
        np.testing.assert_allclose(true_course_deg(grid_deg, 70.0, -123.0, projection), course_deg, atol=1e-9)


def test_a_pole_takes_the_grid_of_the_meridian_it_is_left_on() -> None:
    assert grid_course_deg(180.0, 90.0, 45.0, NORTH) == pytest.approx(135.0)
    assert grid_course_deg(0.0, -90.0, 45.0, SOUTH) == pytest.approx(45.0)


def test_the_rule_in_words_has_the_signs_of_its_hemisphere() -> None:
    assert "true course + longitude west of 0°E, − longitude east" in sign_rule(NORTH)
    assert "true course − longitude west of 0°E, + longitude east" in sign_rule(SOUTH)
    assert "0.770069 × longitude" in sign_rule(Lambert(WGS_84, -40.0, (40.0, 60.0), 50.0))


def test_an_oblique_sheet_has_no_grid() -> None:
    with pytest.raises(RangeError):
        grid_course_deg(0.0, 50.0, 0.0, Stereographic(WGS_84, 50.0, 0.0))
