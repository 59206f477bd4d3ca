"""The rhumb line's edges and properties; its agreement with other programs is in tests/published."""

from __future__ import annotations

import math
from itertools import product
from typing import TYPE_CHECKING

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from navcore.angles import wrap_180
from navcore.earth.figure import FIGURES, SPHERE, WGS_84
from navcore.earth.latitudes import meridian_distance_m, parallel_radius_m
from navcore.errors import NoAnswerError, RangeError
from navcore.lines import rhumb_line

if TYPE_CHECKING:
    from navcore.trigonometry import FloatArray

Four = tuple[float, float, float, float]

latitudes = st.floats(-89.9, 89.9)
longitudes = st.floats(-180.0, 180.0)


def metres_apart(lat1_deg: FloatArray, lon1_deg: FloatArray, lat2_deg: FloatArray, lon2_deg: FloatArray) -> FloatArray:
    """Enough for a few micrometres: sides of a small right-angled triangle."""
    north = np.radians(lat2_deg - lat1_deg) * 6.4e6
    east = np.radians(wrap_180(lon2_deg - lon1_deg)) * parallel_radius_m(lat1_deg, WGS_84)
    return np.hypot(north, east)


@given(latitudes, longitudes, latitudes, longitudes)
def test_there_leads_to_the_end_and_back_to_the_start(lat1: float, lon1: float, lat2: float, lon2: float) -> None:
    there, back = rhumb_line.inverse(lat1, lon1, lat2, lon2, WGS_84), rhumb_line.inverse(lat2, lon2, lat1, lon1, WGS_84)
    assert there.distance_m == pytest.approx(back.distance_m, rel=1e-15, abs=1e-8)
    end = rhumb_line.direct(lat1, lon1, there.course_deg, there.distance_m, WGS_84)
    assert metres_apart(*map(np.asarray, (*end, lat2, lon2))) < 1e-6
    start = rhumb_line.direct(lat2, lon2, there.course_deg, -there.distance_m, WGS_84)
    assert metres_apart(*map(np.asarray, (*start, lat1, lon1))) < 1e-6


@given(latitudes, longitudes, latitudes, longitudes)
def test_mirrored_in_the_equator_and_in_the_meridian(lat1: float, lon1: float, lat2: float, lon2: float) -> None:
    line = rhumb_line.inverse(lat1, lon1, lat2, lon2, WGS_84)
    south, west = (
        rhumb_line.inverse(-lat1, lon1, -lat2, lon2, WGS_84),
        rhumb_line.inverse(lat1, -lon1, lat2, -lon2, WGS_84),
    )
    assert south.distance_m == line.distance_m
    if line.distance_m == 0.0:
        return
    assert wrap_180(180.0 - south.course_deg - line.course_deg) == pytest.approx(0.0, abs=1e-12)
    if abs(lon2 - lon1) != 180.0:
        assert west.distance_m == line.distance_m
        assert wrap_180(west.course_deg + line.course_deg) == pytest.approx(0.0, abs=1e-12)


@pytest.mark.parametrize("figure_name", FIGURES)
def test_a_nearly_parallel_leg_is_as_long_as_the_parallels_arc(figure_name: str) -> None:
    figure = FIGURES[figure_name]
    for lat_deg, rise_deg in product((0.0, 12.5, -48.75, 71.0, 89.0), (0.0, 1e-14, 1e-13, -1e-12)):
        line = rhumb_line.inverse(lat_deg, -30.0, lat_deg + rise_deg, 20.0, figure)
        # The arc of the parallel half-way; a rise of a micrometre makes no other difference to the length.
        arc = np.radians(50.0) * parallel_radius_m(lat_deg + 0.5 * rise_deg, figure)
        assert line.distance_m == pytest.approx(arc, rel=1e-15, abs=1e-9)


@pytest.mark.parametrize("rise_deg", [1e-13, -1e-10, 1e-7, 1e-4])
def test_courses_near_90_lead_back_with_nothing_lost(rise_deg: float) -> None:
    line = rhumb_line.inverse(50.0, -170.0, 50.0 + rise_deg, 140.0, WGS_84)
    lat_deg, lon_deg = rhumb_line.direct(50.0, -170.0, line.course_deg, line.distance_m, WGS_84)
    assert lat_deg - 50.0 == pytest.approx(rise_deg, rel=1e-6, abs=3e-14)
    assert lon_deg == pytest.approx(140.0, abs=1e-13)


