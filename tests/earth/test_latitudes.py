"""Latitudes, radii and the two differences, against 50-digit arithmetic and their own definitions."""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from navcore.earth import latitudes
from navcore.earth.figure import FIGURES, SPHERE, WGS_84
from navcore.errors import RangeError

if TYPE_CHECKING:
    from collections.abc import Callable

    import numpy.typing as npt

    from navcore.earth.figure import Figure
    from navcore.trigonometry import FloatArray

    OneLatitude = Callable[[npt.ArrayLike, Figure], FloatArray]

RELATIVE = 1e-15
"""Four units in the last place."""

FUNCTIONS: tuple[OneLatitude, ...] = (
    latitudes.isometric_latitude_rad,
    latitudes.conformal_latitude_deg,
    latitudes.reduced_latitude_deg,
    latitudes.rectifying_latitude_deg,
    latitudes.meridian_distance_m,
    latitudes.meridian_radius_m,
    latitudes.transverse_radius_m,
    latitudes.parallel_radius_m,
)

# From the closed forms, and the meridian's length by quadrature of its radius, in mpmath at 50 digits, for the latitude
# that the double nearest to the printed one holds. In the order of FUNCTIONS.
EXACT: dict[str, dict[float, tuple[float, ...]]] = {
    "WGS 84": {
        1e-10: (
            1.7336453547735706e-12,
            9.933056200098587e-11,
            9.966471893352526e-11,
            9.949728976553207e-11,
            1.1057427582159437e-05,
            6335439.32729282,
            6378137.0,
            6378137.0,
        ),
        0.1: (
            0.0017336462467228443,
            0.09933056334910736,
            0.0996647196109874,
            0.09949729078001815,
            11057.42769490227,
            6335439.5210834,
            6378137.065032209,
            6378127.350576396,
        ),
        7.5: (
            0.13040129991162627,
            7.4503590079093165,
            7.475138766196264,
            7.462723291212908,
            829354.473400615,
            6336523.3430932965,
            6378500.753094791,
            6323931.7949248105,
        ),
        30.0: (
            0.5459570851815535,
            29.833682042480984,
            29.91674771323609,
            29.875147936061463,
            3320113.397940383,
            6351377.103715514,
            6383480.917690109,
            5528256.639292835,
        ),
        -45.5: (
            -0.888989050525868,
            -45.30770395898947,
            -45.403799683686046,
            -45.35569868300911,
            -5040512.70951657,
            6367941.670875094,
            6389025.531909106,
            4478127.185163375,
        ),
        60.25: (
            1.31989585565048,
            60.0840593041069,
            60.16703007282138,
            60.125518744700315,
            6681926.421573803,
            6383696.688241256,
            6394290.25287043,
            3172952.352763828,
        ),
        85.0: (
            3.1246175981135473,
            84.9665123736323,
            84.98326524573606,
            84.97488750327517,
            9443510.140666246,
            6399102.225534907,
            6399429.821491259,
            557747.0592535842,
        ),
        89.9: (
            7.03724961649074,
            89.89932680769627,
            89.89966359170454,
            89.89949517595653,
            9990796.331471462,
            6399593.428686274,
            6399593.560067752,
            11169.392170605757,
        ),
        89.9999999: (
            20.852760477406193,
            89.99999989932681,
            89.99999989966359,
            89.99999989949518,
            10001965.718143325,
            6399593.625758493,
            6399593.625758493,
            0.011169397292805965,
        ),
        89.9999999999: (
            27.76049785087063,
            89.99999999989933,
            89.99999999989966,
            89.99999999989949,
            10001965.729301553,
            6399593.625758493,
            6399593.625758493,
            1.1169597288437391e-05,
        ),
    },
    "Clarke 1880": {
        1e-10: (
            1.7334548847360996e-12,
            9.93196488717151e-11,
            9.965924386213007e-11,
            9.948908412788007e-11,
            1.1056407136464101e-05,
            6334854.65497717,
            6378249.145,
            6378249.145,
        ),
        0.1: (
            0.0017334557767794637,
            0.0993196502416256,
            0.09965924455059832,
            0.0994890851588192,
            11056.407251034285,
            6334854.851908733,
            6378249.211093522,
            6378239.4964669,
        ),
        7.5: (
            0.13038705432751374,
            7.449549686121196,
            7.474732763803424,
            7.4621147869722435,
            829278.7083831829,
            6335956.2432141015,
            6378618.834986727,
            6324048.866609791,
        ),
        30.0: (
            0.5459024580650828,
            29.83096689857919,
            29.91538706321849,
            29.873107832892767,
            3319854.0877852896,
            6351051.3064187495,
            6383680.385643282,
            5528429.383607524,
        ),
        -45.5: (
            -0.8889110338659042,
            -45.30456010690472,
            -45.402226027219044,
            -45.35333817414763,
            -5040200.90492113,
            6367886.101751338,
            6389315.837775913,
            4478330.663234901,
        ),
        60.25: (
            1.3198007851829494,
            60.08134254772229,
            60.16567170379211,
            60.123480323781386,
            6681634.299361602,
            6383899.248489712,
            6394667.0332789095,
            3173139.317420777,
        ),
        85.0: (
            3.124508393723334,
            84.96596337160283,
            84.98299104336601,
            84.97447585776402,
            9443371.697778014,
            6399558.232991501,
            6399891.229703872,
            557787.2736290644,
        ),
        89.9: (
            7.0371399913506005,
            89.89931577078418,
            89.8996580794424,
            89.89948690058215,
            9990697.343785437,
            6400057.534236315,
            6400057.667783921,
            11170.202190967617,
        ),
        89.9999999: (
            20.852650852097568,
            89.99999989931578,
            89.99999989965808,
            89.99999989948691,
            10001867.540477263,
            6400057.734557725,
            6400057.734557725,
            0.011170207315421283,
        ),
        89.9999999999: (
            27.760388225562007,
            89.99999999989932,
            89.99999999989966,
            89.99999999989949,
            10001867.551636301,
            6400057.734557725,
            6400057.734557725,
            1.1170407325556712e-05,
        ),
    },
}

