"""A position: latitude before longitude, always."""

from __future__ import annotations

from typing import NamedTuple


class Position(NamedTuple):
    """A point on the figure of the Earth.

    Attributes:
        lat_deg: Latitude, north positive, -90 to 90.
        lon_deg: Longitude, east positive, [-180, 180]; +180 only where "180°E" was typed, so that a leg of exactly
            180° of longitude goes the way its typed letters say.
    """

    lat_deg: float
    lon_deg: float
