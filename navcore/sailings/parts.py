"""How a great circle or composite is split into rhumb-line parts that can be steered."""

from __future__ import annotations

from dataclasses import dataclass
from enum import StrEnum


class PartsRule(StrEnum):
    """What the amount of a rule counts."""

    LONGITUDE = "longitude"
    DISTANCE = "distance"
    NUMBER = "number"
    SEPARATION = "separation"


@dataclass(frozen=True, slots=True)
class Parts:
    """A rule for splitting a leg.

    Attributes:
        rule: What the amount counts.
        amount: Degrees between whole meridians, NM along the line, number of parts, or the most NM that a part may lie
            from the true line. Above 0; a number of parts is whole.
    """

    rule: PartsRule
    amount: float
