"""The tables' block: every rule of it, and every place where a value has none."""

from __future__ import annotations

import json
import math
from dataclasses import asdict

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from navcore.earth.figure import FIGURES, SPHERE, WGS_84
from navcore.earth.latitudes import meridional_parts_min
from navcore.errors import RangeError
from navcore.position import Position
from navcore.sailings.tables import tables_of_leg, tables_of_traverse

LATITUDES = st.one_of(st.sampled_from([-90.0, -45.0, 0.0, 1e-13, 45.0, 90.0]), st.floats(-90.0, 90.0))
LONGITUDES = st.one_of(st.sampled_from([-180.0, -1.0, 0.0, 179.0, 180.0]), st.floats(-180.0, 180.0))
POSITIONS = st.builds(Position, LATITUDES, LONGITUDES)
RUNS = st.lists(
    st.tuples(
        st.one_of(st.sampled_from([0.0, 90.0, 180.0, 270.0]), st.floats(0.0, 360.0)),
        st.one_of(st.sampled_from([0.0, 60.0, 5400.0]), st.floats(0.0, 6000.0)),
    ),
    max_size=4,
)


def parts_min(lat_deg: float) -> float:
    return float(meridional_parts_min(lat_deg, WGS_84))


def test_a_leg_is_worked_as_the_written_rules_say() -> None:
    start, end = Position(48.5, -(125 + 20 / 60)), Position(41 + 20 / 60, 143.0)
    tables = tables_of_leg(start, end, WGS_84)
    mean = math.radians(44 + 55 / 60)
    dmp = parts_min(end.lat_deg) - parts_min(start.lat_deg)
    departure = -5500.0 * math.cos(mean)
    assert tables.d_lat_min == pytest.approx(-430.0, abs=1e-9)
    assert tables.d_long_min == pytest.approx(-5500.0, abs=1e-9)
    assert tables.mean_lat_deg == pytest.approx(44 + 55 / 60, abs=1e-12)
    assert tables.departure_nmi == pytest.approx(departure, abs=1e-9)
    assert tables.dmp_min == pytest.approx(dmp, abs=1e-9)
    angle = math.atan(5500.0 / -dmp)
    assert tables.mercator_course_deg == pytest.approx(180.0 + math.degrees(angle), abs=1e-10)
    assert tables.mercator_distance_nmi == pytest.approx(430.0 / math.cos(angle), abs=1e-8)
    angle = math.atan(departure / -430.0)
    assert tables.middle_latitude_course_deg == pytest.approx(180.0 + math.degrees(angle), abs=1e-10)
    assert tables.middle_latitude_distance_nmi == pytest.approx(430.0 / math.cos(angle), abs=1e-8)
    assert tables.convergency_deg == pytest.approx(5500.0 / 60.0 * math.sin(mean), abs=1e-10)
    assert tables.conversion_angle_deg == pytest.approx(tables.convergency_deg / 2.0, abs=0.0)


def test_the_north_pacific_leg_on_the_sphere_is_3910_9_nmi_at_263_7() -> None:
    tables = tables_of_leg(Position(48.5, -(125 + 20 / 60)), Position(41 + 20 / 60, 143.0), SPHERE)
    assert tables.mercator_distance_nmi == pytest.approx(3910.9, abs=0.05)
    assert tables.mercator_course_deg == pytest.approx(263.7, abs=0.05)


@pytest.mark.parametrize("name", FIGURES)
def test_meridional_parts_are_those_of_the_chosen_figure(name: str) -> None:
    figure = FIGURES[name]
    tables = tables_of_leg(Position(0.0, 0.0), Position(45.0, 10.0), figure)
    assert tables.dmp_min == pytest.approx(float(meridional_parts_min(45.0, figure)), abs=1e-9)


