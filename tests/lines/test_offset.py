"""Shortest distances to legs, against a search that knows nothing of how they were found."""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

import numpy as np
import pytest

from navcore.earth.figure import SPHERE, WGS_84
from navcore.lines import great_circle, rhumb_line
from navcore.lines.offset import distance_from_great_circle, distance_from_rhumb_line, greatest_separation_m

if TYPE_CHECKING:
    from collections.abc import Callable

    from navcore.lines.offset import Offset
    from navcore.trigonometry import FloatArray

    Along = Callable[[FloatArray], tuple[FloatArray, FloatArray]]

Point = tuple[float, float]
Four = tuple[float, float, float, float]

PACIFIC = (48.5, -125.0 - 1.0 / 3.0, 41.0 + 1.0 / 3.0, 143.0)

LEGS: list[Four] = [
    PACIFIC,
    (-20.0, -170.0, 15.0, 165.0),
    (10.0, 30.0, 60.0, 30.0),
    (0.0, -20.0, 0.0, 140.0),
    (50.0, -10.0, 50.0000001, 120.0),
    (78.0, 15.0, 71.0, -157.0),
    (60.0, 0.0, 90.0, 0.0),
    (90.0, 0.0, 45.0, 60.0),
    (60.0, 0.0, 50.0, 180.0),
    (-89.0, 0.0, -88.0, 170.0),
    (88.0, 10.0, 12.0, -150.0),
    (30.0, 0.0, -29.9, 179.7),
    (30.0, 0.0, -30.0, 179.99),
    (51.5, -0.1, 51.5005, -0.0993),
    (51.5, -0.1, 51.51, -0.1),
]
POINTS: list[Point] = [
    (50.0, -150.0),
    (-5.0, 175.0),
    (90.0, 0.0),
    (-89.5, 20.0),
    (0.0, 60.0),
    (89.999, -100.0),
    (-50.0, 5.0),
    (51.49, -0.09),
]


def on_leg(kind: str, leg: Four) -> tuple[float, Along]:
    """Return the leg's length and where its points lie."""
    line = great_circle if kind == "great circle" else rhumb_line
    length_m = float(line.inverse(*leg, WGS_84).distance_m)
    return length_m, lambda distance_m: line.points_along(*leg, distance_m, WGS_84)


def searched_m(point: Point, length_m: float, along: Along) -> float:
    """Look for the least distance in ever finer steps, from the three lowest of 400 and both ends."""
    steps = np.linspace(0.0, length_m, 401)
    found = measured_m(point, steps, along)
    least = float(found.min())
    for lowest in np.argsort(found)[:3]:
        low, high = steps[max(lowest - 1, 0)], steps[min(lowest + 1, 400)]
        while high - low > 1e-3:
            finer = np.linspace(low, high, 11)
            near = measured_m(point, finer, along)
            least = min(least, float(near.min()))
            best = int(near.argmin())
            low, high = finer[max(best - 1, 0)], finer[min(best + 1, 10)]
    return least


def measured_m(point: Point, distance_m: FloatArray, along: Along) -> FloatArray:
    return great_circle.inverse(*point, *along(distance_m), WGS_84).distance_m


def offset(kind: str, point: Point, leg: Four) -> Offset:
    measure = distance_from_great_circle if kind == "great circle" else distance_from_rhumb_line
    return measure(*point, leg, WGS_84)


@pytest.mark.parametrize("kind", ["great circle", "rhumb line"])
@pytest.mark.parametrize("number", range(len(LEGS)))
def test_the_shortest_distance_to_a_micrometre(kind: str, number: int) -> None:
    leg = LEGS[number]
    length_m, along = on_leg(kind, leg)
    for point in (POINTS[number % 8], POINTS[(3 * number + 1) % 8]):
        found = offset(kind, point, leg)
        assert found.distance_m == pytest.approx(searched_m(point, length_m, along), abs=1e-6)
        assert 0.0 <= found.along_m <= length_m
        assert measured_m(point, found.along_m, along) == pytest.approx(float(found.distance_m), abs=1e-6)


@pytest.mark.parametrize("kind", ["great circle", "rhumb line"])
@pytest.mark.parametrize("leg", LEGS)
@pytest.mark.parametrize(("across_m", "side"), [(1e-3, 1), (1.0, -1), (0.0, 0), (500.0, 1), (3000.0, -1)])
def test_a_point_set_off_at_right_angles_is_found_again(kind: str, leg: Four, across_m: float, side: int) -> None:
    length_m, along = on_leg(kind, leg)
    along_m = 0.37 * length_m
    lat_deg, lon_deg = along(np.asarray(along_m))
    if kind == "great circle":
        course_deg = great_circle.course_at(*leg, along_m, WGS_84).course_deg
    else:
        course_deg = rhumb_line.inverse(*leg, WGS_84).course_deg
    set_off = great_circle.direct(lat_deg, lon_deg, course_deg + 90.0 * (side or 1), across_m, WGS_84)
    found = offset(kind, (float(set_off.lat_deg), float(set_off.lon_deg)), leg)
    assert found.distance_m == pytest.approx(across_m, abs=1e-6)
    # The nearest point of a line that turns is told less sharply the farther off the point lies.
    assert found.along_m == pytest.approx(along_m, abs=2e-6 + 1e-9 * across_m)
    assert found.side == side


