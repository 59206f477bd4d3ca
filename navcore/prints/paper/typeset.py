"""Text folded into lines of so many points, by rule: at spaces, and within a word only where it has none."""

from __future__ import annotations

import unicodedata
from itertools import pairwise
from typing import TYPE_CHECKING

from navcore.prints.paper.fonts import width_pt

if TYPE_CHECKING:
    from collections.abc import Iterator

SMALLEST_PT = 8.5
"""No text on paper is smaller: it is read at arm's length, in poor light."""


def fold(text: str, room_pt: float, size_pt: float, *, bold: bool = False) -> list[str]:
    """Return the lines of a printable text, none wider than the room; nothing is lost; an empty text has no lines."""
    lines: list[str] = []
    line = ""
    for word in text.split(" "):
        joined = f"{line} {word}" if line else word
        if width_pt(joined, size_pt, bold=bold) <= room_pt:
            line = joined
            continue
        if line:
            lines.append(line)
        *whole, line = _pieces(word, room_pt, size_pt, bold=bold)
        lines += whole
    return [*lines, line] if line else lines


def fold_at_most(text: str, room_pt: float, size_pt: float, most: int, *, bold: bool = False) -> tuple[list[str], bool]:
    """Return the first lines of a text and whether any are left over; what is cut ends in …."""
    lines = fold(text, room_pt, size_pt, bold=bold)
    if len(lines) <= most:
        return lines, False
    last = lines[most - 1]
    while last and width_pt(f"{last}…", size_pt, bold=bold) > room_pt:
        last = last[:-1]
    return [*lines[: most - 1], f"{last}…"], True


def widest_word_pt(text: str, size_pt: float, *, bold: bool = False) -> float:
    """Return the width of the widest word of a printable text, in points."""
    return max(width_pt(word, size_pt, bold=bold) for word in text.split(" "))


def _pieces(word: str, room_pt: float, size_pt: float, *, bold: bool) -> list[str]:
    """Return a word in pieces that fit, a letter never parted from its accents; one letter is always taken."""
    pieces = [""]
    used_pt = 0.0
    for letter in _letters(word):
        letter_pt = width_pt(letter, size_pt, bold=bold)
        if pieces[-1] and used_pt + letter_pt > room_pt:
            pieces.append("")
            used_pt = 0.0
        pieces[-1] += letter
        used_pt += letter_pt
    return pieces


def _letters(word: str) -> Iterator[str]:
    starts = [index for index, character in enumerate(word) if not index or not unicodedata.combining(character)]
    yield from (word[start:end] for start, end in pairwise([*starts, len(word)]))
