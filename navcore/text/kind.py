"""The kinds of figure, and the one formatter of each: what a cell of a table shows.

A cell shows the figure without its unit where the unit stands in the heading (`UNITS`). Hemisphere and direction
letters, sides, and the marks of degrees and minutes are part of the figure. A quantity names its kind; nothing else
rounds.
"""

from __future__ import annotations

from enum import StrEnum
from functools import wraps
from types import MappingProxyType
from typing import TYPE_CHECKING

from navcore.text.clock import INSTANT_UNIT, format_duration, format_instant_figure
from navcore.text.direction import format_alteration, format_angle, format_direction, format_minutes_of_arc
from navcore.text.distance import (
    DISTANCE_UNIT,
    MARINE_SPEED_UNIT,
    METRES_UNIT,
    PERCENT_UNIT,
    format_distance_figure,
    format_metres_figure,
    format_percent_figure,
    format_speed_figure,
)
from navcore.text.plain import visible
from navcore.text.position import format_latitude, format_longitude

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping


class Kind(StrEnum):
    """What sort of figure a quantity is."""

    TEXT = "text"
    COUNT = "count"
    LATITUDE = "latitude"
    LONGITUDE = "longitude"
    DIRECTION = "direction"
    ALTERATION = "alteration"
    DISTANCE = "distance"
    SPEED = "speed"
    DURATION = "duration"
    INSTANT = "instant"
    PERCENT = "percent"
    MINUTES_OF_ARC = "minutes of arc"
    ANGLE = "angle"
    METRES = "metres"


def _blank_without_value(formatter: Callable[..., str]) -> Callable[..., str]:
    """Return the formatter with "" for what has no value."""

    @wraps(formatter)
    def formatted(value: object, *args: object, **kwargs: object) -> str:
        return "" if value is None else formatter(value, *args, **kwargs)

    return formatted


FORMATTERS: Mapping[Kind, Callable[..., str]] = MappingProxyType(
    {
        kind: _blank_without_value(formatter)
        for kind, formatter in (
            (Kind.TEXT, visible),
            (Kind.COUNT, str),
            (Kind.LATITUDE, format_latitude),
            (Kind.LONGITUDE, format_longitude),
            (Kind.DIRECTION, format_direction),
            (Kind.ALTERATION, format_alteration),
            (Kind.DISTANCE, format_distance_figure),
            (Kind.SPEED, format_speed_figure),
            (Kind.DURATION, format_duration),
            (Kind.INSTANT, format_instant_figure),
            (Kind.PERCENT, format_percent_figure),
            (Kind.MINUTES_OF_ARC, format_minutes_of_arc),
            (Kind.ANGLE, format_angle),
            (Kind.METRES, format_metres_figure),
        )
    }
)
"""The formatter of each kind: the value first, then what that formatter takes besides; None is "" in every one."""

UNITS: Mapping[Kind, str] = MappingProxyType(
    {
        Kind.DISTANCE: DISTANCE_UNIT,
        Kind.SPEED: MARINE_SPEED_UNIT,
        Kind.INSTANT: INSTANT_UNIT,
        Kind.PERCENT: PERCENT_UNIT,
        Kind.METRES: METRES_UNIT,
    }
)
"""The unit that a heading shows; a kind that is missing here carries its marks in the figure. In aviation, speeds are
in distance.AVIATION_SPEED_UNIT."""
