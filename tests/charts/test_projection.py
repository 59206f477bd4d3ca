"""The four projections: against PROJ, there and back, angles and circles kept, and what can't be shown."""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

import numpy as np
import pytest

from navcore.angles import difference_of_longitude
from navcore.charts.gnomonic import Gnomonic
from navcore.charts.lambert import Lambert
from navcore.charts.mercator import Mercator
from navcore.charts.stereographic import Stereographic
from navcore.earth.figure import FIGURES, SPHERE, WGS_84, Figure
from navcore.earth.latitudes import degree_of_latitude_m, degree_of_longitude_m
from navcore.errors import RangeError
from navcore.lines import great_circle

if TYPE_CHECKING:
    from collections.abc import Callable

    from navcore.charts.projection import Projection
    from navcore.trigonometry import FloatArray

INTERNATIONAL = FIGURES["International 1924"]

PROJECTIONS: list[Projection] = [
    projection
    for figure in (WGS_84, INTERNATIONAL, SPHERE)
    for projection in (
        Mercator(figure, 170.0, 47.0),
        Mercator(figure, -75.0, -12.5),
        Stereographic.polar(figure, 71.0, -100.0),
        Stereographic.polar(figure, 90.0),
        Stereographic.polar(figure, -71.0, 170.0),
        Stereographic(figure, 40.0, -100.0, 0.9999),
        Stereographic(figure, 0.0, 179.0),
        Stereographic(figure, -88.0, 12.0),
        Lambert(figure, -96.0, (33.0, 45.0), 23.0),
        Lambert(figure, 175.0, (-33.0, -45.0), -40.0),
        Lambert(figure, -77.0, (18.0,), 18.0, 0.99),
        Lambert(figure, 5.0, (55.0, -20.0), 0.0),
    )
] + [Gnomonic(40.0, -100.0), Gnomonic(90.0, 20.0), Gnomonic(-35.0, 179.0)]

each_projection = pytest.mark.parametrize("projection", PROJECTIONS, ids=lambda p: f"{p.name}-{p.proj_string(0, 0)}")


def shown_points(projection: Projection, highest_lat_deg: float = 89.9) -> tuple[FloatArray, FloatArray]:
    rng = np.random.default_rng(20270304)
    lat_deg, lon_deg = rng.uniform(-highest_lat_deg, highest_lat_deg, 2000), rng.uniform(-180.0, 180.0, 2000)
    x_m, y_m = projection.forward(lat_deg, lon_deg)
    near = np.isfinite(x_m) & (np.hypot(x_m, y_m) < 3e7)
    return lat_deg[near], lon_deg[near]


@each_projection
def test_coordinates_agree_with_proj_to_a_micrometre(projection: Projection) -> None:
    pyproj = pytest.importorskip("pyproj")
    lat_deg, lon_deg = shown_points(projection)
    x_m, y_m = projection.forward(lat_deg, lon_deg)
    proj_x_m, proj_y_m = pyproj.Proj(projection.proj_string(1234.5, -2000.25))(lon_deg, lat_deg)
    np.testing.assert_allclose(proj_x_m, x_m + 1234.5, rtol=0, atol=1e-6)
    np.testing.assert_allclose(proj_y_m, y_m - 2000.25, rtol=0, atol=1e-6)


@each_projection
def test_scale_factor_and_convergence_agree_with_proj(projection: Projection) -> None:
    pyproj = pytest.importorskip("pyproj")
    # PROJ differentiates numerically, which spoils its own figures within some degrees of a pole.
    lat_deg, lon_deg = shown_points(projection, 80.0)
    factors = pyproj.Proj(projection.proj_string(0.0, 0.0)).get_factors(lon_deg, lat_deg)
    np.testing.assert_allclose(projection.scale_factor(lat_deg, lon_deg), factors.meridional_scale, rtol=1e-7)
    convergence_deg = projection.convergence_deg(lat_deg, lon_deg)
    np.testing.assert_allclose(
        difference_of_longitude(np.asarray(factors.meridian_convergence), convergence_deg), 0.0, atol=1e-5
    )


