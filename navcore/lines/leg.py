"""What both kinds of line share: a leg's two ends, checked, and where a leg crosses a meridian or a parallel."""

from __future__ import annotations

from typing import TYPE_CHECKING, NamedTuple

import numpy as np

from navcore.earth.latitudes import checked_latitude_deg
from navcore.errors import RangeError

if TYPE_CHECKING:
    import numpy.typing as npt

    from navcore.trigonometry import FloatArray

    BoolArray = npt.NDArray[np.bool_]


class Ends(NamedTuple):
    """The two ends of legs, broadcast to one shape.

    Attributes:
        lat1_deg: Latitude of the start.
        lon1_deg: Longitude of the start.
        lat2_deg: Latitude of the end.
        lon2_deg: Longitude of the end.
    """

    lat1_deg: FloatArray
    lon1_deg: FloatArray
    lat2_deg: FloatArray
    lon2_deg: FloatArray

    @property
    def own_meridian_deg(self) -> FloatArray:
        """The longitude that a leg leaves on: the start's, or the other end's where it starts at a pole."""
        return np.where(np.abs(self.lat1_deg) == 90.0, self.lon2_deg, self.lon1_deg)

    @property
    def at_pole(self) -> BoolArray:
        """Whether either end is a pole."""
        at_pole: BoolArray = (np.abs(self.lat1_deg) == 90.0) | (np.abs(self.lat2_deg) == 90.0)
        return at_pole


class Crossing(NamedTuple):
    """Where a leg crosses a meridian or a parallel; all three are NaN where it does not.

    Attributes:
        lat_deg: Latitude.
        lon_deg: Longitude, [-180, 180).
        distance_m: From the leg's start, along it.
    """

    lat_deg: FloatArray
    lon_deg: FloatArray
    distance_m: FloatArray


def checked_finite(name: str, value: npt.ArrayLike) -> FloatArray:
    """Return an array of finite numbers.

    Raises:
        RangeError: One is infinite or not a number.
    """
    number = np.asarray(value, dtype=np.float64)
    finite = np.isfinite(number)
    if not np.all(finite):
        raise RangeError(name, float(number[~finite].flat[0]), "any finite number")
    return number


def checked_ends(
    lat1_deg: npt.ArrayLike, lon1_deg: npt.ArrayLike, lat2_deg: npt.ArrayLike, lon2_deg: npt.ArrayLike
) -> Ends:
    """Return the ends of legs, checked and broadcast.

    Raises:
        RangeError: A latitude is outside -90 to 90 or a longitude is not finite.
    """
    latitudes = checked_latitude_deg(lat1_deg), checked_latitude_deg(lat2_deg)
    longitudes = checked_finite("lon1_deg", lon1_deg), checked_finite("lon2_deg", lon2_deg)
    return Ends(*np.broadcast_arrays(latitudes[0], longitudes[0], latitudes[1], longitudes[1]))


def first_index(found: npt.ArrayLike) -> tuple[tuple[int, ...], str]:
    """Return where in an array the first true value stands, and the words for a message: none for a scalar."""
    index = tuple(int(part) for part in np.argwhere(np.asarray(found))[0])
    return index, f" (at index {', '.join(map(str, index))})" if index else ""
