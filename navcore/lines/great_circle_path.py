"""A great circle by its arc on the sphere of reduced latitudes, on which a geodesic is a great circle.

The arc σ is counted from where the great circle crosses the equator northwards, in radians; the vertex is at 90°.
Latitude and course follow from the sphere at once; distance and longitude differ from the sphere's by integrals whose
integrands are so smooth that a few terms of their cosine series give every digit.

Source: C. F. F. Karney, Algorithms for geodesics, J. Geod. 87 (2013) 43-55, eqs 5-16; the series are found by sampling.
"""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import TYPE_CHECKING, NamedTuple

import numpy as np

from navcore.earth.latitudes import geographic_from_reduced_deg, reduced_latitude_deg
from navcore.trigonometry import FloatArray, direction_deg, sin_cos_deg

if TYPE_CHECKING:
    import numpy.typing as npt

    from navcore.earth.figure import Figure

_TERMS = 6
_SAMPLES = 16
_MULTIPLES = 2.0 * np.arange(1, _TERMS + 1)


class OnMercator(NamedTuple):
    """Points of a great circle on the Mercator plane, in radians of longitude.

    Attributes:
        east_rad: Longitude since the node.
        north_rad: Isometric latitude.
        radius_m: The plane's scale: metres on the figure in a radian on the plane.
        sin_lat: Sine of the latitude.
    """

    east_rad: FloatArray
    north_rad: FloatArray
    radius_m: FloatArray
    sin_lat: FloatArray


@dataclass(frozen=True, slots=True)
class GreatCirclePath:
    """One whole great circle.

    Attributes:
        sin_node: Sine of the course where it crosses the equator northwards; below 0 where it runs west. Its size is
            also the cosine of the vertex's reduced latitude.
        cos_node: The cosine, 0 or more: the sine of the vertex's reduced latitude.
        figure: The figure of the Earth.
        distance_terms: Mean, and amplitudes of the even multiples, of metres in a radian of arc.
        longitude_terms: The same of what the longitude lacks of the sphere's, in radians.
    """

    sin_node: float
    cos_node: float
    figure: Figure
    distance_terms: FloatArray
    longitude_terms: FloatArray

    def distance_m(self, arc_rad: npt.ArrayLike) -> FloatArray:
        """Return the distance from the node to an arc."""
        return _integral(self.distance_terms, np.asarray(arc_rad, dtype=np.float64))

    def arc_at_rad(self, distance_m: npt.ArrayLike) -> FloatArray:
        """Return the arc at a distance from the node."""
        wanted = np.asarray(distance_m, dtype=np.float64)
        arc: FloatArray = wanted / self.distance_terms[0]
        # The rate hardly varies, so each step gains more than two figures.
        for _ in range(6):
            arc = arc + (wanted - self.distance_m(arc)) / self.distance_terms[0]
        return arc

    def longitude_rad(self, arc_rad: npt.ArrayLike) -> FloatArray:
        """Return the longitude made since the node, east positive, counted on past half a turn."""
        arc = np.asarray(arc_rad, dtype=np.float64)
        sine, cosine = np.sin(arc), np.cos(arc)
        steep = abs(self.sin_node)
        on_sphere = arc + np.arctan2((steep - 1.0) * sine * cosine, cosine * cosine + steep * sine * sine)
        longitude: FloatArray = math.copysign(1.0, self.sin_node) * (on_sphere - _integral(self.longitude_terms, arc))
        return longitude

    def latitude_deg(self, arc_rad: npt.ArrayLike) -> FloatArray:
        """Return the latitude at an arc."""
        arc = np.asarray(arc_rad, dtype=np.float64)
        cosine = np.hypot(self.sin_node, self.cos_node * np.cos(arc))
        return geographic_from_reduced_deg(np.degrees(np.arctan2(self.cos_node * np.sin(arc), cosine)), self.figure)

    def on_mercator(self, arc_rad: FloatArray) -> OnMercator:
        """Return the points at arcs on the Mercator plane."""
        sin_reduced = self.cos_node * np.sin(arc_rad)
        cos_reduced = np.hypot(self.sin_node, self.cos_node * np.cos(arc_rad))
        tangent = sin_reduced / (cos_reduced * (1.0 - self.figure.flattening))
        sin_lat = tangent / np.hypot(1.0, tangent)
        eccentricity = self.figure.eccentricity
        north_rad = np.arcsinh(tangent) - eccentricity * np.arctanh(eccentricity * sin_lat)
        radius_m = self.figure.equatorial_radius_m * cos_reduced
        return OnMercator(self.longitude_rad(arc_rad), north_rad, radius_m, sin_lat)

    def course_deg(self, arc_rad: npt.ArrayLike) -> FloatArray:
        """Return the course at an arc, [0, 360)."""
        return direction_deg(self.sin_node, self.cos_node * np.cos(np.asarray(arc_rad, dtype=np.float64)))


