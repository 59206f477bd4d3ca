"""A plan's plotting sheets: the plan laid off on paper by hand's own rules, at true scale."""

from __future__ import annotations

from dataclasses import dataclass, field
from typing import TYPE_CHECKING

from navcore.charts.choice import SheetKind
from navcore.charts.coast import ACCURACY
from navcore.charts.grid import sign_rule
from navcore.charts.lambert import Lambert
from navcore.charts.paper import Paper, paper_named
from navcore.charts.sheet import ChartPoint
from navcore.charts.sheet_set import SheetRequest, make_sheets
from navcore.charts.stereographic import Stereographic
from navcore.charts.track import TrackLeg
from navcore.constants import METRES_PER_NAUTICAL_MILE
from navcore.plan.arcs import arcs_of
from navcore.plan.model import Line, Trade
from navcore.plan.revision import fingerprint
from navcore.prints.caution import CAUTION
from navcore.prints.leg_table import make_leg_table, method_line, refuse_unworked
from navcore.prints.paper.fonts import MISSING, printable
from navcore.prints.projection_words import true_scale_words
from navcore.prints.sheets.drawing import words_width_mm
from navcore.text.direction import format_angle, format_direction
from navcore.text.distance import format_distance
from navcore.text.position import format_longitude

if TYPE_CHECKING:
    from navcore.charts.sheet import Sheet
    from navcore.charts.sheet_set import SheetSet
    from navcore.plan.model import Plan
    from navcore.plan.solve import SailedLeg, Solution
    from navcore.position import Position

NO_DANGERS = "This sheet shows no depths, dangers, aids or limits of any kind."

_NAMES = {Line.RHUMB: "RL", Line.GREAT_CIRCLE: "GC", Line.COMPOSITE: "composite"}
_GREENWICH_DEG = 0.0
_LONGEST_NAME = 36


@dataclass(frozen=True, slots=True)
class SheetOptions:
    """How a plan's sheets are wanted.

    Attributes:
        kind: Which projection.
        paper: The paper, upright.
        scale: Denominator of the natural scale; None fits the plan on one sheet.
        landscape: True or False; None for whichever is better.
        meridian_deg: The meridian that runs straight up the sheet; None chooses.
        true_scale_deg: Latitude of true scale or two standard parallels; none chooses.
        corners: Two corners of what is to be shown, instead of the whole plan.
        coast: Whether the shore is drawn.
    """

    kind: SheetKind = SheetKind.MERCATOR
    paper: Paper = field(default_factory=lambda: paper_named("A4"))
    scale: float | None = None
    landscape: bool | None = None
    meridian_deg: float | None = None
    true_scale_deg: tuple[float, ...] = ()
    corners: tuple[Position, Position] | None = None
    coast: bool = True


def plotting_sheets(solution: Solution, options: SheetOptions) -> SheetSet:
    """Return the sheets of a solved plan.

    A polar sheet of an aviation plan has its grid parallel to the meridian of Greenwich unless another is given.

    Raises:
        NoAnswerError: A leg's line can't be worked, or the projection can't show the plan.
        RangeError: A scale or latitude that can't be drawn.
    """
    refuse_unworked(solution)
    plan = solution.plan
    meridian_deg = options.meridian_deg
    if meridian_deg is None and plan.trade is Trade.AVIATION and _is_polar(solution, options):
        meridian_deg = _GREENWICH_DEG
    return make_sheets(
        SheetRequest(
            points=tuple(
                ChartPoint(_point_words(number, waypoint.name), waypoint.position)
                for number, waypoint in enumerate(plan.waypoints, 1)
            ),
            legs=tuple(_track_leg(solution, index) for index in range(len(solution.legs))),
            figure=plan.figure,
            kind=options.kind,
            paper=options.paper,
            text_width_mm=words_width_mm,
            scale=options.scale,
            turn=options.landscape,
            central_lon_deg=meridian_deg,
            true_scale_deg=options.true_scale_deg,
            corners=options.corners,
            coast=options.coast,
        )
    )


def _point_words(number: int, name: str) -> str:
    shown = printable(f"{number} {name}".strip())[0]
    return shown if len(shown) <= _LONGEST_NAME else f"{shown[: _LONGEST_NAME - 1]}…"


