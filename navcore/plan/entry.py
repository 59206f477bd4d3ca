"""A waypoint as it is typed into a row of the plan: where it is, then its name after a semicolon.

Where it is can be said as a position, as COURSE/DISTANCE from the waypoint above, or as NAME BEARING/DISTANCE from a
named one. A course and distance runs along the plan's usual line.
"""

from __future__ import annotations

import re
from dataclasses import dataclass
from typing import TYPE_CHECKING

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.errors import NoAnswerError, ParseError
from navcore.lines import great_circle, rhumb_line
from navcore.plan.edit import insert_waypoint
from navcore.plan.model import Leg, Line, Waypoint
from navcore.position import Position
from navcore.text.distance import parse_run
from navcore.text.plain import visible
from navcore.text.position import parse_position, write_position
from navcore.text.scan import read_within

if TYPE_CHECKING:
    from navcore.plan.model import Plan

FORMS = "type a position, COURSE/DISTANCE from the waypoint above, or NAME BEARING/DISTANCE; a name after ;"
_RUN = re.compile(r"(?P<name>.*?)\s*(?P<run>\d[^\s/]*\s*[A-Za-z]?\s*/\s*\d.*)")
_LONGER_WAY_M = 1.0
_ISO_6709 = re.compile(r"\s*[+-]\d")


@dataclass(frozen=True, slots=True)
class Entry:
    """What a typed row says.

    Attributes:
        position: Where the waypoint is.
        name: Its name; None where no semicolon stands, so that a changed row keeps its own.
        start: What a course and distance runs from; None for a position.
        line: The line that it runs along; None for a position.
    """

    position: Position
    name: str | None
    start: Waypoint | None = None
    line: Line | None = None

    def on(self, waypoint: Waypoint) -> Waypoint:
        """Return the waypoint with what was typed in the place of what it said."""
        name = waypoint.name if self.name is None else self.name
        return Waypoint(name, self.position, waypoint.stay, waypoint.remarks, waypoint.block)

    @property
    def waypoint(self) -> Waypoint:
        """A new waypoint of it."""
        return Waypoint(self.name or "", self.position)


def read_entry(text: str, plan: Plan, index: int) -> Entry:
    """Return what a row says that is typed where a waypoint of that index goes.

    A tab parts the name as a semicolon does: that is how two columns of a sheet are pasted.

    Raises:
        ParseError: It can't be read, pointing at what is wrong.
    """
    parting = re.search(r"[;\t]", text)
    end = parting.start() if parting else len(text)
    name = text[parting.end() :].strip() if parting else None
    run = None if _ISO_6709.match(text) else _RUN.fullmatch(text, 0, end)
    if run is None:
        return Entry(read_within(text, (0, end), parse_position), name)
    start = _named(text, run, plan) if run["name"].strip() else _above(text, plan, index)
    course_deg, distance_nmi = read_within(text, run.span("run"), parse_run)
    line = plan.line_of(Leg())
    return Entry(_reached(text, start.position, (course_deg, distance_nmi), plan), name, start, line)


def write_entry(waypoint: Waypoint) -> str:
    """Return a row that read_entry reads as the very same position and name."""
    position = write_position(waypoint.position)
    return f"{position} ; {waypoint.name}" if waypoint.name else position


@dataclass(frozen=True, slots=True)
class Unread:
    """A line of several that can't be read.

    Attributes:
        number: Which line, from 1.
        index: The index that its waypoint would have among those that were read.
        text: The line.
        error: What is wrong with it.
    """

    number: int
    index: int
    text: str
    error: ParseError


def read_entries(text: str, plan: Plan, index: int) -> tuple[Plan, int, tuple[Unread, ...]]:
    """Return a plan with a waypoint for each line, how many were added, and the lines that can't be read.

    The first goes to an index and the others after it; empty lines count but say nothing. A course and distance is not
    worked from a line that could not be read: it is unread too.
    """
    unread: list[Unread] = []
    at = index
    above_is_unread = False
    for number, typed in enumerate(text.splitlines(), 1):
        if not typed.strip():
            continue
        try:
            entry = read_entry(typed, plan, at)
            if above_is_unread:
                _refuse_from_above(typed, entry, plan, at)
        except ParseError as error:
            unread.append(Unread(number, at, typed, error))
            above_is_unread = True
            continue
        plan = insert_waypoint(plan, at, entry.waypoint)
        above_is_unread = False
        at += 1
    return plan, at - index, tuple(unread)


def _refuse_from_above(text: str, entry: Entry, plan: Plan, index: int) -> None:
    """Refuse a course and distance that would start from a line which could not be read."""
    if index > 0 and entry.start is plan.waypoints[index - 1]:
        reason = "the line above could not be read, and this one starts from it"
        raise ParseError(text, (0, len(text)), reason, "mend the line above first")


def _above(text: str, plan: Plan, index: int) -> Waypoint:
    if not 0 < index <= len(plan.waypoints):
        reason = "no waypoint stands above for a course and distance to start from"
        raise ParseError(text, (0, len(text)), reason, "type a position, such as 48°23.5'N 004°29.0'W")
    return plan.waypoints[index - 1]


def _named(text: str, run: re.Match[str], plan: Plan) -> Waypoint:
    wanted = " ".join(run["name"].split())
    found = [point for point in plan.waypoints if " ".join(point.name.split()).casefold() == wanted.casefold()]
    if not found:
        known = ", ".join(dict.fromkeys(visible(point.name) for point in plan.waypoints if point.name))
        advice = f"type one of: {known}" if known else FORMS
        raise ParseError(text, run.span("name"), f"no waypoint is named “{visible(wanted)}”", advice)
    if len({point.position for point in found}) > 1:
        reason = f"“{visible(wanted)}” names {len(found)} waypoints at different positions"
        raise ParseError(text, run.span("name"), reason, "give them names of their own first, or type the position")
    return found[0]


def _reached(text: str, start: Position, run: tuple[float, float], plan: Plan) -> Position:
    course_deg, distance_nmi = run
    distance_m = distance_nmi * METRES_PER_NAUTICAL_MILE
    is_great_circle = plan.line_of(Leg()) is Line.GREAT_CIRCLE
    if is_great_circle:
        lat_deg, lon_deg, _ = great_circle.direct(*start, course_deg, distance_m, plan.figure)
    else:
        try:
            lat_deg, lon_deg = rhumb_line.direct(*start, course_deg, distance_m, plan.figure)
        except NoAnswerError as error:
            raise ParseError(text, (0, len(text)), str(error), "type a shorter distance, or the position") from error
    reached = Position(float(lat_deg), float(lon_deg))
    lines = great_circle if is_great_circle else rhumb_line
    if distance_m - float(lines.inverse(*start, *reached, plan.figure).distance_m) > _LONGER_WAY_M:
        reason = "that run goes the longer way round, and the leg would be drawn the shorter way"
        raise ParseError(text, (0, len(text)), reason, "type it in two runs, or the position")
    return reached
