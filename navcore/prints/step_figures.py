"""The figure of a working's step, with figures enough to work the next steps from."""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

from navcore.prints.tracks import NO_VALUE
from navcore.sailings.working import StepKind
from navcore.text.direction import format_angle, format_direction, format_minutes_of_arc
from navcore.text.distance import format_distance
from navcore.text.number import format_number
from navcore.text.position import format_latitude, format_longitude

if TYPE_CHECKING:
    from collections.abc import Callable

    from navcore.sailings.working import Step

RESULT_DECIMALS = 1
"""Of results: tenths of a mile, of a degree and of a minute, as everywhere else."""

_NORTH_SOUTH = ("N", "S")
_EAST_WEST = ("E", "W")
_FEWEST = 1
_SIGNIFICANT = 9


def step_figure(step: Step, *, decimals: int | None = None, fine_course: bool = False) -> str:
    """Return a step's figure; NO_VALUE where it has none.

    Args:
        step: The step.
        decimals: How many; as many as the next steps need unless given.
        fine_course: Whether a secant of the course magnifies its last figure.
    """
    value, kind = step.value, step.kind
    if value is None:
        return NO_VALUE
    if kind is StepKind.NUMBER:
        return format_number(value, _decimals_of_number(value))
    most = 8 if fine_course and kind is StepKind.COURSE else _MOST[kind]
    scale = 60.0 if kind in _IN_MINUTES else 1.0
    return _WRITE[kind](value, _decimals(value * scale, most) if decimals is None else decimals)


def _east_nmi(value: float, decimals: int) -> str:
    name = f" {_EAST_WEST[value < 0.0]}" if value else ""
    return f"{format_distance(abs(value), decimals)}{name}"


_WRITE: dict[StepKind, Callable[[float, int], str]] = {
    StepKind.LATITUDE: format_latitude,
    StepKind.LONGITUDE: format_longitude,
    StepKind.NORTH_MIN: lambda value, decimals: format_minutes_of_arc(value, _NORTH_SOUTH, decimals),
    StepKind.EAST_MIN: lambda value, decimals: format_minutes_of_arc(value, _EAST_WEST, decimals),
    StepKind.EAST_NMI: _east_nmi,
    StepKind.DISTANCE_NMI: format_distance,
    StepKind.COURSE: lambda value, decimals: format_direction(value, decimals=decimals),
    StepKind.ANGLE: format_angle,
}
_MOST = {
    StepKind.LATITUDE: 4,
    StepKind.LONGITUDE: 4,
    StepKind.NORTH_MIN: 5,
    StepKind.EAST_MIN: 5,
    StepKind.EAST_NMI: 4,
    StepKind.DISTANCE_NMI: 4,
    StepKind.COURSE: 5,
    StepKind.ANGLE: 6,
}
_IN_MINUTES = frozenset({StepKind.LATITUDE, StepKind.LONGITUDE})


def _decimals(value: float, most: int) -> int:
    """Return how many decimals say a value, from one to the most."""
    for decimals in range(_FEWEST, most):
        if abs(value - round(value, decimals)) < 10.0 ** -(most + 2):
            return decimals
    return most


def _decimals_of_number(value: float) -> int:
    """Return the decimals that give so many significant figures, eight at least."""
    if not value or not math.isfinite(value):
        return 8
    return max(8, min(18, _SIGNIFICANT - 1 - math.floor(math.log10(abs(value)))))
