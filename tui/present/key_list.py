"""The keys as a list to read, place by place."""

from __future__ import annotations

from typing import TYPE_CHECKING

from navcore.text.plain import pad
from navcore.text.wrap import wrap
from tui.commands import Where, commands_of
from tui.present.tone import Piece, Tone, line

if TYPE_CHECKING:
    from collections.abc import Iterator

    from tui.commands import Command
    from tui.present.tone import Line

_KEYS = 14
_WORDS = 17
_ROOM_FOR_BOTH = 60


def key_lines(cells: int) -> list[Line]:
    """Return every command with its keys, in lines of so many cells."""
    lines: list[Line] = []
    for where in Where:
        lines.append(line(Piece(where.value, Tone.STRONG)))
        for command in commands_of(where):
            lines += _command(command, cells)
        lines.append(line())
    return lines


def _command(command: Command, cells: int) -> Iterator[Line]:
    """Yield the lines of a command; what it does goes below its words where there is no room beside them."""
    words = f"{command.words}  " if cells < _ROOM_FOR_BOTH else pad(command.words, _WORDS)
    indent = _KEYS + (_WORDS if cells >= _ROOM_FOR_BOTH else 2)
    first = (Piece(pad(command.keys_shown or "Ctrl+P", _KEYS), Tone.HEAD), Piece(words))
    does = wrap(command.does, max(cells - indent, 10))
    if cells < _ROOM_FOR_BOTH:
        yield first
    else:
        yield (*first, Piece(does.pop(0), Tone.QUIET))
    yield from (line(Piece(" " * indent + part, Tone.QUIET)) for part in does)