def test_on_a_parallel_parallel_sailing_answers_and_mercator_sailing_has_no_distance() -> None:
    tables = tables_of_leg(Position(60.0, 10.0), Position(60.0, -10.0), WGS_84)
    assert tables.d_lat_min == 0.0
    assert tables.dmp_min == 0.0
    assert tables.departure_nmi == pytest.approx(-600.0, abs=1e-9)
    assert tables.mercator_course_deg == 270.0
    assert tables.mercator_distance_nmi is None
    assert tables.middle_latitude_course_deg == 270.0
    assert tables.middle_latitude_distance_nmi == pytest.approx(600.0, abs=1e-9)


def test_along_the_equator_is_parallel_sailing_and_not_across() -> None:
    tables = tables_of_leg(Position(0.0, 170.0), Position(0.0, -170.0), WGS_84)
    assert tables.departure_nmi == pytest.approx(1200.0, abs=1e-9)
    assert tables.middle_latitude_course_deg == 90.0
    assert tables.convergency_deg == 0.0


def test_from_the_equator_is_not_across_it() -> None:
    tables = tables_of_leg(Position(0.0, 0.0), Position(-20.0, 30.0), WGS_84)
    assert tables.mean_lat_deg == -10.0
    assert tables.departure_nmi == pytest.approx(1800.0 * math.cos(math.radians(10.0)), abs=1e-9)
    assert tables.middle_latitude_distance_nmi is not None


def test_across_the_equator_departure_and_the_middle_latitude_answers_have_no_value() -> None:
    tables = tables_of_leg(Position(10.0, 0.0), Position(-5.0, 3.0), WGS_84)
    assert tables.departure_nmi is None
    assert tables.middle_latitude_course_deg is None
    assert tables.middle_latitude_distance_nmi is None
    assert tables.mean_lat_deg == 2.5
    assert tables.mercator_distance_nmi == pytest.approx(917.924, abs=0.001)


@pytest.mark.parametrize("pole_deg", [90.0, -90.0])
@pytest.mark.parametrize("pole_lon_deg", [20.0, -123.0])
def test_to_and_from_a_pole_dmp_has_no_value_and_the_course_is_the_meridians(
    pole_deg: float, pole_lon_deg: float
) -> None:
    place, pole = Position(math.copysign(60.0, pole_deg), 20.0), Position(pole_deg, pole_lon_deg)
    for start, end in ((place, pole), (pole, place)):
        tables = tables_of_leg(start, end, WGS_84)
        course_deg = 0.0 if end.lat_deg > start.lat_deg else 180.0
        assert tables.dmp_min is None
        assert tables.mercator_course_deg == course_deg
        assert tables.middle_latitude_course_deg == course_deg
        assert tables.mercator_distance_nmi == 1800.0
        assert tables.middle_latitude_distance_nmi == 1800.0


def test_one_position_has_no_course() -> None:
    tables = tables_of_leg(Position(45.0, 7.0), Position(45.0, 7.0), WGS_84)
    assert tables.mercator_course_deg is None
    assert tables.middle_latitude_course_deg is None
    assert tables.mercator_distance_nmi is None
    assert tables.middle_latitude_distance_nmi == 0.0
    assert tables.dmp_min == 0.0


@pytest.mark.parametrize(
    ("from_deg", "to_deg", "d_long_min"),
    [(0.0, 180.0, 10800.0), (0.0, -180.0, -10800.0), (180.0, 0.0, -10800.0), (90.0, -90.0, -10800.0)],
)
def test_half_round_goes_the_way_the_typed_signs_say(from_deg: float, to_deg: float, d_long_min: float) -> None:
    tables = tables_of_leg(Position(40.0, from_deg), Position(50.0, to_deg), WGS_84)
    assert tables.d_long_min == d_long_min
    assert tables.mercator_course_deg is not None
    assert (tables.mercator_course_deg < 180.0) == (d_long_min > 0.0)


def test_across_180_the_short_way_is_taken() -> None:
    assert tables_of_leg(Position(1.0, 179.5), Position(2.0, -179.5), WGS_84).d_long_min == 60.0


def test_latitudes_that_differ_by_rounding_only_are_one_parallel() -> None:
    tables = tables_of_leg(Position(45.0, 0.0), Position(math.nextafter(45.0, 90.0), 30.0), WGS_84)
    assert tables.d_lat_min == 0.0
    assert tables.mercator_distance_nmi is None


