"""When each waypoint is reached: distances, speeds and stays from the departure on. UTC throughout."""

from __future__ import annotations

from dataclasses import dataclass
from datetime import timedelta
from typing import TYPE_CHECKING

from navcore.constants import METRES_PER_NAUTICAL_MILE, SECONDS_PER_HOUR

if TYPE_CHECKING:
    from collections.abc import Sequence
    from datetime import datetime

    from navcore.plan.model import Leg, Plan


@dataclass(frozen=True, slots=True)
class Schedule:
    """Times along the plan; None where a speed, a distance or the departure is missing, or the calendar ends.

    Attributes:
        time_on_leg: One for each leg.
        arrival: One for each waypoint; the first is the departure's own time.
        leaving: One for each waypoint, its stay included.
        time_so_far: From the departure to the arrival, stays included, one for each waypoint.
    """

    time_on_leg: tuple[timedelta | None, ...]
    arrival: tuple[datetime | None, ...]
    leaving: tuple[datetime | None, ...]
    time_so_far: tuple[timedelta | None, ...]


def speed_of(plan: Plan, leg: Leg) -> float | None:
    """Return the speed of a leg in knots: its own, else the plan's, else None."""
    return leg.speed_kn if leg.speed_kn is not None else plan.speed_kn


def make_schedule(plan: Plan, distances_m: Sequence[float | None]) -> Schedule:
    """Return the times along a plan whose legs have these distances."""
    times = tuple(
        _time_on_leg(distance_m, speed_of(plan, leg)) for distance_m, leg in zip(distances_m, plan.legs, strict=True)
    )
    so_far: list[timedelta | None] = []
    arrival: list[datetime | None] = []
    leaving: list[datetime | None] = []
    elapsed: timedelta | None = timedelta()
    for index, waypoint in enumerate(plan.waypoints):
        if index:
            elapsed = _sum(elapsed, times[index - 1])
        so_far.append(elapsed)
        arrival.append(_later(plan.departure, elapsed))
        # The departure is when the first waypoint is left, so a stay there is over by then.
        if index:
            elapsed = _sum(elapsed, waypoint.stay)
        leaving.append(_later(plan.departure, elapsed))
    return Schedule(times, tuple(arrival), tuple(leaving), tuple(so_far))


def _time_on_leg(distance_m: float | None, speed_kn: float | None) -> timedelta | None:
    if distance_m is None or speed_kn is None:
        return None
    try:
        return timedelta(seconds=distance_m / METRES_PER_NAUTICAL_MILE / speed_kn * SECONDS_PER_HOUR)
    except OverflowError:
        return None


def _sum(elapsed: timedelta | None, more: timedelta | None) -> timedelta | None:
    if elapsed is None or more is None:
        return None
    try:
        return elapsed + more
    except OverflowError:
        return None


def _later(departure: datetime | None, elapsed: timedelta | None) -> datetime | None:
    if departure is None or elapsed is None:
        return None
    try:
        return departure + elapsed
    except OverflowError:
        return None
