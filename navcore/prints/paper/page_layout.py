"""Pages as lists of marks, before any file format: where each text and rule stands, in points from the top left.

What is laid out here can be looked at, measured and tested without a PDF.
"""

from __future__ import annotations

from dataclasses import dataclass
from enum import StrEnum
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from collections.abc import Callable, Iterable, Sequence

MARGIN_PT = 34.0
"""On every side: 12 mm, room for the holes of a binder."""


class PaperName(StrEnum):
    """Sizes of paper, by their usual names."""

    A4 = "A4"
    LETTER = "Letter"


# ISO 216 (210 × 297 mm) and ANSI/ASME Y14.1 size A (8.5 × 11 in), the longer side first.
_SIDES_PT = {PaperName.A4: (297.0 / 25.4 * 72.0, 210.0 / 25.4 * 72.0), PaperName.LETTER: (11.0 * 72.0, 8.5 * 72.0)}


@dataclass(frozen=True, slots=True)
class Paper:
    """A sheet of paper and which way it is held.

    Attributes:
        name: Its size.
        landscape: Whether its longer side is level.
    """

    name: PaperName = PaperName.A4
    landscape: bool = True

    @property
    def width_pt(self) -> float:
        """Width of the sheet."""
        return _SIDES_PT[self.name][0 if self.landscape else 1]

    @property
    def height_pt(self) -> float:
        """Height of the sheet."""
        return _SIDES_PT[self.name][1 if self.landscape else 0]

    @property
    def room_pt(self) -> float:
        """Width between the margins."""
        return self.width_pt - 2.0 * MARGIN_PT


@dataclass(frozen=True, slots=True)
class Text:
    """A text in one line.

    Attributes:
        x_pt: Where it begins.
        y_pt: Its base line.
        text: Printable text.
        size_pt: Size of the font.
        bold: Whether it is set bold.
        upright: False for text that is turned to be read from the right.
    """

    x_pt: float
    y_pt: float
    text: str
    size_pt: float
    bold: bool = False
    upright: bool = True


@dataclass(frozen=True, slots=True)
class Rule:
    """A straight line."""

    x1_pt: float
    y1_pt: float
    x2_pt: float
    y2_pt: float
    thick_pt: float


@dataclass(frozen=True, slots=True)
class Frame:
    """An empty box, given by its upper left corner."""

    x_pt: float
    y_pt: float
    width_pt: float
    height_pt: float
    thick_pt: float = 0.7


@dataclass(frozen=True, slots=True)
class Arrowhead:
    """A filled arrowhead that points down; its point is given."""

    x_pt: float
    y_pt: float
    width_pt: float = 5.0
    height_pt: float = 6.0


Mark = Text | Rule | Frame | Arrowhead


def moved(mark: Mark, y_pt: float) -> Mark:
    """Return a mark set lower by that much."""
    # Each written out: dataclasses.replace takes several times as long, and a passage has thousands of marks.
    if isinstance(mark, Text):
        return Text(mark.x_pt, mark.y_pt + y_pt, mark.text, mark.size_pt, mark.bold, mark.upright)
    if isinstance(mark, Rule):
        return Rule(mark.x1_pt, mark.y1_pt + y_pt, mark.x2_pt, mark.y2_pt + y_pt, mark.thick_pt)
    if isinstance(mark, Frame):
        return Frame(mark.x_pt, mark.y_pt + y_pt, mark.width_pt, mark.height_pt, mark.thick_pt)
    return Arrowhead(mark.x_pt, mark.y_pt + y_pt, mark.width_pt, mark.height_pt)


@dataclass(frozen=True, slots=True)
class Strip:
    """A band across the page, never split; its marks are measured from its top."""

    height_pt: float
    marks: tuple[Mark, ...] = ()


@dataclass(frozen=True, slots=True)
class Block:
    """A row of the table: strips that stay on one page where they fit on one."""

    strips: tuple[Strip, ...]

    @property
    def height_pt(self) -> float:
        """Height of all its strips."""
        return sum(strip.height_pt for strip in self.strips)


Group = tuple[Block, ...]
"""Blocks that stay on one page where they fit on one: a waypoint and the leg after it."""


@dataclass(frozen=True, slots=True)
class Furniture:
    """What stands on every page.

    Attributes:
        head: From the number of the page and of all pages; always as high.
        foot: Set at the bottom margin.
    """

    head: Callable[[int, int], Sequence[Strip]]
    foot: Sequence[Strip]


def paginate(
    groups: Iterable[Group], furniture: Furniture, paper: Paper, rest: Callable[[float], Sequence[Strip]] | None = None
) -> list[list[Mark]]:
    """Return the marks of every page: head, as many groups as fit, foot.

    Args:
        groups: What the pages hold.
        furniture: What stands on each of them.
        paper: The sheet.
        rest: Fills what is left of the last page; it is given the height.
    """
    top_pt = MARGIN_PT + _height_pt(furniture.head(1, 1))
    foot_pt = paper.height_pt - MARGIN_PT - _height_pt(furniture.foot)
    bodies = _bodies(groups, foot_pt - top_pt)
    if rest:
        bodies[-1] += rest(foot_pt - top_pt - _height_pt(bodies[-1]))
    return [
        [
            *_placed(furniture.head(number, len(bodies)), MARGIN_PT),
            *_placed(body, top_pt),
            *_placed(furniture.foot, foot_pt),
        ]
        for number, body in enumerate(bodies, 1)
    ]


def _bodies(groups: Iterable[Group], room_pt: float) -> list[list[Strip]]:
    bodies: list[list[Strip]] = [[]]
    left_pt = room_pt
    for strips in _unsplit(groups, room_pt):
        height_pt = _height_pt(strips)
        if height_pt > left_pt and bodies[-1]:
            bodies.append([])
            left_pt = room_pt
        bodies[-1] += strips
        left_pt -= height_pt
    return bodies


def _unsplit(groups: Iterable[Group], room_pt: float) -> Iterable[Sequence[Strip]]:
    """Yield what has to stay together: whole groups where a page holds them, else blocks, else strips."""
    for group in groups:
        if sum(block.height_pt for block in group) <= room_pt:
            yield [strip for block in group for strip in block.strips]
            continue
        for block in group:
            if block.height_pt <= room_pt:
                yield block.strips
            else:
                yield from ([strip] for strip in block.strips)


def _placed(strips: Iterable[Strip], y_pt: float) -> Iterable[Mark]:
    for strip in strips:
        yield from (moved(mark, y_pt) for mark in strip.marks)
        y_pt += strip.height_pt


def _height_pt(strips: Iterable[Strip]) -> float:
    return sum(strip.height_pt for strip in strips)
