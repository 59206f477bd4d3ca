"""The Lambert conformal conic projection with one standard parallel or two.

Source: J. P. Snyder, Map Projections: A Working Manual, USGS PP 1395 (1987), pages 104-110; EPSG methods 9801 and 9802.
"""

from __future__ import annotations

import math
from dataclasses import dataclass, field
from typing import TYPE_CHECKING

import numpy as np

from navcore.angles import wrap_180
from navcore.charts.projection import proj_words, relative_longitude_deg
from navcore.earth.latitudes import (
    checked_latitude_deg,
    geographic_from_isometric_deg,
    isometric_difference_rad,
    isometric_latitude_rad,
    latitude_pair,
    parallel_radius_m,
)
from navcore.errors import RangeError
from navcore.lines.leg import checked_finite
from navcore.trigonometry import sin_cos_deg

if TYPE_CHECKING:
    import numpy.typing as npt

    from navcore.earth.figure import Figure
    from navcore.trigonometry import FloatArray

_ONE_PARALLEL_DEG = 1e-4
_FLATTEST_CONE = 1e-3


@dataclass(frozen=True, slots=True)
class Lambert:
    """Lambert conformal conic; it can't show the pole away from its apex, and at the apex itself it has no scale.

    Attributes:
        figure: The figure that is projected.
        central_lon_deg: The meridian that runs straight up the sheet; the map is cut 180° from it.
        parallels_deg: One standard parallel or two, where the natural scale holds.
        origin_lat_deg: The latitude where y is 0 on the central meridian.
        central_scale: A factor on the scale along the standard parallels, for grids that are defined by one.
        cone: The constant of the cone n, north positive: convergence is n times the longitude from the centre.
    """

    figure: Figure
    central_lon_deg: float
    parallels_deg: tuple[float] | tuple[float, float]
    origin_lat_deg: float
    central_scale: float = 1.0
    cone: float = field(init=False)

    def __post_init__(self) -> None:
        if not abs(self.origin_lat_deg) <= 90.0:
            raise RangeError("origin_lat_deg", self.origin_lat_deg, "-90 to 90 degrees")
        for parallel in self.parallels_deg:
            if not abs(parallel) < 90.0:
                raise RangeError("parallels_deg", parallel, "between -90 and 90 degrees, poles aside")
        cone = self._constant_of_cone()
        if abs(cone) < _FLATTEST_CONE:
            allowed = "parallels that don't balance across the equator; there use Mercator"
            raise RangeError("parallels_deg", self.parallels_deg[0], allowed)
        object.__setattr__(self, "cone", cone)

    def _constant_of_cone(self) -> float:
        lowest, highest = min(self.parallels_deg), max(self.parallels_deg)
        if highest - lowest < _ONE_PARALLEL_DEG:
            return math.sin(math.radians(0.5 * (lowest + highest)))
        radii_m = parallel_radius_m([lowest, highest], self.figure)
        pair = latitude_pair(lowest, highest, highest - lowest)
        return math.log(radii_m[0] / radii_m[1]) / float(isometric_difference_rad(pair, self.figure))

    @property
    def name(self) -> str:
        """The projection in words."""
        return "Lambert conformal conic"

    @property
    def conformal(self) -> bool:
        """Angles are kept."""
        return True

    @property
    def true_scale_lats_deg(self) -> tuple[float, ...]:
        """The natural scale holds along the standard parallels."""
        return self.parallels_deg

    def radius_m(self, lat_deg: npt.ArrayLike) -> FloatArray:
        """Return the radius of parallels about the apex, of the cone's sign; NaN at the pole that can't be shown."""
        first = self.parallels_deg[0]
        first_radius_m = self.central_scale * float(parallel_radius_m(first, self.figure)) / self.cone
        rise = isometric_latitude_rad(lat_deg, self.figure) - isometric_latitude_rad(first, self.figure)
        radius_m: FloatArray = first_radius_m * np.exp(-self.cone * rise)
        return np.where(np.isfinite(radius_m), radius_m, np.nan)

    @property
    def apex_y_m(self) -> float:
        """The y of the apex of the cone, where all meridians meet; its x is 0."""
        return float(self.radius_m(self.origin_lat_deg))

    def forward(self, lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike) -> tuple[FloatArray, FloatArray]:
        """Return x_m and y_m; NaN at the pole away from the apex."""
        radius_m = self.radius_m(lat_deg)
        sine, cosine = sin_cos_deg(self.cone * relative_longitude_deg(lon_deg, self.central_lon_deg))
        return radius_m * sine, self.apex_y_m - radius_m * cosine

    def inverse(self, x_m: npt.ArrayLike, y_m: npt.ArrayLike) -> tuple[FloatArray, FloatArray]:
        """Return lat_deg and lon_deg; NaN in the gap between the two edges of the map."""
        sign = math.copysign(1.0, self.cone)
        x, below = checked_finite("x_m", x_m), self.apex_y_m - checked_finite("y_m", y_m)
        first_radius_m = self.central_scale * float(parallel_radius_m(self.parallels_deg[0], self.figure))
        with np.errstate(divide="ignore"):
            growth = np.log(np.hypot(x, below) * abs(self.cone) / first_radius_m)
        isometric = isometric_latitude_rad(self.parallels_deg[0], self.figure) - growth / self.cone
        relative: FloatArray = np.degrees(np.arctan2(sign * x, sign * below)) / self.cone
        shown = np.abs(relative) <= 180.0 + 1e-9
        latitude = np.where(shown, geographic_from_isometric_deg(isometric, self.figure), np.nan)
        return latitude, np.where(shown, wrap_180(self.central_lon_deg + relative), np.nan)

    def scale_factor(self, lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike) -> FloatArray:
        """Return the scale at points; NaN at either pole."""
        radius_m = parallel_radius_m(lat_deg, self.figure)
        shown = np.abs(checked_latitude_deg(lat_deg)) < 90.0
        along = 0.0 * relative_longitude_deg(lon_deg, self.central_lon_deg)
        return np.where(shown, self.cone * self.radius_m(lat_deg) / np.where(shown, radius_m, 1.0), np.nan) + along

    def convergence_deg(self, lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike) -> FloatArray:
        """Return the bearing of grid north from true north: the cone's constant times the longitude."""
        relative = relative_longitude_deg(lon_deg, self.central_lon_deg)
        return self.cone * relative + 0.0 * checked_latitude_deg(lat_deg)

    def proj_string(self, x_0_m: float = 0.0, y_0_m: float = 0.0) -> str:
        """Return the projection as the PROJ library writes it."""
        parameters = {"lat_1": self.parallels_deg[0]}
        if len(self.parallels_deg) > 1:
            parameters["lat_2"] = self.parallels_deg[-1]
        parameters |= {"lat_0": self.origin_lat_deg, "lon_0": self.central_lon_deg, "k_0": self.central_scale}
        return proj_words("lcc", self.figure, {**parameters, "x_0": x_0_m, "y_0": y_0_m})