@each_projection
def test_there_and_back_is_the_same_place_to_1e_9_degrees(projection: Projection) -> None:
    lat_deg, lon_deg = shown_points(projection)
    back_lat_deg, back_lon_deg = projection.inverse(*projection.forward(lat_deg, lon_deg))
    np.testing.assert_allclose(back_lat_deg, lat_deg, rtol=0, atol=1e-9)
    sideways_deg = difference_of_longitude(lon_deg, back_lon_deg) * np.cos(np.radians(lat_deg))
    np.testing.assert_allclose(sideways_deg, 0.0, atol=1e-9)


@each_projection
def test_scalars_and_broadcast_arrays_give_the_same_figures(projection: Projection) -> None:
    lat_deg, lon_deg = np.array([[30.0], [61.5]]), np.array([-120.0, -100.0, -80.0])
    methods = (projection.forward, projection.inverse, projection.scale_factor, projection.convergence_deg)
    for method in methods:
        whole = np.asarray(method(lat_deg, lon_deg))
        assert whole.shape[-2:] == (2, 3)
        np.testing.assert_array_equal(np.asarray(method(61.5, -80.0)), whole[..., 1, 2])


CONFORMAL = [projection for projection in PROJECTIONS if projection.conformal]


@pytest.mark.parametrize("projection", CONFORMAL, ids=lambda p: f"{p.name}-{p.proj_string(0, 0)}")
def test_a_conformal_projection_keeps_angles_and_has_one_scale_in_all_directions(projection: Projection) -> None:
    lat_deg, lon_deg = shown_points(projection, 80.0)
    step_deg = 1e-5

    def step(north_deg: float, east_deg: float) -> FloatArray:
        further = np.array(projection.forward(lat_deg + north_deg, lon_deg + east_deg))
        return (further - projection.forward(lat_deg - north_deg, lon_deg - east_deg)) / (2.0 * step_deg)

    north = step(step_deg, 0.0) / degree_of_latitude_m(lat_deg, projection.figure)
    east = step(0.0, step_deg) / degree_of_longitude_m(lat_deg, projection.figure)
    inside = np.hypot(*east) < 5.0
    scale = projection.scale_factor(lat_deg, lon_deg)
    turned_rad = np.radians(projection.convergence_deg(lat_deg, lon_deg))
    np.testing.assert_allclose((north / scale)[0, inside], -np.sin(turned_rad)[inside], rtol=0, atol=2e-7)
    np.testing.assert_allclose((north / scale)[1, inside], np.cos(turned_rad)[inside], rtol=0, atol=2e-7)
    np.testing.assert_allclose((east / scale)[0, inside], np.cos(turned_rad)[inside], rtol=0, atol=2e-7)
    np.testing.assert_allclose((east / scale)[1, inside], np.sin(turned_rad)[inside], rtol=0, atol=2e-7)


@pytest.mark.parametrize("centre_lat_deg", [90.0, -90.0, 40.0, -5.0])
@pytest.mark.parametrize(("lat_deg", "radius_deg"), [(35.0, 12.0), (-20.0, 40.0), (80.0, 25.0)])
def test_the_spherical_stereographic_shows_circles_as_circles(
    centre_lat_deg: float, lat_deg: float, radius_deg: float
) -> None:
    projection = Stereographic(SPHERE, centre_lat_deg, 25.0)
    bearing_deg = np.arange(0.0, 360.0, 5.0)
    circle = great_circle.direct(lat_deg, 60.0, bearing_deg, radius_deg * 60.0 * 1852.0, SPHERE)
    x_m, y_m = (value / 1e6 for value in projection.forward(circle.lat_deg, circle.lon_deg))
    # x² + y² = p x + q y + r for a circle.
    unknowns, *_ = np.linalg.lstsq(np.column_stack((x_m, y_m, np.ones_like(x_m))), x_m**2 + y_m**2)
    across, along = unknowns[0] / 2.0, unknowns[1] / 2.0
    radius = math.sqrt(unknowns[2] + across**2 + along**2)
    np.testing.assert_allclose(np.hypot(x_m - across, y_m - along), radius, rtol=1e-9)


