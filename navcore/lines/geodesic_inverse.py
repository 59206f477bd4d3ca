"""The shortest geodesic between two points, on any figure up to |f| = 1/50, in arrays.

Newton's method runs on the part that the figure takes away from the longitude on the auxiliary sphere, ω12 - λ12. It
is of the order of f, so that two steps from 0 settle nearly every pair, its rounding is f times smaller than that of an
angle, and meridians, equator, poles and short lines are no cases of their own. By eq. 46 and the same on the sphere
dλ12 / dω12 = m12 / (a sin σ12), which fails near the antipode only: `geodesic_antipodal` has those pairs.

Source: as `geodesic_series`.
"""

from __future__ import annotations

import math
from typing import TYPE_CHECKING, NamedTuple

import numpy as np

from navcore.angles import difference_of_longitude, wrap_360
from navcore.lines.geodesic_antipodal import arc_near_antipode
from navcore.lines.geodesic_arc import (
    NOTHING_RAD,
    RADIANS_PER_DEGREE,
    Arc,
    ReducedEnds,
    arc_by_longitude,
    length_over_b,
    longitude_lag_rad,
    reduced_ends,
    reduced_length_over_b,
    sine_of_degrees,
)
from navcore.lines.geodesic_series import geodesic_series
from navcore.lines.leg import checked_ends

if TYPE_CHECKING:
    from collections.abc import Sequence

    import numpy.typing as npt

    from navcore.earth.figure import Figure
    from navcore.lines.geodesic_series import GeodesicSeries
    from navcore.lines.leg import BoolArray
    from navcore.trigonometry import FloatArray

    _Pair = tuple[FloatArray, FloatArray]

PAIRS_AT_A_TIME = 8192
"""So many keep the working arrays inside a processor's cache."""

ANTIPODAL_REACH = 12.0
"""How near to the antipode its own method begins, in f cos² β1 radians; the astroid there reaches π of them."""

SETTLED_RAD = 3e-17
"""Longitude within this is settled: 0.2 nm."""

STEPS = 12
"""Newton steps before a pair is handed to the bracketed method."""


class GeodesicInverse(NamedTuple):
    """The shortest geodesics.

    Attributes:
        distance_m: Length.
        azimuth1_deg: Forward azimuth at the first point, [0, 360).
        azimuth2_deg: Forward azimuth at the second point, [0, 360).
        arc_deg: Length of the arc on the auxiliary sphere.
    """

    distance_m: FloatArray
    azimuth1_deg: FloatArray
    azimuth2_deg: FloatArray
    arc_deg: FloatArray


class _Longitude(NamedTuple):
    """A difference of longitude λ12.

    Attributes:
        east: 1 eastward, -1 westward.
        sin_half: Sine of |λ12| / 2.
        cos_half: Its cosine.
        complement_deg: 180 - |λ12|.
    """

    east: FloatArray
    sin_half: FloatArray
    cos_half: FloatArray
    complement_deg: FloatArray


def _longitude(lon1_deg: FloatArray, lon2_deg: FloatArray) -> _Longitude:
    """Return λ12 with the rounding of lon2 - lon1 (Knuth's two-sum) put back where it tells: in 180 - |λ12|."""
    typed_deg = lon2_deg - lon1_deg
    back_deg = typed_deg - lon2_deg
    lost_deg = (lon2_deg - (typed_deg - back_deg)) - (lon1_deg + back_deg)
    short_deg = difference_of_longitude(lon1_deg, lon2_deg)
    difference_deg = short_deg + lost_deg
    east = np.copysign(1.0, difference_deg)
    size_deg = abs(difference_deg)
    complement_deg = (180.0 - size_deg) - east * (lost_deg - (difference_deg - short_deg))
    # What was lost can take 180 over to the other side.
    east = np.copysign(east, east * complement_deg)
    complement_deg = abs(complement_deg)
    return _Longitude(east, sine_of_degrees(0.5 * size_deg), sine_of_degrees(0.5 * complement_deg), complement_deg)


