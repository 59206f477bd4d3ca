"""Which projection, centre, true scale, natural scale and paper a passage is drawn on, where they are not given."""

from __future__ import annotations

import math
from dataclasses import dataclass
from enum import StrEnum
from typing import TYPE_CHECKING

import numpy as np

from navcore.angles import difference_of_longitude, wrap_180
from navcore.charts.gnomonic import Gnomonic
from navcore.charts.lambert import Lambert
from navcore.charts.mercator import Mercator
from navcore.charts.paper import SCALES
from navcore.charts.stereographic import Stereographic
from navcore.charts.track import points_on
from navcore.earth.figure import SPHERE
from navcore.errors import NoAnswerError, RangeError

if TYPE_CHECKING:
    from collections.abc import Sequence

    from navcore.charts.projection import Projection
    from navcore.charts.track import TrackLeg
    from navcore.earth.figure import Figure
    from navcore.position import Position
    from navcore.trigonometry import FloatArray

HIGHEST_MERCATOR_DEG = 85.0
"""Beyond this a Mercator sheet is no use, whatever it is of."""

_POLAR_FROM_DEG = 60.0
_FARTHEST_GNOMONIC_DEG = 75.0
_SAMPLES = 65
_LEAST_EXTENT_M = 20_000.0


class SheetKind(StrEnum):
    """The projections that a sheet can be asked for by."""

    MERCATOR = "mercator"
    STEREOGRAPHIC = "stereographic"
    LAMBERT = "lambert"
    GNOMONIC = "gnomonic"


@dataclass(frozen=True, slots=True)
class Coverage:
    """What a sheet must show: points close together along the whole track and every point of its own.

    Attributes:
        lat_deg: Latitudes, shape (n,).
        lon_deg: Longitudes running on from one to the next, so over ±180 where the track goes there.
    """

    lat_deg: FloatArray
    lon_deg: FloatArray

    @property
    def middle_lat_deg(self) -> float:
        """Halfway between the highest and the lowest latitude."""
        return 0.5 * float(self.lat_deg.min() + self.lat_deg.max())

    @property
    def middle_lon_deg(self) -> float:
        """Halfway between the most western and the most eastern meridian that the track runs through."""
        return float(wrap_180(0.5 * float(self.lon_deg.min() + self.lon_deg.max())))


def coverage_of(points: Sequence[Position], legs: Sequence[TrackLeg], figure: Figure) -> Coverage:
    """Return what a sheet of a track must show.

    Raises:
        NoAnswerError: There is no point.
    """
    if not points:
        raise NoAnswerError("there is no point to draw a sheet of; give the plan a waypoint, or the sheet two corners")
    arcs = [arc for leg in legs for arc in leg.arcs]
    along_lat_deg, along_lon_deg = points_on(arcs, np.linspace(0.0, 1.0, _SAMPLES), figure)
    own = np.array(points)
    lat_deg = np.concatenate((along_lat_deg.ravel(), own[:, 0]))
    lon_deg = np.concatenate((along_lon_deg.ravel(), own[:, 1]))
    # A pole is on every meridian: it takes that of the point before.
    at_pole = np.abs(lat_deg) == 90.0
    before = np.maximum.accumulate(np.where(at_pole, 0, np.arange(lat_deg.size)))
    lon_deg = lon_deg[before]
    steps = difference_of_longitude(lon_deg[:-1], lon_deg[1:])
    running = lon_deg[0] + np.concatenate(([0.0], np.cumsum(steps)))
    return Coverage(lat_deg, running)


def choose_projection(
    kind: SheetKind,
    coverage: Coverage,
    figure: Figure,
    central_lon_deg: float | None = None,
    true_scale_deg: tuple[float, ...] = (),
) -> Projection:
    """Return a projection for what is to be shown.

    Args:
        kind: Which projection.
        coverage: What is to be shown.
        figure: The figure that is projected; a gnomonic sheet takes the sphere whatever it is.
        central_lon_deg: The meridian that runs straight up the sheet, where that is not to be chosen.
        true_scale_deg: The latitude of true scale, or two standard parallels, where they are not to be chosen.

    Raises:
        NoAnswerError: The projection can't show what is to be shown; the message says which can.
        RangeError: A latitude that the projection does not take.
    """
    step = 1.0 if np.ptp(coverage.lat_deg) + np.ptp(coverage.lon_deg) > 3.0 else 1.0 / 60.0
    lon_deg = _rounded(coverage.middle_lon_deg, step) if central_lon_deg is None else central_lon_deg
    makers = {
        SheetKind.MERCATOR: _mercator,
        SheetKind.STEREOGRAPHIC: _stereographic,
        SheetKind.LAMBERT: _lambert,
        SheetKind.GNOMONIC: _gnomonic,
    }
    return makers[kind](coverage, figure, lon_deg, true_scale_deg, step)


