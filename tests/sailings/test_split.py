"""Steering parts: joints on the true line, the rules, and the fewest parts proved by brute force on the sphere."""

from __future__ import annotations

import math
from itertools import pairwise
from typing import TYPE_CHECKING

import numpy as np
import pytest

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.earth.figure import FIGURES, SPHERE, WGS_84
from navcore.errors import NoAnswerError
from navcore.lines import great_circle, rhumb_line
from navcore.lines.offset import distance_from_great_circle, distance_from_rhumb_line
from navcore.position import Position
from navcore.sailings.composite import composite
from navcore.sailings.parts import parse_parts
from navcore.sailings.split import SteeringParts, split_composite, split_great_circle

if TYPE_CHECKING:
    import numpy.typing as npt

    from navcore.earth.figure import Figure

SALAL, KUROMATSU = Position(48.5, -(125.0 + 20.0 / 60.0)), Position(41.0 + 20.0 / 60.0, 143.0)
RULES = ("10° longitude", "300 NM", "12 parts", "1 NM apart")


def check_sound(parts: SteeringParts, start: Position, end: Position, figure: Figure) -> None:
    assert parts.points[0] == start
    assert parts.points[-1] == end
    assert len(parts.points) == len(parts.courses_deg) + 1 == len(parts.distances_m) + 1
    for (one, other), course_deg, distance_m in zip(
        pairwise(parts.points), parts.courses_deg, parts.distances_m, strict=True
    ):
        rhumb = rhumb_line.inverse(*one, *other, figure)
        assert (course_deg, distance_m) == (float(rhumb.course_deg), float(rhumb.distance_m))


@pytest.mark.parametrize("rule", RULES)
def test_every_joint_lies_on_the_great_circle(rule: str) -> None:
    parts = split_great_circle(SALAL, KUROMATSU, WGS_84, parse_parts(rule))
    check_sound(parts, SALAL, KUROMATSU, WGS_84)
    lats_deg, lons_deg = np.array(parts.points).T
    off = distance_from_great_circle(lats_deg, lons_deg, (*SALAL, *KUROMATSU), WGS_84)
    assert off.distance_m.max() < 1e-6
    assert np.all(np.diff(off.along_m) > 0.0)
    assert parts.line_m == float(great_circle.inverse(*SALAL, *KUROMATSU, WGS_84).distance_m)
    assert parts.added_m > 0.0


@pytest.mark.parametrize("rule", RULES)
def test_every_joint_lies_on_the_composite_and_tangent_points_are_joints(rule: str) -> None:
    track = composite(SALAL, KUROMATSU, 50.0, WGS_84)
    parts = split_composite(track, parse_parts(rule))
    check_sound(parts, SALAL, KUROMATSU, WGS_84)
    reached, left = track.tangent_points
    first, last = parts.points.index(reached), parts.points.index(left)
    for points, ends in ((parts.points[: first + 1], (SALAL, reached)), (parts.points[last:], (left, KUROMATSU))):
        lats_deg, lons_deg = np.array(points).T
        off = distance_from_great_circle(lats_deg, lons_deg, (*ends[0], *ends[1]), WGS_84)
        assert off.distance_m.max() < 1e-6
    assert {point.lat_deg for point in parts.points[first : last + 1]} == {50.0}
    assert parts.line_m == pytest.approx(track.distance_m, abs=1e-6)


def test_by_longitude_the_joints_are_whole_meridians() -> None:
    parts = split_great_circle(SALAL, KUROMATSU, WGS_84, parse_parts("10° longitude"))
    # Just west and just east of 180° are one meridian.
    joints_deg = [point.lon_deg % 360.0 for point in parts.points[1:-1]]
    assert joints_deg == pytest.approx([230, 220, 210, 200, 190, 180, 170, 160, 150], abs=1e-11)


def test_a_meridian_that_is_an_end_is_no_second_joint() -> None:
    parts = split_great_circle(Position(40.0, -130.0), Position(45.0, -150.0), WGS_84, parse_parts("10° longitude"))
    assert [point.lon_deg for point in parts.points] == pytest.approx([-130.0, -140.0, -150.0])


def test_by_distance_the_joints_are_so_far_along_the_line() -> None:
    parts = split_great_circle(SALAL, KUROMATSU, WGS_84, parse_parts("300 NM"))
    lats_deg, lons_deg = np.array(parts.points).T
    along = distance_from_great_circle(lats_deg, lons_deg, (*SALAL, *KUROMATSU), WGS_84).along_m
    assert along[:-1] == pytest.approx(np.arange(13) * 300.0 * METRES_PER_NAUTICAL_MILE, abs=1e-5)


