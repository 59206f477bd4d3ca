"""From a passage to its sheets: projection and scale chosen where they are not given, one sheet or a numbered set.

A passage that is too big for one sheet becomes a set of sheets that overlap, numbered in the order in which the track
first comes on them, with an index that shows them all.
"""

from __future__ import annotations

import math
from dataclasses import dataclass, replace
from typing import TYPE_CHECKING

import numpy as np

from navcore.charts.choice import bounds_m, choose_projection, coverage_of, scale_to_fit
from navcore.charts.plane import PaperPlane
from navcore.charts.sheet import Contents, Outline, make_sheet
from navcore.charts.track import TOLERANCE_MM, LaidArcs, cut_at
from navcore.errors import NoAnswerError, RangeError

if TYPE_CHECKING:
    from collections.abc import Callable

    from navcore.charts.choice import Coverage, SheetKind
    from navcore.charts.paper import Paper
    from navcore.charts.projection import Projection
    from navcore.charts.sheet import ChartPoint, Sheet
    from navcore.charts.track import TrackLeg
    from navcore.earth.figure import Figure
    from navcore.position import Position
    from navcore.trigonometry import FloatArray

MOST_SHEETS = 60

_CLEAR_MM = 12.0
_OVERLAP_MM = 20.0


@dataclass(frozen=True, slots=True)
class SheetRequest:
    """What is asked for.

    Attributes:
        points: The waypoints.
        legs: The legs between them.
        figure: The figure that lines run on.
        kind: Which projection.
        paper: Upright; it is turned where that gives the larger scale or fewer sheets, unless `turn` says.
        text_width_mm: The width of words in letters of a size, both in millimetres.
        scale: Denominator of the natural scale; None fits the passage on one sheet.
        turn: True for landscape, False for upright, None for whichever is better.
        central_lon_deg: The meridian that runs straight up the sheet; None chooses.
        true_scale_deg: Latitude of true scale or two standard parallels; none chooses.
        corners: Two corners of what is to be shown, instead of the whole passage.
        coast: Whether the shore is drawn.
    """

    points: tuple[ChartPoint, ...]
    legs: tuple[TrackLeg, ...]
    figure: Figure
    kind: SheetKind
    paper: Paper
    text_width_mm: Callable[[str, float], float]
    scale: float | None = None
    turn: bool | None = None
    central_lon_deg: float | None = None
    true_scale_deg: tuple[float, ...] = ()
    corners: tuple[Position, Position] | None = None
    coast: bool = True


@dataclass(frozen=True, slots=True, eq=False)
class SheetSet:
    """The sheets of a passage.

    Attributes:
        sheets: In the order of the track.
        index: Shows them all; None where there is one sheet only.
    """

    sheets: tuple[Sheet, ...]
    index: Sheet | None


def make_sheets(request: SheetRequest) -> SheetSet:
    """Return the sheets that a request asks for.

    Raises:
        NoAnswerError: The projection can't show the passage, or it would take more than MOST_SHEETS sheets.
        RangeError: A scale or latitude that can't be drawn.
    """
    coverage = _coverage(request)
    projection = choose_projection(
        request.kind, coverage, request.figure, request.central_lon_deg, request.true_scale_deg
    )
    bounds = bounds_m(projection, coverage)
    if request.scale is None:
        paper = min(_papers(request), key=lambda paper: _fitting_scale(bounds, paper))
        scale = _fitting_scale(bounds, paper)
    else:
        if not 1000.0 <= request.scale <= 1e9:
            raise RangeError("scale", request.scale, "denominators from 1000 to 1 000 000 000")
        scale = request.scale
        paper = min(_papers(request), key=lambda paper: math.prod(_counts(bounds, scale, paper)))
    across, up = _counts(bounds, scale, paper)
    contents = _contents(request, projection, bounds, scale, paper)
    if across * up == 1:
        plane = _centred(projection, scale, paper, bounds)
        return SheetSet((make_sheet(contents, plane, _origin_mm(plane, bounds), (1, 1), paper),), None)
    return _numbered_set(contents, projection, bounds, scale, paper)