def test_mercator_distance_keeps_its_digits_where_latitudes_are_close() -> None:
    """As d.lat goes to 0, d.lat ÷ DMP goes to cos φ (1 - e² sin² φ) / (1 - e²) from the rate of meridional parts."""
    squared = WGS_84.eccentricity_squared
    limit = 1800.0 * math.sqrt(0.5) * (1.0 - squared / 2.0) / (1.0 - squared)
    for difference_deg in (1e-10, 1e-7, 1e-5):
        tables = tables_of_leg(Position(45.0, 0.0), Position(45.0 + difference_deg, 30.0), WGS_84)
        assert tables.mercator_distance_nmi == pytest.approx(limit, rel=2.0 * math.radians(difference_deg) + 1e-12)


@pytest.mark.parametrize("place", [Position(90.5, 0.0), Position(math.nan, 0.0), Position(0.0, math.inf)])
def test_a_position_that_is_none_is_refused(place: Position) -> None:
    with pytest.raises(RangeError):
        tables_of_leg(place, Position(1.0, 1.0), WGS_84)
    with pytest.raises(RangeError):
        tables_of_leg(Position(1.0, 1.0), place, WGS_84)
    with pytest.raises(RangeError):
        tables_of_traverse(place, [], WGS_84)


@given(POSITIONS, POSITIONS)
@settings(deadline=None, max_examples=150)
def test_every_value_is_a_plain_finite_float_or_none(start: Position, end: Position) -> None:
    for value in asdict(tables_of_leg(start, end, WGS_84)).values():
        assert value is None or (type(value) is float and math.isfinite(value) and str(value) != "-0.0")


@given(POSITIONS, RUNS)
@settings(deadline=None, max_examples=150)
def test_every_value_of_a_traverse_is_finite_or_none(start: Position, runs: list[tuple[float, float]]) -> None:
    tables = tables_of_traverse(start, runs, WGS_84)
    json.dumps(asdict(tables), allow_nan=False)
    for reached in (tables.middle_latitude_to, tables.mercator_to):
        assert reached is None or abs(reached.lat_deg) <= 90.0


@given(POSITIONS, POSITIONS)
@settings(deadline=None, max_examples=100)
def test_back_is_the_reciprocal_of_there(start: Position, end: Position) -> None:
    there, back = tables_of_leg(start, end, WGS_84), tables_of_leg(end, start, WGS_84)
    assert back.d_lat_min == -there.d_lat_min
    assert back.convergency_deg == pytest.approx(there.convergency_deg, abs=1e-9)
    for name in ("mercator_distance_nmi", "middle_latitude_distance_nmi"):
        assert getattr(back, name) == (None if getattr(there, name) is None else pytest.approx(getattr(there, name)))
    if there.mercator_course_deg is not None and abs(there.d_long_min) != 10800.0:
        assert back.mercator_course_deg is not None
        turned = (back.mercator_course_deg - there.mercator_course_deg) % 360.0
        assert turned == pytest.approx(180.0, abs=1e-6)


def test_a_traverse_sums_its_runs() -> None:
    tables = tables_of_traverse(Position(50.0, -20.0), [(0.0, 30.0), (90.0, 40.0)], WGS_84)
    assert tables.d_lat_min == 30.0
    assert tables.departure_nmi == 40.0
    assert tables.made_good_distance_nmi == 50.0
    assert tables.made_good_course_deg == pytest.approx(math.degrees(math.atan2(4.0, 3.0)), abs=1e-12)
    assert tables.middle_latitude_to is not None
    assert tables.middle_latitude_to.lat_deg == pytest.approx(50.5, abs=1e-12)
    east_min = 40.0 / math.cos(math.radians(50.25))
    assert tables.middle_latitude_to.lon_deg == pytest.approx(-20.0 + east_min / 60.0, abs=1e-12)
    assert tables.mercator_to is not None
    east_min = 40.0 / 30.0 * (parts_min(50.5) - parts_min(50.0))
    assert tables.mercator_to.lon_deg == pytest.approx(-20.0 + east_min / 60.0, abs=1e-11)


