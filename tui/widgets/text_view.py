"""A text of any length and width, to read as it would be printed."""

from __future__ import annotations

from typing import TYPE_CHECKING, ClassVar

from textual.binding import Binding
from textual.containers import Vertical, VerticalScroll
from textual.content import Content
from textual.screen import ModalScreen
from textual.widgets import Static

if TYPE_CHECKING:
    from collections.abc import Mapping

    from textual.app import ComposeResult
    from textual.binding import BindingType

SIDE_CELLS = 16


class TextView(ModalScreen[str]):
    """Lines to read; the key that was pressed of those that it offers, "" where it was stepped back from."""

    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("escape,q", "give('')", show=False),
        Binding("up", "scroll(0, -1)", show=False),
        Binding("down", "scroll(0, 1)", show=False),
        Binding("pageup", "scroll(0, -15)", show=False),
        Binding("pagedown,space", "scroll(0, 15)", show=False),
        Binding("left", f"scroll(-{SIDE_CELLS}, 0)", show=False),
        Binding("right", f"scroll({SIDE_CELLS}, 0)", show=False),
    ]

    def __init__(self, title: str, text: str, offered: Mapping[str, str] | None = None) -> None:
        super().__init__()
        self._title = title
        self._text = text
        self._offered = dict(offered or {})
        for key in self._offered:
            self._bindings.bind(key, f"give('{key}')", show=False)

    def compose(self) -> ComposeResult:
        """A title, the text, and what can be done."""
        offered = "".join(f" · {key} {words}" for key, words in self._offered.items())
        with Vertical(classes="dialog text-view"):
            yield Static(Content(self._title), classes="dialog-title", markup=False)
            with VerticalScroll(can_focus=False):
                yield Static(Content(self._text), markup=False)
            yield Static(f"↑ ↓ ← → to read on{offered} · Esc back", classes="dialog-foot", markup=False)

    def action_give(self, key: str) -> None:
        """Close it with a key."""
        self.dismiss(key)

    def action_scroll(self, across: int, down: int) -> None:
        """Move the text."""
        self.query_one(VerticalScroll).scroll_relative(x=across, y=down, animate=False)
