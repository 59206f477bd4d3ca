"""Where everything stands in a TOML text: tables, assignments, and the lines that can't be followed.

tomllib reads the values but does not say where they stood, so this scanner keeps offsets only and judges no value.
What it can't follow it steps over to the end of the line, so that one bad line hides nothing below it.

Source: TOML 1.0.0 (toml.io).
"""

from __future__ import annotations

import re
from typing import NamedTuple

MAX_DEPTH = 32
"""Keys, arrays and inline tables nested deeper than this are not followed; no plan comes near it."""

MAX_STATEMENTS = 150_000
"""A text with more is scanned no further; a plan of 10,000 waypoints has about 100,000."""

MAX_ENTRIES = 10_000
"""A list or inline table with more is not followed."""

MAX_LOST = 400
"""A text with more lines that can't be followed is scanned no further."""


class Assignment(NamedTuple):
    """One `key = value`; offsets count characters from the start of the text.

    Attributes:
        path: The key's parts from the root, the table's header included.
        key_count: How many of them are written in this key.
        start: First character of the key.
        key_end: After the key.
        value_start: First character of the value.
        value_end: After the value.
        end: After the line's newline; within an inline table, after the value.
        inner: The assignments within an inline table.
    """

    path: tuple[str, ...]
    key_count: int
    start: int
    key_end: int
    value_start: int
    value_end: int
    end: int
    inner: tuple[Assignment, ...] = ()


class Lost(NamedTuple):
    """A line that can't be followed: where it stands, and why where tomllib is not to be asked."""

    start: int
    end: int
    reason: str = ""


class Section(NamedTuple):
    """A table header and what stands under it; the first section of a text is its root and has no header.

    Attributes:
        path: The header's key; () for the root.
        is_array: Whether it was written in double brackets.
        start: First character, the comment lines directly above the header included.
        header: First character of the header; equal to start for the root.
        body: After the header's line.
        end: Where the next section starts.
        assignments: In the order they stand.
        lost: The lines that can't be followed.
    """

    path: tuple[str, ...]
    is_array: bool
    start: int
    header: int
    body: int
    end: int
    assignments: tuple[Assignment, ...]
    lost: tuple[Lost, ...]


class Scan(NamedTuple):
    """A scanned text, and how far it was scanned: its whole length unless a limit was passed."""

    sections: tuple[Section, ...]
    read_to: int


_STRING = re.compile(
    r'"""(?:[^"\\]++|\\.|"{1,2}+(?!"))*+"{3,5}'
    r"|'''(?:[^']++|'{1,2}+(?!'))*+'{3,5}"
    r'|"(?:[^"\\\n]++|\\[^\n])*+"'
    r"|'[^'\n]*+'",
    re.DOTALL,
)
_KEY_PART = re.compile(r'[ \t]*([A-Za-z0-9_-]++|"(?:[^"\\\n]++|\\[^\n])*+"|\'[^\'\n]*+\')[ \t]*')
_BARE_VALUE = re.compile(r"[^\s\"'\[\]{},#=](?:[^\n\"'\[\]{},#=]{0,400}[^\s\"'\[\]{},#=])?")
_SPACE = re.compile(r"[ \t]*+")
_SPACE_IN_ARRAY = re.compile(r"(?:[ \t\r\n]++|#[^\n]*+)*+")
_REST_OF_LINE = re.compile(r"[ \t\r]*+(?:#[^\n]*+)?(?:\n|\Z)")
_BLANK_LINES = re.compile(r"(?:[ \t\r]*+\n)++|[ \t\r]++\Z")
_COMMENT_LINES = re.compile(r"(?:[ \t]*+#[^\n]*+(?:\n|\Z))++")
_PLAIN = re.compile(
    r"[ \t]*+([A-Za-z0-9_-]++)[ \t]*+=[ \t]*+"
    r"(\"[^\"\\\n]*+\"(?!\")|'[^'\n]*+'(?!')|[^\s\"'\[\]{},#=](?:[^\n\"'\[\]{},#=]{0,400}[^\s\"'\[\]{},#=])?)"
    r"[ \t\r]*+(?:#[^\n]*+)?(?:\n|\Z)"
)
_LIKE_A_HEADER = re.compile(r"[ \t]*(\[\[?)[ \t]*([A-Za-z0-9_.-]*)")
_ESCAPE = re.compile(r'\\(?:u([0-9A-Fa-f]{4})|U([0-9A-Fa-f]{8})|([btnfr"\\]))')
_ESCAPED = {"b": "\b", "t": "\t", "n": "\n", "f": "\f", "r": "\r", '"': '"', "\\": "\\"}


