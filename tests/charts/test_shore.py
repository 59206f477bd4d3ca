"""The shoreline on a plane: cut where the map is, thinned, and no more of it given than is looked at."""

from __future__ import annotations

from typing import TYPE_CHECKING

import numpy as np

from navcore.charts.coast import ShoreLines, load_shore_lines
from navcore.charts.mercator import Mercator
from navcore.charts.plane import PaperPlane
from navcore.charts.shore import LaidShore, lay_off_shore, thinned
from navcore.charts.stereographic import Stereographic
from navcore.earth.figure import WGS_84

if TYPE_CHECKING:
    from navcore.trigonometry import FloatArray

WORLD = PaperPlane(Mercator(WGS_84), 1e8, 0.0, 0.0, 400.0, 400.0)


def square(lat_deg: float, lon_deg: float) -> ShoreLines:
    """Return an island of a degree."""
    lat = lat_deg + np.array([0.0, 1.0, 1.0, 0.0, 0.0])
    return ShoreLines(lat, lon_deg + np.array([0.0, 0.0, 1.0, 1.0, 0.0]), np.array([0]))


def test_an_island_opposite_the_central_meridian_is_cut_on_mercator_and_whole_about_the_pole() -> None:
    island = square(70.0, 179.5)
    cut = lay_off_shore(island, WORLD.to_mm, 0.0, 20.0)
    assert np.count_nonzero(np.isnan(cut[:, 0])) == 2
    polar = PaperPlane(Stereographic.polar(WGS_84, 90.0), 1e7, 0.0, 0.0, 400.0, 400.0)
    assert not np.any(np.isnan(lay_off_shore(island, polar.to_mm, 0.0, 20.0)))


def test_no_line_is_nothing_laid_off() -> None:
    none = ShoreLines(np.empty(0), np.empty(0), np.empty(0, dtype=np.int64))
    assert lay_off_shore(none, WORLD.to_mm, 0.0, 20.0).shape == (0, 2)
    assert LaidShore(np.empty((0, 2))).inside((0.0, 0.0, 1.0, 1.0), 0.1).shape == (0, 2)


def test_thinning_keeps_the_ends_of_lines_and_moves_nothing_by_more_than_its_step() -> None:
    line = np.column_stack((np.linspace(0.0, 10.0, 1001), np.sin(np.linspace(0.0, 10.0, 1001))))
    kept = thinned(np.concatenate((line, [[np.nan, np.nan]], line + 20.0)), 0.5)
    assert 20 < len(kept) < 120
    gap = int(np.flatnonzero(np.isnan(kept[:, 0]))[0])
    np.testing.assert_array_equal(kept[gap - 1], line[-1])
    np.testing.assert_array_equal(kept[[0, gap + 1]], [line[0], line[0] + 20.0])
    nearest = np.min(np.hypot(*(line[:, np.newaxis] - kept[:gap]).transpose(2, 0, 1)), axis=1)
    assert nearest.max() < 0.5 * np.sqrt(2.0)


def test_a_window_gives_the_shore_in_every_square_that_is_in_it_and_little_more() -> None:
    place = lay_off_shore(load_shore_lines(), WORLD.to_mm, 0.0, 20.0)
    window = (-5.0, 40.0, 15.0, 60.0)

    def squares(points: FloatArray) -> set[tuple[float, float]]:
        held = (points[:, 0] > window[0]) & (points[:, 0] < window[2])
        held &= (points[:, 1] > window[1]) & (points[:, 1] < window[3])
        return {(x, y) for x, y in np.floor(points[held] / 0.25).tolist()}

    given = LaidShore(place).inside(window, 0.25)
    assert squares(given) == squares(place)
    assert len(given) < 0.1 * len(thinned(place, 0.25))


def test_a_polyline_goes_on_from_one_run_to_the_next() -> None:
    line = np.column_stack((np.arange(100.0), np.zeros(100)))
    given = LaidShore(line).inside((-1.0, -1.0, 200.0, 1.0), 0.5)
    joints = np.flatnonzero(np.isnan(given[:, 0]))[:3]
    np.testing.assert_array_equal(given[joints - 1], given[joints + 1])
    assert set(given[np.isfinite(given[:, 0]), 0].tolist()) == set(range(100))
