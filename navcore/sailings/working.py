"""The working of one problem: what was given, every step in the order a textbook takes it, and which steps answer it.

A worksheet only writes these out: nothing here rounds.
"""

from __future__ import annotations

from dataclasses import dataclass
from enum import StrEnum
from typing import TYPE_CHECKING

from navcore.errors import NoAnswerError
from navcore.position import Position

if TYPE_CHECKING:
    from collections.abc import Iterator


class StepKind(StrEnum):
    """What a step's value is, and so how it is written."""

    LATITUDE = "latitude"
    """Degrees, north positive."""
    LONGITUDE = "longitude"
    """Degrees, east positive."""
    NORTH_MIN = "minutes, named N or S"
    """Minutes of arc, north positive."""
    EAST_MIN = "minutes, named E or W"
    """Minutes of arc, east positive."""
    EAST_NMI = "NM, named E or W"
    """Nautical miles, east positive."""
    DISTANCE_NMI = "NM"
    COURSE = "course"
    """Degrees, [0, 360)."""
    ANGLE = "angle"
    """Degrees."""
    NUMBER = "number"
    """A sine, a haversine, or another figure without unit."""


@dataclass(frozen=True, slots=True)
class Step:
    """One line of a working.

    Attributes:
        symbol: What it is called, unique in its working: "d.lat", "DMP", "course".
        words: How it is got from the lines above, in words.
        value: Unrounded, in the unit of the kind; None where it has no value, and a remark says why.
        kind: What the value is.
    """

    symbol: str
    words: str
    value: float | None
    kind: StepKind


@dataclass(frozen=True, slots=True)
class Working:
    """One problem worked through.

    Attributes:
        method: The sailing, by its usual name.
        basis: What the figures rest on: the figure of the Earth and the mile.
        given: What the problem states.
        steps: Every intermediate value in order, each found from lines above it.
        results: Symbols of the lines that answer the problem.
        remarks: Why a value is missing, or what rule was taken instead of a formula.
    """

    method: str
    basis: str
    given: tuple[Step, ...]
    steps: tuple[Step, ...]
    results: tuple[str, ...]
    remarks: tuple[str, ...] = ()

    def line(self, symbol: str) -> Step:
        """Return a line by its symbol.

        Raises:
            KeyError: The working has no such line.
        """
        for step in self._lines():
            if step.symbol == symbol:
                return step
        raise KeyError(symbol)

    def value(self, symbol: str) -> float | None:
        """Return the value of a line; None where it has none."""
        return self.line(symbol).value

    def number(self, symbol: str) -> float:
        """Return the value of a line that has one.

        Raises:
            NoAnswerError: It has none; the message carries the remarks.
        """
        value = self.line(symbol).value
        if value is None:
            raise NoAnswerError(f"{self.method}: no {symbol}; " + "; ".join(self.remarks))
        return value

    @property
    def position(self) -> Position:
        """Position 2: where the leg or run ends."""
        return Position(self.number("lat 2"), self.number("long 2"))

    def _lines(self) -> Iterator[Step]:
        yield from self.given
        yield from self.steps


def given_positions(start: Position, end: Position) -> tuple[Step, ...]:
    """Return two positions as given lines."""
    return (
        Step("lat 1", "given", start.lat_deg, StepKind.LATITUDE),
        Step("long 1", "given", start.lon_deg, StepKind.LONGITUDE),
        Step("lat 2", "given", end.lat_deg, StepKind.LATITUDE),
        Step("long 2", "given", end.lon_deg, StepKind.LONGITUDE),
    )


def given_run(start: Position, course_deg: float, distance_nmi: float) -> tuple[Step, ...]:
    """Return a position, a course and a distance as given lines."""
    return (
        Step("lat 1", "given", start.lat_deg, StepKind.LATITUDE),
        Step("long 1", "given", start.lon_deg, StepKind.LONGITUDE),
        Step("course", "given", course_deg, StepKind.COURSE),
        Step("distance", "given", distance_nmi, StepKind.DISTANCE_NMI),
    )
