"""The rules of the circle: 0 to 360 for directions, ±180 for longitudes, and which way is short.

Each function takes a float or a NumPy array and answers in kind; only arithmetic is used, so that reading and writing
text needs no NumPy. A value already inside its range comes back to the bit.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, TypeVar

if TYPE_CHECKING:
    import numpy as np
    import numpy.typing as npt

    FloatArray = npt.NDArray[np.float64]
    FloatOrArray = TypeVar("FloatOrArray", float, FloatArray)
else:
    FloatOrArray = TypeVar("FloatOrArray")


def wrap_360(direction_deg: FloatOrArray) -> FloatOrArray:
    """Return a direction in [0, 360)."""
    turned: FloatOrArray = direction_deg - 360.0 * (direction_deg // 360.0)
    # A direction a hair below 0 rounds up to 360 itself.
    inside: FloatOrArray = turned - 360.0 * (turned >= 360.0)
    return inside


def wrap_180(longitude_deg: FloatOrArray) -> FloatOrArray:
    """Return a longitude or an angle in [-180, 180)."""
    turned: FloatOrArray = longitude_deg - 360.0 * ((longitude_deg + 180.0) // 360.0)
    # The sum above rounds at the ends of the range.
    inside: FloatOrArray = turned - 360.0 * (turned >= 180.0) + 360.0 * (turned < -180.0)
    return inside


def difference_of_longitude(from_deg: FloatOrArray, to_deg: FloatOrArray) -> FloatOrArray:
    """Return the difference of longitude by the short way, east positive, in [-180, 180].

    Exactly 180 keeps the way that the signs as typed say (0 to -180 is west); +180 where they say nothing.
    """
    typed = to_deg - from_deg
    difference = wrap_180(typed)
    short_way: FloatOrArray = difference + 360.0 * ((difference == -180.0) & (typed >= 0.0))
    return short_way


def alteration_deg(course_in_deg: FloatOrArray, course_out_deg: FloatOrArray) -> FloatOrArray:
    """Return the change of course in (-180, 180], to starboard positive; a reversal is to starboard."""
    return -wrap_180(course_in_deg - course_out_deg)
