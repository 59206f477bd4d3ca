"""The plan: waypoints, the legs between them, and what is said of the whole. Frozen; an edit makes a new one."""

from __future__ import annotations

from dataclasses import dataclass, field
from datetime import timedelta
from enum import StrEnum
from typing import TYPE_CHECKING

from navcore.earth.figure import WGS_84, Figure

if TYPE_CHECKING:
    from collections.abc import Mapping
    from datetime import datetime

    from navcore.position import Position
    from navcore.sailings.parts import Parts


class Trade(StrEnum):
    """Whose words, units and usual lines the plan follows."""

    MARINE = "marine"
    AVIATION = "aviation"


class Line(StrEnum):
    """How a leg is sailed."""

    RHUMB = "rhumb line"
    GREAT_CIRCLE = "great circle"
    COMPOSITE = "composite"


@dataclass(frozen=True, slots=True)
class Waypoint:
    """A point of the plan.

    Attributes:
        name: Any text; "" where none was given.
        position: Where it is.
        stay: Time spent there before the next leg.
        remarks: Any text.
        block: Its block of the plan file as last read, leading comments included; "" where it came from no file.
    """

    name: str
    position: Position
    stay: timedelta = timedelta()
    remarks: str = ""
    block: str = field(default="", compare=False, repr=False)


@dataclass(frozen=True, slots=True)
class Leg:
    """What was chosen for the leg between two successive waypoints.

    Attributes:
        line: None leaves it to the trade: a rhumb line in a marine plan, a great circle in an aviation plan.
        limit_deg: Limiting latitude of a composite, north positive.
        parts: How the line is split to be steered.
        speed_kn: None takes the plan's.
        notes: The officer's own columns, as (column, text) pairs.
    """

    line: Line | None = None
    limit_deg: float | None = None
    parts: Parts | None = None
    speed_kn: float | None = None
    notes: tuple[tuple[str, str], ...] = ()


@dataclass(frozen=True, slots=True)
class Craft:
    """The ship or aircraft.

    Attributes:
        name: Name or registration.
        draught_m: Deepest draught; None where it was not given.
    """

    name: str = ""
    draught_m: float | None = None


@dataclass(frozen=True, slots=True)
class PlanText:
    r"""The text of a plan file beside its waypoint blocks.

    Kept so that what no edit touched is written back to the byte.

    Attributes:
        head: Everything before the first waypoint block.
        between: Blocks that are no waypoint's but stand after the first one, as (waypoint blocks before it, text).
        newline: "\n" or "\r\n".
        bom: Whether the file began with a byte order mark.
        end: What follows the last line of the last block; kept apart, so that blocks can change places.
        as_read: What each waypoint block says, so that none has to be read again to see whether it still does.
    """

    head: str = ""
    between: tuple[tuple[int, str], ...] = ()
    newline: str = "\n"
    bom: bool = False
    end: str = "\n"
    as_read: Mapping[str, tuple[Waypoint, Leg]] = field(default_factory=dict, compare=False, repr=False)


@dataclass(frozen=True, slots=True)
class Plan:
    """A passage plan: n waypoints and n - 1 legs.

    Attributes:
        waypoints: In the order they are passed.
        legs: legs[i] joins waypoints[i] and waypoints[i + 1].
        title: What the passage is called.
        voyage: Voyage or flight number.
        trade: Whose words, units and usual line are used.
        figure: The figure of the Earth that lines run on.
        datum: The datum of the positions; another thing than the figure.
        revision: From 1.
        departure: When the first waypoint is left, in UTC; None where it is not known.
        speed_kn: For legs that give none.
        columns: Names of the officer's own columns.
        prepared: Who prepared it; "" prints an empty line to sign.
        checked: Who checked it.
        approved: Who approved it.
        craft: The ship or aircraft.
        text: The file it came from, waypoint blocks aside.
    """

    waypoints: tuple[Waypoint, ...] = ()
    legs: tuple[Leg, ...] = ()
    title: str = ""
    voyage: str = ""
    trade: Trade = Trade.MARINE
    figure: Figure = WGS_84
    datum: str = "WGS 84"
    revision: int = 1
    departure: datetime | None = None
    speed_kn: float | None = None
    columns: tuple[str, ...] = ()
    prepared: str = ""
    checked: str = ""
    approved: str = ""
    craft: Craft = Craft()
    text: PlanText = field(default=PlanText(), compare=False, repr=False)

    def __post_init__(self) -> None:
        wanted = max(0, len(self.waypoints) - 1)
        if len(self.legs) != wanted:
            message = f"{len(self.waypoints)} waypoints take {wanted} legs, not {len(self.legs)}"
            raise ValueError(message)

    def line_of(self, leg: Leg) -> Line:
        """Return the line that a leg is sailed by: its own, or the trade's usual one."""
        if leg.line is not None:
            return leg.line
        return Line.GREAT_CIRCLE if self.trade is Trade.AVIATION else Line.RHUMB
