"""A number and its unit, as one text."""

from __future__ import annotations

import re
from typing import TYPE_CHECKING

from navcore.errors import ParseError
from navcore.text.number import FIGURES, exact
from navcore.text.plain import visible
from navcore.text.scan import plain

if TYPE_CHECKING:
    from collections.abc import Mapping

    Ratio = tuple[int, int]

_MOST_FIGURES = 15
_COMMA = re.compile(r"(\d+),(\d+)", re.ASCII)


def read_quantity(text: str, name: str, units: Mapping[str, Ratio], advice: str) -> float:
    """Return a number times what its unit is worth, rounded once; never negative.

    Args:
        text: What was typed: figures, then a unit with or without a space before it.
        name: What it should be, with its article, for the refusal.
        units: What each unit, in lower case, is worth, as a fraction; "" where none was typed.
        advice: What to type.

    Raises:
        ParseError: Anything else, pointing at what is wrong.
    """
    typed = plain(text, name, advice)
    start = len(typed) - len(typed.lstrip())
    figures = FIGURES.match(typed, start)
    if figures is None:
        reason = f"{name} is never negative" if typed[start] == "-" else f"{name} begins with no figure"
        raise ParseError(text, (start, start + 1), reason, advice)
    if comma := _COMMA.match(typed, start):
        shown = f"type {comma[1]}.{comma[2]} for a fraction, or {comma[1]}{comma[2]} for the whole number"
        raise ParseError(text, comma.span(), "a comma stands among the figures", shown)
    if len(figures[0].partition(".")[0]) > _MOST_FIGURES:
        raise ParseError(text, figures.span(), f"{name} has too many figures", advice)
    top, bottom = exact(figures[0])
    unit_top, unit_bottom = _worth(text, typed, figures.end(), units, advice)
    return top * unit_top / (bottom * unit_bottom)


def _worth(text: str, typed: str, start: int, units: Mapping[str, Ratio], advice: str) -> Ratio:
    unit = typed[start:].strip()
    at = typed.index(unit, start)
    if unit == "M":
        raise ParseError(text, (at, at + 1), "“M” may be nautical miles or metres", "type NM or m")
    worth = units.get(unit.lower())
    if worth is None:
        raise ParseError(text, (at, at + len(unit)), f"“{visible(unit)}” is no unit that is read here", advice)
    return worth
