"""The projections against printed examples.

Sources, each named beside its check:
EPSG: IOGP Publication 373-7-2, EPSG Guidance Note 7 part 2, as carried in the EPSG Dataset v9.2.
Snyder: J. P. Snyder, Map Projections: A Working Manual, USGS PP 1395 (1987), Appendix A.
GIGS: IOGP Geospatial Integrity of Geoscience Software, tests 5102 to 5112, v2-0 2011-06-28.
"""

from __future__ import annotations

import math

import numpy as np
import pytest

from navcore.charts.lambert import Lambert
from navcore.charts.mercator import Mercator
from navcore.charts.stereographic import Stereographic
from navcore.earth.figure import FIGURES, WGS_84, Figure
from navcore.earth.latitudes import (
    conformal_latitude_deg,
    isometric_latitude_rad,
    meridian_radius_m,
    transverse_radius_m,
)

INTERNATIONAL = FIGURES["International 1924"]
BESSEL = FIGURES["Bessel 1841"]
KRASSOWSKY = Figure("Krassowsky 1940", 6378245.0, 298.3)
US_FOOT_M = 1200.0 / 3937.0
CLARKE_IN_FEET = Figure("Clarke 1866, US survey feet", 20925832.16, 294.9787)


def dms_deg(degrees: float, minutes: float, seconds: float = 0.0) -> float:
    return degrees + minutes / 60.0 + seconds / 3600.0


def test_mercator_with_a_false_origin_off_the_equator() -> None:
    # EPSG 1044, Mercator (variant C).
    projection = Mercator(KRASSOWSKY, 51.0, 42.0)
    x_m, y_m = projection.forward(53.0, 53.0)
    origin_m = projection.forward(42.0, 51.0)[1]
    assert x_m == pytest.approx(165704.29, abs=0.01)
    assert origin_m == pytest.approx(3819897.85, abs=0.01)
    assert y_m - origin_m == pytest.approx(1351950.22, abs=0.01)


def test_mercator_of_a_sphere() -> None:
    # EPSG 1026, Mercator (Spherical).
    projection = Mercator(Figure("sphere of 6371007 m", 6371007.0, math.inf))
    x_m, y_m = projection.forward(dms_deg(24, 22, 54.433), -dms_deg(100, 20))
    assert x_m == pytest.approx(-11156569.90, abs=0.01)
    assert y_m == pytest.approx(2796869.94, abs=0.01)


@pytest.mark.parametrize(
    ("lat_deg", "lon_deg", "east_m", "north_m"),
    [
        (77.6534822, 100.0876483, 2800000.0, 15000000.0),
        (0.9071392, 100.0876483, 2800000.0, 1000000.0),
        (0.0, 110.0, 3900000.0, 900000.0),
        (-2.0, 100.0876483, 2800000.0, 679490.65),
        (-2.0, -69.0, -15964105.84, 679490.65),
    ],
)
def test_mercator_with_a_scale_on_the_equator(lat_deg: float, lon_deg: float, east_m: float, north_m: float) -> None:
    # GIGS 5111, Batavia / NEIEZ (EPSG 3001): Bessel 1841, 110 E, 0.997, false origin 3 900 000, 900 000. The northern
    # latitudes are given to 7 decimals, which is 0.05 m at 77 N.
    x_m, y_m = Mercator(BESSEL, 110.0, central_scale=0.997).forward(lat_deg, lon_deg)
    assert x_m + 3900000.0 == pytest.approx(east_m, abs=0.05)
    assert y_m + 900000.0 == pytest.approx(north_m, abs=0.06)


@pytest.mark.parametrize(
    ("lat_deg", "lon_deg", "east_m", "north_m"),
    [(0.0, 51.0, 0.0, 0.0), (0.0, 57.0, 497112.88, 0.0), (-41.0, 67.0, 1325634.35, -3709687.25)],
)
def test_mercator_with_a_latitude_of_true_scale(lat_deg: float, lon_deg: float, east_m: float, north_m: float) -> None:
    # GIGS 5112, Pulkovo 1942 / Caspian Sea Mercator (EPSG 3388): Krassowsky 1940, 51 E, true scale at 42 N.
    x_m, y_m = Mercator(KRASSOWSKY, 51.0, 42.0).forward(lat_deg, lon_deg)
    assert x_m == pytest.approx(east_m, abs=0.05)
    assert y_m == pytest.approx(north_m, abs=0.05)


def test_polar_stereographic_with_a_scale_at_the_pole() -> None:
    # EPSG 9810, Polar Stereographic (variant A), WGS 84 / UPS North.
    x_m, y_m = Stereographic(WGS_84, 90.0, 0.0, 0.994).forward(73.0, 44.0)
    assert x_m + 2000000.0 == pytest.approx(3320416.75, abs=0.01)
    assert y_m + 2000000.0 == pytest.approx(632668.43, abs=0.01)
    assert np.hypot(x_m, y_m) == pytest.approx(1900814.564, abs=0.005)


