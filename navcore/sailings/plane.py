"""Plane sailing and traverse: one right-angled triangle of course, distance, d.lat and departure.

1' of latitude is 1 NM. No longitude enters: departure is turned into d.long by another sailing.
"""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

from navcore.sailings.differences import check_run, course_of, sine_cosine, without_noise
from navcore.sailings.working import Step, StepKind, Working

if TYPE_CHECKING:
    from collections.abc import Sequence

BASIS = "plane triangle; 1' of latitude = 1 NM"
NOWHERE = "d.lat and departure are both 0: no course"


def components(course_deg: float, distance_nmi: float) -> tuple[float, float]:
    """Return d.lat in minutes, north positive, and departure in NM, east positive, of a run.

    Raises:
        RangeError: A course or distance that is not finite, or a distance below 0.
    """
    check_run(course_deg, distance_nmi)
    sine, cosine = sine_cosine(course_deg)
    return without_noise(distance_nmi * cosine), without_noise(distance_nmi * sine)


def solve_inverse(d_lat_min: float, departure_nmi: float) -> Working:
    """Work the course and distance made good from d.lat and departure, north and east positive."""
    given = (
        Step("d.lat", "given", d_lat_min, StepKind.NORTH_MIN),
        Step("departure", "given", departure_nmi, StepKind.EAST_NMI),
    )
    steps = _made_good(without_noise(d_lat_min), without_noise(departure_nmi))
    remarks = () if steps[-1].value else (NOWHERE,)
    return Working("Plane sailing", BASIS, given, steps, ("course", "distance"), remarks)


def solve_direct(course_deg: float, distance_nmi: float) -> Working:
    """Work d.lat and departure from a course and a distance.

    Raises:
        RangeError: A course or distance that is not finite, or a distance below 0.
    """
    given = (
        Step("course", "given", course_deg, StepKind.COURSE),
        Step("distance", "given", distance_nmi, StepKind.DISTANCE_NMI),
    )
    steps = run_steps(*components(course_deg, distance_nmi))
    return Working("Plane sailing", BASIS, given, steps, ("d.lat", "departure"))


def solve_traverse(runs: Sequence[tuple[float, float]]) -> Working:
    """Work a traverse: the runs' d.lat and departure summed, then the course and distance made good.

    Args:
        runs: Course in degrees and distance in NM of each run, in order.

    Returns:
        Each run's lines carry its number: "d.lat 1". The sums are "d.lat" and "departure".

    Raises:
        RangeError: A course or distance that is not finite, or a distance below 0.
    """
    given, steps = [], []
    for number, (course_deg, distance_nmi) in enumerate(runs, 1):
        d_lat_min, departure_nmi = components(course_deg, distance_nmi)
        given += [
            Step(f"course {number}", "given", course_deg, StepKind.COURSE),
            Step(f"distance {number}", "given", distance_nmi, StepKind.DISTANCE_NMI),
        ]
        steps += [
            Step(f"d.lat {number}", f"distance {number} × cos course {number}", d_lat_min, StepKind.NORTH_MIN),
            Step(f"departure {number}", f"distance {number} × sin course {number}", departure_nmi, StepKind.EAST_NMI),
        ]
    d_lat_min = without_noise(math.fsum(step.value or 0.0 for step in steps[0::2]))
    departure_nmi = without_noise(math.fsum(step.value or 0.0 for step in steps[1::2]))
    steps += [
        Step("d.lat", "sum of the runs' d.lat", d_lat_min, StepKind.NORTH_MIN),
        Step("departure", "sum of the runs' departures", departure_nmi, StepKind.EAST_NMI),
        *_made_good(d_lat_min, departure_nmi),
    ]
    remarks = () if steps[-1].value else (NOWHERE,)
    return Working("Traverse", BASIS, tuple(given), tuple(steps), ("d.lat", "departure", "course", "distance"), remarks)


def run_steps(d_lat_min: float, departure_nmi: float) -> tuple[Step, Step]:
    """Return the two components of a run as lines."""
    return (
        Step("d.lat", "distance × cos course", d_lat_min, StepKind.NORTH_MIN),
        Step("departure", "distance × sin course", departure_nmi, StepKind.EAST_NMI),
    )


def _made_good(d_lat_min: float, departure_nmi: float) -> tuple[Step, ...]:
    course_deg = course_of(departure_nmi, d_lat_min) if d_lat_min or departure_nmi else None
    tangent = departure_nmi / d_lat_min if d_lat_min else None
    distance_nmi = math.hypot(d_lat_min, departure_nmi)
    return (
        Step("tan C", "departure ÷ d.lat", tangent, StepKind.NUMBER),
        Step("course", "angle C, from N or S towards E or W as d.lat and departure", course_deg, StepKind.COURSE),
        Step("distance", "√(d.lat² + departure²)", distance_nmi, StepKind.DISTANCE_NMI),
    )
