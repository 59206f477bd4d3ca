"""Text of others made safe to print: what can't be seen is shown as a mark, and cells are counted as terminals do.

Names and remarks come from people and files. A control character in one must not move the cursor, a bidirectional
control must not swap figures about, and a character without width must not make two names look alike.
"""

from __future__ import annotations

import unicodedata
from typing import Literal

ELLIPSIS = "…"

# Default-ignorable characters that their category does not give away, and the empty Braille cell.
_UNSEEN = frozenset(
    {0x034F, 0x115F, 0x1160, 0x17B4, 0x17B5, 0x180B, 0x180C, 0x180D, 0x180F, 0x2065, 0x2800, 0x3164, 0xFFA0}
    | set(range(0xFE00, 0xFE10))
    | set(range(0xFFF0, 0xFFF9))
    | set(range(0xE0000, 0xE1000))
)
_UNSEEN_CATEGORIES = frozenset({"Cc", "Cf", "Cs", "Zl", "Zp"})
_JOINERS = "\u200c\u200d"
_VIRAMA_CLASS = 9


def visible(text: str) -> str:
    r"""Return the text with everything that can't be seen, or that would be obeyed, as a mark in its place.

    Controls with a Unicode control picture become it (escape is ␛), everything else its number (‹U+202E›). Joiners
    stay where Arabic and Indic spelling need them, variation selectors after the letter or symbol that they vary; a
    combining mark with nothing before it stands on ◌. Spaces other than line ends stay.
    """
    if text.isascii() and text.isprintable():
        return text
    shown = [
        character if not _is_unseen(character) or _is_spelling(before, character) else _mark(character)
        for before, character in zip(" " + text, text, strict=False)
    ]
    lone = unicodedata.category(shown[0][0]) in {"Mn", "Me", "Mc"}
    return ("◌" if lone else "") + "".join(shown)


def _is_unseen(character: str) -> bool:
    code = ord(character)
    is_noncharacter = code & 0xFFFE == 0xFFFE or 0xFDD0 <= code <= 0xFDEF
    return unicodedata.category(character) in _UNSEEN_CATEGORIES or code in _UNSEEN or is_noncharacter


def _is_spelling(before: str, character: str) -> bool:
    """Say whether an unseen character belongs to the spelling of what stands before it."""
    if _is_unseen(before):
        return False
    if character in _JOINERS:
        return unicodedata.combining(before) == _VIRAMA_CLASS or unicodedata.bidirectional(before) == "AL"
    is_selector = unicodedata.name(character, "").partition("-")[0] == "VARIATION SELECTOR"
    return is_selector and unicodedata.category(before) in {"Lo", "So"}


def _mark(character: str) -> str:
    code = ord(character)
    if code < 0x20:
        return chr(0x2400 + code)
    return "␡" if code == 0x7F else f"‹U+{code:04X}›"


def cell_width(text: str) -> int:
    """Return how many terminal cells a text takes; a control character counts as the mark that `visible` shows."""
    if text.isascii() and text.isprintable():
        return len(text)
    # Imported here because it costs as much as the rest of a command, and most text is ASCII.
    from wcwidth import wcswidth  # noqa: PLC0415

    width = wcswidth(text)
    return width if width >= 0 else cell_width(visible(text))


def pad(text: str, cells: int, align: Literal["left", "right"] = "left") -> str:
    """Return the text filled with spaces to that many cells; a text that takes more comes back as it is."""
    spaces = " " * (cells - cell_width(text))
    return spaces + text if align == "right" else text + spaces


def fit(text: str, cells: int) -> str:
    """Return the text, shortened with … where it takes more than that many cells.

    It is cut between characters as a reader sees them: never within a wide one, nor between a letter and its accent.
    """
    if cell_width(text) <= cells:
        return text
    if cells < 1:
        return ""
    # Imported here for the reason given in cell_width.
    from wcwidth import iter_graphemes  # noqa: PLC0415

    kept = ""
    room = cells - cell_width(ELLIPSIS)
    for character in iter_graphemes(text):
        room -= cell_width(character)
        if room < 0:
            break
        kept += character
    return kept + ELLIPSIS
