"""Rows of a CSV stream, in which a broken row costs no other its place.

A quote that is never closed would swallow every row after it. Here only the line on which it opens is unreadable: the
lines that it took are read again as rows of their own.
"""

from __future__ import annotations

import csv
from collections import deque
from dataclasses import dataclass
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from collections.abc import Iterable, Iterator


@dataclass(frozen=True, slots=True)
class CsvRow:
    """One row.

    Attributes:
        line: The line of the file on which it begins, from 1.
        cells: Its cells; of a broken row as far as they can be told.
        fault: What is wrong with it as CSV; None for a sound row.
    """

    line: int
    cells: list[str]
    fault: str | None = None


class _Lines:
    """Lines of a stream that can be given back."""

    def __init__(self, lines: Iterable[str]) -> None:
        self._lines = iter(lines)
        self._given_back: deque[str] = deque()
        self.taken: list[str] = []

    def __iter__(self) -> Iterator[str]:
        return self

    def __next__(self) -> str:
        line = self._given_back.popleft() if self._given_back else next(self._lines)
        self.taken.append(line)
        return line

    def give_back_all_but_first(self) -> str:
        """Give back the lines taken since the last row, the first one aside; return that one."""
        first, *rest = self.taken
        self._given_back.extendleft(reversed(rest))
        self.taken = [first]
        return first


def csv_rows(stream: Iterable[str]) -> Iterator[CsvRow]:
    """Yield the rows of a stream of lines, by RFC 4180; a blank line is no row."""
    lines = _Lines(stream)
    reader = csv.reader(lines, strict=True)
    line = 1
    while True:
        lines.taken = []
        try:
            row = CsvRow(line, next(reader))
        except StopIteration:
            return
        except csv.Error as error:
            first = lines.give_back_all_but_first()
            row = CsvRow(line, _as_far_as_can_be_told(first), str(error))
        line += len(lines.taken)
        if row.cells:
            yield row


def _as_far_as_can_be_told(line: str) -> list[str]:
    try:
        return next(csv.reader([line]))
    except csv.Error:
        return [line.rstrip("\r\n")]
