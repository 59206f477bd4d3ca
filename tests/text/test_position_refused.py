"""Every refusal of a position: what it points at, what it says, and that what it advises is read."""

from __future__ import annotations

import re
from typing import TYPE_CHECKING

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from navcore.errors import ParseError
from navcore.text.position import parse_latitude, parse_longitude, parse_position

if TYPE_CHECKING:
    from collections.abc import Callable

# What was typed with the wrong part in ⟦⟧, a word of the reason, and a text of the advice.
REFUSED = [
    # half-degree codes and letters first
    ("⟦5050N⟧", "half-degree code", "50N050W"),
    ("⟦5050E⟧", "half-degree code", "50N050E"),
    ("⟦5050S⟧", "half-degree code", "50S050E"),
    ("⟦5050W⟧", "half-degree code", "50S050W"),
    ("⟦50N50⟧", "half-degree code", "50N150W"),
    ("⟦N5050⟧", "half-degree code", "in full"),
    ("⟦H5050⟧", "half-degree code", "in full"),
    ("  ⟦n5050⟧ ", "half-degree code", "in full"),
    ("⟦N60W010⟧", "letter after its figures", "60N010W"),
    ("⟦n6030w01015⟧", "letter after", "6030N01015W"),
    ("⟦N6030⟧ W01015", "letter after", "6030N"),
    # letters missing
    ("⟦48 23.5 4 29⟧", "no letter", "48 23.5N 4 29E, with N or S and E or W as is meant"),
    ("⟦48°23.5' 4°29'⟧", "no letter", "48°23.5'N 4°29'E"),
    ("⟦48 23.5⟧", "no letter", "48, 23.5"),
    ("⟦-48 23.5⟧", "no letter", "-48, 23.5"),
    ("⟦48 23⟧", "no letter", "48N 23E"),
    ("⟦-45 0⟧", "no letter", "45S 0E"),
    ("⟦45°10' -4°29'⟧", "no letter", "45°10'N 4°29'W"),
    ("⟦1e-07⟧, 0", "exponent", "0.0000001"),
    ("-⟦1.5E-3⟧ +0", "exponent", "0.0015"),
    ("⟦48.3917-4.4833⟧", "no letter", "48.3917, -4.4833"),
    ("⟦48⟧", "no letter", "48°23.5'N 004°29.0'W"),
    ("⟦-⟧", "no letter", "48°23.5'N 004°29.0'W"),
    ("48°23.5'N 004°29.0'⟦⟧", "longitude has no letter", "48°23.5'N 004°29.0'E or 48°23.5'N 004°29.0'W"),
    ("48°23.5'⟦⟧ 004°29.0'W", "latitude has no letter", "48°23.5'N 004°29.0'W or 48°23.5'S 004°29.0'W"),
    ("48°23.5'⟦⟧, 004°29.0'W", "latitude has no letter", "48°23.5'N, 004°29.0'W or 48°23.5'S, 004°29.0'W"),
    ("48°23.5'⟦⟧ W004°29.0'", "latitude has no letter", "48°23.5'N W004°29.0'"),
    ("N48 23.5 4 29⟦⟧", "longitude has no letter", "N48 23.5 4 29E"),
    ("48°23.5'N⟦⟧", "longitude is missing", "48°23.5'N 004°29.0'W"),
    ("N48⟦⟧", "longitude is missing", "N48 004°29.0'W"),
    ("⟦⟧4°W", "latitude is missing", "48°23.5'N 4°W"),
    ("⟦⟧W004", "latitude is missing", "48°23.5'N W004"),
    # letters doubled, strange, among the figures, or with a sign
    ("48N⟦N⟧ 4W", "more than one letter", "48N 4W"),
    ("N48⟦N⟧ W4", "more than one letter", "N48 W4"),
    ("48N 4W⟦W⟧", "more than one letter", "48N 4W"),
    ("48N⟦N⟧", "more than one letter", "48°23.5'N 004°29.0'W"),
    ("48N 4⟦N⟧", "letter of latitude a second time", "48N 4E or 48N 4W"),
    ("48W 4⟦E⟧", "letter of longitude a second time", "48W 4N or 48W 4S"),
    ("48N 4⟦O⟧", "no hemisphere letter", "W for west"),
    ("48N 4⟦OUEST⟧", "no hemisphere letter", "N, S, E or W alone"),
    ("⟦north⟧ 48", "no hemisphere letter", "N, S, E or W alone"),
    ("⟦S 36 175 E⟧", "whose", "both behind"),
    ("⟦N48 4W 5⟧", "whose", "both behind"),
    ("48N 4W⟦ 5⟧", "figures follow", "one longitude"),
    ("⟦-⟧36.0S 175E", "both a sign and a letter", "36.0S"),
    ("36S ⟦-⟧175E", "both a sign and a letter", "175E"),
    ("⟦N⟧ W4", "no figures", "48°23.5'N"),
    # out of range
    ("48°⟦60⟧'N 4W", "minutes of latitude are 60", "49°00'N"),
    ("48N 4°⟦75.5⟧'W", "minutes of longitude are 75.5", "05°15.5'W"),
    ("48°23'⟦75⟧\"N 4W", "seconds of latitude are 75", "48°24'15\"N"),
    ("90°⟦60⟧'N 4W", "minutes of latitude", "48°23.5'N"),
    ("48⟦75⟧N00400W", "minutes of latitude are 75", "49°15'N"),
    ("4830⟦61⟧N0040000W", "seconds of latitude are 61", "48°31'01\"N"),
    ("+48⟦75⟧-00400/", "minutes of latitude are 75", "49°15'N"),
    ("⟦91⟧N 4W", "over 90°", "0 to 90°"),
    ("⟦90°00.1⟧'N 4W", "over 90°", "0 to 90°"),
    ("48N ⟦181⟧E", "over 180°", "0 to 180°"),
    ("⟦123⟧N 4W", "over 90°", "a longitude comes second"),
    ("⟦95.5⟧, 99.5", "over 90°", "0 to 90°"),
    ("45.5, -⟦180.5⟧", "over 180°", "0 to 180°"),
    ("+⟦91⟧-004/", "over 90°", "0 to 90°"),
    # swapped
    ("⟦004°29.0'W 48°23.5'N⟧", "swapped", "48°23.5'N 004°29.0'W"),
    ("⟦W004, N48⟧", "swapped", "N48 W004"),
    ("⟦175.2, -36.0⟧", "swapped", "-36.0, 175.2"),
    # fractions
    ("⟦48,5⟧N 4,5W", "comma", "48.5N 4.5W"),
    ("48°⟦23,5⟧'N 4W", "comma", "48°23.5'N 4W"),
    ("⟦48,5⟧ 4,5", "comma", "48.5 4.5"),
    ("⟦48,5⟧", "comma", "48.5 for a fraction, or a space after the comma: 48, 5"),
    ("48N,⟦,⟧ 4W", "no place", "004°29.0'W"),
    ("⟦48.5⟧°23'N 4W", "have a fraction and minutes follow", "48°23'N or 48.5°N"),
    ("48°⟦23.5⟧'30\"N 4W", "have a fraction and seconds follow", "48°23'30\"N or 48°23.5'N"),
    ("48⟦.⟧N 4W", "point", "48°23.5'N"),
    ("⟦.⟧5N 4W", "point", "48°23.5'N"),
    ("48.5⟦.⟧3N 4W", "point", "48°23.5'N"),
    # figures in one word
    ("⟦4620N078W⟧", "a figure may be lost", "4620N07800W"),
    ("⟦46N07805W⟧", "a figure may be lost", "4600N07805W"),
    ("4829N ⟦4829⟧W", "can't be divided", "04829W"),
    ("⟦48293⟧N 004W", "can't be divided", "048293N"),
    ("⟦123456789⟧N 4W", "too many figures", "48°23.5'N"),
    # marks and characters
    ("48⟦'⟧23N 4W", "degrees of latitude are marked °", "48°23.5'N"),
    ('48°23⟦"⟧N 4W', "minutes of latitude are marked '", "48°23.5'N"),
    ("48⟦-⟧N 4W", "no place", "48°23.5'N"),
    ("48 4 N 5 6 7 ⟦8⟧ W", "after its seconds", "004°29.0'W"),
    ("⟦٤⟧٨N 4W", "figures 0 to 9", "48°23.5'N"),
    ("48N⟦/⟧4W", "no place", "48°23.5'N"),
    ("48N 4W⟦\x1b⟧", "“␛” has no place", "48°23.5'N"),
    ("48N 4W⟦\u202e⟧", "“‹U+202E›” has no place", "48°23.5'N"),
    # ISO 6709
    ("-36-⟦30⟧", "3, 5 or 7 figures", "+48.5-004.5/"),
    ("+⟦8⟧-004/", "2, 4 or 6 figures", "+48.5-004.5/"),
    ("+48.5-004.5⟦+15⟧/", "height", "+48.5-004.5/"),
    ("+48.5-004.5+15⟦CRSEPSG_4979⟧/", "EPSG_4979 is not WGS_84", "WGS 84"),
    # nothing, or too much
    ("⟦⟧", "missing", "48°23.5'N 004°29.0'W"),
    ("⟦  ⟧", "missing", "48°23.5'N 004°29.0'W"),
]


