"""What is done on the Passage page, each by one command."""

from __future__ import annotations

from dataclasses import replace
from typing import TYPE_CHECKING

from navcore.plan import edit
from navcore.plan.model import Leg, Line
from navcore.text.plain import visible
from tui.commands import Where
from tui.pages.row_tasks import open_below, open_to_change
from tui.present.rows import RowKind, kind_of, leg_of, row_count, row_of_waypoint, waypoint_of

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping, Sequence

    from navcore.plan.model import Plan
    from tui.pages.desk import Page
    from tui.pages.passage import PassagePage

NO_LEG = "there is no leg yet: a second waypoint makes one"
_NOT_HERE = "that is done to a waypoint: put the cursor on one"


def _edit(page: PassagePage) -> None:
    plan, row = page.session.plan, page.session.row
    kind = kind_of(plan, row)
    if kind is RowKind.WAYPOINT:
        open_to_change(page, row // 2)
    elif kind is RowKind.LEG:
        _edit_leg(page, row // 2)
    else:
        open_below(page)


def _edit_leg(page: PassagePage, index: int) -> None:
    from tui.pages.forms import leg_sheet
    from tui.widgets.form import Form

    sheet, made = leg_sheet(page.session.solution, index)

    def filled(texts: Sequence[str] | None) -> None:
        if texts is not None:
            page.desk.commit(f"change leg {index + 1}", lambda _: made(texts))

    page.app.push_screen(Form(sheet), filled)


def _more(page: PassagePage) -> None:
    from tui.pages.forms import waypoint_sheet
    from tui.widgets.form import Form

    index = _waypoint(page)
    if index is None:
        _edit(page)
        return
    sheet, made = waypoint_sheet(page.session.plan, index)

    def filled(texts: Sequence[str] | None) -> None:
        if texts is not None:
            page.desk.commit(f"change waypoint {index + 1}", lambda _: made(texts))

    page.app.push_screen(Form(sheet), filled)


def _delete(page: Page) -> None:
    index = _waypoint(page)
    if index is None:
        page.desk.say(_NOT_HERE, alert=True)
        return
    name = f"delete waypoint {index + 1}{_name(page.session.plan, index)}"
    row = max(min(page.session.row, row_count(page.session.plan) - 4), 0)
    page.desk.commit(name, lambda plan: edit.delete_waypoint(plan, index), row)


def _move(page: PassagePage, by: int) -> None:
    index = _waypoint(page)
    if index is None:
        page.desk.say(_NOT_HERE, alert=True)
        return
    to = index + by
    if not 0 <= to < len(page.session.plan.waypoints):
        page.desk.say("there is no row beyond", alert=True)
        return
    name = f"move waypoint {index + 1}{_name(page.session.plan, index)} {'up' if by < 0 else 'down'}"
    page.desk.commit(name, lambda plan: edit.move_waypoint(plan, index, to), row_of_waypoint(to))


def _copy(page: PassagePage) -> None:
    index = _waypoint(page)
    if index is None:
        page.desk.say(_NOT_HERE, alert=True)
        return
    name = f"duplicate waypoint {index + 1}{_name(page.session.plan, index)}"
    page.desk.commit(name, lambda plan: edit.duplicate_waypoint(plan, index), row_of_waypoint(index + 1))


def _reverse(page: PassagePage) -> None:
    page.desk.commit("reverse the passage", edit.reverse)


def _cycle_line(page: Page) -> None:
    plan = page.session.plan
    index = leg_of(plan, page.session.row)
    if index is None:
        page.desk.say(NO_LEG, alert=True)
        return
    leg = plan.legs[index]
    following = _line_after(plan, leg)
    hint = (
        ""
        if leg.limit_deg is not None or page.where is not Where.PASSAGE
        else "; a composite takes a limiting latitude: Enter on the leg"
    )
    if page.desk.commit(f"leg {index + 1} by {following.value}", lambda p: _with_line(p, index, following)) and hint:
        page.desk.say(f"leg {index + 1} by {following.value} · z takes it back{hint}")


def _line_after(plan: Plan, leg: Leg) -> Line:
    """Return the next line round; a composite only where the leg has a limiting latitude."""
    lines = [line for line in Line if line is not Line.COMPOSITE or leg.limit_deg is not None]
    return lines[(lines.index(plan.line_of(leg)) + 1) % len(lines)]


def _with_line(plan: Plan, index: int, line: Line) -> Plan:
    """Return the plan with a leg's line; the trade's usual one is left to the trade."""
    is_usual = line is plan.line_of(Leg())
    return edit.set_leg(plan, index, replace(plan.legs[index], line=None if is_usual else line))


def _margin(page: PassagePage) -> None:
    page.show_margin(wanted=not page.margin_is_seen)


def _waypoint(page: Page) -> int | None:
    return waypoint_of(page.session.plan, page.session.row)


def _name(plan: Plan, index: int) -> str:
    name = plan.waypoints[index].name
    return f", {visible(name)}" if name else ""


TASKS: Mapping[str, Callable[..., None]] = {
    "edit": _edit,
    "more": _more,
    "delete": _delete,
    "move.up": lambda page: _move(page, -1),
    "move.down": lambda page: _move(page, 1),
    "copy": _copy,
    "reverse": _reverse,
    "line": _cycle_line,
    "margin": _margin,
    "columns.next": lambda page: page.ladder.turn_leaf(1),
    "columns.back": lambda page: page.ladder.turn_leaf(-1),
    "up": lambda page: page.go_to(page.ladder.row - 1),
    "down": lambda page: page.go_to(page.ladder.row + 1),
    "page.up": lambda page: page.go_to(page.ladder.row - page.ladder.rows_in_sight),
    "page.down": lambda page: page.go_to(page.ladder.row + page.ladder.rows_in_sight),
    "first": lambda page: page.go_to(0),
    "last": lambda page: page.go_to(row_count(page.session.plan) - 1),
}
