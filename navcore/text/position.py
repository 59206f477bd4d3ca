"""Positions: every written form to its value, and back with carry.

Read are degrees and minutes, degrees, minutes and seconds, decimal degrees with letters or signs, the figures in one
word of ICAO flight plans (46N078W, 4620N07805W, 462030N0780510W) and ISO 6709 strings. A hemisphere letter is never
guessed: the only forms without letters are decimal degrees, where a sign may stand for one, and ISO 6709.
"""

from __future__ import annotations

import re
from typing import TYPE_CHECKING, NoReturn

from navcore.errors import ParseError
from navcore.position import Position
from navcore.text.coordinate import (
    LATITUDE,
    LONGITUDE,
    SIGNS,
    Axis,
    Coordinate,
    format_coordinate,
    read_lettered,
    read_signed,
    refuse_outside,
    write_coordinate,
)
from navcore.text.letters import EXAMPLE, axis_of, halves, lettered_tokens
from navcore.text.number import rounded
from navcore.text.point_code import read_iso_6709, refuse_codes
from navcore.text.scan import NUMBER, WORD, Token, plain

if TYPE_CHECKING:
    from collections.abc import Sequence

_ADVICE = f"type latitude, then longitude, such as {EXAMPLE}"
_NO_SIDE_DEG = {LATITUDE: (0.0,), LONGITUDE: (0.0, 180.0)}
"""What is on neither side, so that no letter is missing: the equator, Greenwich and the meridian opposite."""
_EXPONENT = re.compile(r"\d+(?:\.\d*)?[eE][-+]\d+")
_SIGNED = re.compile(
    r"(?P<lat_sign>[+-]?)(?P<lat>\d+(?:\.\d+)?) ?°?(?P<between> *, *| +)(?P<lon_sign>[+-]?)(?P<lon>\d+(?:\.\d+)?) ?°?",
    re.ASCII,
)


def parse_position(text: str) -> Position:
    """Return the position that a text says, latitude before longitude.

    180°E is +180.0 and 180°W is -180.0; a signed 180 keeps its sign. Each value is the float nearest to what was typed.

    Raises:
        ParseError: Pointing at the part that can't be read, with what to type.
    """
    typed = plain(text, "the position", _ADVICE)
    refuse_codes(text, typed)
    iso = read_iso_6709(text, typed)
    if iso is not None:
        return iso
    _refuse_exponents(text, typed)
    tokens = lettered_tokens(text, typed, _ADVICE)
    _refuse_decimal_commas(text, tokens)
    if not any(token.kind == WORD for token in tokens):
        return _signed_position(text, typed, tokens)
    return _lettered_position(text, *halves(text, tokens))


def parse_latitude(text: str) -> float:
    """Return a latitude alone, in degrees, north positive: 50N, 48°23.5'N, or decimal degrees with their sign.

    Raises:
        ParseError: As parse_position.
    """
    return _parse_alone(text, LATITUDE)


def parse_longitude(text: str) -> float:
    """Return a longitude alone, in degrees, east positive: 160W, 004°29.0'W, or decimal degrees with their sign.

    Raises:
        ParseError: As parse_position.
    """
    return _parse_alone(text, LONGITUDE)


def format_latitude(lat_deg: float, decimals: int = 1) -> str:
    """Return a latitude as degrees and minutes, such as 48°30.0'N; 59.96' is the next degree.

    Raises:
        RangeError: Outside -90 to 90, or no number.
    """
    return format_coordinate(lat_deg, LATITUDE, decimals)


def format_longitude(lon_deg: float, decimals: int = 1) -> str:
    """Return a longitude as degrees and minutes, such as 125°20.0'W; 59.96' is the next degree.

    Raises:
        RangeError: Outside -180 to 180, or no number.
    """
    return format_coordinate(lon_deg, LONGITUDE, decimals)


def format_position(position: Position, decimals: int = 1) -> str:
    """Return a position as degrees and minutes, such as 48°30.0'N 125°20.0'W.

    Raises:
        RangeError: As format_latitude and format_longitude.
    """
    return f"{format_latitude(position.lat_deg, decimals)} {format_longitude(position.lon_deg, decimals)}"


def format_graticule_line(value_deg: float, *, is_meridian: bool, interval_min: float) -> str:
    """Return what stands at a meridian or parallel of a graticule: 45°N, 45°30'N, 180°, 0°; no zeros beyond need.

    Args:
        value_deg: Its longitude or latitude.
        is_meridian: Which of the two.
        interval_min: Between neighbours, minutes of arc.
    """
    if is_meridian and abs(value_deg) == 180.0:
        return "180°"
    text = (format_longitude if is_meridian else format_latitude)(value_deg, 1 if interval_min < 1.0 else 0)
    if value_deg == 0.0:
        text = text[:-1]
    return text.replace("00'", "") if interval_min >= 60.0 else text