# WGS 84: first latitude, difference, isometric difference in radians, meridian difference in metres; as above.
EXACT_DIFFERENCES = (
    (0.0, 1e-12, 1.7336453547735705e-14, 1.1057427582159436e-07),
    (45.0, 1e-12, 2.4599787894580807e-14, 1.1113177741417564e-07),
    (45.0, -1e-09, -2.4599787894364478e-11, -0.00011113177741416587),
    (-60.0, 1e-07, 3.4847870709167886e-09, 0.011141228745692967),
    (89.9999, 1e-10, 1.000000499967624e-06, 1.1169397955912407e-05),
    (89.999, 0.0001, 0.10536051566192385, 11.16939795588168),
    (10.0, 40.0, 0.8312849804435709, 4434992.208449776),
    (-80.0, 169.9, 9.46688866935582, 18875936.203408334),
    (-89.9, 0.05, 0.4054654125871392, 5584.6987056581365),
    (30.0, -60.0, -1.091914170363107, -6640226.795880766),
    (0.0, 89.999, 11.642420046032699, 10001854.035333164),
    (60.0, -1e-15, -3.4847870762017623e-17, -1.1141228745777945e-10),
)


@pytest.mark.parametrize("figure_name", EXACT)
@pytest.mark.parametrize("column", range(len(FUNCTIONS)))
def test_full_relative_accuracy_from_the_equator_to_a_hair_off_the_pole(figure_name: str, column: int) -> None:
    table = EXACT[figure_name]
    found = FUNCTIONS[column](np.array(list(table)), FIGURES[figure_name])
    exact = np.array([row[column] for row in table.values()])
    assert found == pytest.approx(exact, rel=RELATIVE, abs=0.0)


@pytest.mark.parametrize(("lat_deg", "difference_deg", "isometric_rad", "meridian_m"), EXACT_DIFFERENCES)
def test_differences_keep_full_relative_accuracy_however_small(
    lat_deg: float, difference_deg: float, isometric_rad: float, meridian_m: float
) -> None:
    pair = latitudes.latitude_pair(lat_deg, lat_deg + difference_deg, difference_deg)
    # Near a pole the second latitude itself is rounded: half a unit in its last place, 7e-15 degrees.
    colatitude_deg = 90.0 - abs(lat_deg + difference_deg)
    rounded = 7.2e-15 / colatitude_deg / max(abs(isometric_rad), 1e-6) if colatitude_deg < 1.0 else 0.0
    assert latitudes.isometric_difference_rad(pair, WGS_84) == pytest.approx(isometric_rad, rel=2 * RELATIVE + rounded)
    assert latitudes.meridian_difference_m(pair, WGS_84) == pytest.approx(meridian_m, rel=2 * RELATIVE)
    back = latitudes.latitude_difference_deg(lat_deg, meridian_m, WGS_84)
    assert back == pytest.approx(difference_deg, rel=2 * RELATIVE)


