"""Latitudes and lengths on a figure of the Earth, and the two differences that a rhumb line stands on.

Everything takes degrees, in arrays of any shape, and keeps its relative accuracy up to the poles and down to latitudes
that differ in the last digit: no formula subtracts two large numbers or goes through the tangent of 45° + half the
latitude. Every function raises RangeError for a latitude outside -90 to 90 or not a number.

Sources: C. F. F. Karney, Transverse Mercator with an accuracy of a few nanometers, J. Geod. 85 (2011) 475-485 (K11);
C. F. F. Karney, On auxiliary latitudes, Survey Review 56 (2024) 165-180 (K24).
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from functools import lru_cache
from typing import TYPE_CHECKING

import numpy as np

from navcore.errors import RangeError
from navcore.trigonometry import FloatArray, sin_cos_deg

if TYPE_CHECKING:
    import numpy.typing as npt

    from navcore.earth.figure import Figure

MINUTES_PER_RADIAN = 10800.0 / math.pi


def checked_latitude_deg(lat_deg: npt.ArrayLike) -> FloatArray:
    """Return latitudes as an array, with -0 as 0.

    Raises:
        RangeError: One is outside -90 to 90 or not a number.
    """
    latitude: FloatArray = np.asarray(lat_deg, dtype=np.float64) + 0.0
    inside = np.abs(latitude) <= 90.0
    if not np.all(inside):
        raise RangeError("lat_deg", float(latitude[~inside].flat[0]), "-90 to 90 degrees")
    return latitude


def _latitude_deg(sine: FloatArray, cosine: FloatArray) -> FloatArray:
    """Return the latitude whose sine and cosine are in this ratio; the smaller angle is the one worked in radians."""
    steep = np.abs(sine) > cosine
    angle = np.degrees(np.arctan2(np.where(steep, cosine, np.abs(sine)), np.where(steep, np.abs(sine), cosine)))
    return np.copysign(np.where(steep, 90.0 - angle, angle), sine)


def reduced_latitude_deg(lat_deg: npt.ArrayLike, figure: Figure) -> FloatArray:
    """Return the reduced (parametric) latitude β, tan β = (1 - f) tan φ."""
    sine, cosine = sin_cos_deg(checked_latitude_deg(lat_deg))
    return _latitude_deg((1.0 - figure.flattening) * sine, cosine)


def geographic_from_reduced_deg(reduced_deg: npt.ArrayLike, figure: Figure) -> FloatArray:
    """Return the latitude whose reduced latitude is given."""
    sine, cosine = sin_cos_deg(checked_latitude_deg(reduced_deg))
    return _latitude_deg(sine, (1.0 - figure.flattening) * cosine)


def _conformal_sine(sine: FloatArray, figure: Figure) -> FloatArray:
    """Return τ' cos φ, where τ' is the tangent of the conformal latitude (K11 eqs 7-9 times cos φ, so finite)."""
    eccentricity = figure.eccentricity
    sigma: FloatArray = np.sinh(eccentricity * np.arctanh(eccentricity * sine))
    scaled: FloatArray = sine * np.hypot(1.0, sigma) - sigma
    return scaled


def conformal_latitude_deg(lat_deg: npt.ArrayLike, figure: Figure) -> FloatArray:
    """Return the conformal latitude χ, sinh⁻¹ tan χ = ψ (K11 eqs 7-9)."""
    sine, cosine = sin_cos_deg(checked_latitude_deg(lat_deg))
    return _latitude_deg(_conformal_sine(sine, figure), cosine)


def isometric_latitude_rad(lat_deg: npt.ArrayLike, figure: Figure) -> FloatArray:
    """Return the isometric latitude ψ = tanh⁻¹ sin φ - e tanh⁻¹(e sin φ), in radians; ±infinity at a pole."""
    sine, cosine = sin_cos_deg(checked_latitude_deg(lat_deg))
    with np.errstate(divide="ignore"):
        tangent = sine / cosine
    isometric: FloatArray = np.arcsinh(tangent) - figure.eccentricity * np.arctanh(figure.eccentricity * sine)
    return isometric


def geographic_from_isometric_deg(isometric_rad: npt.ArrayLike, figure: Figure) -> FloatArray:
    """Return the latitude, in degrees, whose isometric latitude in radians is given; ±infinity is a pole.

    Raises:
        RangeError: A value is not a number.
    """
    isometric = np.asarray(isometric_rad, dtype=np.float64)
    if np.any(np.isnan(isometric)):
        raise RangeError("isometric_rad", math.nan, "any number of radians, or ±infinity for a pole")
    # Beyond ±45 the latitude is within 1e-17 degrees of the pole.
    return _geographic_from_conformal_tangent_deg(np.sinh(np.clip(isometric, -45.0, 45.0)), figure)


def geographic_from_conformal_deg(conformal_deg: npt.ArrayLike, figure: Figure) -> FloatArray:
    """Return the latitude whose conformal latitude is given."""
    sine, cosine = sin_cos_deg(checked_latitude_deg(conformal_deg))
    # 1e19 is nearer to the pole than a double in degrees can say.
    tangent = sine / np.maximum(cosine, 1e-19)
    return _geographic_from_conformal_tangent_deg(tangent, figure)


def _geographic_from_conformal_tangent_deg(target: FloatArray, figure: Figure) -> FloatArray:
    """Solve τ'(τ) = target by Newton's method (K11 eqs 19-21); three steps settle it, the fourth is slack."""
    shrink = 1.0 - figure.eccentricity_squared
    tangent: FloatArray = target / shrink
    for _ in range(4):
        secant = np.hypot(1.0, tangent)
        reached = _conformal_sine(tangent / secant, figure) * secant
        rate = (1.0 + shrink * tangent * tangent) / (shrink * secant)
        tangent = tangent + (target - reached) / np.hypot(1.0, reached) * rate
    return _latitude_deg(tangent, np.ones_like(tangent))


def meridional_parts_min(lat_deg: npt.ArrayLike, figure: Figure) -> FloatArray:
    """Return the meridional parts in minutes of longitude at the equator; ±infinity at a pole."""
    return MINUTES_PER_RADIAN * isometric_latitude_rad(lat_deg, figure)


@dataclass(frozen=True, slots=True)
class _RectifyingSeries:
    """The rectifying latitude μ = φ + Σ cₖ sin 2kφ, back φ = μ + Σ dₖ sin 2kμ, and the metres in a radian of μ.

    To the sixth order in the third flattening n (K24 appendix A; the first in F. R. Helmert, 1880). The terms left out
    are below 1e-17 rad for every named figure.
    """

    radius_m: float
    forward: tuple[float, ...]
    back: tuple[float, ...]


@lru_cache(maxsize=64)
def _rectifying_series(figure: Figure) -> _RectifyingSeries:
    n = figure.third_flattening
    n2 = n * n
    radius_m = figure.equatorial_radius_m / (1.0 + n) * (1.0 + n2 * (1 / 4 + n2 * (1 / 64 + n2 / 256)))
    forward = (
        n * (-3 / 2 + n2 * (9 / 16 - n2 * 3 / 32)),
        n2 * (15 / 16 + n2 * (-15 / 32 + n2 * 135 / 2048)),
        n**3 * (-35 / 48 + n2 * 105 / 256),
        n**4 * (315 / 512 - n2 * 189 / 512),
        n**5 * -693 / 1280,
        n**6 * 1001 / 2048,
    )
    back = (
        n * (3 / 2 + n2 * (-27 / 32 + n2 * 269 / 512)),
        n2 * (21 / 16 + n2 * (-55 / 32 + n2 * 6759 / 4096)),
        n**3 * (151 / 96 - n2 * 417 / 128),
        n**4 * (1097 / 512 - n2 * 15543 / 2560),
        n**5 * 8011 / 2560,
        n**6 * 293393 / 61440,
    )
    return _RectifyingSeries(radius_m, forward, back)


def _series_at(coefficients: tuple[float, ...], angle_deg: FloatArray) -> FloatArray:
    """Return Σ cₖ sin 2kφ in radians."""
    sine, cosine = sin_cos_deg(2.0 * angle_deg)
    return _multiples(coefficients, np.ones_like(sine), sine, cosine)


def _multiples(
    coefficients: tuple[float, ...], cos_sum: FloatArray, sin_difference: FloatArray, cos_difference: FloatArray
) -> FloatArray:
    """Return Σ cₖ cos(kS) sin(kD), by recurrence from the cosine of S and the sine and cosine of D."""
    total = coefficients[0] * cos_sum * sin_difference
    cos_before, cos_now = np.ones_like(cos_sum), cos_sum
    sin_before, sin_now = np.zeros_like(sin_difference), sin_difference
    for coefficient in coefficients[1:]:
        cos_before, cos_now = cos_now, 2.0 * cos_sum * cos_now - cos_before
        sin_before, sin_now = sin_now, 2.0 * cos_difference * sin_now - sin_before
        total = total + coefficient * cos_now * sin_now
    return total


def rectifying_latitude_deg(lat_deg: npt.ArrayLike, figure: Figure) -> FloatArray:
    """Return the rectifying latitude μ, proportional to the distance along the meridian; 90 at the pole."""
    latitude = checked_latitude_deg(lat_deg)
    return latitude + np.degrees(_series_at(_rectifying_series(figure).forward, latitude))


def geographic_from_rectifying_deg(rectifying_deg: npt.ArrayLike, figure: Figure) -> FloatArray:
    """Return the latitude whose rectifying latitude is given."""
    rectifying = checked_latitude_deg(rectifying_deg)
    return rectifying + np.degrees(_series_at(_rectifying_series(figure).back, rectifying))


def meridian_distance_m(lat_deg: npt.ArrayLike, figure: Figure) -> FloatArray:
    """Return the distance along the meridian from the equator, north positive."""
    return _rectifying_series(figure).radius_m * np.radians(rectifying_latitude_deg(lat_deg, figure))


def _squared_ratio(sine: FloatArray, cosine: FloatArray, figure: Figure) -> FloatArray:
    """Return 1 - e² sin² φ as a sum of squares."""
    shortened = (1.0 - figure.flattening) * sine
    return cosine * cosine + shortened * shortened


def meridian_radius_m(lat_deg: npt.ArrayLike, figure: Figure) -> FloatArray:
    """Return the radius of curvature along the meridian, ρ."""
    ratio = _squared_ratio(*sin_cos_deg(checked_latitude_deg(lat_deg)), figure)
    return figure.equatorial_radius_m * (1.0 - figure.eccentricity_squared) / (ratio * np.sqrt(ratio))


def transverse_radius_m(lat_deg: npt.ArrayLike, figure: Figure) -> FloatArray:
    """Return the radius of curvature across the meridian, ν."""
    return figure.equatorial_radius_m / np.sqrt(_squared_ratio(*sin_cos_deg(checked_latitude_deg(lat_deg)), figure))


def parallel_radius_m(lat_deg: npt.ArrayLike, figure: Figure) -> FloatArray:
    """Return the radius of the parallel, ν cos φ; 0 at a pole."""
    sine, cosine = sin_cos_deg(checked_latitude_deg(lat_deg))
    return figure.equatorial_radius_m * cosine / np.sqrt(_squared_ratio(sine, cosine, figure))


def degree_of_latitude_m(lat_deg: npt.ArrayLike, figure: Figure) -> FloatArray:
    """Return the length of a degree of latitude at the rate that holds at this latitude, ρ π/180."""
    return np.radians(meridian_radius_m(lat_deg, figure))


def degree_of_longitude_m(lat_deg: npt.ArrayLike, figure: Figure) -> FloatArray:
    """Return the length of a degree of longitude along this parallel, ν cos φ π/180."""
    return np.radians(parallel_radius_m(lat_deg, figure))


@dataclass(frozen=True, slots=True)
class LatitudePair:
    """Two latitudes and what both differences need of them; made by `latitude_pair`."""

    sines: FloatArray
    cosines: FloatArray
    cos_mean: FloatArray
    difference_rad: FloatArray
    sin_half: FloatArray


def latitude_pair(lat1_deg: npt.ArrayLike, lat2_deg: npt.ArrayLike, difference_deg: npt.ArrayLike) -> LatitudePair:
    """Prepare two latitudes for `isometric_difference_rad` and `meridian_difference_m`.

    Args:
        lat1_deg: The first latitude.
        lat2_deg: The second latitude.
        difference_deg: lat2 - lat1, which may be finer than the two latitudes can tell.
    """
    lat1, lat2 = checked_latitude_deg(lat1_deg), checked_latitude_deg(lat2_deg)
    difference_rad = np.radians(np.asarray(difference_deg, dtype=np.float64))
    sine1, cosine1 = sin_cos_deg(lat1)
    sine2, cosine2 = sin_cos_deg(lat2)
    # Near a pole 90 - |φ| is exact where φ1 + φ2 is not.
    colatitude = np.where(
        lat1 * lat2 > 0.0, 0.5 * ((90.0 - np.abs(lat1)) + (90.0 - np.abs(lat2))), 90.0 - 0.5 * np.abs(lat1 + lat2)
    )
    cos_mean: FloatArray = np.sin(np.radians(colatitude))
    return LatitudePair(sine1 * sine2, cosine1 * cosine2, cos_mean, difference_rad, np.sin(0.5 * difference_rad))


def isometric_difference_rad(pair: LatitudePair, figure: Figure) -> FloatArray:
    """Return ψ2 - ψ1 in radians, with full relative accuracy; ±infinity where one end is a pole."""
    rise = 2.0 * pair.cos_mean * pair.sin_half
    with np.errstate(divide="ignore", invalid="ignore"):
        steepness = np.where(rise == 0.0, 0.0, rise / pair.cosines)
    eccentricity = figure.eccentricity
    flattened = np.arctanh(eccentricity * rise / (1.0 - figure.eccentricity_squared * pair.sines))
    difference: FloatArray = np.arcsinh(steepness) - eccentricity * flattened
    return difference


def meridian_difference_m(pair: LatitudePair, figure: Figure) -> FloatArray:
    """Return the distance along a meridian from the first latitude to the second, with full relative accuracy."""
    series = _rectifying_series(figure)
    cos_sum = 2.0 * pair.cos_mean * pair.cos_mean - 1.0
    cos_difference = 1.0 - 2.0 * pair.sin_half * pair.sin_half
    correction = 2.0 * _multiples(series.forward, cos_sum, np.sin(pair.difference_rad), cos_difference)
    return series.radius_m * (pair.difference_rad + correction)


def latitude_difference_deg(lat_deg: npt.ArrayLike, meridian_difference_m: npt.ArrayLike, figure: Figure) -> FloatArray:
    """Return the difference of latitude that a distance along the meridian makes, with full relative accuracy.

    Past a pole the answer goes on beyond 90; the caller asks `meridian_distance_m(90, figure)` first.
    """
    series = _rectifying_series(figure)
    difference_rad = np.asarray(meridian_difference_m, dtype=np.float64) / series.radius_m
    _, cos_sum = sin_cos_deg(2.0 * rectifying_latitude_deg(lat_deg, figure) + np.degrees(difference_rad))
    sines = np.sin(difference_rad), np.cos(difference_rad)
    degrees: FloatArray = np.degrees(difference_rad + 2.0 * _multiples(series.back, cos_sum, *sines))
    return degrees
