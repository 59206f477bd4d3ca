"""Where the rows stand when room is left among them for a row that is typed."""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Gap:
    """Room among the rows.

    Attributes:
        row: The row before which it stands, or which it covers.
        lines: How many lines it takes; 0 for none.
        covers: Whether it takes the place of the row.
    """

    row: int = 0
    lines: int = 0
    covers: bool = False

    @property
    def more(self) -> int:
        """How many lines the rows take more than without it."""
        return self.lines - 1 if self.covers and self.lines else self.lines

    def line_of(self, row: int) -> int:
        """Return the line on which a row stands."""
        first_below = self.row + 1 if self.covers else self.row
        return row + (self.more if row >= first_below else 0)

    def row_at(self, line: int) -> int | None:
        """Return the row on a line; None in the gap."""
        if line < self.row or not self.lines:
            return line
        return None if line < self.row + self.lines else line - self.more