INVERSES: tuple[tuple[OneLatitude, OneLatitude], ...] = (
    (latitudes.isometric_latitude_rad, latitudes.geographic_from_isometric_deg),
    (latitudes.conformal_latitude_deg, latitudes.geographic_from_conformal_deg),
    (latitudes.reduced_latitude_deg, latitudes.geographic_from_reduced_deg),
    (latitudes.rectifying_latitude_deg, latitudes.geographic_from_rectifying_deg),
)


@pytest.mark.parametrize("figure_name", FIGURES)
@pytest.mark.parametrize("there_and_back", INVERSES)
def test_each_latitude_leads_back_to_the_geographic_one(
    figure_name: str, there_and_back: tuple[OneLatitude, OneLatitude]
) -> None:
    there, back = there_and_back
    latitude = np.concatenate((np.linspace(-90.0, 90.0, 1801), [1e-12, -1e-300, 89.99999999, 0.0]))
    figure = FIGURES[figure_name]
    # Two units in the last place at 90 degrees.
    assert back(there(latitude, figure), figure) == pytest.approx(latitude, rel=1e-15, abs=3e-14)


@pytest.mark.parametrize("figure_name", FIGURES)
def test_poles_and_equator_are_exact(figure_name: str) -> None:
    figure, poles = FIGURES[figure_name], np.array([-90.0, 0.0, 90.0])
    for there, _ in INVERSES[1:]:
        assert there(poles, figure).tolist() == poles.tolist()
    assert latitudes.meridional_parts_min(poles, figure).tolist() == [-math.inf, 0.0, math.inf]
    assert latitudes.parallel_radius_m(poles, figure).tolist() == [0.0, figure.equatorial_radius_m, 0.0]
    assert latitudes.geographic_from_isometric_deg(np.array([-math.inf, math.inf]), figure).tolist() == [-90.0, 90.0]


def test_on_the_sphere_all_latitudes_are_one() -> None:
    latitude = np.linspace(-90.0, 90.0, 181)
    for there, back in INVERSES[1:]:
        assert there(latitude, SPHERE) == pytest.approx(latitude, rel=0.0, abs=2e-14)
        assert back(latitude, SPHERE) == pytest.approx(latitude, rel=0.0, abs=2e-14)
    assert latitudes.degree_of_latitude_m(latitude, SPHERE) == pytest.approx(60.0 * 1852.0, rel=1e-15)


@given(st.floats(-89.9, 89.9), st.floats(-89.9, 89.9))
def test_differences_are_those_of_the_two_latitudes(lat1_deg: float, lat2_deg: float) -> None:
    pair = latitudes.latitude_pair(lat1_deg, lat2_deg, lat2_deg - lat1_deg)
    ends = np.array([lat1_deg, lat2_deg])
    isometric = np.diff(latitudes.isometric_latitude_rad(ends, WGS_84))[0]
    meridian = np.diff(latitudes.meridian_distance_m(ends, WGS_84))[0]
    assert latitudes.isometric_difference_rad(pair, WGS_84) == pytest.approx(isometric, abs=4e-14)
    assert latitudes.meridian_difference_m(pair, WGS_84) == pytest.approx(meridian, abs=8e-9)


@pytest.mark.parametrize("lat_deg", [90.0000001, -91.0, math.nan, math.inf])
def test_a_latitude_past_the_pole_is_refused(lat_deg: float) -> None:
    with pytest.raises(RangeError, match="-90 to 90 degrees"):
        latitudes.isometric_latitude_rad([10.0, lat_deg], WGS_84)


def test_shapes_are_kept() -> None:
    grid = np.zeros((2, 3))
    for function in FUNCTIONS:
        assert function(grid, WGS_84).shape == (2, 3)
        assert function(45.0, WGS_84).shape == ()