def _rounded(value_deg: float, step_deg: float) -> float:
    return round(value_deg / step_deg) * step_deg


def _mercator(
    coverage: Coverage, figure: Figure, lon_deg: float, true_scale_deg: tuple[float, ...], step_deg: float
) -> Projection:
    highest = float(np.max(np.abs(coverage.lat_deg)))
    if highest > HIGHEST_MERCATOR_DEG:
        raise NoAnswerError(
            f"a Mercator sheet can't show latitude {highest:.1f}°, allowed: up to {HIGHEST_MERCATOR_DEG:.0f}°; "
            "type --projection stereographic"
        )
    latitude = true_scale_deg[0] if true_scale_deg else _rounded(coverage.middle_lat_deg, step_deg)
    return Mercator(figure, lon_deg, latitude)


def _stereographic(
    coverage: Coverage, figure: Figure, lon_deg: float, true_scale_deg: tuple[float, ...], step_deg: float
) -> Projection:
    middle = coverage.middle_lat_deg
    lowest = float(np.min(coverage.lat_deg * math.copysign(1.0, middle)))
    highest = float(np.max(np.abs(coverage.lat_deg)))
    if not true_scale_deg and abs(middle) < _POLAR_FROM_DEG and highest < 80.0:
        return Stereographic(figure, _rounded(middle, step_deg), lon_deg)
    chosen = max(_rounded(0.5 * (max(lowest, 0.0) + highest), step_deg), 1.0)
    return Stereographic.polar(figure, true_scale_deg[0] if true_scale_deg else math.copysign(chosen, middle), lon_deg)


def _lambert(
    coverage: Coverage, figure: Figure, lon_deg: float, true_scale_deg: tuple[float, ...], step_deg: float
) -> Projection:
    low, high = float(coverage.lat_deg.min()), float(coverage.lat_deg.max())
    if high - low < 2.0:
        chosen: tuple[float, ...] = (_rounded(coverage.middle_lat_deg, step_deg),)
    else:
        # A sixth of the range inside each end: the scale is then off by about as much in the middle as at the ends.
        chosen = (_rounded(low + (high - low) / 6.0, step_deg), _rounded(high - (high - low) / 6.0, step_deg))
    parallels = true_scale_deg or chosen
    origin = _rounded(coverage.middle_lat_deg, step_deg)
    try:
        return Lambert(figure, lon_deg, parallels[:1] if len(parallels) == 1 else (parallels[0], parallels[-1]), origin)
    except RangeError as error:
        what = "these parallels" if true_scale_deg else f"latitudes {low:.1f}° to {high:.1f}°"
        raise NoAnswerError(
            f"no Lambert cone fits {what}, which balance across the equator; type --projection mercator or "
            "stereographic"
        ) from error


def _gnomonic(
    coverage: Coverage, _figure: Figure, lon_deg: float, _true_scale_deg: tuple[float, ...], step_deg: float
) -> Projection:
    projection = Gnomonic(_rounded(coverage.middle_lat_deg, step_deg), lon_deg)
    x_m, y_m = projection.forward(coverage.lat_deg, coverage.lon_deg)
    reach = math.tan(math.radians(_FARTHEST_GNOMONIC_DEG)) * SPHERE.equatorial_radius_m
    if not np.all(np.hypot(x_m, y_m) <= reach):
        raise NoAnswerError(
            f"the passage reaches over {_FARTHEST_GNOMONIC_DEG:.0f}° from its middle, farther than a gnomonic sheet "
            "can show; type --projection stereographic"
        )
    return projection


def bounds_m(projection: Projection, coverage: Coverage) -> tuple[float, float, float, float]:
    """Return left, bottom, right and top of what is to be shown, in the projection's metres; never a mere point."""
    x_m, y_m = projection.forward(coverage.lat_deg, coverage.lon_deg)
    shown = np.isfinite(x_m)
    if not np.any(shown):
        raise NoAnswerError(f"no point of the passage can be shown on this projection: {projection.name}")
    sides = []
    for value in (x_m[shown], y_m[shown]):
        middle, half = 0.5 * float(value.min() + value.max()), 0.5 * max(float(np.ptp(value)), _LEAST_EXTENT_M)
        sides.append((middle - half, middle + half))
    return sides[0][0], sides[1][0], sides[0][1], sides[1][1]


def scale_to_fit(size_m: tuple[float, float], room_mm: tuple[float, float]) -> float:
    """Return the largest scale of SCALES that brings an extent into the room on paper.

    Raises:
        NoAnswerError: None does.
    """
    needed = max(metres * 1000.0 / millimetres for metres, millimetres in zip(size_m, room_mm, strict=True))
    for scale in SCALES:
        if scale >= needed:
            return scale
    raise NoAnswerError(f"the passage needs 1:{needed:.0f}, smaller than any sheet is drawn; choose another projection")
