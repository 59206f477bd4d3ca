"""The chart as it stands in the cells of the terminal: graticule, shore and legs, and over them what is lettered."""

from __future__ import annotations

from typing import TYPE_CHECKING, NamedTuple

import numpy as np

from navcore.charts.graticule import make_graticule
from tui.present.cells import Cells
from tui.present.chart_letters import draw_bar, draw_cross, letter_graticule, letter_waypoints
from tui.present.dots import BROKEN, DOTTED, WHOLE, Dots
from tui.present.rows import leg_of, waypoint_before
from tui.present.tone import Tone

if TYPE_CHECKING:
    from collections.abc import Iterator

    from navcore.charts.graticule import Graticule
    from navcore.trigonometry import FloatArray
    from tui.present.chart_scene import Scene, Seen
    from tui.present.chart_view import View
    from tui.present.dots import Dash, Patterns

    Lines = tuple[FloatArray, Dash]


class Shown(NamedTuple):
    """What is shown besides the plan and the graticule.

    Attributes:
        shore: The shore.
        other_lines: The lines by which the leg under the cursor is not sailed.
    """

    shore: bool = True
    other_lines: bool = True


def picture(scene: Scene, view: View, row: int, shown: Shown) -> Cells:
    """Return the chart.

    Args:
        scene: The plan on the view's projection.
        view: What is seen of it.
        row: The row of the shared cursor: its leg and its waypoint are stressed.
        shown: What is shown besides.
    """
    cells = Cells(view.columns, view.rows)
    graticule = make_graticule(view.plane)
    cells.lay(_drawn(view, (_of_graticule(graticule), DOTTED)), Tone.QUIET)
    if shown.shore:
        cells.lay(_drawn(view, (scene.shore(view), WHOLE)), Tone.QUIET, hides=True)
    of_legs = np.zeros((view.rows, view.columns), dtype=bool)
    for patterns, tone in _legs(scene, view, leg_of(scene.solution.plan, row), other_lines=shown.other_lines):
        cells.lay(patterns, tone, hides=tone is not Tone.QUIET)
        of_legs |= patterns != 0
    draw_cross(cells, view)
    letter_waypoints(cells, scene, view, waypoint_before(scene.solution.plan, row), of_legs)
    draw_bar(cells, view, of_legs)
    letter_graticule(cells, graticule, of_legs)
    return cells


def _of_graticule(graticule: Graticule) -> FloatArray:
    gap = np.full((1, 2), np.nan)
    pieces = [part for line in graticule.lines for piece in line.pieces_mm for part in (piece, gap)]
    return np.concatenate(pieces) if pieces else gap


def _legs(scene: Scene, view: View, leg: int | None, *, other_lines: bool) -> Iterator[tuple[Patterns, Tone]]:
    """Yield the legs but the one under the cursor, that one's other lines, and itself, thicker."""
    seen = scene.track.seen(view)
    yield _drawn(view, *_by_kind(seen, without=leg)), Tone.HEAD
    if leg is None:
        return
    if other_lines:
        yield _drawn(view, *_by_kind(scene.other_lines(leg).seen(view))), Tone.QUIET
    yield _drawn(view, *_by_kind(seen, leg), thick=True), Tone.STRONG


def _by_kind(seen: Seen, leg: int | None = None, without: int | None = None) -> tuple[Lines, Lines]:
    rhumb_lines = seen.of(great_circle=False, leg=leg, without=without)
    return (rhumb_lines, WHOLE), (seen.of(great_circle=True, leg=leg, without=without), BROKEN)


def _drawn(view: View, *lines: Lines, thick: bool = False) -> Patterns:
    dots = Dots(view.columns, view.rows)
    for place, dash in lines:
        dots.draw(place, dash)
    if thick:
        dots.thicken()
    return dots.patterns()
