"""The row that is typed, in lines: its text with the cursor in it, and below that what it would come to."""

from __future__ import annotations

from typing import TYPE_CHECKING

from navcore.text.plain import cell_width, fit, pad, visible
from tui.present.echo import echo
from tui.present.page_lines import MARK
from tui.present.tone import Piece, Tone, line

if TYPE_CHECKING:
    from navcore.plan.model import Plan
    from tui.journal import Typing
    from tui.present.tone import Line


def open_row_lines(typing: Typing, at: int, plan: Plan, width: int, cells: tuple[int, int]) -> list[Line]:
    """Return the lines of an open row.

    Args:
        typing: What is typed, and where.
        at: How many characters stand before the cursor.
        plan: The plan that it goes into.
        width: Cells of a line.
        cells: Of the number, and of all that stands before the text.
    """
    number_cells, indent = cells
    room = max(width - indent, 10)
    start = Piece(pad(f"{MARK}{typing.index + 1:>{number_cells}}", indent), Tone.STRONG)
    said = [*_waiting(typing, room), *echo(typing.text, plan, typing.index, room, changes=typing.changes)]
    below = [(Piece(" " * indent), *pieces) for pieces in said]
    return [(start, *_with_cursor(typing.text, at, room)), *below]


def _with_cursor(text: str, at: int, room: int) -> Line:
    """Return the part of a text around the cursor that has room."""
    before, under, after = visible(text[:at]), visible(text[at : at + 1]) or " ", visible(text[at + 1 :])
    while before and cell_width(before) + cell_width(under) > room:
        before = before[max(len(before) - room, 1) :] if len(before) > room else before[1:]
    left = max(room - cell_width(before) - cell_width(under), 0)
    return line(Piece(before, Tone.STRONG), Piece(under, Tone.CURSOR), Piece(fit(after, left), Tone.STRONG))


def _waiting(typing: Typing, room: int) -> list[Line]:
    """Name the pasted lines that are still to be mended, the one in the row first."""
    if not typing.waiting:
        return []
    first, *others = (str(number) for number, _, _ in typing.waiting)
    words = f"line {first} of what was pasted: mend it, or empty it to leave it out"
    shown = [line(Piece(fit(words, room), Tone.HEAD))]
    if others:
        shown.append(line(Piece(fit(f"then {len(others)} more: {', '.join(others)}", room), Tone.HEAD)))
    return shown
