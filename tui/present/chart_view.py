"""What is seen of the Earth on the Chart page: a projection, the place under the cross, and how large it is.

The picture is a sheet on which a Braille dot is a millimetre, so that graticule and legs are laid off as on paper.
"""

from __future__ import annotations

import math
from dataclasses import dataclass, replace
from typing import TYPE_CHECKING

import numpy as np

from navcore.angles import difference_of_longitude
from navcore.charts.choice import HIGHEST_MERCATOR_DEG, bounds_m
from navcore.charts.gnomonic import Gnomonic
from navcore.charts.lambert import Lambert
from navcore.charts.mercator import Mercator
from navcore.charts.plane import PaperPlane
from navcore.position import Position
from tui.present.dots import ACROSS, DOWN

if TYPE_CHECKING:
    from navcore.charts.choice import Coverage
    from navcore.charts.projection import Projection
    from navcore.charts.track import Window

FINEST_M, COARSEST_M = 5.0, 400_000.0
"""How much of the projection's plane a dot may be, metres."""

_CLEAR_CELLS = 6, 2
_TURN_FROM_DEG = 100.0
_LONGEST_GNOMONIC_M = 5e7


@dataclass(frozen=True, slots=True)
class View:
    """A part of a projection on so many cells.

    Attributes:
        projection: The projection.
        x_m: The place under the cross, on the projection's plane.
        y_m: Likewise.
        dot_m: How much of that plane a dot is.
        columns: Cells from side to side.
        rows: Cells from top to bottom.
    """

    projection: Projection
    x_m: float
    y_m: float
    dot_m: float
    columns: int
    rows: int

    @property
    def cross(self) -> tuple[int, int]:
        """Column and row of the cross."""
        return self.columns // 2, self.rows // 2

    @property
    def plane(self) -> PaperPlane:
        """The sheet that is seen, a dot of it a millimetre; the cross is in the middle of its cell."""
        column, row = self.cross
        x_dots = ACROSS * (column + 0.5)
        y_dots = DOWN * (self.rows - row - 0.5)
        return PaperPlane(
            self.projection,
            1000.0 * self.dot_m,
            x_dots * self.dot_m - self.x_m,
            y_dots * self.dot_m - self.y_m,
            float(ACROSS * self.columns),
            float(DOWN * self.rows),
        )

    @property
    def window_m(self) -> Window:
        """Left, bottom, right and top of what is seen, on the projection's plane."""
        plane = self.plane
        right_m, top_m = plane.width_mm * self.dot_m, plane.height_mm * self.dot_m
        return -plane.x_0_m, -plane.y_0_m, right_m - plane.x_0_m, top_m - plane.y_0_m

    @property
    def position(self) -> Position | None:
        """The place under the cross; None where the projection shows none."""
        return self._at(self.x_m, self.y_m)

    def _at(self, x_m: float, y_m: float) -> Position | None:
        lat_deg, lon_deg = (float(value) for value in self.projection.inverse(x_m, y_m))
        is_shown = math.isfinite(lat_deg) and math.isfinite(lon_deg)
        if isinstance(self.projection, Mercator):
            is_shown = is_shown and abs(lat_deg) <= HIGHEST_MERCATOR_DEG
        if isinstance(self.projection, Gnomonic):
            is_shown = is_shown and math.hypot(x_m, y_m) <= _LONGEST_GNOMONIC_M
        return Position(lat_deg, lon_deg) if is_shown else None

    def moved(self, columns: float, rows: float) -> View | None:
        """Return the view with the cross so many cells to the right and up; None where the chart ends before that.

        Far from the central meridian the chart is turned, so that no edge of the map comes near the cross.
        """
        x_m, y_m = self.x_m + columns * ACROSS * self.dot_m, self.y_m + rows * DOWN * self.dot_m
        position = self._at(x_m, y_m)
        if position is None:
            return None
        projection = self.projection
        off_deg = float(difference_of_longitude(np.asarray(projection.central_lon_deg), np.asarray(position.lon_deg)))
        if isinstance(projection, Mercator | Lambert) and abs(off_deg) > _TURN_FROM_DEG:
            turned = replace(projection, central_lon_deg=float(round(position.lon_deg)))
            return replace(self, projection=turned).centred(position)
        return replace(self, x_m=x_m, y_m=y_m)

    def zoomed(self, factor: float) -> View:
        """Return the view so many times as large about the cross, within bounds."""
        return replace(self, dot_m=min(max(self.dot_m / factor, FINEST_M), COARSEST_M))

    def resized(self, columns: int, rows: int) -> View:
        """Return the view on other cells, the cross where it was on the Earth."""
        return replace(self, columns=columns, rows=rows)

    def centred(self, position: Position) -> View:
        """Return the view with the cross on a place; as it is where the projection can't show that."""
        x_m, y_m = (float(value) for value in self.projection.forward(*position))
        if not (math.isfinite(x_m) and math.isfinite(y_m)) or self._at(x_m, y_m) is None:
            return self
        return replace(self, x_m=x_m, y_m=y_m)

    def on(self, projection: Projection) -> View:
        """Return the view on another projection, the same place under the cross and as large there."""
        position = self.position
        if position is None:
            return replace(self, projection=projection, x_m=0.0, y_m=0.0)
        before, after = (float(each.scale_factor(*position)) for each in (self.projection, projection))
        factor = after / before if math.isfinite(after / before) else 1.0
        return replace(self.zoomed(1.0 / factor), projection=projection, x_m=0.0, y_m=0.0).centred(position)

    def holds(self, position: Position) -> bool:
        """Say whether a place is seen."""
        plane = self.plane
        return bool(plane.holds(plane.to_mm(*position)))


def fitted(projection: Projection, coverage: Coverage, columns: int, rows: int) -> View:
    """Return the view that shows what is to be shown, as large as there is room for.

    Raises:
        NoAnswerError: The projection can show none of it.
    """
    left, bottom, right, top = bounds_m(projection, coverage)
    across = ACROSS * max(columns - 2 * _CLEAR_CELLS[0], 4)
    up = DOWN * max(rows - 2 * _CLEAR_CELLS[1], 2)
    dot_m = min(max((right - left) / across, (top - bottom) / up, FINEST_M), COARSEST_M)
    return View(projection, 0.5 * (left + right), 0.5 * (bottom + top), dot_m, columns, rows)
