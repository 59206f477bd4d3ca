"""The stereographic projection, polar and oblique, of an ellipsoid or a sphere.

Two projections are called oblique stereographic. This is Snyder's: the ellipsoid is taken to the conformal latitude,
longitudes unchanged, and that sphere is projected (PROJ's stere). The other, EPSG method 9809, goes through the sphere
of Gauss, whose longitudes are stretched (PROJ's sterea): its poles are the tips of cones, its far meridian is torn, and
the polar aspect is not its limit. A sheet of high latitudes may hold a pole and must still be conformal there, so
Snyder's it is: one formula from the equator to either pole. Ten degrees from the centre the two differ by hundreds of
metres. On a sphere they are the same.

Source: J. P. Snyder, Map Projections: A Working Manual, USGS PP 1395 (1987), pages 154-163; the polar aspect is EPSG
methods 9810 and 9829.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import TYPE_CHECKING, NamedTuple

import numpy as np

from navcore.angles import wrap_180
from navcore.charts.projection import conformal_radius_m, proj_words, relative_longitude_deg
from navcore.earth.latitudes import geographic_from_isometric_deg, isometric_latitude_rad
from navcore.errors import RangeError
from navcore.lines.leg import checked_finite
from navcore.trigonometry import sin_cos_deg

if TYPE_CHECKING:
    import numpy.typing as npt

    from navcore.earth.figure import Figure
    from navcore.trigonometry import FloatArray

_ANTIPODE = 1e-12


class _Sphere(NamedTuple):
    """Points on the conformal sphere, seen from the centre: sines and cosines of latitude and relative longitude."""

    sin_lat: FloatArray
    cos_lat: FloatArray
    sin_lon: FloatArray
    cos_lon: FloatArray


@dataclass(frozen=True, slots=True)
class Stereographic:
    """Stereographic from a centre; the point opposite the centre can't be shown.

    Attributes:
        figure: The figure that is projected.
        centre_lat_deg: Latitude of the centre; 90 or -90 is the polar aspect.
        central_lon_deg: Longitude of the centre; in the polar aspect the meridian that runs down the sheet from the
            north pole, up from the south.
        central_scale: The scale factor at the centre.
        true_scale_lat_deg: The parallel of true scale that a polar aspect was made by; see `polar`.
    """

    figure: Figure
    centre_lat_deg: float
    central_lon_deg: float = 0.0
    central_scale: float = 1.0
    true_scale_lat_deg: float | None = None

    def __post_init__(self) -> None:
        if not abs(self.centre_lat_deg) <= 90.0:
            raise RangeError("centre_lat_deg", self.centre_lat_deg, "-90 to 90 degrees")

    @classmethod
    def polar(cls, figure: Figure, true_scale_lat_deg: float, central_lon_deg: float = 0.0) -> Stereographic:
        """Return the polar aspect with true scale along a parallel, whose sign says which pole.

        Raises:
            RangeError: The parallel is the equator or outside -90 to 90.
        """
        if not 0.0 < abs(true_scale_lat_deg) <= 90.0:
            raise RangeError("true_scale_lat_deg", true_scale_lat_deg, "-90 to 90 degrees, the equator aside")
        centre = cls(figure, math.copysign(90.0, true_scale_lat_deg), central_lon_deg)
        scale = 1.0 / float(centre.scale_factor(true_scale_lat_deg, central_lon_deg))
        return cls(figure, centre.centre_lat_deg, central_lon_deg, scale, true_scale_lat_deg)

    @property
    def is_polar(self) -> bool:
        """Whether the centre is a pole."""
        return abs(self.centre_lat_deg) == 90.0

    @property
    def name(self) -> str:
        """The projection in words."""
        return "Polar stereographic" if self.is_polar else "Oblique stereographic"

    @property
    def conformal(self) -> bool:
        """Angles are kept."""
        return True

    @property
    def true_scale_lats_deg(self) -> tuple[float, ...]:
        """The natural scale holds along this parallel; where there is none, at the centre, times its factor."""
        return () if self.true_scale_lat_deg is None else (self.true_scale_lat_deg,)

    @property
    def _radius_m(self) -> float:
        """The radius of the sphere that is projected, the factor at the centre included."""
        return self.central_scale * float(conformal_radius_m(self.centre_lat_deg, self.figure))

    def _conformal_centre(self) -> tuple[float, float]:
        isometric = isometric_latitude_rad(self.centre_lat_deg, self.figure)
        return float(np.tanh(isometric)), float(1.0 / np.cosh(isometric))

    def _on_sphere(self, lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike) -> _Sphere:
        isometric = isometric_latitude_rad(lat_deg, self.figure)
        return _Sphere(
            np.tanh(isometric),
            1.0 / np.cosh(isometric),
            *sin_cos_deg(relative_longitude_deg(lon_deg, self.central_lon_deg)),
        )

    def _spread(self, point: _Sphere) -> FloatArray:
        """Return 2 / (1 + cosine of the arc from the centre), the growth of lengths; NaN opposite the centre."""
        sin_centre, cos_centre = self._conformal_centre()
        nearness = 1.0 + sin_centre * point.sin_lat + cos_centre * point.cos_lat * point.cos_lon
        shown = nearness > _ANTIPODE
        return np.where(shown, 2.0 / np.where(shown, nearness, 1.0), np.nan)

    def forward(self, lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike) -> tuple[FloatArray, FloatArray]:
        """Return x_m and y_m from the centre; NaN opposite it."""
        sin_centre, cos_centre = self._conformal_centre()
        point = self._on_sphere(lat_deg, lon_deg)
        spread_m = self._radius_m * self._spread(point)
        north = cos_centre * point.sin_lat - sin_centre * point.cos_lat * point.cos_lon
        return spread_m * point.cos_lat * point.sin_lon, spread_m * north

    def inverse(self, x_m: npt.ArrayLike, y_m: npt.ArrayLike) -> tuple[FloatArray, FloatArray]:
        """Return lat_deg and lon_deg; every point of the plane is one."""
        sin_centre, cos_centre = self._conformal_centre()
        across = checked_finite("x_m", x_m) / (2.0 * self._radius_m)
        along = checked_finite("y_m", y_m) / (2.0 * self._radius_m)
        # The point's coordinates on the sphere times 1 + tan² of half its arc from the centre: no angle is needed.
        depth = 1.0 - across * across - along * along
        axis = depth * sin_centre + 2.0 * along * cos_centre
        towards = depth * cos_centre - 2.0 * along * sin_centre
        with np.errstate(divide="ignore"):
            isometric = np.arcsinh(axis / np.hypot(2.0 * across, towards))
        longitude = wrap_180(self.central_lon_deg + np.degrees(np.arctan2(2.0 * across, towards)))
        return geographic_from_isometric_deg(isometric, self.figure), longitude

    def scale_factor(self, lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike) -> FloatArray:
        """Return the scale at points; NaN opposite the centre."""
        spread = self._spread(self._on_sphere(lat_deg, lon_deg))
        return self._radius_m * spread / conformal_radius_m(lat_deg, self.figure)

    def convergence_deg(self, lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike) -> FloatArray:
        """Return the bearing of grid north from true north.

        In the polar aspect it is the longitude from the central meridian in the north, and that with its sign changed
        in the south; at a pole itself it goes by the longitude given.
        """
        sin_centre, cos_centre = self._conformal_centre()
        point = self._on_sphere(lat_deg, lon_deg)
        # tan γ/2 = tan Δλ/2 sin ½(χ + χ₁) / cos ½(χ - χ₁), by Napier's analogies, with its halves multiplied out.
        sine = point.sin_lon * (point.sin_lat + sin_centre)
        cosine = point.cos_lat * cos_centre + point.cos_lon * (1.0 + point.sin_lat * sin_centre)
        angle: FloatArray = np.degrees(np.arctan2(sine, cosine))
        return np.where(np.isnan(self._spread(point)), np.nan, angle)

    def proj_string(self, x_0_m: float = 0.0, y_0_m: float = 0.0) -> str:
        """Return the projection as the PROJ library writes it."""
        parameters = {"lat_0": self.centre_lat_deg, "lon_0": self.central_lon_deg, "k_0": self.central_scale}
        return proj_words("stere", self.figure, {**parameters, "x_0": x_0_m, "y_0": y_0_m})
