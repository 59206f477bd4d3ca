"""The position that courses and distances lead to, as text and as JSON."""

from __future__ import annotations

import json
from dataclasses import dataclass
from typing import TYPE_CHECKING

from navcore.errors import NoAnswerError
from navcore.lines.traverse import Run, reached_by_great_circles, reached_by_rhumb_lines
from navcore.prints.tracks import NO_VALUE, position_json
from navcore.sailings.tables import TraverseTables, tables_of_traverse
from navcore.text.direction import format_direction
from navcore.text.distance import format_distance
from navcore.text.position import format_position

if TYPE_CHECKING:
    from navcore.earth.figure import Figure
    from navcore.position import Position

_LABEL_CELLS = 20


@dataclass(frozen=True, slots=True)
class Reckoning:
    """The position reached by every line and method.

    Attributes:
        start: Where the first run begins.
        runs: Courses and distances.
        figure: The figure that the lines run on.
        rhumb_line_to: Each run keeps its course; None where one goes past a pole.
        great_circle_to: Each run starts on its course and follows the great circle.
        tables: By plane, middle-latitude and Mercator sailing.
        refusal: Why the rhumb line has no end; None where it has one.
    """

    start: Position
    runs: tuple[Run, ...]
    figure: Figure
    rhumb_line_to: Position | None
    great_circle_to: Position
    tables: TraverseTables
    refusal: str | None


def reckon(start: Position, runs: tuple[Run, ...], figure: Figure) -> Reckoning:
    """Work the position reached by every line and method."""
    refusal = None
    rhumb_line_to = None
    try:
        rhumb_line_to = reached_by_rhumb_lines(start, runs, figure)
    except NoAnswerError as error:
        refusal = str(error)
    great_circle_to = reached_by_great_circles(start, runs, figure)
    tables = tables_of_traverse(start, runs, figure)
    return Reckoning(start, runs, figure, rhumb_line_to, great_circle_to, tables, refusal)


def reckoning_json(reckoning: Reckoning) -> str:
    """Return the position reached as JSON in full precision; what has no value is null."""
    tables = reckoning.tables
    document = {
        "figure": reckoning.figure.name,
        "from": position_json(reckoning.start),
        "rhumb_line": {"to": _or_null(reckoning.rhumb_line_to)},
        "great_circle": {"to": position_json(reckoning.great_circle_to)},
        "tables": {
            "d_lat_min": tables.d_lat_min,
            "departure_nmi": tables.departure_nmi,
            "made_good_course_deg": tables.made_good_course_deg,
            "made_good_distance_nmi": tables.made_good_distance_nmi,
            "middle_latitude_to": _or_null(tables.middle_latitude_to),
            "mercator_to": _or_null(tables.mercator_to),
        },
    }
    return json.dumps(document, ensure_ascii=False, indent=1, allow_nan=False) + "\n"


def reckoning_text(reckoning: Reckoning) -> str:
    """Return the position reached as text, a line for each method."""
    tables = reckoning.tables
    runs = ", ".join(f"{format_direction(course)} {format_distance(distance)}" for course, distance in reckoning.runs)
    course_deg = tables.made_good_course_deg
    course = NO_VALUE if course_deg is None else format_direction(course_deg)
    name = reckoning.figure.name
    rows = (
        ("from", format_position(reckoning.start)),
        ("run", runs),
        ("rhumb line", f"{_or_dash(reckoning.rhumb_line_to)}   on {name}"),
        ("great circle", f"{format_position(reckoning.great_circle_to)}   on {name}, each course the initial one"),
        ("middle latitude", f"{_or_dash(tables.middle_latitude_to)}   1' of latitude = 1 NM"),
        _by_mercator(reckoning),
        ("made good", f"{course} {format_distance(tables.made_good_distance_nmi)}   by plane sailing"),
    )
    return "".join(f"{label:<{_LABEL_CELLS}}{value}\n" for label, value in rows)


def _by_mercator(reckoning: Reckoning) -> tuple[str, str]:
    tables = reckoning.tables
    if tables.is_parallel:
        return "parallel", f"{_or_dash(tables.mercator_to)}   1' of arc = 1 NM, departure ÷ cosine of the latitude"
    basis = f"1' of latitude = 1 NM, meridional parts of {reckoning.figure.name}"
    return "Mercator", f"{_or_dash(tables.mercator_to)}   {basis}"


def _or_null(position: Position | None) -> dict[str, float] | None:
    return None if position is None else position_json(position)


def _or_dash(position: Position | None) -> str:
    return NO_VALUE if position is None else format_position(position)
