"""A geodesic's arc on the auxiliary sphere, where it is a great circle between the reduced latitudes β1 and β2.

Both ways to know an arc are here: by the difference of longitude ω12 on that sphere, and by the azimuth α1. An arc then
gives the length, the longitude that the figure takes away from ω12, and the reduced length. The ends are in the paper's
canonical order (eq. 44): β1 is the southern and the farther from the equator, and the line runs eastward.

Every difference here is got from a product or a sum of like signs, so that a line of a millimetre and one that is a
millimetre from the antipode both keep all their digits; the formulas that differ from the paper's by such a step say
so.

Source: as `geodesic_series`.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, NamedTuple

import numpy as np

if TYPE_CHECKING:
    from navcore.lines.geodesic_series import GeodesicSeries
    from navcore.trigonometry import FloatArray

RADIANS_PER_DEGREE = np.pi / 180.0

NOTHING_RAD = 1e-150
"""Added to angles between latitudes, so that a null arc still has a direction: north, or over the south pole."""


class ReducedEnds(NamedTuple):
    """The two reduced latitudes of a line in canonical order.

    Attributes:
        sin_beta1: Sine of β1, not positive.
        cos_beta1: Cosine of β1.
        sin_beta2: Sine of β2.
        cos_beta2: Cosine of β2, not below that of β1.
        stretch1: (1 + e'² sin² β1)^½, the length element at the first end over b.
        stretch2: Likewise at the second.
        rise: sin(β2 - β1), positive.
        fall: sin(-β1 - β2), positive.
    """

    sin_beta1: FloatArray
    cos_beta1: FloatArray
    sin_beta2: FloatArray
    cos_beta2: FloatArray
    stretch1: FloatArray
    stretch2: FloatArray
    rise: FloatArray
    fall: FloatArray


class Arc(NamedTuple):
    """An arc of a great circle on the auxiliary sphere.

    Attributes:
        east1: Eastward part of the direction at the first end, on the scale of `north1`.
        north1: Northward part.
        east2: Eastward part of the direction at the second end, on the scale of `north2`.
        north2: Northward part.
        sin_alpha0: Sine of the azimuth at the equator.
        epsilon: ε, from its cosine.
        sigma_rad: The arc's length σ12.
        sin_sigma: Sine of σ12.
        cos_sigma: Cosine of σ12.
        sin_sum: Sine of σ1 + σ2.
        cos_sum: Cosine of σ1 + σ2.
    """

    east1: FloatArray
    north1: FloatArray
    east2: FloatArray
    north2: FloatArray
    sin_alpha0: FloatArray
    epsilon: FloatArray
    sigma_rad: FloatArray
    sin_sigma: FloatArray
    cos_sigma: FloatArray
    sin_sum: FloatArray
    cos_sum: FloatArray


def sine_of_degrees(angle_deg: FloatArray) -> FloatArray:
    """Return the sine of -90 to 90 degrees; of 90 - |φ| it is the cosine of φ, with all its digits at the pole."""
    sine: FloatArray = np.sin(RADIANS_PER_DEGREE * angle_deg)
    return sine


def reduced_ends(lat1_deg: FloatArray, lat2_deg: FloatArray, series: GeodesicSeries) -> ReducedEnds:
    """Return the ends in canonical order (eqs 6 and 44).

    With w² = (1 - f)² sin² φ + cos² φ: sin β = (1 - f) sin φ / w, cos β = cos φ / w, the stretch is 1 / w, and
    sin(β2 ± β1) = (1 - f) sin(φ2 ± φ1) / (w1 w2).
    """
    size1_deg, size2_deg = abs(lat1_deg), abs(lat2_deg)
    larger_deg, smaller_deg = np.maximum(size1_deg, size2_deg), np.minimum(size1_deg, size2_deg)
    second_deg = np.copysign(smaller_deg, -lat1_deg * lat2_deg)
    colatitude1_deg, colatitude2_deg = 90.0 - larger_deg, 90.0 - smaller_deg
    # Near a pole the colatitudes are exact where the sum of the latitudes is not.
    over_pole_deg = colatitude1_deg + colatitude2_deg
    ratio = series.axis_ratio
    flat1, level1 = ratio * sine_of_degrees(larger_deg), sine_of_degrees(colatitude1_deg)
    flat2, level2 = ratio * sine_of_degrees(second_deg), sine_of_degrees(colatitude2_deg)
    stretch1 = 1.0 / np.sqrt(flat1 * flat1 + level1 * level1)
    stretch2 = 1.0 / np.sqrt(flat2 * flat2 + level2 * level2)
    both = ratio * stretch1 * stretch2
    return ReducedEnds(
        -flat1 * stretch1,
        level1 * stretch1,
        flat2 * stretch2,
        level2 * stretch2,
        stretch1,
        stretch2,
        both * sine_of_degrees(np.minimum(larger_deg + second_deg, over_pole_deg)) + NOTHING_RAD,
        both * sine_of_degrees(np.minimum(larger_deg - second_deg, over_pole_deg)) + NOTHING_RAD,
    )


def arc_by_longitude(ends: ReducedEnds, sin_half: FloatArray, cos_half: FloatArray, series: GeodesicSeries) -> Arc:
    """Return the arc whose ω12 / 2 has this sine and cosine (eqs 49 and 50).

    The real parts of z1 and z2 are written with cos ω12 = cos² - sin² of the half:
    cos² sin(β2 - β1) ± sin² sin(β2 + β1), which is a sum of like signs for z2.
    """
    sin_beta1, cos_beta1, sin_beta2, cos_beta2, _, _, rise, fall = ends
    sin2_half, cos2_half = sin_half * sin_half, cos_half * cos_half
    near, far = cos2_half * rise, sin2_half * fall
    sin_omega = 2.0 * sin_half * cos_half
    east1, north1 = cos_beta2 * sin_omega, near - far
    east2, north2 = cos_beta1 * sin_omega, near + far
    sin_sigma = np.sqrt(east1 * east1 + north1 * north1)
    sines, cosines = sin_beta1 * sin_beta2, cos_beta1 * cos_beta2
    cos_sigma = sines + cosines * (cos2_half - sin2_half)
    level1, level2 = north1 * cos_beta1 / sin_sigma, north2 * cos_beta2 / sin_sigma
    cos2_alpha0 = sin_beta1 * sin_beta1 + level1 * level1 + 1e-300
    return Arc(
        east1,
        north1,
        east2,
        north2,
        cosines * sin_omega / sin_sigma,
        series.epsilon(cos2_alpha0),
        np.arctan2(sin_sigma, cos_sigma),
        sin_sigma,
        cos_sigma,
        (level1 * sin_beta2 + sin_beta1 * level2) / cos2_alpha0,
        (level1 * level2 - sines) / cos2_alpha0,
    )


def arc_by_azimuth(
    ends: ReducedEnds, sin_alpha1: FloatArray, cos_alpha1: FloatArray, series: GeodesicSeries
) -> tuple[Arc, FloatArray]:
    """Return the arc that leaves the first end at α1, up to β2, and π - ω12 in radians.

    Eqs 5, 10 to 12 and 45. Where the two terms of sin σ12 = (cos α1 cos β1 sin β2 - sin β1 cos α2 cos β2) / cos² α0
    differ in sign they are divided instead into their difference of squares, which is cos² α0 (cos² β2 - cos² β1).
    """
    sin_beta1, cos_beta1, sin_beta2, _, _, _, rise, fall = ends
    gap = rise * fall
    level1 = cos_alpha1 * cos_beta1
    level2 = np.sqrt(level1 * level1 + gap)
    cos2_alpha0 = sin_beta1 * sin_beta1 + level1 * level1 + 1e-300
    sin_alpha0 = sin_alpha1 * cos_beta1
    first, second = level1 * sin_beta2, sin_beta1 * level2
    sines, levels = sin_beta1 * sin_beta2, level1 * level2
    against = first < 0.0
    sin_sigma = np.where(against, gap, first - second) / np.where(against, -first - second + 1e-300, cos2_alpha0)
    cos_sigma = (levels + sines) / cos2_alpha0
    arc = Arc(
        sin_alpha1,
        cos_alpha1,
        sin_alpha0,
        level2,
        sin_alpha0,
        series.epsilon(cos2_alpha0),
        np.arctan2(sin_sigma, cos_sigma),
        sin_sigma,
        cos_sigma,
        (first + second) / cos2_alpha0,
        (levels - sines) / cos2_alpha0,
    )
    return arc, np.arctan2(sin_alpha0 * sin_sigma * cos2_alpha0, -levels - sin_alpha0 * sin_alpha0 * sines)


def _sum_over_arc(coefficients: list[FloatArray], arc: Arc) -> FloatArray:
    """Return Σ cₗ (sin 2lσ2 - sin 2lσ1) = 2 Σ cₗ cos l(σ1 + σ2) sin lσ12, both factors by their recurrences."""
    twice_cos_sum, twice_cos = 2.0 * arc.cos_sum, 2.0 * arc.cos_sigma
    cosine, sine = arc.cos_sum, arc.sin_sigma
    cosine_before: FloatArray | float = 1.0
    sine_before: FloatArray | float = 0.0
    total = coefficients[0] * cosine * sine
    for coefficient in coefficients[1:]:
        cosine_before, cosine = cosine, twice_cos_sum * cosine - cosine_before
        sine_before, sine = sine, twice_cos * sine - sine_before
        total = total + coefficient * cosine * sine
    return 2.0 * total


def length_over_b(arc: Arc, series: GeodesicSeries) -> FloatArray:
    """Return s12 / b = I1(σ2) - I1(σ1) (eqs 7 and 15)."""
    a1_less_1, c1 = series.length(arc.epsilon)
    waves = _sum_over_arc(c1, arc)
    # The large term stands alone and is rounded once.
    length: FloatArray = arc.sigma_rad + (a1_less_1 * (arc.sigma_rad + waves) + waves)
    return length


def longitude_lag_rad(arc: Arc, series: GeodesicSeries) -> FloatArray:
    """Return ω12 - λ12 = f sin α0 (I3(σ2) - I3(σ1)) (eqs 8 and 23)."""
    a3, c3 = series.longitude(arc.epsilon)
    lag: FloatArray = series.flattening * arc.sin_alpha0 * a3 * (arc.sigma_rad + _sum_over_arc(c3, arc))
    return lag


def reduced_length_over_b(arc: Arc, ends: ReducedEnds, series: GeodesicSeries) -> FloatArray:
    """Return m12 / b (eq. 38) for a rate of change: what is left out is below 2 ε⁴.

    The stretches enter by their mean and half difference. J = I1 - I2 (eq. 40) is the integral of
    2ε (1 - cos 2σ) / ((1 - ε) (1 - 2ε cos 2σ + ε²)^½), here with the root to ε².
    """
    mean = 0.5 * (ends.stretch1 + ends.stretch2)
    half_difference = -0.25 * series.second_eccentricity_squared * ends.rise * ends.fall / mean
    epsilon = arc.epsilon
    small, square = 0.5 * epsilon, epsilon * epsilon
    waves = [small - 0.5 - 0.3125 * square, 0.1875 * square - 0.25 * small, -0.0625 * square]
    bulk = (1.0 - small + 0.25 * square) * arc.sigma_rad + _sum_over_arc(waves, arc)
    reduced: FloatArray = mean * arc.sin_sigma + half_difference * arc.sin_sum
    return reduced - (arc.cos_sigma + arc.cos_sum) * epsilon / (1.0 - epsilon) * bulk
