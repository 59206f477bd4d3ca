"""The plan worked: every leg by both lines, what is sailed, and when.

Data flows one way: a plan in, a solution out. Legs that the previous solution has already worked are taken over as they
are, so that an edit costs no more than the legs it touched.
"""

from __future__ import annotations

from dataclasses import dataclass
from itertools import pairwise
from typing import TYPE_CHECKING, NamedTuple

import numpy as np

from navcore.errors import NoAnswerError
from navcore.lines import great_circle, rhumb_line
from navcore.plan.model import Line
from navcore.plan.schedule import Schedule, make_schedule
from navcore.sailings.composite import composite
from navcore.sailings.split import split_composite, split_great_circle

if TYPE_CHECKING:
    from collections.abc import Sequence

    from navcore.earth.figure import Figure
    from navcore.plan.model import Plan
    from navcore.position import Position
    from navcore.sailings.composite import Composite
    from navcore.sailings.parts import Parts
    from navcore.sailings.split import SteeringParts


class _Ends(NamedTuple):
    """What decides a leg's figures by either line."""

    start: Position
    end: Position
    figure: Figure


class _Choice(NamedTuple):
    """What decides how a leg is sailed."""

    line: Line
    limit_deg: float | None
    parts: Parts | None

    @property
    def is_costly(self) -> bool:
        """Whether sailing takes more than both lines take to work, so that it is worth taking over."""
        return self.line is Line.COMPOSITE or (self.parts is not None and self.line is Line.GREAT_CIRCLE)


@dataclass(frozen=True, slots=True)
class WorkedLeg:
    """One leg by both lines, whichever is sailed.

    Attributes:
        rhumb_course_deg: Course of the rhumb line, [0, 360).
        rhumb_distance_m: Its length.
        initial_course_deg: Course of the great circle where it starts, [0, 360).
        final_course_deg: Course of the great circle where it ends, [0, 360).
        great_circle_distance_m: Its length.
    """

    rhumb_course_deg: float
    rhumb_distance_m: float
    initial_course_deg: float
    final_course_deg: float
    great_circle_distance_m: float

    @property
    def saving_m(self) -> float:
        """How much shorter the great circle is."""
        # Where both are one line, rounding could make it a hair less than nothing.
        return max(0.0, self.rhumb_distance_m - self.great_circle_distance_m)


@dataclass(frozen=True, slots=True)
class SailedLeg:
    """One leg by the line it is sailed by.

    Attributes:
        line: The line.
        worked: The leg by both lines.
        course_deg: Where the leg starts; None for a leg of no length or a refused one.
        end_course_deg: Where it ends; equal to course_deg on a rhumb line.
        distance_m: Length of what is sailed; None where it is refused.
        refusal: Why the line or its parts can't be worked; None where they are. Nothing else is put in their place.
        composite: The composite; None on another line or where it is refused.
        parts: What is steered in place of the line; None where it is not split.
    """

    line: Line
    worked: WorkedLeg
    course_deg: float | None
    end_course_deg: float | None
    distance_m: float | None
    refusal: str | None = None
    composite: Composite | None = None
    parts: SteeringParts | None = None

    @property
    def first_course_deg(self) -> float | None:
        """The course steered on leaving: the first part's, else the line's."""
        return self.course_deg if self.parts is None or self.course_deg is None else self.parts.courses_deg[0]

    @property
    def last_course_deg(self) -> float | None:
        """The course steered on arrival: the last part's, else the line's."""
        return self.end_course_deg if self.parts is None or self.course_deg is None else self.parts.courses_deg[-1]


@dataclass(frozen=True, slots=True)
class Solution:
    """A plan with all its figures.

    Attributes:
        plan: The plan.
        legs: One for each leg of the plan.
        schedule: The times along it.
        run_m: Distance from the first waypoint, one for each waypoint; None from a refused leg on.
    """

    plan: Plan
    legs: tuple[SailedLeg, ...]
    schedule: Schedule
    run_m: tuple[float | None, ...]

    @property
    def total_m(self) -> float | None:
        """Length of the whole passage; None where a leg is refused."""
        return self.run_m[-1] if self.run_m else 0.0


def solve(plan: Plan, previous: Solution | None = None) -> Solution:
    """Return the plan with all its figures; legs that previous holds are taken over from it."""
    ends = _ends_of(plan)
    known = dict(zip(_ends_of(previous.plan), (leg.worked for leg in previous.legs), strict=True)) if previous else {}
    unknown = [leg_ends for leg_ends in dict.fromkeys(ends) if leg_ends not in known]
    known.update(zip(unknown, _work(unknown, plan.figure), strict=True))
    legs = _sail_all(plan, [known[leg_ends] for leg_ends in ends], previous)
    distances_m = [leg.distance_m for leg in legs]
    return Solution(plan, legs, make_schedule(plan, distances_m), _runs_m(plan, distances_m))