def refusal(marked: str) -> tuple[str, tuple[int, int]]:
    """Return the text and the span that the marks stand for."""
    start, end = marked.index("⟦"), marked.index("⟧") - 1
    return marked.replace("⟦", "").replace("⟧", ""), (start, end)


@pytest.mark.parametrize(("marked", "reason", "advice"), REFUSED)
def test_a_refusal_points_at_the_wrong_part_and_says_what_to_type(marked: str, reason: str, advice: str) -> None:
    text, span = refusal(marked)
    with pytest.raises(ParseError) as caught:
        parse_position(text)
    assert caught.value.text == text
    assert (caught.value.start, caught.value.end) == span
    assert reason in caught.value.reason
    assert advice in caught.value.advice


@pytest.mark.parametrize(
    "text",
    ["5050N", "50N50", "N60W010", "48NN 4W", "4W 48N", "175.2, -36.0", "48,5N 4,5W", "4620N078W", "48,5 -4,5"],
)
def test_where_one_text_is_advised_it_is_read(text: str) -> None:
    with pytest.raises(ParseError) as caught:
        parse_position(text)
    advised = re.sub(r"^type (the position in full: |latitude first: )?| if .*$", "", caught.value.advice)
    assert parse_position(advised)


@pytest.mark.parametrize(
    ("marked", "reason", "advice"),
    [
        ("50⟦⟧", "latitude has no letter", "50N or 50S"),
        ("48 23.5⟦⟧", "latitude has no letter", "48 23.5N or 48 23.5S"),
        ("50⟦E⟧", "no letter of latitude", "N or S"),
        ("50N 4⟦W⟧", "one latitude", "48°23.5'N"),
        ("50N⟦N⟧", "one letter", "48°23.5'N"),
        ("5⟦N⟧0", "among its figures", "48°23.5'N"),
        ("⟦-⟧50S", "both a sign and a letter", "50S"),
        ("⟦N5050⟧", "half-degree", "5050N"),
        ("⟦91⟧N", "over 90°", "0 to 90°"),
        ("-⟦91⟧", "over 90°", "0 to 90°"),
        ("⟦48,5⟧N", "comma", "48.5N"),
        ("⟦⟧", "latitude is missing", "48°23.5'N"),
    ],
)
def test_a_latitude_alone_is_refused_with_its_span(marked: str, reason: str, advice: str) -> None:
    text, span = refusal(marked)
    with pytest.raises(ParseError) as caught:
        parse_latitude(text)
    assert (caught.value.start, caught.value.end) == span
    assert reason in caught.value.reason
    assert advice in caught.value.advice


