"""A field of one line that never shows a character which a terminal would obey."""

from __future__ import annotations

from typing import TYPE_CHECKING

from textual.widgets import Input

from navcore.text.plain import visible

if TYPE_CHECKING:
    from textual import events


class SafeInput(Input):
    """A field whose pasted text has marks in the place of controls, and of whose several lines the first is taken."""

    def _on_paste(self, event: events.Paste) -> None:
        event.stop()
        event.prevent_default()
        first = next((text for text in event.text.splitlines() if text), "")
        self.replace(visible(first), *sorted(self.selection))
