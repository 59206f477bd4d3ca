"""The line at the top, with the plan and the pages, and the two at the foot: what was done last, and the keys."""

from __future__ import annotations

from typing import TYPE_CHECKING

from textual.content import Content
from textual.widgets import Static

from navcore.text.plain import cell_width, fit, pad, visible
from tui.commands import Where, commands_of, key_shown

if TYPE_CHECKING:
    from collections.abc import Iterable

_GAP = 2
NOT_SAVED = "not saved"


class TitleBar(Static):
    """The passage, its file, and whether it holds changes that are not saved; then the pages."""

    def __init__(self) -> None:
        super().__init__(markup=False)

    def show(self, title: str, file: str, *, is_changed: bool, pages: Iterable[tuple[str, str, bool]]) -> None:
        """Show them.

        Args:
            title: Of the passage.
            file: Its file's name.
            is_changed: Whether it has changes that are not saved.
            pages: Key and name of each page, and whether it is the one that is seen.
        """
        width = max(self.app.size.width - 2, 10)
        tabs = [(f" {key_shown(key)} {name} ", name.lower(), seen) for key, name, seen in pages]
        tabs_cells = sum(cell_width(text) for text, _, _ in tabs)
        mark = f" · {NOT_SAVED}" if is_changed else ""
        room = max(width - tabs_cells - len(mark) - 1, 8)
        left = fit(" · ".join(part for part in (visible(title), visible(file)) if part), room)
        pieces = [Content.styled(pad(left, 0), "bold"), Content.styled(mark, "bold $warning")]
        pieces.append(Content(" " * max(width - cell_width(left) - len(mark) - tabs_cells, 1)))
        for text, command, seen in tabs:
            style = "bold underline" if seen else "$foreground-muted"
            pieces += [_button(text, command, style)]
        self.update(Content("").join(pieces), layout=False)


class KeyBar(Static):
    """The keys of the moment, as many as fit, in the order of the table of commands."""

    def __init__(self) -> None:
        super().__init__(markup=False)

    def show(self, places: tuple[Where, ...]) -> None:
        """Show the keys that work there; those of `?` and of leaving always have their place."""
        commands = [command for where in places for command in commands_of(where) if command.foot]
        always = [command for command in commands if command.id in {"help", "caution"}]
        first = [command for command in commands if command not in always]
        room = self.app.size.width - 2
        room -= sum(len(_key_text(key_shown(each.keys[0]), each.foot)) + _GAP for each in always)
        pieces = []
        for command in [*first, *always]:
            text = _key_text(key_shown(command.keys[0]), command.foot)
            if command not in always:
                if room < len(text):
                    continue
                room -= len(text) + _GAP
            key, _, word = text.partition(" ")
            shown = Content.assemble((key, "bold $secondary"), " ", (word, "$foreground-muted"))
            pieces.append(shown.stylize(f"@click=app.do('{command.id}')"))
        self.update(Content(" " * _GAP).join(pieces), layout=False)


def _key_text(key: str, word: str) -> str:
    return f"{key} {word}"


def _button(text: str, command: str, style: str) -> Content:
    return Content.styled(text, style).stylize(f"@click=app.do('{command}')")


class SaidLine(Static):
    """What was done last, or why it could not be."""

    def __init__(self) -> None:
        super().__init__(markup=False)

    def say(self, words: str, *, alert: bool = False) -> None:
        """Say it until something else is to be said; line ends and controls are shown as marks."""
        self.update(Content.styled(visible(words), "bold $error" if alert else "$foreground-muted"), layout=False)
