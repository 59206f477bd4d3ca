"""Every figure of a plan described once: its key, its words in each trade, its unit, its kind and where it comes from.

Screen, paper and files all read this table and the formatters of navcore.text, so that two of them can't disagree.
"""

from __future__ import annotations

from dataclasses import dataclass
from datetime import datetime, timedelta
from enum import StrEnum
from typing import TYPE_CHECKING

from navcore.angles import alteration_deg
from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.plan.leg_words import composite_words, crossing_words, steering_words
from navcore.plan.model import Line, Trade
from navcore.plan.schedule import speed_of
from navcore.sailings.ties import tie_words
from navcore.text.direction import AVIATION_SIDES, MARINE_SIDES
from navcore.text.distance import AVIATION_SPEED_UNIT
from navcore.text.kind import FORMATTERS, UNITS, Kind

if TYPE_CHECKING:
    from collections.abc import Callable, Iterable

    from navcore.plan.solve import Solution

Value = str | int | float | datetime | timedelta | None

SIDES = {Trade.MARINE: MARINE_SIDES, Trade.AVIATION: AVIATION_SIDES}
"""To which sides a course is altered, in each trade's words."""


class Row(StrEnum):
    """Which rows of the plan a quantity stands on."""

    WAYPOINT = "waypoint"
    LEG = "leg"


@dataclass(frozen=True, slots=True)
class Quantity:
    """One figure of the plan.

    Attributes:
        key: Its name in JSON; the unit is its last word.
        row: Whether it belongs to a waypoint or to the leg after it.
        kind: Which formatter writes it.
        marine: Its heading in a marine plan.
        aviation: Its heading in an aviation plan.
        value: From a solution and the row's index, unrounded, in the unit of the key; None where there is no value.
        comes_from: How it is got, in words.
    """

    key: str
    row: Row
    kind: Kind
    marine: str
    aviation: str
    value: Callable[[Solution, int], Value]
    comes_from: str

    def heading(self, trade: Trade) -> str:
        """Return the heading in a trade's words, without the unit."""
        return self.aviation if trade is Trade.AVIATION else self.marine

    def unit(self, trade: Trade) -> str:
        """Return the unit in a trade's words; "" where each figure carries its own."""
        if self.kind is Kind.SPEED and trade is Trade.AVIATION:
            return AVIATION_SPEED_UNIT
        return UNITS.get(self.kind, "")

    def shown(self, solution: Solution, index: int) -> str:
        """Return the figure as printed, without the heading's unit; "" where there is no value."""
        value = self.value(solution, index)
        if self.kind is Kind.ALTERATION:
            return FORMATTERS[self.kind](value, SIDES[solution.plan.trade])
        return FORMATTERS[self.kind](value)


def _nmi(distance_m: float | None) -> float | None:
    return None if distance_m is None else distance_m / METRES_PER_NAUTICAL_MILE


def _run_nmi(solution: Solution, index: int) -> Value:
    return _nmi(solution.run_m[index])


def _to_go_nmi(solution: Solution, index: int) -> Value:
    total_m, run_m = solution.total_m, solution.run_m[index]
    return None if total_m is None or run_m is None else _nmi(total_m - run_m)


def _alteration_deg(solution: Solution, index: int) -> Value:
    if not 0 < index < len(solution.legs):
        return None
    course_in_deg = solution.legs[index - 1].last_course_deg
    course_out_deg = solution.legs[index].first_course_deg
    if course_in_deg is None or course_out_deg is None:
        return None
    return alteration_deg(course_in_deg, course_out_deg)


def _final_course_deg(solution: Solution, index: int) -> Value:
    leg = solution.legs[index]
    return None if leg.line is Line.RHUMB else leg.end_course_deg


def _ties(solution: Solution, index: int) -> Value:
    start, end = (solution.plan.waypoints[at].position for at in (index, index + 1))
    worked = solution.legs[index].worked
    return tie_words(start, end, worked.initial_course_deg, worked.final_course_deg)


def _saving_percent(solution: Solution, index: int) -> Value:
    worked = solution.legs[index].worked
    return 100.0 * worked.saving_m / worked.rhumb_distance_m if worked.rhumb_distance_m else None


