"""Typed text cut into tokens that remember where they stood, so that a refusal can point at the wrong part."""

from __future__ import annotations

import re
from typing import TYPE_CHECKING, NamedTuple, TypeVar

from navcore.errors import ParseError
from navcore.text.plain import visible

if TYPE_CHECKING:
    from collections.abc import Callable

Value = TypeVar("Value")

LONGEST = 1000
"""Most characters of one value; the longest that this package writes itself has some 680 (subnormal degrees)."""

NUMBER = "number"
WORD = "word"

# One character for one, so that an index in the plain text is an index in the typed text.
_PLAIN = str.maketrans(
    dict.fromkeys("′’‘ʹʼ´`", "'")
    | dict.fromkeys("″”“ʺ", '"')
    | dict.fromkeys("º˚", "°")
    | dict.fromkeys("−–‐‑", "-")
    | dict.fromkeys("\t\n\r\xa0\u2007\u2009\u202f", " ")
)
_TOKEN = re.compile(r"(?P<number>\d+(?:\.\d+)?)|(?P<word>[A-Za-z]+)|(?P<seconds>'')|(?P<mark>[^ ])", re.ASCII)


class Token(NamedTuple):
    """A piece of typed text.

    Attributes:
        kind: NUMBER, WORD, or the mark itself.
        text: The piece in plain characters, letters as typed.
        start: Index of its first character in the typed text.
        end: Index after its last one.
    """

    kind: str
    text: str
    start: int
    end: int


def plain(text: str, name: str, advice: str) -> str:
    """Return the text with typographic primes, dashes and spaces as their plain characters, index for index.

    Args:
        text: What was typed.
        name: What it should be, with its article, for the refusal.
        advice: What to type.

    Raises:
        ParseError: The text is empty, or longer than any such value.
    """
    if len(text) > LONGEST:
        raise ParseError(text, (LONGEST, len(text)), f"{len(text)} characters are too long for {name}", advice)
    if not text.strip():
        raise ParseError(text, (0, len(text)), f"{name} is missing", advice)
    return text.translate(_PLAIN)


def scan(text: str, typed: str, marks: str, advice: str) -> list[Token]:
    """Return the tokens of a text.

    Args:
        text: What was typed, for the refusal.
        typed: The same from `plain`.
        marks: The marks that may stand in it, as plain characters.
        advice: What to type where something else stands in it.

    Raises:
        ParseError: A character has no place in it.
    """
    found = []
    for match in _TOKEN.finditer(typed):
        kind, piece = match.lastgroup or "", match.group()
        if kind == "mark" and piece not in marks:
            raise ParseError(text, match.span(), _unread(piece), advice)
        if kind == "seconds":
            kind = piece = '"'
        found.append(Token(piece if kind == "mark" else kind, piece, match.start(), match.end()))
    return found


def _unread(character: str) -> str:
    if character == ".":
        return "a point needs a figure before and after it"
    if character.isdigit():
        return f"“{character}” is not one of the figures 0 to 9"
    return f"“{visible(character)}” has no place here"


def read_within(text: str, span: tuple[int, int], parse: Callable[[str], Value]) -> Value:
    """Return what `parse` makes of text[start:end]; its refusal points into the whole text.

    Raises:
        ParseError: As `parse` raises it, with the span moved.
    """
    start, end = span
    try:
        return parse(text[start:end])
    except ParseError as error:
        moved = (start + error.start, start + error.end)
        raise ParseError(text, moved, error.reason, error.advice) from error
