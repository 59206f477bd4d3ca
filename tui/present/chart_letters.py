"""What is lettered on the chart: waypoints with their numbers and names, the graticule, the scale bar, the cross."""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

import numpy as np

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.text.plain import cell_width, fit, visible
from navcore.text.position import format_graticule_line
from tui.present.cells import spelled
from tui.present.dots import ACROSS, DOWN
from tui.present.tone import Tone

if TYPE_CHECKING:
    from collections.abc import Iterable, Iterator

    import numpy.typing as npt

    from navcore.charts.graticule import Graticule, GraticuleLine
    from navcore.trigonometry import FloatArray
    from tui.present.cells import Cells
    from tui.present.chart_scene import Scene
    from tui.present.chart_view import View

    Mask = npt.NDArray[np.bool_]

MARK, MARK_HERE, MARK_PART = "○", "●", "+"

_APART = 2
_LONGEST_NAME = 24
_MOST_NAMES = 80
_LONGEST_BAR = 16
_CROSS = (("│", 0, -1), ("─", -1, 0), ("┼", 0, 0), ("─", 1, 0), ("│", 0, 1))
_SIDES_OF = {False: ("left", "right", "bottom", "top"), True: ("bottom", "top", "left", "right")}
"""Where a parallel and a meridian are named first."""


def letter_waypoints(cells: Cells, scene: Scene, view: View, here: int | None, of_legs: Mask) -> None:
    """Mark the waypoints, the one of the cursor first, and letter them where there is room; then where parts meet.

    Args:
        cells: What is lettered on.
        scene: The plan.
        view: What is seen of it.
        here: The waypoint of the cursor.
        of_legs: Cells that legs run through, which words keep clear of where they can.
    """
    waypoints = scene.solution.plan.waypoints
    if here is None:
        return
    places = _cells_of(view, np.array([waypoint.position for waypoint in waypoints]))
    last = len(waypoints) - 1
    marked = _clear_of_each_other(dict.fromkeys((here, 0, last, *places)), places)
    for index in marked:
        is_here = index == here
        cells.write(*places[index], MARK_HERE if is_here else MARK, Tone.STRONG if is_here else Tone.PLAIN)
    for index in marked:
        name = spelled(visible(waypoints[index].name)) if len(marked) <= _MOST_NAMES else ""
        tone = Tone.STRONG if index == here else Tone.PLAIN
        _letter(
            cells, places[index], (f"{index + 1} {fit(name, _LONGEST_NAME)}".strip(), str(index + 1)), tone, of_legs
        )
    parts = [point for leg in scene.solution.legs if leg.parts for point in leg.parts.points[1:-1]]
    if parts:
        for column, row in _cells_of(view, np.array(parts)).values():
            if cells.is_free(column, row, 1):
                cells.write(column, row, MARK_PART, Tone.PLAIN)


def _cells_of(view: View, position: FloatArray) -> dict[int, tuple[int, int]]:
    """Return column and row of each position, shape (n, 2), that is seen, by its index."""
    plane = view.plane
    place = plane.to_mm(position[:, 0], position[:, 1])
    seen = np.flatnonzero(plane.holds(place))
    column = np.minimum(place[seen, 0] / ACROSS, view.columns - 1).astype(int)
    row = np.maximum(view.rows - 1 - (place[seen, 1] / DOWN).astype(int), 0)
    return dict(zip(seen.tolist(), zip(column.tolist(), row.tolist(), strict=True), strict=True))


def _clear_of_each_other(order: Iterable[int], places: dict[int, tuple[int, int]]) -> list[int]:
    """Return, in their order, the waypoints that can be marked: none has another marked right beside it."""
    taken: set[tuple[int, int]] = set()
    clear = []
    for index in order:
        if index not in places:
            continue
        column, row = places[index]
        if all((at, row) not in taken for at in range(column - _APART, column + _APART + 1)):
            taken.add((column, row))
            clear.append(index)
    return clear