class _LostWayError(Exception):
    """The text at hand follows no rule; the argument says why where tomllib is not to be asked."""


def _unescaped(match: re.Match[str]) -> str:
    code = match[1] or match[2]
    if not code:
        return _ESCAPED[match[3]]
    point = int(code, 16)
    return chr(point) if point <= 0x10FFFF else ""


def read_key(text: str, at: int) -> tuple[tuple[str, ...], int, int]:
    """Return a dotted key's parts, where it starts and where it ends.

    Raises:
        ValueError: No key stands there, or it has more than MAX_DEPTH parts.
    """
    parts: list[str] = []
    start = end = at
    while match := _KEY_PART.match(text, at):
        written = match[1]
        if written[0] == '"':
            written = _ESCAPE.sub(_unescaped, written[1:-1])
        elif written[0] == "'":
            written = written[1:-1]
        start = start if parts else match.start(1)
        parts.append(written)
        at, end = match.end(), match.end(1)
        if not text.startswith(".", at):
            return tuple(parts), start, end
        at += 1
        if len(parts) == MAX_DEPTH:
            message = "the key has too many parts"
            raise ValueError(message)
    raise ValueError


def _key(text: str, at: int) -> tuple[tuple[str, ...], int, int]:
    try:
        return read_key(text, at)
    except ValueError as error:
        raise _LostWayError(*error.args) from error


def _after(pattern: re.Pattern[str], text: str, at: int) -> int:
    match = pattern.match(text, at)
    return match.end() if match else at


def _require_room(count: int) -> None:
    if count > MAX_ENTRIES:
        message = "a list or table is too long"
        raise _LostWayError(message)


def _array_end(text: str, at: int, depth: int) -> int:
    at = _after(_SPACE_IN_ARRAY, text, at + 1)
    count = 0
    while not text.startswith("]", at):
        count += 1
        _require_room(count)
        at, _ = _value(text, at, (), depth + 1)
        at = _after(_SPACE_IN_ARRAY, text, at)
        if text.startswith(",", at):
            at = _after(_SPACE_IN_ARRAY, text, at + 1)
        elif not text.startswith("]", at):
            raise _LostWayError
    return at + 1


def _inline_table(text: str, at: int, path: tuple[str, ...], depth: int) -> tuple[int, tuple[Assignment, ...]]:
    inner: list[Assignment] = []
    at = _after(_SPACE, text, at + 1)
    while not text.startswith("}", at):
        assignment = _assignment(text, at, path, depth + 1)
        inner.append(assignment)
        _require_room(len(inner))
        at = _after(_SPACE, text, assignment.value_end)
        if text.startswith(",", at):
            at += 1
        elif not text.startswith("}", at):
            raise _LostWayError
    return at + 1, tuple(inner)


def _value(text: str, at: int, path: tuple[str, ...], depth: int) -> tuple[int, tuple[Assignment, ...]]:
    if depth > MAX_DEPTH:
        message = "lists or tables are nested too deep"
        raise _LostWayError(message)
    if text.startswith("[", at):
        return _array_end(text, at, depth), ()
    if text.startswith("{", at):
        return _inline_table(text, at, path, depth)
    match = _STRING.match(text, at) or _BARE_VALUE.match(text, at)
    if match is None:
        raise _LostWayError
    return match.end(), ()


