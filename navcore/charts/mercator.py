"""The Mercator projection: rhumb lines are straight.

Source: J. P. Snyder, Map Projections: A Working Manual, USGS PP 1395 (1987), pages 41-47; EPSG methods 9804, 9805 and
1044.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

from navcore.angles import wrap_180
from navcore.charts.projection import proj_words, relative_longitude_deg
from navcore.earth.latitudes import (
    checked_latitude_deg,
    geographic_from_isometric_deg,
    isometric_latitude_rad,
    parallel_radius_m,
)
from navcore.errors import RangeError
from navcore.lines.leg import checked_finite

if TYPE_CHECKING:
    import numpy.typing as npt

    from navcore.earth.figure import Figure
    from navcore.trigonometry import FloatArray


@dataclass(frozen=True, slots=True)
class Mercator:
    """Mercator with true scale along a chosen latitude, north and south. It can't show a pole.

    Attributes:
        figure: The figure that is projected.
        central_lon_deg: The meridian where x is 0; the map is cut 180° from it.
        true_scale_lat_deg: The latitude along which the natural scale holds, between -90 and 90.
        central_scale: A factor on the scale, for grids that are defined by one.
    """

    figure: Figure
    central_lon_deg: float = 0.0
    true_scale_lat_deg: float = 0.0
    central_scale: float = 1.0

    def __post_init__(self) -> None:
        if not abs(self.true_scale_lat_deg) < 90.0:
            raise RangeError("true_scale_lat_deg", self.true_scale_lat_deg, "between -90 and 90 degrees, poles aside")

    @property
    def name(self) -> str:
        """The projection in words."""
        return "Mercator"

    @property
    def conformal(self) -> bool:
        """Angles are kept."""
        return True

    @property
    def true_scale_lats_deg(self) -> tuple[float, ...]:
        """The natural scale holds along this parallel and its mirror."""
        return (self.true_scale_lat_deg,)

    @property
    def _radius_m(self) -> float:
        return self.central_scale * float(parallel_radius_m(self.true_scale_lat_deg, self.figure))

    def forward(self, lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike) -> tuple[FloatArray, FloatArray]:
        """Return x_m and y_m from the equator; NaN at a pole."""
        isometric = isometric_latitude_rad(lat_deg, self.figure)
        relative = relative_longitude_deg(lon_deg, self.central_lon_deg)
        shown = np.isfinite(isometric)
        x_m = np.where(shown, self._radius_m * np.radians(relative), np.nan)
        y_m = np.where(shown, self._radius_m * isometric, np.nan) + 0.0 * relative
        return x_m, y_m

    def inverse(self, x_m: npt.ArrayLike, y_m: npt.ArrayLike) -> tuple[FloatArray, FloatArray]:
        """Return lat_deg and lon_deg; beyond the edges the map begins anew."""
        x, y = checked_finite("x_m", x_m), checked_finite("y_m", y_m)
        latitude = geographic_from_isometric_deg(y / self._radius_m, self.figure)
        longitude = wrap_180(self.central_lon_deg + np.degrees(x / self._radius_m))
        return latitude + 0.0 * longitude, longitude + 0.0 * latitude

    def scale_factor(self, lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike) -> FloatArray:
        """Return the scale at points; NaN at a pole."""
        radius_m = parallel_radius_m(lat_deg, self.figure)
        shown = np.abs(checked_latitude_deg(lat_deg)) < 90.0
        along = 0.0 * relative_longitude_deg(lon_deg, self.central_lon_deg)
        return np.where(shown, self._radius_m / np.where(shown, radius_m, 1.0), np.nan) + along

    def convergence_deg(self, lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike) -> FloatArray:
        """Return 0: every meridian runs straight up the sheet."""
        return 0.0 * checked_latitude_deg(lat_deg) + 0.0 * relative_longitude_deg(lon_deg, self.central_lon_deg)

    def proj_string(self, x_0_m: float = 0.0, y_0_m: float = 0.0) -> str:
        """Return the projection as the PROJ library writes it."""
        if self.central_scale != 1.0:
            scale = self._radius_m / self.figure.equatorial_radius_m
            parameters = {"lon_0": self.central_lon_deg, "k_0": scale, "x_0": x_0_m, "y_0": y_0_m}
        else:
            parameters = {"lon_0": self.central_lon_deg, "lat_ts": self.true_scale_lat_deg, "x_0": x_0_m, "y_0": y_0_m}
        return proj_words("merc", self.figure, parameters)
