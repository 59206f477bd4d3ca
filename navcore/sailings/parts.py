"""How a great circle or composite is split into rhumb-line parts that can be steered, and how that is written."""

from __future__ import annotations

import re
from dataclasses import dataclass
from enum import StrEnum

from navcore.errors import ParseError
from navcore.text.number import FIGURES, write_number
from navcore.text.plain import visible
from navcore.text.scan import plain


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


_WORDS = {
    PartsRule.LONGITUDE: "° longitude",
    PartsRule.DISTANCE: " NM",
    PartsRule.NUMBER: " parts",
    PartsRule.SEPARATION: " NM apart",
}
_ENDINGS = {
    PartsRule.LONGITUDE: re.compile(r"(?:°|deg(?:rees?)?)? *(?:of +)?longitude", re.IGNORECASE),
    PartsRule.DISTANCE: re.compile(r"nm", re.IGNORECASE),
    PartsRule.NUMBER: re.compile(r"parts", re.IGNORECASE),
    PartsRule.SEPARATION: re.compile(r"nm *apart", re.IGNORECASE),
}
_MOST = {PartsRule.LONGITUDE: 90.0, PartsRule.NUMBER: 1000.0}
_MOST_FIGURES = 15
_ADVICE = "type one of: 10° longitude, 300 NM, 12 parts, 1 NM apart"


def parse_parts(text: str) -> Parts:
    """Return the rule that a text says: 10° longitude, 300 NM, 12 parts, or 1 NM apart.

    Raises:
        ParseError: Anything else, naming the four forms; an amount of 0, longitude over 90°, or parts that are not a
            whole number from 2 to 1000.
    """
    typed = plain(text, "the rule for the parts", _ADVICE)
    start, end = len(typed) - len(typed.lstrip()), len(typed.rstrip())
    figures = FIGURES.match(typed, start, end)
    if figures is None or len(figures[0].partition(".")[0]) > _MOST_FIGURES:
        raise ParseError(text, (start, end), "the rule for the parts begins with no amount", _ADVICE)
    words = typed[figures.end() : end].strip()
    for rule, ending in _ENDINGS.items():
        if ending.fullmatch(words):
            return Parts(rule, _amount(text, figures, rule))
    reason = f"“{visible(words)}” is no rule for the parts" if words else "the amount of the parts has no unit"
    raise ParseError(text, (end - len(words), end), reason, _ADVICE)


def _amount(text: str, figures: re.Match[str], rule: PartsRule) -> float:
    amount = float(figures[0])
    wrong = ""
    if amount == 0.0:
        wrong = "is not above 0"
    elif amount > _MOST.get(rule, amount):
        wrong = f"is over {write_number(_MOST[rule])}"
    elif rule is PartsRule.NUMBER and (amount < 2.0 or not amount.is_integer()):
        wrong = "is no whole number from 2 to 1000"
    if wrong:
        reason = f"{figures[0]}{_WORDS[rule]} {wrong}"
        raise ParseError(text, figures.span(), reason, _ADVICE)
    return amount


def format_parts(parts: Parts) -> str:
    """Return a rule as it is written in a plan, such as 10° longitude; parse_parts reads the very same rule."""
    return f"{write_number(parts.amount)}{_WORDS[parts.rule]}"
