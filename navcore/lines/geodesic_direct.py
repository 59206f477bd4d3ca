"""A geodesic from a point in a direction: where it is after a distance, or after an arc on the auxiliary sphere.

On that sphere the line is a great circle, and what lies at an arc is in closed form: the vertex is 90° of arc from the
equator, and a reduced latitude β is crossed where sin σ = sin β / cos α0.

Source: as `geodesic_series`.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, NamedTuple

import numpy as np

from navcore.angles import wrap_180, wrap_360
from navcore.earth.latitudes import checked_latitude_deg
from navcore.lines.geodesic_series import GeodesicSeries, geodesic_series
from navcore.lines.leg import checked_finite
from navcore.trigonometry import sin_cos_deg

if TYPE_CHECKING:
    import numpy.typing as npt

    from navcore.earth.figure import Figure
    from navcore.trigonometry import FloatArray

    _Direction = tuple[FloatArray, FloatArray]

REVERSION_REACH = 0.01
"""Up to this |f| the sixth order of the series that undoes the length is below a nanometre."""


class GeodesicPoint(NamedTuple):
    """A point on a geodesic.

    Attributes:
        lat_deg: Latitude.
        lon_deg: Longitude, [-180, 180).
        azimuth_deg: Forward azimuth there, [0, 360).
        distance_m: From the line's first point, negative behind it.
        arc_deg: The same on the auxiliary sphere.
    """

    lat_deg: FloatArray
    lon_deg: FloatArray
    azimuth_deg: FloatArray
    distance_m: FloatArray
    arc_deg: FloatArray


def _sine_sum(coefficients: list[FloatArray], sine: FloatArray, cosine: FloatArray) -> FloatArray:
    """Return Σ cₗ sin 2lσ from the sine and cosine of σ (Clenshaw's recurrence)."""
    twice = 2.0 * (cosine - sine) * (cosine + sine)
    before, now = 0.0 * coefficients[-1], coefficients[-1]
    for coefficient in coefficients[-2::-1]:
        before, now = now, twice * now - before + coefficient
    total: FloatArray = 2.0 * sine * cosine * now
    return total


def _sum_of_angles(first: _Direction, second: _Direction) -> _Direction:
    """Return the sine and cosine of the sum of two angles, given by theirs."""
    return first[0] * second[1] + first[1] * second[0], first[1] * second[1] - first[0] * second[0]


def _turned(angle: _Direction, turn_rad: FloatArray) -> _Direction:
    return _sum_of_angles(angle, (np.sin(turn_rad), np.cos(turn_rad)))


@dataclass(frozen=True, slots=True)
class GeodesicLine:
    """A geodesic without ends; made by `line`.

    Attributes:
        lon1_deg: Longitude of its first point.
        series: Of its figure.
        sin_alpha0: Sine of the azimuth at the northward crossing of the equator, negative for a line that runs west.
        cos_alpha0: Its cosine; the sine of the vertex's reduced latitude.
        sin_sigma1: Sine of σ1, the arc from that crossing to the first point.
        cos_sigma1: Its cosine.
        sin_omega1: Sine of ω1, the longitude from that crossing on the sphere.
        cos_omega1: Its cosine.
        epsilon: Karney's ε.
    """

    lon1_deg: FloatArray
    series: GeodesicSeries
    sin_alpha0: FloatArray
    cos_alpha0: FloatArray
    sin_sigma1: FloatArray
    cos_sigma1: FloatArray
    sin_omega1: FloatArray
    cos_omega1: FloatArray
    epsilon: FloatArray

    def at_arc(self, arc_deg: npt.ArrayLike) -> GeodesicPoint:
        """Return the points at arcs on the auxiliary sphere; the arcs and the line broadcast.

        Raises:
            RangeError: An arc is not finite.
        """
        arc = checked_finite("arc_deg", arc_deg)
        sigma2 = _sum_of_angles((self.sin_sigma1, self.cos_sigma1), sin_cos_deg(arc))
        return self._point(np.radians(arc), sigma2, self._distance_m(np.radians(arc), sigma2))

    def at_distance(self, distance_m: npt.ArrayLike) -> GeodesicPoint:
        """Return the points at distances; the distances and the line broadcast.

        Raises:
            RangeError: A distance is not finite.

        Accuracy:
            15 nm, held by tests/lines/test_geodesic.py.
        """
        distance = checked_finite("distance_m", distance_m)
        sigma12_rad, sigma2 = self._arc(distance)
        if abs(self.series.flattening) > REVERSION_REACH:
            k2 = 4.0 * self.epsilon / (1.0 - self.epsilon) ** 2
            metres_per_radian = self.series.polar_radius_m * np.sqrt(1.0 + k2 * sigma2[0] * sigma2[0])
            step_rad = (distance - self._distance_m(sigma12_rad, sigma2)) / metres_per_radian
            sigma12_rad, sigma2 = sigma12_rad + step_rad, _turned(sigma2, step_rad)
        return self._point(sigma12_rad, sigma2, distance)

    def _arc(self, distance_m: FloatArray) -> tuple[FloatArray, _Direction]:
        """Return σ12, and the sine and cosine of σ2, by τ = s / (b A1) and the series that undoes it (eqs 19 to 21)."""
        a1_less_1, c1 = self.series.length(self.epsilon)
        tau12_rad = distance_m / self.series.polar_radius_m / (1.0 + a1_less_1)
        sigma1 = self.sin_sigma1, self.cos_sigma1
        there_rad = _sine_sum(c1, *sigma1)
        # The small angles turn on their own, so that a long line's σ2 is not rounded as an angle.
        tau2 = _turned(_turned(sigma1, there_rad), tau12_rad)
        back_rad = _sine_sum(self.series.length_undone(self.epsilon), *tau2)
        return tau12_rad + (there_rad + back_rad), _turned(tau2, back_rad)

    def _distance_m(self, sigma12_rad: FloatArray, sigma2: _Direction) -> FloatArray:
        """Return s12 = b (I1(σ2) - I1(σ1)) (eqs 7 and 15)."""
        a1_less_1, c1 = self.series.length(self.epsilon)
        waves = _sine_sum(c1, *sigma2) - _sine_sum(c1, self.sin_sigma1, self.cos_sigma1)
        distance_m: FloatArray = self.series.polar_radius_m * (
            sigma12_rad + (a1_less_1 * (sigma12_rad + waves) + waves)
        )
        return distance_m

    def _point(self, sigma12_rad: FloatArray, sigma2: _Direction, distance_m: FloatArray) -> GeodesicPoint:
        """Return the point at σ2 (eqs 8 and 12 to 14)."""
        sine, cosine = sigma2
        north2 = self.cos_alpha0 * cosine
        reduced_cosine = np.hypot(self.sin_alpha0, north2)
        # ω12 by one arc tangent: the vector of ω2 turned back by ω1.
        omega12 = _sum_of_angles((self.sin_alpha0 * sine, cosine), (-self.sin_omega1, self.cos_omega1))
        a3, c3 = self.series.longitude(self.epsilon)
        waves = _sine_sum(c3, *sigma2) - _sine_sum(c3, self.sin_sigma1, self.cos_sigma1)
        lag_rad = self.series.flattening * self.sin_alpha0 * a3 * (sigma12_rad + waves)
        lat_rad = np.arctan2(self.cos_alpha0 * sine, self.series.axis_ratio * reduced_cosine)
        return GeodesicPoint(
            np.degrees(lat_rad),
            wrap_180(self.lon1_deg + np.degrees(np.arctan2(*omega12) - lag_rad)),
            wrap_360(np.degrees(np.arctan2(self.sin_alpha0, north2))),
            distance_m + 0.0 * lag_rad,
            np.degrees(sigma12_rad + 0.0 * lag_rad),
        )


def line(lat1_deg: npt.ArrayLike, lon1_deg: npt.ArrayLike, azimuth1_deg: npt.ArrayLike, figure: Figure) -> GeodesicLine:
    """Return the geodesics through points in directions, of any shapes that broadcast.

    Edges:
        From a pole the azimuth counts from the meridian of `lon1_deg`: 180 leaves the north pole along it, 0 the south.

    Raises:
        RangeError: A latitude is outside -90 to 90, or a longitude or an azimuth is not finite.
    """
    sin_lat, cos_lat = sin_cos_deg(checked_latitude_deg(lat1_deg))
    sin_alpha1, cos_alpha1 = sin_cos_deg(checked_finite("azimuth1_deg", azimuth1_deg))
    series = geodesic_series(figure)
    flat = series.axis_ratio * sin_lat
    width = np.hypot(flat, cos_lat)
    sin_beta1, cos_beta1 = flat / width, cos_lat / width
    # Eqs 5 and 10 to 12; the sine and cosine of ω1 are both divided by cos β1, which is 0 at a pole.
    cos_alpha0, level = np.hypot(cos_alpha1, sin_alpha1 * sin_beta1), cos_alpha1 * cos_beta1
    equator = cos_alpha0 == 0.0
    safe = np.where(equator, 1.0, cos_alpha0)
    east, north = sin_alpha1 * sin_beta1, np.where(equator, 1.0, cos_alpha1)
    return GeodesicLine(
        lon1_deg=checked_finite("lon1_deg", lon1_deg),
        series=series,
        sin_alpha0=sin_alpha1 * cos_beta1,
        cos_alpha0=cos_alpha0,
        sin_sigma1=sin_beta1 / safe,
        cos_sigma1=np.where(equator, 1.0, level / safe),
        sin_omega1=east / safe,
        cos_omega1=north / safe,
        epsilon=series.epsilon(cos_alpha0 * cos_alpha0),
    )
