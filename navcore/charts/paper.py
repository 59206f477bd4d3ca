"""Paper, and the natural scales that sheets are drawn at."""

from __future__ import annotations

from dataclasses import dataclass

from navcore.errors import ParseError, RangeError

SIZES_MM: dict[str, tuple[float, float]] = {
    "A4": (210.0, 297.0),
    "A3": (297.0, 420.0),
    "A2": (420.0, 594.0),
    "A1": (594.0, 841.0),
    "A0": (841.0, 1189.0),
}
"""Width and height upright. Source: ISO 216."""

SCALES: tuple[float, ...] = tuple(
    step * 10.0**power for power in range(3, 9) for step in (1.0, 1.25, 1.5, 2.0, 2.5, 3.0, 4.0, 5.0, 6.0, 7.5)
)
"""The denominators that a scale is chosen from where none is given."""


@dataclass(frozen=True, slots=True)
class Paper:
    """A sheet of paper and how it is parted: margin, foot for words and bars, border for the labels, neat line.

    Attributes:
        name: As ISO 216 has it.
        width_mm: As it is used.
        height_mm: As it is used.
        margin_mm: Left blank on all four sides.
    """

    name: str
    width_mm: float
    height_mm: float
    margin_mm: float = 8.0

    def __post_init__(self) -> None:
        if not 0.0 <= self.margin_mm <= 40.0:
            raise RangeError("margin_mm", self.margin_mm, "0 to 40 mm")

    @property
    def border_mm(self) -> float:
        """Between the neat line and what is round it."""
        return 8.0

    @property
    def head_mm(self) -> float:
        """Above the border, for the title."""
        return 7.0

    @property
    def foot_mm(self) -> float:
        """Below the border, for words and bars; deeper where the paper is narrow, since the words are no smaller."""
        return 34.0 if self.width_mm >= 400.0 else 46.0 if self.width_mm >= 280.0 else 66.0

    @property
    def frame_width_mm(self) -> float:
        """Width inside the neat line."""
        return self.width_mm - 2.0 * (self.margin_mm + self.border_mm)

    @property
    def frame_height_mm(self) -> float:
        """Height inside the neat line."""
        return self.height_mm - 2.0 * (self.margin_mm + self.border_mm) - self.foot_mm - self.head_mm

    @property
    def origin_mm(self) -> tuple[float, float]:
        """Where on the paper, from its lower left corner, the lower left corner of the neat line is."""
        return self.margin_mm + self.border_mm, self.margin_mm + self.border_mm + self.foot_mm

    def turned(self) -> Paper:
        """Return the same paper the other way up."""
        return Paper(self.name, self.height_mm, self.width_mm, self.margin_mm)


def paper_named(name: str, margin_mm: float = 8.0) -> Paper:
    """Return a paper by its name, upright.

    Raises:
        ParseError: No paper has that name; the message lists those there are.
    """
    key = name.strip().upper()
    if key not in SIZES_MM:
        raise ParseError(name, (0, len(name)), f"no paper is named {name!r}", f"type one of: {', '.join(SIZES_MM)}")
    return Paper(key, *SIZES_MM[key], margin_mm)
