"""What is done with the open row: opened, typed in, taken, pasted into, left."""

from __future__ import annotations

from typing import TYPE_CHECKING

from navcore.errors import ParseError
from navcore.plan.edit import insert_waypoint, set_waypoint
from navcore.plan.entry import read_entries, read_entry, write_entry
from navcore.text.plain import visible
from tui.journal import Typing
from tui.present.rows import place_above, place_below, row_of_waypoint

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping

    from navcore.plan.entry import Entry
    from navcore.plan.model import Waypoint
    from tui.pages.passage import PassagePage


def open_below(page: PassagePage, text: str = "") -> None:
    """Open a row below the cursor, with what was typed so far."""
    session = page.session
    _open(page, Typing(place_below(session.plan, session.row), text))


def open_above(page: PassagePage) -> None:
    """Open a row above the cursor."""
    session = page.session
    _open(page, Typing(place_above(session.plan, session.row), ""))


def open_to_change(page: PassagePage, index: int) -> None:
    """Open the row of a waypoint to change it."""
    _open(page, Typing(index, write_entry(page.session.plan.waypoints[index]), changes=True))


def take(page: PassagePage) -> None:
    """Take the row into the plan and open the next."""
    typing = page.session.typing
    if typing is None:
        return
    if not typing.text.strip():
        _next(page, typing, added=False)
        return
    try:
        entry = read_entry(typing.text, page.session.plan, typing.index)
    except ParseError as error:
        page.desk.say(str(error), alert=True)
        page.app.bell()
        return
    if _committed(page, typing, entry):
        _next(page, typing, added=not typing.changes)


def _committed(page: PassagePage, typing: Typing, entry: Entry) -> bool:
    index, row = typing.index, row_of_waypoint(typing.index)
    if typing.changes:
        changed = entry.on(page.session.plan.waypoints[index])
        name = f"change waypoint {index + 1}{_called(changed)}"
        return page.desk.commit(name, lambda plan: set_waypoint(plan, index, changed), row)
    name = f"add waypoint {index + 1}{_called(entry.waypoint)}"
    return page.desk.commit(name, lambda plan: insert_waypoint(plan, index, entry.waypoint), row)


def paste(page: PassagePage, text: str) -> None:
    """Take pasted text: into the row, or, where it has several lines, as a waypoint each in one step."""
    if page.session.typing is None:
        open_below(page)
    typing = page.session.typing
    if typing is None:
        return
    if len(text.splitlines()) <= 1:
        page.typed.insert(text.strip("\r\n"))
    elif typing.changes or typing.waiting:
        page.desk.say("leave this row with Esc first, then paste", alert=True)
    else:
        _paste_lines(page, typing.index, typing.text + text)


def _paste_lines(page: PassagePage, index: int, text: str) -> None:
    read, added, unread = read_entries(text, page.session.plan, index)
    if added:
        page.desk.commit(f"paste {added} waypoints", lambda _: read, row_of_waypoint(index + added - 1))
    if unread:
        waiting = tuple((line.number, line.index, line.text) for line in unread)
        numbers = ", ".join(str(line.number) for line in unread)
        page.desk.say(f"{added} added; these lines can't be read: {numbers}", alert=True)
        _open(page, Typing(waiting[0][1], waiting[0][2], waiting=waiting))
    else:
        _open(page, Typing(index + added, ""))


def leave(page: PassagePage) -> None:
    """Close the row."""
    _open(page, None)


def _open(page: PassagePage, typing: Typing | None) -> None:
    page.session.typing = typing
    page.session.keep_typing()
    page.typed.open()
    page.desk.show_bars()


def _next(page: PassagePage, typing: Typing, *, added: bool) -> None:
    """Open the next row: the next line that waits, or one below what was added; none after a change or an empty row."""
    waiting = tuple((number, index + added, text) for number, index, text in typing.waiting[1:])
    if waiting:
        _open(page, Typing(waiting[0][1], waiting[0][2], waiting=waiting))
    elif added and not typing.waiting:
        _open(page, Typing(typing.index + 1, ""))
    else:
        _open(page, None)


def _called(waypoint: Waypoint) -> str:
    return f", {visible(waypoint.name)}" if waypoint.name else ""


TASKS: Mapping[str, Callable[..., None]] = {"add.below": open_below, "add.above": open_above}
