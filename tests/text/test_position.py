"""Every written form of a position to its value, and back."""

from __future__ import annotations

from fractions import Fraction

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from navcore.errors import ParseError, RangeError
from navcore.position import Position
from navcore.text.position import (
    format_icao,
    format_latitude,
    format_longitude,
    format_position,
    parse_latitude,
    parse_longitude,
    parse_position,
    write_position,
)


def dms(degrees: int, minutes: str = "0", seconds: str = "0") -> float:
    """The float nearest to the exact value."""
    return float(degrees + Fraction(minutes) / 60 + Fraction(seconds) / 3600)


BREST = Position(dms(48, "23.5"), -dms(4, "29"))

READ = [
    ("48°23.5'N 004°29.0'W", BREST),
    ("48-23.5N 004-29.0W", BREST),
    ("48 23.5 N 4 29 W", BREST),
    ("48°23.5′N 004°29.0′W", BREST),
    ("48º23.5’N 004º29.0’W", BREST),
    ("48˚23‘30“N 004˚29‘00“W", BREST),
    ("48°23′30″N 4°29′0″W", BREST),
    ("48°23'30\"N 4°29'00\"W", BREST),
    ("48°23'30''N 4°29'00''W", BREST),
    ("48°23′30”N 4°29′00”W", BREST),
    ("48°-23.5'N 004°-29.0'W", BREST),
    ("48−23.5N 004−29.0W", BREST),
    ("48–23.5N 004–29.0W", BREST),
    ("48°23.5'N, 004°29.0'W", BREST),
    ("48°23.5'N,004°29.0'W", BREST),
    ("48°23.5'n 004°29.0'w", BREST),
    ("N48°23.5' W004°29.0'", BREST),
    ("N 48 23.5 W 4 29", BREST),
    ("N48°23.5'W004°29.0'", BREST),
    ("N48°23.5', 004°29.0'W", BREST),
    ("48°23.5'N, W004°29.0'", BREST),
    ("48°23.5'N W004°29.0'", BREST),
    ("  48°23.5'N\t004°29.0'W\r\n", BREST),
    ("48°23.5'N\u00a0004°29.0'W", BREST),
    ("48:23:30N 004:29:00W", BREST),
    ("48:23.5N 4:29W", BREST),
    ("4823.5N 00429.0W", BREST),
    ("482330N0042900W", BREST),
    ("+4823.5-00429/", BREST),
    ("+482330-0042900/", BREST),
    ("40:38:23N 073:46:44W", Position(dms(40, "38", "23"), -dms(73, "46", "44"))),
    ("48.3917N 4.4833W", Position(48.3917, -4.4833)),
    ("48.3917°N 4.4833°W", Position(48.3917, -4.4833)),
    ("N48.3917 W4.4833", Position(48.3917, -4.4833)),
    ("48.3917 -4.4833", Position(48.3917, -4.4833)),
    ("48.3917°, -4.4833°", Position(48.3917, -4.4833)),
    ("+48.3917 -4.4833", Position(48.3917, -4.4833)),
    ("-36.0, 175.2", Position(-36.0, 175.2)),
    ("−36.0,175.2", Position(-36.0, 175.2)),
    ("-36 +175", Position(-36.0, 175.0)),
    ("36, 175", Position(36.0, 175.0)),
    ("36 175", Position(36.0, 175.0)),
    ("48N 4W", Position(48.0, -4.0)),
    ("36S 175E", Position(-36.0, 175.0)),
    ("46N078W", Position(46.0, -78.0)),
    ("4620N07805W", Position(dms(46, "20"), -dms(78, "5"))),
    ("4620n07805w", Position(dms(46, "20"), -dms(78, "5"))),
    ("462030N0780510W", Position(dms(46, "20", "30"), -dms(78, "5", "10"))),
    ("+48.5-004.5/", Position(48.5, -4.5)),
    ("+48.5-004.5", Position(48.5, -4.5)),
    ("-36.0+175.2/", Position(-36.0, 175.2)),
    ("+4830-00430/", Position(48.5, -4.5)),
    ("+4830.5-00430.25/", Position(dms(48, "30.5"), -dms(4, "30.25"))),
    ("+483030.5-0043000/", Position(dms(48, "30", "30.5"), -4.5)),
    ("+48.5-004.5+15.2CRSWGS_84/", Position(48.5, -4.5)),
    ("+48.5-004.5CRSWGS_84/", Position(48.5, -4.5)),
    ("0N 0E", Position(0.0, 0.0)),
    ("90N 0E", Position(90.0, 0.0)),
    ("90°00.0'S 0W", Position(-90.0, 0.0)),
]


