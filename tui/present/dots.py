"""Lines drawn in Braille dots: two across and four down in each cell of the terminal."""

from __future__ import annotations

from typing import TYPE_CHECKING, NamedTuple

import numpy as np

from navcore.charts.track import clip

if TYPE_CHECKING:
    import numpy.typing as npt

    from navcore.trigonometry import FloatArray

    Patterns = npt.NDArray[np.uint8]

ACROSS, DOWN = 2, 4

_BITS = np.array([[0x01, 0x08], [0x02, 0x10], [0x04, 0x20], [0x40, 0x80]], dtype=np.uint8)


class Dash(NamedTuple):
    """How a line is broken, in dots along it.

    Attributes:
        lit: What is drawn.
        of: Before it begins anew.
    """

    lit: float
    of: float


WHOLE, BROKEN, DOTTED = Dash(1.0, 1.0), Dash(6.0, 10.0), Dash(1.0, 4.0)


class Dots:
    """A plane of dots, its origin at the lower left; lines are cut at its edges."""

    def __init__(self, columns: int, rows: int) -> None:
        """Make one for so many cells, no dot lit."""
        self._columns, self._rows = columns, rows
        self._lit = np.zeros((DOWN * rows, ACROSS * columns), dtype=bool)

    def draw(self, place: FloatArray, dash: Dash = WHOLE) -> None:
        """Draw polylines, shape (n, 2), in dots from the origin, NaN between them; a lone point is a dot."""
        step = np.diff(place, axis=0, append=np.full((min(len(place), 1), 2), np.nan))
        step[np.isnan(step[:, 0])] = 0.0
        start, step, length, before = self._in_sight(place, step)
        count = np.maximum(np.ceil(np.maximum(np.abs(step[:, 0]), np.abs(step[:, 1]))), 1.0).astype(np.int64)
        segment = np.repeat(np.arange(count.size), count)
        part = (np.arange(segment.size) - np.repeat(np.cumsum(count) - count, count)) / count[segment]
        x, y = (start[segment] + part[:, np.newaxis] * step[segment]).astype(np.int64).T
        if dash is not WHOLE:
            lit = np.mod(before[segment] + part * length[segment], dash.of) < dash.lit
            x, y = x[lit], y[lit]
        self._lit[len(self._lit) - 1 - y, x] = True

    def _in_sight(self, place: FloatArray, step: FloatArray) -> tuple[FloatArray, FloatArray, FloatArray, FloatArray]:
        """Return start, step and length of what is in sight of each segment, and how long the line was before it."""
        height, width = self._lit.shape
        length = np.hypot(step[:, 0], step[:, 1])
        before = np.cumsum(length) - length
        # What ends on the edge is just inside it.
        enter, leave = clip(place, step, (0.0, 0.0, width - 1e-6, height - 1e-6))
        seen = np.flatnonzero((enter < leave) & np.isfinite(place[:, 0]))
        first, part = enter[seen], leave[seen] - enter[seen]
        return (
            place[seen] + first[:, np.newaxis] * step[seen],
            part[:, np.newaxis] * step[seen],
            part * length[seen],
            before[seen] + first * length[seen],
        )

    def thicken(self) -> None:
        """Light the dot to the right of each, and below it."""
        before = self._lit.copy()
        self._lit[:, 1:] |= before[:, :-1]
        self._lit[1:] |= before[:-1]

    def patterns(self) -> Patterns:
        """Return which dots of each cell are lit, as the last byte of its Braille character; shape (rows, columns)."""
        cells = self._lit.reshape(self._rows, DOWN, self._columns, ACROSS)
        lit: Patterns = np.sum(cells * _BITS[:, np.newaxis, :], axis=(1, 3), dtype=np.uint8)
        return lit
