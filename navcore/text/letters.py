"""The hemisphere letters of a position: which figures each belongs to, and what to say where one is wrong.

Letters stand behind both parts, in front of both, or, with a comma between the parts, one way in each.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, NoReturn

from navcore.errors import ParseError
from navcore.text.coordinate import LATITUDE, LONGITUDE, MARKS, Axis
from navcore.text.scan import NUMBER, WORD, Token, scan

if TYPE_CHECKING:
    from collections.abc import Sequence

EXAMPLE = f"{LATITUDE.example} {LONGITUDE.example}"


def lettered_tokens(text: str, typed: str, advice: str) -> list[Token]:
    """Return the tokens of a text with each hemisphere letter on its own, as WORD.

    Raises:
        ParseError: A word that is no hemisphere letter, or a character that has no place in a position.
    """
    split = []
    for token in scan(text, typed, MARKS, advice):
        if token.kind != WORD:
            split.append(token)
        elif len(token.text) <= 2 and set(token.text.upper()) <= set("NSEW"):
            split += [Token(WORD, each, token.start + at, token.start + at + 1) for at, each in enumerate(token.text)]
        else:
            hint = "W for west or E for east" if token.text.upper() == "O" else "N, S, E or W alone"
            reason = f"“{token.text}” is no hemisphere letter"
            raise ParseError(text, token[2:], reason, f"type {hint}, such as {EXAMPLE}")
    return split


def axis_of(letter: Token) -> Axis:
    """Return which coordinate a hemisphere letter belongs to."""
    return LATITUDE if letter.text.upper() in LATITUDE.letters else LONGITUDE


def halves(text: str, tokens: Sequence[Token]) -> tuple[list[Token], list[Token]]:
    """Return the tokens of the two parts as they stand, each with its letter, the comma between them left out.

    Raises:
        ParseError: A letter is missing, doubled or of the wrong part, or it can't be told which figures it belongs to.
    """
    letters = [token for token in tokens if token.kind == WORD]
    if len(letters) == 1:
        _refuse_one(text, tokens, letters[0])
    if len(letters) != 2 or axis_of(letters[0]) is axis_of(letters[1]):
        _refuse_repeated(text, tokens, letters)
    first, second = tokens.index(letters[0]), tokens.index(letters[1])
    cut = second if first == 0 else first + 1
    if first == 0 and second == len(tokens) - 1:
        cut = next((at for at, token in enumerate(tokens) if token.kind == ","), 0)
    elif first == 0 and _may_be_behind(tokens, second):
        cut = 0
    if cut == 0:
        reason = "one letter stands in front and one behind, so that it can't be told which figures are whose"
        raise ParseError(text, (tokens[0].start, tokens[-1].end), reason, f"type both behind, such as {EXAMPLE}")
    before, after = list(tokens[:cut]), list(tokens[cut:])
    if before[-1].kind == ",":
        before.pop()
    elif after[0].kind == ",":
        after.pop(0)
    if letters[1] not in {after[0], after[-1]}:
        reason = f"figures follow the letter “{letters[1].text}”"
        span = (letters[1].end, after[-1].end)
        raise ParseError(text, span, reason, f"type one latitude and one longitude, such as {EXAMPLE}")
    return before, after


def _may_be_behind(tokens: Sequence[Token], at: int) -> bool:
    """Say whether a letter between two parts stands close behind the first one and apart from the second."""
    return tokens[at - 1].end == tokens[at].start < tokens[at].end < tokens[at + 1].start


def _refuse_one(text: str, tokens: Sequence[Token], letter: Token) -> NoReturn:
    """Say which part lacks its letter, or is missing altogether."""
    missing = LONGITUDE if axis_of(letter) is LATITUDE else LATITUDE
    numbers = [token for token in tokens if token.kind == NUMBER]
    bare = text.strip()
    if missing is LONGITUDE:
        at = tokens[-1].end
        is_absent = letter is tokens[-1] or len(numbers) <= 1
        whole = f"{bare} {LONGITUDE.example}"
    else:
        before = _latitude_before(tokens, numbers, letter)
        at = before[-1].end if before else tokens[0].start
        is_absent = not before or len(numbers) <= 1
        whole = f"{LATITUDE.example} {bare}"
    if is_absent:
        at = at if missing is LONGITUDE else tokens[0].start
        raise ParseError(text, (at, at), f"the {missing.name} is missing", f"type both, such as {whole}")
    shown = " or ".join((text[:at] + each + text[at:]).strip() for each in missing.letters)
    raise ParseError(text, (at, at), f"the {missing.name} has no letter, and none is guessed", f"type {shown}")


def _latitude_before(tokens: Sequence[Token], numbers: Sequence[Token], longitude: Token) -> list[Token]:
    """Return the tokens that look like the latitude where only the longitude's letter was typed."""
    end = tokens.index(longitude)
    if longitude is tokens[-1] and len(numbers) > 1:
        end = tokens.index(numbers[(len(numbers) + 1) // 2])
    before = list(tokens[:end])
    while before and before[-1].kind in {",", "+", "-"}:
        before.pop()
    return before


def _refuse_repeated(text: str, tokens: Sequence[Token], letters: Sequence[Token]) -> NoReturn:
    again = [letter for at, letter in enumerate(letters) if axis_of(letter) in {axis_of(each) for each in letters[:at]}]
    wrong = again[0]
    axis = axis_of(wrong)
    numbers = [token for token in tokens if token.kind == NUMBER]
    if len(letters) == 2 and len(numbers) > 1 and tokens.index(wrong) > tokens.index(letters[0]) + 1:
        other = LONGITUDE if axis is LATITUDE else LATITUDE
        shown = " or ".join((text[: wrong.start] + each + text[wrong.end :]).strip() for each in other.letters)
        reason = f"“{wrong.text}” is a letter of {axis.name} a second time: the {other.name} has none"
        raise ParseError(text, wrong[2:], reason, f"type {shown}")
    dropped = {letter.start for letter in again}
    shown = "".join(each for at, each in enumerate(text) if at not in dropped).strip()
    advice = f"type {shown}" if len({axis_of(letter) for letter in letters}) == 2 else f"type it like {EXAMPLE}"
    raise ParseError(text, wrong[2:], f"the {axis.name} has more than one letter", advice)