@pytest.mark.parametrize(("text", "position"), READ)
def test_every_form_is_read_as_the_float_nearest_to_its_exact_value(text: str, position: Position) -> None:
    assert parse_position(text) == position


@pytest.mark.parametrize("text", ["0S 0W", "-0.0, -0.0", "-00-000/", "0°00.0'S 000°00.0'W"])
def test_zero_has_no_sign(text: str) -> None:
    position = parse_position(text)
    assert str(position.lat_deg) == "0.0"
    assert str(position.lon_deg) == "0.0"


@pytest.mark.parametrize(
    ("text", "lon_deg"),
    [("0N 180E", 180.0), ("0N 180W", -180.0), ("0, 180", 180.0), ("0, -180", -180.0), ("0000N18000W", -180.0)],
)
def test_the_antimeridian_keeps_the_side_that_was_typed(text: str, lon_deg: float) -> None:
    assert parse_position(text).lon_deg == lon_deg


@pytest.mark.parametrize(
    ("text", "lat_deg"),
    [
        ("50N", 50.0),
        ("50°N", 50.0),
        ("N50", 50.0),
        ("60°30'S", -60.5),
        ("-36.5", -36.5),
        ("+50°", 50.0),
        ("5030N", 50.5),
    ],
)
def test_a_latitude_alone_is_read(text: str, lat_deg: float) -> None:
    assert parse_latitude(text) == lat_deg


@pytest.mark.parametrize(
    ("text", "lon_deg"), [("160W", -160.0), ("W160", -160.0), ("-160", -160.0), ("+5.5", 5.5), ("180E", 180.0)]
)
def test_a_longitude_alone_is_read(text: str, lon_deg: float) -> None:
    assert parse_longitude(text) == lon_deg


@pytest.mark.parametrize(
    ("lat_deg", "decimals", "text"),
    [
        (48.5, 1, "48°30.0'N"),
        (-48.5, 1, "48°30.0'S"),
        (dms(48, "59.94"), 1, "48°59.9'N"),
        (dms(48, "59.95"), 1, "49°00.0'N"),
        (dms(48, "59.96"), 1, "49°00.0'N"),
        (dms(48, "59.96"), 2, "48°59.96'N"),
        (dms(48, "59.5"), 0, "49°00'N"),
        (-dms(89, "59.96"), 1, "90°00.0'S"),
        (0.0, 1, "00°00.0'N"),
        (-0.0, 1, "00°00.0'N"),
        (-0.0008, 1, "00°00.0'N"),
        (-0.0009, 1, "00°00.1'S"),
        (5.0, 1, "05°00.0'N"),
    ],
)
def test_latitudes_are_printed_with_carry(lat_deg: float, decimals: int, text: str) -> None:
    assert format_latitude(lat_deg, decimals) == text


@pytest.mark.parametrize(
    ("lon_deg", "text"),
    [
        (-dms(125, "20"), "125°20.0'W"),
        (dms(179, "59.96"), "180°00.0'E"),
        (dms(179, "59.95"), "180°00.0'E"),
        (-dms(179, "59.96"), "180°00.0'W"),
        (180.0, "180°00.0'E"),
        (-180.0, "180°00.0'W"),
        (-0.0001, "000°00.0'E"),
        (dms(9, "59.96"), "010°00.0'E"),
    ],
)
def test_longitudes_are_printed_with_carry(lon_deg: float, text: str) -> None:
    assert format_longitude(lon_deg) == text


def test_every_typed_half_of_the_last_figure_is_rounded_up() -> None:
    for minutes in range(60):
        for tenth in range(10):
            printed = format_latitude(dms(37, f"{minutes}.{tenth}5"))
            above = Fraction(10 * minutes + tenth + 1, 10)
            assert printed == f"{37 + above // 60}°{float(above % 60):04.1f}'N"


def test_a_position_is_printed_latitude_first() -> None:
    assert format_position(Position(48.5, -dms(125, "20"))) == "48°30.0'N 125°20.0'W"
    assert format_position(Position(48.5, -dms(125, "20")), 3) == "48°30.000'N 125°20.000'W"


@pytest.mark.parametrize(
    ("position", "text"),
    [
        (Position(dms(46, "20"), -dms(78, "5")), "4620N07805W"),
        (Position(dms(46, "59.6"), dms(179, "59.6")), "4700N18000E"),
        (Position(-0.001, -0.001), "0000N00000E"),
        (Position(-5.0, 5.0), "0500S00500E"),
    ],
)
def test_icao_positions_have_eleven_characters_with_carry(position: Position, text: str) -> None:
    assert format_icao(position) == text
    assert len(text) == 11


