"""The spacing table of a sheet: what a person needs to rule its graticule by hand, to a tenth of a millimetre."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, NamedTuple

import numpy as np

from navcore.charts.lambert import Lambert
from navcore.charts.mercator import Mercator
from navcore.charts.stereographic import Stereographic
from navcore.earth.latitudes import meridional_parts_min

if TYPE_CHECKING:
    from navcore.charts.graticule import Graticule
    from navcore.charts.plane import PaperPlane


class RulingLine(NamedTuple):
    """A line of the spacing table.

    Attributes:
        value_deg: Latitude of a parallel, longitude of a meridian.
        meridional_parts_min: Of a parallel of a Mercator sheet, in minutes of longitude; else None.
        distance_mm: Mercator: from the neat line's lower side (parallel) or left side (meridian). Polar stereographic
            and Lambert: the parallel's radius about the common centre. Else None.
        angle_deg: Polar stereographic and Lambert: the meridian's lean from the sheet's up, clockwise. Else None.
    """

    value_deg: float
    meridional_parts_min: float | None
    distance_mm: float | None
    angle_deg: float | None


@dataclass(frozen=True, slots=True)
class Ruling:
    """The spacing table.

    Attributes:
        parallels: From south to north.
        meridians: From west to east.
        minute_of_longitude_mm: On a Mercator sheet, the same everywhere; else None.
        centre_mm: Polar stereographic and Lambert: the common centre of the parallels, where all meridians meet, from
            the neat line's lower left corner; it may be off the paper. Else None.
    """

    parallels: tuple[RulingLine, ...]
    meridians: tuple[RulingLine, ...]
    minute_of_longitude_mm: float | None = None
    centre_mm: tuple[float, float] | None = None


def make_ruling(plane: PaperPlane, graticule: Graticule) -> Ruling:
    """Return the spacing table of a sheet."""
    parallels = sorted({line.value_deg for line in graticule.lines if not line.is_meridian})
    meridians = list(dict.fromkeys(line.value_deg for line in graticule.lines if line.is_meridian))
    projection = plane.projection
    if isinstance(projection, Mercator):
        return _mercator(plane, projection, parallels, meridians)
    if isinstance(projection, Lambert) or (isinstance(projection, Stereographic) and projection.is_polar):
        return _about_a_centre(plane, projection, parallels, meridians)
    return Ruling(
        tuple(RulingLine(value, None, None, None) for value in parallels),
        tuple(RulingLine(value, None, None, None) for value in meridians),
    )


def _mercator(plane: PaperPlane, projection: Mercator, parallels: list[float], meridians: list[float]) -> Ruling:
    heights = plane.to_mm(parallels, projection.central_lon_deg)[:, 1].tolist() if parallels else []
    across = plane.to_mm(0.0, meridians)[:, 0].tolist() if meridians else []
    parts = meridional_parts_min(parallels, projection.figure).tolist() if parallels else []
    minute = plane.to_mm(0.0, projection.central_lon_deg + 1.0 / 60.0) - plane.to_mm(0.0, projection.central_lon_deg)
    return Ruling(
        tuple(RulingLine(*row, None) for row in zip(parallels, parts, heights, strict=True)),
        tuple(RulingLine(lon, None, x_mm, None) for lon, x_mm in zip(meridians, across, strict=True)),
        float(minute[0]),
    )


def _about_a_centre(
    plane: PaperPlane, projection: Lambert | Stereographic, parallels: list[float], meridians: list[float]
) -> Ruling:
    north = projection.cone > 0.0 if isinstance(projection, Lambert) else projection.centre_lat_deg > 0.0
    centre = plane.to_mm(90.0 if north else -90.0, projection.central_lon_deg)
    on_centre_line = plane.to_mm(parallels, projection.central_lon_deg) if parallels else np.empty((0, 2))
    radii = np.abs(on_centre_line[:, 1] - centre[1]).tolist()
    # A meridian leans by its convergence, to the west where that is positive.
    angles = (-projection.convergence_deg(60.0 if north else -60.0, meridians)).tolist() if meridians else []
    return Ruling(
        tuple(RulingLine(lat, None, radius, None) for lat, radius in zip(parallels, radii, strict=True)),
        tuple(RulingLine(lon, None, None, angle) for lon, angle in zip(meridians, angles, strict=True)),
        None,
        (float(centre[0]), float(centre[1])),
    )
