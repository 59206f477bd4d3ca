"""The named figures of the Earth.

The figure is the surface that lines run on; the datum of the positions is another thing.
"""

from __future__ import annotations

import math
from dataclasses import dataclass

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.errors import ParseError


@dataclass(frozen=True, slots=True)
class Figure:
    """An ellipsoid of revolution.

    Attributes:
        name: As written in a plan.
        equatorial_radius_m: Semi-major axis a.
        inverse_flattening: 1/f; infinity for the sphere.
    """

    name: str
    equatorial_radius_m: float
    inverse_flattening: float

    @property
    def flattening(self) -> float:
        """F = (a - b) / a; 0 for the sphere."""
        return 1.0 / self.inverse_flattening

    @property
    def polar_radius_m(self) -> float:
        """Semi-minor axis b."""
        return self.equatorial_radius_m * (1.0 - self.flattening)

    @property
    def eccentricity_squared(self) -> float:
        """First eccentricity squared, e² = f (2 - f)."""
        return self.flattening * (2.0 - self.flattening)

    @property
    def eccentricity(self) -> float:
        """First eccentricity e."""
        return math.sqrt(self.eccentricity_squared)

    @property
    def third_flattening(self) -> float:
        """Third flattening, n = (a - b) / (a + b) = f / (2 - f)."""
        return self.flattening / (2.0 - self.flattening)


WGS_84 = Figure("WGS 84", 6378137.0, 298.257223563)
"""Source: NGA.STND.0036, World Geodetic System 1984."""

SPHERE = Figure("sphere", METRES_PER_NAUTICAL_MILE * 10800.0 / math.pi, math.inf)
"""1' of arc is 1 NM. Common practice for the sailings."""

FIGURES: dict[str, Figure] = {
    figure.name: figure
    for figure in (
        WGS_84,
        Figure("GRS 80", 6378137.0, 298.257222101),  # Moritz, Geodetic Reference System 1980
        Figure("WGS 72", 6378135.0, 298.26),  # EPSG 7043
        Figure("International 1924", 6378388.0, 297.0),  # EPSG 7022
        Figure("Clarke 1866", 6378206.4, 294.9786982),  # EPSG 7008
        Figure("Clarke 1880", 6378249.145, 293.465),  # EPSG 7012
        Figure("Bessel 1841", 6377397.155, 299.1528128),  # EPSG 7004
        SPHERE,
    )
}


def figure_named(name: str) -> Figure:
    """Return a figure by its name; letter case and spacing don't matter.

    Raises:
        ParseError: No figure has that name; the message lists those there are.
    """
    wanted = "".join(name.split()).casefold()
    for figure in FIGURES.values():
        if "".join(figure.name.split()).casefold() == wanted:
            return figure
    known = ", ".join(FIGURES)
    raise ParseError(name, (0, len(name)), f"no figure of the Earth is named {name!r}", f"type one of: {known}")
