"""The margin: one leg as a navigator would work it, both lines and both figures of the Earth side by side."""

from __future__ import annotations

from dataclasses import replace
from datetime import timedelta
from functools import lru_cache
from typing import TYPE_CHECKING

from navcore.constants import METRES_PER_NAUTICAL_MILE, SECONDS_PER_HOUR
from navcore.earth.figure import SPHERE
from navcore.plan.leg_words import SPLIT_FIRST
from navcore.plan.model import Leg, Line, Plan, Waypoint
from navcore.plan.quantities import QUANTITIES
from navcore.plan.schedule import speed_of
from navcore.plan.solve import solve
from navcore.prints.leg_table import method_line
from navcore.prints.tracks import NO_VALUE
from navcore.sailings.comparison import LegComparison, compare_lines
from navcore.text.clock import format_duration
from navcore.text.direction import format_angle, format_direction, format_minutes_of_arc
from navcore.text.distance import format_distance, format_percent, format_speed
from navcore.text.plain import fit, pad, visible
from navcore.text.position import format_latitude, format_position
from navcore.text.wrap import wrap
from tui.present.grid import SAID_IN_MARGIN
from tui.present.tone import Piece, Tone, line

if TYPE_CHECKING:
    from collections.abc import Iterator

    from navcore.earth.figure import Figure
    from navcore.plan.solve import Solution, WorkedLeg
    from navcore.position import Position
    from tui.present.tone import Line as ShownLine

_KEPT = 64
"""How many legs' workings are kept."""

_LABEL = 17
_CELL = 16
_NORTH_SOUTH = ("N", "S")
_EAST_WEST = ("E", "W")
STILL_WORKED = "…"
"""In the place of a figure that work_whole has not worked yet."""

NOTHING = "The working of a leg stands here once the plan has two waypoints."

NARROWEST = _LABEL + 2 * _CELL
"""Cells that a line of the margin takes."""


@lru_cache(maxsize=_KEPT)
def _compared(start: Position, end: Position, figure: Figure) -> LegComparison:
    return compare_lines(start, end, figure)


_separations_nmi: dict[tuple[Position, Position, Figure], float] = {}
"""The farthest that the two lines of a leg lie apart, for the legs looked at last: it costs more than all the rest."""


def is_worked_whole(solution: Solution, index: int | None) -> bool:
    """Say whether nothing of a leg's working is still to be worked."""
    return index is None or _ends_of(solution.plan, index) in _separations_nmi


def work_whole(solution: Solution, index: int) -> None:
    """Work what takes longer than a key may."""
    ends = _ends_of(solution.plan, index)
    while len(_separations_nmi) >= _KEPT:
        del _separations_nmi[next(iter(_separations_nmi))]
    _separations_nmi[ends] = _compared(*ends).greatest_separation_nmi


def _ends_of(plan: Plan, index: int) -> tuple[Position, Position, Figure]:
    return plan.waypoints[index].position, plan.waypoints[index + 1].position, plan.figure


@lru_cache(maxsize=_KEPT)
def _on_sphere(start: Position, end: Position) -> WorkedLeg:
    """Return both lines of a leg on the sphere."""
    return solve(Plan((Waypoint("", start), Waypoint("", end)), (Leg(),), figure=SPHERE)).legs[0].worked


def working(solution: Solution, index: int | None, width: int) -> list[ShownLine]:
    """Return the working of a leg in lines that fit a width, at least NARROWEST.

    What takes longer than a key may is STILL_WORKED until work_whole has worked it.
    """
    if index is None:
        return [line(Piece(text, Tone.QUIET)) for text in wrap(NOTHING, width)]
    plan = solution.plan
    ends = _ends_of(plan, index)
    compared = _compared(*ends)
    return [
        *_heading(solution, index, width),
        line(),
        *_by_lines(compared, _on_sphere(*ends[:2])),
        line(),
        *_saving(compared, speed_of(plan, plan.legs[index]), solution),
        line(),
        *_by_tables(compared),
        line(),
        *(line(Piece(text, Tone.QUIET)) for text in wrap(_method(plan), width)),
    ]


def _heading(solution: Solution, index: int, width: int) -> Iterator[ShownLine]:
    sailed = solution.legs[index]
    yield line(Piece(f"Leg {index + 1} → {index + 2}", Tone.STRONG), Piece(f"  {sailed.line.value}", Tone.HEAD))
    names = [visible(point.name) or f"waypoint {number}" for number, point in _ends(solution.plan, index)]
    yield line(Piece(fit(f"{names[0]} to {names[1]}", width), Tone.QUIET))
    if sailed.refusal is not None:
        yield from (line(Piece(text, Tone.ALERT)) for text in wrap(f"! {sailed.refusal}", width))
    for key in SAID_IN_MARGIN:
        words = QUANTITIES[key].shown(solution, index)
        must_be_seen = words == SPLIT_FIRST
        shown = wrap(f"! {words}" if must_be_seen else words, width)
        yield from (line(Piece(text, Tone.ALERT if must_be_seen else Tone.PLAIN)) for text in shown)
    if sailed.line is Line.COMPOSITE and sailed.distance_m is not None:
        courses = (QUANTITIES[key].shown(solution, index) for key in ("course_deg", "final_course_deg"))
        unit = QUANTITIES["distance_nmi"].unit(solution.plan.trade)
        yield _row("as sailed", f"{QUANTITIES['distance_nmi'].shown(solution, index)} {unit}", tone=Tone.STRONG)
        yield _row("its courses", *courses)


