"""The blocks of a plan file: its head, a block for each waypoint, and what stands between them."""

from __future__ import annotations

from itertools import groupby
from typing import TYPE_CHECKING, NamedTuple

from navcore.files.planfile_keys import CRAFT, WAYPOINT
from navcore.files.toml_syntax import Fault, shorten

if TYPE_CHECKING:
    from collections.abc import Iterator

    from navcore.errors import Problem
    from navcore.files.toml_source import Source
    from navcore.files.toml_text import Section


class Block(NamedTuple):
    """Sections that belong together: a waypoint's header with its sub-tables, or a run of others.

    Attributes:
        is_waypoint: Whether it is a waypoint's.
        sections: One or more, in file order.
    """

    is_waypoint: bool
    sections: tuple[Section, ...]

    @property
    def start(self) -> int:
        """First character, leading comments included."""
        return self.sections[0].start

    @property
    def end(self) -> int:
        """Where the next block starts."""
        return self.sections[-1].end


def is_waypoint_header(section: Section) -> bool:
    """Say whether a section opens a waypoint's block; [waypoint] is meant as one too, and is named as a problem."""
    return section.path == ("waypoint",)


def split_blocks(sections: tuple[Section, ...]) -> list[Block]:
    """Return the blocks of a file; the first is its head."""
    number = 0
    owners: list[tuple[int, bool]] = []
    for section in sections:
        if is_waypoint_header(section):
            number += 1
            owners.append((number, True))
        else:
            goes_on = bool(owners) and owners[-1][1] and section.path[:1] == ("waypoint",)
            owners.append((number, goes_on))
    grouped = groupby(zip(owners, sections, strict=True), key=lambda pair: pair[0])
    return [Block(owner[1], tuple(section for _, section in pairs)) for owner, pairs in grouped]


def misplaced(source: Source, blocks: list[Block]) -> Iterator[Problem]:
    """Return what is wrong with the headers of a file, and with waypoints that are no blocks of their own."""
    for block in blocks:
        for section in block.sections:
            fault = _header_fault(block, section)
            if fault:
                yield source.problem(section.header, fault)
    for assignment in blocks[0].sections[0].assignments:
        if assignment.path[0] == "waypoint":
            what = "waypoint is written as a value"
            advice = "write a [[waypoint]] block for each, below everything else"
            yield source.problem(assignment.start, Fault(what, WAYPOINT.allowed, advice))


def _header_fault(block: Block, section: Section) -> Fault | None:
    if is_waypoint_header(section) and not section.is_array:
        return Fault("[waypoint] stands in single brackets", WAYPOINT.allowed, "type [[waypoint]]")
    if section.path == ("craft",) and section.is_array:
        return Fault("[[craft]] stands in double brackets", CRAFT.allowed, "type [craft]")
    if section.path[:1] == ("waypoint",) and not block.is_waypoint:
        name = shorten(".".join(section.path))
        return Fault(f"[{name}] follows no [[waypoint]] block", WAYPOINT.allowed, "move it into its waypoint's block")
    return None
