"""Durations and instants: to the minute when printed, in UTC, in English words whatever the locale."""

from __future__ import annotations

import re
from datetime import UTC, datetime, timedelta

from navcore.errors import NavError, ParseError
from navcore.text.number import exact
from navcore.text.plain import visible
from navcore.text.scan import plain

INSTANT_UNIT = "UTC"

_MINUTE = timedelta(minutes=1)
_MOST_DAYS = 9999
_MOST_OFFSET = timedelta(hours=14)

_UNIT_WORDS = {
    **dict.fromkeys(("d", "day", "days"), "d"),
    **dict.fromkeys(("h", "hr", "hrs", "hour", "hours"), "h"),
    **dict.fromkeys(("min", "mins", "minute", "minutes"), "min"),
}
_MICROSECONDS = {"d": 86_400_000_000, "h": 3_600_000_000, "min": 60_000_000}
_UNDER = {"h": 24, "min": 60}
_PIECE = re.compile(r" *(?P<figures>\d+(?:\.\d+)?) *(?P<unit>[A-Za-z]*) *", re.ASCII)
_CLOCK = re.compile(r"(?P<hours>\d{1,5}):(?P<minutes>\d{2})", re.ASCII)
_DURATION_ADVICE = "type days, hours and minutes, such as 1d 6h 30min, 90 min or 1:30"

_INSTANT = re.compile(
    r"(?P<year>\d{4})-(?P<month>\d{2})-(?P<day>\d{2})(?:[Tt]| +)(?P<hour>\d{2}):(?P<minute>\d{2})"
    r"(?::(?P<second>\d{2})(?:\.(?P<fraction>\d{1,9}))?)? *"
    r"(?P<zone>[Zz]|UTC|utc|(?P<sign>[+-])(?P<zone_hour>\d{2}):?(?P<zone_minute>\d{2})?)?",
    re.ASCII,
)
_DATE = re.compile(r"\d{4}-\d{2}-\d{2}", re.ASCII)
_INSTANT_ADVICE = "type date, time and zone, such as 2027-03-04 14:00Z"
_HIGHEST = {"month": 12, "day": 31, "hour": 23, "minute": 59, "second": 59}


def parse_duration(text: str) -> timedelta:
    """Return a length of time, 0 or more: 6h, 1d 6h 30min, 90 min, 0.5 h, 1:30 (hours and minutes).

    Raises:
        ParseError: Anything else, a bare number among it: its unit is not guessed.
    """
    typed = plain(text, "the length of time", _DURATION_ADVICE)
    start, end = len(typed) - len(typed.lstrip()), len(typed.rstrip())
    if match := _CLOCK.fullmatch(typed, start, end):
        if int(match["minutes"]) >= 60:
            reason = f"{match['minutes']} minutes after the hours are over 59"
            raise ParseError(text, match.span("minutes"), reason, _DURATION_ADVICE)
        minutes = int(match["hours"]) * 60 + int(match["minutes"])
        return _limited(text, (start, end), minutes * _MICROSECONDS["min"])
    pieces: list[re.Match[str]] = []
    at = start
    while at < end:
        piece = _PIECE.match(typed, at, end)
        if piece is None:
            reason = f"“{visible(typed[at])}” has no place in a length of time"
            raise ParseError(text, (at, at + 1), reason, _DURATION_ADVICE)
        _refuse_piece(text, piece, pieces)
        pieces.append(piece)
        at = piece.end()
    microseconds = sum(_microseconds(piece) for piece in pieces)
    return _limited(text, (start, end), microseconds)


def _refuse_piece(text: str, piece: re.Match[str], before: list[re.Match[str]]) -> None:
    """Raise where a piece has no unit, or does not go with the one before it."""
    figures, word = piece["figures"], piece["unit"]
    if not word:
        at = piece.end("figures")
        raise ParseError(text, (at, at), f"{figures} has no unit", f"type {figures} h or {figures} min")
    unit = _UNIT_WORDS.get(word.lower())
    if unit is None:
        advice = f"type {figures} min or {figures} h" if word in {"m", "M"} else _DURATION_ADVICE
        raise ParseError(text, piece.span("unit"), f"“{word}” is no unit of time that is read here", advice)
    if not before:
        return
    last = before[-1]
    if "." in last["figures"]:
        reason = f"{last['figures']} has a fraction and more follows"
        raise ParseError(text, last.span("figures"), reason, _DURATION_ADVICE)
    if _MICROSECONDS[unit] >= _MICROSECONDS[_UNIT_WORDS[last["unit"].lower()]]:
        reason = f"“{word}” stands after “{last['unit']}”"
        raise ParseError(text, piece.span("unit"), reason, "type days, then hours, then minutes, each once")
    if float(figures) >= _UNDER[unit]:
        reason = f"{figures} {unit} after {last['figures']} {last['unit']} is over {_UNDER[unit] - 1}"
        raise ParseError(text, piece.span("figures"), reason, "carry it into the unit before it")


