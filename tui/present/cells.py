"""A picture in cells: Braille dots below, words above, each cell in one tone."""

from __future__ import annotations

import unicodedata
from typing import TYPE_CHECKING

import numpy as np

from navcore.text.plain import cell_width
from tui.present.tone import Piece, Tone

if TYPE_CHECKING:
    import numpy.typing as npt

    from tui.present.dots import Patterns
    from tui.present.tone import Line

    Codes = npt.NDArray[np.uint32]

_TONES = tuple(Tone)
_NO_DOTS = 0x2800
_SPACE = 0x20
_SECOND = 0xFFFF
"""Stands in the second cell of a wide character; no character itself."""


class Cells:
    """A picture of so many cells, drawn from the farthest layer to the nearest."""

    def __init__(self, columns: int, rows: int) -> None:
        """Make an empty one."""
        self.columns, self.rows = columns, rows
        self._dots = np.zeros((rows, columns), dtype=np.uint8)
        self._letters = np.zeros((rows, columns), dtype=np.uint32)
        self._tones = np.full((rows, columns), _TONES.index(Tone.PLAIN), dtype=np.uint8)
        # Asked far oftener than anything is written, so kept in what answers fastest.
        self._taken = [bytearray(columns) for _ in range(rows)]

    def lay(self, patterns: Patterns, tone: Tone, *, hides: bool = False) -> None:
        """Lay dots over those that are there; a cell takes the tone of the last that lit any of it.

        Args:
            patterns: The dots of each cell, shape (rows, columns).
            tone: Their tone.
            hides: Whether the dots that were there go, in the cells that these light.
        """
        touched = patterns != 0
        if hides:
            self._dots[touched] = 0
        self._dots |= patterns
        self._tones[touched] = _TONES.index(tone)

    def is_free(self, column: int, row: int, width: int) -> bool:
        """Say whether a row has so many cells from a column on, none with a letter in it."""
        if row < 0 or row >= self.rows or column < 0 or column + width > self.columns:
            return False
        return 1 not in self._taken[row][column : column + width]

    def write(self, column: int, row: int, text: str, tone: Tone) -> None:
        """Write a text, spelled for cells, over what is there; what has no room on the right is left out."""
        for character in text:
            width = cell_width(character)
            if not (0 <= row < self.rows and column >= 0 and column + width <= self.columns):
                return
            self._letters[row, column] = ord(character)
            self._letters[row, column + 1 : column + width] = _SECOND
            self._taken[row][column : column + width] = b"\x01" * width
            self._tones[row, column : column + width] = _TONES.index(tone)
            column += width

    def lines(self) -> list[Line]:
        """Return the picture as lines of pieces."""
        codes = np.where(self._dots != 0, self._dots.astype(np.uint32) + _NO_DOTS, _SPACE)
        codes = np.where(self._letters != 0, self._letters, codes).astype("<u4")
        # An empty cell takes the tone of the one before it, so that it ends no piece.
        shown = np.maximum.accumulate(np.where(codes != _SPACE, np.arange(self.columns), 0), axis=1)
        tones = np.take_along_axis(self._tones, shown, axis=1)
        starts = np.ones(codes.shape, dtype=bool)
        starts[:, 1:] = tones[:, 1:] != tones[:, :-1]
        return [_line(codes[row], tones[row], np.flatnonzero(starts[row]).tolist()) for row in range(self.rows)]


def _line(codes: Codes, tones: Patterns, starts: list[int]) -> Line:
    whole = codes.tobytes().decode("utf-32-le")
    ends = [*starts[1:], len(whole)]
    return tuple(
        Piece(whole[first:last].replace(chr(_SECOND), ""), _TONES[tones[first]])
        for first, last in zip(starts, ends, strict=True)
    )


def spelled(text: str) -> str:
    """Return a text with a character for each cell or two: what has no width of its own is composed, or left out."""
    if text.isascii():
        return text
    return "".join(character for character in unicodedata.normalize("NFC", text) if cell_width(character) > 0)