def test_the_spherical_stereographic_shows_a_circle_through_the_opposite_point_as_a_straight_line() -> None:
    projection = Stereographic(SPHERE, 30.0, 10.0)
    # A circle of 40° about a point 40° from the one opposite the centre, and so through that.
    middle = great_circle.direct(-30.0, -170.0, 90.0, 40.0 * 60.0 * 1852.0, SPHERE)
    bearing_deg = np.arange(20.0, 160.0, 5.0)
    circle = great_circle.direct(middle.lat_deg, middle.lon_deg, bearing_deg, 40.0 * 60.0 * 1852.0, SPHERE)
    x_m, y_m = projection.forward(circle.lat_deg, circle.lon_deg)
    np.testing.assert_allclose(np.polyval(np.polyfit(y_m, x_m, 1), y_m), x_m, rtol=0, atol=1.0)


@pytest.mark.parametrize(("lat1_deg", "lon1_deg", "lat2_deg", "lon2_deg"), [(20, -150, 60, -70), (50, -160, 48, -60)])
def test_the_gnomonic_shows_great_circles_as_straight_lines(
    lat1_deg: float, lon1_deg: float, lat2_deg: float, lon2_deg: float
) -> None:
    ends = (lat1_deg, lon1_deg, lat2_deg, lon2_deg)
    distance_m = great_circle.inverse(*ends, SPHERE).distance_m * np.linspace(0.0, 1.0, 21)
    x_m, y_m = Gnomonic(40.0, -100.0).forward(*great_circle.points_along(*ends, distance_m, SPHERE))
    twice_area = (x_m - x_m[0]) * (y_m[-1] - y_m[0]) - (y_m - y_m[0]) * (x_m[-1] - x_m[0])
    np.testing.assert_allclose(twice_area / np.hypot(x_m[-1] - x_m[0], y_m[-1] - y_m[0]), 0.0, atol=1e-6)


def test_the_oblique_stereographic_runs_into_the_polar_one() -> None:
    lat_deg, lon_deg = np.array([60.0, 75.0, 89.0, 90.0]), np.array([10.0, -120.0, 179.0, 0.0])
    polar = Stereographic(WGS_84, 90.0, 20.0).forward(lat_deg, lon_deg)
    oblique = Stereographic(WGS_84, 90.0 - 1e-9, 20.0).forward(lat_deg, lon_deg)
    np.testing.assert_allclose(oblique, polar, rtol=0, atol=0.001)


@pytest.mark.parametrize(
    ("projection", "lat_deg", "lon_deg"),
    [
        (Mercator(WGS_84), 90.0, 0.0),
        (Mercator(WGS_84), -90.0, 33.0),
        (Stereographic(WGS_84, 40.0, -100.0), -40.0, 80.0),
        (Stereographic.polar(WGS_84, 70.0), -90.0, 0.0),
        (Lambert(WGS_84, 0.0, (40.0,), 40.0), -90.0, 0.0),
        (Gnomonic(90.0, 0.0), 0.0, 0.0),
        (Gnomonic(10.0, 0.0), -80.5, 0.0),
    ],
)
def test_a_point_that_can_not_be_shown_is_nan(projection: Projection, lat_deg: float, lon_deg: float) -> None:
    assert np.all(np.isnan(projection.forward(lat_deg, lon_deg)))
    assert np.isnan(projection.scale_factor(lat_deg, lon_deg))


def test_the_pole_is_the_apex_of_a_lambert_and_has_no_scale_there() -> None:
    projection = Lambert(WGS_84, 0.0, (40.0,), 40.0)
    assert [float(value) for value in projection.forward(90.0, 77.0)] == [0.0, projection.apex_y_m]
    assert projection.inverse(0.0, projection.apex_y_m)[0] == 90.0
    assert np.isnan(projection.scale_factor(90.0, 77.0))


