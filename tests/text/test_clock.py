"""Durations and instants."""

from __future__ import annotations

from datetime import UTC, datetime, timedelta, timezone
from typing import TYPE_CHECKING

import pytest
from hypothesis import given
from hypothesis import strategies as st

from navcore.errors import NavError, ParseError
from navcore.text.clock import (
    format_duration,
    format_instant,
    format_instant_figure,
    parse_duration,
    parse_instant,
)

if TYPE_CHECKING:
    from collections.abc import Callable

DEPARTURE = datetime(2027, 3, 4, 14, 0, tzinfo=UTC)


@pytest.mark.parametrize(
    ("text", "duration"),
    [
        ("6h", timedelta(hours=6)),
        ("1d 6h 30min", timedelta(days=1, hours=6, minutes=30)),
        ("1d6h30min", timedelta(days=1, hours=6, minutes=30)),
        ("2 days 3 hours 4 minutes", timedelta(days=2, hours=3, minutes=4)),
        ("90 min", timedelta(minutes=90)),
        ("36 h", timedelta(hours=36)),
        ("1:30", timedelta(minutes=90)),
        ("26:15", timedelta(hours=26, minutes=15)),
        ("2 d", timedelta(days=2)),
        ("0.5 h", timedelta(minutes=30)),
        ("1 h 0.5 min", timedelta(hours=1, seconds=30)),
        ("0 h", timedelta()),
        ("12 d 02 h 41 min", timedelta(days=12, hours=2, minutes=41)),
    ],
)
def test_lengths_of_time_are_read(text: str, duration: timedelta) -> None:
    assert parse_duration(text) == duration


@pytest.mark.parametrize(
    ("duration", "text"),
    [
        (timedelta(days=12, hours=2, minutes=41), "12 d 02 h 41 min"),
        (timedelta(hours=6), "6 h 00 min"),
        (timedelta(minutes=41), "0 h 41 min"),
        (timedelta(), "0 h 00 min"),
        (timedelta(minutes=59, seconds=29.9), "0 h 59 min"),
        (timedelta(minutes=59, seconds=30), "1 h 00 min"),
        (timedelta(hours=23, minutes=59, seconds=30), "1 d 00 h 00 min"),
        (timedelta(hours=-1, seconds=-29), "-1 h 00 min"),
        (timedelta(seconds=-29), "0 h 00 min"),
    ],
)
def test_lengths_of_time_are_printed_with_carry(duration: timedelta, text: str) -> None:
    assert format_duration(duration) == text


@given(st.timedeltas(timedelta(), timedelta(days=9998)))
def test_a_printed_length_of_time_is_read_within_half_a_minute(duration: timedelta) -> None:
    assert abs(parse_duration(format_duration(duration)) - duration) <= timedelta(seconds=30)


@pytest.mark.parametrize(
    ("text", "instant"),
    [
        ("2027-03-04T14:00:00Z", DEPARTURE),
        ("2027-03-04t14:00z", DEPARTURE),
        ("2027-03-04 14:00 UTC", DEPARTURE),
        (" 2027-03-04 14:00 Z ", DEPARTURE),
        ("2027-03-04T23:00+09:00", DEPARTURE),
        ("2027-03-04 23:00+09", DEPARTURE),
        ("2027-03-04 10:30-0330", DEPARTURE),
        ("2027-03-04T14:00:30.25Z", DEPARTURE + timedelta(seconds=30.25)),
        ("2028-02-29 00:00Z", datetime(2028, 2, 29, tzinfo=UTC)),
    ],
)
def test_instants_are_read_in_utc(text: str, instant: datetime) -> None:
    read = parse_instant(text)
    assert read == instant
    assert read.tzinfo is UTC


@pytest.mark.parametrize(
    ("instant", "figure"),
    [
        (DEPARTURE, "2027-03-04 14:00"),
        (DEPARTURE + timedelta(seconds=29.9), "2027-03-04 14:00"),
        (DEPARTURE + timedelta(seconds=30), "2027-03-04 14:01"),
        (datetime(2027, 12, 31, 23, 59, 30, tzinfo=UTC), "2028-01-01 00:00"),
        (datetime(2027, 3, 5, 1, 0, tzinfo=timezone(timedelta(hours=11))), "2027-03-04 14:00"),
        (datetime(9999, 12, 31, 23, 59, 59, tzinfo=UTC), "9999-12-31 23:59"),
        (datetime(1, 1, 1, tzinfo=UTC), "0001-01-01 00:00"),
    ],
)
def test_instants_are_printed_to_the_minute_with_carry(instant: datetime, figure: str) -> None:
    assert format_instant_figure(instant) == figure
    assert format_instant(instant) == f"{figure} UTC"