def _ends(plan: Plan, index: int) -> Iterator[tuple[int, Waypoint]]:
    return enumerate(plan.waypoints[index : index + 2], index + 1)


def _by_lines(leg: LegComparison, sphere: WorkedLeg) -> Iterator[ShownLine]:
    rhumb, circle = leg.rhumb_line, leg.great_circle
    yield _row("", "rhumb line", "great circle", tone=Tone.HEAD)
    yield _row(f"on {leg.figure.name}", tone=Tone.HEAD)
    yield _row("distance", format_distance(rhumb.distance_nmi), format_distance(circle.distance_nmi))
    yield _row("course", format_direction(rhumb.course_deg), format_direction(circle.initial_course_deg))
    yield _row("final course", format_direction(rhumb.course_deg), format_direction(circle.final_course_deg))
    yield _row("on the sphere", "1' of arc = 1 NM", tone=Tone.HEAD)
    lengths = (sphere.rhumb_distance_m, sphere.great_circle_distance_m)
    yield _row("distance", *(format_distance(length_m / METRES_PER_NAUTICAL_MILE) for length_m in lengths))
    yield _row("course", format_direction(sphere.rhumb_course_deg), format_direction(sphere.initial_course_deg))
    yield _row("final course", format_direction(sphere.rhumb_course_deg), format_direction(sphere.final_course_deg))


def _saving(leg: LegComparison, speed_kn: float | None, solution: Solution) -> Iterator[ShownLine]:
    circle = leg.great_circle
    yield _row("saving", format_distance(leg.saving_nmi), format_percent(leg.saving_percent), tone=Tone.STRONG)
    if speed_kn is not None:
        unit = "kt" if solution.plan.trade.value == "aviation" else "kn"
        yield _row("  in time", _time(leg.saving_nmi, speed_kn), f"at {format_speed(speed_kn, unit)}")
    apart_nmi = _separations_nmi.get((leg.start, leg.end, leg.figure))
    yield _row("farthest apart", STILL_WORKED if apart_nmi is None else format_distance(apart_nmi))
    yield _wide("vertex", NO_VALUE if circle.vertex is None else format_position(circle.vertex))
    if circle.vertex is not None:
        yield _wide("", "on the leg" if circle.vertex_on_leg else "not on the leg")


def _by_tables(leg: LegComparison) -> Iterator[ShownLine]:
    tables = leg.tables
    yield line(Piece(f"by tables, meridional parts of {leg.figure.name}", Tone.HEAD))
    yield _row("d.lat, d.long", *_differences(leg))
    departure = NO_VALUE
    if tables.departure_nmi is not None:
        side = _EAST_WEST[tables.departure_nmi < 0.0] if tables.departure_nmi else ""
        departure = f"{format_distance(abs(tables.departure_nmi))} {side}".rstrip()
    yield _row("departure", "", departure)
    yield _row("mean lat., DMP", format_latitude(tables.mean_lat_deg), _parts(tables.dmp_min))
    yield _row("Mercator", *_course_and_distance(tables.mercator_course_deg, tables.mercator_distance_nmi))
    middle = _course_and_distance(tables.middle_latitude_course_deg, tables.middle_latitude_distance_nmi)
    yield _row("middle latitude", *middle)
    yield _row("convergency", format_angle(tables.convergency_deg), f"half {format_angle(tables.conversion_angle_deg)}")


def _differences(leg: LegComparison) -> tuple[str, str]:
    tables = leg.tables
    d_lat = format_minutes_of_arc(tables.d_lat_min, _NORTH_SOUTH)
    return d_lat, format_minutes_of_arc(tables.d_long_min, _EAST_WEST)


def _parts(dmp_min: float | None) -> str:
    return NO_VALUE if dmp_min is None else format_minutes_of_arc(dmp_min, _NORTH_SOUTH)


def _course_and_distance(course_deg: float | None, distance_nmi: float | None) -> tuple[str, str]:
    course = NO_VALUE if course_deg is None else format_direction(course_deg)
    return course, NO_VALUE if distance_nmi is None else format_distance(distance_nmi)


def _time(distance_nmi: float, speed_kn: float) -> str:
    try:
        return format_duration(timedelta(seconds=distance_nmi / speed_kn * SECONDS_PER_HOUR))
    except OverflowError:
        return NO_VALUE


def _method(plan: Plan) -> str:
    tables = "By tables 1' of latitude = 1 NM; half the convergency is the conversion angle."
    return f"{method_line(replace(plan, waypoints=(), legs=()))} {tables}"


def _row(label: str, *cells: str, tone: Tone = Tone.PLAIN) -> ShownLine:
    figures = "".join(pad(cell, _CELL, "right") for cell in cells)
    return line(Piece(pad(label, _LABEL), Tone.QUIET if tone is Tone.PLAIN else tone), Piece(figures, tone))


def _wide(label: str, text: str) -> ShownLine:
    return line(Piece(pad(label, _LABEL), Tone.QUIET), pad(text, 2 * _CELL, "right"))
