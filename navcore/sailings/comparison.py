"""One leg by every line and every method, side by side."""

from __future__ import annotations

import math
from dataclasses import dataclass
from typing import TYPE_CHECKING

from navcore.angles import wrap_180
from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.earth.figure import SPHERE
from navcore.lines import great_circle, rhumb_line
from navcore.lines.offset import greatest_separation_m
from navcore.position import Position
from navcore.sailings.composite import limits_table
from navcore.sailings.split import split_composite, split_great_circle
from navcore.sailings.tables import LegTables, tables_of_leg
from navcore.text.direction import format_angle

if TYPE_CHECKING:
    from navcore.earth.figure import Figure
    from navcore.sailings.composite import Composite, LimitRow
    from navcore.sailings.parts import Parts
    from navcore.sailings.split import SteeringParts


RULE_HOLDS_DEG = 0.5
"""Half-convergency is said to hold where it is this near; a wheel is not put over by less."""


@dataclass(frozen=True, slots=True)
class RhumbLine:
    """A leg's rhumb line.

    Attributes:
        course_deg: [0, 360); 0 where the leg has no length.
        distance_nmi: Its length.
    """

    course_deg: float
    distance_nmi: float


@dataclass(frozen=True, slots=True)
class GreatCircle:
    """A leg's great circle.

    Attributes:
        distance_nmi: Its length.
        initial_course_deg: Where it starts, [0, 360); 0 where the leg has no length.
        final_course_deg: Where it ends.
        vertex: Its point nearest a pole: the one on the leg if there is one; None on the equator.
        vertex_on_leg: Whether the vertex lies on the leg.
    """

    distance_nmi: float
    initial_course_deg: float
    final_course_deg: float
    vertex: Position | None
    vertex_on_leg: bool


@dataclass(frozen=True, slots=True)
class HalfConvergency:
    """The angle between the great circle and the rhumb line at either end.

    Attributes:
        rule_deg: Half the convergency, d.long × sin mean latitude ÷ 2, unsigned.
        at_start_deg: As it is where the leg starts, unsigned.
        at_end_deg: As it is where the leg ends, unsigned.
    """

    rule_deg: float
    at_start_deg: float
    at_end_deg: float

    @property
    def note(self) -> str | None:
        """Why the rule is not to be used on this leg; None where it holds to half a degree."""
        worst_deg = max(abs(exact_deg - self.rule_deg) for exact_deg in (self.at_start_deg, self.at_end_deg))
        if worst_deg <= RULE_HOLDS_DEG:
            return None
        return (
            f"the rule is out by {format_angle(worst_deg)}: the leg is too long, or runs in latitudes too high or on "
            "both sides of the equator, for half the convergency"
        )


@dataclass(frozen=True, slots=True)
class LegComparison:
    """One leg by every line.

    Attributes:
        start: Where it starts.
        end: Where it ends.
        figure: The figure that its lines run on.
        rhumb_line: By rhumb line.
        great_circle: By great circle.
        tables: By the tables.
    """

    start: Position
    end: Position
    figure: Figure
    rhumb_line: RhumbLine
    great_circle: GreatCircle
    tables: LegTables

    @property
    def greatest_separation_nmi(self) -> float:
        """The farthest that any point of the rhumb line lies from the great circle; costs as much as all the rest."""
        return float(greatest_separation_m(*self.start, *self.end, self.figure)) / METRES_PER_NAUTICAL_MILE

    @property
    def saving_nmi(self) -> float:
        """How much shorter the great circle is."""
        # Where both are one line, rounding could make it a hair less than nothing.
        return max(0.0, self.rhumb_line.distance_nmi - self.great_circle.distance_nmi)

    @property
    def saving_percent(self) -> float:
        """The saving in per cent of the rhumb line; 0 for a leg of no length."""
        length_nmi = self.rhumb_line.distance_nmi
        return 100.0 * self.saving_nmi / length_nmi if length_nmi else 0.0

    @property
    def half_convergency(self) -> HalfConvergency:
        """The conversion angle by the rule, and exactly on the figure."""
        course_deg, circle = self.rhumb_line.course_deg, self.great_circle
        return HalfConvergency(
            rule_deg=self.tables.conversion_angle_deg,
            at_start_deg=abs(wrap_180(circle.initial_course_deg - course_deg)),
            at_end_deg=abs(wrap_180(circle.final_course_deg - course_deg)),
        )

    def on_sphere(self) -> LegComparison:
        """Return the same leg on the sphere, where 1' of arc is 1 NM."""
        return compare_lines(self.start, self.end, SPHERE)


@dataclass(frozen=True, slots=True)
class ChosenTracks:
    """What was asked of a leg besides its lines.

    Attributes:
        limits: Composites under each limit that was asked, in that order.
        parts: Of the first composite, or of the great circle where no limit was asked; None where none were asked, or
            the composite is refused.
    """

    limits: tuple[LimitRow, ...] = ()
    parts: SteeringParts | None = None

    @property
    def composite(self) -> Composite | None:
        """The composite under the first limit; None where there is none."""
        return self.limits[0].track if self.limits else None

    @property
    def refusal(self) -> str | None:
        """Why the first limit is refused; None where it is not."""
        return self.limits[0].refusal if self.limits else None


def choose_tracks(
    start: Position, end: Position, figure: Figure, limits_deg: tuple[float, ...] = (), rule: Parts | None = None
) -> ChosenTracks:
    """Work composites under several limits, and the parts of the first of them or else of the great circle.

    Raises:
        NoAnswerError: The rule can't be followed.
        RangeError: A latitude or longitude that is none.
    """
    limits = limits_table(start, end, limits_deg, figure)
    if rule is None:
        return ChosenTracks(limits)
    if not limits:
        return ChosenTracks(limits, split_great_circle(start, end, figure, rule))
    track = limits[0].track
    return ChosenTracks(limits, None if track is None else split_composite(track, rule))


def compare_lines(start: Position, end: Position, figure: Figure) -> LegComparison:
    """Work one leg by every line.

    Raises:
        RangeError: A latitude or longitude that is none.
    """
    ends = (*start, *end)
    rhumb = rhumb_line.inverse(*ends, figure)
    return LegComparison(
        start=start,
        end=end,
        figure=figure,
        rhumb_line=RhumbLine(float(rhumb.course_deg), float(rhumb.distance_m) / METRES_PER_NAUTICAL_MILE),
        great_circle=_great_circle(start, end, figure),
        tables=tables_of_leg(start, end, figure),
    )


def _great_circle(start: Position, end: Position, figure: Figure) -> GreatCircle:
    circle = great_circle.inverse(*start, *end, figure)
    vertex = great_circle.vertex(*start, *end, figure)
    position = Position(float(vertex.lat_deg), float(vertex.lon_deg))
    exists = math.isfinite(position.lat_deg)
    return GreatCircle(
        distance_nmi=float(circle.distance_m) / METRES_PER_NAUTICAL_MILE,
        initial_course_deg=float(circle.initial_course_deg),
        final_course_deg=float(circle.final_course_deg),
        vertex=position if exists else None,
        vertex_on_leg=exists and bool(vertex.on_leg),
    )
