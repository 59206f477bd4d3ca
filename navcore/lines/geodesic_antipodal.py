"""Geodesics between nearly antipodal points, where the longitude hardly depends on the direction one leaves in.

The azimuth is found by Newton's method from the astroid's answer (section 5 of the paper), inside a bracket that is
halved wherever Newton's step leaves it. π - λ12 and π - ω12 are carried instead of the angles, so that the error in
longitude is a difference of small numbers.

Source: as `geodesic_series`.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

import numpy as np

from navcore.lines.geodesic_arc import Arc, ReducedEnds, arc_by_azimuth, longitude_lag_rad, reduced_length_over_b

if TYPE_CHECKING:
    from navcore.lines.geodesic_series import GeodesicSeries
    from navcore.lines.leg import BoolArray
    from navcore.trigonometry import FloatArray

NEWTON_STEPS = 12
"""After so many steps every other one halves the bracket."""

STEP_LIMIT = 200
"""By then the bracket has been halved below the last digit."""

ROUNDING = 1e-15
"""An error in longitude within this part of the angles that it is made of is rounding."""


def _astroid(x: FloatArray, y: FloatArray) -> FloatArray:
    """Return the positive root μ of x² / (1 + μ)² + y² / μ² = 1 (eq. 55).

    The left side falls and is convex, so that from below Newton's method climbs to the root; as a guess need not be
    exact, ten steps do.
    """
    root: FloatArray = np.maximum(y, x - 1.0)
    for _ in range(10):
        first, second = x / (1.0 + root), y / root
        squares = first * first, second * second
        root = root + 0.5 * (squares[0] + squares[1] - 1.0) / (squares[0] / (1.0 + root) + squares[1] / root)
    return root


def _starting_azimuth(ends: ReducedEnds, complement_rad: FloatArray, series: GeodesicSeries) -> FloatArray:
    """Return the sine and cosine of α1 on the plane about the antipode (eqs 52 to 57).

    On a prolate figure the astroid lies along the meridian and x and y change places.
    """
    unit = abs(series.flattening) * np.pi * ends.cos_beta1
    x = np.maximum(complement_rad / unit, 1e-140)
    y = ends.fall / (unit * ends.cos_beta1)
    if series.flattening > 0.0:
        root = _astroid(x, y)
        direction = np.array((x / (1.0 + root), -y / root))
    else:
        root = _astroid(y, x)
        direction = np.array((x / root, -y / (1.0 + root)))
    return _unit(direction)


def _unit(direction: FloatArray) -> FloatArray:
    unit: FloatArray = direction / np.sqrt(direction[0] * direction[0] + direction[1] * direction[1])
    return unit


def _between(low: FloatArray, azimuth: FloatArray, high: FloatArray) -> BoolArray:
    """Return whether an azimuth lies inside its bracket; all are sines and cosines."""
    inside: BoolArray = (azimuth[0] * low[1] > azimuth[1] * low[0]) & (high[0] * azimuth[1] > high[1] * azimuth[0])
    return inside


def _longitude_error(
    azimuth: FloatArray, ends: ReducedEnds, complement_rad: FloatArray, series: GeodesicSeries
) -> tuple[FloatArray, FloatArray, BoolArray]:
    """Return how far λ12(α1) is above λ12, its rate of change with α1 (eq. 46), and whether it is rounding."""
    arc, omega_complement_rad = arc_by_azimuth(ends, azimuth[0], azimuth[1], series)
    lag_rad = longitude_lag_rad(arc, series)
    error_rad = complement_rad - omega_complement_rad - lag_rad
    rate = series.axis_ratio * reduced_length_over_b(arc, ends, series) / (arc.north2 + 1e-300)
    return error_rad, rate, abs(error_rad) <= ROUNDING * (complement_rad + omega_complement_rad + abs(lag_rad))


def _next_azimuth(
    azimuth: FloatArray, low: FloatArray, high: FloatArray, step_rad: FloatArray, halve: bool
) -> FloatArray:
    """Return the azimuth after Newton's step, or half-way through the bracket where that leads out of it."""
    sine, cosine = np.sin(step_rad), np.cos(step_rad)
    moved = _unit(np.array((azimuth[0] * cosine + azimuth[1] * sine, azimuth[1] * cosine - azimuth[0] * sine)))
    middle = _unit(low + high)
    return middle if halve else np.where((abs(step_rad) < 1.0) & _between(low, moved, high), moved, middle)


def arc_near_antipode(ends: ReducedEnds, complement_rad: FloatArray, series: GeodesicSeries) -> Arc:
    """Return the shortest arcs between nearly antipodal ends.

    Args:
        ends: The ends, each part of shape (n,).
        complement_rad: π - λ12, shape (n,), not negative.
        series: The figure's, which is not a sphere.
    """
    azimuth = _starting_azimuth(ends, complement_rad, series)
    low, high = np.zeros_like(azimuth), np.zeros_like(azimuth)
    low[1], high[1] = 1.0, -1.0
    active = np.arange(complement_rad.size)
    for count in range(STEP_LIMIT):
        part = ReducedEnds(*(values[active] for values in ends))
        error_rad, rate, settled = _longitude_error(azimuth[:, active], part, complement_rad[active], series)
        above = error_rad > 0.0
        high[:, active[above]], low[:, active[~above]] = azimuth[:, active[above]], azimuth[:, active[~above]]
        active = active[~settled]
        if active.size == 0:
            break
        step_rad = -error_rad[~settled] / np.where(rate[~settled] > 0.0, rate[~settled], 1e-3)
        halve = count > NEWTON_STEPS and count % 2 == 0
        azimuth[:, active] = _next_azimuth(azimuth[:, active], low[:, active], high[:, active], step_rad, halve)
    return arc_by_azimuth(ends, azimuth[0], azimuth[1], series)[0]
