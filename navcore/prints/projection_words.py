"""What is said of a projection: where its scale is true, and which way its grid leans."""

from __future__ import annotations

from typing import TYPE_CHECKING

from navcore.text.direction import format_angle
from navcore.text.position import format_latitude

if TYPE_CHECKING:
    from navcore.charts.projection import Projection


def true_scale_words(projection: Projection) -> str:
    """Return where the natural scale holds: latitudes, or the centre."""
    lats_deg = projection.true_scale_lats_deg
    where = " and ".join(format_latitude(lat_deg, 0 if lat_deg == round(lat_deg) else 1) for lat_deg in lats_deg)
    return where.replace("00'", "") or "the centre"


def format_convergence(convergence_deg: float) -> str:
    """Return the bearing of grid north from true north, such as 12.3° E; of none, 0.0°."""
    angle = format_angle(abs(convergence_deg))
    if angle == format_angle(0.0):
        return angle
    return f"{angle} {'E' if convergence_deg > 0.0 else 'W'}"