def _letter(cells: Cells, place: tuple[int, int], texts: tuple[str, ...], tone: Tone, of_legs: Mask) -> None:
    """Letter a waypoint with the first of the texts that has room: clear of legs, else the last of them over a leg."""
    for text in dict.fromkeys(texts):
        for column, row in _beside(*place, _width(text)):
            if _has_room(cells, column, row, text, of_legs):
                cells.write(column, row, text, tone)
                return
    for column, row in _beside(*place, _width(texts[-1])):
        if _has_room(cells, column, row, texts[-1]):
            cells.write(column, row, texts[-1], tone)
            return


def _has_room(cells: Cells, column: int, row: int, text: str, of_legs: Mask | None = None) -> bool:
    """Say whether a text has room, a free cell on either side of it, so that no number runs into another.

    Args:
        cells: What it would stand on.
        column: Where it would begin.
        row: Likewise.
        text: The text.
        of_legs: Cells that it must keep clear of, where it must.
    """
    end = column + _width(text)
    if column < 0 or end > cells.columns:
        return False
    left = max(column - 1, 0)
    if not cells.is_free(left, row, min(end + 1, cells.columns) - left):
        return False
    return of_legs is None or not of_legs[row, column:end].any()


def _beside(column: int, row: int, width: int) -> Iterator[tuple[int, int]]:
    """Yield where words may begin: right of a mark, left of it, above and below it, a little farther off."""
    yield column + 2, row
    yield column - 1 - width, row
    for down in (-1, 1, -2, 2):
        for right in (1, -width, -(width // 2)):
            yield column + right, row + down


def _width(text: str) -> int:
    return len(text) if text.isascii() else sum(cell_width(character) for character in text)


def letter_graticule(cells: Cells, graticule: Graticule, of_legs: Mask) -> None:
    """Name each meridian and parallel once, at the edge of the chart where it can."""
    for line in graticule.lines:
        interval_min = graticule.interval_min(is_meridian=line.is_meridian)
        text = format_graticule_line(line.value_deg, is_meridian=line.is_meridian, interval_min=interval_min)
        for column, row in _ends(cells, line, len(text)):
            if _has_room(cells, column, row, text, of_legs):
                cells.write(column, row, text, Tone.QUIET)
                break


def _ends(cells: Cells, line: GraticuleLine, width: int) -> Iterator[tuple[int, int]]:
    """Yield where a line's name may begin: at its ends, or where one that has none crosses the central meridian."""
    ends = sorted(line.ends, key=lambda end: _SIDES_OF[line.is_meridian].index(end.side))
    places = [(end.x_mm, end.y_mm, end.side) for end in ends]
    if not places and not line.is_meridian:
        piece = max(line.pieces_mm, key=len)
        places = [(*piece[len(piece) // 2].tolist(), "inside")]
    for x_mm, y_mm, side in places:
        column = int(x_mm / ACROSS) - (0 if side == "left" else width if side == "right" else width // 2)
        row = cells.rows - 1 - int(y_mm / DOWN)
        yield min(max(column, 0), cells.columns - width), min(max(row, 0), cells.rows - 1)


def draw_bar(cells: Cells, view: View, of_legs: Mask) -> None:
    """Draw a scale bar that is true at the cross, in the first corner with room for it."""
    position = view.position
    if position is None or not view.projection.conformal:
        return
    factor = float(view.projection.scale_factor(*position))
    if not math.isfinite(factor):
        return
    cell_m = ACROSS * view.dot_m / factor
    most_nmi = _LONGEST_BAR * cell_m / METRES_PER_NAUTICAL_MILE
    power = 10.0 ** math.floor(math.log10(most_nmi))
    length_nmi = next(step * power for step in (5.0, 2.0, 1.0) if step * power <= most_nmi)
    bar = round(length_nmi * METRES_PER_NAUTICAL_MILE / cell_m)
    text = f"├{'─' * max(bar - 2, 0)}┤ {length_nmi:g} NM at the cross"
    for column in (cells.columns - len(text) - 1, 1):
        for row in (0, cells.rows - 2):
            if _has_room(cells, column, row, text, of_legs):
                cells.write(column, row, text, Tone.PLAIN)
                return


def draw_cross(cells: Cells, view: View) -> None:
    """Draw the cross, before the words, which keep clear of it; a waypoint under it is marked over it."""
    column, row = view.cross
    for text, right, down in _CROSS:
        cells.write(column + right, row + down, text, Tone.CURSOR)
