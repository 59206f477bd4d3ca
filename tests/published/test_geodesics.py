"""Great circles, rhumb lines and lengths of degrees against printed values, each within the digits printed."""

from __future__ import annotations

import numpy as np
import pytest

from navcore.angles import wrap_180
from navcore.earth.figure import FIGURES, WGS_84
from navcore.earth.latitudes import (
    degree_of_latitude_m,
    degree_of_longitude_m,
    isometric_difference_rad,
    latitude_pair,
    meridian_radius_m,
    transverse_radius_m,
)
from navcore.lines import great_circle, rhumb_line

VINCENTY = "T. Vincenty, Direct and inverse solutions of geodesics, Survey Review XXIII (176), 1975, Table II"
RAPP = "R. H. Rapp, Geometric Geodesy Part II, Ohio State University, 1993, standard test lines, section 1.71"
VENESS = "C. Veness, notes on geodesy, WGS 84"
GDA = "Geoscience Australia and ICSM, GDA technical manual, sample data: Flinders Peak to Buninyong, GRS 80"

SECOND = 1.0 / 3600.0
FLINDERS = -(37 + 57 / 60 + 3.7203 / 3600), 144 + 25 / 60 + 29.5244 / 3600
BUNINYONG = -(37 + 39 / 60 + 10.1561 / 3600), 143 + 55 / 60 + 35.3839 / 3600

JFK = 40 + 38 / 60 + 23 / 3600, -(73 + 46 / 60 + 44 / 3600)
SINGAPORE = 1 + 21 / 60 + 33 / 3600, 103 + 59 / 60 + 22 / 3600

Line = tuple[float, float, float, float]


@pytest.mark.parametrize(
    ("source", "figure_name", "ends", "courses_deg", "course_tolerance_deg", "distance_m", "distance_tolerance_m"),
    [
        (
            f"{VINCENTY} (a)",
            "Bessel 1841",
            (55.75, 0.0, -(33 + 26 / 60), 108 + 13 / 60),
            (96.60244433333332, 137.87278181666667),
            8.4e-8,
            14110526.17,
            0.002,
        ),
        (
            f"{VINCENTY} (d); its courses are printed to 0.001 second only",
            "International 1924",
            (1.0, 0.0, -0.9982863222222221, 179.29667499166666),
            (89.0, 91.00169925833333),
            5.6e-7,
            19960000.0,
            0.002,
        ),
        (
            f"{VINCENTY} (e)",
            "International 1924",
            (1.0, 0.0, 1.0208859777777777, 179.7716229),
            (4.999999986111111, 174.99996800277776),
            8.4e-8,
            19780006.558,
            0.002,
        ),
        (
            f"{RAPP}, 3",
            "International 1924",
            (1.0, 0.0, -0.9982863222222221, 179.29667499166666),
            (88.99999971388888, 91.00169954361111),
            8.4e-8,
            19959999.9998,
            0.0006,
        ),
        (
            f"{RAPP}, 4",
            "International 1924",
            (1.0, 0.0, 1.0208859777777777, 179.7716229),
            (4.999999986944444, 174.99996800111109),
            8.4e-8,
            19780006.5588,
            0.0006,
        ),
        (
            f"{RAPP}, 6",
            "International 1924",
            (30.0, 0.0, 37.89235162222222, 116.32130234166667),
            (45.00000000111111, 129.136757225),
            8.4e-8,
            10002499.9999,
            0.0006,
        ),
        (
            f"{RAPP}, 7",
            "International 1924",
            (37.0, 0.0, 28.260193152777777, -2.6276469944444445),
            (195.0, 193.57881683333332),
            8.4e-8,
            1000000.0,
            0.0006,
        ),
        (
            GDA,
            "GRS 80",
            (*FLINDERS, *BUNINYONG),
            (306.8681583333333, 127.17363055555556 + 180.0),
            1.7e-6,
            54972.271,
            0.001,
        ),
        (
            VENESS,
            "WGS 84",
            (50.06632, -5.71475, 58.64402, -3.07009),
            (9.1418775, 11.2972204),
            1e-7,
            969954.166,
            0.001,
        ),
        (
            "GeographicLib, GeodSolve(1), examples, version 2.7: New York to Singapore, to 0.1 second and 1 m",
            "WGS 84",
            (*JFK, *SINGAPORE),
            (3.308305555555555, 177.48588888888887),
            1.7e-5,
            15347628.0,
            0.6,
        ),
    ],
)
def test_great_circles_against_printed_lines(
    source: str,
    figure_name: str,
    ends: Line,
    courses_deg: tuple[float, float],
    course_tolerance_deg: float,
    distance_m: float,
    distance_tolerance_m: float,
) -> None:
    line = great_circle.inverse(*ends, FIGURES[figure_name])
    assert line.distance_m == pytest.approx(distance_m, abs=distance_tolerance_m), source
    assert line.initial_course_deg == pytest.approx(courses_deg[0], abs=course_tolerance_deg), source
    assert line.final_course_deg == pytest.approx(courses_deg[1], abs=course_tolerance_deg), source


