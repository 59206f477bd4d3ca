"""Positions written in one word: ISO 6709, and the codes that are refused.

Source of the ISO 6709 widths: ISO 6709:2008, annex H (string expression): ±DD.D±DDD.D, ±DDMM.M±DDDMM.M and
±DDMMSS.S±DDDMMSS.S, height and reference system after them, a slash at the end.
Half-degree codes are how navigation databases shorten a point to five characters (ARINC 424, 7.2.5): 5050N is
50°N 050°W while N5050 is 50°30'N 050°W. One letter's place moves the point by thirty miles, and reports of large
lateral errors name these codes as a cause, so that they are never read.
"""

from __future__ import annotations

import re

from navcore.errors import ParseError
from navcore.position import Position
from navcore.text.coordinate import LATITUDE, LONGITUDE, Axis, read_lettered, read_signed
from navcore.text.scan import NUMBER, WORD, Token

_ISO_6709 = re.compile(
    r"(?P<lat_sign>[+-])(?P<lat>\d+(?:\.\d+)?)(?P<lon_sign>[+-])(?P<lon>\d+(?:\.\d+)?)"
    r"(?P<height>[+-]\d+(?:\.\d+)?)?(?P<system>CRS[A-Z0-9_:.]+)?/?",
    re.ASCII | re.IGNORECASE,
)
_SHORT_CODE = re.compile(r"\d{4}[NSEW]|\d{2}[NSEW]\d{2}|[NSEWH]\d{4}", re.ASCII | re.IGNORECASE)
_LETTER_FIRST = re.compile(r"([NS])(\d+)([EW])(\d+)", re.ASCII | re.IGNORECASE)
_QUADRANTS = {"N": ("N", "W"), "E": ("N", "E"), "S": ("S", "E"), "W": ("S", "W")}
_REASON = "a half-degree code stands for other points with its letter elsewhere, and has put craft far off their track"


def refuse_codes(text: str, typed: str) -> None:
    """Raise ParseError where the whole text is a half-degree code, or figures in one word with their letter first.

    Args:
        text: The whole text, for the refusal.
        typed: The same in plain characters.
    """
    code = typed.strip().upper()
    start = len(typed) - len(typed.lstrip())
    span = (start, start + len(code))
    if _SHORT_CODE.fullmatch(code):
        raise ParseError(text, span, _REASON, _code_advice(code))
    if match := _LETTER_FIRST.fullmatch(code):
        north, lat, east, lon = match.groups()
        reason = (
            "a position in one word takes each letter after its figures: in front, it is the mark of half-degree codes"
        )
        raise ParseError(text, span, reason, f"type {lat}{north}{lon}{east}")


def _code_advice(code: str) -> str:
    """Return the point in full where the code has one reading; letters stand for quadrants of the Earth."""
    letter = next(character for character in code if character.isalpha())
    figures = code.replace(letter, "")
    lat, lon = figures[:2], int(figures[2:]) + (100 if code[2] == letter else 0)
    if code[0] == letter or lon > 180 or int(lat) > 90:
        return "type the position in full, such as 5030N05000W for 50°30'N 050°00'W"
    north, east = _QUADRANTS[letter]
    return f"type the position in full: {lat}{north}{lon:03d}{east} if {lat}°{north} {lon:03d}°{east} is meant"


def read_iso_6709(text: str, typed: str) -> Position | None:
    """Return the position of an ISO 6709 string, or None where the text is none.

    A height is left out where the reference system that it belongs to is WGS_84.

    Args:
        text: The whole text, for the refusal.
        typed: The same in plain characters.

    Raises:
        ParseError: Another reference system, a height without one, or figures of the wrong number.
    """
    start = len(typed) - len(typed.lstrip())
    match = _ISO_6709.fullmatch(typed.rstrip(), start)
    if match is None:
        return None
    system = (match["system"] or "").upper()
    if system and system != "CRSWGS_84":
        reason = f"the reference system {match['system'][3:]} is not WGS_84, and nothing here converts it"
        raise ParseError(text, match.span("system"), reason, "type the position in WGS 84, and leave out the CRS")
    if match["height"] and not system:
        short = typed[start : match.end("lon")] + "/"
        reason = "a height without its reference system stands after the longitude"
        raise ParseError(text, match.span("height"), reason, f"type {short}, or degrees and minutes with their letters")
    if not _has_width(match["lat"], LATITUDE) or not _has_width(match["lon"], LONGITUDE):
        _refuse_width(text, match)
    return Position(_read(text, match, "lat", LATITUDE), _read(text, match, "lon", LONGITUDE))


def _has_width(figures: str, axis: Axis) -> bool:
    return len(figures.partition(".")[0]) - axis.width in {0, 2, 4}


def _refuse_width(text: str, match: re.Match[str]) -> None:
    wrong, axis = ("lon", LONGITUDE) if _has_width(match["lat"], LATITUDE) else ("lat", LATITUDE)
    advice = "type it like +48.5-004.5/, or with a comma and a space: 48.5, -4.5"
    widths = "2, 4 or 6" if axis is LATITUDE else "3, 5 or 7"
    reason = f"a {axis.name} with its sign in one word has {widths} figures before the point"
    raise ParseError(text, match.span(wrong), reason, advice)


def _read(text: str, match: re.Match[str], part: str, axis: Axis) -> float:
    figures, sign = match[part], match[f"{part}_sign"]
    number = Token(NUMBER, figures, *match.span(part))
    if len(figures.partition(".")[0]) == axis.width:
        return read_signed(text, sign, [number], axis)
    letter = Token(WORD, axis.letters[sign == "-"], number.end, number.end)
    return read_lettered(text, [number], letter, axis).value_deg
