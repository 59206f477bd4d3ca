"""Which quantities the leg table shows, in what order, and which of them yield first where there is no room."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from navcore.plan.model import Trade
from navcore.plan.quantities import Row, quantity_of

if TYPE_CHECKING:
    from navcore.plan.quantities import Quantity


@dataclass(frozen=True, slots=True)
class ToWrite:
    """Ruled space on paper for what is written in by hand.

    Attributes:
        row: Whether it stands on waypoints or on legs.
        heading: Its words.
        unit: The unit that is written in.
    """

    row: Row
    heading: str
    unit: str = ""


@dataclass(frozen=True, slots=True)
class Column:
    """One column of the leg table.

    Attributes:
        keys: Its quantities; the figures of several are joined by an arrow, and the first gives the heading.
        need: 1 is never left out; the highest goes first.
        to_write: In place of quantities, space to write in.
    """

    keys: tuple[str, ...]
    need: int
    to_write: ToWrite | None = None

    @property
    def row(self) -> Row:
        """Whether it stands on waypoints or on legs."""
        return self.to_write.row if self.to_write else self.first.row

    @property
    def first(self) -> Quantity:
        """The quantity that gives the heading; there is none for a column to write in."""
        return quantity_of(self.keys[0])


LEG_TABLE: tuple[Column, ...] = (
    Column(("number",), 1),
    Column(("name",), 1),
    Column(("lat_deg",), 1),
    Column(("lon_deg",), 1),
    Column(("alteration_deg",), 2),
    Column(("run_nmi",), 3),
    Column(("to_go_nmi",), 1),
    Column(("eta",), 1),
    Column(("line",), 1),
    Column(("course_deg", "final_course_deg"), 1),
    Column(("distance_nmi",), 1),
    Column(("speed_kn",), 1),
    Column(("time_on_leg_s",), 1),
    Column(("rhumb_line_nmi",), 3),
    Column(("great_circle_nmi",), 3),
    Column(("saving_nmi",), 2),
    Column(("saving_percent",), 4),
)
"""In the order in which they are printed."""


def _paper(need: int, *keys: str) -> tuple[Column, ...]:
    return tuple(Column((key,), need) for key in keys)


def _to_write(row: Row, need: int, *headings: str) -> tuple[Column, ...]:
    """Return columns to write in; a unit stands after a comma."""
    parted = (heading.partition(", ") for heading in headings)
    return tuple(Column((), need, ToWrite(row, words, unit)) for words, _, unit in parted)


PAPER: dict[Trade, tuple[Column, ...]] = {
    Trade.MARINE: (
        *_paper(1, "number", "name", "lat_deg", "lon_deg", "to_go_nmi", "eta"),
        *_to_write(Row.WAYPOINT, 1, "ATA, UTC"),
        *_paper(2, "alteration_deg"),
        *_paper(3, "stay_s"),
        *_paper(1, "line", "course_deg", "final_course_deg", "distance_nmi", "time_on_leg_s", "speed_kn"),
        *_to_write(Row.LEG, 2, "Limits P/S, NM", "Fixing"),
    ),
    Trade.AVIATION: (
        *_paper(1, "number", "name", "lat_deg", "lon_deg", "to_go_nmi", "eta"),
        *_to_write(Row.WAYPOINT, 2, "Revised, UTC"),
        *_to_write(Row.WAYPOINT, 1, "ATO, UTC", "Fuel plan"),
        *_to_write(Row.WAYPOINT, 2, "Fuel actual"),
        *_paper(3, "stay_s"),
        *_paper(1, "line", "course_deg", "final_course_deg", "distance_nmi", "time_on_leg_s"),
        *_paper(2, "speed_kn"),
        *_to_write(Row.LEG, 1, "Level", "Wind, °T/kt"),
        *_to_write(Row.LEG, 2, "Heading", "GS, kt", "Safe alt."),
    ),
}
"""Each trade's columns on paper, the waypoint's and the leg's in pairs that share a width.

Of need 2 are those that stand on landscape paper only, of need 3 those that stand where they have a figure. Common
practice: the columns of training forms for passage plans, and those of an operational flight plan.
"""

UNDER_THE_ROW: tuple[str, ...] = ("stay_s", "remarks", "composite_track", "steering", "ties", "crossings")
"""Quantities of free length, or seldom there: on a line of their own under the row, where there is anything to say."""