def _microseconds(piece: re.Match[str]) -> int:
    top, bottom = exact(piece["figures"])
    return (2 * top * _MICROSECONDS[_UNIT_WORDS[piece["unit"].lower()]] + bottom) // (2 * bottom)


def _limited(text: str, span: tuple[int, int], microseconds: int) -> timedelta:
    if microseconds > _MOST_DAYS * _MICROSECONDS["d"]:
        raise ParseError(text, span, f"that is over {_MOST_DAYS} days", _DURATION_ADVICE)
    return timedelta(microseconds=microseconds)


def format_duration(duration: timedelta) -> str:
    """Return a length of time to the nearest minute: 12 d 02 h 41 min, or 6 h 00 min below a day."""
    minutes = (2 * abs(duration) + _MINUTE) // (2 * _MINUTE)
    sign = "-" if minutes and duration < timedelta() else ""
    days, minutes = divmod(minutes, 24 * 60)
    hours, minutes = divmod(minutes, 60)
    long_form = f"{days} d {hours:02d} h {minutes:02d} min"
    return sign + (long_form if days else f"{hours} h {minutes:02d} min")


def parse_instant(text: str) -> datetime:
    """Return an instant in UTC: 2027-03-04T14:00Z, 2027-03-04 14:00 UTC, 2027-03-04 14:00:30+09:00.

    Raises:
        ParseError: Anything else, a time without its zone among it; also an instant outside the years 1 to 9999.
    """
    typed = plain(text, "the date and time", _INSTANT_ADVICE)
    start, end = len(typed) - len(typed.lstrip()), len(typed.rstrip())
    match = _INSTANT.fullmatch(typed, start, end)
    if match is None:
        if date := _DATE.fullmatch(typed, start, end):
            raise ParseError(text, (end, end), "the time of day is missing", f"type it too, such as {date[0]} 14:00Z")
        raise ParseError(text, (start, end), "that is no date and time in figures", _INSTANT_ADVICE)
    if match["zone"] is None:
        advice = f"add Z for UTC: {match[0].rstrip()}Z; or the zone's offset, such as +09:00"
        raise ParseError(text, (end, end), "the zone is missing, and none is guessed", advice)
    for part, most in _HIGHEST.items():
        least = 1 if part in {"month", "day"} else 0
        if not least <= int(match[part] or 0) <= most:
            reason = f"the {part} is {match[part]}, but runs from {least:02d} to {most}"
            raise ParseError(text, match.span(part), reason, _INSTANT_ADVICE)
    return _instant(text, match)


def _instant(text: str, match: re.Match[str]) -> datetime:
    offset = timedelta(hours=int(match["zone_hour"] or 0), minutes=int(match["zone_minute"] or 0))
    if offset > _MOST_OFFSET or int(match["zone_minute"] or 0) >= 60:
        reason = f"{match['zone']} is no zone's offset: they run to 14 hours"
        raise ParseError(text, match.span("zone"), reason, "type Z for UTC, or an offset such as +09:00")
    local = [int(match[part] or 0) for part in ("year", "month", "day", "hour", "minute", "second")]
    year, month, day, hour, minute, second = local
    microsecond = int((match["fraction"] or "").ljust(6, "0")[:6])
    try:
        clock = datetime(year, month, day, hour, minute, second, microsecond, tzinfo=UTC)
    except ValueError as error:
        reason = f"there is no {match['year']}-{match['month']}-{match['day']}"
        raise ParseError(text, (match.start(), match.end("day")), reason, "type a day that the month has") from error
    try:
        return clock + offset if match["sign"] == "-" else clock - offset
    except OverflowError as error:
        reason = "that instant lies outside the years 1 to 9999 in UTC"
        raise ParseError(text, match.span(), reason, _INSTANT_ADVICE) from error


def format_instant(instant: datetime) -> str:
    """Return an instant to the nearest minute with its zone, such as 2027-03-04 14:00 UTC.

    Args:
        instant: With its zone; printed in UTC. The last half minute of the year 9999 is printed as its last minute.

    Raises:
        NavError: The instant has no zone, or lies outside the years 1 to 9999 in UTC.
    """
    return f"{format_instant_figure(instant)} {INSTANT_UNIT}"


def format_instant_figure(instant: datetime) -> str:
    """Return an instant as format_instant does, without UTC: for a column that has it in its heading."""
    minute = _nearest_minute(instant)
    return minute.isoformat(" ", "minutes").removesuffix("+00:00")


def _nearest_minute(instant: datetime) -> datetime:
    if instant.utcoffset() is None:
        message = f"instant {instant.isoformat()} has no zone; allowed: an instant with its zone; give it UTC"
        raise NavError(message)
    try:
        whole = instant.astimezone(UTC).replace(second=0, microsecond=0)
    except OverflowError as error:
        message = f"instant {instant.isoformat()} lies outside the years 1 to 9999 in UTC; give one inside them"
        raise NavError(message) from error
    if instant.second < 30 or whole == datetime.max.replace(second=0, microsecond=0, tzinfo=UTC):
        return whole
    return whole + _MINUTE
