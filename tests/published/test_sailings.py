"""The sailings against printed answers, each within the digits it was printed to."""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

import pytest

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.earth.figure import FIGURES, SPHERE
from navcore.position import Position
from navcore.sailings import great_circle_sphere, mercator, middle_latitude, parallel, plane
from navcore.sailings.composite import composite
from navcore.sailings.differences import parts_min

if TYPE_CHECKING:
    from collections.abc import Callable

    from navcore.earth.figure import Figure
    from navcore.sailings.working import Working

    Solve = Callable[[Position, Position], Working]

CLARKE_1866 = FIGURES["Clarke 1866"]
CLARKE_1880 = FIGURES["Clarke 1880"]
WGS_72 = FIGURES["WGS 72"]

TABLES = (
    "meridional parts in worked solutions to a merchant-navy text; Clarke 1880 inferred by fit, the source names none"
)
EXAM_BANK = "USCG National Maritime Center deck exam bank, Navigation Problems"


@pytest.mark.parametrize(
    ("figure_name", "printed"),
    [
        # Bowditch to 1984, series for the Clarke spheroid of 1866.
        ("Clarke 1866", (7915.704468, 23.268932, 0.0525, 0.000213)),
        # Bowditch (1995) p. 552, explanation of Table 6; c1 is printed 23.0133633, a digit slip of 23.0133693.
        ("WGS 72", (7915.704468, 23.0133633, 0.051353, 0.000206)),
    ],
)
@pytest.mark.parametrize("lat_deg", [1.0, 24.0, 45.0, 68.5, 85.0])
def test_meridional_parts_agree_with_the_printed_series(
    figure_name: str, printed: tuple[float, ...], lat_deg: float
) -> None:
    tangent = math.tan(math.radians(45.0 + lat_deg / 2.0))
    sine = math.sin(math.radians(lat_deg))
    series = printed[0] * math.log10(tangent) - printed[1] * sine - printed[2] * sine**3 - printed[3] * sine**5
    assert parts_min(lat_deg, FIGURES[figure_name]) == pytest.approx(series, abs=2e-5)


@pytest.mark.parametrize(
    ("figure_name", "printed", "tolerances"),
    [
        ("Clarke 1866", (7915.704468, 23.268932, 0.0525, 0.000213), (1e-5, 1e-6, 1e-6, 1e-6)),
        ("WGS 72", (7915.704468, 23.0133633, 0.051353, 0.000206), (1e-5, 1e-5, 1e-6, 1e-6)),
    ],
)
def test_printed_coefficients_of_the_series_are_those_of_the_figure(
    figure_name: str, printed: tuple[float, ...], tolerances: tuple[float, ...]
) -> None:
    """Sources as above: Bowditch to 1984, and Bowditch (1995) p. 552."""
    squared = FIGURES[figure_name].eccentricity_squared
    minutes = 10800.0 / math.pi
    expected = (minutes * math.log(10.0), minutes * squared, minutes * squared**2 / 3, minutes * squared**3 / 5)
    for found, value, tolerance in zip(printed, expected, tolerances, strict=True):
        assert found == pytest.approx(value, abs=tolerance)


def test_meridional_parts_by_table_6() -> None:
    """Bowditch Table 6, as used in the Mercator sailing example of the deckskills cadet notes."""
    assert parts_min(44.1, WGS_72) == pytest.approx(2938.2, abs=0.1)


@pytest.mark.parametrize(
    ("lat_deg", "printed_min"),
    [
        (24.0, 1474.54),
        (46.0, 3098.7),
        (38.0, 2453.85),
        (6 + 10 / 60, 368.2),
        (59 + 55 / 60, 4497.11),
        (38.3, 2476.64),
    ],
)
def test_meridional_parts_of_clarke_1880(lat_deg: float, printed_min: float) -> None:
    assert parts_min(lat_deg, CLARKE_1880) == pytest.approx(printed_min, abs=0.02), TABLES


def test_meridional_parts_of_68_39_are_not_as_printed() -> None:
    """The same solutions print 5712.16 for 68°38.7'N: an interpolation slip of 1.6; the series gives 5713.77."""
    lat_deg, squared = 68.645, CLARKE_1880.eccentricity_squared
    sine = math.sin(math.radians(lat_deg))
    series = (10800.0 / math.pi) * (
        math.log(math.tan(math.radians(45.0 + lat_deg / 2.0)))
        - squared * sine
        - squared**2 / 3 * sine**3
        - squared**3 / 5 * sine**5
    )
    assert parts_min(lat_deg, CLARKE_1880) == pytest.approx(series, abs=1e-4)
    assert series - 5712.16 == pytest.approx(1.61, abs=0.01)