def _assignment(text: str, at: int, table: tuple[str, ...], depth: int = 0) -> Assignment:
    key, start, key_end = _key(text, at)
    equals = _after(_SPACE, text, key_end)
    if not text.startswith("=", equals):
        raise _LostWayError
    path = table + key
    value_start = _after(_SPACE, text, equals + 1)
    value_end, inner = _value(text, value_start, path, depth)
    return Assignment(path, len(key), start, key_end, value_start, value_end, value_end, inner)


class _Scanner:
    """One pass over a text, a statement at a time."""

    def __init__(self, text: str) -> None:
        self.text = text
        self.sections: list[Section] = []
        self.path: tuple[str, ...] = ()
        self.is_array = False
        self.start = self.header = self.body = 0
        self.assignments: list[Assignment] = []
        self.lost: list[Lost] = []
        self.comment_start: int | None = None
        self.statement_count = 0
        self.lost_count = 0

    def scan(self) -> Scan:
        at = 0
        while at < len(self.text) and self.statement_count <= MAX_STATEMENTS and self.lost_count <= MAX_LOST:
            at = self._plain(at) or self._gap(at) or self._statement(at)
        self._close(at)
        return Scan(tuple(self.sections), at)

    def _plain(self, at: int) -> int | None:
        match = _PLAIN.match(self.text, at)
        if match is None:
            return None
        self.comment_start = None
        self.statement_count += 1
        end = match.end()
        self.assignments.append(Assignment((*self.path, match[1]), 1, *match.span(1), *match.span(2), end))
        return end

    def _gap(self, at: int) -> int | None:
        blank = _BLANK_LINES.match(self.text, at)
        if blank:
            self.comment_start = None
            return blank.end()
        comment = _COMMENT_LINES.match(self.text, at)
        if comment is None:
            return None
        self.comment_start = at
        return comment.end()

    def _statement(self, at: int) -> int:
        self.statement_count += 1
        like_a_header = _LIKE_A_HEADER.match(self.text, at)
        at = self._header(at, like_a_header) if like_a_header else self._assignment(at)
        self.comment_start = None
        return at

    def _assignment(self, at: int) -> int:
        try:
            assignment = _assignment(self.text, at, self.path)
            end = self._line_end(assignment.value_end)
        except _LostWayError as error:
            return self._step_over(at, str(error))
        self.assignments.append(assignment._replace(end=end))
        return end

    def _line_end(self, at: int) -> int:
        rest = _REST_OF_LINE.match(self.text, at)
        if rest is None:
            raise _LostWayError
        return rest.end()

    def _closed(self, at: int, brackets: str) -> int:
        at = _after(_SPACE, self.text, at)
        if not self.text.startswith(brackets, at):
            raise _LostWayError
        return at + len(brackets)

    def _header(self, at: int, like: re.Match[str]) -> int:
        self._close(at if self.comment_start is None else self.comment_start)
        self.header = like.start(1)
        brackets = like[1]
        self.is_array = len(brackets) == 2
        try:
            self.path, _, end = _key(self.text, like.end(1))
            self.body = self._line_end(self._closed(end, "]" * len(brackets)))
        except _LostWayError as error:
            # Read as the header that it was meant to be, lest its keys count as the table's above.
            self.path = tuple(like[2].split(".")[:MAX_DEPTH]) if like[2] else ("",)
            self.is_array = self.is_array or self.path == ("waypoint",)
            self.body = self._step_over(at, str(error))
        return self.body

    def _step_over(self, at: int, reason: str) -> int:
        end = self.text.find("\n", at) + 1 or len(self.text)
        self.lost.append(Lost(at, end, reason))
        self.lost_count += 1
        return end

    def _close(self, end: int) -> None:
        self.sections.append(
            Section(
                self.path,
                self.is_array,
                self.start,
                self.header,
                self.body,
                end,
                tuple(self.assignments),
                tuple(self.lost),
            )
        )
        self.start = end
        self.assignments, self.lost = [], []


def scan(text: str) -> Scan:
    """Return where everything stands in a TOML text. Never raises; time grows with the length of the text."""
    return _Scanner(text).scan()
