"""The graticule of a sheet: which meridians and parallels, how far each runs, where they meet, and the fine graduation.

The intervals are those of the trade, chosen so that lines stand some 15 to 80 mm apart in the middle of the sheet.
Towards a pole the meridians thin out: one that is no multiple of 30° ends where its neighbours come too close.
"""

from __future__ import annotations

from dataclasses import dataclass
from functools import cached_property
from typing import TYPE_CHECKING, NamedTuple

import numpy as np

from navcore.angles import wrap_180
from navcore.charts.track import cut_at
from navcore.earth.latitudes import degree_of_latitude_m, degree_of_longitude_m

if TYPE_CHECKING:
    from navcore.charts.plane import PaperPlane
    from navcore.trigonometry import FloatArray

INTERVALS_MIN: tuple[float, ...] = (0.5, 1.0, 2.0, 5.0, 10.0, 20.0, 30.0, 60.0, 120.0, 300.0, 600.0, 900.0, 1800.0)
"""Between meridians or parallels, minutes of arc."""

GRADUATIONS_MIN: tuple[float, ...] = (0.1, 0.5, 1.0, 5.0, 10.0, 30.0, 60.0, 300.0, 600.0)
"""Of the fine graduation, minutes of arc; each divides the next."""

_CLOSEST_GRADUATION_MM = 1.2
_CLOSEST_MERIDIANS_MM = 5.0
_SAMPLES = 41
_MOST_LINES = 60


class FrameEnd(NamedTuple):
    """Where a line meets the neat line.

    Attributes:
        value_deg: The line's latitude or longitude.
        side: "left", "right", "bottom" or "top".
        x_mm: Where.
        y_mm: Where.
    """

    value_deg: float
    side: str
    x_mm: float
    y_mm: float


@dataclass(frozen=True, slots=True, eq=False)
class GraticuleLine:
    """A meridian or a parallel inside the neat line.

    Attributes:
        is_meridian: Else a parallel.
        value_deg: Its longitude, [-180, 180), or latitude.
        pieces_mm: What of it is inside, each of shape (n, 2).
        ends: Where it meets the neat line.
    """

    is_meridian: bool
    value_deg: float
    pieces_mm: tuple[FloatArray, ...]
    ends: tuple[FrameEnd, ...]


class Intersection(NamedTuple):
    """Where a meridian meets a parallel."""

    lat_deg: float
    lon_deg: float
    x_mm: float
    y_mm: float


@dataclass(frozen=True, eq=False)
class Graticule:
    """The lines of a sheet.

    Attributes:
        plane: The sheet's.
        lat_interval_min: Between parallels, minutes of arc.
        lon_interval_min: Between meridians, minutes of arc.
        lat_graduation_min: Of the fine graduation in latitude.
        lon_graduation_min: Of the fine graduation in longitude.
        lines: Meridians from west to east, then parallels from south to north.
        parallels_deg: Those that were looked for, from south to north.
        meridians_deg: Likewise from west to east, as far as they run on from the central meridian.
        limits_deg: For each meridian the latitude, north or south, beyond which it is not drawn.
    """

    plane: PaperPlane
    lat_interval_min: float
    lon_interval_min: float
    lat_graduation_min: float
    lon_graduation_min: float
    lines: tuple[GraticuleLine, ...]
    parallels_deg: FloatArray
    meridians_deg: FloatArray
    limits_deg: FloatArray

    def interval_min(self, *, is_meridian: bool) -> float:
        """Return the interval between meridians or between parallels, minutes of arc."""
        return self.lon_interval_min if is_meridian else self.lat_interval_min

    @cached_property
    def graduation(self) -> tuple[tuple[bool, FrameEnd], ...]:
        """Where the finer meridians and parallels meet the neat line: (is_meridian, end)."""
        return _graduation(self.plane, self.lat_graduation_min, self.lon_graduation_min)

    @cached_property
    def intersections(self) -> tuple[Intersection, ...]:
        """Every one inside the neat line, from south to north and then from west to east."""
        return _intersections(self)


