"""The tables of a plan file read into the plan's own parts; every problem is collected, none stops the reading."""

from __future__ import annotations

from datetime import timedelta
from difflib import get_close_matches
from itertools import islice
from typing import TYPE_CHECKING, TypeVar

from navcore.earth.figure import WGS_84
from navcore.errors import ParseError, Problem
from navcore.files import planfile_values as values
from navcore.files.planfile_keys import CRAFT, CRAFT_KEYS, HEAD_KEYS, LEG_KEYS, VERSION, WAYPOINT, WAYPOINT_KEYS, Key
from navcore.files.toml_syntax import Fault, shorten
from navcore.plan.model import Craft, Leg, Line, Plan, Trade, Waypoint
from navcore.position import Position

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping

    from navcore.files.toml_source import Table

Value = TypeVar("Value")

MAX_FOUND = 1000
"""Problems of one kind; a file with more is no plan, and looking for more would take long."""

_NOWHERE = Position(0.0, 0.0)


class Reader:
    """Reads the values of one table by key.

    Attributes:
        problems: What can't be read.
        warnings: What is kept but not used.
    """

    def __init__(self, table: Table, keys: Mapping[str, Key], inside: tuple[str, ...] = ()) -> None:
        self.table = table
        self.keys = keys
        self.inside = inside
        self.problems: list[Problem] = []
        self.warnings: list[Problem] = []
        self.values: Mapping[str, object] = table.values
        for part in inside:
            inner = self.values.get(part)
            self.values = inner if isinstance(inner, dict) else {}

    def get(self, key: str, read: Callable[[object], Value], default: Value) -> Value:
        """Return a key's value; the default where the key is missing or its value can't be read."""
        if key not in self.values:
            return default
        try:
            return read(self.values[key])
        except ParseError as error:
            self.refuse(key, error)
            return default

    def refuse(self, key: str, error: ParseError) -> None:
        """Note that a key's value can't be read."""
        index = error.start if error.text and error.text == self.values[key] else None
        offset = self.table.value_offset(*self.inside, key, index=index)
        allowed = self.keys[key].allowed if key in self.keys else "text in double quotes"
        self.problems.append(self.table.source.problem(offset, Fault(f"{key}: {error.reason}", allowed, error.advice)))

    def at_key(self, key: str, what: str, allowed: str, advice: str) -> None:
        """Note what is wrong with a key."""
        offset = self.table.key_offset(*self.inside, key)
        self.problems.append(self.table.source.problem(offset, Fault(what, allowed, advice)))

    def require(self, key: str, where: str, offset: int) -> None:
        """Note that a key is missing, unless a line that can't be read may hold it."""
        if key in self.values or not self.table.unread_keys.isdisjoint({key, ""}):
            return
        allowed, example = self.keys[key]
        close = get_close_matches(key, [name for name in self.values if name not in self.keys], 1)
        advice = f"type {example}"
        if close:
            offset = self.table.key_offset(*self.inside, close[0])
            advice = f"write {key} where {shorten(close[0])} stands, or {advice}"
        self.problems.append(
            self.table.source.problem(offset, Fault(f"{key} is missing from {where}", allowed, advice))
        )

    def name_unknown(self, where: str, known: tuple[str, ...] = ()) -> None:
        """Warn of the keys that mean nothing here."""
        unknown = (key for key in self.values if key not in self.keys and key not in known)
        for key in islice(unknown, MAX_FOUND):
            names = (*self.keys, *known)
            close = get_close_matches(key.casefold(), names, 1)
            advice = f"did you mean {close[0]}?" if close else "put # before the line if it is a remark"
            what = f"{shorten(key)} is no key of {where}; it is kept but not used"
            offset = self.table.key_offset(*self.inside, key)
            self.warnings.append(self.table.source.problem(offset, Fault(what, ", ".join(names), advice)))