def test_by_number_the_parts_are_equal_along_each_arc() -> None:
    parts = split_great_circle(SALAL, KUROMATSU, WGS_84, parse_parts("12 parts"))
    assert len(parts.distances_m) == 12
    lats_deg, lons_deg = np.array(parts.points).T
    along = distance_from_great_circle(lats_deg, lons_deg, (*SALAL, *KUROMATSU), WGS_84).along_m
    assert np.diff(along) == pytest.approx(np.full(12, parts.line_m / 12.0), abs=1e-5)
    track = composite(SALAL, KUROMATSU, 50.0, WGS_84)
    assert len(split_composite(track, parse_parts("12 parts")).distances_m) == 12
    with pytest.raises(NoAnswerError, match="ask for 3 parts or more"):
        split_composite(track, parse_parts("2 parts"))


def test_parts_of_the_north_pacific_add_what_was_worked_for_them_by_hand() -> None:
    """On the sphere: 10° of longitude adds 1.0 NM and lies up to 7 NM off, 5° adds 0.3 NM, on the great circle less."""
    track = composite(SALAL, KUROMATSU, 50.0, SPHERE)
    by_10, by_5 = (split_composite(track, parse_parts(f"{step}° longitude")) for step in (10, 5))
    assert by_10.added_m / METRES_PER_NAUTICAL_MILE == pytest.approx(1.3, abs=0.1)
    assert by_10.greatest_separation_m / METRES_PER_NAUTICAL_MILE == pytest.approx(7.0, abs=0.3)
    assert by_5.added_m / METRES_PER_NAUTICAL_MILE == pytest.approx(0.4, abs=0.1)
    assert by_5.greatest_separation_m / METRES_PER_NAUTICAL_MILE == pytest.approx(1.9, abs=0.1)


@pytest.mark.parametrize("name", FIGURES)
def test_no_part_lies_farther_off_than_asked_by_dense_sampling(name: str) -> None:
    figure = FIGURES[name]
    parts = split_great_circle(SALAL, KUROMATSU, figure, parse_parts("1 NM apart"))
    worst_m = 0.0
    for one, other in pairwise(parts.points):
        length_m = float(rhumb_line.inverse(*one, *other, figure).distance_m)
        lats_deg, lons_deg = rhumb_line.points_along(*one, *other, np.linspace(0.0, length_m, 41), figure)
        worst_m = max(
            worst_m, float(distance_from_great_circle(lats_deg, lons_deg, (*one, *other), figure).distance_m.max())
        )
    assert worst_m <= METRES_PER_NAUTICAL_MILE
    assert worst_m == pytest.approx(parts.greatest_separation_m, rel=2e-3)


def test_the_line_lies_as_near_to_the_parts_as_they_to_it() -> None:
    parts = split_great_circle(SALAL, KUROMATSU, WGS_84, parse_parts("4 parts"))
    line = great_circle.points_along(*SALAL, *KUROMATSU, np.linspace(0.0, parts.line_m, 120), WGS_84)
    off = [distance_from_rhumb_line(*line, (*one, *other), WGS_84).distance_m for one, other in pairwise(parts.points)]
    assert np.min(off, axis=0).max() == pytest.approx(parts.greatest_separation_m, rel=0.01)


