"""A plan's legs by every line, and the whole of it: what each would cost, how high it goes, how far the lines part."""

from __future__ import annotations

import math
from dataclasses import dataclass, replace
from itertools import pairwise
from typing import TYPE_CHECKING

import numpy as np

from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.earth.figure import SPHERE, WGS_84
from navcore.lines import great_circle
from navcore.lines.offset import greatest_separation_m
from navcore.plan.model import Line
from navcore.plan.schedule import speed_of
from navcore.plan.solve import solve

if TYPE_CHECKING:
    from datetime import datetime, timedelta

    from navcore.plan.model import Plan
    from navcore.plan.solve import Solution
    from navcore.sailings.composite import Composite
    from navcore.trigonometry import FloatArray


@dataclass(frozen=True, slots=True)
class ByLine:
    """A leg or a plan by one line.

    Attributes:
        distance_m: Its length; None where it can't be worked.
        highest_lat_deg: The latitude on it that is farthest from the equator; None where it can't be worked.
    """

    distance_m: float | None
    highest_lat_deg: float | None


@dataclass(frozen=True, slots=True)
class LegCompared:
    """One leg by every line.

    Attributes:
        line: The line it is sailed by.
        sailed: What is sailed, its parts where it is split.
        rhumb_line: By rhumb line.
        great_circle: By great circle.
        composite: The composite; None where it is sailed by another line.
        speed_kn: None where none is given.
        greatest_separation_m: The farthest that the rhumb line lies from the great circle.
        sphere_less_wgs_84_m: What is sailed on the sphere less the same on WGS 84; None where it can't be worked.
    """

    line: Line
    sailed: ByLine
    rhumb_line: ByLine
    great_circle: ByLine
    composite: ByLine | None
    speed_kn: float | None
    greatest_separation_m: float
    sphere_less_wgs_84_m: float | None

    @property
    def saving_m(self) -> float | None:
        """How much shorter than the rhumb line what is sailed is; below 0 where it is longer."""
        return _less(self.rhumb_line.distance_m, self.sailed.distance_m)

    @property
    def saving_hours(self) -> float | None:
        """The same in hours; None without a speed."""
        if self.saving_m is None or self.speed_kn is None:
            return None
        return self.saving_m / METRES_PER_NAUTICAL_MILE / self.speed_kn


@dataclass(frozen=True, slots=True)
class PlanCompared:
    """A plan by every line.

    Attributes:
        plan: The plan.
        legs: One for each leg.
        sailed: What is sailed.
        rhumb_line: Every leg by rhumb line.
        great_circle: Every leg by great circle.
        greatest_separation_m: Of any leg.
        sphere_less_wgs_84_m: What is sailed on the sphere less the same on WGS 84.
        time: From the departure to the last arrival, stays included; None where it is not known.
        arrival: At the last waypoint; None where it is not known.
    """

    plan: Plan
    legs: tuple[LegCompared, ...]
    sailed: ByLine
    rhumb_line: ByLine
    great_circle: ByLine
    greatest_separation_m: float
    sphere_less_wgs_84_m: float | None
    time: timedelta | None
    arrival: datetime | None

    @property
    def saving_m(self) -> float | None:
        """How much shorter than rhumb lines throughout what is sailed is."""
        return _less(self.rhumb_line.distance_m, self.sailed.distance_m)

    @property
    def saving_hours(self) -> float | None:
        """The same in hours, each leg at its speed; None where a leg has none."""
        hours = [leg.saving_hours for leg in self.legs]
        known = [value for value in hours if value is not None]
        return math.fsum(known) if len(known) == len(hours) else None


def compare_plan(solution: Solution) -> PlanCompared:
    """Return a plan by every line; a refused leg leaves its own figures and the totals open."""
    plan = solution.plan
    on_sphere, on_wgs_84 = (
        solution if plan.figure == figure else solve(replace(plan, figure=figure)) for figure in (SPHERE, WGS_84)
    )
    ends = np.array([(*one.position, *other.position) for one, other in pairwise(plan.waypoints)]).reshape(-1, 4).T
    apart_m = greatest_separation_m(ends[0], ends[1], ends[2], ends[3], plan.figure)
    vertex = great_circle.vertex(ends[0], ends[1], ends[2], ends[3], plan.figure)
    ends_deg = _farther(ends[0], ends[2])
    circles_deg = np.where(vertex.on_leg, vertex.lat_deg, ends_deg)
    legs = tuple(
        LegCompared(
            line=leg.line,
            sailed=ByLine(leg.distance_m, _highest_deg(solution, index, (ends_deg[index], circles_deg[index]))),
            rhumb_line=ByLine(leg.worked.rhumb_distance_m, float(ends_deg[index])),
            great_circle=ByLine(leg.worked.great_circle_distance_m, float(circles_deg[index])),
            composite=None if leg.composite is None else _by_composite(leg.composite),
            speed_kn=speed_of(plan, plan.legs[index]),
            greatest_separation_m=float(apart_m[index]),
            sphere_less_wgs_84_m=_less(on_sphere.legs[index].distance_m, on_wgs_84.legs[index].distance_m),
        )
        for index, leg in enumerate(solution.legs)
    )
    times = solution.schedule
    return PlanCompared(
        plan=plan,
        legs=legs,
        sailed=_whole([leg.sailed for leg in legs]),
        rhumb_line=_whole([leg.rhumb_line for leg in legs]),
        great_circle=_whole([leg.great_circle for leg in legs]),
        greatest_separation_m=max((leg.greatest_separation_m for leg in legs), default=0.0),
        sphere_less_wgs_84_m=_less(on_sphere.total_m, on_wgs_84.total_m),
        time=times.time_so_far[-1] if times.time_so_far else None,
        arrival=times.arrival[-1] if times.arrival else None,
    )


def _highest_deg(solution: Solution, index: int, by_ends_and_circle_deg: tuple[float, float]) -> float | None:
    leg = solution.legs[index]
    if leg.distance_m is None:
        return None
    if leg.parts is not None:
        return max((point.lat_deg for point in leg.parts.points), key=abs)
    if leg.composite is not None:
        return max((leg.composite.highest_lat_deg, by_ends_and_circle_deg[0]), key=abs)
    return float(by_ends_and_circle_deg[leg.line is Line.GREAT_CIRCLE])


def _by_composite(track: Composite) -> ByLine:
    return ByLine(track.distance_m, track.highest_lat_deg)


def _farther(lat1_deg: FloatArray, lat2_deg: FloatArray) -> FloatArray:
    return np.where(np.abs(lat2_deg) > np.abs(lat1_deg), lat2_deg, lat1_deg)


def _whole(legs: list[ByLine]) -> ByLine:
    distances_m = [leg.distance_m for leg in legs if leg.distance_m is not None]
    highest_deg = [leg.highest_lat_deg for leg in legs if leg.highest_lat_deg is not None]
    if len(distances_m) < len(legs):
        return ByLine(None, None)
    return ByLine(math.fsum(distances_m), max(highest_deg, key=abs, default=None))


def _less(one_m: float | None, other_m: float | None) -> float | None:
    return None if one_m is None or other_m is None else one_m - other_m