def _turned(excess_rad: FloatArray, sin_half: FloatArray, cos_half: FloatArray) -> tuple[FloatArray, FloatArray]:
    """Return sine and cosine of ω12 / 2 from those of λ12 / 2."""
    sine, cosine = np.sin(0.5 * excess_rad), np.cos(0.5 * excess_rad)
    return sin_half * cosine + cos_half * sine, cos_half * cosine - sin_half * sine


def _newton_step(arc: Arc, ends: ReducedEnds, excess_rad: FloatArray | float, series: GeodesicSeries) -> FloatArray:
    """Return what to add to ω12 - λ12; what is left over afterwards goes with the square of this."""
    rate = series.axis_ratio * reduced_length_over_b(arc, ends, series) / arc.sin_sigma
    # No excess is as large as this; a step may be, next to the antipode.
    limit_rad = 5.0 * abs(series.flattening)
    step_rad = (longitude_lag_rad(arc, series) - excess_rad) / rate
    return np.minimum(np.maximum(step_rad, -limit_rad), limit_rad)


def _unsettled(step_rad: FloatArray, before_rad: FloatArray, series: GeodesicSeries) -> BoolArray:
    """Return whether what a step leaves over can still tell, judged by the last two and by the rate's own error."""
    squares, size_rad = before_rad * before_rad, abs(step_rad)
    left_rad3 = size_rad * (step_rad * step_rad + series.rate_error * squares)
    unsettled: BoolArray = left_rad3 > SETTLED_RAD * squares
    return unsettled


def _settle(
    ends: ReducedEnds, half: _Pair, state: _Pair, skipped: BoolArray, series: GeodesicSeries
) -> tuple[FloatArray, BoolArray]:
    """Go on from ω12 - λ12 and the step that led there; return it settled, and which pairs would not settle.

    All pairs are stepped together until few are left; those go on by themselves.
    """
    excess_rad, step_rad = state
    slow = ~skipped
    left = 0
    for _ in range(STEPS):
        arc = arc_by_longitude(ends, *_turned(excess_rad, *half), series)
        before_rad, step_rad = step_rad, _newton_step(arc, ends, excess_rad, series)
        excess_rad = excess_rad + step_rad
        slow = _unsettled(step_rad, before_rad, series) & ~skipped
        left = int(np.count_nonzero(slow))
        if 4 * left <= slow.size:
            break
    else:
        return excess_rad, slow
    lost = slow
    if left:
        some = ReducedEnds(*(_at(slow, part) for part in ends))
        rest, half_there = (_at(slow, excess_rad), _at(slow, step_rad)), (_at(slow, half[0]), _at(slow, half[1]))
        excess_rad, lost = np.array(excess_rad), np.array(slow)
        excess_rad[slow], lost[slow] = _settle(some, half_there, rest, np.zeros(left, dtype=np.bool_), series)
    return excess_rad, lost


def _at(mask: BoolArray, part: FloatArray) -> FloatArray:
    """Return the chosen elements, shape (n,)."""
    return np.broadcast_to(part, mask.shape)[mask]


def _near_antipode(arc: Arc, ends: ReducedEnds, longitude: _Longitude, series: GeodesicSeries) -> BoolArray:
    """Return which pairs need the antipodal method; meridians of an oblate figure and the equator do not."""
    reach = ANTIPODAL_REACH * abs(series.flattening) * ends.cos_beta1 * ends.cos_beta1
    near: BoolArray = (arc.cos_sigma < 0.0) & (arc.sin_sigma < reach)
    if np.count_nonzero(near):
        equator = (ends.sin_beta1 == 0.0) & (longitude.complement_deg >= 180.0 * series.flattening)
        meridian = (longitude.complement_deg == 0.0) & (series.flattening > 0.0)
        near = near & ~equator & ~meridian
    return near


def _canonical_arc(ends: ReducedEnds, longitude: _Longitude, series: GeodesicSeries) -> Arc:
    """Return the shortest arc between ends in canonical order."""
    half = longitude.sin_half, longitude.cos_half
    spherical = arc_by_longitude(ends, *half, series)
    antipodal = _near_antipode(spherical, ends, longitude, series)
    first_rad = _newton_step(spherical, ends, 0.0, series)
    excess_rad, lost = _settle(ends, half, (first_rad, first_rad), antipodal, series)
    antipodal = antipodal | lost
    arc = arc_by_longitude(ends, *_turned(excess_rad, *half), series)
    if np.count_nonzero(antipodal):
        complement_rad = RADIANS_PER_DEGREE * _at(antipodal, longitude.complement_deg)
        some = ReducedEnds(*(_at(antipodal, part) for part in ends))
        replaced = arc_near_antipode(some, complement_rad, series)
        arc = Arc(*(np.array(part) for part in arc))
        for part, replacement in zip(arc, replaced, strict=True):
            part[antipodal] = replacement
    return arc