def path_leaving(lat_deg: float, course_deg: float, figure: Figure) -> tuple[GreatCirclePath, float]:
    """Return the great circle that leaves a latitude on a course, and the arc in radians where it does."""
    sin_lat, cos_lat = (float(part) for part in sin_cos_deg(reduced_latitude_deg(lat_deg, figure)))
    sin_course, cos_course = (float(part) for part in sin_cos_deg(course_deg))
    path = _path(sin_course * cos_lat, math.hypot(cos_course, sin_course * sin_lat), figure)
    return path, math.atan2(sin_lat, cos_course * cos_lat)


def path_with_vertex(vertex_lat_deg: float, figure: Figure) -> GreatCirclePath:
    """Return the eastbound great circle whose northern vertex has this latitude, above 0."""
    sin_lat, cos_lat = (float(part) for part in sin_cos_deg(reduced_latitude_deg(vertex_lat_deg, figure)))
    return _path(cos_lat, sin_lat, figure)


def arc_at_latitude_rad(path: GreatCirclePath, lat_deg: float) -> float:
    """Return the arc, -90° to 90° in radians, where a great circle first comes up to a latitude.

    A latitude beyond the vertex by rounding is the vertex.
    """
    reduced_deg = float(reduced_latitude_deg(lat_deg, path.figure))
    vertex_deg = math.degrees(math.atan2(path.cos_node, abs(path.sin_node)))
    # sin² of the vertex less sin² of the latitude, from differences of angles so that it keeps its digits near 0.
    height = math.sin(math.radians(vertex_deg - reduced_deg)) * math.sin(math.radians(vertex_deg + reduced_deg))
    return math.atan2(math.sin(math.radians(reduced_deg)), math.sqrt(max(0.0, height)))


def _path(sin_node: float, cos_node: float, figure: Figure) -> GreatCirclePath:
    flattening = figure.flattening
    second = figure.eccentricity_squared / (1.0 - figure.eccentricity_squared)
    arc = np.pi * np.arange(_SAMPLES) / _SAMPLES
    stretch = np.sqrt(1.0 + second * cos_node * cos_node * np.sin(arc) ** 2)
    lacking = flattening * abs(sin_node) * (2.0 - flattening) / (1.0 + (1.0 - flattening) * stretch)
    cosines = np.cos(np.outer(_MULTIPLES, arc)) / _SAMPLES
    return GreatCirclePath(
        sin_node, cos_node, figure, *(_terms(cosines, f) for f in (figure.polar_radius_m * stretch, lacking))
    )


def _terms(cosines: FloatArray, samples: FloatArray) -> FloatArray:
    terms: FloatArray = np.concatenate(([samples.mean()], 2.0 * cosines @ samples / _MULTIPLES))
    return terms


def _integral(terms: FloatArray, arc_rad: FloatArray) -> FloatArray:
    """Return the integral of a cosine series of even multiples from 0."""
    total: FloatArray = terms[0] * arc_rad + np.sin(arc_rad[..., np.newaxis] * _MULTIPLES) @ terms[1:]
    return total