def lacking(plan: Plan) -> frozenset[str]:
    """Return the characters of a plan's sheets that the font lacks; on paper a mark stands for each."""
    texts = (
        plan.title,
        plan.voyage,
        plan.prepared,
        plan.checked,
        plan.approved,
        *(point.name for point in plan.waypoints),
    )
    return frozenset[str]().union(*(printable(text)[1] for text in texts))


def _is_polar(solution: Solution, options: SheetOptions) -> bool:
    latitudes = [waypoint.position.lat_deg for waypoint in solution.plan.waypoints]
    return options.kind is SheetKind.STEREOGRAPHIC and any(abs(latitude) >= 60.0 for latitude in latitudes)


def _track_leg(solution: Solution, index: int) -> TrackLeg:
    leg = solution.legs[index]
    marks = leg.parts.points[1:-1] if leg.parts is not None else ()
    return TrackLeg(arcs_of(solution, index), _leg_words(leg), tuple(marks))


def _leg_words(leg: SailedLeg) -> str:
    if leg.course_deg is None or leg.distance_m is None:
        return ""
    course = format_direction(leg.course_deg)
    if leg.line is not Line.RHUMB and leg.end_course_deg is not None:
        course += f" → {format_direction(leg.end_course_deg)}"
    return f"{_NAMES[leg.line]} {course} {format_distance(leg.distance_m / METRES_PER_NAUTICAL_MILE)}"


def title_of(solution: Solution) -> str:
    """Return what the passage is called, printable."""
    return printable(make_leg_table(solution).title)[0]


def scale_words(sheet: Sheet) -> str:
    """Return the natural scale and where it holds."""
    scale = f"{sheet.plane.scale:,.0f}".replace(",", " ")
    return f"1:{scale} at {true_scale_words(sheet.plane.projection)}"


def notes_of(solution: Solution, sheet: Sheet) -> tuple[str, ...]:
    """Return what is said at the foot of a sheet, a paragraph each, printable."""
    projection = sheet.plane.projection
    said = (
        NO_DANGERS,
        CAUTION,
        f"{projection.name}; {_convergence_note(sheet)}",
        method_line(solution.plan),
        _lines_note(sheet),
        f"{ACCURACY}." if sheet.coast_mm else "",
        f"No room for the names of {_numbers(sheet.left_out)}: see the leg table." if sheet.left_out else "",
        f"{MISSING} stands for a character that the font lacks." if lacking(solution.plan) else "",
        revision_words(solution.plan),
    )
    return tuple(printable(text)[0] for text in said if text)


def _numbers(names: tuple[str, ...]) -> str:
    return ", ".join(name.split(" ", 1)[0] for name in names)


def revision_words(plan: Plan) -> str:
    """Return which plan it is."""
    voyage = f"{'Flight' if plan.trade is Trade.AVIATION else 'Voyage'} {plan.voyage}; " if plan.voyage else ""
    revision = f"{'revision' if voyage else 'Revision'} {plan.revision}, plan {fingerprint(plan)}"
    return f"{voyage}{revision}; datum of the positions {plan.datum}."


def _convergence_note(sheet: Sheet) -> str:
    projection = sheet.plane.projection
    if not projection.conformal:
        return (
            "great circles of the sphere are straight; courses and distances can't be measured on it: carry points of "
            "the line to a conformal sheet by latitude and longitude."
        )
    meridian = format_longitude(projection.central_lon_deg, 0).replace("00'", "")
    if isinstance(projection, Lambert):
        return f"constant of the cone {projection.cone:.6f}; {sign_rule(projection)}."
    if isinstance(projection, Stereographic):
        if projection.is_polar:
            return f"{sign_rule(projection)}."
        lat_deg, lon_deg = (float(value) for value in sheet.plane.to_earth(0.0, sheet.plane.height_mm))
        at_corner = format_angle(abs(float(projection.convergence_deg(lat_deg, lon_deg))))
        return f"Snyder's definition; convergence 0 on {meridian}, {at_corner} in the upper left corner."
    return "no convergence: all meridians are parallel, and every rhumb line is straight."


def _lines_note(sheet: Sheet) -> str:
    bars = (
        "Distances: by the latitude scale at the side, at the latitude of the leg."
        if sheet.plane.projection.name == "Mercator"
        else "Distances: by the graduated meridian near the leg."
    )
    drawn = "Drawn: rhumb lines (RL) whole, great circles (GC) and composites broken; crosses where parts meet."
    return drawn if not sheet.plane.projection.conformal else f"{drawn} {bars}"