def _solve(typed: Sequence[FloatArray], series: GeodesicSeries) -> GeodesicInverse:
    lat1_deg, lon1_deg, lat2_deg, lon2_deg = typed
    ends, longitude = reduced_ends(lat1_deg, lat2_deg, series), _longitude(lon1_deg, lon2_deg)
    arc = _canonical_arc(ends, longitude, series)
    size1_deg, size2_deg = abs(lat1_deg), abs(lat2_deg)
    swapped = size1_deg < size2_deg
    # Of two equal lines the canonical one goes over the south.
    tie = (arc.north1 < 0.0) & (ends.fall <= NOTHING_RAD)
    moved = arc.sigma_rad > 2.0 * NOTHING_RAD
    mirrored = moved & ((swapped & (lat2_deg < 0.0)) | ((size1_deg >= size2_deg) & (lat1_deg > 0.0)) | tie)
    northward = 1.0 - 2.0 * mirrored
    # From a pole the line runs along the other end's meridian.
    azimuth1_rad = np.arctan2(longitude.east * arc.east1 * (ends.cos_beta1 > 0.0), northward * arc.north1)
    azimuth2_rad = np.arctan2(longitude.east * arc.east2, northward * arc.north2)
    return GeodesicInverse(
        series.polar_radius_m * length_over_b(arc, series) * moved,
        wrap_360(np.where(swapped, azimuth2_rad, azimuth1_rad) / RADIANS_PER_DEGREE),
        wrap_360(np.where(swapped, azimuth1_rad, azimuth2_rad) / RADIANS_PER_DEGREE),
        arc.sigma_rad / RADIANS_PER_DEGREE * moved,
    )


def inverse(
    lat1_deg: npt.ArrayLike, lon1_deg: npt.ArrayLike, lat2_deg: npt.ArrayLike, lon2_deg: npt.ArrayLike, figure: Figure
) -> GeodesicInverse:
    """Return the shortest geodesics between points, of any shapes that broadcast.

    Edges:
        From or to a pole the line runs along the other end's meridian: azimuths 180 or 0 throughout. Of two equal lines
        the northern one; two equal lines that differ in east and west only (a prolate figure) go the way that the signs
        of the longitudes say. Exactly antipodal points: over the north pole. Equal points: 0 m, both azimuths 0.

    Raises:
        RangeError: A latitude is outside -90 to 90 or a longitude is not finite.

    Accuracy:
        15 nm, and azimuths to 1e-7° or 10 nm sideways, whichever is larger; held by tests/published/test_line_table.py
        and, on figures up to |f| = 1/50, by tests/lines/test_geodesic.py.
    """
    lat1, lon1, lat2, lon2 = (
        np.asarray(typed, dtype=np.float64)[()] for typed in (lat1_deg, lon1_deg, lat2_deg, lon2_deg)
    )
    sound = (abs(lat1) <= 90.0) & (abs(lat2) <= 90.0) & (abs(lon1) < math.inf) & (abs(lon2) < math.inf)
    if np.count_nonzero(sound) < sound.size:
        checked_ends(lat1, lon1, lat2, lon2)
    series = geodesic_series(figure)
    if sound.size <= PAIRS_AT_A_TIME:
        return _solve((lat1, lon1, lat2, lon2), series)
    flat = [np.broadcast_to(angle, sound.shape).reshape(-1) for angle in (lat1, lon1, lat2, lon2)]
    answer = np.empty((4, sound.size))
    for start in range(0, sound.size, PAIRS_AT_A_TIME):
        piece = slice(start, start + PAIRS_AT_A_TIME)
        answer[:, piece] = _solve([angle[piece] for angle in flat], series)
    return GeodesicInverse(*(row.reshape(sound.shape) for row in answer))
