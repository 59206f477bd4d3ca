"""A plan file's bytes to a plan, or to every problem in it at once."""

from __future__ import annotations

import re
from dataclasses import dataclass, replace
from itertools import islice
from typing import TYPE_CHECKING

from navcore.errors import PlanFileError, Problem
from navcore.files.planfile_blocks import misplaced, split_blocks
from navcore.files.planfile_keys import HEAD_KEYS, WAYPOINT, WAYPOINT_KEYS
from navcore.files.planfile_tables import (
    MAX_FOUND,
    Reader,
    read_craft,
    read_head,
    read_leg,
    read_waypoint,
    refuse_leg_keys,
    root_readers,
)
from navcore.files.toml_source import Source, Table, forbidden_characters, load, syntax_problem
from navcore.files.toml_syntax import Fault, shorten
from navcore.files.toml_text import scan
from navcore.plan.model import Leg, Line, Plan, PlanText, Waypoint

if TYPE_CHECKING:
    from collections.abc import Iterable, Iterator

MAX_BYTES = 16 * 1024 * 1024
"""A plan of 10,000 waypoints has about 3 MB."""

MAX_PROBLEMS = 200
"""More are counted, not listed."""

_ONLY_UTF_8 = "text in UTF-8"
_BOM = "\ufeff"
_BAD_BYTE = re.compile("[\udc80-\udcff]")


@dataclass(frozen=True, slots=True)
class ReadPlan:
    """A plan as read.

    Attributes:
        plan: The plan, with the text of its file.
        warnings: What is kept but not used, and what looks like a slip; in file order.
    """

    plan: Plan
    warnings: tuple[Problem, ...]


def read_plan(data: bytes, path: str) -> ReadPlan:
    """Return the plan that a file holds.

    Args:
        data: The whole file.
        path: Its name, for messages.

    Raises:
        PlanFileError: It can't be read in full; carries every problem, or the first MAX_PROBLEMS and how many more.
    """
    source, bom = _decode(data, path)
    return _PlanReader(source, bom, path).read()


def _decode(data: bytes, path: str) -> tuple[Source, bool]:
    if len(data) > MAX_BYTES:
        allowed = f"{MAX_BYTES // 1024**2} MB"
        what = f"a file of {len(data) / 1024**2:.1f} MB"
        raise PlanFileError(path, (Problem(1, 1, what, allowed, "check that this is a plan file"),))
    text = data.decode("utf-8", "surrogateescape")
    bom = text.startswith(_BOM)
    source = Source(text[1:] if bom else text)
    problems = list(islice(_bad_bytes(source), MAX_FOUND))
    if problems:
        raise PlanFileError(path, _capped(problems))
    return source, bom


def _bad_bytes(source: Source) -> Iterator[Problem]:
    offset = 0
    while match := _BAD_BYTE.search(source.text, offset):
        what = f"the byte 0x{ord(match[0]) - 0xDC00:02X}, which is no character"
        yield source.problem(match.start(), Fault(what, _ONLY_UTF_8, "save the file as UTF-8"))
        offset = source.text.find("\n", match.end()) + 1 or len(source.text)


def _capped(problems: Iterable[Problem]) -> tuple[Problem, ...]:
    ordered = sorted(dict.fromkeys(problems), key=lambda problem: (problem.line, problem.column))
    if len(ordered) <= MAX_PROBLEMS:
        return tuple(ordered)
    first, rest = ordered[:MAX_PROBLEMS], ordered[MAX_PROBLEMS:]
    what = f"at least {len(rest)} more, from this line on"
    more = Problem(rest[0].line, rest[0].column, what, f"a list of {MAX_PROBLEMS}", "put these right first")
    return (*first, more)


def split_end(text: str) -> tuple[str, str]:
    """Return a file's text up to the end of its last line that is not empty, and the newlines after it."""
    content = len(text.rstrip(" \t\r\n"))
    newline = text.find("\n", content)
    if newline < 0:
        return text, ""
    if newline > content and text[newline - 1] == "\r":
        newline -= 1
    return text[:newline], text[newline:]