@pytest.mark.parametrize(
    ("leg", "course_deg"),
    [
        ((10.0, 0.0, 10.0, 180.0), 90.0),
        ((10.0, 0.0, 10.0, -180.0), 270.0),
        ((10.0, -90.0, 10.0, 90.0), 90.0),
        ((10.0, 90.0, 10.0, -90.0), 270.0),
        ((10.0, 179.0, 10.0, -179.0), 90.0),
        ((10.0, -179.0, 10.0, 179.0), 270.0),
        ((10.0, 180.0, 10.0, -180.0), 0.0),
        ((10.0, 5.0, 10.0, 5.0), 0.0),
        ((-0.0, 5.0, 0.0, 5.0), 0.0),
        ((0.0, 5.0, 90.0, 77.0), 0.0),
        ((0.0, 5.0, -90.0, 77.0), 180.0),
        ((90.0, 5.0, 1.0, 77.0), 180.0),
        ((-90.0, 5.0, 1.0, 77.0), 0.0),
        ((-90.0, 5.0, 90.0, 77.0), 0.0),
        ((90.0, 5.0, 90.0, 77.0), 0.0),
    ],
)
def test_the_way_round_and_the_poles(leg: Four, course_deg: float) -> None:
    assert rhumb_line.inverse(*leg, WGS_84).course_deg == course_deg
    assert rhumb_line.inverse(*leg, SPHERE).course_deg == course_deg


def test_a_leg_to_a_pole_is_as_long_as_the_meridian() -> None:
    quarter = float(meridian_distance_m(90.0, WGS_84))
    # Source: quarter of the meridian of WGS 84, 10 001 965.7293 m, in mpmath at 50 digits.
    assert quarter == pytest.approx(10001965.72931272281, abs=2e-9)
    assert rhumb_line.inverse(0.0, 5.0, 90.0, 77.0, WGS_84).distance_m == quarter
    assert rhumb_line.inverse(90.0, 5.0, -90.0, 77.0, WGS_84).distance_m == pytest.approx(2 * quarter, rel=1e-15)
    lat_deg, lon_deg = rhumb_line.direct([0.0, 0.0], 5.0, [0.0, 180.0], quarter + np.array([4e-7, -4e-7]), WGS_84)
    assert lat_deg.tolist() == [90.0, -90.0]
    assert lon_deg.tolist() == [5.0, 5.0]
    lat_deg, lon_deg = rhumb_line.direct(90.0, 40.0, 180.0, quarter, WGS_84)
    assert float(lat_deg) == pytest.approx(0.0, abs=2e-14)
    assert float(lon_deg) == 40.0


def test_past_a_pole_there_is_no_rhumb_line_and_the_message_says_how_far_it_is() -> None:
    with pytest.raises(NoAnswerError, match=r"the pole is 2709\.0 NM off"):
        rhumb_line.direct(45.0, 0.0, 0.0, 1e7, WGS_84)
    with pytest.raises(NoAnswerError, match=r"\(at index 1, 0\) the pole is 5417\.9 NM off"):
        rhumb_line.direct([[0.0], [45.0]], 0.0, [[90.0, 0.0], [60.0, 0.0]], [[1e7, 1e6], [1.2e7, 1e7]], WGS_84)
    with pytest.raises(NoAnswerError, match="pole"):
        rhumb_line.direct(45.0, 0.0, 180.0, -1e7, WGS_84)
    with pytest.raises(NoAnswerError, match="every rhumb line from a pole runs along a meridian"):
        rhumb_line.direct(90.0, 0.0, 135.0, 1e6, WGS_84)


@pytest.mark.parametrize("leg", [(40.0, -70.0, 50.0, -10.0), (-30.0, 170.0, 12.0, -140.0), (60.0, 3.0, 60.0, -9.0)])
def test_points_along_lie_on_the_leg_at_their_distances(leg: Four) -> None:
    whole = rhumb_line.inverse(*leg, WGS_84)
    distances = np.linspace(0.0, float(whole.distance_m), 9)
    lat_deg, lon_deg = rhumb_line.points_along(*leg, distances, WGS_84)
    before = rhumb_line.inverse(leg[0], leg[1], lat_deg[1:], lon_deg[1:], WGS_84)
    after = rhumb_line.inverse(lat_deg[:-1], lon_deg[:-1], leg[2], leg[3], WGS_84)
    assert before.distance_m == pytest.approx(distances[1:], abs=1e-6)
    assert after.distance_m == pytest.approx(whole.distance_m - distances[:-1], abs=1e-6)
    assert before.course_deg == pytest.approx(np.full(8, whole.course_deg), abs=1e-10)
    assert after.course_deg == pytest.approx(np.full(8, whole.course_deg), abs=1e-10)


