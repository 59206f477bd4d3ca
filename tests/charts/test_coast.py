"""The shoreline: distances, crossings and windows, held against every segment tried one by one."""

from __future__ import annotations

import math
import subprocess
import sys

import numpy as np
import pytest
from geographiclib.geodesic import Geodesic

from navcore.charts.coast import ACCURACY, LONGEST_PIECE_M, load_coast, load_shore_lines
from navcore.earth.figure import WGS_84
from navcore.errors import RangeError
from navcore.lines import great_circle

NMI_M = 1852.0


def test_a_point_is_as_far_off_as_the_nearest_point_of_any_segment() -> None:
    coast = load_coast()
    rng = np.random.default_rng(5)
    lat_deg, lon_deg = rng.uniform(-80.0, 84.0, 60), rng.uniform(-180.0, 180.0, 60)
    lat_deg[:6], lon_deg[:6] = [-17.0, -16.9, 66.0, 71.2, -90.0, 90.0], [179.99, -179.99, 180.0, -180.0, 0.0, 0.0]
    cap_m = 60.0 * NMI_M
    off_m = coast.distance_m(lat_deg, lon_deg, cap_m)
    # The nearest vertex of the whole shoreline, by geodesic; segments are a few km long, so it is nearly the nearest.
    for index in np.flatnonzero(np.isfinite(off_m))[:25]:
        point_m = coast.space_m - _in_space(lat_deg[index], lon_deg[index])
        vertex = int(np.argmin(np.einsum("ij,ij->i", point_m, point_m)))
        geodesic = Geodesic.WGS84.Inverse(
            lat_deg[index], lon_deg[index], coast.lines.lat_deg[vertex], coast.lines.lon_deg[vertex]
        )
        assert off_m[index] <= geodesic["s12"] + 1.0
        assert off_m[index] >= geodesic["s12"] - 60_000.0
    assert np.isfinite(off_m).sum() >= 10


def _in_space(lat_deg: float, lon_deg: float) -> np.ndarray[tuple[int], np.dtype[np.float64]]:
    lat_rad, lon_rad = math.radians(lat_deg), math.radians(lon_deg)
    e2 = WGS_84.eccentricity_squared
    radius_m = WGS_84.equatorial_radius_m / math.sqrt(1.0 - e2 * math.sin(lat_rad) ** 2)
    across_m = radius_m * math.cos(lat_rad)
    return np.array(
        [across_m * math.cos(lon_rad), across_m * math.sin(lon_rad), (1.0 - e2) * radius_m * math.sin(lat_rad)]
    )


def test_the_grid_finds_what_trying_every_segment_finds() -> None:
    coast = load_coast()
    rng = np.random.default_rng(9)
    some = rng.integers(0, coast.start.size, 40)
    lat_deg = np.clip(coast.lines.lat_deg[coast.start[some]] + rng.normal(0.0, 0.2, 40), -90.0, 90.0)
    lon_deg = coast.lines.lon_deg[coast.start[some]] + rng.normal(0.0, 0.2, 40)
    found_m = coast.distance_m(lat_deg, lon_deg, 50_000.0)
    from_m, to_m = coast.space_m[coast.start], coast.space_m[coast.start + 1]
    along_m = to_m - from_m
    squared = np.maximum(np.einsum("ij,ij->i", along_m, along_m), 1e-9)
    for index in range(40):
        off_m = _in_space(lat_deg[index], lon_deg[index]) - from_m
        part = np.clip(np.einsum("ij,ij->i", along_m, off_m) / squared, 0.0, 1.0)
        nearest_m = np.min(np.linalg.norm(off_m - part[:, np.newaxis] * along_m, axis=1))
        assert found_m[index] == pytest.approx(nearest_m, abs=1e-3)


def test_known_places_are_where_the_shore_is() -> None:
    coast = load_coast()
    # Mid-Atlantic, far from anything; St Helena's middle, some 4 NM from its shore; the middle of Asia.
    off_m = coast.distance_m([30.0, -15.96, 46.0], [-40.0, -5.70, 86.0], 30.0 * NMI_M)
    assert math.isinf(off_m[0])
    assert 1.0 < off_m[1] / NMI_M < 6.0
    assert math.isinf(off_m[2])