class _Extent(NamedTuple):
    """What the neat line holds; longitudes are from the central meridian.

    Attributes:
        south_deg: Latitude.
        north_deg: Latitude.
        west_deg: Relative longitude.
        east_deg: Relative longitude.
        holds_pole: Whether a pole is shown.
        middle_deg: Latitude and longitude in the middle of the sheet, or of what is shown nearest to that.
    """

    south_deg: float
    north_deg: float
    west_deg: float
    east_deg: float
    holds_pole: bool
    middle_deg: tuple[float, float]


def make_graticule(plane: PaperPlane) -> Graticule:
    """Return the graticule of a sheet's plane; without a line where nothing of the Earth is shown."""
    extent = _extent(plane)
    if extent is None:
        none = np.empty(0)
        return Graticule(
            plane, INTERVALS_MIN[-1], INTERVALS_MIN[-1], INTERVALS_MIN[-1], INTERVALS_MIN[-1], (), *[none] * 3
        )
    lat_mm, lon_mm = _millimetres_per_minute(plane, extent)
    wanted_mm = min(40.0, max(20.0, min(plane.width_mm, plane.height_mm) / 6.0))
    # Where the scale in the middle is far from that elsewhere, lines so close would be thousands.
    least_lat_min = (extent.north_deg - extent.south_deg) * 60.0 / _MOST_LINES
    least_lon_min = (extent.east_deg - extent.west_deg) * 60.0 / _MOST_LINES
    lat_interval = _interval_min(max(wanted_mm / lat_mm, least_lat_min), INTERVALS_MIN)
    of_the_circle = [value for value in INTERVALS_MIN if not extent.holds_pole or value in {60.0, 300.0, 600.0, 1800.0}]
    lon_interval = _interval_min(max(wanted_mm / lon_mm, least_lon_min), of_the_circle)
    meridians = _multiples_deg(extent.west_deg, extent.east_deg, lon_interval, plane.projection.central_lon_deg)
    parallels = _multiples_deg(extent.south_deg, extent.north_deg, lat_interval, 0.0)
    limits = _limits_deg(plane, extent, meridians, lat_interval, lon_interval)
    lines = (*_meridians(plane, meridians, extent, limits), *_parallels(plane, parallels, extent))
    return Graticule(
        plane,
        lat_interval,
        lon_interval,
        _graduation_min(lat_interval, lat_mm),
        _graduation_min(lon_interval, lon_mm),
        tuple(line for line in lines if line.pieces_mm),
        parallels,
        meridians,
        limits,
    )


