"""The plane of one sheet: from the Earth to millimetres from the lower left corner of the neat line, and back."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

if TYPE_CHECKING:
    import numpy.typing as npt

    from navcore.charts.projection import Projection
    from navcore.charts.track import Window
    from navcore.trigonometry import FloatArray


@dataclass(frozen=True, slots=True)
class PaperPlane:
    """A projection at a natural scale on a neat line.

    Attributes:
        projection: The projection.
        scale: Denominator of the natural scale.
        x_0_m: What is added to the projection's x so that it counts from the neat line's left side.
        y_0_m: Likewise from its lower side.
        width_mm: Inside the neat line.
        height_mm: Inside the neat line.
    """

    projection: Projection
    scale: float
    x_0_m: float
    y_0_m: float
    width_mm: float
    height_mm: float

    @property
    def window_mm(self) -> Window:
        """Left, bottom, right and top of the neat line."""
        return 0.0, 0.0, self.width_mm, self.height_mm

    @property
    def proj_string(self) -> str:
        """The projection as PROJ writes it: millimetres are its metres × 1000 / scale."""
        return self.projection.proj_string(self.x_0_m, self.y_0_m)

    def to_mm(self, lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike) -> FloatArray:
        """Return places on paper, shape (..., 2); NaN where a point can't be shown."""
        x_m, y_m = self.projection.forward(lat_deg, lon_deg)
        placed: FloatArray = np.stack((x_m + self.x_0_m, y_m + self.y_0_m), axis=-1) * (1000.0 / self.scale)
        return placed

    def to_earth(self, x_mm: npt.ArrayLike, y_mm: npt.ArrayLike) -> tuple[FloatArray, FloatArray]:
        """Return the latitudes and longitudes of places on paper; NaN where there is none."""
        metres_per_mm = self.scale / 1000.0
        return self.projection.inverse(
            np.multiply(x_mm, metres_per_mm) - self.x_0_m, np.multiply(y_mm, metres_per_mm) - self.y_0_m
        )

    def holds(self, place_mm: FloatArray) -> npt.NDArray[np.bool_]:
        """Return which places, shape (..., 2), are inside the neat line or on it."""
        x_mm, y_mm = place_mm[..., 0], place_mm[..., 1]
        inside = (x_mm >= 0.0) & (x_mm <= self.width_mm) & (y_mm >= 0.0) & (y_mm <= self.height_mm)
        return np.asarray(inside)

    def edges_mm(self) -> dict[str, FloatArray]:
        """Return points along each side of the neat line, a millimetre or so apart."""
        across = np.linspace(0.0, self.width_mm, int(self.width_mm) + 2)
        up = np.linspace(0.0, self.height_mm, int(self.height_mm) + 2)
        return {
            "bottom": np.column_stack((across, np.zeros_like(across))),
            "top": np.column_stack((across, np.full_like(across, self.height_mm))),
            "left": np.column_stack((np.zeros_like(up), up)),
            "right": np.column_stack((np.full_like(up, self.width_mm), up)),
        }
