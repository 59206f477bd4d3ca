"""The graticule: sensible intervals, every intersection, the spacing that a person can rule it by."""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

import numpy as np
import pytest

from navcore.charts.graticule import GRADUATIONS_MIN, INTERVALS_MIN, make_graticule
from navcore.charts.lambert import Lambert
from navcore.charts.mercator import Mercator
from navcore.charts.plane import PaperPlane
from navcore.charts.ruling import make_ruling
from navcore.charts.stereographic import Stereographic
from navcore.earth.figure import WGS_84
from navcore.earth.latitudes import meridional_parts_min

if TYPE_CHECKING:
    from navcore.charts.projection import Projection


def plane_about(projection: Projection, lat_deg: float, lon_deg: float, scale: float) -> PaperPlane:
    x_m, y_m = projection.forward(lat_deg, lon_deg)
    half_x_m, half_y_m = 0.1325 * scale, 0.0625 * scale
    return PaperPlane(projection, scale, half_x_m - float(x_m), half_y_m - float(y_m), 265.0, 125.0)


PLANES = [
    plane_about(Mercator(WGS_84, 180.0, 47.0), 47.0, 179.0, 2.5e6),
    plane_about(Mercator(WGS_84, 3.0, 54.0), 54.0, 3.0, 1.5e5),
    plane_about(Mercator(WGS_84, 0.0, 0.0), 0.0, 0.0, 2e8),
    plane_about(Stereographic.polar(WGS_84, 75.0), 84.0, 30.0, 2e7),
    plane_about(Stereographic.polar(WGS_84, -71.0, 170.0), -70.0, -175.0, 5e6),
    plane_about(Stereographic(WGS_84, -45.0, 80.0), -45.0, 80.0, 3e7),
    plane_about(Lambert(WGS_84, -40.0, (45.0, 60.0), 52.0), 55.0, -20.0, 1e7),
]
each_plane = pytest.mark.parametrize("plane", PLANES, ids=lambda p: f"{p.projection.name} {p.scale:g}")


@each_plane
def test_every_intersection_inside_the_neat_line_is_there_once_and_where_the_projection_puts_it(
    plane: PaperPlane,
) -> None:
    crossings = make_graticule(plane).intersections
    assert len({crossing[:2] for crossing in crossings}) == len(crossings) >= 4
    lat_deg, lon_deg, x_mm, y_mm = np.array(crossings).T
    np.testing.assert_allclose(plane.to_mm(lat_deg, lon_deg), np.column_stack((x_mm, y_mm)), atol=1e-9)
    assert x_mm.min() >= 0.0
    assert x_mm.max() <= plane.width_mm
    assert y_mm.min() >= 0.0
    assert y_mm.max() <= plane.height_mm


@each_plane
def test_lines_stand_neither_crowded_nor_lost_in_the_middle_of_the_sheet(plane: PaperPlane) -> None:
    graticule = make_graticule(plane)
    assert graticule.lat_interval_min in INTERVALS_MIN
    assert graticule.lon_interval_min in INTERVALS_MIN
    parallels = [line for line in graticule.lines if not line.is_meridian]
    meridians = [line for line in graticule.lines if line.is_meridian]
    assert 2 <= len(parallels) <= 16
    assert 2 <= len(meridians) <= 40


@each_plane
def test_the_fine_graduation_divides_the_interval(plane: PaperPlane) -> None:
    graticule = make_graticule(plane)
    for interval, step in (
        (graticule.lat_interval_min, graticule.lat_graduation_min),
        (graticule.lon_interval_min, graticule.lon_graduation_min),
    ):
        assert step in GRADUATIONS_MIN or step == interval
        assert round(interval / step) == pytest.approx(interval / step)


