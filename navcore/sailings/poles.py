"""What the sailings do at a pole, where every meridian meets and meridional parts have no end."""

from __future__ import annotations

from typing import TYPE_CHECKING

from navcore.errors import NoAnswerError
from navcore.sailings.differences import without_noise

if TYPE_CHECKING:
    from navcore.position import Position

POLE_RULE = "a leg to or from a pole lies along the meridian of its other end, whatever longitude the pole is given"


def meridian_course_deg(d_lat_min: float) -> float | None:
    """Return 0 or 180, the course along a meridian; None where d.lat is 0."""
    if d_lat_min == 0.0:
        return None
    return 0.0 if d_lat_min > 0.0 else 180.0


def latitude_reached_deg(start: Position, d_lat_min: float) -> float:
    """Return the latitude after a difference of latitude; exactly the pole's or the equator's where it is meant.

    Raises:
        NoAnswerError: It is beyond a pole.
    """
    lat_deg = start.lat_deg + d_lat_min / 60.0
    for exact_deg in (-90.0, 0.0, 90.0):
        if without_noise((lat_deg - exact_deg) * 60.0) == 0.0:
            return exact_deg
    if abs(lat_deg) > 90.0:
        raise NoAnswerError("the run goes past a pole, where no latitude is left; shorten it or change the course")
    return lat_deg
