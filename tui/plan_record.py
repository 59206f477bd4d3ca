"""A plan's changes as plain values for JSON, and back: what the recovery journal writes a line of.

Only what differs is recorded: particulars that changed, and the one run of waypoints and the one of legs that was
replaced, found by the objects that both plans share. A whole plan is its difference from an empty one.
"""

from __future__ import annotations

from dataclasses import replace
from datetime import datetime, timedelta
from typing import TYPE_CHECKING, Any, TypedDict, TypeVar

from navcore.earth.figure import Figure
from navcore.plan.model import Craft, Leg, Line, Plan, PlanText, Trade, Waypoint
from navcore.position import Position
from navcore.sailings.parts import Parts, PartsRule

if TYPE_CHECKING:
    from collections.abc import Callable

    Values = list[Any]  # what JSON gives for a tuple of several types

Item = TypeVar("Item")


class Run(TypedDict):
    """A run of items replaced: items[start:stop] of the plan before give way to these."""

    start: int
    stop: int
    items: list[Values]


class Delta(TypedDict, total=False):
    """What makes one plan of another; a key is missing where nothing changed."""

    particulars: dict[str, Any]
    waypoints: Run
    legs: Run
    text: Values


def record_changes(before: Plan, after: Plan) -> Delta:
    """Return what changed between two plans."""
    delta: Delta = {}
    was, now = _particulars(before), _particulars(after)
    changed = {key: value for key, value in now.items() if value != was[key]}
    if changed:
        delta["particulars"] = changed
    if after.waypoints is not before.waypoints:
        delta["waypoints"] = _run(before.waypoints, after.waypoints, _write_waypoint)
    if after.legs is not before.legs:
        delta["legs"] = _run(before.legs, after.legs, _write_leg)
    if after.text != before.text:
        delta["text"] = _write_text(after.text)
    return delta


def apply_changes(plan: Plan, delta: Delta) -> Plan:
    """Return the plan after the changes that record_changes has found."""
    changes = {key: _read_particular(key, value) for key, value in delta.get("particulars", {}).items()}
    if "text" in delta:
        changes["text"] = _read_text(delta["text"])
    waypoints = _replaced(plan.waypoints, delta.get("waypoints"), _read_waypoint)
    legs = _replaced(plan.legs, delta.get("legs"), _read_leg)
    return replace(plan, waypoints=waypoints, legs=legs, **changes)


def _particulars(plan: Plan) -> dict[str, Any]:
    figure, craft = plan.figure, plan.craft
    return {
        "title": plan.title,
        "voyage": plan.voyage,
        "trade": plan.trade.value,
        "figure": [figure.name, figure.equatorial_radius_m, figure.inverse_flattening],
        "datum": plan.datum,
        "revision": plan.revision,
        "departure": plan.departure.isoformat() if plan.departure else None,
        "speed_kn": plan.speed_kn,
        "columns": list(plan.columns),
        "prepared": plan.prepared,
        "checked": plan.checked,
        "approved": plan.approved,
        "craft": [craft.name, craft.draught_m],
    }


def _read_particular(key: str, value: Any) -> Any:
    readers: dict[str, Callable[[Any], object]] = {
        "trade": Trade,
        "figure": lambda values: Figure(*values),
        "departure": lambda text: text and datetime.fromisoformat(text),
        "columns": tuple,
        "craft": lambda values: Craft(*values),
    }
    return readers[key](value) if key in readers else value


def _run(before: tuple[Item, ...], after: tuple[Item, ...], write: Callable[[Item], Values]) -> Run:
    """Return the one run that was replaced: what is left between a common start and a common end."""
    shortest = min(len(before), len(after))
    start = next((index for index in range(shortest) if before[index] is not after[index]), shortest)
    most = shortest - start
    same = next((count for count in range(most) if before[-1 - count] is not after[-1 - count]), most)
    items = [write(item) for item in after[start : len(after) - same]]
    return {"start": start, "stop": len(before) - same, "items": items}


def _replaced(items: tuple[Item, ...], run: Run | None, read: Callable[[Values], Item]) -> tuple[Item, ...]:
    if run is None:
        return items
    return (*items[: run["start"]], *(read(values) for values in run["items"]), *items[run["stop"] :])


def _write_waypoint(waypoint: Waypoint) -> Values:
    return [waypoint.name, *waypoint.position, _write_time(waypoint.stay), waypoint.remarks, waypoint.block]


def _read_waypoint(values: Values) -> Waypoint:
    name, lat_deg, lon_deg, stay, remarks, block = values
    return Waypoint(name, Position(lat_deg, lon_deg), timedelta(*stay), remarks, block)


def _write_time(time: timedelta) -> list[int]:
    return [time.days, time.seconds, time.microseconds]


def _write_leg(leg: Leg) -> Values:
    parts = leg.parts and [leg.parts.rule.value, leg.parts.amount]
    return [leg.line and leg.line.value, leg.limit_deg, parts, leg.speed_kn, [list(note) for note in leg.notes]]


def _read_leg(values: Values) -> Leg:
    line, limit_deg, parts, speed_kn, notes = values
    return Leg(
        line=line and Line(line),
        limit_deg=limit_deg,
        parts=parts and Parts(PartsRule(parts[0]), parts[1]),
        speed_kn=speed_kn,
        notes=tuple((column, text) for column, text in notes),
    )


def _write_text(text: PlanText) -> Values:
    return [text.head, [list(block) for block in text.between], text.newline, text.bom, text.end]


def _read_text(values: Values) -> PlanText:
    head, between, newline, bom, end = values
    return PlanText(head, tuple((count, block) for count, block in between), newline, bom, end)