def _coverage(request: SheetRequest) -> Coverage:
    if request.corners is None:
        return coverage_of([point.position for point in request.points], request.legs, request.figure)
    (lat1, lon1), (lat2, lon2) = request.corners
    width = (lon2 - lon1 + 180.0) % 360.0 - 180.0 if abs(lon2 - lon1) != 180.0 else lon2 - lon1
    steps = np.linspace(0.0, 1.0, 33)
    corner = coverage_of([request.corners[0]], (), request.figure)
    lat_deg = np.concatenate([np.full(33, lat1), lat1 + steps * (lat2 - lat1), np.full(33, lat2)])
    lon_deg = np.concatenate([lon1 + steps * width, np.full(33, lon1 + width), lon1 + steps * width])
    return replace(corner, lat_deg=lat_deg, lon_deg=lon_deg)


def _papers(request: SheetRequest) -> list[Paper]:
    upright, turned = request.paper, request.paper.turned()
    if request.turn is None:
        return [turned, upright]
    return [turned if request.turn else upright]


def _fitting_scale(bounds: tuple[float, float, float, float], paper: Paper) -> float:
    left, bottom, right, top = bounds
    room = (paper.frame_width_mm - 2.0 * _CLEAR_MM, paper.frame_height_mm - 2.0 * _CLEAR_MM)
    return scale_to_fit((right - left, top - bottom), room)


def _counts(bounds: tuple[float, float, float, float], scale: float, paper: Paper) -> tuple[int, int]:
    """Return how many sheets stand side by side and one above another."""
    left, bottom, right, top = bounds
    counts = []
    for extent_m, room_mm in ((right - left, paper.frame_width_mm), (top - bottom, paper.frame_height_mm)):
        needed = extent_m * 1000.0 / scale + 2.0 * _CLEAR_MM
        more = math.ceil((needed - room_mm) / (room_mm - _OVERLAP_MM) - 1e-9)
        counts.append(1 + max(0, more))
    return counts[0], counts[1]


def _centred(
    projection: Projection, scale: float, paper: Paper, bounds: tuple[float, float, float, float]
) -> PaperPlane:
    """Return the plane of a sheet with what is to be shown in its middle."""
    left, bottom, right, top = bounds
    width, height = paper.frame_width_mm, paper.frame_height_mm
    x_0_m = 0.5 * width * scale / 1000.0 - 0.5 * (left + right)
    y_0_m = 0.5 * height * scale / 1000.0 - 0.5 * (bottom + top)
    return PaperPlane(projection, scale, x_0_m, y_0_m, width, height)


def _origin_mm(plane: PaperPlane, bounds: tuple[float, float, float, float]) -> FloatArray:
    """Return where a sheet's lower left corner is on the plane of the set, which counts from the bounds' corner."""
    return np.array([-plane.x_0_m - bounds[0], -plane.y_0_m - bounds[1]]) * (1000.0 / plane.scale)


def _contents(
    request: SheetRequest,
    projection: Projection,
    bounds: tuple[float, float, float, float],
    scale: float,
    paper: Paper,
) -> Contents:
    """Lay the whole passage off once, on the plane of the set."""
    left, bottom, right, top = bounds
    whole = PaperPlane(
        projection, scale, -left, -bottom, (right - left) * 1000.0 / scale, (top - bottom) * 1000.0 / scale
    )
    slack_x, slack_y = paper.frame_width_mm, paper.frame_height_mm
    window = (-slack_x, -slack_y, whole.width_mm + slack_x, whole.height_mm + slack_y)
    laid = LaidArcs([arc for leg in request.legs for arc in leg.arcs], request.figure, whole.to_mm)
    laid.look_at(window, TOLERANCE_MM)
    of_arcs = iter(laid.polylines(TOLERANCE_MM))
    polylines = tuple(tuple(line for _ in leg.arcs for line in next(of_arcs)) for leg in request.legs)
    return Contents(request.points, request.legs, polylines, request.text_width_mm, request.coast)


