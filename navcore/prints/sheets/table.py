"""A table of figures beside a plotting sheet, as printed."""

from __future__ import annotations

from dataclasses import dataclass


@dataclass(frozen=True, slots=True)
class Table:
    """A table of figures.

    Attributes:
        title: What it gives.
        headings: Of the columns.
        rows: Figures as printed.
    """

    title: str
    headings: tuple[str, ...]
    rows: tuple[tuple[str, ...], ...]
