"""The Print page: the leg table as it will be printed, sheet by sheet, and what is written to a file."""

from __future__ import annotations

from typing import TYPE_CHECKING, ClassVar

from textual.containers import VerticalScroll
from textual.widgets import Static

from navcore.errors import NavError
from navcore.prints.column_choice import screen_columns
from navcore.prints.leg_table import make_leg_table
from navcore.prints.text import write_text
from navcore.text.plain import visible
from navcore.text.wrap import wrap
from tui.commands import Where
from tui.pages import print_tasks
from tui.pages.desk import Page
from tui.present.papers import PAPERS, paper_words, sheet_cells, sheet_lines
from tui.present.tone import Piece, Tone, content, line
from tui.widgets.keys import bindings_of

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping

    from textual.app import ComposeResult
    from textual.binding import BindingType

    from navcore.prints.paper.page_layout import Paper


class PrintPage(Page, can_focus=True):
    """The leg table, one sheet at a time."""

    BINDINGS: ClassVar[list[BindingType]] = bindings_of(Where.PRINT)
    where = Where.PRINT
    tasks: ClassVar[Mapping[str, Callable[..., None]]] = print_tasks.TASKS

    def __init__(self) -> None:
        super().__init__()
        self.paper: Paper = PAPERS[0]
        self.columns = ""
        self.sheet = 0
        self._sheets: list[str] = []

    def compose(self) -> ComposeResult:
        """What sheet it is, and the sheet."""
        yield Static(id="sheet-head", markup=False)
        with VerticalScroll(id="sheet", can_focus=False):
            yield Static(id="sheet-text", markup=False)

    def _on_resize(self) -> None:
        self.show()

    def take_focus(self) -> None:
        """Have the keys."""
        self.focus()

    def text(self, cells: int) -> str:
        """Return the leg table as text, as wide as was said.

        Raises:
            NavError: A leg can't be worked, or a column is not known.
        """
        solution = self.session.solution
        table = make_leg_table(solution, screen_columns(solution, self.columns))
        return write_text(table, cells)

    def show(self) -> None:
        """Show the plan as it stands."""
        try:
            lines = self.text(min(sheet_cells(self.paper), self.app.size.width)).split("\n")
        except NavError as error:
            refused = [line(Piece(part, Tone.ALERT)) for part in wrap(str(error), max(self.app.size.width - 6, 20))]
            self._sheets = []
            self.query_one("#sheet-text", Static).update(content(refused))
            self.query_one("#sheet-head", Static).update("The leg table can't be printed yet")
            return
        most = sheet_lines(self.paper)
        self._sheets = ["\n".join(lines[first : first + most]) for first in range(0, len(lines), most)]
        self.turn_to(self.sheet)

    def turn_to(self, sheet: int) -> None:
        """Show a sheet, or the nearest there is."""
        self.sheet = min(max(sheet, 0), max(len(self._sheets) - 1, 0))
        count = len(self._sheets)
        shown = self._sheets[self.sheet] if self._sheets else ""
        self.query_one("#sheet-text", Static).update(content([line(visible(text)) for text in shown.split("\n")]))
        columns = f", columns: {visible(self.columns)}" if self.columns else ""
        head = f"sheet {self.sheet + 1} of {count}, {paper_words(self.paper)}{columns}"
        self.query_one("#sheet-head", Static).update(content([line(Piece(head, Tone.HEAD))]))
        self.query_one("#sheet", VerticalScroll).scroll_home(animate=False)

    def look(self, by: int) -> None:
        """Move what is seen of a sheet that is wider than the page."""
        seen = self.query_one("#sheet", VerticalScroll)
        seen.scroll_relative(x=by * max(seen.size.width // 2, 1), animate=False)

    def turn(self, by: int) -> None:
        """Go on by a part of a sheet that is longer than the page, else to the next sheet."""
        seen = self.query_one("#sheet", VerticalScroll)
        at_edge = seen.scroll_y >= seen.max_scroll_y if by > 0 else seen.scroll_y <= 0
        if not at_edge:
            seen.scroll_relative(y=by * max(seen.size.height - 2, 1), animate=False)
        elif 0 <= self.sheet + by < len(self._sheets):
            self.turn_to(self.sheet + by)
        else:
            self.desk.say("that is the last sheet" if by > 0 else "that is the first sheet")
