"""The three series of a geodesic: its length, the length undone, and the longitude, to the sixth order.

Karney's ε (eq. 16) is 0 for a line along the equator and n for a meridian. A coefficient with subscript l is of order
ε^l: its row below holds what multiplies ε^l, in powers of ε² for C1 and C1' and of ε for C3.

Source: C. F. F. Karney, Algorithms for geodesics, J. Geod. 87 (2013) 43-55; equation numbers here and in the other
`geodesic_` modules are that paper's. https://doi.org/10.1007/s00190-012-0578-z
"""

from __future__ import annotations

from dataclasses import dataclass
from functools import lru_cache
from typing import TYPE_CHECKING

import numpy as np

if TYPE_CHECKING:
    from navcore.earth.figure import Figure
    from navcore.trigonometry import FloatArray

    Rows = tuple[tuple[float, ...], ...]

A1_SCALED_LESS_1 = (0.0, 1 / 4, 1 / 64, 1 / 256)
"""(1 - ε) A1 - 1 in powers of ε² (eq. 17)."""

C1: Rows = (
    (-1 / 2, 3 / 16, -1 / 32),
    (-1 / 16, 1 / 32, -9 / 2048),
    (-1 / 48, 3 / 256),
    (-5 / 512, 3 / 512),
    (-7 / 1280,),
    (-7 / 2048,),
)
"""Eq. 18."""

C1_PRIME: Rows = (
    (1 / 2, -9 / 32, 205 / 1536),
    (5 / 16, -37 / 96, 1335 / 4096),
    (29 / 96, -75 / 128),
    (539 / 1536, -2391 / 2560),
    (3467 / 7680,),
    (38081 / 61440,),
)
"""Eq. 21."""

A3: Rows = (
    (1.0,),
    (-1 / 2, 1 / 2),
    (-1 / 4, -1 / 8, 3 / 8),
    (-1 / 16, -3 / 16, -1 / 16),
    (-3 / 64, -1 / 32),
    (-3 / 128,),
)
"""Eq. 24: a row for each power of ε, itself in powers of n."""

C3: tuple[Rows, ...] = (
    ((1 / 4, -1 / 4), (1 / 8, 0.0, -1 / 8), (3 / 64, 3 / 64, -1 / 64), (5 / 128, 1 / 64), (3 / 128,)),
    ((1 / 16, -3 / 32, 1 / 32), (3 / 64, -1 / 32, -3 / 64), (3 / 128, 1 / 128), (5 / 256,)),
    ((5 / 192, -3 / 64, 5 / 192), (3 / 128, -5 / 192), (7 / 512,)),
    ((7 / 512, -7 / 256), (7 / 512,)),
    ((21 / 2560,),),
)
"""Eq. 25: as A3, for each l."""


def polynomial(coefficients: tuple[float, ...], variable: FloatArray) -> FloatArray:
    """Return the sum of cₖ xᵏ for two or more coefficients, constant term first."""
    total: FloatArray = coefficients[-1] * variable
    for coefficient in coefficients[-2:0:-1]:
        total = (total + coefficient) * variable
    return total + coefficients[0]


def powers_times(rows: Rows, power: FloatArray, variable: FloatArray) -> list[FloatArray]:
    """Return for each l the polynomial of its row times ε^l, where `power` is ε."""
    coefficients, epsilon = [], power
    for row in rows:
        coefficients.append(power * polynomial(row, variable) if len(row) > 1 else row[0] * power)
        power = power * epsilon
    return coefficients


@dataclass(frozen=True, slots=True)
class GeodesicSeries:
    """What geodesics need of a figure.

    Attributes:
        flattening: As of the figure, f.
        polar_radius_m: Semi-minor axis, b.
        second_eccentricity_squared: e'² = e² / (1 - e²).
        a3: Coefficients of A3 in powers of ε, for the figure's n.
        c3: For each l what multiplies ε^l, likewise.
    """

    flattening: float
    polar_radius_m: float
    second_eccentricity_squared: float
    a3: tuple[float, ...]
    c3: Rows

    @property
    def axis_ratio(self) -> float:
        """Polar by equatorial radius, b / a = 1 - f."""
        return 1.0 - self.flattening

    @property
    def rate_error(self) -> float:
        """What `reduced_length_over_b` leaves out, at most: 2 n⁴."""
        return 2.0 * (self.flattening / (2.0 - self.flattening)) ** 4

    def epsilon(self, cos2_alpha0: FloatArray) -> FloatArray:
        """Return ε (eqs 9 and 16), without cancellation, from the squared cosine of the azimuth at the equator."""
        k2: FloatArray = self.second_eccentricity_squared * cos2_alpha0
        epsilon: FloatArray = k2 / (2.0 * (1.0 + np.sqrt(1.0 + k2)) + k2)
        return epsilon

    def longitude(self, epsilon: FloatArray) -> tuple[FloatArray, list[FloatArray]]:
        """Return A3 and C3 (eqs 24 and 25)."""
        return polynomial(self.a3, epsilon), powers_times(self.c3, epsilon, epsilon)

    def length(self, epsilon: FloatArray) -> tuple[FloatArray, list[FloatArray]]:
        """Return A1 - 1, which is small and so keeps its digits, and C1 (eqs 17 and 18)."""
        epsilon2 = epsilon * epsilon
        scaled = epsilon + polynomial(A1_SCALED_LESS_1, epsilon2)
        return scaled / (1.0 - epsilon), powers_times(C1, epsilon, epsilon2)

    def length_undone(self, epsilon: FloatArray) -> list[FloatArray]:
        """Return C1' (eq. 21)."""
        return powers_times(C1_PRIME, epsilon, epsilon * epsilon)


def _row_for(powers_of_n: Rows, n: float) -> tuple[float, ...]:
    return tuple(sum(coefficient * n**power for power, coefficient in enumerate(row)) for row in powers_of_n)


@lru_cache(maxsize=64)
def geodesic_series(figure: Figure) -> GeodesicSeries:
    """Return what geodesics need of a figure; |f| up to 1/50."""
    n, f = figure.third_flattening, figure.flattening
    return GeodesicSeries(
        flattening=f,
        polar_radius_m=figure.polar_radius_m,
        second_eccentricity_squared=figure.eccentricity_squared / (1.0 - f) ** 2,
        a3=_row_for(A3, n),
        c3=tuple(_row_for(rows, n) for rows in C3),
    )
