"""The values of a plan file: what TOML gives to what the plan holds, and back. Each read_x stands beside its write_x.

A value that can't be taken raises ParseError; its span points into the text only where the value was one.
A write_x gives the TOML text that reads back as the very same value.
"""

from __future__ import annotations

import math
import re
from datetime import UTC, date, datetime, time, timedelta
from typing import TYPE_CHECKING

from navcore.earth.figure import Figure, figure_named
from navcore.errors import ParseError
from navcore.files.planfile_keys import VERSION
from navcore.files.toml_syntax import shorten
from navcore.plan.model import Line, Trade
from navcore.sailings.parts import format_parts, parse_parts
from navcore.text.clock import parse_duration, parse_instant
from navcore.text.coordinate import LATITUDE, write_coordinate
from navcore.text.number import write_number
from navcore.text.position import parse_latitude, parse_position, write_position

if TYPE_CHECKING:
    from navcore.position import Position
    from navcore.sailings.parts import Parts

_BARE_KEY = re.compile(r"[A-Za-z0-9_-]+")
_ESCAPES = {"\b": "\\b", "\t": "\\t", "\n": "\\n", "\f": "\\f", "\r": "\\r", '"': '\\"', "\\": "\\\\"}
_NEEDS_ESCAPE = re.compile(r'[\x00-\x1f"\\\x7f-\x9f\u2028\u2029\ud800-\udfff]')


def found(value: object) -> str:
    """Return what a value of TOML is, in words."""
    if isinstance(value, str):
        return f'the text "{shorten(value)}"'
    if isinstance(value, bool):
        return "true" if value else "false"
    if isinstance(value, list):
        return "a list"
    if isinstance(value, dict):
        return "a table"
    if isinstance(value, datetime | date | time):
        return f"the date or time {value.isoformat()}"
    return shorten(str(value))


def _refuse(value: object, advice: str) -> ParseError:
    return ParseError("", (0, 0), f"{found(value)} stands there", advice)


def read_text(value: object) -> str:
    """Return a text."""
    if isinstance(value, str):
        return value
    if isinstance(value, int | float) and not isinstance(value, bool):
        raise _refuse(value, f'put it in double quotes: "{value}"')
    raise _refuse(value, "put the text in double quotes")


def write_text(text: str) -> str:
    """Return a text in double quotes; what no text file can hold (half a surrogate pair) becomes U+FFFD."""
    return f'"{_NEEDS_ESCAPE.sub(_escape, text)}"'


def _escape(match: re.Match[str]) -> str:
    character = match[0]
    if "\ud800" <= character <= "\udfff":
        return "\ufffd"
    return _ESCAPES.get(character) or f"\\u{ord(character):04x}"


def write_key(key: str) -> str:
    """Return a key as it is written: in quotes only where it must be."""
    return key if _BARE_KEY.fullmatch(key) else write_text(key)


def read_number(value: object) -> float:
    """Return a finite number."""
    if isinstance(value, str):
        try:
            float(value)
        except ValueError:
            raise _refuse(value, "type a number without quotes") from None
        raise _refuse(value, f"remove the quotes: {value.strip()}")
    if isinstance(value, bool) or not isinstance(value, int | float):
        raise _refuse(value, "type a number")
    try:
        number = float(value)
    except OverflowError:
        number = math.inf
    if not math.isfinite(number):
        raise _refuse(value, "type a finite number")
    return number


def read_positive(value: object) -> float:
    """Return a number above 0."""
    number = read_number(value)
    if number <= 0.0:
        raise _refuse(value, "type a number above 0, or take the line out")
    return number


def read_not_negative(value: object) -> float:
    """Return a number of 0 or more."""
    number = read_number(value)
    if number < 0.0:
        raise _refuse(value, "type it without the minus")
    return number


def write_float(value: float) -> str:
    """Return a number with a point, such as 12.0."""
    written = write_number(value)
    return written if "." in written else f"{written}.0"


def _read_whole(value: object) -> int:
    number = read_number(value)
    if not number.is_integer():
        raise _refuse(value, f"type a whole number: {math.floor(number)} or {math.ceil(number)}")
    return value if isinstance(value, int) else int(number)


def read_version(value: object) -> int:
    """Return the version of the plan file's form."""
    version = _read_whole(value)
    if version != VERSION:
        newer = "a newer legbook wrote this file; open it there" if version > VERSION else f"type {VERSION}"
        raise _refuse(value, newer)
    return version


