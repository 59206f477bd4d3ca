"""A plan to the bytes of its file; the text that it came from is kept wherever it still says the same."""

from __future__ import annotations

from dataclasses import replace
from typing import TYPE_CHECKING

from navcore.files import planfile_values as values
from navcore.files.planfile_keys import CRAFT, HEAD_KEYS, VERSION, WAYPOINT, WAYPOINT_KEYS
from navcore.files.planfile_read import split_end
from navcore.files.planfile_tables import Reader, read_craft, read_head, read_leg, read_waypoint, root_readers
from navcore.files.toml_patch import Written, patch, write_inline
from navcore.files.toml_source import Source, Table, load
from navcore.files.toml_text import scan
from navcore.plan.model import Leg, Plan

if TYPE_CHECKING:
    from collections.abc import Iterator

    from navcore.plan.model import PlanText, Waypoint


def write_plan(plan: Plan) -> bytes:
    """Return the plan file.

    Reads back as the very plan; a plan that was read and not edited gives the bytes that it was read from.
    """
    pieces = list(_pieces(plan))
    pieces[-1] = split_end(pieces[-1])[0] + plan.text.end
    bom = "\ufeff" if plan.text.bom else ""
    return (bom + "".join(pieces)).encode("utf-8")


def _pieces(plan: Plan) -> Iterator[str]:
    head, between = _root_texts(plan)
    yield head
    others = list(between)
    for number, waypoint in enumerate(plan.waypoints):
        while others and others[0][0] <= number:
            yield others.pop(0)[1]
        yield _waypoint_text(waypoint, plan.legs[number - 1] if number else None, plan.text)
    yield from (text for _, text in others)


def _head_written(plan: Plan) -> Written:
    def text(value: str) -> str | None:
        return values.write_text(value) if value else None

    return Written(
        {
            "legbook": str(VERSION),
            "title": text(plan.title),
            "voyage": text(plan.voyage),
            "trade": values.write_text(plan.trade),
            "figure": values.write_text(plan.figure.name),
            "datum": values.write_text(plan.datum) if plan.datum != Plan().datum else None,
            "revision": str(plan.revision),
            "departure": None if plan.departure is None else values.write_departure(plan.departure),
            "speed_kn": None if plan.speed_kn is None else values.write_float(plan.speed_kn),
            "columns": values.write_columns(plan.columns) if plan.columns else None,
            "prepared": text(plan.prepared),
            "checked": text(plan.checked),
            "approved": text(plan.approved),
        }
    )


def _craft_written(plan: Plan) -> Written:
    craft = plan.craft
    name = values.write_text(craft.name) if craft.name else None
    draught = None if craft.draught_m is None else values.write_float(craft.draught_m)
    return Written({}, "craft", {"name": name, "draught_m": draught})


def _waypoint_written(waypoint: Waypoint, leg: Leg) -> Written:
    return Written(
        {
            "name": values.write_text(waypoint.name) if waypoint.name else None,
            "position": values.write_position_text(waypoint.position),
            "line": None if leg.line is None else values.write_text(leg.line),
            "limit": None if leg.limit_deg is None else values.write_limit(leg.limit_deg),
            "parts": None if leg.parts is None else values.write_parts(leg.parts),
            "speed_kn": None if leg.speed_kn is None else values.write_float(leg.speed_kn),
            "stay": values.write_stay(waypoint.stay) if waypoint.stay else None,
            "remarks": values.write_text(waypoint.remarks) if waypoint.remarks else None,
        },
        "notes",
        {column: values.write_text(text) for column, text in leg.notes},
        in_order=True,
    )


def _lines(written: Written) -> list[str]:
    return [f"{key} = {value}" for key, value in written.keys.items() if value is not None]


def _root_texts(plan: Plan) -> tuple[str, tuple[tuple[int, str], ...]]:
    """Return the head's text and the other blocks that are no waypoint's, as the plan wants them."""
    text = plan.text
    old = _read_root(text.head + "".join(other for _, other in text.between)) if text.head else None
    if old is None:
        return _new_head(plan), ()
    head = patch(text.head, (), _head_written(old), _head_written(plan))
    if old.craft == plan.craft:
        return head, text.between
    was, wanted = _craft_written(old), _craft_written(plan)
    for index, (number, other) in enumerate(text.between):
        if any(section.path[:1] == ("craft",) for section in scan(other).sections):
            changed = (number, patch(other, (), was, wanted))
            return head, (*text.between[:index], changed, *text.between[index + 1 :])
    return patch(head, (), was, wanted), text.between


def _new_head(plan: Plan) -> str:
    lines = _lines(_head_written(plan))
    craft = _craft_written(plan).inner_lines
    if craft:
        lines += ["", CRAFT.example, *(f"{key} = {value}" for key, value in craft)]
    return _joined([*lines, ""], plan.text.newline)


def _read_root(text: str) -> Plan | None:
    loaded, message = load(text)
    table = Table(Source(text), (), 0, HEAD_KEYS)
    table.values = loaded
    head, craft = root_readers(table)
    plan = read_head(head)
    ship = read_craft(craft)
    unreadable = message or head.problems or craft.problems
    return None if unreadable else replace(plan, craft=ship)


def _waypoint_text(waypoint: Waypoint, leg: Leg | None, text: PlanText) -> str:
    """Return a waypoint's block; the first waypoint has no leg, and its block none of a leg's keys."""
    old = text.as_read.get(waypoint.block) or _read_block(waypoint.block)
    wanted = (waypoint, leg or Leg())
    if old == wanted:
        return waypoint.block
    written = _waypoint_written(*wanted)
    if old is None:
        lines = [WAYPOINT.example, *_lines(written)]
        if written.inner_lines:
            lines.append(f"notes = {write_inline(written.inner_lines)}")
        return _joined([*lines, ""], text.newline)
    return patch(waypoint.block, ("waypoint",), _waypoint_written(*old), written)


def _read_block(block: str) -> tuple[Waypoint, Leg] | None:
    loaded, message = load(block)
    rows = loaded.get("waypoint")
    if message or not isinstance(rows, list) or len(rows) != 1:
        return None
    table = Table(Source(block), (), 1, WAYPOINT_KEYS)
    table.values = rows[0]
    reader = Reader(table, WAYPOINT_KEYS)
    waypoint, leg = read_waypoint(reader, block), read_leg(reader)
    return None if reader.problems else (waypoint, leg)


def _joined(lines: list[str], newline: str) -> str:
    return "".join(line + newline for line in lines)
