"""Directions in three figures with the letter of their kind, alterations to a named side, and minutes of arc."""

from __future__ import annotations

import re

from navcore.errors import ParseError
from navcore.text.number import decimal_text, format_number, rounded, write_number
from navcore.text.plain import visible
from navcore.text.scan import plain

MARINE_SIDES = ("stbd", "port")
AVIATION_SIDES = ("right", "left")

_KINDS = {"T": "true", "M": "magnetic", "C": "compass", "G": "grid"}
_DIRECTION = re.compile(r"(?P<figures>\d{1,3}(?:\.\d+)?) *°? *(?P<letter>[A-Za-z]?)", re.ASCII)
_QUADRANTAL = re.compile(r"([NS]) *(\d{1,2}(?:\.\d+)?) *°? *([EW])", re.ASCII | re.IGNORECASE)


def parse_direction(text: str, letter: str = "T") -> float:
    """Return a direction in degrees, [0, 360): 045, 45.5, 045°T; 360 is 0.

    Args:
        text: What was typed.
        letter: The letter that may follow: T true, M magnetic, C compass, G grid; "" for none.

    Raises:
        ParseError: Anything else; a quadrantal direction is shown in three figures.
    """
    advice = f"type three figures, 000 to 360, such as 045.5{letter}"
    typed = plain(text, "the direction", advice)
    start, end = len(typed) - len(typed.lstrip()), len(typed.rstrip())
    match = _DIRECTION.fullmatch(typed, start, end)
    if match is None:
        _refuse_form(text, typed, (start, end), letter)
        raise ParseError(text, (start, end), "that is no direction in figures", advice)
    found = match["letter"].upper()
    if found not in {"", letter}:
        wanted = f"{_KINDS[letter]} ({letter})" if letter in _KINDS else "without a letter"
        reason = f"{found} says {_KINDS[found]}" if found in _KINDS else f"“{found}” is no letter of a direction"
        advice = f"type the direction {wanted}, such as {match['figures']}{letter}"
        raise ParseError(text, match.span("letter"), reason, advice)
    direction_deg = float(match["figures"])
    if direction_deg > 360.0:
        raise ParseError(text, match.span("figures"), f"{match['figures']}° is over 360°", advice)
    return 0.0 if direction_deg == 360.0 else direction_deg


def _refuse_form(text: str, typed: str, span: tuple[int, int], letter: str) -> None:
    """Raise for the forms that have an answer of their own."""
    shown = typed[span[0] : span[1]]
    if match := _QUADRANTAL.fullmatch(shown):
        from_north_deg = float(match[2])
        if from_north_deg <= 90.0:
            from_north_deg = from_north_deg if match[1] in "Nn" else 180.0 - from_north_deg
            meant = from_north_deg if match[3] in "Ee" else 360.0 - from_north_deg
            figures = write_number(round(meant % 360.0, 6))
            filled = figures.zfill(len(figures) + 3 - len(figures.partition(".")[0]))
            reason = "directions are read from 000 to 360, not by quadrants"
            raise ParseError(text, span, reason, f"type {filled}{letter} for {visible(shown)}")
    if "," in shown and shown.replace(",", ".", 1).replace(".", "", 1).isdigit():
        at = typed.index(",")
        raise ParseError(text, (at, at + 1), "a comma stands where a point goes", f"type {shown.replace(',', '.')}")
    if shown.startswith("-"):
        reason = "a direction has no sign"
        raise ParseError(text, (span[0], span[0] + 1), reason, "type it from 000 to 360: 5° west of north is 355")


def format_direction(direction_deg: float, letter: str = "T", decimals: int = 1) -> str:
    """Return a direction in three figures with its letter, such as 045.0°T; what rounds to 360 is 000.0.

    Args:
        direction_deg: Any finite angle; whole turns are left out.
        letter: T true, M magnetic, C compass, G grid.
        decimals: 0 or more.

    Raises:
        RangeError: The direction is not finite.
    """
    scale = 10**decimals
    return f"{decimal_text(rounded(direction_deg, scale) % (360 * scale), decimals, 3)}°{letter}"


def format_alteration(alteration_deg: float, sides: tuple[str, str] = MARINE_SIDES, decimals: int = 1) -> str:
    """Return a change of course and its side, such as 43.1° stbd; what rounds to zero has no side.

    Args:
        alteration_deg: To starboard, or right, positive.
        sides: The words for positive and negative, MARINE_SIDES or AVIATION_SIDES.
        decimals: 0 or more.

    Raises:
        RangeError: The alteration is not finite.
    """
    return _named(alteration_deg, "°", sides, decimals)


def format_angle(angle_deg: float, decimals: int = 1) -> str:
    """Return an angle that is no direction, such as the convergency 64.7°.

    Raises:
        RangeError: The angle is not finite.
    """
    return f"{format_number(angle_deg, decimals)}°"


def format_minutes_of_arc(minutes: float, names: tuple[str, str] | None = None, decimals: int = 1) -> str:
    """Return minutes of arc, such as 430.0' S with their name; without names a negative value has its sign.

    Args:
        minutes: North, east or simply more positive.
        names: The names of positive and negative: ("N", "S") for d.lat, ("E", "W") for d.long and departure.
        decimals: 0 or more.

    Raises:
        RangeError: The value is not finite.
    """
    if names is None:
        return f"{format_number(minutes, decimals)}'"
    return _named(minutes, "'", names, decimals)


def _named(value: float, mark: str, names: tuple[str, str], decimals: int) -> str:
    steps = rounded(value, 10**decimals)
    name = f" {names[steps < 0]}" if steps else ""
    return f"{decimal_text(abs(steps), decimals)}{mark}{name}"
