"""The rows of a plan, one under the other: draws only what is seen, so that its cost does not grow with the plan."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, ClassVar, Protocol

from rich.segment import Segment
from rich.style import Style
from textual import events, on
from textual.geometry import Region, Size
from textual.message import Message
from textual.scroll_view import ScrollView
from textual.strip import Strip

from navcore.text.plain import cell_width
from tui.present.grid import make_grid
from tui.present.page_lines import heading_lines, row_line
from tui.present.rows import row_count
from tui.present.tone import Tone
from tui.widgets.gap import Gap

if TYPE_CHECKING:
    from navcore.plan.solve import Solution
    from tui.present.grid import Grid
    from tui.present.tone import Line

HEADING_LINES = 2
_SLACK = 2
"""Rows kept in sight above and below the cursor."""
_NARROWEST = 20


class Keys(Protocol):
    """Who is told at once what was pressed and pasted."""

    def pressed(self, key: str, character: str | None) -> bool:
        """Do what a key says, the character being what it prints; return whether it said anything."""

    def pasted(self, text: str) -> None:
        """Take pasted text."""


class Ladder(ScrollView, can_focus=True, inherit_bindings=False):
    """Waypoints and legs, a line each, under two lines of headings."""

    COMPONENT_CLASSES: ClassVar[set[str]] = {f"ladder--{tone}" for tone in Tone} | {"ladder--here", "ladder--open"}

    @dataclass
    class Moved(Message):
        """The cursor stands on another row."""

        row: int

    class Chosen(Message):
        """The row under the cursor was clicked again."""

    def __init__(self, solution: Solution, keys: Keys) -> None:
        super().__init__()
        self._keys = keys
        self._gap = Gap()
        self._typed: list[Line] = []
        self._solution = solution
        self._measured: Grid | None = None
        self._measured_width = 0
        self._styles: dict[str, Style] = {}
        self._leaf = 0
        self.row = 0

    def show(self, solution: Solution, row: int) -> None:
        """Show a plan and put the cursor on a row."""
        self._solution = solution
        self.row = min(row, row_count(solution.plan) - 1)
        self._measure()

    def turn_leaf(self, by: int) -> None:
        """Show the next columns, or those before."""
        self._leaf = (self._grid.leaf + by) % self._grid.leaves
        self._measure()

    def move_to(self, row: int) -> None:
        """Put the cursor on a row, or on the nearest there is."""
        row = min(max(row, 0), row_count(self._solution.plan) - 1)
        if row == self.row:
            return
        for changed in (self.row, row):
            line = HEADING_LINES + self._gap.line_of(changed) - self.scroll_offset.y
            self.refresh(Region(0, line, self.size.width, 1))
        self.row = row
        self._keep_in_sight(self._gap.line_of(row), 1)
        self.post_message(self.Moved(row))

    @property
    def rows_in_sight(self) -> int:
        """How many rows are seen at once."""
        return max(self.size.height - HEADING_LINES, 1)

    def show_typed(self, gap: Gap, lines: list[Line]) -> None:
        """Show a row that is typed in a gap among the others; a gap without lines closes it."""
        self._gap, self._typed = gap, lines
        self._resize()
        if gap.lines:
            self._keep_in_sight(gap.row, gap.lines)
        self.refresh()

    @property
    def indent(self) -> tuple[int, int]:
        """Cells of a number, and all those before a name: the mark of the cursor, the number, and the gap after it."""
        return self._grid.number_cells, 1 + self._grid.number_cells + len(self._grid.after_number)

    def render_line(self, y: int) -> Strip:
        """Draw one line: a heading, a row, or nothing."""
        if y < HEADING_LINES:
            return self._strip(heading_lines(self._grid, self._solution)[y])
        at = y - HEADING_LINES + self.scroll_offset.y
        in_gap = at - self._gap.row
        if 0 <= in_gap < self._gap.lines:
            return self._strip(self._typed[in_gap], self._style("open"))
        row = self._gap.row_at(at)
        if row is None or row >= row_count(self._solution.plan):
            return Strip.blank(self.size.width, self._style("plain"))
        is_cursor = row == self.row and not self._gap.lines
        pieces = row_line(self._grid, self._solution, row, is_cursor=is_cursor)
        return self._strip(pieces, self._style("here") if is_cursor else None)

    def notify_style_update(self) -> None:
        """Forget the styles of the theme before."""
        super().notify_style_update()
        self._styles.clear()

    @on(events.Resize)
    def _resized(self) -> None:
        self._measure()

    @on(events.Key)
    def _pressed(self, event: events.Key) -> None:
        # Not a message: keys that come in one burst must find the row open that the first of them opened.
        if self._keys.pressed(event.key, event.character if event.is_printable else None):
            event.stop()
            event.prevent_default()

    @on(events.Paste)
    def _pasted(self, event: events.Paste) -> None:
        event.stop()
        self._keys.pasted(event.text)

    @on(events.Click)
    def _clicked(self, event: events.Click) -> None:
        row = self._row_at(event.y)
        if row is None or event.y < HEADING_LINES:
            return
        if row == self.row:
            self.post_message(self.Chosen())
        self.move_to(row)

    @property
    def _grid(self) -> Grid:
        """The columns for the width there is now. One cell is the scrollbar's: no figure may stand under it."""
        width = max(self.outer_size.width - 1, _NARROWEST)
        if self._measured is None or self._measured_width != width:
            self._measured, self._measured_width = make_grid(self._solution, width, self._leaf), width
        return self._measured

    def _measure(self) -> None:
        self._measured = None
        self._resize()
        self.refresh()

    def _resize(self) -> None:
        lines = HEADING_LINES + row_count(self._solution.plan) + self._gap.more
        self.virtual_size = Size(self.outer_size.width - 1, lines)
        self._keep_in_sight(self._gap.line_of(self.row), 1)

    def _row_at(self, y: int) -> int | None:
        row = self._gap.row_at(y - HEADING_LINES + self.scroll_offset.y)
        return row if row is not None and row < row_count(self._solution.plan) else None

    def _keep_in_sight(self, line: int, count: int) -> None:
        room = self.rows_in_sight
        slack = _SLACK if room > count + 2 * _SLACK else 0
        top = self.scroll_offset.y
        if line - slack < top:
            top = max(line - slack, 0)
        elif line + count + slack > top + room:
            top = min(line, line + count + slack - room)
        if top != self.scroll_offset.y:
            self.scroll_to(y=top, animate=False, force=True)

    def _style(self, tone: str) -> Style:
        if tone not in self._styles:
            self._styles[tone] = self.get_component_rich_style(f"ladder--{tone}")
        return self._styles[tone]

    def _strip(self, pieces: Line, over: Style | None = None) -> Strip:
        ground = over or Style()
        segments = [Segment(piece.text, self._style(piece.tone) + ground) for piece in pieces]
        strip = Strip(segments, sum(cell_width(piece.text) for piece in pieces))
        return strip.adjust_cell_length(self.size.width, self._style("plain") + ground)