_ALL = (
    Quantity(
        "number", Row.WAYPOINT, Kind.COUNT, "WPT", "No", lambda _, index: index + 1, "counted from the first waypoint"
    ),
    Quantity(
        "name", Row.WAYPOINT, Kind.TEXT, "Waypoint", "Point", lambda s, i: s.plan.waypoints[i].name, "as typed"
    ),
    Quantity(
        "lat_deg", Row.WAYPOINT, Kind.LATITUDE, "Latitude", "Latitude",
        lambda s, i: s.plan.waypoints[i].position.lat_deg, "as typed",
    ),
    Quantity(
        "lon_deg", Row.WAYPOINT, Kind.LONGITUDE, "Longitude", "Longitude",
        lambda s, i: s.plan.waypoints[i].position.lon_deg, "as typed",
    ),
    Quantity(
        "alteration_deg", Row.WAYPOINT, Kind.ALTERATION, "Alteration", "Turn", _alteration_deg,
        "from the course on arrival to the course on leaving",
    ),
    Quantity(
        "run_nmi", Row.WAYPOINT, Kind.DISTANCE, "Run", "Run", _run_nmi, "sum of the distances up to here"
    ),
    Quantity(
        "to_go_nmi", Row.WAYPOINT, Kind.DISTANCE, "To go", "To go", _to_go_nmi, "sum of the distances from here on",
    ),
    Quantity(
        "eta", Row.WAYPOINT, Kind.INSTANT, "ETA", "ETO", lambda s, i: s.schedule.arrival[i],
        "departure, times on the legs and stays",
    ),
    Quantity(
        "stay_s", Row.WAYPOINT, Kind.DURATION, "Stay", "Stay", lambda s, i: s.plan.waypoints[i].stay or None, "as typed"
    ),
    Quantity(
        "remarks", Row.WAYPOINT, Kind.TEXT, "Remarks", "Remarks", lambda s, i: s.plan.waypoints[i].remarks, "as typed"
    ),
    Quantity(
        "line", Row.LEG, Kind.TEXT, "Line", "Line", lambda s, i: s.legs[i].line.value,
        "as chosen, else the trade's usual",
    ),
    Quantity(
        "course_deg", Row.LEG, Kind.DIRECTION, "Course", "Track", lambda s, i: s.legs[i].course_deg,
        "the rhumb line's, or the great circle's initial course, true",
    ),
    Quantity(
        "final_course_deg", Row.LEG, Kind.DIRECTION, "Final course", "Final track", _final_course_deg,
        "the great circle's where it ends, true",
    ),
    Quantity(
        "steering", Row.LEG, Kind.TEXT, "Steering", "Steering",
        lambda s, i: steering_words(s.legs[i]),
        "whether a great circle or composite is in parts, and what those change",
    ),
    Quantity(
        "composite_track", Row.LEG, Kind.TEXT, "Composite", "Composite", lambda s, i: composite_words(s.legs[i]),
        "great circles that touch the limiting parallel, and the parallel between",
    ),
    Quantity("ties", Row.LEG, Kind.TEXT, "Ties", "Ties", _ties, "which of two equal ways is taken"),
    Quantity(
        "crossings", Row.LEG, Kind.TEXT, "Crossings", "Crossings", crossing_words,
        "where what is sailed crosses the equator and 180°",
    ),
    Quantity(
        "distance_nmi", Row.LEG, Kind.DISTANCE, "Distance", "Distance", lambda s, i: _nmi(s.legs[i].distance_m),
        "along what is sailed: the line, or its parts where it is split",
    ),
    Quantity(
        "speed_kn", Row.LEG, Kind.SPEED, "Speed", "Speed", lambda s, i: speed_of(s.plan, s.plan.legs[i]),
        "the leg's, else the plan's",
    ),
    Quantity(
        "time_on_leg_s", Row.LEG, Kind.DURATION, "Time", "Time", lambda s, i: s.schedule.time_on_leg[i],
        "distance by speed",
    ),
    Quantity(
        "rhumb_line_course_deg", Row.LEG, Kind.DIRECTION, "Rhumb line", "Rhumb line",
        lambda s, i: s.legs[i].worked.rhumb_course_deg if s.legs[i].worked.rhumb_distance_m else None,
        "true, whichever line is sailed",
    ),
    Quantity(
        "great_circle_course_deg", Row.LEG, Kind.DIRECTION, "Great circle", "Great circle",
        lambda s, i: s.legs[i].worked.initial_course_deg if s.legs[i].worked.great_circle_distance_m else None,
        "initial, true, whichever line is sailed",
    ),
    Quantity(
        "great_circle_final_course_deg", Row.LEG, Kind.DIRECTION, "Great circle, final", "Great circle, final",
        lambda s, i: s.legs[i].worked.final_course_deg if s.legs[i].worked.great_circle_distance_m else None,
        "true, whichever line is sailed",
    ),
    Quantity(
        "rhumb_line_nmi", Row.LEG, Kind.DISTANCE, "Rhumb line", "Rhumb line",
        lambda s, i: _nmi(s.legs[i].worked.rhumb_distance_m), "whichever line is sailed",
    ),
    Quantity(
        "great_circle_nmi", Row.LEG, Kind.DISTANCE, "Great circle", "Great circle",
        lambda s, i: _nmi(s.legs[i].worked.great_circle_distance_m), "whichever line is sailed",
    ),
    Quantity(
        "saving_nmi", Row.LEG, Kind.DISTANCE, "Saving", "Saving", lambda s, i: _nmi(s.legs[i].worked.saving_m),
        "rhumb line less great circle",
    ),
    Quantity(
        "saving_percent", Row.LEG, Kind.PERCENT, "Saving", "Saving", _saving_percent, "of the rhumb line"
    ),
)  # fmt: skip

QUANTITIES: dict[str, Quantity] = {quantity.key: quantity for quantity in _ALL}


_TYPED = "notes."


def quantity_of(key: str) -> Quantity:
    """Return the quantity with that key; "notes." and a column is one of the officer's own columns."""
    return typed_quantity(key.removeprefix(_TYPED)) if key.startswith(_TYPED) else QUANTITIES[key]


def typed_quantity(column: str) -> Quantity:
    """Return the quantity of one of the officer's own columns, typed per leg."""

    def value(solution: Solution, index: int) -> Value:
        return dict(solution.plan.legs[index].notes).get(column, "")

    return Quantity(_TYPED + column, Row.LEG, Kind.TEXT, column, column, value, "as typed")


def typed_columns(solution: Solution) -> tuple[str, ...]:
    """Return the officer's own columns: those that the plan lists, then any that a leg has besides."""
    noted: Iterable[str] = (column for leg in solution.plan.legs for column, _ in leg.notes)
    return tuple(dict.fromkeys((*solution.plan.columns, *noted)))


def rows_of(row: Row, solution: Solution) -> range:
    """Return the indexes that a quantity of that row has in a solution."""
    return range(len(solution.plan.waypoints) if row is Row.WAYPOINT else len(solution.legs))
