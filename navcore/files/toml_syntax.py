"""Lines that are no TOML, in words for somebody who has never heard of it.

tomllib says where a text breaks; what is said about it here is chosen by the line itself as well.
"""

from __future__ import annotations

import re
from typing import NamedTuple

from navcore.text.plain import visible

_PLACE = re.compile(r"\(at line (\d+), column (\d+)\)")
_CURLY_QUOTES = re.compile("[“”„‟«»]")
_DECIMAL_COMMA = re.compile(r"=\s*[+-]?\d+,\d+\s*(?:#|$)")
_VALUE = re.compile(r"^[^=\"']*=\s*(?P<value>[^\s#].*?)?\s*$")


class Fault(NamedTuple):
    """What is wrong with a line, what is allowed there and what to type."""

    what: str
    allowed: str
    advice: str


_ASSIGNMENT = "key = value"
_QUOTED = "text stands between two double quotes"

_NO_VALUE = Fault("a value that can't be read", "a number, or text in double quotes", "check the value")
_MORE = Fault("more after the value", "one key = value on a line", "put text in double quotes")
_OF_A_VALUE = (_NO_VALUE, _MORE)

_BY_MESSAGE: tuple[tuple[str, Fault], ...] = (
    ("Unterminated string", Fault("a text whose closing quote is missing", _QUOTED, 'type the closing "')),
    ("Illegal character", Fault("a text whose closing quote is missing", _QUOTED, "type the closing quote")),
    ("Expected \"'", Fault("a text whose closing quote is missing", _QUOTED, "type the closing '")),
    ("Unescaped", Fault("a single \\ in a text", _QUOTED, r"type \\ for one \ in a text")),
    ("Escaped character", Fault("a \\u code for no character", _QUOTED, "type the character itself")),
    ("Invalid hex", Fault("a \\u code that is not complete", _QUOTED, "type the character itself")),
    ("Unclosed array", Fault("a list whose ] is missing", '["one", "two"]', "type the closing ]")),
    ("Unclosed inline table", Fault("a table whose } is missing", '{ charts = "4801" }', "type the closing }")),
    ("Duplicate inline", Fault("a key given twice in one table", "each key once", "take one of them out")),
    ("']'", Fault("a block's heading that is not closed", "[craft] or [[waypoint]]", "type the closing ]")),
    ("']]'", Fault("a block's heading that is not closed", "[craft] or [[waypoint]]", "type the closing ]]")),
    (
        "Expected '='",
        Fault("a line with no = after its key", _ASSIGNMENT, "type = and the value"),
    ),
    ("Invalid statement", Fault("a line that is no key = value", _ASSIGNMENT, "a remark begins with #")),
    ("Invalid initial", Fault("a key that is missing", _ASSIGNMENT, "type the key, or take a comma too many out")),
    ("Invalid date", Fault("a date or time that does not exist", "2027-03-04T14:00:00Z", "type a date that exists")),
    ("twice", Fault("a block that stands twice", "each block once", "put its lines together in one block")),
    ("Cannot", Fault("a key or block given twice", "each once", "take one of them out")),
    ("Invalid value", _NO_VALUE),
    ("Expected newline", _MORE),
)


def describe(statement: str, message: str, hint: tuple[str, str] | None = None) -> Fault:
    """Return what is wrong with a line.

    Args:
        statement: The line.
        message: What tomllib said of it.
        hint: What its key takes, and an example of it as typed, where the key is known.
    """
    if _CURLY_QUOTES.search(statement) and '"' not in statement:
        return Fault("a curly quotation mark", _QUOTED, 'type the plain " on both sides')
    if _DECIMAL_COMMA.search(statement):
        return Fault("a number with a comma", "a decimal point", "type a point: 13.5")
    fault = next((fault for fragment, fault in _BY_MESSAGE if fragment in message), None)
    if fault is None:
        return Fault("a line that can't be read", _ASSIGNMENT, f"it breaks the rules of TOML: {message}")
    if fault not in _OF_A_VALUE:
        return fault
    value = _VALUE.match(statement)
    if value and value["value"] is None:
        fault = Fault("a key with no value", _ASSIGNMENT, "type the value, or take the line out")
    elif value and value["value"][0] not in "\"'":
        fault = fault._replace(what=f"{shorten(value['value'])}, which is neither a number nor text in double quotes")
    return Fault(fault.what, hint[0], f"type it like {hint[1]}") if hint else fault


def place(statement: str, message: str) -> int:
    """Return the index in a text at which tomllib says that it breaks; its end where tomllib names no place."""
    match = _PLACE.search(message)
    if match is None:
        return len(statement.rstrip())
    line, column = int(match[1]), int(match[2])
    start = 0
    for _ in range(line - 1):
        start = statement.find("\n", start) + 1
    return min(start + column - 1, len(statement))


def shorten(text: str, limit: int = 40) -> str:
    """Return a text fit for a message: on one line, nothing in it unseen, cut where it is long."""
    return visible(text[:limit]) + ("…" if len(text) > limit else "")
