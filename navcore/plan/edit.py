"""Edits: pure functions from a plan to a new one. Undo is the plan before.

A leg's keys stand in the file in the block of the waypoint where the leg ends, and the edits follow that: a waypoint
that moves takes the leg that ends at it along. Blocks of the file that are no waypoint's keep their place.
"""

from __future__ import annotations

import math
from dataclasses import replace
from datetime import timedelta
from typing import TYPE_CHECKING, TypedDict, Unpack

from navcore.errors import EditError, ParseError, RangeError
from navcore.plan.model import Leg, Line
from navcore.sailings.parts import format_parts, parse_parts

if TYPE_CHECKING:
    from collections.abc import Callable
    from datetime import datetime

    from navcore.earth.figure import Figure
    from navcore.plan.model import Craft, Plan, PlanText, Trade, Waypoint
    from navcore.position import Position
    from navcore.sailings.parts import Parts

MOST_STAY = timedelta(days=9999)
"""The longest time that a plan file can say."""


class PlanChanges(TypedDict, total=False):
    """What set_plan can change; each as in Plan."""

    title: str
    voyage: str
    trade: Trade
    figure: Figure
    datum: str
    revision: int
    departure: datetime | None
    speed_kn: float | None
    columns: tuple[str, ...]
    prepared: str
    checked: str
    approved: str
    craft: Craft


def insert_waypoint(plan: Plan, index: int, waypoint: Waypoint) -> Plan:
    """Return a plan in which a waypoint has an index, and those from there on the next.

    Between two others both new legs take the choices of the one that it parts; a leg at either end starts with none.

    Raises:
        EditError: The index is not 0 to the number of waypoints, or the waypoint can't be.
    """
    _require_index(index, len(plan.waypoints) + 1, "a place for a waypoint")
    _require_waypoint(waypoint)
    waypoints = (*plan.waypoints[:index], waypoint, *plan.waypoints[index:])
    if not plan.waypoints:
        legs = plan.legs
    elif 0 < index < len(plan.waypoints):
        legs = (*plan.legs[:index], *plan.legs[index - 1 :])
    else:
        legs = (Leg(), *plan.legs) if index == 0 else (*plan.legs, Leg())
    text = _shifted(plan.text, 1, lambda count: count > index or 0 < count == len(plan.waypoints))
    return replace(plan, waypoints=waypoints, legs=legs, text=text)


def delete_waypoint(plan: Plan, index: int) -> Plan:
    """Return a plan without a waypoint. Of the two legs that become one, the later one's choices stay.

    Raises:
        EditError: No waypoint has that index.
    """
    _require_index(index, len(plan.waypoints), "a waypoint")
    waypoints = (*plan.waypoints[:index], *plan.waypoints[index + 1 :])
    gone = max(index - 1, 0)
    legs = (*plan.legs[:gone], *plan.legs[gone + 1 :])
    return replace(plan, waypoints=waypoints, legs=legs, text=_shifted(plan.text, -1, lambda count: count > index))


def move_waypoint(plan: Plan, index: int, to_index: int) -> Plan:
    """Return a plan in which a waypoint stands elsewhere, with the leg that ends at it. Moving it back gives the plan.

    Where the first place changes hands, the leg of the waypoint that takes it goes to the one that gives it up.

    Raises:
        EditError: No waypoint has that index, or none can have the other.
    """
    _require_index(index, len(plan.waypoints), "a waypoint")
    _require_index(to_index, len(plan.waypoints), "a place for it")
    rows = list(zip(plan.waypoints, (None, *plan.legs), strict=True))
    rows.insert(to_index, rows.pop(index))
    first_leg = rows[0][1]
    legs = tuple(leg or first_leg or Leg() for _, leg in rows[1:])
    return replace(plan, waypoints=tuple(waypoint for waypoint, _ in rows), legs=legs)


def reverse(plan: Plan) -> Plan:
    """Return the plan from its end to its start. Reversing twice gives the plan."""
    return replace(plan, waypoints=plan.waypoints[::-1], legs=plan.legs[::-1])


