"""The forms: the fields of a leg, of a waypoint and of the plan, and what their texts make."""

from __future__ import annotations

from dataclasses import replace
from datetime import timedelta
from typing import TYPE_CHECKING, TypeVar

from navcore.earth.figure import FIGURES, figure_named
from navcore.errors import ParseError
from navcore.files import planfile_values as values
from navcore.plan.edit import set_leg, set_plan, set_waypoint
from navcore.plan.model import Craft, Leg, Line, Plan, Trade
from navcore.plan.quantities import typed_columns
from navcore.sailings.parts import format_parts, parse_parts
from navcore.text.clock import format_instant_figure, parse_duration, parse_instant
from navcore.text.distance import parse_speed
from navcore.text.number import write_number
from navcore.text.plain import visible
from navcore.text.position import parse_latitude, parse_position, write_position
from tui.widgets.form import Field, FormSheet

if TYPE_CHECKING:
    from collections.abc import Callable, Iterable, Sequence

    from navcore.plan.solve import Solution

Value = TypeVar("Value")


def leg_sheet(solution: Solution, index: int) -> tuple[FormSheet, Callable[[Sequence[str]], Plan]]:
    """Return the fields of a leg, and the plan that their texts make."""
    plan = solution.plan
    leg = plan.legs[index]
    columns = typed_columns(solution)
    noted = dict(leg.notes)
    lines = f"{', '.join(Line)}; empty: {plan.line_of(Leg())}, as usual in the trade"
    limit = _shown(leg.limit_deg, _unquoted_limit)
    parts = _shown(leg.parts, format_parts)
    fields = [
        Field("line", leg.line or "", _or_none(_line), lines),
        Field("limit", limit, _or_none(parse_latitude), "limiting latitude of a composite: 50°N"),
        Field("parts", parts, _or_none(parse_parts), "10° longitude, 300 NM, 12 parts or 1 NM apart"),
        Field("speed", _shown(leg.speed_kn, write_number), _or_none(parse_speed), "kn; empty: the plan's"),
        *(_text(visible(column), noted.get(column, ""), "a column of your own") for column in columns),
    ]

    def made(texts: Sequence[str]) -> Plan:
        line, limit, parts, speed, *notes = texts
        changed = Leg(
            line=_kept(fields[0], line, leg.line, _or_none(_line)),
            limit_deg=_kept(fields[1], limit, leg.limit_deg, _or_none(parse_latitude)),
            parts=_kept(fields[2], parts, leg.parts, _or_none(parse_parts)),
            speed_kn=_kept(fields[3], speed, leg.speed_kn, _or_none(parse_speed)),
            notes=tuple(
                (column, _kept(field, text, noted.get(column, ""), str))
                for column, text, field in zip(columns, notes, fields[4:], strict=True)
                if text
            ),
        )
        return set_leg(plan, index, changed)

    return FormSheet(f"Leg {index + 1} → {index + 2}", tuple(fields), made), made


def waypoint_sheet(plan: Plan, index: int) -> tuple[FormSheet, Callable[[Sequence[str]], Plan]]:
    """Return the fields of a waypoint, and the plan that their texts make."""
    waypoint = plan.waypoints[index]
    stay = _shown(waypoint.stay or None, lambda time: values.write_stay(time).strip('"'))
    fields = (
        _text("name", waypoint.name, "any text"),
        Field("position", write_position(waypoint.position), parse_position, "48°30.0'N 125°20.0'W, or any other form"),
        Field("stay", stay, _stay, "6h, 1d 6h 30min, 90 min"),
        _text("remarks", waypoint.remarks, "any text; printed under the row"),
    )

    def made(texts: Sequence[str]) -> Plan:
        name, position, stay, remarks = texts
        changed = replace(
            waypoint,
            name=_kept(fields[0], name, waypoint.name, str),
            position=_kept(fields[1], position, waypoint.position, parse_position),
            stay=_kept(fields[2], stay, waypoint.stay, _stay),
            remarks=_kept(fields[3], remarks, waypoint.remarks, str),
        )
        return set_waypoint(plan, index, changed)

    return FormSheet(f"Waypoint {index + 1}", fields, made), made


def plan_sheet(plan: Plan) -> tuple[FormSheet, Callable[[Sequence[str]], Plan]]:
    """Return the fields of the whole, and the plan that their texts make."""
    fields = _plan_fields(plan)

    def made(texts: Sequence[str]) -> Plan:
        return _plan_made(plan, fields, texts)

    return FormSheet("Particulars of the plan", fields, made), made


