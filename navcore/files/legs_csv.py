"""Many legs as CSV: which columns hold their ends, and what is worked out for each.

A row is read on its own, so that a file of any length can be taken as a stream.
"""

from __future__ import annotations

import re
from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

from navcore.angles import wrap_180
from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.errors import NavError, ParseError
from navcore.lines import great_circle, rhumb_line
from navcore.text.plain import visible
from navcore.text.position import parse_position

if TYPE_CHECKING:
    from collections.abc import Sequence

    from navcore.earth.figure import Figure

RESULTS = ("rl_course_deg", "rl_distance_nmi", "gc_initial_course_deg", "gc_final_course_deg", "gc_distance_nmi")
"""The columns that are added, in order."""

_DEGREES = ("lat1", "lon1", "lat2", "lon2")
_PLACES = ("from", "to")
_LIMITS_DEG = (90.0, 180.0, 90.0, 180.0)
_TURN_DEG = 360.0
_DECIMAL = r"[+-]?(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d{1,3})?"
_NUMBER = re.compile(_DECIMAL, re.ASCII)
_FOUR_NUMBERS = re.compile(",".join([_DECIMAL] * 4), re.ASCII)

Ends = tuple[float, float, float, float]


class ColumnsError(NavError):
    """The heading names no columns that hold the ends of a leg."""


@dataclass(frozen=True, slots=True)
class LegColumns:
    """Where a file keeps the ends of its legs.

    Attributes:
        headings: Every heading of the file.
        indexes: Four of degrees or two of places.
        old_results: Where results stand already, of an earlier run.
    """

    headings: tuple[str, ...]
    indexes: tuple[int, ...]
    old_results: tuple[int, ...]

    def kept(self, row: Sequence[str]) -> list[str]:
        """Return a row as it is copied: filled to the headings, without the results of an earlier run."""
        filled = [*row, *[""] * (len(self.headings) - len(row))]
        if not self.old_results:
            return filled
        return [cell for index, cell in enumerate(filled) if index not in self.old_results]

    def ends(self, row: Sequence[str]) -> Ends:
        """Return lat1, lon1, lat2, lon2 of a row in degrees.

        Raises:
            NavError: The row can't be read; the message names the column, what is allowed and what to do.
        """
        if not max(self.indexes) < len(row) <= len(self.headings):
            cells = f"{len(row)} cells under {len(self.headings)} headings"
            raise ParseError(",".join(row), (0, 0), cells, "give each heading a cell, quoted where it holds a comma")
        if len(self.indexes) == len(_PLACES):
            start, end = (self._place(row, index) for index in self.indexes)
            return (*start, *end)
        typed = [row[index] for index in self.indexes]
        # Four sound numbers are the rule, so they are looked at together; what is not is looked at cell by cell.
        if _FOUR_NUMBERS.fullmatch(",".join(typed)):
            lat1, lon1, lat2, lon2 = map(float, typed)
            if -90.0 <= lat1 <= 90.0 and -90.0 <= lat2 <= 90.0 and -180.0 <= lon1 <= 180.0 and -180.0 <= lon2 <= 180.0:
                return lat1, lon1, lat2, lon2
        lat1, lon1, lat2, lon2 = (
            self._degrees(row, index, limit) for index, limit in zip(self.indexes, _LIMITS_DEG, strict=True)
        )
        return lat1, lon1, lat2, lon2

    def _place(self, row: Sequence[str], index: int) -> tuple[float, float]:
        try:
            return parse_position(row[index])
        except ParseError as error:
            reason = f"{self.headings[index]}: {error.reason}"
            raise ParseError(error.text, (error.start, error.end), reason, error.advice) from error

    def _degrees(self, row: Sequence[str], index: int, limit_deg: float) -> float:
        cell = row[index].strip()
        span = (0, len(cell))
        if not _NUMBER.fullmatch(cell):
            reason = f"{self.headings[index]}: {cell[:40]!r} is no number"
            raise ParseError(cell, span, reason, "type decimal degrees such as -4.4833")
        value_deg = float(cell)
        if abs(value_deg) > limit_deg:
            reason = f"{self.headings[index]}: {cell[:40]} is outside -{limit_deg:g} to {limit_deg:g} degrees"
            is_turn = limit_deg == 180.0 and abs(value_deg) <= _TURN_DEG
            advice = f"type {wrap_180(value_deg):.15g}" if is_turn else "latitude comes first, longitude second"
            raise ParseError(cell, span, reason, advice)
        return value_deg


def leg_columns(headings: Sequence[str]) -> LegColumns:
    """Return where a file keeps the ends of its legs, by its headings.

    Raises:
        ColumnsError: Neither set of columns is there, or one of them twice.
    """
    plain = [heading.strip().lower() for heading in headings]
    for wanted in (_DEGREES, _PLACES):
        if all(plain.count(name) == 1 for name in wanted):
            old_results = tuple(plain.index(name) for name in RESULTS if name in plain)
            return LegColumns(tuple(headings), tuple(plain.index(name) for name in wanted), old_results)
    found = visible(", ".join(headings)[:200]) or "nothing"
    message = (
        f"the first row holds {found}; allowed: lat1,lon1,lat2,lon2 in decimal degrees, or from,to in any position "
        "form, each once; give the file such a heading row"
    )
    raise ColumnsError(message)


def work(ends: Sequence[Ends], figure: Figure) -> list[list[float]]:
    """Return the results of each leg, in the order and units of RESULTS, unrounded."""
    if not ends:
        return []
    lat1_deg, lon1_deg, lat2_deg, lon2_deg = np.array(ends).T
    rhumb = rhumb_line.inverse(lat1_deg, lon1_deg, lat2_deg, lon2_deg, figure)
    circle = great_circle.inverse(lat1_deg, lon1_deg, lat2_deg, lon2_deg, figure)
    results = (
        rhumb.course_deg,
        rhumb.distance_m / METRES_PER_NAUTICAL_MILE,
        circle.initial_course_deg,
        circle.final_course_deg,
        circle.distance_m / METRES_PER_NAUTICAL_MILE,
    )
    rows: list[list[float]] = np.column_stack(results).tolist()
    return rows
