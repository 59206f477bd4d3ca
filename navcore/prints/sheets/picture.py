"""A plotting sheet as a drawing on paper: neat line, graduation, graticule, shore, legs, waypoints, rose and words."""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

import numpy as np

from navcore.charts.sheet import LETTER_MM
from navcore.prints.sheets.drawing import Area, Drawing, Stroke, Words, words_width_mm
from navcore.prints.sheets.foot import foot_marks
from navcore.text.position import format_graticule_line

if TYPE_CHECKING:
    from navcore.charts.graticule import FrameEnd, Graticule
    from navcore.charts.lettering import Lettering
    from navcore.charts.sheet import LaidLeg, LaidPoint, Outline, Rose, Sheet
    from navcore.prints.sheets.foot import SheetWords
    from navcore.trigonometry import FloatArray

Mark = Stroke | Area | Words

_BAND_MM = 2.6
_BASE = 0.24
"""Of the size of letters: how far above the bottom of their box the base line is."""
_SIDES = {"left": (-1.0, 0.0), "right": (1.0, 0.0), "bottom": (0.0, -1.0), "top": (0.0, 1.0)}
_FAINT = 0.55
_SHORE = 0.72


def draw_sheet(sheet: Sheet, words: SheetWords) -> Drawing:
    """Return a sheet as a drawing, on paper's own millimetres."""
    origin = np.array(sheet.paper.origin_mm)
    inside: list[Mark] = [Stroke(line, 0.15, _SHORE) for line in sheet.coast_mm]
    inside += [Stroke(piece, 0.13, _FAINT) for line in sheet.graticule.lines for piece in line.pieces_mm]
    inside += _latitude_scale(sheet)
    inside += _rose_marks(sheet.rose) if sheet.rose else []
    inside += [mark for outline in sheet.outlines for mark in _outline_marks(outline)]
    inside += [Area(lettering.corners_mm(0.2), 1.0) for lettering in sheet.lettering]
    for leg in sheet.legs:
        inside += _leg_marks(leg)
    for point in sheet.points:
        if point.inside:
            inside += _waypoint_marks(point)
    for lettering in sheet.lettering:
        inside += _lettering_marks(lettering)
    frame = _frame_marks(sheet)
    marks = tuple(_moved(mark, origin) for mark in (*inside, *frame))
    return Drawing(sheet.paper.width_mm, sheet.paper.height_mm, (*marks, *foot_marks(sheet, words)))


def _moved(mark: Mark, origin_mm: FloatArray) -> Mark:
    if isinstance(mark, Stroke):
        return Stroke(mark.points_mm + origin_mm, mark.thick_mm, mark.grey, mark.dash_mm)
    if isinstance(mark, Area):
        return Area(mark.points_mm + origin_mm, mark.grey)
    x_mm, y_mm = float(origin_mm[0]) + mark.x_mm, float(origin_mm[1]) + mark.y_mm
    return Words(mark.text, x_mm, y_mm, mark.size_mm, mark.turn_deg, mark.bold)


def _rectangle(left: float, bottom: float, right: float, top: float) -> FloatArray:
    return np.array([[left, bottom], [right, bottom], [right, top], [left, top], [left, bottom]])


def _frame_marks(sheet: Sheet) -> list[Mark]:
    width, height = sheet.plane.width_mm, sheet.plane.height_mm
    marks: list[Mark] = [
        Stroke(_rectangle(0.0, 0.0, width, height), 0.35),
        Stroke(_rectangle(-_BAND_MM, -_BAND_MM, width + _BAND_MM, height + _BAND_MM), 0.25),
    ]
    ends = [(line.is_meridian, end) for line in sheet.graticule.lines for end in line.ends]
    graduated = {side: _graduated_by(side, ends) for side in _SIDES}
    for is_meridian, end in sheet.graticule.graduation:
        if graduated[end.side] is is_meridian:
            marks.append(_tick(end, _tick_length_mm(end.value_deg, is_meridian, sheet.graticule)))
    marks += [_tick(end, _BAND_MM) for _, end in ends]
    return marks + _frame_labels(sheet, ends)


def _graduated_by(side: str, ends: list[tuple[bool, FrameEnd]]) -> bool:
    """Return whether a side is graduated in longitude: by what crosses it more often, else as on a Mercator sheet."""
    kinds = [is_meridian for is_meridian, end in ends if end.side == side]
    of_meridians = sum(kinds)
    if 2 * of_meridians == len(kinds):
        return side in {"bottom", "top"}
    return 2 * of_meridians > len(kinds)