@each_plane
def test_the_fine_graduation_stands_on_the_neat_line_at_its_value(plane: PaperPlane) -> None:
    graduation = make_graticule(plane).graduation
    assert len(graduation) > 20
    is_meridian = np.array([kind for kind, _ in graduation])
    value_deg, x_mm, y_mm = np.array([(end.value_deg, end.x_mm, end.y_mm) for _, end in graduation]).T
    lat_deg, lon_deg = plane.to_earth(x_mm, y_mm)
    off_deg = (np.where(is_meridian, lon_deg, lat_deg) - value_deg + 180.0) % 360.0 - 180.0
    off_mm = off_deg * 60.0 * 1852.0 * 1000.0 / plane.scale
    assert np.max(np.abs(np.where(is_meridian, off_mm * np.cos(np.radians(lat_deg)), off_mm))) < 0.05


@each_plane
def test_lines_end_on_the_neat_line_or_where_meridians_are_thinned_out(plane: PaperPlane) -> None:
    for line in make_graticule(plane).lines:
        for end in line.ends:
            edges = (end.x_mm, plane.width_mm - end.x_mm, end.y_mm, plane.height_mm - end.y_mm)
            assert min(abs(edge) for edge in edges) < 1e-6


def test_meridians_thin_out_towards_the_pole_and_four_reach_it() -> None:
    plane = PLANES[3]
    pole = plane.to_mm(90.0, 0.0)
    reached = [
        line.value_deg
        for line in make_graticule(plane).lines
        if line.is_meridian and any(np.hypot(*(piece - pole).T).min() < 1e-6 for piece in line.pieces_mm)
    ]
    assert sorted(reached) == [-180.0, -90.0, 0.0, 90.0]


def test_a_mercator_sheet_is_ruled_by_meridional_parts() -> None:
    plane = PLANES[0]
    ruling = make_ruling(plane, make_graticule(plane))
    assert ruling.minute_of_longitude_mm is not None
    for lower, upper in zip(ruling.parallels, ruling.parallels[1:], strict=False):
        assert lower.meridional_parts_min is not None
        assert upper.meridional_parts_min is not None
        assert lower.distance_mm is not None
        assert upper.distance_mm is not None
        parts_min = upper.meridional_parts_min - lower.meridional_parts_min
        assert upper.distance_mm - lower.distance_mm == pytest.approx(parts_min * ruling.minute_of_longitude_mm)
        expected_min = meridional_parts_min([lower.value_deg, upper.value_deg], WGS_84)
        assert parts_min == pytest.approx(expected_min[1] - expected_min[0])


@pytest.mark.parametrize("plane", [PLANES[3], PLANES[4], PLANES[6]], ids=lambda p: p.projection.name)
def test_a_sheet_with_a_centre_is_ruled_by_radii_and_angles(plane: PaperPlane) -> None:
    graticule = make_graticule(plane)
    ruling = make_ruling(plane, graticule)
    assert ruling.centre_mm is not None
    radii = {line.value_deg: line.distance_mm for line in ruling.parallels}
    angles = {line.value_deg: line.angle_deg for line in ruling.meridians}
    north = plane.to_mm(80.0, plane.projection.central_lon_deg)[1] < ruling.centre_mm[1]
    for crossing in graticule.intersections:
        radius, angle = radii[crossing.lat_deg], angles[crossing.lon_deg]
        assert radius is not None
        assert angle is not None
        # The meridian's up leads to the centre in the north, away from it in the south.
        sign = -1.0 if north else 1.0
        x_mm = ruling.centre_mm[0] + sign * radius * math.sin(math.radians(angle))
        y_mm = ruling.centre_mm[1] + sign * radius * math.cos(math.radians(angle))
        assert (x_mm, y_mm) == pytest.approx((crossing.x_mm, crossing.y_mm), abs=1e-6)


def test_a_sheet_with_nothing_of_the_earth_has_no_line() -> None:
    plane = PaperPlane(Lambert(WGS_84, 0.0, (40.0, 50.0), 45.0), 1e7, 9e7, -9e8, 100.0, 100.0)
    graticule = make_graticule(plane)
    assert not graticule.lines
    assert not graticule.intersections


def test_a_sheet_of_the_whole_earth_has_no_more_lines_than_can_be_told_apart() -> None:
    plane = PaperPlane(Lambert(WGS_84, 0.0, (-56.0, 61.0), 2.0), 4e11, 3e10, 3e10, 160.0, 80.0)
    assert len(make_graticule(plane).lines) < 200
