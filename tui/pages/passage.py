"""The Passage page: the rows of the plan, the row that is typed, and the working of the leg beside them."""

from __future__ import annotations

from typing import TYPE_CHECKING, ClassVar

from textual import events, on
from textual.containers import Container
from textual.widgets import Static

from navcore.prints.caution import CAUTION
from tui.commands import Where, commands_of
from tui.pages import passage_tasks, row_tasks, sailing_tasks
from tui.pages.desk import Page
from tui.pages.typed_row import TypedRow
from tui.present.rows import leg_of
from tui.widgets.keys import bindings_of
from tui.widgets.ladder import Ladder
from tui.widgets.margin import Margin

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping

    from textual.app import ComposeResult
    from textual.binding import BindingType
    from textual.timer import Timer


BESIDE_FROM = 116
"""Cells from which the margin has room beside the rows."""

_SETTLE_S = 0.001
"""How long the cursor must rest before the margin follows it."""

_REST_S = 0.2
"""How long it must rest before the margin works what takes longer than a key may."""

OPENING = f"""Type the first position and press Enter; a name may follow it:
48°30.0'N 125°20.0'W ; Salal Roads

Then the next, as a position or as a course and distance from it:
263.7/300

o opens a plan · i names the passage · ? shows all keys · q leaves

{CAUTION}"""


_COMMANDS = (*commands_of(Where.EVERYWHERE), *commands_of(Where.PASSAGE))
_COMMAND_OF_KEY = {key: command.id for command in _COMMANDS for key in command.keys}


class PassagePage(Page):
    """Waypoints and legs."""

    BINDINGS: ClassVar[list[BindingType]] = bindings_of(Where.PASSAGE)
    where = Where.PASSAGE
    tasks: ClassVar[Mapping[str, Callable[..., None]]] = {
        **passage_tasks.TASKS,
        **row_tasks.TASKS,
        **sailing_tasks.TASKS,
    }

    def __init__(self) -> None:
        super().__init__()
        self.margin_is_wanted: bool | None = None
        self._settling: Timer | None = None
        self.typed = TypedRow(self)

    def compose(self) -> ComposeResult:
        """The rows, and the margin."""
        with Container(id="rows"):
            yield Ladder(self.session.solution, self)
            opening = Static(OPENING, id="opening", markup=False)
            opening.display = not self.session.plan.waypoints
            yield opening
        margin = Margin()
        margin.display = self.margin_is_seen
        self.set_class(self._is_narrow, "-narrow")
        yield margin

    @property
    def ladder(self) -> Ladder:
        """The rows."""
        return self.query_one(Ladder)

    @property
    def is_typing(self) -> bool:
        """Whether a row is open."""
        return self.session.typing is not None

    @property
    def places(self) -> tuple[Where, ...]:
        """The keys of the open row, or of the page."""
        return (Where.ROW,) if self.is_typing else super().places

    def show(self) -> None:
        """Show the plan as it stands."""
        session = self.session
        self.ladder.show(session.solution, session.row)
        self.query_one("#opening").display = not session.plan.waypoints
        self.typed.open()
        self._settle(_SETTLE_S, self._show_margin)

    def take_focus(self) -> None:
        """Have the keys."""
        self.ladder.focus()

    def pressed(self, key: str, character: str | None) -> bool:
        """Do what a key says: to the open row, or as a command; return whether it said anything."""
        if not self.screen.is_current:
            return True  # came too late: a dialog is open by now
        if self.is_typing:
            return self.typed.pressed(key, character)
        if character is not None and (character.isdecimal() or character in "+-"):
            row_tasks.open_below(self, character)
            return True
        command = _COMMAND_OF_KEY.get(key)
        if command is None:
            return False
        self.desk.do(command)
        return True

    def go_to(self, row: int) -> None:
        """Put the cursor on a row, or on the nearest there is."""
        self.ladder.move_to(row)
        self.session.row = self.ladder.row

    def pasted(self, text: str) -> None:
        """Take pasted text."""
        row_tasks.paste(self, text)

    def show_margin(self, *, wanted: bool) -> None:
        """Show the margin, or fold it."""
        self.margin_is_wanted = wanted
        self._lay_out()

    @property
    def margin_is_seen(self) -> bool:
        """Whether the margin is there: as was asked for, else where there is room beside the rows."""
        return not self._is_narrow if self.margin_is_wanted is None else self.margin_is_wanted

    @property
    def _is_narrow(self) -> bool:
        return self.app.size.width < BESIDE_FROM

    @on(events.Resize)
    def _resized(self) -> None:
        self._lay_out()

    def _lay_out(self) -> None:
        self.set_class(self._is_narrow, "-narrow")
        self.query_one(Margin).display = self.margin_is_seen
        self._settle(_SETTLE_S, self._show_margin)
        if self.is_typing:
            self.call_after_refresh(self.typed.open)

    @on(Ladder.Moved)
    def _moved(self, event: Ladder.Moved) -> None:
        self.session.row = event.row
        self._settle(_SETTLE_S, self._show_margin)

    @on(Ladder.Chosen)
    def _chosen(self) -> None:
        if not self.is_typing:
            passage_tasks.TASKS["edit"](self)

    def _show_margin(self) -> None:
        if not self.margin_is_seen:
            return
        from tui.present.working import NARROWEST, is_worked_whole, working

        solution, leg = self.session.solution, leg_of(self.session.plan, self.session.row)
        margin = self.query_one(Margin)
        margin.show(working(solution, leg, max(margin.size.width - 4, NARROWEST)))
        if not is_worked_whole(solution, leg):
            self._settle(_REST_S, self._work_whole)

    def _work_whole(self) -> None:
        from tui.present.working import work_whole

        leg = leg_of(self.session.plan, self.session.row)
        if leg is not None:
            work_whole(self.session.solution, leg)
            self._show_margin()

    def _settle(self, after_s: float, then: Callable[[], None]) -> None:
        """Do something once the cursor has rested, and nothing that was waiting for that before."""
        if self._settling is not None:
            self._settling.stop()
        self._settling = self.set_timer(after_s, then)
