"""The steering parts of a leg as rows beneath it."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.text.direction import format_direction
from navcore.text.distance import DISTANCE_UNIT, format_distance_figure
from navcore.text.plain import pad
from navcore.text.position import format_latitude, format_longitude

if TYPE_CHECKING:
    from collections.abc import Iterator

    from navcore.sailings.split import SteeringParts


@dataclass(frozen=True, slots=True)
class PartRow:
    """One steering part, as printed.

    Attributes:
        figures: By the key of the quantity in whose column it stands; the position is where the part ends.
        words: The same in one line.
    """

    figures: dict[str, str]
    words: str


def part_rows(parts: SteeringParts, leg_number: int) -> Iterator[PartRow]:
    """Yield the parts of a leg, numbered 3.1, 3.2 and so on."""
    for number, (course_deg, distance_m, point) in enumerate(
        zip(parts.courses_deg, parts.distances_m, parts.points[1:], strict=True), 1
    ):
        figures = {
            "number": f"{leg_number}.{number}",
            "course_deg": format_direction(course_deg),
            "distance_nmi": format_distance_figure(distance_m / METRES_PER_NAUTICAL_MILE),
            "lat_deg": format_latitude(point.lat_deg),
            "lon_deg": format_longitude(point.lon_deg),
        }
        label, course, distance, latitude, longitude = figures.values()
        run = f"{pad(label, 6)}{course}  {pad(distance, 7, 'right')} {DISTANCE_UNIT}"
        yield PartRow(figures, f"{run}  to {latitude} {longitude}")
