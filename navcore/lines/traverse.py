"""The position that several courses and distances lead to, one after the other."""

from __future__ import annotations

from typing import TYPE_CHECKING

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.lines import great_circle, rhumb_line
from navcore.position import Position

if TYPE_CHECKING:
    from collections.abc import Sequence

    from navcore.earth.figure import Figure

Run = tuple[float, float]
"""A course in degrees and a distance in NM."""


def reached_by_rhumb_lines(start: Position, runs: Sequence[Run], figure: Figure) -> Position:
    """Return where the runs lead when each keeps its course.

    Raises:
        NoAnswerError: A run goes on past a pole.
    """
    reached = start
    for course_deg, distance_nmi in runs:
        distance_m = distance_nmi * METRES_PER_NAUTICAL_MILE
        lat_deg, lon_deg = rhumb_line.direct(*reached, course_deg, distance_m, figure)
        reached = Position(float(lat_deg), float(lon_deg))
    return reached


def reached_by_great_circles(start: Position, runs: Sequence[Run], figure: Figure) -> Position:
    """Return where the runs lead when each starts on its course and follows the great circle."""
    reached = start
    for course_deg, distance_nmi in runs:
        distance_m = distance_nmi * METRES_PER_NAUTICAL_MILE
        lat_deg, lon_deg, _ = great_circle.direct(*reached, course_deg, distance_m, figure)
        reached = Position(float(lat_deg), float(lon_deg))
    return reached
