"""The shoreline: how far off it is, where a track crosses it, and its lines inside a window. Not for navigation.

The data are GSHHG at intermediate resolution, land against sea, bundled under their own licence (navcore/charts/data).
They hold no rock, reef or shoal, and no island is promised to be there, so no answer here means that a track is clear.

A grid of cells of half a degree holds the segments that touch each cell, sorted by row and then by column, so that what
lies within reach of a point is a few runs of one array. Distances are straight lines between points on WGS 84 in space:
0.1 m short at 25 NM, 1.5 m at 60 NM.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import lru_cache
from importlib.resources import files
from typing import TYPE_CHECKING, NamedTuple

import numpy as np

from navcore.angles import difference_of_longitude, wrap_180
from navcore.earth.figure import WGS_84
from navcore.earth.latitudes import checked_latitude_deg, transverse_radius_m
from navcore.errors import RangeError
from navcore.lines.leg import checked_ends, checked_finite
from navcore.trigonometry import sin_cos_deg

if TYPE_CHECKING:
    from collections.abc import Iterator

    import numpy.typing as npt

    from navcore.lines.leg import Ends
    from navcore.trigonometry import FloatArray

    IntArray = npt.NDArray[np.int64]

ACCURACY = (
    "Shoreline: GSHHG 2.3.7, intermediate resolution. Of the full-resolution shoreline's points half lie within 0.13 "
    "NM of it, 9 in 10 within 0.45 NM; 1 in 100 is over 2.5 NM off: islets that it lacks. No rocks, reefs or shoals. "
    "Not for navigation"
)
"""Said wherever the shoreline is drawn or asked; held by tests/bench/test_coast_accuracy.py."""

LONGEST_PIECE_M = 111_000.0
"""The longest piece of a track that `distance_of_pieces_m` and `crossings` take."""

_UNITS_PER_DEGREE = 1e4
_ROWS, _COLUMNS = 360, 720
_CELLS_PER_DEGREE = 2.0
_METRES_PER_DEGREE = 110_500.0
"""Below a degree of latitude anywhere, so that what is reached for is never too little."""
_PAIRS_AT_A_TIME = 2_000_000


class Crossings(NamedTuple):
    """Where pieces of a track cross the shoreline, in the order of the pieces.

    Attributes:
        piece: Index of the piece.
        lat_deg: Latitude.
        lon_deg: Longitude, [-180, 180).
    """

    piece: IntArray
    lat_deg: FloatArray
    lon_deg: FloatArray


class ShoreLines(NamedTuple):
    """Lines of the shore, one after another.

    Attributes:
        lat_deg: Latitudes.
        lon_deg: Longitudes, which run on over ±180 within a line.
        starts: Index of the first point of each line.
    """

    lat_deg: FloatArray
    lon_deg: FloatArray
    starts: IntArray

    def inside(self, south_deg: float, west_deg: float, north_deg: float, east_deg: float) -> ShoreLines:
        """Return the lines that touch a window, which runs east from its western side; whole lines, not cut."""
        starts = self.starts
        lowest, highest = np.minimum.reduceat(self.lat_deg, starts), np.maximum.reduceat(self.lat_deg, starts)
        left, right = np.minimum.reduceat(self.lon_deg, starts), np.maximum.reduceat(self.lon_deg, starts)
        width_deg = east_deg - west_deg if east_deg >= west_deg else east_deg - west_deg + 360.0
        to_left = np.mod(left - west_deg, 360.0)
        meets = (to_left <= width_deg) | (to_left + (right - left) >= 360.0) | (width_deg >= 360.0)
        kept = np.flatnonzero((lowest <= north_deg) & (highest >= south_deg) & meets)
        ends = np.append(starts[1:], self.lat_deg.size)
        counts = ends[kept] - starts[kept]
        where = _runs(starts[kept], counts)
        return ShoreLines(self.lat_deg[where], self.lon_deg[where], np.cumsum(counts) - counts)


class _Pairs(NamedTuple):
    """What is to be held against which segment: two indexes of the same length, the first in order."""

    query: IntArray
    segment: IntArray


@dataclass(frozen=True, slots=True, eq=False)
class Coast:
    """The shoreline with its index; `load_coast` gives the one there is.

    Attributes:
        lines: Every line.
        start: Index of the first point of each segment.
        in_cell: Segments in the order of the cells that they touch.
        cell_start: Where each cell's segments begin in that order.
        space_m: The points in space, shape (n, 3).
        middle_m: The middles of the segments in space.
        half_m: Half their lengths.
    """

    lines: ShoreLines
    start: IntArray
    in_cell: IntArray
    cell_start: IntArray
    space_m: FloatArray
    middle_m: FloatArray
    half_m: FloatArray

    def distance_m(self, lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike, cap_m: float) -> FloatArray:
        """Return how far points are from the nearest shore, on land or at sea; infinity beyond the cap."""
        latitude, longitude = np.broadcast_arrays(checked_latitude_deg(lat_deg), checked_finite("lon_deg", lon_deg))
        ends = checked_ends(latitude.ravel(), longitude.ravel(), latitude.ravel(), longitude.ravel())
        return self.distance_of_pieces_m(*ends, cap_m=cap_m).reshape(latitude.shape)

    def distance_of_pieces_m(
        self,
        lat1_deg: npt.ArrayLike,
        lon1_deg: npt.ArrayLike,
        lat2_deg: npt.ArrayLike,
        lon2_deg: npt.ArrayLike,
        *,
        cap_m: float,
    ) -> FloatArray:
        """Return the least distance of straight pieces of a track from the shore; 0 where one crosses it.

        Args:
            lat1_deg: Where each piece starts, shape (n,).
            lon1_deg: Likewise.
            lat2_deg: Where each ends, at most LONGEST_PIECE_M off.
            lon2_deg: Likewise.
            cap_m: What is farther off than this is infinity.

        Raises:
            RangeError: A piece is too long to be taken as straight, or the cap is not above 0.
        """
        if not 0.0 < cap_m < math.inf:
            raise RangeError("cap_m", cap_m, "above 0 metres")
        ends = _checked_pieces(checked_ends(lat1_deg, lon1_deg, lat2_deg, lon2_deg))
        nearest_m = np.full(ends.lat1_deg.shape, np.inf)
        from_m, to_m = _in_space_m(ends.lat1_deg, ends.lon1_deg), _in_space_m(ends.lat2_deg, ends.lon2_deg)
        middle_m, half_m = _middle_and_half(from_m, to_m)
        for reached in self._pairs(ends, cap_m):
            # Most of what shares a cell is out of reach by its middle alone.
            off_m = _length_m(middle_m[reached.query] - self.middle_m[reached.segment])
            near = off_m <= half_m[reached.query] + self.half_m[reached.segment] + cap_m
            pairs = _Pairs(reached.query[near], reached.segment[near])
            shore = self.space_m[self.start[pairs.segment]], self.space_m[self.start[pairs.segment] + 1]
            apart_m = _apart_m((from_m[pairs.query], to_m[pairs.query]), shore)
            np.minimum.at(nearest_m, pairs.query, apart_m)
        nearest_m[nearest_m > cap_m] = np.inf
        nearest_m[self.crossings(*ends).piece] = 0.0
        return nearest_m

    def crossings(
        self, lat1_deg: npt.ArrayLike, lon1_deg: npt.ArrayLike, lat2_deg: npt.ArrayLike, lon2_deg: npt.ArrayLike
    ) -> Crossings:
        """Return where straight pieces of a track, at most LONGEST_PIECE_M long, cross the shore.

        Raises:
            RangeError: A piece is too long to be taken as straight.
        """
        ends = _checked_pieces(checked_ends(lat1_deg, lon1_deg, lat2_deg, lon2_deg))
        found = [self._crossing_pairs(ends, pairs) for pairs in self._pairs(ends, 0.0)]
        if not found:
            return Crossings(np.empty(0, dtype=np.int64), np.empty(0), np.empty(0))
        piece, segment, part = (np.concatenate(values) for values in zip(*found, strict=True))
        # A segment that lies in several cells is met in each of them.
        _, once = np.unique(piece * self.start.size + segment, return_index=True)
        piece, part = piece[once], part[once]
        lat1_deg, lon1_deg = ends.lat1_deg[piece], ends.lon1_deg[piece]
        latitude = lat1_deg + part * (ends.lat2_deg[piece] - lat1_deg)
        longitude = wrap_180(lon1_deg + part * difference_of_longitude(lon1_deg, ends.lon2_deg[piece]))
        return Crossings(piece, latitude, longitude)

    def _crossing_pairs(self, ends: Ends, pairs: _Pairs) -> tuple[IntArray, IntArray, FloatArray]:
        """Return pieces, the segments they cross, and how far along the piece; latitude and longitude as a plane."""
        piece, first = pairs.query, self.start[pairs.segment]
        lat1, lon1 = ends.lat1_deg[piece], ends.lon1_deg[piece]
        piece_lat, piece_lon = ends.lat2_deg[piece] - lat1, difference_of_longitude(lon1, ends.lon2_deg[piece])
        off_lat, off_lon = self.lines.lat_deg[first] - lat1, difference_of_longitude(lon1, self.lines.lon_deg[first])
        shore_lat = self.lines.lat_deg[first + 1] - self.lines.lat_deg[first]
        shore_lon = self.lines.lon_deg[first + 1] - self.lines.lon_deg[first]
        turn = piece_lon * shore_lat - piece_lat * shore_lon
        slanted = turn != 0.0
        safe = np.where(slanted, turn, 1.0)
        along_piece = (off_lon * shore_lat - off_lat * shore_lon) / safe
        along_shore = (off_lon * piece_lat - off_lat * piece_lon) / safe
        inside = (along_piece >= 0.0) & (along_piece <= 1.0) & (along_shore >= 0.0) & (along_shore < 1.0)
        crossed = slanted & inside
        return piece[crossed], pairs.segment[crossed], along_piece[crossed]

    def _pairs(self, ends: Ends, cap_m: float) -> Iterator[_Pairs]:
        """Yield each piece with each segment that may lie within the cap of it, in batches."""
        reach_deg = cap_m / _METRES_PER_DEGREE
        low = np.maximum(np.minimum(ends.lat1_deg, ends.lat2_deg) - reach_deg, -90.0)
        high = np.minimum(np.maximum(ends.lat1_deg, ends.lat2_deg) + reach_deg, 90.0)
        row, last_row = _row(low), _row(high)
        d_lon = difference_of_longitude(ends.lon1_deg, ends.lon2_deg)
        _, narrowest = sin_cos_deg(np.maximum(np.abs(low), np.abs(high)))
        sideways = np.where(narrowest > 0.01, reach_deg / np.maximum(narrowest, 0.01), 180.0)
        west = ends.lon1_deg + np.minimum(d_lon, 0.0) - sideways
        columns = np.floor(_CELLS_PER_DEGREE * (west + 180.0)).astype(np.int64)
        width = np.floor(_CELLS_PER_DEGREE * (west + np.abs(d_lon) + 2.0 * sideways + 180.0)).astype(np.int64) - columns
        columns, width = np.mod(columns, _COLUMNS), np.minimum(width + 1, _COLUMNS)
        rows = last_row - row + 1
        query = np.repeat(np.arange(rows.size), rows)
        cell = _runs(row, rows) * _COLUMNS + columns[query]
        row_end = cell - columns[query] + _COLUMNS
        # A run that goes over the edge of the row goes on at the row's beginning.
        before = np.minimum(cell + width[query], row_end)
        over = np.maximum(columns[query] + width[query] - _COLUMNS, 0)
        firsts = np.column_stack((self.cell_start[cell], self.cell_start[row_end - _COLUMNS])).ravel()
        counts = np.column_stack((self.cell_start[before], self.cell_start[row_end - _COLUMNS + over])).ravel() - firsts
        yield from self._batches(np.repeat(query, 2), firsts, counts)

    def _batches(self, query: IntArray, firsts: IntArray, counts: IntArray) -> Iterator[_Pairs]:
        held = counts > 0
        query, firsts, counts = query[held], firsts[held], counts[held]
        done = 0
        so_far = np.cumsum(counts)
        while done < counts.size:
            base = so_far[done] - counts[done]
            stop = max(done + 1, int(np.searchsorted(so_far, base + _PAIRS_AT_A_TIME, side="right")))
            batch = slice(done, stop)
            runs = _runs(firsts[batch], counts[batch])
            yield _Pairs(np.repeat(query[batch], counts[batch]), self.in_cell[runs])
            done = stop


def _checked_pieces(ends: Ends) -> Ends:
    off_m = _length_m(_in_space_m(ends.lat2_deg, ends.lon2_deg) - _in_space_m(ends.lat1_deg, ends.lon1_deg))
    if np.any(off_m > LONGEST_PIECE_M):
        allowed = f"pieces of at most {LONGEST_PIECE_M:.0f} m; split the track first"
        raise RangeError("length_m", float(np.max(off_m)), allowed)
    return ends


def _row(lat_deg: FloatArray) -> IntArray:
    row: IntArray = np.floor(_CELLS_PER_DEGREE * (lat_deg + 90.0)).astype(np.int64)
    return np.minimum(row, _ROWS - 1)


def _runs(firsts: IntArray, counts: IntArray) -> IntArray:
    """Return first, first + 1, ... for each first, as many as its count says, all in one array."""
    offsets = np.cumsum(counts) - counts
    total = int(counts.sum())
    runs: IntArray = np.arange(total, dtype=np.int64) + np.repeat(firsts - offsets, counts)
    return runs


def _in_space_m(lat_deg: FloatArray, lon_deg: FloatArray) -> FloatArray:
    """Return points of WGS 84 in space, shape (..., 3)."""
    (sin_lat, cos_lat), (sin_lon, cos_lon) = sin_cos_deg(lat_deg), sin_cos_deg(lon_deg)
    radius_m = transverse_radius_m(lat_deg, WGS_84)
    axis_m = (1.0 - WGS_84.eccentricity_squared) * radius_m * sin_lat
    return np.stack((radius_m * cos_lat * cos_lon, radius_m * cos_lat * sin_lon, axis_m), axis=-1)


def _apart_m(piece_m: tuple[FloatArray, FloatArray], shore_m: tuple[FloatArray, FloatArray]) -> FloatArray:
    """Return the least distance of two segments that don't cross: an end of one is nearest to the other."""
    from_shore = np.minimum(_off_m(piece_m[0], *shore_m), _off_m(piece_m[1], *shore_m))
    from_piece = np.minimum(_off_m(shore_m[0], *piece_m), _off_m(shore_m[1], *piece_m))
    return np.minimum(from_shore, from_piece)


