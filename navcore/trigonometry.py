"""Trigonometry of degrees in arrays, exact where the answer is exact."""

from __future__ import annotations

import numpy as np
import numpy.typing as npt

FloatArray = npt.NDArray[np.float64]


def sin_cos_deg(angle_deg: npt.ArrayLike) -> tuple[FloatArray, FloatArray]:
    """Return the sine and cosine of an angle in degrees, of any size; exact at every multiple of 90.

    The angle is brought within 45° of a multiple of 90 before it becomes radians, so that the cosine of a latitude a
    metre from the pole keeps all its digits.
    """
    angle = np.asarray(angle_deg, dtype=np.float64)
    reduced: FloatArray = np.fmod(angle, 360.0)
    quarter: FloatArray = np.rint(reduced / 90.0)
    small: FloatArray = np.radians(reduced - 90.0 * quarter)
    sine, cosine = np.sin(small), np.cos(small)
    turn = quarter.astype(np.int64) & 3
    sine_out: FloatArray = np.choose(turn, (sine, cosine, -sine, -cosine)) + 0.0
    cosine_out: FloatArray = np.choose(turn, (cosine, -sine, -cosine, sine)) + 0.0
    return sine_out, cosine_out


def direction_deg(east: npt.ArrayLike, north: npt.ArrayLike) -> FloatArray:
    """Return the direction of a vector in [0, 360); exact along the axes, 0 for the null vector."""
    # Swapping so that the division is of the smaller by the larger keeps 90, 180 and 270 exact in degrees.
    x, y = np.asarray(east, dtype=np.float64), np.asarray(north, dtype=np.float64)
    steep = np.abs(x) > np.abs(y)
    near = np.degrees(np.arctan2(np.where(steep, y, x), np.where(steep, np.abs(x), np.abs(y))))
    upright = np.where(y < 0.0, 180.0 - near, near)
    sideways = np.where(x > 0.0, 90.0 - near, 270.0 + near)
    angle: FloatArray = np.where(steep, sideways, upright)
    wrapped: FloatArray = np.where(angle < 0.0, angle + 360.0, angle)
    return np.where(wrapped >= 360.0, 0.0, wrapped) + 0.0
