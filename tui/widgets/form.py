"""A form: labelled fields, each checked as it is typed, taken all at once or not at all."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, ClassVar

from textual import on
from textual.binding import Binding
from textual.containers import Horizontal, Vertical, VerticalScroll
from textual.content import Content
from textual.screen import ModalScreen
from textual.widgets import Input, Static

from navcore.errors import NavError
from tui.present.tone import Piece, Tone, content, line
from tui.widgets.safe_input import SafeInput

if TYPE_CHECKING:
    from collections.abc import Callable, Sequence

    from textual.app import ComposeResult
    from textual.binding import BindingType


@dataclass(frozen=True, slots=True)
class Field:
    """One field of a form.

    Attributes:
        label: What it is.
        text: What stands in it at first.
        check: Raises a NavError for a text that can't be.
        hint: What may be typed, while it is the one being typed in.
    """

    label: str
    text: str
    check: Callable[[str], object]
    hint: str = ""


@dataclass(frozen=True, slots=True)
class FormSheet:
    """A form to be filled in.

    Attributes:
        title: What it is about.
        fields: Its fields.
        check: Raises a NavError for texts that can't be together.
    """

    title: str
    fields: tuple[Field, ...]
    check: Callable[[Sequence[str]], object]


class Form(ModalScreen[tuple[str, ...] | None]):
    """The texts of all fields; None where it was stepped back from."""

    AUTO_FOCUS = "Input"

    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("escape", "leave", show=False),
        Binding("up,shift+tab", "app.focus_previous", show=False),
        Binding("down,tab", "app.focus_next", show=False),
    ]

    def __init__(self, sheet: FormSheet) -> None:
        super().__init__()
        self._sheet = sheet
        self._fields = sheet.fields

    def compose(self) -> ComposeResult:
        """A title, the fields, and what is said of the one being typed in."""
        with Vertical(classes="dialog form"):
            yield Static(Content(self._sheet.title), classes="dialog-title", markup=False)
            with VerticalScroll(can_focus=False):
                for number, field in enumerate(self._fields):
                    with Horizontal(classes="field"):
                        yield Static(field.label, classes="field-label", markup=False)
                        yield SafeInput(field.text, compact=True, id=f"field-{number}", select_on_focus=True)
            yield Static(id="said", markup=False)
            yield Static("↑ ↓ between fields, Enter takes all, Esc to go back", classes="dialog-foot", markup=False)

    def action_leave(self) -> None:
        """Step back."""
        self.dismiss(None)

    def _trouble(self, number: int) -> str:
        """Return what is wrong in a field; "" for nothing."""
        try:
            self._fields[number].check(self._text(number))
        except NavError as error:
            return str(error)
        return ""

    def _text(self, number: int) -> str:
        return self.query_one(f"#field-{number}", Input).value

    @on(Input.Changed)
    def _changed(self) -> None:
        self._say()

    def on_descendant_focus(self) -> None:
        """Say what may be typed in the field that the cursor has come to."""
        self._say()

    @on(Input.Submitted)
    def _submitted(self) -> None:
        for number in range(len(self._fields)):
            if self._trouble(number):
                self.query_one(f"#field-{number}", Input).focus()
                self._say()
                return
        texts = tuple(self._text(number) for number in range(len(self._fields)))
        try:
            self._sheet.check(texts)
        except NavError as error:
            self.query_one("#said", Static).update(content([line(Piece(str(error), Tone.ALERT))]))
            return
        self.dismiss(texts)

    def _say(self) -> None:
        focused = self.focused
        if focused is None or not (focused.id or "").startswith("field-"):
            return
        number = int((focused.id or "").removeprefix("field-"))
        trouble = self._trouble(number)
        said = Piece(trouble, Tone.ALERT) if trouble else Piece(self._fields[number].hint, Tone.QUIET)
        self.query_one("#said", Static).update(content([line(said)]))
