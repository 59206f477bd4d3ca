"""Distances and speeds, and a course with the distance run on it.

`format_x` prints the unit; `format_x_figure` prints the same figure without it, for a column that has the unit in its
heading.
"""

from __future__ import annotations

from navcore.errors import ParseError
from navcore.text.direction import parse_direction
from navcore.text.number import format_number
from navcore.text.quantity import read_quantity
from navcore.text.scan import plain, read_within

DISTANCE_UNIT = "NM"
MARINE_SPEED_UNIT = "kn"
AVIATION_SPEED_UNIT = "kt"
PERCENT_UNIT = "%"
METRES_UNIT = "m"

# Worth in nautical miles, as fractions so that a value is rounded once: 1852 m, a cable is a tenth of that, 0.3048 m.
_DISTANCES = {
    **dict.fromkeys(("", "nm", "nmi"), (1, 1)),
    **dict.fromkeys(("cable", "cables"), (1, 10)),
    "km": (1000, 1852),
    "m": (1, 1852),
    "ft": (3048, 18_520_000),
}
_SPEEDS = {
    **dict.fromkeys(("", "kn", "kt", "kts", "knot", "knots"), (1, 1)),
    "km/h": (1000, 1852),
    "m/s": (3600, 1852),
}
_DISTANCE_ADVICE = "type nautical miles, such as 12.5 NM, or a number with cables, km, m or ft"
_SPEED_ADVICE = "type knots, such as 13.5 kn, or a number with km/h or m/s"
_RUN_ADVICE = "type a course and a distance, such as 263.7/300"


def parse_distance(text: str) -> float:
    """Return a distance in nautical miles: 300, 12.5 NM, 5 cables, 10 km, 5000 m or 600 ft; 0 or more.

    Raises:
        ParseError: Anything else, M among it: it may be miles or metres.
    """
    return read_quantity(text, "the distance", _DISTANCES, _DISTANCE_ADVICE)


def parse_speed(text: str) -> float:
    """Return a speed in knots: 13.5, 13.5 kn, 480 kt, 25 km/h or 10 m/s; 0 or more.

    Raises:
        ParseError: Anything else.
    """
    return read_quantity(text, "the speed", _SPEEDS, _SPEED_ADVICE)


def parse_run(text: str) -> tuple[float, float]:
    """Return course_deg in [0, 360) and distance_nmi of COURSE/DISTANCE, such as 263.7/300 or 090°T/12.5 NM.

    Raises:
        ParseError: Pointing at the course or the distance.
    """
    typed = plain(text, "the course and distance", _RUN_ADVICE)
    slash = typed.find("/")
    if slash < 0:
        end = len(typed.rstrip())
        raise ParseError(text, (end, end), "there is no / between course and distance", _RUN_ADVICE)
    course_deg = read_within(text, (0, slash), parse_direction)
    return course_deg, read_within(text, (slash + 1, len(text)), parse_distance)


def format_distance(distance_nmi: float, decimals: int = 1) -> str:
    """Return a distance with its unit, such as 3924.2 NM."""
    return f"{format_distance_figure(distance_nmi, decimals)} {DISTANCE_UNIT}"


def format_distance_figure(distance_nmi: float, decimals: int = 1) -> str:
    """Return a distance without its unit, such as 3924.2."""
    return format_number(distance_nmi, decimals)


def format_speed(speed_kn: float, unit: str = MARINE_SPEED_UNIT, decimals: int = 1) -> str:
    """Return a speed with the trade's word for knots, such as 13.5 kn or 480.0 kt."""
    return f"{format_speed_figure(speed_kn, decimals)} {unit}"


def format_speed_figure(speed_kn: float, decimals: int = 1) -> str:
    """Return a speed without its unit, such as 13.5."""
    return format_number(speed_kn, decimals)


def format_percent(value_percent: float, decimals: int = 1) -> str:
    """Return a percentage with its sign, such as 6.0 %."""
    return f"{format_percent_figure(value_percent, decimals)} {PERCENT_UNIT}"


def format_percent_figure(value_percent: float, decimals: int = 1) -> str:
    """Return a percentage without its sign, such as 6.0."""
    return format_number(value_percent, decimals)


def format_metres_figure(value_m: float, decimals: int = 1) -> str:
    """Return a depth, draught or height in metres without its unit, such as 9.8."""
    return format_number(value_m, decimals)