def _off_m(point_m: FloatArray, from_m: FloatArray, to_m: FloatArray) -> FloatArray:
    along, off = to_m - from_m, point_m - from_m
    length = np.einsum("ij,ij->i", along, along)
    part = np.clip(np.einsum("ij,ij->i", along, off) / np.where(length > 0.0, length, 1.0), 0.0, 1.0)
    off -= part[:, np.newaxis] * along
    return _length_m(off)


def _length_m(vector_m: FloatArray) -> FloatArray:
    length_m: FloatArray = np.sqrt(np.einsum("ij,ij->i", vector_m, vector_m))
    return length_m


def _middle_and_half(from_m: FloatArray, to_m: FloatArray) -> tuple[FloatArray, FloatArray]:
    return 0.5 * (from_m + to_m), 0.5 * _length_m(to_m - from_m)


@lru_cache(maxsize=1)
def load_shore_lines() -> ShoreLines:
    """Return the lines of the bundled shoreline; read once, when they are first asked for."""
    source = files("navcore.charts") / "data" / "coast_gshhg_i.npz"
    with source.open("rb") as stream, np.load(stream) as stored:
        lon_lat = np.cumsum(stored["d"], axis=1, dtype=np.int64) / _UNITS_PER_DEGREE
        counts = stored["lens"].astype(np.int64)
    starts = np.cumsum(counts) - counts
    return ShoreLines(lon_lat[1], _running_on_deg(lon_lat[0], starts), starts)