@given(st.datetimes(timezones=st.just(UTC)))
def test_a_printed_instant_is_read_within_a_minute(instant: datetime) -> None:
    printed = format_instant(instant)
    assert abs(parse_instant(printed) - instant) < timedelta(minutes=1)
    assert format_instant(parse_instant(printed)) == printed


@pytest.mark.parametrize(
    ("instant", "reason"),
    [
        (DEPARTURE.replace(tzinfo=None), "has no zone"),
        (datetime(1, 1, 1, tzinfo=timezone(timedelta(hours=9))), "outside the years 1 to 9999"),
    ],
)
def test_an_instant_that_has_no_utc_is_not_printed(instant: datetime, reason: str) -> None:
    with pytest.raises(NavError, match=reason):
        format_instant(instant)


@pytest.mark.parametrize(
    ("parse", "text", "span", "reason", "advice"),
    [
        (parse_duration, "6", (1, 1), "no unit", "6 h or 6 min"),
        (parse_duration, "1 h 30", (6, 6), "no unit", "30 min"),
        (parse_duration, "90 m", (3, 4), "no unit of time", "90 min or 90 h"),
        (parse_duration, "2 weeks", (2, 7), "no unit of time", "1d 6h 30min"),
        (parse_duration, "1:75", (2, 4), "75 minutes", "1:30"),
        (parse_duration, "1.5 h 30 min", (0, 3), "fraction", "1d 6h 30min"),
        (parse_duration, "30 min 1 h", (9, 10), "stands after", "days, then hours, then minutes"),
        (parse_duration, "1 h 1 h", (6, 7), "stands after", "each once"),
        (parse_duration, "1 h 90 min", (4, 6), "over 59", "carry"),
        (parse_duration, "1 d 24 h", (4, 6), "over 23", "carry"),
        (parse_duration, "-1 h", (0, 1), "no place", "1d 6h 30min"),
        (parse_duration, "1,5 h", (1, 1), "no unit", "h"),
        (parse_duration, "10000 d", (0, 7), "over 9999 days", "1d 6h 30min"),
        (parse_duration, "9" * 900 + " d", (0, 902), "over 9999 days", "1d 6h 30min"),
        (parse_duration, "", (0, 0), "missing", "1d 6h 30min"),
        (parse_instant, "2027-03-04 14:00", (16, 16), "zone is missing", "add Z for UTC: 2027-03-04 14:00Z"),
        (parse_instant, "2027-03-04", (10, 10), "time of day is missing", "2027-03-04 14:00Z"),
        (parse_instant, "2027-02-30 10:00Z", (0, 10), "there is no 2027-02-30", "a day that the month has"),
        (parse_instant, "0000-01-01 10:00Z", (0, 10), "there is no 0000-01-01", "a day"),
        (parse_instant, "2027-13-01 10:00Z", (5, 7), "month is 13", "2027-03-04 14:00Z"),
        (parse_instant, "2027-03-04 24:00Z", (11, 13), "hour is 24", "2027-03-04 14:00Z"),
        (parse_instant, "2027-03-04 23:59:60Z", (17, 19), "second is 60", "2027-03-04 14:00Z"),
        (parse_instant, "2027-03-04 14:00+15:00", (16, 22), "no zone's offset", "+09:00"),
        (parse_instant, "2027-03-04 14:00+09:60", (16, 22), "no zone's offset", "+09:00"),
        (parse_instant, "0001-01-01 00:00+09:00", (0, 22), "outside the years", "2027-03-04 14:00Z"),
        (parse_instant, "9999-12-31 23:59-09:00", (0, 22), "outside the years", "2027-03-04 14:00Z"),
        (parse_instant, "4 March 2027", (0, 12), "no date and time in figures", "2027-03-04 14:00Z"),
        (parse_instant, "٢٠٢٧-03-04 14:00Z", (0, 17), "no date and time in figures", "2027-03-04 14:00Z"),
        (parse_instant, "", (0, 0), "missing", "2027-03-04 14:00Z"),
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
