"""Directions, alterations and minutes of arc."""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

import pytest
from hypothesis import given
from hypothesis import strategies as st

from navcore.errors import ParseError, RangeError
from navcore.text.direction import (
    AVIATION_SIDES,
    format_alteration,
    format_direction,
    format_minutes_of_arc,
    parse_direction,
)

if TYPE_CHECKING:
    from collections.abc import Callable


@pytest.mark.parametrize(
    ("text", "direction_deg"),
    [
        ("045", 45.0),
        ("45", 45.0),
        ("45.5", 45.5),
        ("045°T", 45.0),
        ("045.0°", 45.0),
        (" 045 º t ", 45.0),
        ("000", 0.0),
        ("360", 0.0),
        ("360.0°T", 0.0),
        ("359.9", 359.9),
    ],
)
def test_directions_are_read(text: str, direction_deg: float) -> None:
    assert parse_direction(text) == direction_deg


@pytest.mark.parametrize("letter", ["M", "C", "G"])
def test_the_letter_that_was_asked_for_is_read(letter: str) -> None:
    assert parse_direction(f"045°{letter}", letter) == 45.0
    assert parse_direction("045", letter) == 45.0


@pytest.mark.parametrize(
    ("text", "letter", "span", "reason", "advice"),
    [
        ("045M", "T", (3, 4), "M says magnetic", "true (T), such as 045T"),
        ("045°T", "G", (4, 5), "T says true", "grid (G), such as 045G"),
        ("045T", "", (3, 4), "T says true", "without a letter, such as 045"),
        ("045X", "T", (3, 4), "no letter of a direction", "045T"),
        ("361", "T", (0, 3), "over 360°", "000 to 360"),
        ("360.1", "T", (0, 5), "over 360°", "000 to 360"),
        ("-5", "T", (0, 1), "no sign", "000 to 360"),
        ("N45E", "T", (0, 4), "quadrants", "type 045T"),
        ("s 45.5° e", "T", (0, 9), "quadrants", "type 134.5T"),
        ("S45W", "M", (0, 4), "quadrants", "type 225M"),
        ("N45W", "T", (0, 4), "quadrants", "type 315T"),
        ("N0W", "T", (0, 3), "quadrants", "type 000T"),
        ("NE", "T", (0, 2), "no direction in figures", "000 to 360"),
        ("N95E", "T", (0, 4), "no direction in figures", "000 to 360"),
        ("0045", "T", (0, 4), "no direction in figures", "three figures"),
        ("045,5", "T", (3, 4), "comma", "045.5"),
        ("٠٤٥", "T", (0, 3), "no direction in figures", "three figures"),
        ("nan", "T", (0, 3), "no direction in figures", "three figures"),
        ("", "T", (0, 0), "missing", "three figures"),
        ("9" * 2000, "T", (1000, 2000), "too long", "three figures"),
    ],
)
def test_a_refused_direction(text: str, letter: str, span: tuple[int, int], reason: str, advice: str) -> None:
    with pytest.raises(ParseError) as caught:
        parse_direction(text, letter)
    assert (caught.value.start, caught.value.end) == span
    assert reason in caught.value.reason
    assert advice in caught.value.advice


@pytest.mark.parametrize(
    ("direction_deg", "decimals", "text"),
    [
        (45.0, 1, "045.0°T"),
        (0.04, 1, "000.0°T"),
        (359.94, 1, "359.9°T"),
        (359.95, 1, "000.0°T"),
        (359.96, 1, "000.0°T"),
        (360.0, 1, "000.0°T"),
        (-0.04, 1, "000.0°T"),
        (-90.0, 1, "270.0°T"),
        (359.5, 0, "000°T"),
        (7.25, 2, "007.25°T"),
    ],
)
def test_directions_have_three_figures_and_never_say_360(direction_deg: float, decimals: int, text: str) -> None:
    assert format_direction(direction_deg, decimals=decimals) == text


def test_a_direction_says_its_kind() -> None:
    assert format_direction(12.34, "M") == "012.3°M"


@given(st.floats(0.0, 360.0, exclude_max=True), st.integers(0, 6))
def test_a_printed_direction_is_read_within_half_of_its_last_figure(direction_deg: float, decimals: int) -> None:
    printed = format_direction(direction_deg, decimals=decimals)
    read = parse_direction(printed)
    assert abs((read - direction_deg + 180.0) % 360.0 - 180.0) <= 0.5 / 10**decimals + 1e-12
    assert format_direction(read, decimals=decimals) == printed


@pytest.mark.parametrize(
    ("alteration_deg", "text"),
    [
        (43.1, "43.1° stbd"),
        (-43.1, "43.1° port"),
        (0.0, "0.0°"),
        (-0.04, "0.0°"),
        (0.05, "0.1° stbd"),
        (180.0, "180.0° stbd"),
    ],
)
def test_an_alteration_names_its_side(alteration_deg: float, text: str) -> None:
    assert format_alteration(alteration_deg) == text


def test_an_alteration_in_the_words_of_aviation() -> None:
    assert format_alteration(43.1, AVIATION_SIDES) == "43.1° right"
    assert format_alteration(-43.1, AVIATION_SIDES, 0) == "43° left"


@pytest.mark.parametrize(
    ("minutes", "names", "text"),
    [
        (-430.0, ("N", "S"), "430.0' S"),
        (5500.04, ("E", "W"), "5500.0' E"),
        (0.0, ("N", "S"), "0.0'"),
        (-430.0, None, "-430.0'"),
        (-0.01, None, "0.0'"),
    ],
)
def test_minutes_of_arc_have_their_name_or_their_sign(minutes: float, names: tuple[str, str] | None, text: str) -> None:
    assert format_minutes_of_arc(minutes, names) == text


@pytest.mark.parametrize("formatter", [format_direction, format_alteration, format_minutes_of_arc])
def test_what_is_no_number_is_not_printed(formatter: Callable[[float], str]) -> None:
    for value in (math.nan, math.inf):
        with pytest.raises(RangeError, match="finite"):
            formatter(value)