@pytest.mark.parametrize(
    ("figure_name", "lat1_deg", "course_deg", "distance_m", "lat2_deg", "d_long_deg"),
    [
        # Table II, lines (a), (d) and (e), run from the start; 2e-4 second.
        ("Bessel 1841", 55.75, 96.60244433333332, 14110526.17, -(33 + 26 / 60), 108 + 13 / 60),
        ("International 1924", 1.0, 89.0, 19960000.0, -0.9982863222222221, 179.29667499166666),
        ("International 1924", 1.0, 4.999999986111111, 19780006.558, 1.0208859777777777, 179.7716229),
    ],
)
def test_great_circles_run_out_to_vincentys_ends(
    figure_name: str, lat1_deg: float, course_deg: float, distance_m: float, lat2_deg: float, d_long_deg: float
) -> None:
    reached = great_circle.direct(lat1_deg, 0.0, course_deg, distance_m, FIGURES[figure_name])
    assert reached.lat_deg == pytest.approx(lat2_deg, abs=2e-4 * SECOND)
    assert reached.lon_deg == pytest.approx(d_long_deg, abs=2e-4 * SECOND)


@pytest.mark.parametrize(
    ("lat1_deg", "course_deg", "distance_m", "lat2_deg", "course2_deg"),
    [
        # R. H. Rapp, Geometric Geodesy Part II (1993), Table 1.3, lines B, D and F, International 1924. The longitudes
        # of the table are those on the auxiliary sphere, so the true ones are taken from the line run out.
        (0.0, 29.999999972222223, 19996147.4168, 0.0, 150.0),
        (60.0, 29.197519444444445, 20000433.9629, -59.983333333333334, 150.81857444444444),
        (30.0, 18.636821333333334, 19992241.7634, -29.916666666666668, 161.3792881388889),
    ],
)
def test_nearly_antipodal_lines_against_rapp(
    lat1_deg: float, course_deg: float, distance_m: float, lat2_deg: float, course2_deg: float
) -> None:
    figure = FIGURES["International 1924"]
    reached = great_circle.direct(lat1_deg, 0.0, course_deg, distance_m, figure)
    assert reached.lat_deg == pytest.approx(lat2_deg, abs=1e-8)
    assert reached.course_deg == pytest.approx(course2_deg, abs=1e-5)
    line = great_circle.inverse(lat1_deg, 0.0, lat2_deg, reached.lon_deg, figure)
    assert line.distance_m == pytest.approx(distance_m, abs=0.001)


def test_waypoints_of_the_great_circle_to_singapore() -> None:
    """GeographicLib, GeodSolve(1), examples: equally spaced points, to 0.1 second."""
    printed = {
        0.1: (54.414249999999996, -72.42766666666667, 4.31225),
        0.3: (81.63344444444445, -58.63163888888889, 17.481305555555554),
        0.4: (83.7238888888889, 80.6213611111111, 156.43344444444446),
        0.8: (29.065833333333334, 102.65966666666667, 177.12644444444445),
        0.9: (15.221833333333333, 103.36888888888888, 177.39575),
    }
    whole = great_circle.inverse(*JFK, *SINGAPORE, WGS_84)
    distances = whole.distance_m * np.array(list(printed))
    found = np.stack(great_circle.course_at(*JFK, *SINGAPORE, distances, WGS_84), axis=-1)
    assert found == pytest.approx(np.array(list(printed.values())), abs=1.7e-5)