def test_legs_and_distances_broadcast() -> None:
    lat_deg, lon_deg = rhumb_line.points_along([[10.0], [20.0]], 0.0, 30.0, [[5.0], [6.0]], [0.0, 1e5, 2e5], WGS_84)
    assert lat_deg.shape == lon_deg.shape == (2, 3)


def test_nothing_jumps_at_180() -> None:
    lon_deg = np.array([179.9999999, 180.0, -180.0, -179.9999999])
    line = rhumb_line.inverse(10.0, 170.0, 20.0, lon_deg, WGS_84)
    assert np.all(np.abs(np.diff(line.distance_m)) < 0.02)
    assert np.all(np.diff(line.course_deg) >= 0.0)
    assert np.all(np.diff(line.course_deg) < 1e-6)


@given(latitudes, longitudes, latitudes, longitudes, st.floats(0.0, 1.0))
def test_a_crossing_lies_on_the_leg(lat1: float, lon1: float, lat2: float, lon2: float, part: float) -> None:
    whole = rhumb_line.inverse(lat1, lon1, lat2, lon2, WGS_84)
    lat_deg, lon_deg = rhumb_line.points_along(lat1, lon1, lat2, lon2, part * whole.distance_m, WGS_84)
    by_meridian = rhumb_line.crossing_of_meridian(lat1, lon1, lat2, lon2, lon_deg, WGS_84)
    by_parallel = rhumb_line.crossing_of_parallel(lat1, lon1, lat2, lon2, lat_deg, WGS_84)
    for crossing in (by_meridian, by_parallel):
        if not math.isnan(crossing.distance_m):
            expected = rhumb_line.points_along(lat1, lon1, lat2, lon2, crossing.distance_m, WGS_84)
            assert metres_apart(crossing.lat_deg, crossing.lon_deg, *expected) < 1e-6
    if 0.0 < part < 1.0 and abs(wrap_180(lon2 - lon1)) > 1e-3 and abs(lat2 - lat1) > 1e-3:
        assert by_meridian.distance_m == pytest.approx(part * whole.distance_m, abs=1e-3)
        assert by_parallel.distance_m == pytest.approx(part * whole.distance_m, abs=1e-3)


def test_crossings_off_the_leg_are_not_a_number() -> None:
    meridians = rhumb_line.crossing_of_meridian(35.0, 140.0, 48.0, -125.0, [140.0, 180.0, -125.0, 139.0, 0.0], WGS_84)
    assert np.isnan(meridians.distance_m).tolist() == [False, False, False, True, True]
    assert meridians.lat_deg[[0, 2]].tolist() == [pytest.approx(35.0, abs=1e-14), 48.0]
    assert meridians.lon_deg[1] == -180.0
    parallels = rhumb_line.crossing_of_parallel(35.0, 140.0, 48.0, -125.0, [35.0, 40.0, 48.0, 34.9, 90.0], WGS_84)
    assert np.isnan(parallels.distance_m).tolist() == [False, False, False, True, True]
    assert parallels.lon_deg[[0, 2]].tolist() == [140.0, -125.0]


def test_a_leg_along_a_meridian_or_parallel_does_not_cross_it() -> None:
    assert math.isnan(rhumb_line.crossing_of_meridian(10.0, 5.0, 20.0, 5.0, 5.0, WGS_84).distance_m)
    assert math.isnan(rhumb_line.crossing_of_parallel(10.0, 5.0, 10.0, 50.0, 10.0, WGS_84).distance_m)
    to_pole = rhumb_line.crossing_of_parallel(60.0, 5.0, 90.0, 77.0, [75.0, 90.0], WGS_84)
    assert to_pole.lon_deg.tolist() == [5.0, 5.0]
    assert to_pole.distance_m[1] == rhumb_line.inverse(60.0, 5.0, 90.0, 5.0, WGS_84).distance_m
    assert math.isnan(rhumb_line.crossing_of_meridian(60.0, 5.0, 90.0, 77.0, 30.0, WGS_84).distance_m)


def test_what_is_not_finite_is_refused() -> None:
    with pytest.raises(RangeError, match="lon2_deg"):
        rhumb_line.inverse(0.0, 0.0, 0.0, math.nan, WGS_84)
    with pytest.raises(RangeError, match="distance_m"):
        rhumb_line.direct(0.0, 0.0, 90.0, math.inf, WGS_84)
