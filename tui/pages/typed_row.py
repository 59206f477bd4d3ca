"""The open row while it is typed: each key at once, so that a burst of them is taken in the order in which it came."""

from __future__ import annotations

from dataclasses import replace
from typing import TYPE_CHECKING

from tui.pages import row_tasks
from tui.present.open_row import open_row_lines
from tui.present.rows import end_row, row_of_waypoint
from tui.widgets.gap import Gap
from tui.widgets.text_line import TextLine

if TYPE_CHECKING:
    from tui.pages.passage import PassagePage


class TypedRow:
    """The cursor in the open row; its text is the session's."""

    def __init__(self, page: PassagePage) -> None:
        self._page = page
        self._line = TextLine()

    def open(self) -> None:
        """Show the row that the session says is typed, the cursor at its end; or none."""
        typing = self._page.session.typing
        text = typing.text if typing else ""
        if text != self._line.text:
            self._line = TextLine(text, len(text))
        self._show()

    def insert(self, text: str) -> None:
        """Put text before the cursor."""
        self._retype(self._line.insert(text))

    def pressed(self, key: str, character: str | None) -> bool:
        """Do what a key says; return whether it said anything."""
        if key == "enter":
            row_tasks.take(self._page)
        elif key == "escape":
            row_tasks.leave(self._page)
        elif (edited := self._line.pressed(key)) is not None:
            self._retype(edited)
        elif character is not None:
            self.insert(character)
        else:
            return False
        return True

    def _retype(self, line: TextLine) -> None:
        """Show what the row has become; the journal takes it up within half a second."""
        self._line = line
        session = self._page.session
        if session.typing is not None:
            session.typing = replace(session.typing, text=line.text)
        self._show()

    def _show(self) -> None:
        page = self._page
        typing, plan, ladder = page.session.typing, page.session.plan, page.ladder
        if typing is None:
            ladder.show_typed(Gap(), [])
            return
        lines = open_row_lines(typing, self._line.at, plan, ladder.size.width - 1, ladder.indent)
        at_end = not typing.changes and typing.index == len(plan.waypoints)
        before = end_row(plan) if at_end else row_of_waypoint(typing.index)
        ladder.show_typed(Gap(before, len(lines), covers=typing.changes or at_end), lines)