def test_off_the_end_the_nearer_end_counts() -> None:
    found = distance_from_great_circle([50.0, 50.0], [20.0, 60.0], (50.0, 30.0, 50.0, 50.0), WGS_84)
    ends = great_circle.inverse([50.0, 50.0], [20.0, 60.0], 50.0, [30.0, 50.0], WGS_84)
    assert found.distance_m == pytest.approx(ends.distance_m, abs=1e-6)
    assert found.along_m[0] == 0.0
    assert found.along_m[1] == great_circle.inverse(50.0, 30.0, 50.0, 50.0, WGS_84).distance_m


def test_dead_ahead_and_astern_is_on_neither_side() -> None:
    for point in ((20.0, 5.0), (70.0, 5.0), (40.0, 5.0)):
        assert distance_from_great_circle(*point, (30.0, 5.0, 60.0, 5.0), WGS_84).side == 0
        assert distance_from_rhumb_line(*point, (30.0, 5.0, 60.0, 5.0), WGS_84).side == 0


def test_on_the_sphere_it_is_the_cross_track_formula() -> None:
    """sin XTD = sin D sin (bearing - course). Common practice."""
    leg, point = (10.0, -20.0, 40.0, 60.0), (30.0, 10.0)
    sight = great_circle.inverse(leg[0], leg[1], *point, SPHERE)
    course_deg = great_circle.inverse(*leg, SPHERE).initial_course_deg
    angle = sight.distance_m / SPHERE.equatorial_radius_m
    across = math.asin(math.sin(angle) * math.sin(math.radians(sight.initial_course_deg - course_deg)))
    found = distance_from_great_circle(*point, leg, SPHERE)
    assert found.distance_m * found.side == pytest.approx(across * SPHERE.equatorial_radius_m, abs=1e-6)


def test_a_leg_of_no_length_is_its_point() -> None:
    for measure in (distance_from_great_circle, distance_from_rhumb_line):
        found = measure(11.0, 20.0, (10.0, 20.0, 10.0, 20.0), WGS_84)
        assert found.distance_m == pytest.approx(great_circle.inverse(11.0, 20.0, 10.0, 20.0, WGS_84).distance_m)
        assert found.along_m == 0.0


def test_points_and_legs_broadcast() -> None:
    found = distance_from_rhumb_line([[1.0], [2.0]], 0.0, (0.0, [0.0, 1.0, 2.0], 5.0, 5.0), WGS_84)
    assert found.distance_m.shape == found.along_m.shape == found.side.shape == (2, 3)
    assert distance_from_rhumb_line([], [], PACIFIC, WGS_84).distance_m.shape == (0,)


@pytest.mark.parametrize(
    "leg",
    [
        PACIFIC,
        (-33.9, 18.4, -22.9, -43.2),
        (-40.0, 10.0, 41.0, 80.0),
        (30.0, 0.0, -28.0, 178.0),
        (5.0, 100.0, 30.0, 100.001),
        (60.0, 0.0, 89.9, 175.0),
    ],
)
def test_greatest_separation_to_a_millimetre(leg: Four) -> None:
    length_m, along = on_leg("rhumb line", leg)
    low, high, greatest = 0.0, length_m, 0.0
    for steps in (161, 41, 41):
        points = np.linspace(low, high, steps)
        apart = distance_from_great_circle(*along(points), leg, WGS_84).distance_m
        greatest = max(greatest, float(apart.max()))
        best = int(apart.argmax())
        low, high = points[max(best - 1, 0)], points[min(best + 1, steps - 1)]
    assert greatest_separation_m(*leg, WGS_84) == pytest.approx(greatest, abs=1e-3)


def test_lines_that_are_one_have_no_separation() -> None:
    found = greatest_separation_m(
        [10.0, 0.0, 5.0, 60.0], [5.0, 0.0, 5.0, 0.0], [60.0, 0.0, 5.0, 90.0], [5.0, 90.0, 5.0, 70.0], WGS_84
    )
    assert found == pytest.approx(np.zeros(4), abs=1e-3)


def test_the_separation_is_the_same_both_ways_and_over_180() -> None:
    there = greatest_separation_m(35.0, 150.0, 45.0, -140.0, WGS_84)
    back = greatest_separation_m(45.0, -140.0, 35.0, 150.0, WGS_84)
    shifted = greatest_separation_m(35.0, 10.0, 45.0, 80.0, WGS_84)
    assert there == pytest.approx(float(back), abs=1e-3)
    assert there == pytest.approx(float(shifted), abs=1e-3)