def test_polar_stereographic_with_a_parallel_of_true_scale() -> None:
    # EPSG 9829, Polar Stereographic (variant B), Australian Antarctic.
    projection = Stereographic.polar(WGS_84, -71.0, 70.0)
    x_m, y_m = projection.forward(-75.0, 120.0)
    assert x_m + 6000000.0 == pytest.approx(7255380.79, abs=0.01)
    assert y_m + 6000000.0 == pytest.approx(7053389.56, abs=0.01)
    assert projection.central_scale == pytest.approx(0.97276901, abs=1e-8)
    assert np.hypot(x_m, y_m) == pytest.approx(1638783.238, abs=0.005)


def test_polar_stereographic_of_the_south_with_a_scale_at_the_pole() -> None:
    # Snyder, polar stereographic with known k0 (21-30 to 21-33). His example turns the axes: x and y as printed.
    projection = Stereographic(INTERNATIONAL, -90.0, -100.0, 0.994)
    x_m, y_m = projection.forward(-75.0, 150.0)
    assert x_m == pytest.approx(-1573645.3, abs=0.15)
    assert y_m == pytest.approx(-572760.0, abs=0.15)
    assert projection.scale_factor(-75.0, 150.0) == pytest.approx(1.0112245, abs=2e-7)
    assert np.hypot(x_m, y_m) == pytest.approx(1674638.3, abs=0.15)


def test_polar_stereographic_of_the_south_with_a_parallel_of_true_scale() -> None:
    # Snyder, polar stereographic with known φc (21-34).
    projection = Stereographic.polar(INTERNATIONAL, -71.0, -100.0)
    x_m, y_m = projection.forward(-75.0, 150.0)
    assert x_m == pytest.approx(-1540033.6, abs=0.15)
    assert y_m == pytest.approx(-560526.4, abs=0.15)
    assert projection.scale_factor(-75.0, 150.0) == pytest.approx(0.9896256, abs=2e-7)
    assert np.hypot(x_m, y_m) == pytest.approx(1638869.5, abs=0.15)


def test_conformal_and_isometric_latitude() -> None:
    # Snyder, auxiliary latitudes (3-1, 3-7, 3-8): Clarke 1866, e² = 0.00676866, 40 N.
    figure = Figure("e² = 0.00676866", 6378206.4, 1.0 / (1.0 - math.sqrt(1.0 - 0.00676866)))
    assert conformal_latitude_deg(40.0, figure) == pytest.approx(39.8085922, abs=2e-7)
    assert isometric_latitude_rad(40.0, figure) == pytest.approx(0.7585548, abs=2e-7)


def test_lambert_with_two_standard_parallels() -> None:
    # EPSG 9802, NAD27 / Texas South Central, in US survey feet.
    parallels_deg = (dms_deg(28, 23), dms_deg(30, 17))
    projection = Lambert(CLARKE_IN_FEET, -99.0, parallels_deg, dms_deg(27, 50))
    x_feet, y_feet = projection.forward(28.5, -96.0)
    assert x_feet + 2000000.0 == pytest.approx(2963503.91, abs=0.02)
    assert y_feet == pytest.approx(254759.80, abs=0.02)
    assert projection.cone == pytest.approx(0.48991263, abs=1e-8)
    assert math.radians(projection.convergence_deg(28.5, -96.0)) == pytest.approx(0.02565177, abs=1e-8)


def test_lambert_with_a_stretched_ellipsoid() -> None:
    # EPSG 1051, Lambert Conic Conformal (2SP Michigan): the ellipsoid is stretched by 1.0000382. False easting
    # 2 000 000 US survey feet.
    stretched = Figure("Clarke 1866 × 1.0000382, US survey feet", 20925832.16 * 1.0000382, 294.9787)
    projection = Lambert(stretched, -dms_deg(84, 20), (dms_deg(44, 11), dms_deg(45, 42)), dms_deg(43, 19))
    x_feet, y_feet = projection.forward(dms_deg(43, 45), -dms_deg(83, 10))
    assert x_feet + 2000000.0 == pytest.approx(2308335.75, abs=0.02)
    assert y_feet == pytest.approx(160210.48, abs=0.02)
    assert projection.cone == pytest.approx(0.70640741, abs=1e-8)