def test_mercator_sailing_to_the_chesapeake() -> None:
    """Bowditch (Pub. 9), The Sailings, Mercator sailing example 1, as worked in The Calculator Afloat (1980)."""
    start, end = Position(32 + 14.7 / 60, -(66 + 28.9 / 60)), Position(36 + 58.7 / 60, -(75 + 42.2 / 60))
    working = mercator.solve_inverse(start, end, CLARKE_1866)
    assert working.number("MP 1") == pytest.approx(2033.3, abs=0.1)
    assert working.number("MP 2") == pytest.approx(2377.0, abs=0.1)
    assert working.number("d.lat") == pytest.approx(284.0, abs=0.05)
    assert working.number("d.long") == pytest.approx(-553.3, abs=0.05)
    assert working.number("course") == pytest.approx(301.8, abs=0.1)
    assert working.number("distance") == pytest.approx(538.2, abs=0.1)


def test_mercator_sailing_across_180() -> None:
    """Worked solutions to a merchant-navy text, Mercator sailing problem 3; Clarke 1880 by fit."""
    start, end = Position(40.3, -(100 + 20 / 60)), Position(68.0, 140 + 10 / 60)
    working = mercator.solve_inverse(start, end, CLARKE_1880)
    assert working.number("course") == pytest.approx(292.555, abs=0.01)
    assert working.number("distance") == pytest.approx(4332.97, abs=0.05)


def test_mercator_sailing_across_the_equator_and_180_to_a_position() -> None:
    """Worked solutions to a merchant-navy text, Mercator sailing, position arrived; Clarke 1880 by fit."""
    start = Position(-(6 + 10 / 60), -(176 + 47 / 60))
    reached = mercator.solve_direct(start, 333.0, 4450.0, CLARKE_1880).position
    assert reached.lat_deg == pytest.approx(59 + 55 / 60, abs=0.1 / 60)
    assert reached.lon_deg == pytest.approx(141 + 54.1 / 60, abs=0.2 / 60)


@pytest.mark.parametrize("figure", [CLARKE_1866, WGS_72], ids=lambda figure: figure.name)
def test_mercator_sailing_of_the_exam_bank(figure: Figure) -> None:
    """Questions 391 and 397: the tables in use were Clarke 1866, then WGS 72; the printed digits hold for both."""
    working = mercator.solve_inverse(Position(40.7, -(74 + 1 / 60)), Position(14 + 41 / 60, -(17 + 26 / 60)), figure)
    assert working.number("course") == pytest.approx(118.0, abs=0.5), EXAM_BANK
    assert working.number("distance") == pytest.approx(3365.0, abs=0.3), EXAM_BANK
    working = mercator.solve_inverse(Position(32.75, -(79 + 50 / 60)), Position(-34.35, 18 + 29 / 60), figure)
    assert working.number("distance") == pytest.approx(6884.0, abs=0.6), EXAM_BANK


@pytest.mark.parametrize("figure", [CLARKE_1866, WGS_72], ids=lambda figure: figure.name)
def test_mercator_sailing_of_the_exam_bank_to_a_position(figure: Figure) -> None:
    """Question 408."""
    reached = mercator.solve_direct(Position(37.6, -123.0), 241.0, 2022.0, figure).position
    assert reached.lon_deg == pytest.approx(-(156 + 51.7 / 60), abs=0.3 / 60), EXAM_BANK


@pytest.mark.parametrize("figure", [CLARKE_1866, WGS_72], ids=lambda figure: figure.name)
def test_mercator_sailing_of_bowditch_to_a_position(figure: Figure) -> None:
    """Bowditch (Pub. 9), The Sailings, Mercator sailing example 2; from memory."""
    start = Position(75 + 31.7 / 60, -(79 + 8.7 / 60))
    reached = mercator.solve_direct(start, 155.0, 263.5, figure).position
    assert reached.lat_deg == pytest.approx(71 + 32.9 / 60, abs=0.1 / 60)
    assert reached.lon_deg == pytest.approx(-(72 + 34.1 / 60), abs=0.5 / 60)


