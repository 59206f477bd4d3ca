"""A plan to open: those of last time, those in a folder, or a path that is typed."""

from __future__ import annotations

from pathlib import Path
from typing import TYPE_CHECKING, ClassVar

from textual import on
from textual.binding import Binding
from textual.containers import Vertical
from textual.content import Content
from textual.screen import ModalScreen
from textual.widgets import Input, OptionList, Static
from textual.widgets.option_list import Option

from navcore.text.plain import fit, pad, visible
from tui.widgets.safe_input import SafeInput

if TYPE_CHECKING:
    from collections.abc import Sequence

    from textual.app import ComposeResult
    from textual.binding import BindingType

_MOST = 500
_SUFFIX = ".toml"
_NAME = 32
_WIDEST, _FRAME = 80, 8
"""Cells of the widest dialog, and of what stands around its lines."""


class FileChoice(ModalScreen[Path | None]):
    """The path of a plan; None where it was stepped back from. Typing narrows the list, or names any other file."""

    AUTO_FOCUS = "Input"

    BINDINGS: ClassVar[list[BindingType]] = [
        Binding("escape", "leave", show=False),
        Binding("up", "move(-1)", show=False),
        Binding("down", "move(1)", show=False),
        Binding("tab", "fill", show=False),
    ]

    def __init__(self, folder: Path, recent: Sequence[Path]) -> None:
        super().__init__()
        self._folder = folder
        self._recent = tuple(recent)
        self._shown: list[Path] = []

    def compose(self) -> ComposeResult:
        """A title, the path, and the list."""
        with Vertical(classes="dialog files"):
            yield Static("Open a plan", classes="dialog-title", markup=False)
            yield SafeInput(placeholder="type a path, or a part of a name", compact=True)
            options = OptionList(markup=False, compact=True)
            options.can_focus = False
            yield options
            yield Static("↑ ↓ and Enter; Tab goes into a folder; Esc back", classes="dialog-foot", markup=False)

    def on_mount(self) -> None:
        """Show the plans of last time first."""
        self._list("")

    def action_leave(self) -> None:
        """Step back."""
        self.dismiss(None)

    def action_move(self, by: int) -> None:
        """Mark another line."""
        options = self.query_one(OptionList)
        if by < 0:
            options.action_cursor_up()
        else:
            options.action_cursor_down()

    def action_fill(self) -> None:
        """Put the marked path where it can be typed on."""
        chosen = self._chosen()
        if chosen is not None and visible(str(chosen)) == str(chosen):
            field = self.query_one(Input)
            field.value = f"{chosen}/" if chosen.is_dir() else str(chosen)
            field.cursor_position = len(field.value)

    @on(Input.Changed)
    def _typed(self, event: Input.Changed) -> None:
        self._list(event.value)

    @on(Input.Submitted)
    def _submitted(self, event: Input.Submitted) -> None:
        chosen = self._chosen()
        typed = Path(event.value.strip()).expanduser() if event.value.strip() else None
        if typed is not None and typed.is_file():
            self.dismiss(typed)
        elif chosen is not None and chosen.is_dir():
            self.action_fill()
        elif chosen is not None or typed is not None:
            self.dismiss(chosen or typed)

    @on(OptionList.OptionSelected)
    def _picked(self, event: OptionList.OptionSelected) -> None:
        event.stop()
        chosen = self._shown[event.option_index]
        if chosen.is_dir():
            self.action_fill()
        else:
            self.dismiss(chosen)

    def _chosen(self) -> Path | None:
        at = self.query_one(OptionList).highlighted
        return self._shown[at] if at is not None and at < len(self._shown) else None

    def _list(self, typed: str) -> None:
        if "/" in typed:
            folder, _, part = typed.rpartition("/")
            base = Path(folder or "/").expanduser()
            named = [(path, path.name + "/" * path.is_dir()) for path in _plans_in(base)]
        else:
            part = typed
            here = [path for path in _plans_in(self._folder) if not path.is_dir()]
            named = [(path, path.name) for path in dict.fromkeys((*self._recent, *here))]
        found = [(path, name) for path, name in named if part.casefold() in name.casefold()][:_MOST]
        self._shown = [path for path, _ in found]
        options = self.query_one(OptionList)
        options.clear_options()
        cells = min(self.app.size.width, _WIDEST) - _FRAME
        options.add_options(Option(Content(_shown(path, name, cells))) for path, name in found)
        options.highlighted = 0 if found else None


def _shown(path: Path, name: str, cells: int) -> str:
    """Return a plan's name and its folder, as much of that as has room."""
    return fit(f"{pad(visible(name), _NAME)}  {visible(str(path.parent))}", cells)


def _plans_in(folder: Path) -> list[Path]:
    """Return the plans and folders in a folder, folders last; a folder that can't be read has none."""
    try:
        entries = sorted(folder.iterdir())
    except OSError:
        return []
    shown = [path for path in entries if not path.name.startswith(".")]
    plans = [path for path in shown if path.suffix == _SUFFIX]
    return [*plans, *(path for path in shown if path.is_dir())]