@pytest.mark.parametrize(
    ("lat_deg", "lon_deg", "east_m", "north_m"),
    [
        (58.0, 5.0, 760722.92, 3457368.68),
        (53.0, 5.0, 779816.748, 2893981.68),
        (51.0, 4.0, 717027.292, 2668695.784),
        (46.8, 4.0, 726915.752, 2201342.519),
        (53.0, 11.0, 1183924.412, 2923146.858),
    ],
)
def test_lambert_with_one_standard_parallel(lat_deg: float, lon_deg: float, east_m: float, north_m: float) -> None:
    # GIGS 5102, ED50 / France EuroLambert (EPSG 2192).
    projection = Lambert(INTERNATIONAL, dms_deg(2, 20, 14.025), (46.8,), 46.8, 0.99987742)
    x_m, y_m = projection.forward(lat_deg, lon_deg)
    assert x_m + 600000.0 == pytest.approx(east_m, abs=0.03)
    assert y_m + 2200000.0 == pytest.approx(north_m, abs=0.03)


@pytest.mark.parametrize(
    ("lat_deg", "lon_deg", "east_m", "north_m"),
    [
        (58.0, 5.0, 187742.7, 969521.653),
        (53.0, 5.0, 192504.921, 410490.433),
        (53.0, 11.0, 595117.95, 430202.63),
    ],
)
def test_lambert_counted_from_the_pole(lat_deg: float, lon_deg: float, east_m: float, north_m: float) -> None:
    # GIGS 5103, Belge 1972 / Belgian Lambert 72 (EPSG 31370).
    parallels_deg = (dms_deg(51, 10, 0.00204), dms_deg(49, 50, 0.00204))
    projection = Lambert(INTERNATIONAL, dms_deg(4, 22, 2.952), parallels_deg, 90.0)
    x_m, y_m = projection.forward(lat_deg, lon_deg)
    assert x_m + 150000.013 == pytest.approx(east_m, abs=0.03)
    assert y_m + 5400088.438 == pytest.approx(north_m, abs=0.03)


def test_lambert_of_a_manual_page() -> None:
    # GeographicLib, ConicProj(1) manual page: standard parallels 40d58 and 39d56, 77d45W, point 39.95N 75.17W.
    projection = Lambert(WGS_84, -dms_deg(77, 45), (dms_deg(40, 58), dms_deg(39, 56)), 40.0)
    assert projection.forward(39.95, -75.17)[0] == pytest.approx(220445.0, abs=0.6)
    assert projection.convergence_deg(39.95, -75.17) == pytest.approx(1.67, abs=0.006)
    assert projection.scale_factor(39.95, -75.17) == pytest.approx(1.0, abs=0.0005)


def test_the_other_oblique_stereographic_is_ours_on_the_sphere_of_gauss() -> None:
    # GIGS 5104, Amersfoort / RD New (EPSG 28992), is EPSG method 9809, the definition that is not used here: the
    # ellipsoid goes to the sphere of Gauss first. Ours of that sphere then gives the printed figures, and ours of the
    # ellipsoid does not. Sphere of Gauss by EPSG Guidance Note 7 part 2.
    centre_lat_deg, centre_lon_deg = dms_deg(52, 9, 22.178), dms_deg(5, 23, 15.5)
    lat_deg, lon_deg = 49.0, 4.0
    e2 = BESSEL.eccentricity_squared
    radius_m = math.sqrt(meridian_radius_m(centre_lat_deg, BESSEL) * transverse_radius_m(centre_lat_deg, BESSEL))
    stretch = math.sqrt(1.0 + e2 * math.cos(math.radians(centre_lat_deg)) ** 4 / (1.0 - e2))
    sine = math.sin(math.radians(centre_lat_deg)) / stretch
    shift_rad = math.atanh(sine) - stretch * isometric_latitude_rad(centre_lat_deg, BESSEL)
    on_gauss_deg = math.degrees(math.atan(math.sinh(stretch * isometric_latitude_rad(lat_deg, BESSEL) + shift_rad)))
    gauss = Figure("sphere of Gauss", radius_m, math.inf)
    projection = Stereographic(gauss, math.degrees(math.asin(sine)), centre_lon_deg, 0.9999079)
    x_m, y_m = projection.forward(on_gauss_deg, centre_lon_deg + stretch * (lon_deg - centre_lon_deg))
    assert x_m + 155000.0 == pytest.approx(53412.76, abs=0.05)
    assert y_m + 463000.0 == pytest.approx(112842.73, abs=0.05)
    ours_x_m, ours_y_m = Stereographic(BESSEL, centre_lat_deg, centre_lon_deg, 0.9999079).forward(lat_deg, lon_deg)
    assert 10.0 < math.hypot(ours_x_m - x_m, ours_y_m - y_m) < 100.0


def test_the_feet_of_the_two_feet_examples_are_the_ellipsoid_of_the_table() -> None:
    # 20 925 832.16 US survey feet is Clarke 1866 of the figures' table.
    in_metres = CLARKE_IN_FEET.equatorial_radius_m * US_FOOT_M
    assert in_metres == pytest.approx(FIGURES["Clarke 1866"].equatorial_radius_m, abs=0.002)