@lru_cache(maxsize=1)
def load_coast() -> Coast:
    """Return the bundled shoreline with its index, which is made once, when it is first asked for."""
    return _indexed(load_shore_lines())


def _running_on_deg(lon_deg: FloatArray, starts: IntArray) -> FloatArray:
    """Return longitudes that run on over ±180 within each line instead of jumping."""
    step = np.diff(lon_deg, prepend=lon_deg[:1])
    turns = np.where(step > 180.0, -360.0, np.where(step < -180.0, 360.0, 0.0))
    turns[starts] = 0.0
    total = np.cumsum(turns)
    running: FloatArray = lon_deg + total - np.repeat(total[starts], np.diff(np.append(starts, lon_deg.size)))
    return running


def _indexed(lines: ShoreLines) -> Coast:
    is_start = np.ones(lines.lat_deg.size, dtype=bool)
    is_start[np.append(lines.starts[1:], lines.lat_deg.size) - 1] = False
    start = np.flatnonzero(is_start)
    low, high = (choose(lines.lat_deg[start], lines.lat_deg[start + 1]) for choose in (np.minimum, np.maximum))
    west, east = (choose(lines.lon_deg[start], lines.lon_deg[start + 1]) for choose in (np.minimum, np.maximum))
    row, rows = _row(low), _row(high) - _row(low) + 1
    column = np.floor(_CELLS_PER_DEGREE * (west + 180.0)).astype(np.int64)
    columns = np.floor(_CELLS_PER_DEGREE * (east + 180.0)).astype(np.int64) - column + 1
    by_row = np.repeat(np.arange(start.size), rows)
    segment = np.repeat(by_row, columns[by_row])
    cell = np.repeat(_runs(row, rows), columns[by_row]) * _COLUMNS
    cell += np.mod(_runs(column[by_row], columns[by_row]), _COLUMNS)
    order = np.argsort(cell, kind="stable")
    cell_start = np.searchsorted(cell[order], np.arange(_ROWS * _COLUMNS + 1))
    space_m = _in_space_m(lines.lat_deg, lines.lon_deg)
    return Coast(
        lines, start, segment[order], cell_start, space_m, *_middle_and_half(space_m[start], space_m[start + 1])
    )