def test_a_track_over_an_island_crosses_its_shore_twice_or_another_even_number_of_times() -> None:
    coast = load_coast()
    crossings = coast.crossings([-15.7], [-5.70], [-16.3], [-5.70])
    assert crossings.piece.size >= 2
    assert crossings.piece.size % 2 == 0
    np.testing.assert_allclose(coast.distance_m(crossings.lat_deg, crossings.lon_deg, 1000.0), 0.0, atol=5.0)
    assert coast.distance_of_pieces_m([-15.7], [-5.70], [-16.3], [-5.70], cap_m=1000.0) == [0.0]


def test_a_piece_is_as_far_off_as_its_nearest_point() -> None:
    coast = load_coast()
    # West of the Scillies, and across 180° south of Fiji.
    for lat1_deg, lon1_deg, lat2_deg, lon2_deg in ((49.8, -6.6, 50.1, -6.5), (-19.4, 179.8, -19.3, -179.8)):
        along = np.linspace(0.0, 1.0, 400)
        sample_lat_deg = lat1_deg + along * (lat2_deg - lat1_deg)
        sample_lon_deg = lon1_deg + along * (((lon2_deg - lon1_deg) + 180.0) % 360.0 - 180.0)
        least_m = coast.distance_m(sample_lat_deg, sample_lon_deg, 60_000.0).min()
        whole_m = coast.distance_of_pieces_m([lat1_deg], [lon1_deg], [lat2_deg], [lon2_deg], cap_m=60_000.0)
        assert whole_m[0] == pytest.approx(least_m, abs=60.0)


def test_a_crossing_over_180_is_found() -> None:
    # Taveuni and the east of Vanua Levu lie on 180°.
    crossings = load_coast().crossings([-16.85], [179.7], [-16.85], [-179.7])
    assert crossings.piece.size > 0
    assert np.all((crossings.lon_deg >= 179.5) | (crossings.lon_deg <= -179.5))


def test_a_window_gives_the_lines_that_touch_it_and_no_others() -> None:
    lines = load_shore_lines().inside(-19.0, 177.0, -16.0, -179.0)
    assert lines.lat_deg.size > 500
    starts = lines.starts
    touched = (lines.lat_deg >= -19.0) & (lines.lat_deg <= -16.0) & (np.mod(lines.lon_deg - 177.0, 360.0) <= 4.0)
    assert np.mean(np.maximum.reduceat(touched, starts)) > 0.8
    assert np.all(np.abs(np.diff(lines.lon_deg))[np.setdiff1d(np.arange(lines.lon_deg.size - 1), starts[1:] - 1)] < 5.0)


def test_the_whole_world_is_every_line() -> None:
    lines = load_shore_lines()
    assert lines.inside(-90.0, -180.0, 90.0, 180.0).starts.size == lines.starts.size


def test_a_thousand_legs_are_checked_whole() -> None:
    coast = load_coast()
    rng = np.random.default_rng(1)
    some = coast.start[rng.integers(0, coast.start.size, 1000)]
    lat_deg, lon_deg = np.clip(coast.lines.lat_deg[some], -75.0, 75.0), coast.lines.lon_deg[some]
    track = great_circle.direct(
        lat_deg[:, np.newaxis],
        lon_deg[:, np.newaxis],
        rng.uniform(0.0, 360.0, (1000, 1)),
        [0.0, 37e3, 74e3, 111e3],
        WGS_84,
    )
    pieces = [value[:, part].ravel() for part in (slice(0, -1), slice(1, None)) for value in track[:2]]
    off_m = coast.distance_of_pieces_m(*pieces, cap_m=5.0 * NMI_M)
    crossings = coast.crossings(*pieces)
    assert np.all(off_m[crossings.piece] == 0.0)
    # A leg that begins on the shore is at it.
    assert np.all(off_m.reshape(1000, 3)[np.abs(coast.lines.lat_deg[some]) < 75.0, 0] < 1.0)


def test_too_long_a_piece_and_a_cap_of_nothing_are_refused() -> None:
    coast = load_coast()
    with pytest.raises(RangeError, match="split the track"):
        coast.distance_of_pieces_m([0.0], [0.0], [0.0], [1.1 * LONGEST_PIECE_M / 111_000.0], cap_m=1000.0)
    with pytest.raises(RangeError):
        coast.distance_m(0.0, 0.0, 0.0)


def test_nothing_is_read_until_it_is_asked_for() -> None:
    code = "import navcore.charts.coast as c; assert c.load_shore_lines.cache_info().currsize == 0"
    assert subprocess.run([sys.executable, "-c", code], check=False).returncode == 0


def test_the_accuracy_says_that_it_is_not_for_navigation() -> None:
    assert "Not for navigation" in ACCURACY