def _tick_length_mm(value_deg: float, is_meridian: bool, graticule: Graticule) -> float:
    step_min = graticule.lon_graduation_min if is_meridian else graticule.lat_graduation_min
    number = round(value_deg * 60.0 / step_min)
    return _BAND_MM if number % 10 == 0 else 0.7 * _BAND_MM if number % 5 == 0 else 0.4 * _BAND_MM


def _tick(end: FrameEnd, length_mm: float) -> Stroke:
    right, up = _SIDES[end.side]
    ends = np.array([[end.x_mm, end.y_mm], [end.x_mm + right * length_mm, end.y_mm + up * length_mm]])
    return Stroke(ends, 0.13)


def _frame_labels(sheet: Sheet, ends: list[tuple[bool, FrameEnd]]) -> list[Mark]:
    """Return the labels round the neat line; one that would come within a millimetre of another is left out."""
    marks: list[Mark] = []
    for side, (right, up) in _SIDES.items():
        taken: list[tuple[float, float]] = []
        here = [(is_meridian, end) for is_meridian, end in ends if end.side == side]
        wanted = _graduated_by(side, ends)
        for is_meridian, end in sorted(here, key=lambda item: (item[0] is not wanted, item[1].x_mm + item[1].y_mm)):
            text = format_graticule_line(
                end.value_deg,
                is_meridian=is_meridian,
                interval_min=sheet.graticule.interval_min(is_meridian=is_meridian),
            )
            width = words_width_mm(text, LETTER_MM)
            along = end.x_mm if up else end.y_mm
            span = (along - width / 2.0 - 1.0, along + width / 2.0 + 1.0)
            limit = sheet.plane.width_mm if up else sheet.plane.height_mm
            outside = span[0] < -_BAND_MM or span[1] > limit + _BAND_MM
            if outside or any(span[0] < high and span[1] > low for low, high in taken):
                continue
            taken.append(span)
            marks.append(_label_at(text, end, width, (right, up)))
    return marks


def _label_at(text: str, end: FrameEnd, width: float, outwards: tuple[float, float]) -> Words:
    right, up = outwards
    off = _BAND_MM + 0.9
    if up:
        base = end.y_mm + off + 0.1 * LETTER_MM if up > 0.0 else end.y_mm - off - (1.0 - _BASE) * LETTER_MM
        return Words(text, end.x_mm - width / 2.0, base, LETTER_MM)
    # Turned to be read from the right, the letters' tops to the left.
    base = end.x_mm - off if right < 0.0 else end.x_mm + off + (1.0 - _BASE) * LETTER_MM
    return Words(text, base, end.y_mm - width / 2.0, LETTER_MM, 90.0)


def _latitude_scale(sheet: Sheet) -> list[Mark]:
    """Return ticks along the meridian nearest to the middle, where the sides are no scale of latitude."""
    plane = sheet.plane
    if plane.projection.name == "Mercator" or not plane.projection.conformal:
        return []
    meridians = [line for line in sheet.graticule.lines if line.is_meridian]
    if not meridians:
        return []
    middle = np.array([plane.width_mm / 2.0, plane.height_mm / 2.0])
    nearest = min(meridians, key=lambda line: min(np.hypot(*(piece - middle).T).min() for piece in line.pieces_mm))
    step_deg = sheet.graticule.lat_graduation_min / 60.0
    lat_deg = np.arange(math.ceil(-90.0 / step_deg) + 1, math.floor(90.0 / step_deg)) * step_deg
    place = plane.to_mm(lat_deg, nearest.value_deg)
    ahead = plane.to_mm(np.minimum(lat_deg + 0.01, 90.0), nearest.value_deg) - place
    across = np.column_stack((ahead[:, 1], -ahead[:, 0])) / np.maximum(np.hypot(*ahead.T), 1e-12)[:, np.newaxis]
    marks: list[Mark] = []
    for index in np.flatnonzero(plane.holds(place)):
        length = 0.4 * _tick_length_mm(float(lat_deg[index]), is_meridian=False, graticule=sheet.graticule)
        marks.append(
            Stroke(np.stack((place[index] - length * across[index], place[index] + length * across[index])), 0.13)
        )
    return marks