def _plan_fields(plan: Plan) -> tuple[Field, ...]:
    is_marine = plan.trade is Trade.MARINE
    draught = _shown(plan.craft.draught_m, write_number)
    departure = _shown(plan.departure, lambda at: f"{format_instant_figure(at)}Z")
    return (
        _text("title", plan.title, "what the passage is called"),
        _text("ship" if is_marine else "aircraft", plan.craft.name, "name or registration"),
        _text("voyage" if is_marine else "flight", plan.voyage, "number of the voyage or flight"),
        Field("departure", departure, _or_none(parse_instant), "date, time and zone: 2027-03-04 14:00Z"),
        Field("speed", _shown(plan.speed_kn, write_number), _or_none(parse_speed), "kn, for legs that give none"),
        Field("trade", plan.trade, _trade, ", ".join(Trade)),
        Field("figure", plan.figure.name, figure_named, ", ".join(FIGURES)),
        _text("datum", plan.datum, "of the positions; another thing than the figure"),
        Field("draught", draught, _or_none(_metres), "m"),
        _text("own columns", ", ".join(plan.columns), "charts, fixing: typed for each leg, parted by commas"),
        Field("revision", str(plan.revision), _whole, "from 1"),
        _text("prepared", plan.prepared, "who prepared it; empty: a line to sign"),
        _text("checked", plan.checked, "who checked it; empty: a line to sign"),
        _text("approved", plan.approved, "who approved it; empty: a line to sign"),
    )  # fmt: skip


def _plan_made(plan: Plan, fields: Sequence[Field], texts: Sequence[str]) -> Plan:
    title, ship, voyage, departure, speed, trade, figure, datum, draught, columns, revision, *names = texts
    craft = Craft(
        _kept(fields[1], ship, plan.craft.name, str),
        _kept(fields[8], draught, plan.craft.draught_m, _or_none(_metres)),
    )
    return set_plan(
        plan,
        title=_kept(fields[0], title, plan.title, str),
        craft=craft,
        voyage=_kept(fields[2], voyage, plan.voyage, str),
        departure=_kept(fields[3], departure, plan.departure, _or_none(parse_instant)),
        speed_kn=_kept(fields[4], speed, plan.speed_kn, _or_none(parse_speed)),
        trade=_trade(trade),
        figure=_kept(fields[6], figure, plan.figure, figure_named),
        datum=_kept(fields[7], datum, plan.datum, str),
        columns=_kept(fields[9], columns, plan.columns, _columns),
        revision=_whole(revision),
        prepared=_kept(fields[11], names[0], plan.prepared, str),
        checked=_kept(fields[12], names[1], plan.checked, str),
        approved=_kept(fields[13], names[2], plan.approved, str),
    )


def _text(label: str, text: str, hint: str) -> Field:
    """Return a field for any text; what a terminal would obey stands in it as a mark."""
    return Field(label, visible(text), str, hint)


def _kept(field: Field, text: str, value: Value, read: Callable[[str], Value]) -> Value:
    """Return what a text says; the very value where it was not touched: it may be shown rounded, or with marks."""
    return value if text == field.text else read(text)


def _shown(value: Value | None, write: Callable[[Value], str]) -> str:
    return "" if value is None else write(value)


def _or_none(read: Callable[[str], Value]) -> Callable[[str], Value | None]:
    return lambda text: read(text) if text.strip() else None


def _unquoted_limit(limit_deg: float) -> str:
    return values.write_limit(limit_deg).strip('"')


def _stay(text: str) -> timedelta:
    return parse_duration(text) if text.strip() else timedelta()


def _line(text: str) -> Line:
    return Line(_one_of(text, Line, "line"))


def _trade(text: str) -> Trade:
    return Trade(_one_of(text, Trade, "trade"))


def _one_of(text: str, choices: Iterable[str], name: str) -> str:
    """Return the one choice that begins like the text."""
    typed = text.strip().casefold()
    found = [choice for choice in choices if choice.casefold().startswith(typed)]
    if not typed or len(found) != 1:
        raise ParseError(text, (0, len(text)), f"that is no {name}", f"type one of: {', '.join(choices)}")
    return found[0]


def _whole(text: str) -> int:
    if not (text.strip().isascii() and text.strip().isdigit() and len(text.strip()) < 10):
        raise ParseError(text, (0, len(text)), "that is no whole number", "type one from 1")
    return int(text)


def _metres(text: str) -> float:
    return values.read_not_negative(_number(text))


def _number(text: str) -> float:
    try:
        return float(text.strip().removesuffix("m"))
    except ValueError as error:
        raise ParseError(text, (0, len(text)), "that is no number", "type metres, such as 9.8") from error


def _columns(text: str) -> tuple[str, ...]:
    return tuple(name.strip() for name in text.split(",") if name.strip())