def test_the_gap_of_a_lambert_holds_no_point() -> None:
    projection = Lambert(WGS_84, 0.0, (40.0,), 40.0)
    assert np.all(np.isnan(projection.inverse(0.0, projection.apex_y_m + 1e6)))


@pytest.mark.parametrize("sign", [1.0, -1.0])
def test_the_pole_lies_in_the_middle_of_a_polar_sheet_at_its_own_scale(sign: float) -> None:
    projection = Stereographic.polar(WGS_84, sign * 90.0)
    assert np.allclose(projection.forward(sign * 90.0, 45.0), 0.0, atol=1e-9)
    assert projection.scale_factor(sign * 90.0, 45.0) == pytest.approx(1.0, abs=1e-15)
    assert projection.convergence_deg(sign * 90.0, 45.0) == pytest.approx(sign * 45.0, abs=1e-12)


def test_a_meridian_half_a_turn_from_the_centre_goes_where_its_sign_says() -> None:
    projection = Mercator(WGS_84, 0.0, 0.0)
    assert projection.forward(10.0, 180.0)[0] == -projection.forward(10.0, -180.0)[0] > 0.0


def test_the_true_scale_is_true() -> None:
    assert Mercator(WGS_84, 0.0, 47.0).scale_factor(-47.0, 9.0) == 1.0
    assert Stereographic.polar(WGS_84, -71.0).scale_factor(-71.0, 9.0) == pytest.approx(1.0, abs=1e-15)
    assert Stereographic(WGS_84, 40.0, -100.0).scale_factor(40.0, -100.0) == pytest.approx(1.0, abs=1e-15)
    assert Lambert(WGS_84, 0.0, (33.0, 45.0), 23.0).scale_factor([33.0, 45.0], 5.0) == pytest.approx(1.0, abs=1e-15)


def test_nearly_equal_standard_parallels_make_the_cone_of_one() -> None:
    one = Lambert(WGS_84, 0.0, (40.0,), 40.0).cone
    for apart_deg in (1e-6, 0.99e-4, 1.01e-4, 1e-3):
        two = Lambert(WGS_84, 0.0, (40.0 - apart_deg / 2.0, 40.0 + apart_deg / 2.0), 40.0).cone
        assert two == pytest.approx(one, abs=1e-10)


@pytest.mark.parametrize(
    "make",
    [
        lambda: Mercator(WGS_84, 0.0, 90.0),
        lambda: Stereographic(WGS_84, 91.0),
        lambda: Stereographic.polar(WGS_84, 0.0),
        lambda: Lambert(WGS_84, 0.0, (30.0, -30.0), 0.0),
        lambda: Lambert(WGS_84, 0.0, (90.0,), 80.0),
        lambda: Lambert(WGS_84, 0.0, (30.0,), 100.0),
        lambda: Gnomonic(10.0, 0.0, WGS_84),
        lambda: Gnomonic(100.0, 0.0),
    ],
)
def test_parameters_that_make_no_projection_are_refused(make: Callable[[], Projection]) -> None:
    with pytest.raises(RangeError):
        make()


@each_projection
def test_what_is_no_position_is_refused(projection: Projection) -> None:
    for lat_deg, lon_deg in ((90.5, 0.0), (math.nan, 0.0), (0.0, math.inf)):
        with pytest.raises(RangeError):
            projection.forward(lat_deg, lon_deg)
    with pytest.raises(RangeError):
        projection.inverse(math.nan, 0.0)


def test_a_figure_that_is_a_sphere_is_written_as_one() -> None:
    assert "+R=6366707.0194937" in Mercator(SPHERE).proj_string()
    assert "+a=6378388.0 +rf=297.0" in Mercator(Figure("x", 6378388.0, 297.0)).proj_string()