def test_a_traverse_that_comes_back_ends_where_it_began_without_a_course() -> None:
    start = Position(50.0, -20.0)
    tables = tables_of_traverse(start, [(0.0, 10.0), (120.0, 10.0), (240.0, 10.0)], WGS_84)
    assert (tables.d_lat_min, tables.departure_nmi, tables.made_good_distance_nmi) == (0.0, 0.0, 0.0)
    assert tables.made_good_course_deg is None
    assert tables.middle_latitude_to == start
    assert tables.mercator_to == start


@pytest.mark.parametrize("runs", [[(90.0, 60.0)], [(45.0, 60.0 / math.sqrt(2)), (135.0, 60.0 / math.sqrt(2))]])
def test_on_090_made_good_both_positions_are_by_parallel_sailing(runs: list[tuple[float, float]]) -> None:
    tables = tables_of_traverse(Position(60.0, 179.5), runs, WGS_84)
    assert tables.mercator_to is not None
    assert tables.mercator_to.lat_deg == 60.0
    assert tables.mercator_to.lon_deg == pytest.approx(-178.5, abs=1e-12)
    assert tables.middle_latitude_to == pytest.approx(tables.mercator_to, abs=1e-12)


def test_a_traverse_across_the_equator_has_a_mercator_position_only() -> None:
    tables = tables_of_traverse(Position(10.0, 0.0), [(170.0, 900.0)], WGS_84)
    assert tables.middle_latitude_to is None
    assert tables.mercator_to is not None
    assert tables.mercator_to.lat_deg == pytest.approx(10.0 - 15.0 * math.cos(math.radians(10.0)), abs=1e-12)


def test_a_traverse_past_a_pole_has_no_position() -> None:
    tables = tables_of_traverse(Position(60.0, 10.0), [(0.0, 1801.0)], WGS_84)
    assert tables.middle_latitude_to is None
    assert tables.mercator_to is None


def test_a_meridian_leads_to_the_pole_and_another_course_does_not() -> None:
    along = tables_of_traverse(Position(89.3, 10.0), [(0.0, 42.0)], WGS_84)
    assert along.mercator_to == (90.0, 10.0)
    slanting = tables_of_traverse(Position(89.0, 10.0), [(0.0, 60.0), (90.0, 30.0)], WGS_84)
    assert slanting.mercator_to is None


def test_from_a_pole_only_the_meridian_leads_away() -> None:
    assert tables_of_traverse(Position(90.0, 10.0), [(180.0, 60.0)], WGS_84).mercator_to == (89.0, 10.0)
    east = tables_of_traverse(Position(90.0, 10.0), [(90.0, 60.0)], WGS_84)
    assert east.mercator_to is None
    assert east.middle_latitude_to is None


@pytest.mark.parametrize("run", [(math.nan, 1.0), (0.0, -1.0), (0.0, math.inf)])
def test_a_run_that_is_none_is_refused(run: tuple[float, float]) -> None:
    with pytest.raises(RangeError):
        tables_of_traverse(Position(0.0, 0.0), [run], WGS_84)


@given(st.floats(-80.0, 80.0), st.floats(-80.0, 80.0), st.floats(-179.0, 179.0))
@settings(deadline=None, max_examples=100)
def test_a_traverse_along_the_mercator_course_reaches_the_end(lat1: float, lat2: float, d_long: float) -> None:
    start, end = Position(lat1, 0.0), Position(lat2, d_long)
    leg = tables_of_leg(start, end, WGS_84)
    if leg.mercator_distance_nmi is None or leg.mercator_course_deg is None or abs(leg.d_lat_min) < 0.1:
        return
    reached = tables_of_traverse(start, [(leg.mercator_course_deg, leg.mercator_distance_nmi)], WGS_84).mercator_to
    assert reached is not None
    assert reached == pytest.approx(end, abs=1e-6)