def write_position(position: Position) -> str:
    """Return a text that parse_position reads as the very same two floats.

    Each part is degrees and minutes with the fewest decimals that do, else decimal degrees with a letter.

    Raises:
        RangeError: As format_latitude and format_longitude.
    """
    return f"{write_coordinate(position.lat_deg, LATITUDE)} {write_coordinate(position.lon_deg, LONGITUDE)}"


def format_icao(position: Position) -> str:
    """Return a position to the minute in the 11 characters of ICAO flight plans, such as 4620N07805W.

    Raises:
        RangeError: As format_latitude and format_longitude.
    """
    return "".join(_icao_part(value, axis) for value, axis in zip(position, (LATITUDE, LONGITUDE), strict=True))


def _icao_part(value_deg: float, axis: Axis) -> str:
    refuse_outside(value_deg, axis)
    minutes = rounded(value_deg, 60)
    return f"{abs(minutes) // 60:0{axis.width}d}{abs(minutes) % 60:02d}{axis.letters[minutes < 0]}"


def _parse_alone(text: str, axis: Axis) -> float:
    advice = f"type it like {axis.example}"
    typed = plain(text, f"the {axis.name}", advice)
    _refuse_exponents(text, typed)
    tokens = lettered_tokens(text, typed, advice)
    _refuse_decimal_commas(text, tokens)
    letters = [token for token in tokens if token.kind == WORD]
    if not letters:
        return _signed_alone(text, tokens, axis)
    if len(letters) > 1:
        reason = f"one {axis.name} stands here, with one letter"
        raise ParseError(text, letters[1][2:], reason, f"type it with {axis.either} once, such as {axis.example}")
    letter = letters[0]
    if axis_of(letter) is not axis:
        reason = f"“{letter.text}” is no letter of {axis.name}"
        raise ParseError(text, letter[2:], reason, f"type {axis.either}, such as {axis.example}")
    if letter not in {tokens[0], tokens[-1]}:
        raise ParseError(text, letter[2:], f"the letter of the {axis.name} stands among its figures", advice)
    return read_lettered(text, [token for token in tokens if token is not letter], letter, axis).value_deg


def _signed_alone(text: str, tokens: Sequence[Token], axis: Axis) -> float:
    kinds = [token.kind for token in tokens]
    if kinds[:1] in (["+"], ["-"]) and kinds[1:] in ([NUMBER], [NUMBER, "°"]):
        return read_signed(text, kinds[0], tokens[1:], axis)
    if kinds in ([NUMBER], [NUMBER, "°"]) and float(tokens[0].text) in _NO_SIDE_DEG[axis]:
        return float(tokens[0].text)
    bare = text[tokens[0].start : tokens[-1].end].lstrip("+-−–‐‑ ")
    shown = f"{bare}{axis.letters[0]} or {bare}{axis.letters[1]}" if bare else axis.example
    end = tokens[-1].end
    raise ParseError(text, (end, end), f"the {axis.name} has no letter, and none is guessed", f"type {shown}")


def _refuse_exponents(text: str, typed: str) -> None:
    """Refuse 1e-07, whose e would be taken for the letter of the east."""
    if match := _EXPONENT.search(typed):
        advice = f"type it out: {float(match[0]):.12f}".rstrip("0").rstrip(".")
        raise ParseError(text, match.span(), "a coordinate is written without an exponent", advice)


def _refuse_decimal_commas(text: str, tokens: Sequence[Token]) -> None:
    """Refuse 48,5N, and 48,5 alone: it may be a latitude, or a latitude and a longitude."""
    if "," not in text:
        return
    has_letters = any(token.kind == WORD for token in tokens)
    commas = [
        (left, comma, right)
        for left, comma, right in zip(tokens, tokens[1:], tokens[2:], strict=False)
        if (left.kind, comma.kind, right.kind) == (NUMBER, ",", NUMBER)
        and left.end == comma.start
        and comma.end == right.start
        and (has_letters or "." not in left.text + right.text)
    ]
    if not commas:
        return
    left, _, right = commas[0]
    pointed = list(text)
    for _, comma, _ in commas:
        pointed[comma.start] = "."
    advice = f"type {''.join(pointed).strip()}"
    if not has_letters and len(commas) == 1:
        advice = f"type {left.text}.{right.text} for a fraction, or a space after the comma: {left.text}, {right.text}"
    raise ParseError(text, (left.start, right.end), "a comma stands where a point goes", advice)