def _numbered_set(
    contents: Contents, projection: Projection, bounds: tuple[float, float, float, float], scale: float, paper: Paper
) -> SheetSet:
    planes = _tiles(projection, bounds, scale, paper)
    entered = [(_first_on(contents, plane, bounds), plane) for plane in planes]
    used = [plane for _, plane in sorted((pair for pair in entered if pair[0] < math.inf), key=lambda pair: pair[0])]
    if not used or len(used) > MOST_SHEETS:
        raise NoAnswerError(
            f"at 1:{scale:.0f} the passage takes {len(used) or len(planes)} sheets of {paper.name}, allowed: "
            f"{MOST_SHEETS}; give a smaller scale (a larger number) or larger paper"
        )
    sheets = tuple(
        make_sheet(contents, plane, _origin_mm(plane, bounds), (number, len(used)), paper)
        for number, plane in enumerate(used, 1)
    )
    return SheetSet(sheets, _index(contents, sheets, bounds))


def _tiles(
    projection: Projection, bounds: tuple[float, float, float, float], scale: float, paper: Paper
) -> list[PaperPlane]:
    across, up = _counts(bounds, scale, paper)
    if across * up > 100 * MOST_SHEETS:
        raise NoAnswerError(
            f"at 1:{scale:.0f} the passage takes {across} by {up} sheets of {paper.name}; give a smaller scale (a "
            "larger number) or larger paper"
        )
    middle = _centred(projection, scale, paper, bounds)
    step_x = (paper.frame_width_mm - _OVERLAP_MM) * scale / 1000.0
    step_y = (paper.frame_height_mm - _OVERLAP_MM) * scale / 1000.0
    return [
        replace(
            middle,
            x_0_m=middle.x_0_m - (column - 0.5 * (across - 1)) * step_x,
            y_0_m=middle.y_0_m - (row - 0.5 * (up - 1)) * step_y,
        )
        for row in range(up)
        for column in range(across)
    ]


def _first_on(contents: Contents, plane: PaperPlane, bounds: tuple[float, float, float, float]) -> float:
    """Return when the track first comes on a sheet, as a leg's number and a part of it; infinity where it never does.

    A sheet that only lies on the overlap of its neighbours is still kept: the track is on it.
    """
    origin = _origin_mm(plane, bounds)
    for number, polylines in enumerate(contents.polylines_mm):
        for order, line in enumerate(polylines):
            pieces = cut_at(line - origin, plane.window_mm)
            if pieces:
                off = np.hypot(*(line - origin - pieces[0][0]).T)
                return number + (order + float(np.argmin(off)) / len(line)) / len(polylines)
    if not contents.legs and contents.points:
        lat_deg, lon_deg = np.array([point.position for point in contents.points]).T
        held = np.flatnonzero(plane.holds(plane.to_mm(lat_deg, lon_deg)))
        return float(held[0]) if held.size else math.inf
    return math.inf


def _index(contents: Contents, sheets: tuple[Sheet, ...], bounds: tuple[float, float, float, float]) -> Sheet:
    first = sheets[0]
    size_mm = np.array([first.plane.width_mm, first.plane.height_mm])
    corners_m = [np.array([-sheet.plane.x_0_m, -sheet.plane.y_0_m]) for sheet in sheets]
    size_m = size_mm * first.plane.scale / 1000.0
    low = np.minimum(np.min(corners_m, axis=0), bounds[:2])
    high = np.maximum(np.max(corners_m, axis=0) + size_m, bounds[2:])
    around = (float(low[0]), float(low[1]), float(high[0]), float(high[1]))
    scale = _fitting_scale(around, first.paper)
    plane = _centred(first.plane.projection, scale, first.paper, around)
    ratio = first.plane.scale / scale
    shrunk = tuple(tuple(line * ratio for line in lines) for lines in contents.polylines_mm)
    origin = np.array([-plane.x_0_m - bounds[0], -plane.y_0_m - bounds[1]]) * (1000.0 / scale)
    bare = replace(contents, polylines_mm=shrunk, legs=tuple(replace(leg, words="", marks=()) for leg in contents.legs))
    outlines = []
    for number, corner in enumerate(corners_m, 1):
        left, bottom = (corner + np.array([plane.x_0_m, plane.y_0_m])) * (1000.0 / scale)
        width, height = size_mm * ratio
        outlines.append(Outline(number, float(left), float(bottom), float(left + width), float(bottom + height)))
    return replace(make_sheet(bare, plane, origin, (0, len(sheets)), first.paper), outlines=tuple(outlines))