def test_middle_latitude_sailing_to_a_position() -> None:
    """Worked solutions to a merchant-navy text, plane and parallel sailing, problem 5."""
    reached = middle_latitude.solve_direct(Position(-(30 + 14 / 60), -168.2), 46.2, 426.8).position
    assert reached.lat_deg == pytest.approx(-25.31, abs=0.002)
    assert reached.lon_deg == pytest.approx(-(162 + 23.9 / 60), abs=0.0025)


def test_middle_latitude_sailing_of_bowditch_to_a_position() -> None:
    """Bowditch (Pub. 9), The Sailings, middle-latitude sailing example; from memory."""
    reached = middle_latitude.solve_direct(Position(15 + 17 / 60, 151 + 37 / 60), 70.0, 1253.0).position
    assert reached.lat_deg == pytest.approx(22.426666666666666, abs=0.1 / 60)
    assert reached.lon_deg == pytest.approx(172.35333333333332, abs=0.2 / 60)


def test_middle_latitude_sailing_of_problem_2_is_not_as_printed() -> None:
    """The same solutions print 11°31.0'S 127°50.0'W (half a minute dropped) and, elsewhere, 11°31.9'S.

    d.lat is 458 cos 260° = 79.53' S, so the place is 11°31.5'S 127°50.3'W; 11°31.9' reads 79.55' as 1°19.9'.
    """
    working = middle_latitude.solve_direct(Position(-10.2, -(120 + 11 / 60)), 260.0, 458.0)
    assert working.number("d.lat") == pytest.approx(-79.53, abs=0.01)
    assert working.position.lat_deg == pytest.approx(-(11 + 31.5 / 60), abs=0.05 / 60)
    assert working.position.lon_deg == pytest.approx(-(127 + 50.3 / 60), abs=0.05 / 60)


def test_middle_latitude_sailing_of_the_exam_bank() -> None:
    """Question 308."""
    working = middle_latitude.solve_inverse(Position(20.0, -107.5), Position(24 + 40 / 60, -112.5))
    assert working.number("course") == pytest.approx(315.3, abs=0.1), EXAM_BANK
    assert working.number("distance") == pytest.approx(394.0, abs=0.3), EXAM_BANK


def test_parallel_sailing_of_the_exam_bank() -> None:
    """Question 528."""
    reached = parallel.solve_direct(Position(-38.2, -12.1), 270.0, 1543.0).position
    assert reached.lon_deg == pytest.approx(-(44 + 49 / 60), abs=1 / 60), EXAM_BANK


def test_parallel_sailing_of_a_licence_reviewer() -> None:
    """OIC-NW licensing reviewer (February 2014), finding arrival longitude; printed to the second."""
    working = parallel.solve_direct(Position(50.1, 153.1), 90.0, 879.0)
    assert working.number("d.long") == pytest.approx(1370.33, abs=0.01)
    assert working.position.lon_deg == pytest.approx(175 + 56 / 60 + 20 / 3600, abs=1 / 3600)


def test_plane_sailing_of_bowditch() -> None:
    """Bowditch (Pub. 9), The Sailings, plane sailing examples 1 and 2; from memory."""
    working = plane.solve_direct(5.0, 188.0)
    assert working.number("d.lat") == pytest.approx(187.3, abs=0.1)
    assert working.number("departure") == pytest.approx(16.4, abs=0.1)
    working = plane.solve_inverse(136.0, -203.0)
    assert working.number("course") == pytest.approx(303.8, abs=0.1)
    assert working.number("distance") == pytest.approx(244.3, abs=0.6)


BY_BOTH_FORMULAS = pytest.mark.parametrize(
    "solve",
    [great_circle_sphere.solve_by_cosines, great_circle_sphere.solve_by_haversines],
    ids=["cosines", "haversines"],
)
PLOTTING_BANK = f"{EXAM_BANK}, ocean track plotting"
STRAIT = Position(35 + 57.2 / 60, -(5 + 45.7 / 60))
GULF = Position(24 + 25.3 / 60, -(83 + 2.6 / 60))


