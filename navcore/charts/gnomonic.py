"""The gnomonic projection of the sphere: great circles are straight lines. It is not conformal.

Neither courses nor distances can be measured on it: it is for seeing where a great circle runs and carrying its points
to another sheet. On an ellipsoid no projection makes every geodesic straight, so this one takes a sphere only.

Source: J. P. Snyder, Map Projections: A Working Manual, USGS PP 1395 (1987), pages 164-168.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

import numpy as np

from navcore.angles import wrap_180
from navcore.charts.projection import proj_words, relative_longitude_deg
from navcore.earth.figure import SPHERE, Figure
from navcore.earth.latitudes import checked_latitude_deg
from navcore.errors import RangeError
from navcore.lines.leg import checked_finite
from navcore.trigonometry import sin_cos_deg

if TYPE_CHECKING:
    import numpy.typing as npt

    from navcore.trigonometry import FloatArray

_HORIZON = 1e-9


@dataclass(frozen=True, slots=True)
class Gnomonic:
    """Gnomonic from a centre; points 90° or more from it can't be shown.

    Attributes:
        centre_lat_deg: Latitude of the centre.
        central_lon_deg: Longitude of the centre.
        figure: A sphere.
    """

    centre_lat_deg: float
    central_lon_deg: float
    figure: Figure = SPHERE

    def __post_init__(self) -> None:
        if not abs(self.centre_lat_deg) <= 90.0:
            raise RangeError("centre_lat_deg", self.centre_lat_deg, "-90 to 90 degrees")
        if self.figure.flattening != 0.0:
            raise RangeError("figure.flattening", self.figure.flattening, "0: the gnomonic projection takes a sphere")

    @property
    def name(self) -> str:
        """The projection in words."""
        return "Gnomonic, of the sphere, NOT CONFORMAL"

    @property
    def conformal(self) -> bool:
        """Angles are not kept."""
        return False

    @property
    def true_scale_lats_deg(self) -> tuple[float, ...]:
        """The natural scale holds at the centre only."""
        return ()

    def _nearness(self, lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike) -> FloatArray:
        """Return the cosine of the arc from the centre; NaN where that is 90° or more."""
        (sine, cosine), (sin_centre, cos_centre) = sin_cos_deg(checked_latitude_deg(lat_deg)), self._centre()
        _, cos_lon = sin_cos_deg(relative_longitude_deg(lon_deg, self.central_lon_deg))
        nearness = sin_centre * sine + cos_centre * cosine * cos_lon
        return np.where(nearness > _HORIZON, nearness, np.nan)

    def _centre(self) -> tuple[FloatArray, FloatArray]:
        return sin_cos_deg(self.centre_lat_deg)

    def forward(self, lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike) -> tuple[FloatArray, FloatArray]:
        """Return x_m and y_m from the centre; NaN 90° or more from it."""
        (sine, cosine), (sin_centre, cos_centre) = sin_cos_deg(checked_latitude_deg(lat_deg)), self._centre()
        sin_lon, cos_lon = sin_cos_deg(relative_longitude_deg(lon_deg, self.central_lon_deg))
        radius_m = self.figure.equatorial_radius_m / self._nearness(lat_deg, lon_deg)
        return radius_m * cosine * sin_lon, radius_m * (cos_centre * sine - sin_centre * cosine * cos_lon)

    def inverse(self, x_m: npt.ArrayLike, y_m: npt.ArrayLike) -> tuple[FloatArray, FloatArray]:
        """Return lat_deg and lon_deg; every point of the plane is one."""
        sin_centre, cos_centre = self._centre()
        across = checked_finite("x_m", x_m) / self.figure.equatorial_radius_m
        along = checked_finite("y_m", y_m) / self.figure.equatorial_radius_m
        axis, towards = sin_centre + along * cos_centre, cos_centre - along * sin_centre
        latitude: FloatArray = np.degrees(np.arctan2(axis, np.hypot(across, towards)))
        return latitude, wrap_180(self.central_lon_deg + np.degrees(np.arctan2(across, towards)))

    def scale_factor(self, lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike) -> FloatArray:
        """Return the scale along the meridian at points; across it, it is another. NaN where not shown."""
        sin_lon, cos_lon = sin_cos_deg(relative_longitude_deg(lon_deg, self.central_lon_deg))
        nearness = self._nearness(lat_deg, lon_deg)
        scale: FloatArray = np.hypot(self._centre()[0] * sin_lon, cos_lon) / (nearness * nearness)
        return scale

    def convergence_deg(self, lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike) -> FloatArray:
        """Return how far the meridian leans from the sheet's up; not for courses, since angles are not kept."""
        sin_lon, cos_lon = sin_cos_deg(relative_longitude_deg(lon_deg, self.central_lon_deg))
        angle: FloatArray = np.degrees(np.arctan2(self._centre()[0] * sin_lon, cos_lon))
        return np.where(np.isnan(self._nearness(lat_deg, lon_deg)), np.nan, angle)

    def proj_string(self, x_0_m: float = 0.0, y_0_m: float = 0.0) -> str:
        """Return the projection as the PROJ library writes it."""
        centre = {"lat_0": self.centre_lat_deg, "lon_0": self.central_lon_deg}
        return proj_words("gnom", self.figure, {**centre, "x_0": x_0_m, "y_0": y_0_m})