class _PlanReader:
    """Reads one file; collects problems and warnings on the way."""

    def __init__(self, source: Source, bom: bool, path: str) -> None:
        self.source = source
        self.bom = bom
        self.path = path
        scanned = scan(source.text)
        self.read_to = scanned.read_to
        self.blocks = split_blocks(scanned.sections)
        others = (section for block in self.blocks if not block.is_waypoint for section in block.sections)
        self.root = Table(source, tuple(others), 0, HEAD_KEYS)
        self.problems: list[Problem] = []
        self.warnings: list[Problem] = []
        self.message = ""

    def read(self) -> ReadPlan:
        tables = self._tables()
        head, craft = root_readers(self.root)
        plan = replace(read_head(head), craft=read_craft(craft))
        self._note(head)
        self._note(craft)
        waypoints, legs = self._waypoints(tables)
        if self.message and not self.problems:
            self.problems.append(syntax_problem(self.source, 0, self.source.text, self.message))
        if self.problems:
            raise PlanFileError(self.path, _capped(self.problems))
        plan = replace(plan, waypoints=waypoints, legs=legs, text=self._plan_text(waypoints, legs))
        self.warnings += islice(self._doubtful(plan), MAX_FOUND)
        return ReadPlan(plan, _capped(self.warnings))

    def _note(self, reader: Reader) -> None:
        self.problems += reader.problems
        self.warnings += reader.warnings

    def _tables(self) -> Iterator[Table]:
        """Load the head and return the waypoints' tables, each loaded when it is asked for."""
        source, blocks = self.source, self.blocks
        self.problems += [*islice(forbidden_characters(source), MAX_FOUND), *misplaced(source, blocks)]
        if self.read_to < len(source.text):
            return self._too_long()
        lost = any(section.lost for block in blocks for section in block.sections)
        if not self.problems and not lost:
            whole, self.message = load(source.text)
            if not self.message:
                rows = whole.pop("waypoint", [])
                self.root.values = whole
                return self._loaded_tables(rows if isinstance(rows, list) else [])
        self._gather(self.root)
        return self._tables_by_block()

    def _too_long(self) -> Iterator[Table]:
        what = "more than can be a plan; the file was read no further"
        fault = Fault(what, "a plan", "check that this is a plan file")
        self.problems.append(self.source.problem(self.read_to, fault))
        for section in self.root.sections:
            self.problems += self.root.lost_lines(section)
        self.root.unread_keys.add("")
        return iter(())

    def _gather(self, table: Table) -> None:
        lines = {problem.line for problem in self.problems}
        found = list(islice(table.gather(), MAX_FOUND))
        self.problems += [problem for problem in found if problem.line not in lines]
        if len(found) == MAX_FOUND:
            table.unread_keys.add("")

    def _loaded_tables(self, rows: list[dict[str, object]]) -> Iterator[Table]:
        waypoint_blocks = (block for block in self.blocks if block.is_waypoint)
        for block, row in zip(waypoint_blocks, rows, strict=True):
            table = Table(self.source, block.sections, 1, WAYPOINT_KEYS)
            table.values = row
            yield table

    def _tables_by_block(self) -> Iterator[Table]:
        for block in self.blocks:
            if block.is_waypoint:
                table = Table(self.source, block.sections, 1, WAYPOINT_KEYS)
                loaded, message = load(self.source.text[block.start : block.end])
                rows = loaded.get("waypoint")
                lost = any(section.lost for section in block.sections)
                if message or lost or not isinstance(rows, list):
                    self._gather(table)
                else:
                    table.values = rows[0]
                yield table

    def _waypoints(self, tables: Iterator[Table]) -> tuple[tuple[Waypoint, ...], tuple[Leg, ...]]:
        waypoints: list[Waypoint] = []
        legs: list[Leg] = []
        for table in tables:
            reader = Reader(table, WAYPOINT_KEYS)
            waypoints.append(read_waypoint(reader, self._block_text(table)))
            if len(waypoints) == 1:
                refuse_leg_keys(reader)
            else:
                legs.append(read_leg(reader))
            if len(self.warnings) < MAX_FOUND:
                reader.name_unknown(f"a {WAYPOINT.example} block")
            self._note(reader)
            if len(self.problems) > MAX_PROBLEMS:
                self._give_up(len(waypoints))
                break
        return tuple(waypoints), tuple(legs)

    def _give_up(self, read_count: int) -> None:
        unread = [block for block in self.blocks if block.is_waypoint][read_count:]
        if unread:
            what = f"{len(unread)} more {WAYPOINT.example} blocks, not read"
            advice = "put the problems above right first"
            self.problems.append(self.source.problem(unread[0].sections[0].header, Fault(what, "a plan", advice)))

    def _block_text(self, table: Table) -> str:
        start, end = table.sections[0].start, table.sections[-1].end
        return self._in_the_middle(self.source.text[start:end], is_last=end == len(self.source.text))

    def _in_the_middle(self, text: str, *, is_last: bool) -> str:
        """Return a block's text as it would stand were other blocks to follow."""
        return split_end(text)[0] + 2 * self._newline() if is_last else text

    def _newline(self) -> str:
        first = self.source.text.find("\n")
        return "\r\n" if first > 0 and self.source.text[first - 1] == "\r" else "\n"

    def _plan_text(self, waypoints: tuple[Waypoint, ...], legs: tuple[Leg, ...]) -> PlanText:
        text = self.source.text
        between: list[tuple[int, str]] = []
        waypoint_count = 0
        for block in self.blocks:
            if block.is_waypoint:
                waypoint_count += 1
            elif waypoint_count:
                written = self._in_the_middle(text[block.start : block.end], is_last=block is self.blocks[-1])
                between.append((waypoint_count, written))
        head = self._in_the_middle(text[: self.blocks[0].end], is_last=len(self.blocks) == 1)
        as_read = {point.block: (point, leg) for point, leg in zip(waypoints, (Leg(), *legs), strict=False)}
        return PlanText(head, tuple(between), self._newline(), self.bom, split_end(text)[1], as_read)

    def _doubtful(self, plan: Plan) -> Iterator[Problem]:
        """Return a warning for each name that stands at two positions, and for choices that a leg makes no use of."""
        blocks = [block for block in self.blocks if block.is_waypoint]
        first: dict[str, int] = {}
        for number, (waypoint, block) in enumerate(zip(plan.waypoints, blocks, strict=True)):
            earlier = first.setdefault(waypoint.name, number) if waypoint.name else number
            if plan.waypoints[earlier].position != waypoint.position:
                line = self.source.line(blocks[earlier].sections[0].header)
                what = f"{shorten(waypoint.name)} is also the waypoint of line {line}, at another position"
                fault = Fault(what, "any name", "give one of the two another name if they are two places")
                yield self.source.problem(block.sections[0].header, fault)
        for leg, block in zip(plan.legs, blocks[1:], strict=True):
            for path, fault in (*_idle_choices(plan.line_of(leg), leg), *_stray_notes(plan, leg)):
                table = Table(self.source, block.sections, 1, WAYPOINT_KEYS)
                yield self.source.problem(table.key_offset(*path), fault)


def _stray_notes(plan: Plan, leg: Leg) -> Iterator[tuple[tuple[str, str], Fault]]:
    """Yield the notes that stand in none of the columns that a plan lists, where it lists any."""
    for column in (column for column, _ in leg.notes if plan.columns and column not in plan.columns):
        what = f"the note {shorten(column)} is in no column that the plan lists; it is printed beneath the leg"
        listed = ", ".join(map(shorten, plan.columns))
        yield ("notes", column), Fault(what, listed, "add it to columns in the head of the file, or mend its name")


def _idle_choices(line: Line, leg: Leg) -> Iterator[tuple[tuple[str], Fault]]:
    """Yield the keys of a leg's block that its line makes no use of, and what is to be said of each."""
    if leg.limit_deg is not None and line is not Line.COMPOSITE:
        what = f"this leg is a {line.value}, which keeps to no limit"
        yield ("limit",), Fault(what, "a limit with a composite", 'type line = "composite", or take the limit out')
    if leg.parts is not None and line is Line.RHUMB:
        what = "this leg is a rhumb line, which is steered whole"
        yield ("parts",), Fault(what, "parts with a great circle or composite", "give its line, or take the parts out")