@BY_BOTH_FORMULAS
@pytest.mark.parametrize(
    ("start", "end", "distance_nmi", "initial_course_deg", "vertex_lat_deg"),
    [
        (Position(8 + 50 / 60, -80.35), Position(12.6, 128 + 16 / 60), 8664.0, 306.6, 37 + 30.2 / 60),
        (GULF, STRAIT, 3966.5, None, 38 + 9.4 / 60),
        (Position(-(35 + 8 / 60), 19 + 26 / 60), Position(-(33 + 16 / 60), 115.6), 4559.0, 121.0, -(45 + 30.9 / 60)),
    ],
)
def test_great_circle_sailing_of_the_exam_bank(
    solve: Solve,
    start: Position,
    end: Position,
    distance_nmi: float,
    initial_course_deg: float | None,
    vertex_lat_deg: float,
) -> None:
    working = solve(start, end)
    assert working.number("distance") == pytest.approx(distance_nmi, abs=0.6), PLOTTING_BANK
    assert working.number("lat v") == pytest.approx(vertex_lat_deg, abs=0.005), PLOTTING_BANK
    if initial_course_deg is not None:
        assert working.number("initial course") == pytest.approx(initial_course_deg, abs=0.06), PLOTTING_BANK


@BY_BOTH_FORMULAS
def test_great_circle_vertex_printed_from_a_course_rounded_first(solve: Solve) -> None:
    """Exam bank, ocean track plotting: 37°34.9'N is printed.

    Distance and course are right; the vertex is 37°35.5'N, and the printed one follows from a course of 061.7 only.
    """
    start, end = Position(25 + 50 / 60, -77.0), Position(35 + 56 / 60, -6.25)
    working = solve(start, end)
    assert working.number("distance") == pytest.approx(3616.0, abs=0.6), PLOTTING_BANK
    assert working.number("initial course") == pytest.approx(61.7, abs=0.06), PLOTTING_BANK
    assert working.number("lat v") == pytest.approx(37 + 35.5 / 60, abs=0.001)
    cosine = math.cos(math.radians(start.lat_deg)) * math.sin(math.radians(61.7))
    assert math.degrees(math.acos(cosine)) == pytest.approx(37 + 34.9 / 60, abs=0.001)


@BY_BOTH_FORMULAS
def test_great_circle_vertex_longitude_printed_from_figures_rounded_first(solve: Solve) -> None:
    """Exam bank, ocean track plotting: 28°18.2'W is printed.

    Distance and course are right; the vertex is in 28°21.2'W, and the printed one follows from a course of 283.7 and a
    vertex latitude of 38°09.4' only.
    """
    working = solve(STRAIT, GULF)
    assert working.number("distance") == pytest.approx(3966.5, abs=0.6), PLOTTING_BANK
    assert working.number("initial course") == pytest.approx(283.7, abs=0.06), PLOTTING_BANK
    assert working.number("long v") == pytest.approx(-(28 + 21.2 / 60), abs=0.001)
    sine = math.cos(math.radians(76.3)) / math.sin(math.radians(38 + 9.4 / 60))
    assert STRAIT.lon_deg - math.degrees(math.asin(sine)) == pytest.approx(-(28 + 18.2 / 60), abs=0.001)


@BY_BOTH_FORMULAS
def test_great_circle_sailing_of_an_airline_instructor(solve: Solve) -> None:
    """Post to sci.aeronautics.airliners, October 1995; degrees and minutes written with a point."""
    working = solve(Position(-33.0, -(91 + 55 / 60)), Position(14.5, 100 + 39 / 60))
    assert working.number("distance") == pytest.approx(9496.0, abs=0.6)
    assert working.number("initial course") == pytest.approx(215.0, abs=0.5)


@BY_BOTH_FORMULAS
def test_great_circle_beside_a_composite(solve: Solve) -> None:
    """NavList, 7 October 2016: the whole great circle from 41°N 72°W to 41°N 0°."""
    assert solve(Position(41.0, -72.0), Position(41.0, 0.0)).number("distance") == pytest.approx(3160.1, abs=0.05)


def test_composite_under_44_north() -> None:
    """Stan K, NavList message g36798, 7 October 2016; 1' of arc = 1 NM."""
    track = composite(Position(41.0, -72.0), Position(41.0, 0.0), 44.0, SPHERE)
    assert track.great_circle_m / METRES_PER_NAUTICAL_MILE == pytest.approx(3160.1, abs=0.05)
    assert track.distance_m / METRES_PER_NAUTICAL_MILE == pytest.approx(3181.6, abs=0.05)
