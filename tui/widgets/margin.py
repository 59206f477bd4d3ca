"""The margin: the working of the leg under the cursor."""

from __future__ import annotations

from typing import TYPE_CHECKING

from textual.containers import VerticalScroll
from textual.widgets import Static

from tui.present.tone import content

if TYPE_CHECKING:
    from textual.app import ComposeResult

    from tui.present.tone import Line


class Margin(VerticalScroll, can_focus=False):
    """Lines beside the page; longer than it, they scroll with the mouse."""

    def compose(self) -> ComposeResult:
        """One text."""
        yield Static(markup=False)

    def __init__(self) -> None:
        super().__init__()
        self._line_count = 0

    def show(self, lines: list[Line]) -> None:
        """Show the working of a leg, as many lines as ever: the screen is laid out again only where they get more."""
        grows = len(lines) > self._line_count
        self._line_count = max(self._line_count, len(lines))
        blank: list[Line] = [()] * (self._line_count - len(lines))
        self.query_one(Static).update(content([*lines, *blank]), layout=grows)