def duplicate_waypoint(plan: Plan, index: int) -> Plan:
    """Return a plan with a copy of a waypoint right after it; the leg between the two has no choices made.

    Raises:
        EditError: No waypoint has that index.
    """
    _require_index(index, len(plan.waypoints), "a waypoint")
    longer = insert_waypoint(plan, index + 1, replace(plan.waypoints[index], block=""))
    return replace(longer, legs=(*plan.legs[:index], Leg(), *plan.legs[index:]))


def set_waypoint(plan: Plan, index: int, waypoint: Waypoint) -> Plan:
    """Return a plan with another waypoint in the place of one; its block of the file stays with the place.

    Raises:
        EditError: No waypoint has that index, or the waypoint can't be.
    """
    _require_index(index, len(plan.waypoints), "a waypoint")
    _require_waypoint(waypoint)
    kept = replace(waypoint, block=plan.waypoints[index].block)
    return replace(plan, waypoints=(*plan.waypoints[:index], kept, *plan.waypoints[index + 1 :]))


def set_leg(plan: Plan, index: int, leg: Leg) -> Plan:
    """Return a plan with other choices for a leg.

    Raises:
        EditError: No leg has that index, or the leg can't be.
    """
    _require_index(index, len(plan.legs), "a leg")
    _require_leg(leg)
    return replace(plan, legs=(*plan.legs[:index], leg, *plan.legs[index + 1 :]))


def set_plan(plan: Plan, **changes: Unpack[PlanChanges]) -> Plan:
    """Return a plan of which something else is said as a whole.

    Raises:
        EditError: It can't be said.
    """
    changed = replace(plan, **changes)
    _require(changed.revision >= 1, f"the revision is {changed.revision}; allowed: 1 or more")
    zone_is_known = changed.departure is None or changed.departure.utcoffset() is not None
    _require(zone_is_known, "the departure has no zone; give it in UTC")
    _require_speed(changed.speed_kn)
    _require(len(set(changed.columns)) == len(changed.columns), "a column is named twice; allowed: each once")
    draught_m = changed.craft.draught_m
    sound = draught_m is None or 0.0 <= draught_m < math.inf
    _require(sound, f"the draught is {draught_m} m; allowed: 0 or more")
    return changed


def _shifted(text: PlanText, step: int, moves: Callable[[int], bool]) -> PlanText:
    between = tuple((count + step if moves(count) else count, block) for count, block in text.between)
    return replace(text, between=between)


def _require(condition: bool, message: str) -> None:
    if not condition:
        raise EditError(message)


def _require_index(index: int, count: int, what: str) -> None:
    if not 0 <= index < count:
        allowed = f"allowed: 0 to {count - 1}" if count else "the plan has none"
        message = f"{what} with index {index} is not in the plan; {allowed}"
        raise EditError(message)


def _require_speed(speed_kn: float | None) -> None:
    sound = speed_kn is None or 0.0 < speed_kn < math.inf
    _require(sound, f"the speed is {speed_kn} kn; allowed: above 0")


def _require_waypoint(waypoint: Waypoint) -> None:
    _require_position(waypoint.position)
    sound = timedelta() <= waypoint.stay <= MOST_STAY
    _require(sound, f"the stay is {waypoint.stay}; allowed: 0 to {MOST_STAY.days} days")


def _require_position(position: Position) -> None:
    _require(-90.0 <= position.lat_deg <= 90.0, f"the latitude is {position.lat_deg}°; allowed: -90 to 90")
    _require(-180.0 <= position.lon_deg <= 180.0, f"the longitude is {position.lon_deg}°; allowed: -180 to 180")


def _require_leg(leg: Leg) -> None:
    _require_speed(leg.speed_kn)
    limit_deg = leg.limit_deg
    sound = limit_deg is None or -90.0 <= limit_deg <= 90.0
    _require(sound, f"the limiting latitude is {limit_deg}°; allowed: -90 to 90")
    has_limit = leg.line is not Line.COMPOSITE or limit_deg is not None
    _require(has_limit, "a composite needs a limiting latitude; give both")
    if leg.parts is not None:
        _require_parts(leg.parts)


def _require_parts(parts: Parts) -> None:
    """Allow what can be written in a plan and read back."""
    try:
        parse_parts(format_parts(parts))
    except (ParseError, RangeError) as error:
        message = f"the leg can't be split so: {error}"
        raise EditError(message) from error