def test_waypoints_of_the_rhumb_line_to_singapore() -> None:
    """GeographicLib, RhumbSolve(1), examples: course 103°34'58.2", distances in metres, to 0.1 second."""
    printed = {
        4e6: (32.17411111111111, -30.349249999999998),
        6e6: (27.937, -10.181722222222222),
        8e6: (23.69725, 9.212638888888889),
        10e6: (19.455194444444444, 27.989472222222222),
        12e6: (15.211166666666665, 46.28363888888889),
        14e6: (10.965527777777776, 64.21466666666667),
        18e6: (2.471166666666667, 99.41513888888889),
    }
    course_deg = 103 + 34 / 60 + 58.2 / 3600
    found = np.stack(rhumb_line.direct(*JFK, course_deg, np.array(list(printed)), WGS_84), axis=-1)
    assert found == pytest.approx(np.array(list(printed.values())), abs=1.7e-5)
    whole = rhumb_line.inverse(*JFK, *SINGAPORE, WGS_84)
    assert whole.course_deg == pytest.approx(103.58283333333333, abs=1.7e-5)
    assert whole.distance_m == pytest.approx(18523563.0, abs=0.6)


@pytest.mark.parametrize(
    ("ends", "course_deg", "distance_nmi", "distance_m", "dmp_min"),
    [
        # G. G. Bennett, Practical rhumb line calculations on the spheroid, J. Navigation 49 (1996) 112-119, appendix,
        # examples 3 and 4, as quoted with metres in the tests of Apache SIS. Example 4's miles are cut, not rounded.
        ((-52.79666666666667, -97.52666666666667, -53.18, -41.57666666666667), 90.6504957, 2028.9, 3757550.656, -38.12),
        ((48.75, -61.51833333333333, 48.75, 5.22), 90.0, 2649.9, 4907757.375, 0.0),
    ],
)
def test_rhumb_lines_against_bennett(
    ends: Line, course_deg: float, distance_nmi: float, distance_m: float, dmp_min: float
) -> None:
    line = rhumb_line.inverse(*ends, WGS_84)
    assert line.course_deg == pytest.approx(course_deg, abs=1e-7)
    assert line.distance_m / 1852.0 == pytest.approx(distance_nmi, abs=0.1)
    assert line.distance_m == pytest.approx(distance_m, abs=0.01)
    pair = latitude_pair(ends[0], ends[2], ends[2] - ends[0])
    assert np.degrees(isometric_difference_rad(pair, WGS_84)) * 60.0 == pytest.approx(dmp_min, abs=0.01)


@pytest.mark.parametrize(
    ("lat_deg", "latitude_nmi", "longitude_nmi"),
    # F. Reed, navigators' mailing list, October 2025: length of a degree, in NM to two decimals.
    [(0.0, 59.71, 60.11), (89.0, 60.31, 1.05)],
)
def test_lengths_of_a_degree(lat_deg: float, latitude_nmi: float, longitude_nmi: float) -> None:
    assert degree_of_latitude_m(lat_deg, WGS_84) / 1852.0 == pytest.approx(latitude_nmi, abs=0.006)
    assert degree_of_longitude_m(lat_deg, WGS_84) / 1852.0 == pytest.approx(longitude_nmi, abs=0.006)


def test_a_second_of_arc_at_53_north() -> None:
    """N. de Hilster, navigators' mailing list, 23 March 2008, WGS 84."""
    assert degree_of_latitude_m(53.0, WGS_84) * SECOND == pytest.approx(30.913, abs=0.0006)
    assert degree_of_longitude_m(53.0, WGS_84) * SECOND == pytest.approx(18.649, abs=0.0006)
    assert transverse_radius_m(53.0, WGS_84) == pytest.approx(6391797.44772, abs=0.001)
    assert meridian_radius_m(53.0, WGS_84) == pytest.approx(6376233.57268, abs=0.001)


def test_flinders_peak_is_the_same_on_wgs_84_to_a_millimetre() -> None:
    """Several test suites call it a line of Vincenty's paper of 1975; it is not in it."""
    line = great_circle.inverse(*FLINDERS, *BUNINYONG, WGS_84)
    assert line.distance_m == pytest.approx(54972.271, abs=0.001)
    assert wrap_180(line.initial_course_deg) == pytest.approx(306.8681583333333 - 360.0, abs=1.7e-6)
