"""The quick separation of parts against the shortest distances on the figure."""

from __future__ import annotations

import math

import numpy as np
import pytest

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.earth.figure import FIGURES
from navcore.lines import great_circle
from navcore.lines.great_circle_path import path_leaving
from navcore.lines.offset import greatest_separation_m
from navcore.sailings.separation import separations_m


@pytest.mark.parametrize("name", ["sphere", "WGS 84"])
def test_the_quick_separation_agrees_with_the_shortest_distances(name: str) -> None:
    figure, random = FIGURES[name], np.random.default_rng(11)
    for _ in range(25):
        lat_deg, course_deg, length_m = random.uniform(-75, 75), random.uniform(0, 360), 10 ** random.uniform(5, 6.7)
        path, start_rad = path_leaving(lat_deg, course_deg, figure)
        end_rad = float(path.arc_at_rad(path.distance_m(start_rad) + length_m))
        end = great_circle.direct(lat_deg, 0.0, course_deg, length_m, figure)
        found_m = float(separations_m(path, np.array([start_rad, end_rad]))[0])
        true_m = float(greatest_separation_m(lat_deg, 0.0, end.lat_deg, end.lon_deg, figure))
        allowed = 1e-5 if true_m < 2.0 * METRES_PER_NAUTICAL_MILE else 1e-4
        assert found_m == pytest.approx(true_m, rel=allowed, abs=0.002)


def test_parts_side_by_side_are_each_as_if_alone() -> None:
    path, start_rad = path_leaving(48.5, 301.2, FIGURES["WGS 84"])
    joints_rad = start_rad + np.array([0.0, 0.1, 0.25, 0.3, 0.9])
    alone = [float(separations_m(path, joints_rad[index : index + 2])[0]) for index in range(4)]
    assert separations_m(path, joints_rad).tolist() == pytest.approx(alone, rel=1e-12)


def test_along_the_equator_and_a_meridian_nothing_separates() -> None:
    for lat_deg, course_deg in ((0.0, 90.0), (10.0, 0.0)):
        path, start_rad = path_leaving(lat_deg, course_deg, FIGURES["WGS 84"])
        assert separations_m(path, np.array([start_rad, start_rad + math.radians(40.0)]))[0] < 1e-6