@pytest.mark.parametrize("value", [float("nan"), float("inf"), 90.5, -91.0])
def test_what_is_no_latitude_is_not_printed(value: float) -> None:
    for write in (format_position, format_icao, write_position):
        with pytest.raises(RangeError, match="latitude_deg"):
            write(Position(value, 0.0))


@pytest.mark.parametrize(
    ("position", "text"),
    [
        (Position(48.5, -4.5), "48°30.0'N 004°30.0'W"),
        (BREST, "48°23.5'N 004°29.0'W"),
        (Position(48.3917, -4.4833), "48°23.502'N 004°28.998'W"),
        (Position(0.1, 180.0), "00°06.0'N 180°00.0'E"),
        (Position(0.0, -180.0), "00°00.0'N 180°00.0'W"),
        (Position(3.5e-7, -1e-20), "00°00.000021'N 0.00000000000000000001W"),
        (Position(1.0 / 3.0, -100.0 / 3.0), "00°20.0'N 033°20.0'W"),
        (Position(48.123456789012, 5e-324), "48.123456789012N 0." + "0" * 323 + "5E"),
    ],
)
def test_a_position_is_written_with_the_fewest_decimals_that_keep_it(position: Position, text: str) -> None:
    assert write_position(position) == text
    assert parse_position(text) == position


LATITUDES = st.floats(-90.0, 90.0)
LONGITUDES = st.floats(-180.0, 180.0)
MANY = settings(max_examples=300, deadline=None)


@MANY
@given(LATITUDES, LONGITUDES)
def test_what_is_written_is_read_as_the_very_same_floats(lat_deg: float, lon_deg: float) -> None:
    position = Position(lat_deg, lon_deg)
    assert parse_position(write_position(position)) == position


@MANY
@given(LATITUDES, LONGITUDES, st.integers(0, 6))
def test_what_is_printed_is_read_within_half_of_its_last_figure(lat_deg: float, lon_deg: float, decimals: int) -> None:
    printed = format_position(Position(lat_deg, lon_deg), decimals)
    read = parse_position(printed)
    half_deg = 0.5 / 60 / 10**decimals + 1e-13
    assert abs(read.lat_deg - lat_deg) <= half_deg
    assert abs(read.lon_deg - lon_deg) <= half_deg
    assert format_position(read, decimals) == printed


@MANY
@given(st.integers(-90 * 3600, 90 * 3600), st.integers(-180 * 3600, 180 * 3600))
def test_one_place_is_the_same_floats_in_every_form(lat_s: int, lon_s: int) -> None:
    parts = [
        (abs(lat_s), "NS"[lat_s < 0], 2, "-" if lat_s < 0 else "+"),
        (abs(lon_s), "EW"[lon_s < 0], 3, "+-"[lon_s < 0]),
    ]
    meant = Position(lat_s / 3600, lon_s / 3600)
    words, signs, marked = "", "", []
    for seconds, letter, width, sign in parts:
        degrees, minutes, rest = seconds // 3600, seconds // 60 % 60, seconds % 60
        figures = f"{degrees:0{width}d}{minutes:02d}{rest:02d}"
        words += figures + letter
        signs += sign + figures
        marked.append((degrees, minutes, rest, letter))
    behind = " ".join(f"{d}°{m}'{s}\"{letter}" for d, m, s, letter in marked)
    in_front = ", ".join(f"{letter}{d}-{m:02d}-{s:02d}" for d, m, s, letter in marked)
    for text in (words, signs + "/", behind, in_front, f"{meant.lat_deg:.25f}, {meant.lon_deg:.25f}"):
        assert parse_position(text) == meant


@MANY
@given(LATITUDES, LONGITUDES)
def test_icao_is_read_back_to_the_minute(lat_deg: float, lon_deg: float) -> None:
    text = format_icao(Position(lat_deg, lon_deg))
    assert len(text) == 11
    read = parse_position(text)
    assert format_icao(read) == text
    assert abs(read.lat_deg - lat_deg) <= 0.5 / 60 + 1e-12
    assert abs(read.lon_deg - lon_deg) <= 0.5 / 60 + 1e-12


@pytest.mark.parametrize(("text", "lon_deg"), [("180", 180.0), ("180°", 180.0), ("0", 0.0), ("000", 0.0)])
def test_a_meridian_that_is_on_neither_side_needs_no_letter(text: str, lon_deg: float) -> None:
    assert parse_longitude(text) == lon_deg


def test_the_equator_needs_no_letter_and_180_is_no_latitude() -> None:
    assert parse_latitude("0°") == 0.0
    with pytest.raises(ParseError):
        parse_latitude("180")
