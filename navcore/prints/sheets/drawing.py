"""A page as lines, areas and words in millimetres from its lower left corner: what PDF and SVG both write."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from navcore.prints.paper.fonts import width_pt

if TYPE_CHECKING:
    from navcore.trigonometry import FloatArray

MILLIMETRES_PER_POINT = 25.4 / 72.0


@dataclass(frozen=True, slots=True, eq=False)
class Stroke:
    """A line.

    Attributes:
        points_mm: Shape (n, 2).
        thick_mm: How thick.
        grey: 0 is black, 1 is white.
        dash_mm: Lengths of dash and gap in turn; none is a whole line.
    """

    points_mm: FloatArray
    thick_mm: float = 0.2
    grey: float = 0.0
    dash_mm: tuple[float, ...] = ()


@dataclass(frozen=True, slots=True, eq=False)
class Area:
    """A filled area without an outline.

    Attributes:
        points_mm: Its corners, shape (n, 2).
        grey: 0 is black, 1 is white.
    """

    points_mm: FloatArray
    grey: float = 0.0


@dataclass(frozen=True, slots=True)
class Words:
    """A line of words, printable text.

    Attributes:
        text: The words.
        x_mm: Where the base line begins.
        y_mm: Likewise.
        size_mm: Size of the letters.
        turn_deg: How far the base line is turned from level, anticlockwise.
        bold: Whether they are bold.
    """

    text: str
    x_mm: float
    y_mm: float
    size_mm: float
    turn_deg: float = 0.0
    bold: bool = False


@dataclass(frozen=True, slots=True, eq=False)
class Drawing:
    """A page.

    Attributes:
        width_mm: Of the paper.
        height_mm: Of the paper.
        marks: In the order in which they are drawn, the later over the earlier.
    """

    width_mm: float
    height_mm: float
    marks: tuple[Stroke | Area | Words, ...]


def words_width_mm(text: str, size_mm: float, *, bold: bool = False) -> float:
    """Return how wide printable words are."""
    return width_pt(text, size_mm / MILLIMETRES_PER_POINT, bold=bold) * MILLIMETRES_PER_POINT
