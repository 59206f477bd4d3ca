"""A great circle by its arc against the geodesic library, on every named figure."""

from __future__ import annotations

import math

import numpy as np
import pytest
from geographiclib.geodesic import Geodesic

from navcore.earth.figure import FIGURES, WGS_84
from navcore.lines.great_circle_path import arc_at_latitude_rad, path_leaving, path_with_vertex

FIGURE = pytest.mark.parametrize("name", FIGURES)


@FIGURE
def test_position_course_and_distance_agree_with_the_geodesic_library(name: str) -> None:
    figure = FIGURES[name]
    geodesic = Geodesic(figure.equatorial_radius_m, figure.flattening)
    random = np.random.default_rng(5)
    for _ in range(100):
        lat_deg, course_deg = math.degrees(math.asin(random.uniform(-1.0, 1.0))), random.uniform(0.0, 360.0)
        distance_m = random.uniform(0.0, 1.9e7)
        wanted = geodesic.Direct(lat_deg, 0.0, course_deg, distance_m, Geodesic.STANDARD | Geodesic.LONG_UNROLL)
        path, start_rad = path_leaving(lat_deg, course_deg, figure)
        end_rad = float(path.arc_at_rad(path.distance_m(start_rad) + distance_m))
        d_long_deg = math.degrees(float(path.longitude_rad(end_rad) - path.longitude_rad(start_rad)))
        cosine = math.cos(math.radians(wanted["lat2"]))
        assert float(path.latitude_deg(end_rad)) == pytest.approx(wanted["lat2"], abs=1e-12)
        assert (d_long_deg - wanted["lon2"]) * cosine == pytest.approx(0.0, abs=1e-12)
        turned_deg = (float(path.course_deg(end_rad)) - wanted["azi2"] + 180.0) % 360.0 - 180.0
        assert turned_deg * cosine == pytest.approx(0.0, abs=1e-11)


@FIGURE
def test_a_path_with_a_vertex_touches_that_latitude_on_an_easterly_course(name: str) -> None:
    path = path_with_vertex(50.0, FIGURES[name])
    assert float(path.latitude_deg(0.5 * math.pi)) == pytest.approx(50.0, abs=1e-13)
    assert float(path.course_deg(0.5 * math.pi)) == pytest.approx(90.0, abs=1e-13)


def test_a_path_comes_up_to_a_latitude_where_it_has_that_latitude() -> None:
    path = path_with_vertex(50.0, WGS_84)
    for lat_deg in (-49.999999, -20.0, 0.0, 33.0, 49.999999):
        arc_rad = arc_at_latitude_rad(path, lat_deg)
        assert float(path.latitude_deg(arc_rad)) == pytest.approx(lat_deg, abs=1e-13)
    assert arc_at_latitude_rad(path, 50.0) == pytest.approx(0.5 * math.pi, abs=1e-7)


def test_a_path_takes_arrays_of_any_shape() -> None:
    path, start_rad = path_leaving(48.5, 301.2, WGS_84)
    arcs_rad = start_rad + np.linspace(0.0, 1.0, 6).reshape(2, 3)
    for values in (path.distance_m(arcs_rad), path.longitude_rad(arcs_rad), path.latitude_deg(arcs_rad)):
        assert values.shape == (2, 3)
        assert np.all(np.isfinite(values))
