"""Both lines got another way: great circles by pyproj (the same method, in PROJ's own C), rhumb lines by quadrature."""

from __future__ import annotations

import numpy as np
import pytest

from navcore.angles import difference_of_longitude, wrap_180
from navcore.earth.figure import FIGURES, SPHERE, WGS_84
from navcore.earth.latitudes import meridian_radius_m, parallel_radius_m
from navcore.lines import great_circle, rhumb_line

pyproj = pytest.importorskip("pyproj")


def anywhere(seed: int, number: int) -> np.ndarray[tuple[int, ...], np.dtype[np.float64]]:
    """Return lat1, lon1, lat2, lon2 of legs, a quarter of them short."""
    random = np.random.default_rng(seed)
    lat1, lat2 = np.degrees(np.arcsin(random.uniform(-1.0, 1.0, (2, number))))
    lon1, lon2 = random.uniform(-180.0, 180.0, (2, number))
    quarter = slice(0, number // 4)
    lat2[quarter] = np.clip(lat1[quarter] + random.uniform(-0.1, 0.1, number // 4), -89.9, 89.9)
    lon2[quarter] = wrap_180(lon1[quarter] + random.uniform(-0.1, 0.1, number // 4))
    return np.stack((lat1, lon1, lat2, lon2))


@pytest.mark.parametrize("figure_name", ["WGS 84", "Clarke 1880", "sphere"])
def test_great_circles_agree_with_pyproj(figure_name: str) -> None:
    figure = FIGURES[figure_name]
    lat1, lon1, lat2, lon2 = anywhere(seed=1, number=1000)
    geod = pyproj.Geod(a=figure.equatorial_radius_m, f=figure.flattening)
    forward, back, distance_m = geod.inv(lon1, lat1, lon2, lat2)
    line = great_circle.inverse(lat1, lon1, lat2, lon2, figure)
    assert line.distance_m == pytest.approx(distance_m, abs=15e-9)
    allowed = np.maximum(1e-7, np.degrees(10e-9 / distance_m))
    assert np.all(np.abs(wrap_180(line.initial_course_deg - forward)) <= allowed)
    assert np.all(np.abs(wrap_180(line.final_course_deg - back - 180.0)) <= allowed)


def test_great_circles_run_out_as_in_pyproj() -> None:
    lat1, lon1, lat2, _ = anywhere(seed=2, number=1000)
    course_deg, distance_m = lon1 + 180.0, (lat2 + 90.0) * 1.1e5
    lon, lat, _ = pyproj.Geod(ellps="WGS84").fwd(lon1, lat1, course_deg, distance_m)
    reached = great_circle.direct(lat1, lon1, course_deg, distance_m, WGS_84)
    assert great_circle.inverse(reached.lat_deg, reached.lon_deg, lat, lon, WGS_84).distance_m.max() < 20e-9


@pytest.mark.parametrize("figure_name", FIGURES)
def test_rhumb_lines_agree_with_integration_along_the_meridian(figure_name: str) -> None:
    """Δm = ∫ρ dφ and Δψ = ∫ρ/(ν cos φ) dφ, by Gauss-Legendre's rule of 96 points, each leg at once."""
    figure = FIGURES[figure_name]
    lat1, lon1, lat2, lon2 = anywhere(seed=3, number=500)
    lat1, lat2 = 0.9 * lat1, 0.9 * lat2
    node, weight = np.polynomial.legendre.leggauss(96)
    latitude = 0.5 * (lat1 + lat2) + 0.5 * (lat2 - lat1) * node[:, np.newaxis]
    radius = meridian_radius_m(latitude, figure)
    half_rad = 0.5 * np.radians(lat2 - lat1)
    northing = half_rad * (weight @ radius)
    isometric = half_rad * (weight @ (radius / parallel_radius_m(latitude, figure)))
    d_long = np.radians(difference_of_longitude(lon1, lon2))
    line = rhumb_line.inverse(lat1, lon1, lat2, lon2, figure)
    assert line.distance_m == pytest.approx(np.hypot(northing, northing / isometric * d_long), abs=1e-6)
    assert wrap_180(line.course_deg - np.degrees(np.arctan2(d_long, isometric))) == pytest.approx(
        np.zeros_like(lat1), abs=1e-11
    )


def test_on_the_sphere_the_great_circle_is_the_cosine_formulas() -> None:
    """cos D = sin φ1 sin φ2 + cos φ1 cos φ2 cos Δλ. Common practice."""
    lat1, lon1, lat2, lon2 = anywhere(seed=4, number=500)
    line = great_circle.inverse(lat1, lon1, lat2, lon2, SPHERE)
    sines = np.sin(np.radians(lat1)) * np.sin(np.radians(lat2))
    cosines = np.cos(np.radians(lat1)) * np.cos(np.radians(lat2))
    cosine = sines + cosines * np.cos(np.radians(lon2 - lon1))
    assert np.cos(line.distance_m / SPHERE.equatorial_radius_m) == pytest.approx(cosine, abs=1e-14)