def _extent(plane: PaperPlane) -> _Extent | None:
    x_mm = np.linspace(0.0, plane.width_mm, _SAMPLES)
    y_mm = np.linspace(0.0, plane.height_mm, _SAMPLES)
    lat_deg, lon_deg = plane.to_earth(*(value.ravel() for value in np.meshgrid(x_mm, y_mm)))
    shown = np.flatnonzero(np.isfinite(lat_deg))
    if not shown.size:
        return None
    from_middle = np.hypot(*(np.divmod(shown, _SAMPLES) - np.array([[_SAMPLES // 2]])))
    nearest = shown[np.argmin(from_middle)]
    middle = float(lat_deg[nearest]), float(lon_deg[nearest])
    south, north = float(np.min(lat_deg[shown])), float(np.max(lat_deg[shown]))
    relative = wrap_180(lon_deg[shown] - plane.projection.central_lon_deg)
    poles = [pole for pole in (-90.0, 90.0) if plane.holds(plane.to_mm(pole, plane.projection.central_lon_deg))]
    if poles:
        return _Extent(min(south, *poles), max(north, *poles), -180.0, 180.0, holds_pole=True, middle_deg=middle)
    # The samples may miss the furthest point of a curved edge by a little.
    lat_slack, lon_slack = (north - south) / _SAMPLES, float(np.ptp(relative)) / _SAMPLES
    west, east = float(np.min(relative)) - lon_slack, float(np.max(relative)) + lon_slack
    return _Extent(
        max(-90.0, south - lat_slack),
        min(90.0, north + lat_slack),
        max(-180.0, west),
        min(180.0, east),
        holds_pole=False,
        middle_deg=middle,
    )


def _millimetres_per_minute(plane: PaperPlane, extent: _Extent) -> tuple[float, float]:
    """Return the paper's millimetres in a minute of latitude and of longitude, halfway out where a pole is shown."""
    lat_deg, lon_deg = extent.middle_deg
    if extent.holds_pole:
        pole_deg = 90.0 if extent.north_deg == 90.0 else -90.0
        lat_deg = 0.5 * (pole_deg + (extent.south_deg if pole_deg > 0.0 else extent.north_deg))
    figure = plane.projection.figure
    scale = float(plane.projection.scale_factor(lat_deg, lon_deg)) * 1000.0 / plane.scale
    lat_mm = float(degree_of_latitude_m(lat_deg, figure)) / 60.0 * scale
    return lat_mm, float(degree_of_longitude_m(lat_deg, figure)) / 60.0 * scale


def _interval_min(wanted_min: float, intervals: tuple[float, ...] | list[float]) -> float:
    """Return the smallest interval that is at least three quarters of what is wanted."""
    return next((interval for interval in intervals if interval >= 0.75 * wanted_min), intervals[-1])


def _graduation_min(interval_min: float, mm_per_minute: float) -> float:
    """Return the finest graduation that divides the interval and can still be read."""
    fine = (step for step in GRADUATIONS_MIN if interval_min % step == 0.0 or step == 0.1)
    return next((step for step in fine if step * mm_per_minute >= _CLOSEST_GRADUATION_MM), interval_min)


def _multiples_deg(from_deg: float, to_deg: float, interval_min: float, origin_deg: float) -> FloatArray:
    """Return the multiples of an interval in a range counted from an origin; longitudes of a whole turn once each."""
    first = int(np.ceil((from_deg + origin_deg) * 60.0 / interval_min - 1e-9))
    last = int(np.floor((to_deg + origin_deg) * 60.0 / interval_min + 1e-9))
    last = min(last, first + round(21600.0 / interval_min) - 1)
    return np.arange(first, last + 1, dtype=np.float64) * interval_min / 60.0


def _limits_deg(
    plane: PaperPlane, extent: _Extent, meridians_deg: FloatArray, lat_interval_min: float, lon_interval_min: float
) -> FloatArray:
    """Return for each meridian the latitude, north or south, beyond which it is not drawn."""
    step_deg = lat_interval_min / 60.0
    lat_deg = np.arange(0.0, 90.0, step_deg)
    middle_lat_deg, middle_lon_deg = extent.middle_deg
    pole_sign = 1.0 if middle_lat_deg >= 0.0 else -1.0
    factor = plane.projection.scale_factor(pole_sign * lat_deg, middle_lon_deg) * 1000.0 / plane.scale
    mm_per_degree = degree_of_longitude_m(lat_deg, plane.projection.figure) * factor

    def limit(apart_deg: float) -> float:
        # Whether lines so far apart still stand clear of each other, from the equator on.
        roomy = np.flatnonzero(~(mm_per_degree * apart_deg < _CLOSEST_MERIDIANS_MM))
        return float(lat_deg[roomy[-1]]) if roomy.size else 0.0

    to_pole = np.where(meridians_deg % 30.0 == 0.0, limit(30.0), limit(lon_interval_min / 60.0))
    return np.where(meridians_deg % 90.0 == 0.0, 90.0, to_pole)


def _meridians(
    plane: PaperPlane, meridians_deg: FloatArray, extent: _Extent, limits_deg: FloatArray
) -> list[GraticuleLine]:
    lowest = np.maximum(extent.south_deg, -limits_deg)
    highest = np.maximum(np.minimum(extent.north_deg, limits_deg), lowest)
    lat_deg = np.linspace(lowest, highest, 181, axis=-1)
    lines_mm = plane.to_mm(lat_deg, np.broadcast_to(meridians_deg[:, np.newaxis], lat_deg.shape))
    return [
        _line(plane, float(wrap_180(value_deg)), points, is_meridian=True)
        for value_deg, points in zip(meridians_deg, lines_mm, strict=True)
    ]


def _parallels(plane: PaperPlane, parallels_deg: FloatArray, extent: _Extent) -> list[GraticuleLine]:
    drawn_deg = parallels_deg[np.abs(parallels_deg) < 90.0]
    lon_deg = plane.projection.central_lon_deg + np.linspace(extent.west_deg, extent.east_deg, 361)
    lines_mm = plane.to_mm(*np.broadcast_arrays(drawn_deg[:, np.newaxis], lon_deg))
    return [
        _line(plane, float(value_deg), points, is_meridian=False)
        for value_deg, points in zip(drawn_deg, lines_mm, strict=True)
    ]


def _line(plane: PaperPlane, value_deg: float, points_mm: FloatArray, *, is_meridian: bool) -> GraticuleLine:
    shown = points_mm[np.isfinite(points_mm[:, 0])]
    pieces = cut_at(shown, plane.window_mm) if len(shown) > 1 else []
    ends = [end for piece in pieces for point in (piece[0], piece[-1]) if (end := _frame_end(plane, value_deg, point))]
    return GraticuleLine(is_meridian, value_deg, tuple(pieces), tuple(ends))


def _frame_end(plane: PaperPlane, value_deg: float, point_mm: FloatArray) -> FrameEnd | None:
    x_mm, y_mm = (float(value) for value in point_mm)
    near = 1e-6
    sides = {
        "left": x_mm < near,
        "right": x_mm > plane.width_mm - near,
        "bottom": y_mm < near,
        "top": y_mm > plane.height_mm - near,
    }
    side = next((name for name, met in sides.items() if met), None)
    return None if side is None else FrameEnd(value_deg, side, x_mm, y_mm)


def _graduation(plane: PaperPlane, lat_step_min: float, lon_step_min: float) -> tuple[tuple[bool, FrameEnd], ...]:
    """Return where the fine graduation meets the neat line, by following it round at the projection's inverse."""
    ends: list[tuple[bool, FrameEnd]] = []
    for side, edge in plane.edges_mm().items():
        lat_deg, lon_deg = plane.to_earth(edge[:, 0], edge[:, 1])
        relative = np.unwrap(wrap_180(lon_deg - plane.projection.central_lon_deg), period=360.0)
        for is_meridian, value_deg, step_min in (
            (True, relative + plane.projection.central_lon_deg, lon_step_min),
            (False, lat_deg, lat_step_min),
        ):
            ends += [(is_meridian, FrameEnd(value, side, *place)) for value, place in _met(value_deg, step_min, edge)]
    return tuple(ends)


def _met(value_deg: FloatArray, step_min: float, edge_mm: FloatArray) -> list[tuple[float, tuple[float, float]]]:
    """Return the multiples of a step that a quantity passes along an edge, and where, interpolated."""
    if not np.all(np.isfinite(value_deg)):
        return []
    steps = value_deg * 60.0 / step_min
    found = []
    for index in np.flatnonzero(np.floor(steps[:-1]) != np.floor(steps[1:])):
        low, high = sorted((steps[index], steps[index + 1]))
        for number in range(int(np.floor(low)) + 1, int(np.floor(high)) + 1):
            part = (number - steps[index]) / (steps[index + 1] - steps[index])
            x_mm, y_mm = edge_mm[index] + part * (edge_mm[index + 1] - edge_mm[index])
            found.append((number * step_min / 60.0, (float(x_mm), float(y_mm))))
    return found


def _intersections(graticule: Graticule) -> tuple[Intersection, ...]:
    plane = graticule.plane
    lat_deg, lon_deg = np.meshgrid(graticule.parallels_deg, graticule.meridians_deg, indexing="ij")
    drawn = (np.abs(lat_deg) <= graticule.limits_deg) & (np.abs(lat_deg) < 90.0)
    lat_deg, lon_deg = lat_deg[drawn], lon_deg[drawn]
    place = plane.to_mm(lat_deg, lon_deg)
    inside = plane.holds(place)
    rows = zip(lat_deg[inside], wrap_180(lon_deg[inside]), *place[inside].T, strict=True)
    return tuple(Intersection(*(float(value) for value in row)) for row in rows)