def read_revision(value: object) -> int:
    """Return a revision's number."""
    revision = _read_whole(value)
    if revision < 1:
        raise _refuse(value, "type 1 for the first")
    return revision


def read_trade(value: object) -> Trade:
    """Return whose words the plan follows."""
    name = read_text(value)
    if name not in set(Trade):
        raise _refuse(value, 'type "marine" or "aviation"')
    return Trade(name)


def read_line(value: object) -> Line:
    """Return how a leg is sailed."""
    name = read_text(value)
    if name not in set(Line):
        raise _refuse(value, 'type "rhumb line", "great circle" or "composite"')
    return Line(name)


def read_figure(value: object) -> Figure:
    """Return a figure of the Earth by its name."""
    return figure_named(read_text(value))


def read_departure(value: object) -> datetime:
    """Return a time in UTC."""
    if isinstance(value, str):
        return parse_instant(value)
    if not isinstance(value, datetime):
        if isinstance(value, date):
            raise _refuse(value, f"add the time and Z for UTC: {value.isoformat()}T14:00:00Z")
        raise _refuse(value, "type date and time like 2027-03-04T14:00:00Z")
    if value.tzinfo is None:
        raise _refuse(value, f"add Z for UTC: {value.isoformat()}Z")
    try:
        return value.astimezone(UTC)
    except OverflowError:
        raise _refuse(value, "type a date that the voyage can have") from None


def write_departure(departure: datetime) -> str:
    """Return a time in UTC as TOML writes it."""
    return departure.astimezone(UTC).isoformat().replace("+00:00", "Z")


def read_columns(value: object) -> tuple[str, ...]:
    """Return the names of the officer's own columns."""
    if isinstance(value, str):
        raise _refuse(value, f"put it in brackets: [{write_text(shorten(value))}]")
    if not isinstance(value, list):
        raise _refuse(value, 'type a list: ["charts", "fixing"]')
    columns = tuple(read_text(item) for item in value)
    if len(set(columns)) != len(columns):
        twice = next(column for column in columns if columns.count(column) > 1)
        raise _refuse(value, f"take one {write_text(shorten(twice))} out: each column stands once")
    return columns


def write_columns(columns: tuple[str, ...]) -> str:
    """Return names of columns as a list."""
    return f"[{', '.join(map(write_text, columns))}]"


def read_position(value: object) -> Position:
    """Return a position."""
    return parse_position(read_text(value))


def write_position_text(position: Position) -> str:
    """Return a position in double quotes."""
    return write_text(write_position(position))


def read_limit(value: object) -> float:
    """Return a limiting latitude in degrees, north positive."""
    if isinstance(value, int | float) and not isinstance(value, bool):
        shown = abs(value)
        raise _refuse(value, f'type it with its letter, in double quotes: "{shown}°N" or "{shown}°S"')
    return parse_latitude(read_text(value))


def write_limit(limit_deg: float) -> str:
    """Return a limiting latitude in double quotes; whole degrees as an officer writes them, such as 50°N."""
    if limit_deg.is_integer():
        return write_text(f"{abs(limit_deg):.0f}°{'S' if limit_deg < 0.0 else 'N'}")
    return write_text(write_coordinate(limit_deg, LATITUDE))


def read_parts(value: object) -> Parts:
    """Return how a leg is split."""
    if isinstance(value, int | float) and not isinstance(value, bool):
        raise _refuse(value, f'say what it counts, in double quotes: "{value} parts" or "{value}° longitude"')
    return parse_parts(read_text(value))


def write_parts(parts: Parts) -> str:
    """Return how a leg is split, in double quotes."""
    return write_text(format_parts(parts))


def read_stay(value: object) -> timedelta:
    """Return a time of 0 or more."""
    if isinstance(value, int | float) and not isinstance(value, bool):
        raise _refuse(value, f'type it with its unit, in double quotes: "{value}h"')
    return parse_duration(read_text(value))


def write_stay(stay: timedelta) -> str:
    """Return a time to the microsecond in double quotes, such as "1d 6h 30min"."""
    hours, minutes = divmod(stay - timedelta(days=stay.days), timedelta(hours=1))
    # 9 decimals of a minute tell microseconds apart.
    decimal_minutes = f"{minutes / timedelta(minutes=1):.9f}".rstrip("0").rstrip(".")
    amounts = ((str(stay.days), "d"), (str(hours), "h"), (decimal_minutes, "min"))
    return write_text(" ".join(figures + unit for figures, unit in amounts if figures != "0") or "0min")