@pytest.mark.parametrize(("text", "reason"), [("160", "no letter"), ("181W", "over 180°"), ("48N", "no letter of")])
def test_a_longitude_alone_is_refused(text: str, reason: str) -> None:
    with pytest.raises(ParseError, match=reason):
        parse_longitude(text)


@pytest.mark.parametrize(
    "junk",
    [
        "9" * 1_000_000,
        "48 " * 400_000,
        "+" * 1_000_000,
        " " * 1_000_000,
        "1 " * 499,
        "9" * 1000,
        " " * 999 + "x",
        "48" + " " * 990 + "x",
        "48°" + "9" * 900 + "'N 4W",
        "+4" + "8" * 900 + "-004/",
        "0." + "9" * 900 + "N 4X",
    ],
)
def test_junk_of_any_length_is_refused(junk: str) -> None:
    with pytest.raises(ParseError) as caught:
        parse_position(junk)
    assert 0 <= caught.value.start <= caught.value.end <= len(junk)


PIECES = st.lists(
    st.sampled_from([*"0123456789NSEWnsew°'\"-+.,:/ ", "48", "23.5", "004", "′", "−", "CRS", "WGS_84", "X", "٤", "\n"]),
    max_size=14,
)


def refused_inside(parse: Callable[[str], object], text: str) -> bool:
    """Say whether a text is read, or refused with a span inside it and words."""
    try:
        parse(text)
    except ParseError as error:
        is_inside = 0 <= error.start <= error.end <= len(text)
        return is_inside and error.text == text and bool(error.reason) and bool(error.advice)
    return True


@settings(max_examples=500, deadline=None)
@given(PIECES)
def test_anything_is_read_or_refused_with_a_span_inside_it(pieces: list[str]) -> None:
    text = "".join(pieces)
    assert refused_inside(parse_position, text)
    assert refused_inside(parse_latitude, text)
    assert refused_inside(parse_longitude, text)


@settings(max_examples=300, deadline=None)
@given(st.text(max_size=30))
def test_any_text_at_all_is_answered(text: str) -> None:
    try:
        lat_deg, lon_deg = parse_position(text)
    except ParseError:
        return
    assert -90.0 <= lat_deg <= 90.0
    assert -180.0 <= lon_deg <= 180.0