def _signed_position(text: str, typed: str, tokens: Sequence[Token]) -> Position:
    """Return decimal degrees without letters, such as 48.3917 -4.4833 or -36.0, 175.2."""
    start = len(typed) - len(typed.lstrip())
    match = _SIGNED.fullmatch(typed.rstrip(), start)
    if match is None or _may_be_minutes(match):
        _refuse_letterless(text, tokens)
    lat, lon = (Token(NUMBER, match[part], *match.span(part)) for part in ("lat", "lon"))
    if float(lat.text) > LATITUDE.limit >= float(lon.text):
        first, second = ((match[f"{part}_sign"] + match[part]).removeprefix("+") for part in ("lat", "lon"))
        reason = "latitude and longitude are swapped"
        raise ParseError(text, match.span(), reason, f"type latitude first: {second}, {first}")
    lat_deg = read_signed(text, match["lat_sign"], [lat], LATITUDE)
    return Position(lat_deg, read_signed(text, match["lon_sign"], [lon], LONGITUDE))


def _may_be_minutes(match: re.Match[str]) -> bool:
    """Say whether the two numbers may as well be the degrees and minutes of one latitude."""
    is_told_apart = "," in match["between"] or match["lon_sign"] or "." in match["lat"]
    return not is_told_apart and float(match["lon"]) < 60


def _refuse_letterless(text: str, tokens: Sequence[Token]) -> NoReturn:
    numbers = [token for token in tokens if token.kind == NUMBER]
    span = (tokens[0].start, tokens[-1].end)
    reason = "no letter says which hemisphere, and none is guessed"
    advice = _ADVICE
    if numbers and len(numbers) % 2 == 0:
        middle = tokens.index(numbers[len(numbers) // 2])
        parts = tokens[:middle], tokens[middle:]
        letters = ("NS"[parts[0][0].kind == "-"], "EW"[tokens[middle - 1].kind == "-"])
        shown = " ".join(f"{_bare(text, part)}{letter}" for part, letter in zip(parts, letters, strict=True))
        advice = f"type {shown}, with N or S and E or W as is meant"
        if len(numbers) == 2:
            lat, lon = (_sign_before(tokens, number) + number.text for number in numbers)
            advice += f", or decimal degrees with a comma: {lat}, {lon}"
    raise ParseError(text, span, reason, advice)


def _sign_before(tokens: Sequence[Token], number: Token) -> str:
    before = tokens[max(0, tokens.index(number) - 1)]
    return before.kind if before.kind in SIGNS else ""


def _bare(text: str, tokens: Sequence[Token]) -> str:
    """Return the figures of one part and the marks between and after them, without sign or comma."""
    kept = [token for token in tokens if token.kind != ","]
    while kept and kept[-1].kind in SIGNS:
        kept.pop()
    first = next(at for at, token in enumerate(kept) if token.kind == NUMBER)
    return text[kept[first].start : kept[-1].end]


def _lettered_position(text: str, first: list[Token], second: list[Token]) -> Position:
    parts = [_without_letter(tokens) for tokens in (first, second)]
    if axis_of(parts[0][0]) is LONGITUDE:
        slices = [text[tokens[0].start : tokens[-1].end] for tokens in (second, first)]
        span = (first[0].start, second[-1].end)
        raise ParseError(text, span, "latitude and longitude are swapped", f"type latitude first: {' '.join(slices)}")
    (lat_letter, lat_figures), (lon_letter, lon_figures) = parts
    lat = read_lettered(text, lat_figures, lat_letter, LATITUDE)
    lon = read_lettered(text, lon_figures, lon_letter, LONGITUDE)
    if _is_uneven(lat, lon):
        _refuse_uneven(text, (lat_letter, lat_figures[0]), (lon_letter, lon_figures[0]))
    return Position(lat.value_deg, lon.value_deg)


def _without_letter(tokens: list[Token]) -> tuple[Token, list[Token]]:
    at = 0 if tokens[0].kind == WORD else -1
    return tokens[at], [token for token in tokens if token.kind != WORD]


def _is_uneven(lat: Coordinate, lon: Coordinate) -> bool:
    """Say whether one part has minutes in one word with its degrees and the other has fewer: a figure may be lost."""
    if not (lat.figures and lon.figures) or max(lat.figures, lon.figures) <= 3:
        return False
    return lat.figures - LATITUDE.width != lon.figures - LONGITUDE.width


def _refuse_uneven(text: str, lat: tuple[Token, Token], lon: tuple[Token, Token]) -> NoReturn:
    figures = [lat[1].text, lon[1].text]
    letters = [lat[0].text.upper(), lon[0].text.upper()]
    span = (min(lat[1].start, lat[0].start), max(lon[1].end, lon[0].end))
    advice = _ADVICE
    if "." not in "".join(figures):
        excess = max(len(figures[0]) - LATITUDE.width, len(figures[1]) - LONGITUDE.width)
        widths = [axis.width for axis in (LATITUDE, LONGITUDE)]
        filled = [
            (each.zfill(width)).ljust(width + excess, "0") + letter
            for each, width, letter in zip(figures, widths, letters, strict=True)
        ]
        advice = f"type {''.join(filled)} if whole degrees are meant"
    raise ParseError(text, span, "one part has minutes and the other has none, so that a figure may be lost", advice)
