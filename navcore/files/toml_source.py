"""A TOML text with its blocks: every value that can be read, and every line that can't, each with its place."""

from __future__ import annotations

import re
import tomllib
from bisect import bisect_right
from functools import cached_property
from typing import TYPE_CHECKING

from navcore.errors import Problem
from navcore.files.toml_syntax import Fault, describe, place, shorten
from navcore.files.toml_text import Assignment, Section, read_key

if TYPE_CHECKING:
    from collections.abc import Iterable, Iterator, Mapping

_FORBIDDEN = re.compile(r"[\x00-\x08\x0b\x0c\x0e-\x1f\x7f]|\r(?!\n)")


class Source:
    """A text that can name the line and column of any place in it."""

    def __init__(self, text: str) -> None:
        self.text = text

    @cached_property
    def _line_starts(self) -> list[int]:
        return [0, *(match.end() for match in re.finditer("\n", self.text))]

    def line(self, offset: int) -> int:
        """Return the line of a place, from 1."""
        return bisect_right(self._line_starts, offset)

    def problem(self, offset: int, fault: Fault) -> Problem:
        """Return what is wrong at a place."""
        line = self.line(offset)
        return Problem(line, offset - self._line_starts[line - 1] + 1, *fault)


class Table:
    """The values under one header, or under none, and where they stand.

    Attributes:
        sections: The header's, and those of its sub-tables; none where no place is asked for.
        depth: How many parts the header's key has.
        hints: What each key takes, and an example of it as typed.
        values: As tomllib gives them.
        unread_keys: First parts of the keys whose lines can't be read; "" for a line whose key can't be read either.
    """

    def __init__(
        self, source: Source, sections: tuple[Section, ...], depth: int, hints: Mapping[str, tuple[str, str]]
    ) -> None:
        self.source = source
        self.hints = hints
        self.sections = sections
        self.depth = depth
        self.values: dict[str, object] = {}
        self.unread_keys: set[str] = set()

    @property
    def start(self) -> int:
        """First character of the header."""
        return self.sections[0].header if self.sections else 0

    def assignments(self) -> Iterator[Assignment]:
        """Return every assignment, those within inline tables after the one that holds them."""
        for section in self.sections:
            for assignment in section.assignments:
                yield assignment
                yield from _within(assignment)

    @cached_property
    def _places(self) -> dict[tuple[str, ...], int]:
        places: dict[tuple[str, ...], int] = {}
        for section in self.sections:
            for end in range(self.depth + 1, len(section.path) + 1):
                places.setdefault(section.path[self.depth : end], section.header)
        for assignment in self.assignments():
            for end in range(self.depth + 1, len(assignment.path) + 1):
                places.setdefault(assignment.path[self.depth : end], assignment.start)
        return places

    def key_offset(self, *path: str) -> int:
        """Return where a key, or the header that stands for it, begins."""
        return self._places.get(path, self.start)

    def value_offset(self, *path: str, index: int | None = None) -> int:
        """Return where a value begins, or the character at an index in it where it is a plain text on one line."""
        for assignment in self.assignments():
            if assignment.path[self.depth :] == path:
                written = self.source.text[assignment.value_start : assignment.value_end]
                is_plain = written[:1] in {'"', "'"} and written[1:2] != written[:1] and "\\" not in written
                return assignment.value_start + (1 + index if is_plain and index is not None else 0)
        return self.key_offset(*path)

    def gather(self) -> Iterator[Problem]:
        """Fill `values` line by line; yield what is wrong with the lines that can't be read."""
        seen: dict[tuple[str, ...], int] = {}
        for section in self.sections:
            yield from self.lost_lines(section)
            repeats = section.is_array and len(section.path) > self.depth
            if len(section.path) > self.depth and not section.is_array:
                yield from self._repeated(seen, section.path, section.header)
            for assignment in section.assignments:
                yield from self._take(assignment, {} if repeats else seen, keep=not repeats)

    def lost_lines(self, section: Section) -> Iterator[Problem]:
        """Yield what is wrong with the lines of a section that the scanner could not follow."""
        for lost in section.lost:
            yield self._lost(lost.start, lost.end, lost.reason)

    def _take(self, assignment: Assignment, seen: dict[tuple[str, ...], int], *, keep: bool) -> list[Problem]:
        statement = self.source.text[assignment.start : assignment.end]
        loaded, message = load(statement)
        if message:
            key = assignment.path[self.depth]
            self.unread_keys.add(key)
            return [syntax_problem(self.source, assignment.start, statement, message, self.hints.get(key))]
        repeated = self._repeated(seen, assignment.path, assignment.start)
        if repeated or not keep:
            return repeated
        value: object = loaded
        for part in assignment.path[-assignment.key_count :]:
            value = value[part] if isinstance(value, dict) else value
        table = self.values
        for part in assignment.path[self.depth : -1]:
            inner = table.setdefault(part, {})
            if not isinstance(inner, dict):
                return [self._given_twice(assignment.path, assignment.start, self.key_offset(part))]
            table = inner
        table[assignment.path[-1]] = value
        return []

    def _repeated(self, seen: dict[tuple[str, ...], int], path: tuple[str, ...], start: int) -> list[Problem]:
        first = seen.setdefault(path, start)
        return [] if first == start else [self._given_twice(path, start, first)]

    def _given_twice(self, path: tuple[str, ...], start: int, first: int) -> Problem:
        name = shorten(".".join(path[self.depth :]))
        what = f"{name} is given twice, first in line {self.source.line(first)}"
        return self.source.problem(start, Fault(what, "each key once", "take one of the two out"))

    def _lost(self, start: int, end: int, reason: str) -> Problem:
        statement = self.source.text[start:end]
        try:
            key = read_key(statement, 0)[0][0]
        except ValueError:
            key = ""
        self.unread_keys.add(key)
        if reason:
            return self.source.problem(start, Fault(reason, "key = value", "take the line out"))
        _, message = load(statement[:1000])
        if message:
            return syntax_problem(self.source, start, statement, message, self.hints.get(key))
        return self.source.problem(start, Fault("a value that is too long", "key = value", "type a shorter one"))


def _within(assignment: Assignment) -> Iterator[Assignment]:
    for inner in assignment.inner:
        yield inner
        yield from _within(inner)


def syntax_problem(
    source: Source, start: int, statement: str, message: str, hint: tuple[str, str] | None = None
) -> Problem:
    """Return what tomllib found wrong with a part of the text that begins at `start`."""
    return source.problem(start + place(statement, message), describe(statement, message, hint))


def forbidden_characters(source: Source) -> Iterable[Problem]:
    """Return the first control character of each line that no TOML text may hold."""
    offset = 0
    while match := _FORBIDDEN.search(source.text, offset):
        what = f"the control character U+{ord(match[0]):04X}"
        yield source.problem(match.start(), Fault(what, "text without control characters", "take it out"))
        offset = source.text.find("\n", match.end()) + 1 or len(source.text)


def load(text: str) -> tuple[dict[str, object], str]:
    """Return every value of a text, or none and what tomllib says is wrong with it."""
    try:
        return tomllib.loads(text), ""
    except (ValueError, RecursionError) as error:
        return {}, str(error)