def separations_nmi(lats_rad: npt.NDArray[np.float64], lons_rad: npt.NDArray[np.float64]) -> npt.NDArray[np.float64]:
    """Return, for every pair of points of a great circle on the sphere, how far the rhumb line strays from it."""
    isometric = np.arctanh(np.sin(lats_rad))
    points = np.stack(
        (np.cos(lats_rad) * np.cos(lons_rad), np.cos(lats_rad) * np.sin(lons_rad), np.sin(lats_rad)), axis=-1
    )
    normal = np.cross(points[0], points[len(points) // 2])
    normal /= np.linalg.norm(normal)
    part = np.linspace(0.0, 1.0, 41)
    ones, others = np.triu_indices(len(lats_rad), 1)
    psi = isometric[ones, None] + (isometric[others] - isometric[ones])[:, None] * part
    lon = lons_rad[ones, None] + (lons_rad[others] - lons_rad[ones])[:, None] * part
    lat = np.arcsin(np.tanh(psi))
    off = normal[0] * np.cos(lat) * np.cos(lon) + normal[1] * np.cos(lat) * np.sin(lon) + normal[2] * np.sin(lat)
    table = np.full((len(lats_rad), len(lats_rad)), np.inf)
    table[ones, others] = np.degrees(np.arcsin(np.abs(off).max(axis=-1))) * 60.0
    return table


def fewest_by_brute_force(start: Position, end: Position, limit_nmi: float, nodes: int = 100) -> int:
    """Return the fewest parts with joints on a fine grid, every way of joining them tried."""
    length_m = float(great_circle.inverse(*start, *end, SPHERE).distance_m)
    lats, lons = great_circle.points_along(*start, *end, np.linspace(0.0, length_m, nodes), SPHERE)
    allowed = separations_nmi(np.radians(lats), np.unwrap(np.radians(lons))) <= limit_nmi
    reached = np.zeros(nodes, dtype=bool)
    reached[0] = True
    for count in range(1, nodes):
        reached = reached | allowed[reached].any(axis=0)
        if reached[-1]:
            return count
    raise AssertionError


def crossing_cases() -> list[tuple[Position, Position, float]]:
    random = np.random.default_rng(2)
    cases = []
    for _ in range(16):
        south, north = random.uniform(-45.0, -1.0), random.uniform(1.0, 45.0)
        cases.append((Position(south, 0.0), Position(north, random.uniform(5.0, 150.0)), 10 ** random.uniform(-0.7, 1)))
    for _ in range(6):
        lats = random.uniform(5.0, 65.0, 2)
        cases.append(
            (Position(lats[0], 0.0), Position(lats[1], random.uniform(10, 150)), 10 ** random.uniform(-0.5, 1))
        )
    return cases


@pytest.mark.parametrize(("start", "end", "limit_nmi"), crossing_cases())
def test_no_way_of_joining_on_a_fine_grid_takes_fewer_parts(start: Position, end: Position, limit_nmi: float) -> None:
    parts = split_great_circle(start, end, SPHERE, parse_parts(f"{limit_nmi:.6f} NM apart"))
    assert parts.greatest_separation_m <= float(f"{limit_nmi:.6f}") * METRES_PER_NAUTICAL_MILE
    assert len(parts.distances_m) <= fewest_by_brute_force(start, end, float(f"{limit_nmi:.6f}"))


def test_a_longer_part_across_the_equator_may_lie_nearer_and_is_found() -> None:
    """From 10° south a part to 5° north strays farther than one to 10° north, so first-come is not the fewest."""
    start, end = Position(-10.0, 0.0), Position(10.0, 40.0)
    length_m = float(great_circle.inverse(*start, *end, SPHERE).distance_m)
    lats, lons = great_circle.points_along(*start, *end, np.linspace(0.0, length_m, 5), SPHERE)
    apart = separations_nmi(np.radians(lats), np.radians(lons))[0]
    assert apart[3] > 1.2 * apart[4]
    parts = split_great_circle(start, end, SPHERE, parse_parts(f"{1.01 * apart[4]:.6f} NM apart"))
    assert len(parts.distances_m) == 1


def test_over_a_pole_the_pole_is_a_joint_and_the_parts_are_meridians() -> None:
    for side in (1.0, -1.0):
        start, end = Position(side * 60.0, 0.0), Position(side * 50.0, 180.0)
        for rule in RULES:
            parts = split_great_circle(start, end, WGS_84, parse_parts(rule))
            assert side * 90.0 in {point.lat_deg for point in parts.points}
            assert parts.greatest_separation_m == 0.0
            assert parts.added_m == pytest.approx(0.0, abs=1e-5)
            assert set(parts.courses_deg) == {0.0, 180.0}


def test_a_leg_close_by_the_pole_holds_the_distance_too() -> None:
    start, end = Position(60.0, 0.0), Position(60.0, 179.9)
    parts = split_great_circle(start, end, WGS_84, parse_parts("1 NM apart"))
    assert parts.greatest_separation_m <= METRES_PER_NAUTICAL_MILE
    for one, other in pairwise(parts.points):
        length_m = float(rhumb_line.inverse(*one, *other, WGS_84).distance_m)
        points = rhumb_line.points_along(*one, *other, np.linspace(0.0, length_m, 60)[1:-1], WGS_84)
        off = distance_from_great_circle(*points, (*start, *end), WGS_84).distance_m
        assert off.max() <= METRES_PER_NAUTICAL_MILE * 1.0001


@pytest.mark.parametrize(
    ("start", "end"),
    [
        (Position(10.0, 20.0), Position(40.0, 20.0)),
        (Position(0.0, 20.0), Position(0.0, 80.0)),
    ],
)
def test_where_both_lines_are_one_a_distance_asks_for_a_single_part(start: Position, end: Position) -> None:
    parts = split_great_circle(start, end, WGS_84, parse_parts("1 NM apart"))
    assert len(parts.distances_m) == 1
    assert parts.greatest_separation_m == 0.0
    assert parts.added_m == pytest.approx(0.0, abs=1e-5)


@pytest.mark.parametrize(
    "rule",
    ["0.001 NM", "0.001° longitude", "0.000001 NM apart", f"0.{300 * '0'}1 NM apart", f"0.{309 * '0'}1° longitude"],
)
def test_a_split_into_more_parts_than_anyone_steers_is_refused(rule: str) -> None:
    with pytest.raises(NoAnswerError, match="more than 1000 parts"):
        split_great_circle(SALAL, KUROMATSU, WGS_84, parse_parts(rule))


def test_a_leg_of_no_length_has_no_parts_to_steer() -> None:
    with pytest.raises(NoAnswerError, match="no length"):
        split_great_circle(SALAL, SALAL, WGS_84, parse_parts("3 parts"))


def test_points_keep_to_the_longitude_rule_across_the_antimeridian() -> None:
    parts = split_great_circle(SALAL, KUROMATSU, WGS_84, parse_parts("100 NM"))
    assert all(-180.0 <= point.lon_deg <= 180.0 for point in parts.points)
    assert math.fsum(parts.distances_m) == parts.distance_m
