"""Distances, speeds, percentages and runs."""

from __future__ import annotations

from typing import TYPE_CHECKING

import pytest
from hypothesis import given
from hypothesis import strategies as st

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.errors import ParseError, RangeError
from navcore.text.distance import (
    AVIATION_SPEED_UNIT,
    format_distance,
    format_distance_figure,
    format_percent,
    format_percent_figure,
    format_speed,
    format_speed_figure,
    parse_distance,
    parse_run,
    parse_speed,
)

if TYPE_CHECKING:
    from collections.abc import Callable


@pytest.mark.parametrize(
    ("text", "distance_nmi"),
    [
        ("300", 300.0),
        ("300 NM", 300.0),
        ("12.5nm", 12.5),
        ("12.5 nmi", 12.5),
        ("5 cables", 0.5),
        ("1 cable", 0.1),
        ("10 km", 10_000.0 / METRES_PER_NAUTICAL_MILE),
        ("10 KM", 10_000.0 / METRES_PER_NAUTICAL_MILE),
        ("1852 m", 1.0),
        ("1000 ft", pytest.approx(304.8 / METRES_PER_NAUTICAL_MILE, rel=1e-15)),
        ("0", 0.0),
    ],
)
def test_distances_are_read_in_nautical_miles(text: str, distance_nmi: float) -> None:
    assert parse_distance(text) == distance_nmi


@pytest.mark.parametrize(
    ("text", "speed_kn"),
    [
        ("13.5", 13.5),
        ("13.5 kn", 13.5),
        ("480 kt", 480.0),
        ("480KTS", 480.0),
        ("12 knots", 12.0),
        ("25 km/h", 25_000.0 / METRES_PER_NAUTICAL_MILE),
        ("10 m/s", 36_000.0 / METRES_PER_NAUTICAL_MILE),
    ],
)
def test_speeds_are_read_in_knots(text: str, speed_kn: float) -> None:
    assert parse_speed(text) == speed_kn


@pytest.mark.parametrize(
    ("text", "course_deg", "distance_nmi"),
    [("263.7/300", 263.7, 300.0), ("090°T/12.5NM", 90.0, 12.5), (" 360 / 5 cables ", 0.0, 0.5)],
)
def test_a_run_is_a_course_and_a_distance(text: str, course_deg: float, distance_nmi: float) -> None:
    assert parse_run(text) == (course_deg, distance_nmi)


@pytest.mark.parametrize(
    ("parse", "text", "span", "reason", "advice"),
    [
        (parse_distance, "3M", (1, 2), "nautical miles or metres", "NM or m"),
        (parse_distance, "3 miles", (2, 7), "“miles” is no unit", "12.5 NM"),
        (parse_distance, "5 kn", (2, 4), "“kn” is no unit", "12.5 NM"),
        (parse_distance, "-3", (0, 1), "never negative", "12.5 NM"),
        (parse_distance, "12,5", (0, 4), "comma", "12.5"),
        (parse_distance, "1,000 NM", (0, 5), "comma", "1.000 for a fraction, or 1000"),
        (parse_distance, "NM", (0, 1), "no figure", "12.5 NM"),
        (parse_distance, "1.2.3", (3, 5), "no unit", "12.5 NM"),
        (parse_distance, "9" * 400, (0, 400), "too many figures", "12.5 NM"),
        (parse_distance, "٣", (0, 1), "no figure", "12.5 NM"),
        (parse_distance, "3 \x1b", (2, 3), "“␛” is no unit", "12.5 NM"),
        (parse_distance, "inf", (0, 1), "no figure", "12.5 NM"),
        (parse_distance, " ", (0, 1), "missing", "12.5 NM"),
        (parse_speed, "12 mph", (3, 6), "“mph” is no unit", "13.5 kn"),
        (parse_run, "400/3", (0, 3), "over 360°", "000 to 360"),
        (parse_run, "090/x", (4, 5), "no figure", "12.5 NM"),
        (parse_run, "090", (3, 3), "no /", "263.7/300"),
        (parse_run, "090/", (4, 4), "distance is missing", "12.5 NM"),
        (parse_run, "/300", (0, 0), "direction is missing", "000 to 360"),
        (parse_run, "090M/3", (3, 4), "magnetic", "090T"),
        (parse_run, "", (0, 0), "missing", "263.7/300"),
    ],
)
def test_a_refused_text(
    parse: Callable[[str], object], text: str, span: tuple[int, int], reason: str, advice: str
) -> None:
    with pytest.raises(ParseError) as caught:
        parse(text)
    assert caught.value.text == text
    assert (caught.value.start, caught.value.end) == span
    assert reason in caught.value.reason
    assert advice in caught.value.advice


def test_a_unit_is_printed_after_the_figure() -> None:
    assert format_distance(3924.24) == "3924.2 NM"
    assert format_distance(3924.24, 0) == "3924 NM"
    assert format_speed(13.5) == "13.5 kn"
    assert format_speed(480.0, AVIATION_SPEED_UNIT, 0) == "480 kt"
    assert format_percent(5.95) == "6.0 %"


@pytest.mark.parametrize("formatter", [format_distance_figure, format_speed_figure, format_percent_figure])
def test_a_figure_alone_has_no_unit(formatter: Callable[[float], str]) -> None:
    assert formatter(9.95) == "10.0"
    assert formatter(-0.04) == "0.0"
    assert formatter(-1.25) == "-1.3"


@given(st.floats(0.0, 1e6), st.integers(0, 6))
def test_what_is_printed_is_read_within_half_of_its_last_figure(value: float, decimals: int) -> None:
    for parse, printed in (
        (parse_distance, format_distance(value, decimals)),
        (parse_speed, format_speed(value, decimals=decimals)),
    ):
        assert abs(parse(printed) - value) <= 0.5 / 10**decimals * (1.0 + 1e-9) + 1e-9


def test_what_is_no_number_is_not_printed() -> None:
    with pytest.raises(RangeError, match="finite"):
        format_distance(float("nan"))