def _rose_marks(rose: Rose) -> list[Mark]:
    """Return a true rose: every degree where there is room, every ten and thirty longer, figures at the thirties."""
    middle = np.array([rose.x_mm, rose.y_mm])
    every = 1 if rose.radius_mm > 20.0 else 2 if rose.radius_mm > 14.0 else 5
    marks: list[Mark] = [
        Area(_circle(middle, rose.radius_mm + 0.8), 1.0),
        Stroke(_circle(middle, rose.radius_mm), 0.13, 0.3),
    ]
    for bearing in range(0, 360, every):
        inner = 0.82 if bearing % 30 == 0 else 0.88 if bearing % 10 == 0 else 0.91 if bearing % 5 == 0 else 0.94
        out = _bearing(bearing - rose.turn_deg)
        marks.append(Stroke(np.stack((middle + inner * rose.radius_mm * out, middle + rose.radius_mm * out)), 0.1, 0.3))
    size = min(LETTER_MM, 0.3 * rose.radius_mm)
    for bearing in range(0, 360, 30 if rose.radius_mm > 16.0 else 90):
        turned = bearing - rose.turn_deg
        text = f"{bearing:03d}"
        turn = -turned
        along = _bearing(turned + 90.0)
        start = middle + _bearing(turned) * (0.8 * rose.radius_mm - size) - along * words_width_mm(text, size) / 2.0
        marks.append(Words(text, float(start[0]), float(start[1]), size, turn))
    out = _bearing(-rose.turn_deg)
    side = _bearing(90.0 - rose.turn_deg)
    length = 0.42 * rose.radius_mm
    arrow = np.stack(
        (middle + length * out, middle + 0.08 * rose.radius_mm * side, middle - 0.08 * rose.radius_mm * side)
    )
    return [*marks, Stroke(np.stack((middle - length * out, middle)), 0.2), Area(arrow, 0.3)]


def _bearing(bearing_deg: float) -> FloatArray:
    angle = math.radians(bearing_deg)
    return np.array([math.sin(angle), math.cos(angle)])


def _circle(middle_mm: FloatArray, radius_mm: float) -> FloatArray:
    angle = np.linspace(0.0, 2.0 * math.pi, 121)
    return middle_mm + radius_mm * np.column_stack((np.sin(angle), np.cos(angle)))


def _leg_marks(leg: LaidLeg) -> list[Mark]:
    dash = (4.0, 1.2) if leg.great_circle else ()
    marks: list[Mark] = [Stroke(piece, 0.4, 0.0, dash) for piece in leg.pieces_mm]
    for x_mm, y_mm in leg.marks_mm:
        marks += [
            Stroke(np.array([[x_mm - 0.9, y_mm - 0.9], [x_mm + 0.9, y_mm + 0.9]]), 0.25),
            Stroke(np.array([[x_mm - 0.9, y_mm + 0.9], [x_mm + 0.9, y_mm - 0.9]]), 0.25),
        ]
    return marks


def _waypoint_marks(point: LaidPoint) -> list[Mark]:
    middle = np.array([point.x_mm, point.y_mm])
    ring = _circle(middle, 1.2)
    dot = _circle(middle, 0.25)
    return [Area(ring, 1.0), Stroke(ring, 0.3), Area(dot)]


def _lettering_marks(lettering: Lettering) -> list[Mark]:
    marks: list[Mark] = []
    if lettering.leader_mm is not None:
        x1, y1, x2, y2 = lettering.leader_mm
        off = math.hypot(x2 - x1, y2 - y1)
        start = 1.2 / max(off, 1.2)
        marks.append(Stroke(np.array([[x1 + start * (x2 - x1), y1 + start * (y2 - y1)], [x2, y2]]), 0.13))
    angle = math.radians(lettering.turn_deg)
    lift = _BASE * lettering.height_mm
    x_mm, y_mm = lettering.x_mm - lift * math.sin(angle), lettering.y_mm + lift * math.cos(angle)
    marks.append(Words(lettering.words, x_mm, y_mm, lettering.height_mm, lettering.turn_deg))
    return marks


def _outline_marks(outline: Outline) -> list[Mark]:
    text, size = str(outline.number), 5.0
    box = _rectangle(outline.left_mm, outline.bottom_mm, outline.right_mm, outline.top_mm)
    return [Stroke(box, 0.3), Words(text, outline.left_mm + 1.2, outline.top_mm - size, size, 0.0, bold=True)]