def _sail_all(plan: Plan, worked: Sequence[WorkedLeg], previous: Solution | None) -> tuple[SailedLeg, ...]:
    sailed: dict[tuple[_Ends, _Choice], SailedLeg] = {}
    if previous is not None:
        choices = _choices_of(previous.plan)
        sailed = {
            (_ends_at(previous.plan, index), choice): previous.legs[index]
            for index, choice in enumerate(choices)
            if choice.is_costly
        }
    legs = []
    for index, choice in enumerate(_choices_of(plan)):
        ends = _ends_at(plan, index)
        if not choice.is_costly:
            legs.append(_sail(ends, worked[index], choice))
            continue
        if (ends, choice) not in sailed:
            sailed[ends, choice] = _sail(ends, worked[index], choice)
        legs.append(sailed[ends, choice])
    return tuple(legs)


def _choices_of(plan: Plan) -> list[_Choice]:
    return [_Choice(plan.line_of(leg), leg.limit_deg, leg.parts) for leg in plan.legs]


def _ends_at(plan: Plan, index: int) -> _Ends:
    return _Ends(plan.waypoints[index].position, plan.waypoints[index + 1].position, plan.figure)


def _ends_of(plan: Plan) -> list[_Ends]:
    positions = [waypoint.position for waypoint in plan.waypoints]
    return [_Ends(start, end, plan.figure) for start, end in pairwise(positions)]


def _work(ends: Sequence[_Ends], figure: Figure) -> list[WorkedLeg]:
    if not ends:
        return []
    lat1_deg, lon1_deg, lat2_deg, lon2_deg = np.array([(*leg.start, *leg.end) for leg in ends]).T
    rhumb = rhumb_line.inverse(lat1_deg, lon1_deg, lat2_deg, lon2_deg, figure)
    circle = great_circle.inverse(lat1_deg, lon1_deg, lat2_deg, lon2_deg, figure)
    columns = (
        rhumb.course_deg,
        rhumb.distance_m,
        circle.initial_course_deg,
        circle.final_course_deg,
        circle.distance_m,
    )
    return [WorkedLeg(*row) for row in np.column_stack(columns).tolist()]


def _sail(ends: _Ends, worked: WorkedLeg, choice: _Choice) -> SailedLeg:
    if choice.line is Line.RHUMB:
        course_deg = worked.rhumb_course_deg if worked.rhumb_distance_m else None
        return SailedLeg(choice.line, worked, course_deg, course_deg, worked.rhumb_distance_m)
    try:
        if choice.line is Line.COMPOSITE:
            return _sail_composite(ends, worked, choice)
        return _sail_great_circle(ends, worked, choice)
    except NoAnswerError as error:
        return SailedLeg(choice.line, worked, None, None, None, refusal=str(error))


def _sail_great_circle(ends: _Ends, worked: WorkedLeg, choice: _Choice) -> SailedLeg:
    moves = worked.great_circle_distance_m > 0.0
    initial_deg = worked.initial_course_deg if moves else None
    final_deg = worked.final_course_deg if moves else None
    parts = split_great_circle(*ends, choice.parts) if choice.parts is not None and moves else None
    distance_m = worked.great_circle_distance_m if parts is None else parts.distance_m
    return SailedLeg(choice.line, worked, initial_deg, final_deg, distance_m, parts=parts)


def _sail_composite(ends: _Ends, worked: WorkedLeg, choice: _Choice) -> SailedLeg:
    if choice.limit_deg is None:
        raise NoAnswerError("a composite needs a limiting latitude; give one, such as 50°N")
    track = composite(ends.start, ends.end, choice.limit_deg, ends.figure)
    moves = track.distance_m > 0.0
    parts = split_composite(track, choice.parts) if choice.parts is not None and moves else None
    return SailedLeg(
        choice.line,
        worked,
        track.initial_course_deg if moves else None,
        track.final_course_deg if moves else None,
        track.distance_m if parts is None else parts.distance_m,
        composite=track,
        parts=parts,
    )


def _runs_m(plan: Plan, distances_m: Sequence[float | None]) -> tuple[float | None, ...]:
    if not plan.waypoints:
        return ()
    runs_m: list[float | None] = [0.0]
    for distance_m in distances_m:
        so_far_m = runs_m[-1]
        runs_m.append(None if so_far_m is None or distance_m is None else so_far_m + distance_m)
    return tuple(runs_m)