def read_head(reader: Reader) -> Plan:
    """Return a plan without waypoints: everything that is said of the whole."""
    reader.require("legbook", "the head of the file", 0)
    reader.get("legbook", values.read_version, VERSION)
    get = reader.get
    return Plan(
        title=get("title", values.read_text, ""),
        voyage=get("voyage", values.read_text, ""),
        trade=get("trade", values.read_trade, Trade.MARINE),
        figure=get("figure", values.read_figure, WGS_84),
        datum=get("datum", values.read_text, "WGS 84"),
        revision=get("revision", values.read_revision, 1),
        departure=get("departure", values.read_departure, None),
        speed_kn=get("speed_kn", values.read_positive, None),
        columns=get("columns", values.read_columns, ()),
        prepared=get("prepared", values.read_text, ""),
        checked=get("checked", values.read_text, ""),
        approved=get("approved", values.read_text, ""),
    )


def read_craft(reader: Reader) -> Craft:
    """Return the ship or aircraft."""
    return Craft(
        name=reader.get("name", values.read_text, ""),
        draught_m=reader.get("draught_m", values.read_not_negative, None),
    )


def root_readers(table: Table) -> tuple[Reader, Reader]:
    """Return the readers of a file's head and of its [craft]."""
    head, craft = Reader(table, HEAD_KEYS), Reader(table, CRAFT_KEYS, ("craft",))
    head.name_unknown("the head of a plan file", ("craft", "waypoint"))
    if not isinstance(table.values.get("craft", {}), dict):
        head.at_key("craft", "craft is no table", CRAFT.allowed, f"type {CRAFT.example} and its keys below")
    craft.name_unknown("[craft]")
    return head, craft


def read_waypoint(reader: Reader, block: str) -> Waypoint:
    """Return a waypoint, with the text of its block."""
    reader.require("position", f"this {WAYPOINT.example}", reader.table.start)
    return Waypoint(
        name=reader.get("name", values.read_text, ""),
        position=reader.get("position", values.read_position, _NOWHERE),
        stay=reader.get("stay", values.read_stay, timedelta()),
        remarks=reader.get("remarks", values.read_text, ""),
        block=block,
    )


def read_leg(reader: Reader) -> Leg:
    """Return what a waypoint's block says of the leg that ends there."""
    leg = Leg(
        line=reader.get("line", values.read_line, None),
        limit_deg=reader.get("limit", values.read_limit, None),
        parts=reader.get("parts", values.read_parts, None),
        speed_kn=reader.get("speed_kn", values.read_positive, None),
        notes=_read_notes(reader),
    )
    lacks_limit = "limit" not in reader.values and reader.table.unread_keys.isdisjoint({"limit", ""})
    if leg.line is Line.COMPOSITE and lacks_limit:
        what = "line is composite, but no limit is given"
        reader.at_key("line", what, LEG_KEYS["limit"].allowed, f"type {LEG_KEYS['limit'].example}")
    return leg


def refuse_leg_keys(reader: Reader) -> None:
    """Note every key of a leg in the block of the first waypoint, where no leg ends; an empty table says nothing."""
    for key in LEG_KEYS:
        if reader.values.get(key, {}) != {}:
            what = f"{key} stands in the first {WAYPOINT.example}, where no leg ends"
            allowed = ", ".join(name for name in WAYPOINT_KEYS if name not in LEG_KEYS)
            reader.at_key(key, what, allowed, "move it to the waypoint where its leg ends")


def _read_notes(reader: Reader) -> tuple[tuple[str, str], ...]:
    notes = reader.values.get("notes", {})
    if not isinstance(notes, dict):
        error = ParseError("", (0, 0), f"{values.found(notes)} stands there", f"type {LEG_KEYS['notes'].example}")
        reader.refuse("notes", error)
        return ()
    inner = Reader(reader.table, {}, ("notes",))
    pairs = []
    for column in notes:
        pairs.append((column, inner.get(column, values.read_text, "")))
        if len(inner.problems) > MAX_FOUND:
            break
    reader.problems += inner.problems
    return tuple(pairs)
