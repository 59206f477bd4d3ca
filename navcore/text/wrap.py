"""Text folded into lines of so many terminal cells."""

from __future__ import annotations

import textwrap

from navcore.text.plain import cell_width


def wrap(text: str, cells: int) -> list[str]:
    """Return the lines of a text, none wider than that many cells; a long word is broken, nothing is lost.

    An empty text has no lines.
    """
    if text and cell_width(text) <= cells:
        return [text]
    if text.isascii():
        return textwrap.wrap(text, max(cells, 1))
    # Imported here because it costs as much as the rest of a command, and most text is ASCII.
    from wcwidth import wrap as wrap_cells  # noqa: PLC0415

    return wrap_cells(text, max(cells, 2))
