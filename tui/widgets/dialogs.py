"""Dialogs: something to read, and something to answer. Escape steps back from each."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, ClassVar

from textual import events, on
from textual.binding import Binding
from textual.containers import Vertical, VerticalScroll
from textual.content import Content
from textual.screen import ModalScreen
from textual.widgets import Static

from tui.present.tone import Piece, Tone, content, line

if TYPE_CHECKING:
    from collections.abc import Sequence

    from textual.app import ComposeResult
    from textual.binding import BindingType

    from tui.present.tone import Line


@dataclass(frozen=True, slots=True)
class Answer:
    """One answer to a question.

    Attributes:
        key: The letter that gives it.
        words: What it does.
    """

    key: str
    words: str


class Reading(ModalScreen[None]):
    """Lines to read; any of the keys that leave closes it."""

    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("escape,enter,q,question_mark,exclamation_mark,f1", "dismiss", show=False),
        Binding("up", "scroll(-1)", show=False),
        Binding("down", "scroll(1)", show=False),
        Binding("pageup", "scroll(-10)", show=False),
        Binding("pagedown,space", "scroll(10)", show=False),
    ]

    def __init__(self, title: str, lines: list[Line]) -> None:
        super().__init__()
        self._title = title
        self._lines = lines

    def compose(self) -> ComposeResult:
        """A title, the lines, and how to leave."""
        with Vertical(classes="dialog"):
            yield Static(Content(self._title), classes="dialog-title", markup=False)
            with VerticalScroll(can_focus=False):
                yield Static(content(self._lines), markup=False)
            yield Static("↑ ↓ to read on, Esc to go back", classes="dialog-foot", markup=False)

    def action_scroll(self, by: int) -> None:
        """Move the lines up or down."""
        self.query_one(VerticalScroll).scroll_relative(y=by, animate=False)


class Question(ModalScreen[str]):
    """A question with a few answers; "" where it was stepped back from."""

    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("escape", "give('')", show=False),
        Binding("up", "move(-1)", show=False),
        Binding("down", "move(1)", show=False),
        Binding("enter", "take", show=False),
    ]

    def __init__(self, title: str, lines: list[Line], answers: Sequence[Answer]) -> None:
        super().__init__()
        self._title = title
        self._lines = lines
        self._answers = answers
        self._at = 0

    def compose(self) -> ComposeResult:
        """A title, what is asked, and the answers."""
        with Vertical(classes="dialog"):
            yield Static(Content(self._title), classes="dialog-title", markup=False)
            with VerticalScroll(can_focus=False):
                yield Static(content(self._lines), markup=False)
            yield Static(self._shown(), id="answers", markup=False)
            yield Static("a letter, or ↑ ↓ and Enter; Esc to go back", classes="dialog-foot", markup=False)

    def action_give(self, key: str) -> None:
        """Give an answer."""
        self.dismiss(key)

    def action_take(self) -> None:
        """Give the answer that is marked."""
        self.dismiss(self._answers[self._at].key)

    def action_move(self, by: int) -> None:
        """Mark another answer."""
        self._at = (self._at + by) % len(self._answers)
        self.query_one("#answers", Static).update(self._shown())

    @on(events.Key)
    def _lettered(self, event: events.Key) -> None:
        if event.character in {answer.key for answer in self._answers}:
            event.stop()
            self.dismiss(event.character)

    def _shown(self) -> Content:
        lines = []
        for number, answer in enumerate(self._answers):
            is_marked = number == self._at
            tone = Tone.STRONG if is_marked else Tone.PLAIN
            mark = "► " if is_marked else "  "
            lines.append(line(Piece(f"{mark}{answer.key}  {answer.words}", tone)))
        return content(lines)
