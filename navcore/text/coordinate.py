"""One coordinate, a latitude or a longitude, from its tokens to its value, and back.

A coordinate is degrees, or degrees and minutes, or degrees, minutes and seconds, of which only the last may have a
fraction; or figures in one word whose number says how they divide (ddmm, dddmm, ddmmss, dddmmss).
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, NamedTuple, NoReturn

from navcore.errors import ParseError, RangeError
from navcore.text.number import decimal_text, exact, rounded, write_number
from navcore.text.scan import NUMBER, Token

if TYPE_CHECKING:
    from collections.abc import Sequence

SIGNS = ("+", "-")
MARKS = "°'\":+-,"
_OWN_MARKS = ("°", "'", '"')
_STEPS = ("degrees", "minutes", "seconds")
_STEPS_PER_DEGREE = (1, 60, 3600)
_MOST_FIGURES = 7
_MOST_MINUTE_DECIMALS = 6


@dataclass(frozen=True, slots=True)
class Axis:
    """What tells latitude from longitude.

    Attributes:
        name: The word.
        letters: The positive hemisphere's letter, then the negative one's.
        limit: Greatest number of degrees.
        width: Figures of whole degrees when printed.
        example: What to type.
    """

    name: str
    letters: str
    limit: int
    width: int
    example: str

    @property
    def either(self) -> str:
        """Its letters in words."""
        return f"{self.letters[0]} or {self.letters[1]}"


LATITUDE = Axis("latitude", "NS", 90, 2, "48°23.5'N")
LONGITUDE = Axis("longitude", "EW", 180, 3, "004°29.0'W")


class Coordinate(NamedTuple):
    """A coordinate as typed.

    Attributes:
        value_deg: North or east positive.
        figures: How many figures one word of whole degrees and minutes had; 0 for any other form.
    """

    value_deg: float
    figures: int


def read_lettered(text: str, tokens: Sequence[Token], letter: Token, axis: Axis) -> Coordinate:
    """Return the coordinate of tokens whose hemisphere letter is known.

    Args:
        text: The whole text, for the refusal.
        tokens: Its figures and marks, the letter aside.
        letter: One of the axis's letters.
        axis: Latitude or longitude.

    Raises:
        ParseError: Pointing at what can't be read.
    """
    numbers = _numbers(text, tokens, letter, axis)
    figures = 0
    if len(tokens) == 1:
        figures = len(numbers[0].text.partition(".")[0])
        numbers = _divided(text, numbers[0], letter, axis)
    _refuse_early_fraction(text, numbers, letter, axis)
    _refuse_sixty(text, numbers, letter, axis)
    value_deg = _value_deg(text, numbers, axis)
    is_negative = letter.text.upper() == axis.letters[1]
    return Coordinate(-value_deg if is_negative and value_deg else value_deg, figures)


def read_signed(text: str, sign: str, tokens: Sequence[Token], axis: Axis) -> float:
    """Return decimal degrees with their sign in front, such as -36.0; `tokens` are the figures and at most a °.

    Raises:
        ParseError: The value is over the axis's limit.
    """
    value_deg = _value_deg(text, tokens[:1], axis)
    return -value_deg if sign == "-" and value_deg else value_deg


def _numbers(text: str, tokens: Sequence[Token], letter: Token, axis: Axis) -> list[Token]:
    """Return the numbers, having held the marks between them to their order."""
    if not tokens:
        raise ParseError(text, letter[2:], f"the {axis.name} has no figures", f"type them, such as {axis.example}")
    if tokens[0].kind in SIGNS:
        _refuse_sign(text, tokens, letter, axis)
    numbers: list[Token] = []
    after = ""
    for token in tokens:
        own_mark = _OWN_MARKS[len(numbers) - 1]
        if token.kind == NUMBER and len(numbers) < 3:
            _refuse_long(text, token, axis)
            numbers.append(token)
            after = _OWN_MARKS[len(numbers) - 1] + "-:"
        elif token.kind in after and (token is not tokens[-1] or token.kind == own_mark):
            after = "-" if token.kind == own_mark else ""
        else:
            _refuse_token(text, token, len(numbers), axis)
    return numbers


def _refuse_sign(text: str, tokens: Sequence[Token], letter: Token, axis: Axis) -> NoReturn:
    unsigned = text[tokens[0].end : tokens[-1].end].strip() + letter.text.upper() if tokens[1:] else axis.example
    reason = f"the {axis.name} has both a sign and a letter"
    raise ParseError(text, tokens[0][2:], reason, f"type {unsigned}, with the letter that is meant and no sign")


def _refuse_long(text: str, number: Token, axis: Axis) -> None:
    if len(number.text.partition(".")[0]) > _MOST_FIGURES:
        reason = f"the {axis.name} has too many figures before the point"
        raise ParseError(text, number[2:], reason, f"type it like {axis.example}")


def _refuse_token(text: str, token: Token, count: int, axis: Axis) -> NoReturn:
    reason = f"“{token.text}” has no place here in the {axis.name}"
    if token.kind == NUMBER:
        reason = f"the {axis.name} has figures after its seconds"
    elif token.kind in _OWN_MARKS and count and token.kind != _OWN_MARKS[count - 1]:
        reason = f"{_STEPS[count - 1]} of {axis.name} are marked {_OWN_MARKS[count - 1]}, not {token.text}"
    raise ParseError(text, token[2:], reason, f"type it like {axis.example}")


def _divided(text: str, number: Token, letter: Token, axis: Axis) -> list[Token]:
    """Return the degrees, minutes and seconds of figures in one word; up to three are degrees alone."""
    whole = number.text.partition(".")[0]
    if len(whole) <= 3:
        return [number]
    if len(whole) not in {axis.width + 2, axis.width + 4}:
        forms = "dd, ddmm or ddmmss" if axis is LATITUDE else "ddd, dddmm or dddmmss"
        filled = "0" + number.text
        shown = f"{filled}{letter.text.upper()}" if len(whole) + 1 in {axis.width + 2, axis.width + 4} else axis.example
        reason = f"{len(whole)} figures can't be divided into degrees and minutes of {axis.name}"
        raise ParseError(text, number[2:], reason, f"type {forms}, such as {shown}")
    if letter.end <= number.start:
        reason = "figures in one word take their letter after them: in front, it is the mark of half-degree codes"
        raise ParseError(text, (letter.start, number.end), reason, f"type {number.text}{letter.text.upper()}")
    ends = [*range(axis.width, len(whole), 2), len(number.text)]
    return [
        Token(NUMBER, number.text[start:end], number.start + start, number.start + end)
        for start, end in zip([0, *ends], ends, strict=False)
    ]


def _refuse_early_fraction(text: str, numbers: Sequence[Token], letter: Token, axis: Axis) -> None:
    for at, number in enumerate(numbers[:-1]):
        if "." not in number.text:
            continue
        figures = [each.text for each in numbers]
        short_form = _marked(figures[: at + 1], letter)
        figures[at] = number.text.partition(".")[0]
        reason = f"the {_STEPS[at]} of {axis.name} have a fraction and {_STEPS[at + 1]} follow"
        advice = f"type {_marked(figures, letter)} or {short_form}, whichever is meant"
        raise ParseError(text, number[2:], reason, advice)


def _marked(figures: Sequence[str], letter: Token) -> str:
    pieces = (figure + mark for figure, mark in zip(figures, _OWN_MARKS, strict=False))
    return "".join(pieces) + letter.text.upper()


def _refuse_sixty(text: str, numbers: Sequence[Token], letter: Token, axis: Axis) -> None:
    for number, step in zip(numbers[1:], _STEPS[1:], strict=False):
        if int(number.text.partition(".")[0]) < 60:
            continue
        advice = f"type it like {axis.example}"
        if _quotient_deg(numbers) <= axis.limit:
            advice = f"if they are to carry over, type {_carried(numbers, letter)}"
        reason = f"the {step} of {axis.name} are {number.text}, but run only from 0 to under 60"
        raise ParseError(text, number[2:], reason, advice)


def _carried(numbers: Sequence[Token], letter: Token) -> str:
    """Return the figures with every sixty carried over, in as many steps and decimals as they were typed."""
    wholes = [int(number.text.partition(".")[0]) for number in numbers]
    for at in range(len(wholes) - 1, 0, -1):
        carry, wholes[at] = divmod(wholes[at], 60)
        wholes[at - 1] += carry
    point, fraction = numbers[-1].text.partition(".")[1:]
    figures = [f"{whole:02d}" for whole in wholes]
    figures[-1] += point + fraction
    return _marked(figures, letter)


def _value_deg(text: str, numbers: Sequence[Token], axis: Axis) -> float:
    degrees, bottom = exact(numbers[0].text)
    has_more = any(exact(number.text)[0] for number in numbers[1:])
    if degrees > axis.limit * bottom or (degrees == axis.limit * bottom and has_more):
        reason = f"the {axis.name} is over {axis.limit}°"
        is_longitude = axis is LATITUDE and degrees <= LONGITUDE.limit * bottom
        advice = f"type 0 to {axis.limit}°, such as {axis.example}"
        advice += "; a longitude comes second and takes E or W" if is_longitude else ""
        raise ParseError(text, (numbers[0].start, numbers[-1].end), reason, advice)
    return _quotient_deg(numbers)


def _quotient_deg(numbers: Sequence[Token]) -> float:
    """Return degrees, minutes and seconds as degrees, rounded once; all but the last are whole."""
    top = 0
    for number in numbers[:-1]:
        top = (top + int(number.text)) * 60
    last, bottom = exact(numbers[-1].text)
    return (top * bottom + last) / (bottom * _STEPS_PER_DEGREE[len(numbers) - 1])


def format_coordinate(value_deg: float, axis: Axis, decimals: int) -> str:
    """Return degrees and minutes with the hemisphere letter, such as 48°30.0'N.

    Raises:
        RangeError: The value is not finite, or over the axis's limit.
    """
    refuse_outside(value_deg, axis)
    per_minute = 10**decimals
    steps = rounded(value_deg, 60 * per_minute)
    whole, minutes = divmod(abs(steps), 60 * per_minute)
    letter = axis.letters[1] if steps < 0 else axis.letters[0]
    return f"{whole:0{axis.width}d}°{decimal_text(minutes, decimals, 2)}'{letter}"


def write_coordinate(value_deg: float, axis: Axis) -> str:
    """Return the shortest degrees and minutes that read back as the very same float, else decimal degrees.

    Raises:
        RangeError: The value is not finite, or over the axis's limit.
    """
    refuse_outside(value_deg, axis)
    letter = axis.letters[1] if value_deg < 0.0 else axis.letters[0]
    for decimals in range(1, _MOST_MINUTE_DECIMALS + 1):
        steps = abs(rounded(value_deg, 60 * 10**decimals))
        if steps / (60 * 10**decimals) == abs(value_deg):
            whole, minutes = divmod(steps, 60 * 10**decimals)
            return f"{whole:0{axis.width}d}°{decimal_text(minutes, decimals, 2)}'{letter}"
    return write_number(abs(value_deg)) + letter


def refuse_outside(value_deg: float, axis: Axis) -> None:
    """Raise RangeError for a value that is no number or over the axis's limit."""
    if not -axis.limit <= value_deg <= axis.limit:
        raise RangeError(f"{axis.name}_deg", value_deg, f"-{axis.limit} to {axis.limit}")
