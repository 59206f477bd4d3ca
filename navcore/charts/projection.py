"""What every projection of this package answers, and what they share.

A projection takes latitudes and longitudes in degrees to metres east and north of its origin, and back, in arrays that
broadcast. It is at the scale of the Earth: a sheet divides by its natural scale. What a projection can't show comes
back as NaN; each class says what that is. Latitudes outside -90 to 90 and numbers that are not finite raise RangeError.

The convergence is the bearing of grid north, the direction of increasing y, from true north: clockwise positive. So
grid course = true course - convergence, everywhere and in both hemispheres.
"""

from __future__ import annotations

import math
from typing import TYPE_CHECKING, Protocol

import numpy as np

from navcore.angles import difference_of_longitude
from navcore.earth.latitudes import isometric_latitude_rad, parallel_radius_m
from navcore.lines.leg import checked_finite

if TYPE_CHECKING:
    import numpy.typing as npt

    from navcore.earth.figure import Figure
    from navcore.trigonometry import FloatArray


class Projection(Protocol):
    """A map projection of a figure of the Earth."""

    @property
    def figure(self) -> Figure:
        """The figure that is projected."""

    @property
    def central_lon_deg(self) -> float:
        """The meridian that runs straight up and down the sheet."""

    @property
    def name(self) -> str:
        """The projection and its parameters' kind, in words."""

    @property
    def conformal(self) -> bool:
        """Whether angles are kept, so that the scale at a point is the same in all directions."""

    @property
    def true_scale_lats_deg(self) -> tuple[float, ...]:
        """The latitudes along which the natural scale holds; none where it holds at the centre only."""

    def forward(self, lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike) -> tuple[FloatArray, FloatArray]:
        """Return x_m and y_m; NaN where a point can't be shown."""

    def inverse(self, x_m: npt.ArrayLike, y_m: npt.ArrayLike) -> tuple[FloatArray, FloatArray]:
        """Return lat_deg and lon_deg in [-180, 180); NaN where the plane holds no point."""

    def scale_factor(self, lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike) -> FloatArray:
        """Return the scale at points as a multiple of the natural scale."""

    def convergence_deg(self, lat_deg: npt.ArrayLike, lon_deg: npt.ArrayLike) -> FloatArray:
        """Return the bearing of grid north from true north, in (-180, 180]."""

    def proj_string(self, x_0_m: float, y_0_m: float) -> str:
        """Return the same projection as the PROJ library writes it, with these metres added to x and y."""


def relative_longitude_deg(lon_deg: npt.ArrayLike, central_lon_deg: float) -> FloatArray:
    """Return longitudes from the central meridian, east positive, in [-180, 180]; ±180 as the signs as given say."""
    return difference_of_longitude(np.asarray(central_lon_deg), checked_finite("lon_deg", lon_deg))


def conformal_radius_m(lat_deg: npt.ArrayLike, figure: Figure) -> FloatArray:
    """Return the radius of the parallel over the cosine of the conformal latitude: finite up to the poles.

    On a sphere it is the sphere's. Source: J. P. Snyder, Map Projections: A Working Manual, USGS PP 1395 (1987), eqs
    21-27 and 21-33, which is its limit at a pole.
    """
    isometric_rad = isometric_latitude_rad(lat_deg, figure)
    eccentricity = figure.eccentricity
    at_pole_m = figure.equatorial_radius_m * math.exp(-eccentricity * math.atanh(eccentricity))
    at_pole_m /= math.sqrt(1.0 - figure.eccentricity_squared)
    finite = np.isfinite(isometric_rad)
    radius_m = parallel_radius_m(lat_deg, figure) * np.cosh(np.where(finite, isometric_rad, 0.0))
    return np.where(finite, radius_m, at_pole_m)


def proj_words(name: str, figure: Figure, parameters: dict[str, float]) -> str:
    """Return a projection as the PROJ library writes it; every number in full precision."""
    if figure.flattening == 0.0:
        shape = {"R": figure.equatorial_radius_m}
    else:
        shape = {"a": figure.equatorial_radius_m, "rf": figure.inverse_flattening}
    words = [f"+{key}={float(value)!r}" for key, value in {**parameters, **shape}.items()]
    return " ".join((f"+proj={name}", *words, "+units=m", "+no_defs"))
