"""What the tables say of a leg or a traverse: the answers of every sailing side by side, for JSON and the comparison.

1' of latitude is 1 NM; meridional parts are the chosen figure's. North and east are positive. What has no value is
None, never NaN.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from navcore.errors import NoAnswerError
from navcore.sailings import mercator, middle_latitude, parallel, plane
from navcore.sailings.differences import (
    check_position,
    convergency_deg,
    conversion_angle_deg,
    mean_latitude_deg,
)

if TYPE_CHECKING:
    from collections.abc import Sequence

    from navcore.earth.figure import Figure
    from navcore.position import Position
    from navcore.sailings.working import Working


@dataclass(frozen=True, slots=True)
class LegTables:
    """A leg by the tables.

    Attributes:
        d_lat_min: Difference of latitude.
        d_long_min: Difference of longitude by the short way; exactly 180° as the signs say, else east.
        departure_nmi: d.long × cos mean latitude; None across the equator.
        mean_lat_deg: Half the sum of the latitudes.
        dmp_min: Difference of meridional parts; None at a pole.
        mercator_course_deg: [0, 360); 000 or 180 at a pole, None for one position.
        mercator_distance_nmi: d.lat × sec course; None where d.lat is 0.
        middle_latitude_course_deg: [0, 360); parallel sailing's where d.lat is 0; 000 or 180 at a pole; None across the
            equator and for one position.
        middle_latitude_distance_nmi: Parallel sailing's where d.lat is 0; None across the equator.
        convergency_deg: d.long × sin mean latitude, unsigned.
        conversion_angle_deg: Half of it.
    """

    d_lat_min: float
    d_long_min: float
    departure_nmi: float | None
    mean_lat_deg: float
    dmp_min: float | None
    mercator_course_deg: float | None
    mercator_distance_nmi: float | None
    middle_latitude_course_deg: float | None
    middle_latitude_distance_nmi: float | None
    convergency_deg: float
    conversion_angle_deg: float


@dataclass(frozen=True, slots=True)
class TraverseTables:
    """A traverse by the tables.

    Attributes:
        d_lat_min: Sum of the runs' differences of latitude.
        departure_nmi: Sum of their departures.
        made_good_course_deg: Plane sailing's, [0, 360); None where the runs end where they began.
        made_good_distance_nmi: Plane sailing's.
        middle_latitude_to: Where it ends; None across the equator and past a pole.
        mercator_to: Where it ends, by parallel sailing on 090 and 270; None past a pole, and at one on another course
            than the meridian's.
    """

    d_lat_min: float
    departure_nmi: float
    made_good_course_deg: float | None
    made_good_distance_nmi: float
    middle_latitude_to: Position | None
    mercator_to: Position | None

    @property
    def is_parallel(self) -> bool:
        """Whether parallel sailing took Mercator sailing's place."""
        return self.made_good_course_deg is not None and not self.d_lat_min


def tables_of_leg(start: Position, end: Position, figure: Figure) -> LegTables:
    """Work a leg by Mercator and middle-latitude sailing.

    Raises:
        RangeError: A latitude or longitude that is none.
    """
    by_mercator = mercator.solve_inverse(start, end, figure)
    by_middle = _by_middle_latitude(start, end)
    return LegTables(
        d_lat_min=by_mercator.number("d.lat"),
        d_long_min=by_mercator.number("d.long"),
        departure_nmi=_value(by_middle, "departure"),
        mean_lat_deg=mean_latitude_deg(start.lat_deg, end.lat_deg),
        dmp_min=by_mercator.value("DMP"),
        mercator_course_deg=by_mercator.value("course"),
        mercator_distance_nmi=by_mercator.value("distance"),
        middle_latitude_course_deg=_value(by_middle, "course"),
        middle_latitude_distance_nmi=_value(by_middle, "distance"),
        convergency_deg=convergency_deg(start, end),
        conversion_angle_deg=conversion_angle_deg(start, end),
    )


def tables_of_traverse(start: Position, runs: Sequence[tuple[float, float]], figure: Figure) -> TraverseTables:
    """Work a traverse: the runs summed by plane sailing, and the course and distance made good turned into a position.

    The longitude is found once, from the sums, as the books work a traverse, not run by run; for a single run the two
    are the same. On 090 and 270 made good, parallel sailing takes the place of Mercator sailing.

    Args:
        start: Where the first run begins.
        runs: Course in degrees and distance in NM of each run, in order.
        figure: Whose meridional parts Mercator sailing takes.

    Raises:
        RangeError: A latitude, longitude, course or distance that is none.
    """
    check_position(start)
    traverse = plane.solve_traverse(runs)
    course_deg, distance_nmi = traverse.value("course"), traverse.number("distance")
    middle_to: Position | None = start
    mercator_to: Position | None = start
    if course_deg is not None:
        middle_to = _reached_by_middle_latitude(start, course_deg, distance_nmi)
        mercator_to = _reached_by_mercator(start, course_deg, distance_nmi, figure)
    return TraverseTables(
        d_lat_min=traverse.number("d.lat"),
        departure_nmi=traverse.number("departure"),
        made_good_course_deg=course_deg,
        made_good_distance_nmi=distance_nmi,
        middle_latitude_to=middle_to,
        mercator_to=mercator_to,
    )


def _by_middle_latitude(start: Position, end: Position) -> Working | None:
    try:
        return middle_latitude.solve_inverse(start, end)
    except NoAnswerError:
        return None


def _value(working: Working | None, symbol: str) -> float | None:
    return None if working is None else working.value(symbol)


def _reached_by_middle_latitude(start: Position, course_deg: float, distance_nmi: float) -> Position | None:
    try:
        return middle_latitude.solve_direct(start, course_deg, distance_nmi).position
    except NoAnswerError:
        return None


def _reached_by_mercator(start: Position, course_deg: float, distance_nmi: float, figure: Figure) -> Position | None:
    try:
        if plane.components(course_deg, distance_nmi)[0] == 0.0:
            return parallel.solve_direct(start, course_deg, distance_nmi).position
        return mercator.solve_direct(start, course_deg, distance_nmi, figure).position
    except NoAnswerError:
        return None
