"""What the sailings start from: d.lat, d.long, mean latitude, meridional parts, and the turning of the meridians.

All scalar: a sailing is worked one problem at a time.
"""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

from navcore.angles import difference_of_longitude, wrap_180
from navcore.earth.latitudes import (
    MINUTES_PER_RADIAN,
    isometric_difference_rad,
    latitude_pair,
    meridional_parts_min,
)
from navcore.errors import RangeError
from navcore.trigonometry import direction_deg, sin_cos_deg

if TYPE_CHECKING:
    from navcore.earth.figure import Figure
    from navcore.position import Position

NOTHING_MIN = 1e-9
"""A difference of latitude or a departure below this, 2 µm, is rounding and not distance."""


def without_noise(amount_min: float) -> float:
    """Return the amount, or 0 where it is only rounding."""
    return 0.0 if abs(amount_min) < NOTHING_MIN else amount_min


def check_position(position: Position) -> None:
    """Refuse a position that is none.

    Raises:
        RangeError: A latitude beyond a pole, or a figure that is not finite.
    """
    if not abs(position.lat_deg) <= 90.0:
        raise RangeError("lat_deg", position.lat_deg, "-90° to 90°")
    if not math.isfinite(position.lon_deg):
        raise RangeError("lon_deg", position.lon_deg, "a longitude in degrees")


def check_run(course_deg: float, distance_nmi: float) -> None:
    """Refuse a course or distance that is none.

    Raises:
        RangeError: A figure that is not finite, or a distance below 0.
    """
    if not math.isfinite(course_deg):
        raise RangeError("course_deg", course_deg, "a course in degrees")
    if not 0.0 <= distance_nmi < math.inf:
        raise RangeError("distance_nmi", distance_nmi, "0 NM or more; the other way is the reciprocal course")


def sine_cosine(angle_deg: float) -> tuple[float, float]:
    """Return the sine and cosine of degrees, exact at multiples of 90."""
    sine, cosine = sin_cos_deg(angle_deg)
    return float(sine), float(cosine)


def course_of(east: float, north: float) -> float:
    """Return the course in degrees, [0, 360), of a distance made east and north; not both 0."""
    return float(direction_deg(east, north))


def difference_of_latitude_min(start: Position, end: Position) -> float:
    """Return the difference of latitude in minutes, north positive.

    Raises:
        RangeError: A latitude or longitude that is none.
    """
    check_position(start)
    check_position(end)
    return without_noise((end.lat_deg - start.lat_deg) * 60.0)


def difference_of_longitude_min(start: Position, end: Position) -> float:
    """Return the difference of longitude by the short way in minutes, east positive; 180° goes as the signs say."""
    return difference_of_longitude(start.lon_deg, end.lon_deg) * 60.0


def longitude_reached_deg(start: Position, d_long_min: float) -> float:
    """Return the longitude in [-180, 180) after a difference of longitude in minutes."""
    return wrap_180(start.lon_deg + d_long_min / 60.0)


def mean_latitude_deg(lat1_deg: float, lat2_deg: float) -> float:
    """Return half the sum of two latitudes, north positive."""
    return 0.5 * (lat1_deg + lat2_deg)


def is_across_equator(lat1_deg: float, lat2_deg: float) -> bool:
    """Whether one latitude is north and the other south; a place on the equator is neither."""
    return lat1_deg * lat2_deg < 0.0


def is_at_pole(*lats_deg: float) -> bool:
    """Whether any of the latitudes is a pole."""
    return any(abs(lat_deg) == 90.0 for lat_deg in lats_deg)


def parts_min(lat_deg: float, figure: Figure) -> float | None:
    """Return the meridional parts of a latitude, north positive; None at a pole, where they have no end."""
    return None if is_at_pole(lat_deg) else float(meridional_parts_min(lat_deg, figure))


def difference_of_parts_min(lat1_deg: float, lat2_deg: float, d_lat_min: float, figure: Figure) -> float | None:
    """Return the difference of meridional parts, north positive; None where either latitude is a pole.

    Args:
        lat1_deg: The first latitude.
        lat2_deg: The second latitude.
        d_lat_min: Their difference in minutes, so that DMP is not lost where the latitudes are close.
        figure: The figure of the Earth.
    """
    if is_at_pole(lat1_deg, lat2_deg):
        return None
    pair = latitude_pair(lat1_deg, lat2_deg, d_lat_min / 60.0)
    return MINUTES_PER_RADIAN * float(isometric_difference_rad(pair, figure))


def convergency_deg(start: Position, end: Position) -> float:
    """Return how far the meridians of two places turn to each other: d.long × sin mean latitude, unsigned."""
    sine = sine_cosine(mean_latitude_deg(start.lat_deg, end.lat_deg))[0]
    return abs(difference_of_longitude_min(start, end) / 60.0 * sine)


def conversion_angle_deg(start: Position, end: Position) -> float:
    """Return half the convergency: what is between the great circle and the rhumb line at either end, nearly."""
    return 0.5 * convergency_deg(start, end)
