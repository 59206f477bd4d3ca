"""The chart in the cells of the terminal: shows a picture, and says where it was clicked and how it was rolled."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, ClassVar

from rich.segment import Segment
from textual import events, on
from textual.message import Message
from textual.strip import Strip
from textual.widget import Widget

from tui.present.tone import Tone

if TYPE_CHECKING:
    from rich.style import Style

    from tui.present.tone import Line


class ChartCanvas(Widget):
    """A picture, a line of it at a time."""

    COMPONENT_CLASSES: ClassVar[set[str]] = {f"chart--{tone}" for tone in Tone}

    @dataclass
    class Pointed(Message):
        """A cell was clicked."""

        column: int
        row: int

    @dataclass
    class Rolled(Message):
        """The wheel was rolled: up is nearer."""

        up: bool

    def __init__(self) -> None:
        super().__init__()
        self._lines: list[Line] = []
        self._styles: dict[Tone, Style] = {}

    def show(self, lines: list[Line]) -> None:
        """Show a picture."""
        self._lines = lines
        self.refresh()

    def render_line(self, y: int) -> Strip:
        """Draw one line."""
        pieces = self._lines[y] if y < len(self._lines) else ()
        strip = Strip([Segment(piece.text, self._style(piece.tone)) for piece in pieces])
        return strip.adjust_cell_length(self.size.width, self._style(Tone.PLAIN))

    def notify_style_update(self) -> None:
        """Forget the styles of the theme before."""
        super().notify_style_update()
        self._styles.clear()

    @on(events.Click)
    def _clicked(self, event: events.Click) -> None:
        self.post_message(self.Pointed(event.x, event.y))

    @on(events.MouseScrollUp)
    def _rolled_up(self) -> None:
        self.post_message(self.Rolled(up=True))

    @on(events.MouseScrollDown)
    def _rolled_down(self) -> None:
        self.post_message(self.Rolled(up=False))

    def _style(self, tone: Tone) -> Style:
        if tone not in self._styles:
            self._styles[tone] = self.get_component_rich_style(f"chart--{tone}")
        return self._styles[tone]
